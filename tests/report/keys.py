"""Which message keys the engine's sources use: read from the sources themselves."""

import ast
from collections.abc import Iterator
from pathlib import Path

Function = ast.FunctionDef | ast.AsyncFunctionDef
# maker of a finding or an error -> where its keys stand: position, or name of the argument
MAKERS: dict[str, tuple[tuple[int, str], ...]] = {
    "Finding": ((2, "key"), (8, "fix")),
    "note": ((1, "key"), (3, "fix")),
    "upper": ((99, "key"), (99, "fix")),
    "lower": ((99, "key"), (99, "fix")),
}
ANYTHING = "*"  # a piece of a key that cannot be followed
ERRORS = ("InputError", "PlannerError")


def keys_in(source: str) -> tuple[set[str], list[str]]:
    """Keys of findings, ways out and errors in a module, and the arguments that could not be followed."""
    tree = ast.parse(source)
    finder = _Finder(tree)
    for function in [node for node in ast.walk(tree) if isinstance(node, Function)]:
        for call in [node for node in ast.walk(function) if isinstance(node, ast.Call)]:
            finder.look_at(call, function)
    return finder.keys, finder.lost


class _Finder:
    def __init__(self, tree: ast.Module) -> None:
        self.functions = {node.name: node for node in ast.walk(tree) if isinstance(node, Function)}
        self.calls = [node for node in ast.walk(tree) if isinstance(node, ast.Call)]
        self.inside = {
            id(call): function
            for function in self.functions.values()
            for call in ast.walk(function)
            if isinstance(call, ast.Call)
        }
        self.keys: set[str] = set()
        self.lost: list[str] = []

    def look_at(self, call: ast.Call, function: Function) -> None:
        name = ast.unparse(call.func)
        if name in ERRORS and call.args:
            self.add(call.args[0], function)
        for position, keyword in MAKERS.get(name, ()):
            given = next((k.value for k in call.keywords if k.arg == keyword), None)
            if given is None and position < len(call.args):
                given = call.args[position]
            if given is not None:
                self.add(given, function)

    def add(self, node: ast.expr, function: Function) -> None:
        found = set(self.values(node, function, 0))
        self.keys |= {key for key in found if key}
        if not found:
            self.lost.append(f"{function.name}: {ast.unparse(node)}")

    def values(self, node: ast.expr, function: Function, depth: int) -> Iterator[str]:
        """The texts that an expression can be."""
        if depth > 8:
            return
        follow = depth + 1
        if isinstance(node, ast.Constant):
            yield node.value if isinstance(node.value, str) else ""
        elif isinstance(node, ast.IfExp):
            yield from self.values(node.body, function, follow)
            yield from self.values(node.orelse, function, follow)
        elif isinstance(node, ast.JoinedStr):
            yield from self.joined(node, function, follow)
        elif isinstance(node, ast.Name):
            yield from self.named(node.id, function, follow)
        elif isinstance(node, ast.Call) and ast.unparse(node.func) in self.functions:
            callee = self.functions[ast.unparse(node.func)]
            for returned in [n for n in ast.walk(callee) if isinstance(n, ast.Return) and n.value]:
                assert returned.value is not None
                yield from self.values(returned.value, callee, follow)

    def joined(self, node: ast.JoinedStr, function: Function, depth: int) -> Iterator[str]:
        texts = [""]
        for piece in node.values:
            inner = piece.value if isinstance(piece, ast.FormattedValue) else piece
            ends = list(self.values(inner, function, depth)) or [ANYTHING]
            texts = [text + end for text in texts for end in ends]
        yield from texts

    def named(self, name: str, function: Function, depth: int) -> Iterator[str]:
        """What a name was given: by assignment in the function, else by its callers."""
        for node in ast.walk(function):
            if isinstance(node, ast.Assign):
                for target in node.targets:
                    yield from self.assigned(target, node.value, name, function, depth)
            if isinstance(node, ast.For) and isinstance(node.target, ast.Tuple | ast.Name):
                rows = node.iter.elts if isinstance(node.iter, ast.Tuple | ast.List) else []
                for row in rows:
                    yield from self.assigned(node.target, row, name, function, depth)
        parameters = [one.arg for one in (*function.args.posonlyargs, *function.args.args)]
        named_only = [one.arg for one in function.args.kwonlyargs]
        if name not in (*parameters, *named_only):
            return
        for call in self.calls:
            if ast.unparse(call.func) != function.name or id(call) not in self.inside:
                continue
            given = next((k.value for k in call.keywords if k.arg == name), None)
            if given is None and name in parameters and parameters.index(name) < len(call.args):
                given = call.args[parameters.index(name)]
            if given is not None:
                yield from self.values(given, self.inside[id(call)], depth)

    def assigned(
        self, target: ast.expr, value: ast.expr, name: str, function: Function, depth: int
    ) -> Iterator[str]:
        if isinstance(target, ast.Name) and target.id == name:
            yield from self.values(value, function, depth)
        if isinstance(target, ast.Tuple) and isinstance(value, ast.Tuple):
            for one, given in zip(target.elts, value.elts, strict=False):
                yield from self.assigned(one, given, name, function, depth)
        if isinstance(target, ast.Tuple) and isinstance(value, ast.IfExp):
            yield from self.assigned(target, value.body, name, function, depth)
            yield from self.assigned(target, value.orelse, name, function, depth)


def all_keys(package: Path, rooms: tuple[str, ...]) -> tuple[dict[str, str], list[str]]:
    """Every key of some rooms with a module that uses it, and what could not be followed."""
    keys: dict[str, str] = {}
    lost: list[str] = []
    for room in rooms:
        place = package / room
        for file in sorted(place.rglob("*.py")) if place.is_dir() else [place]:
            found, unfollowed = keys_in(file.read_text(encoding="utf-8"))
            keys |= dict.fromkeys(found, file.name)
            lost += [f"{file.name}: {one}" for one in unfollowed]
    return keys, lost
