"""What this house has agreed on, where a machine can see it: sizes, places, words, formula pages."""

import ast
import importlib
import inspect
import pkgutil
import re
import subprocess
import typing
from collections.abc import Callable, Iterator
from pathlib import Path

import pytest

from lineplanner.quantities import Kind

CHECKOUT = Path(__file__).parent.parent
PACKAGE = CHECKOUT / "lineplanner"
MODULES = sorted(PACKAGE.rglob("*.py"))


def name_of(file: Path) -> str:
    return str(file.relative_to(CHECKOUT))


# --- sizes -----------------------------------------------------------------------------------------------

LONGEST_FILE = 500
LONGEST_FUNCTION = 60  # without its docstring


def long_functions(source: str) -> list[str]:
    """Functions whose lines, docstring taken off, are too many."""
    found = []
    for node in ast.walk(ast.parse(source)):
        if isinstance(node, ast.FunctionDef | ast.AsyncFunctionDef):
            first = node.body[0]
            docstring = (first.end_lineno or 0) - first.lineno + 1 if ast.get_docstring(node) else 0
            lines = (node.end_lineno or 0) - node.lineno + 1 - docstring
            if lines > LONGEST_FUNCTION:
                found.append(f"{node.name}: {lines} lines")
    return found


@pytest.mark.parametrize("file", MODULES, ids=name_of)
def test_no_file_and_no_function_is_over_its_ceiling(file: Path) -> None:
    source = file.read_text(encoding="utf-8")
    assert len(source.splitlines()) <= LONGEST_FILE
    assert long_functions(source) == []


def test_a_long_function_is_seen_and_a_long_docstring_is_forgiven() -> None:
    body = "    x = 1\n" * LONGEST_FUNCTION
    assert long_functions(f"def f():\n{body}") == ["f: 61 lines"]
    assert long_functions(f'def f():\n    """Say.\n\n{body}    """\n    return 1\n') == []


# --- places ----------------------------------------------------------------------------------------------

TOP_LEVEL = {
    "README.md",
    "DEVELOPERS.md",
    "pyproject.toml",
    "lineplanner",
    "rack_library",
    "tests",
    "configs",
}


def test_nothing_else_lies_at_the_top_of_the_project() -> None:
    if not (CHECKOUT / ".git").exists():
        pytest.skip("not a git checkout")
    listed = subprocess.run(
        ["git", "ls-files", "--cached", "--others", "--exclude-standard"],
        cwd=CHECKOUT,
        capture_output=True,
        encoding="utf-8",
        check=True,
    ).stdout.splitlines()
    top = {line.split("/")[0].strip('"') for line in listed}
    assert {entry for entry in top if not entry.startswith(".")} <= TOP_LEVEL


def test_the_package_itself_imports_nothing() -> None:
    tree = ast.parse((PACKAGE / "__init__.py").read_text(encoding="utf-8"))
    assert not [node for node in ast.walk(tree) if isinstance(node, ast.Import | ast.ImportFrom)]


# --- words -----------------------------------------------------------------------------------------------

# The program plans; it vouches for nothing.
PROMISES = re.compile(r"\b(safe|compliant)\b", re.IGNORECASE)


def promises_in(source: str) -> list[str]:
    """String literals that promise more than a plan can; a pattern to search for is not printed."""
    nodes = list(ast.walk(ast.parse(source)))
    patterns = {
        id(node.args[0])
        for node in nodes
        if isinstance(node, ast.Call) and node.args and ast.unparse(node.func).startswith("re.")
    }
    return [
        node.value
        for node in nodes
        if isinstance(node, ast.Constant)
        and isinstance(node.value, str)
        and id(node) not in patterns
        and PROMISES.search(node.value)
    ]


@pytest.mark.parametrize("file", MODULES, ids=name_of)
def test_no_text_of_the_program_promises_safety(file: Path) -> None:
    assert promises_in(file.read_text(encoding="utf-8")) == []


@pytest.mark.parametrize("folder", ["configs", "rack_library"])
def test_no_data_file_promises_safety(folder: str) -> None:
    files = [file for file in (CHECKOUT / folder).rglob("*") if file.is_file()]
    assert [
        f"{name_of(file)}: {line}"
        for file in files
        for line in file.read_text(encoding="utf-8").splitlines()
        if PROMISES.search(line)
    ] == []


def test_a_promise_is_seen_also_inside_a_formatted_text() -> None:
    for text in ('f"{x} is SAFE"', '"fail-safe"', '"non-compliant"', 're.sub("x", "safe", y)'):
        assert len(promises_in(text)) == 1
    for text in ('"safety data sheet"', '"unsafe"', '"safeguard"', 're.search("safe|sound", text)'):
        assert promises_in(text) == []


# --- formula pages ---------------------------------------------------------------------------------------

FORMULA_ROOMS = ("bath", "circuit", "geometry", "program", "capacity", "load")
HEADINGS = ("Parameters", "Returns", "Valid", "Source", "Example")
UNIT = re.compile(r"\[([^\[\]]*)\]")


def kind_in(annotation: object) -> Kind | None:
    """The kind of quantity in an annotation, also where None is allowed beside it."""
    for item in getattr(annotation, "__metadata__", ()):
        if isinstance(item, Kind):
            return item
    if type(None) in typing.get_args(annotation):
        return next(filter(None, map(kind_in, typing.get_args(annotation))), None)
    return None


def sections_of(docstring: str) -> dict[str, str]:
    """The indented text under each heading that stands on a line of its own."""
    sections: dict[str, list[str]] = {}
    lines: list[str] | None = None
    for line in inspect.cleandoc(docstring).splitlines():
        if line and not line[0].isspace():
            lines = sections.setdefault(line, []) if line in (*HEADINGS, "Raises") else None
        elif lines is not None:
            lines.append(line)
    return {heading: inspect.cleandoc("\n" + "\n".join(text)) for heading, text in sections.items()}


def entries_of(section: str) -> dict[str, str]:
    """`name: text` entries of the Parameters section; `one, two: text` stands for both."""
    entries: dict[str, str] = {}
    names: list[str] = []
    for line in section.splitlines():
        entry = re.match(r"(\w+(?:, \w+)*): ", line)
        if entry:
            names = entry[1].split(", ")
        for name in names:
            entries[name] = f"{entries.get(name, '')} {line}"
    return entries


def unit_problem(what: str, kind: Kind | None, text: str) -> list[str]:
    units = UNIT.findall(text)
    if kind is None or (units and units[-1] == kind.unit):
        return []
    return [f"{what}: says {units[-1:]}, the annotation says [{kind.unit}]"]


def page_problems(function: Callable[..., object]) -> list[str] | None:
    """What its formula page lacks; None if the function returns no quantity and needs no page."""
    hints = typing.get_type_hints(function, include_extras=True)
    result = kind_in(hints.get("return"))
    if result is None:
        return None
    sections = sections_of(function.__doc__ or "")
    problems = [f"no {heading}" for heading in HEADINGS if not sections.get(heading)]
    entries = entries_of(sections.get("Parameters", ""))
    for name in inspect.signature(function).parameters:
        if name not in entries:
            problems.append(f"{name}: not described")
        else:
            problems += unit_problem(name, kind_in(hints.get(name)), entries[name])
    problems += unit_problem("Returns", result, sections.get("Returns", ""))
    if ">>> " not in sections.get("Example", ""):
        problems.append("Example: no doctest")
    return problems


def public_functions() -> Iterator[Callable[..., object]]:
    """Every public function that a formula room defines itself."""
    for room in FORMULA_ROOMS:
        if not (PACKAGE / f"{room}.py").exists() and not (PACKAGE / room / "__init__.py").exists():
            continue
        top = importlib.import_module(f"lineplanner.{room}")
        inner = pkgutil.walk_packages(getattr(top, "__path__", ()), f"{top.__name__}.")
        for module in (top, *(importlib.import_module(found.name) for found in inner)):
            for name, member in vars(module).items():
                function = inspect.unwrap(member) if callable(member) else member
                if (
                    inspect.isfunction(function)
                    and not name.startswith("_")
                    and function.__module__ == module.__name__
                ):
                    yield function


def test_every_formula_of_the_engine_has_a_complete_page() -> None:
    pages = {
        f"{function.__module__}.{function.__qualname__}": page_problems(function)
        for function in public_functions()
    }
    formulas = {name: problems for name, problems in pages.items() if problems is not None}
    if any((PACKAGE / "bath").glob("*.py")):
        assert [name for name in formulas if name.startswith("lineplanner.bath")], "no formula was found"
    assert {name: problems for name, problems in formulas.items() if problems} == {}


GOOD_PAGE = '''
from lineplanner.quantities import Area, Current, CurrentDensity

def set_current(density: CurrentDensity, area: Area | None, tips: int = 0) -> Current:
    """Amperes for the load.

        I = J A

    Parameters
        density: J, per carrying area
            and never per wet area [A/m^2]
        area: A, carrying area of the load [m^2]
        tips: number of bare tips
    Returns
        I, current to set [A]
    Valid
        any area above zero
    Source
        definition of current density
    Example
        >>> set_current(100.0, 2.0)
        200.0
    """
    return density * (area or 0.0)
'''


def problems_of_page(*change: str) -> list[str] | None:
    names: dict[str, typing.Any] = {}
    text = GOOD_PAGE.replace(*change) if change else GOOD_PAGE
    assert (text != GOOD_PAGE) is bool(change)
    exec(compile(text, "page", "exec", dont_inherit=True), names)
    return page_problems(names["set_current"])


def test_a_complete_formula_page_has_no_problems() -> None:
    assert problems_of_page() == []


def test_a_function_that_returns_no_quantity_needs_no_page() -> None:
    assert problems_of_page("-> Current:", "-> float:") is None


GAPS = [
    ("    Valid\n        any area above zero\n", "", "no Valid"),
    ("        any area above zero\n", "", "no Valid"),
    ("    Source\n", "    Source:\n", "no Source"),
    ("carrying area of the load [m^2]", "carrying area", "area: says [], the annotation says [m^2]"),
    ("wet area [A/m^2]", "wet area [A/dm2]", "density: says ['A/dm2'], the annotation says [A/m^2]"),
    ("current to set [A]", "current [mA]", "Returns: says ['mA'], the annotation says [A]"),
    ("        tips: number of bare tips\n", "", "tips: not described"),
    ("        >>> set_current(100.0, 2.0)\n", "", "Example: no doctest"),
]


@pytest.mark.parametrize("gap", GAPS, ids=lambda gap: gap[0].strip())
def test_a_gap_in_a_formula_page_is_named(gap: tuple[str, str, str]) -> None:
    old, new, problem = gap
    assert problems_of_page(old, new) == [problem]


def test_a_formula_without_docstring_lacks_everything() -> None:
    text = re.sub(r'"""[\s\S]*"""', "", GOOD_PAGE)
    problems = problems_of_page(GOOD_PAGE, text)
    assert problems is not None
    assert {f"no {heading}" for heading in HEADINGS} <= set(problems)
