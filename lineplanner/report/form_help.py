"""What a field says while it is typed in, and what its help tells."""

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

from lineplanner import units
from lineplanner.files.problems import listed, text_of, token
from lineplanner.inputs.declared import Path
from lineplanner.quantities import RATIO, Field, Kind
from lineplanner.report.form_rows import UNKNOWN, Form, Heading, Row, Takes, echoed
from lineplanner.report.forms import where_in_file
from lineplanner.report.style import Style
from lineplanner.units import UnitTextError

_LONGEST_NAME = 80
_MOST_SHOWN = 6  # choices that fit a line


@dataclass(frozen=True, slots=True)
class Said:
    """What is understood of a text so far, or why it is not; both empty where there is nothing to say."""

    echo: str = ""
    reason: str = ""


def understood(row: Row, text: str, style: Style) -> Said:
    """A text as it is being typed: a quantity in both unit systems, the choices that fit, or the reason why not.

    Bounds and rules between fields are looked at when the entry is given, not here.
    """
    text = text.strip()
    if not text:
        return Said(
            echo=", ".join(part for part in ("left out" if row.optional else "", _wanted(row)) if part)
        )
    if text == UNKNOWN and row.field is not None and row.field.unknown:
        return Said(echo="not known")
    if row.takes is Takes.QUANTITY:
        return _quantity(row, text, style)
    return _choice(row, text) if row.choices and row.takes.turns else Said()


def _wanted(row: Row) -> str:
    """What an empty field waits for."""
    if row.kind is not None:
        return (
            f"takes {'a number' if row.kind == RATIO else f'a {row.kind.name}'} such as {_examples(row.kind)}"
        )
    return f"takes {_few(row.choices)}" if row.choices else ""


def _examples(kind: Kind) -> str:
    return " or ".join(dict.fromkeys((units.example(kind, "metric"), units.example(kind, "us"))))


def _quantity(row: Row, text: str, style: Style) -> Said:
    kind = row.kind or RATIO
    try:
        return Said(echo=f"= {echoed(units.parse(text, kind, system=style.system), kind)}")
    except UnitTextError as error:
        return Said(reason=text_of(error.key, error.facts, style.system))


def _choice(row: Row, text: str) -> Said:
    if text in row.choices:
        return Said(echo=f"{row.choices.index(text) + 1} of {len(row.choices)}")
    fitting = fitting_choices(row, text)
    if len(fitting) == 1:
        return Said(echo=f"Enter takes {fitting[0]}")
    return (
        Said(echo=f"one of {_few(fitting)}") if fitting else Said(reason=f"Choose one of {_few(row.choices)}")
    )


def _few(choices: tuple[str, ...]) -> str:
    more = f" and {len(choices) - _MOST_SHOWN} more" if len(choices) > _MOST_SHOWN else ""
    return ", ".join(choices[:_MOST_SHOWN]) + more


def fitting_choices(row: Row, text: str) -> tuple[str, ...]:
    """The choices that begin with a text, else those that hold it."""
    lower = text.strip().lower()
    first = tuple(one for one in row.choices if one.lower().startswith(lower))
    return first or tuple(one for one in row.choices if lower in one.lower())


def completed_text(row: Row, text: str) -> str:
    """The text as it is given: a beginning that fits one choice alone is that choice."""
    text = text.strip()
    if not text or text in row.choices or row.takes not in (Takes.CHOICE, Takes.YES_NO, Takes.REFERENCE):
        return text
    fitting = fitting_choices(row, text)
    return fitting[0] if len(fitting) == 1 else text


def too_long(row: Row, text: str) -> str:
    """Why names are refused that no file and no rack can have; empty if they are not."""
    if row.takes is not Takes.NAMES:
        return ""
    long = next((name for name in text.split(",") if len(name) > _LONGEST_NAME), "")
    return f"`{token(long.strip())}` is longer than any name. Shorten it" if long else ""


def next_choice(row: Row, text: str, step: int) -> str:
    """The choice after or before the one that a text names; leaving it out is one of them where that is allowed."""
    may_be_empty = row.optional and (row.value is None or row.takes in (Takes.REFERENCE, Takes.WORDS))
    every = ("", *row.choices) if may_be_empty else row.choices
    known = completed_text(row, text)
    if known not in every:
        return every[0 if step > 0 else -1]
    return every[(every.index(known) + step) % len(every)]


def field_lines(
    row: Row | Heading, text: str, typed: str, refused: str, style: Style, *, new: bool
) -> list[str]:
    """What stands under a field: why its text is refused and what is in force, or what is understood of it.

    text is what stood in it, typed what stands there now; new: nothing of the entry is in force yet.
    """
    if isinstance(row, Heading):
        return [
            *([f"NOT TAKEN: {refused}"] if refused else []),
            *([row.help] if row.help else []),
            *_of_heading(row),
        ]
    found = []
    if refused and typed.strip() == text.strip():
        found.append(f"NOT TAKEN: {refused}")
        found += [] if new else [f"in force: {in_force(row)}"]
    else:
        said = understood(row, typed, style)
        found.append(said.echo or said.reason)
        changed = typed.strip() != text.strip()
        found.append(f"Enter gives it; in force: {in_force(row)}" if changed and not new else row.help)
    found.append(f"{row.mark}: {row.beside}" if row.mark else row.beside)
    return [one for one in (*found, row.locked) if one]


def in_force(row: Row) -> str:
    """The value that counts, with its echo."""
    return " = ".join(one for one in (row.text or "left out", row.elsewise) if one)


def help_lines(row: Row | Heading, record: Any, style: Style) -> list[str]:
    """Label, help, what is allowed, an example, and where the value stands in the file."""
    stands = f"in the file: {where_in_file(record, row.path)}"
    if isinstance(row, Heading):
        return [row.label, *([row.help] if row.help else []), *_of_heading(row), stands]
    lines = [row.label, *([row.help] if row.help else []), *_takes(row), *_range(row.field, style)]
    lines.append("may be left out" if row.optional else "is needed")
    lines += [row.beside] if row.beside else []
    return [*lines, *([row.locked] if row.locked else []), stands]


def _of_heading(heading: Heading) -> list[str]:
    found = ["ctrl+n adds one"] if heading.adds else []
    return [*found, "F9 takes it out"] if heading.removes else found


def _takes(row: Row) -> Iterator[str]:
    if row.kind is not None and row.kind != RATIO:
        yield f"takes a {row.kind.name} with its unit, such as {_examples(row.kind)}"
        yield f"units: {', '.join(units.units_of(row.kind))}"
    elif row.kind is not None:
        yield f"takes a plain number or percent, such as {units.example(RATIO)} or 50 %"
    else:
        yield f"takes {row.takes.value}"
    if row.choices:
        yield f"choices: {listed(row.choices, 30).replace('`', '')}"
    if row.field is not None and row.field.unknown:
        yield f"`{UNKNOWN}` says that it is not known"


def _range(field: Field | None, style: Style) -> Iterator[str]:
    """The limits of the declaration."""
    if field is None or field.kind is None:
        return
    words = (
        ("at least", field.low),
        ("more than", field.above),
        ("at most", field.high),
        ("less than", field.below),
    )
    limits = [
        f"{word} {style.show(limit, field.kind, digits=6)}" for word, limit in words if limit is not None
    ]
    if limits:
        yield f"allowed: {', '.join(limits)}"


def fitting_rows(form: Form, text: str) -> tuple[Row | Heading, ...]:
    """The rows whose label, help, key or text hold all words of a search, with the headings over them."""
    words = text.lower().split()
    if not words:
        return form.rows
    kept = [
        one
        for one in form.rows
        if isinstance(one, Row) and all(word in _searched(form, one) for word in words)
    ]
    over = {one.path[:depth] for one in kept for depth in range(len(one.path))}
    found = {one.path for one in kept}
    return tuple(
        one
        for one in form.rows
        if one.path in found
        or (
            isinstance(one, Heading)
            and (one.path in over or all(word in one.label.lower() for word in words))
        )
    )


def _searched(form: Form, row: Row) -> str:
    headings = (
        one.label for one in form.rows if isinstance(one, Heading) and row.path[: len(one.path)] == one.path
    )
    return " ".join((row.label, row.help, row.text, row.mark, *map(str, row.path), *headings)).lower()


_FIGURES = {
    "aim": "thickness.target_m",
    "current_density": "current.density_A_per_m2",
    "hangs": "area",
    "thieves": "area",
    "outline": "area",
}


def figure_of(path: Path) -> str:
    """The figure of the plan that is asked for from a field: the nearest that rests on it."""
    return next((_FIGURES[str(step)] for step in reversed(path) if step in _FIGURES), "current.set_A")
