"""What is wrong in a file: where, which message, with which facts; and the one form it is printed in."""

import re
from collections.abc import Iterable, Mapping
from dataclasses import dataclass, field
from pathlib import Path as DiskPath
from typing import Literal, cast

from lineplanner.errors import Fact, Facts, InputError, Problem, Quantity
from lineplanner.inputs.declared import Path
from lineplanner.quantities import Kind

UnitSystem = Literal["metric", "us"]
LONGEST_TOKEN = 60  # characters of a person's own text that a message repeats


@dataclass(frozen=True, slots=True)
class FileProblem:
    """One thing that is wrong in a file. path is None where no file is to blame; key_path holds file keys."""

    path: DiskPath | None
    line: int | None
    key_path: Path
    key: str
    facts: Facts = field(default_factory=dict)


class FilesError(InputError):
    """What is wrong in all files that were needed, at once."""

    def __init__(self, problems: list[FileProblem]) -> None:
        super().__init__("files", count=len(problems))
        self.problems = problems

    def __str__(self) -> str:
        return "\n".join(word(problem) for problem in self.problems)


class FileChangedError(FilesError):
    """A file on disk is not the one that was read: it is never overwritten."""


def key_text(path: Path) -> str:
    """A key path as a message shows it; entries of lists are counted from 1.

    >>> key_text(("rectifier", 0, "max_current"))
    'rectifier[1].max_current'
    """
    text = ""
    for step in path:
        text += f"[{step + 1}]" if isinstance(step, int) else f".{_quoted(step)}"
    return text.removeprefix(".")


def _quoted(key: str) -> str:
    return key if re.fullmatch(r"[A-Za-z0-9_-]+", key) else f'"{token(key)}"'


def token(text: object) -> str:
    """A person's own text as a message repeats it: on one line, without control characters, not too long.

    >>> token("3 A/dm2"), token("3\\n\\x1b[2J")
    ('3 A/dm2', '3\\\\n\\\\x1b[2J')
    """
    shown = _visible(str(text))
    return shown if len(shown) <= LONGEST_TOKEN else f"{shown[: LONGEST_TOKEN - 3]}..."


def _visible(text: str) -> str:
    return "".join(c if c.isprintable() else c.encode("unicode_escape").decode() for c in text)


def shown_path(path: DiskPath) -> str:
    """A file as a message names it: from the working folder where it lies below it."""
    try:
        inside = path.absolute().relative_to(DiskPath.cwd())
    except (ValueError, OSError):
        return _visible(str(path))
    return _visible(str(inside))


def where(problem: FileProblem) -> str:
    """The front of a message: file, line, key, as far as there are any."""
    parts = [] if problem.path is None else [shown_path(problem.path)]
    if problem.line is not None:
        parts = [f"{parts[0]}:{problem.line}"]
    if problem.key_path:
        parts.append(key_text(problem.key_path))
    return "".join(f"{part}: " for part in parts)


def word(problem: FileProblem | Problem, system: UnitSystem = "metric") -> str:
    """A problem as text: where, what is wrong, what to do."""
    if isinstance(problem, FileProblem):
        return where(problem) + text_of(problem.key, problem.facts, system)
    front = f"{key_text(problem.path)}: " if problem.path else ""
    return front + text_of(problem.key, problem.facts, system)


def text_of(key: str, facts: Facts, system: UnitSystem = "metric") -> str:
    """The sentence of a message key with its facts filled in, quantities in the unit system."""
    shown = {name: _shown(fact, system) for name, fact in facts.items()}
    template = templates().get(key)
    if template is None:  # a rule without a sentence of its own still says which rule it is
        return f"{key.replace('-', ' ')} ({', '.join(f'{name} {fact}' for name, fact in shown.items())})"
    return template.format_map(shown)


def templates() -> Mapping[str, str]:
    """Every sentence by its message key."""
    from lineplanner.files.messages import MESSAGES
    from lineplanner.files.part_messages import PART_MESSAGES
    from lineplanner.units.messages import MESSAGES as UNIT_MESSAGES

    return {**UNIT_MESSAGES, **PART_MESSAGES, **MESSAGES}


def _shown(fact: Fact, system: UnitSystem) -> str:
    if isinstance(fact, Quantity):
        from lineplanner import units

        return units.show(fact.value, cast("Kind", fact.kind), system)
    return _visible(str(fact))


def listed(words: Iterable[object], most: int = 12) -> str:
    """Words as a message lists them.

    >>> listed(["plate", "tube"])
    '`plate`, `tube`'
    """
    every = [f"`{token(one)}`" for one in words]
    return ", ".join(every[:most]) + (", ..." if len(every) > most else "")
