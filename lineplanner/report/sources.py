"""Every constant of the engine and every value of the standards tables, with status, source and file."""

import importlib
import pkgutil
import re
from collections.abc import Iterator, Mapping
from dataclasses import dataclass, fields, is_dataclass
from pathlib import Path
from typing import Any

import lineplanner
from lineplanner.files.library import Library
from lineplanner.inputs.adoption import with_adopted
from lineplanner.inputs.declared import declared
from lineplanner.inputs.tables import ConductivityTable, Limits
from lineplanner.inputs.values import Sourced
from lineplanner.quantities import (
    CONDUCTIVITY,
    KINDS,
    LENGTH,
    RATIO,
    STRESS,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    Kind,
)
from lineplanner.report.layout import wrapped
from lineplanner.report.style import Style
from lineplanner.sources import Constant

# Rooms above the engine hold no constants of the trade.
_PHYSICAL = "lineplanner/quantities.py"  # printed in SI, as their source defines them
_DIGITS = 6  # of a constant
_LARGEST_DIFFERENCE = 200.0  # K; no bath is colder, and nothing here warms by as much
_MEANT = {LENGTH.unit: LENGTH, STRESS.unit: STRESS}  # of several kinds of one unit, the one a constant means
_SHELLS = frozenset({"__main__", "cli", "tui", "log", "files", "units"})


@dataclass(frozen=True, slots=True, kw_only=True)
class Listed:
    """One number: kind is None where the unit is no kind of the engine's (`unit` names it then)."""

    file: str
    name: str
    value: float
    unit: str
    kind: Kind | None
    status: str
    source: str


def listed(library: Library) -> Iterator[Listed]:
    """All of them: the tables of the site by file, which a shop can change, then the constants by module."""
    yield from _tables(library)
    yield from _constants()


def _constants() -> Iterator[Listed]:
    folder = Path(lineplanner.__file__).parent
    seen: set[tuple[str, float]] = set()
    for module in pkgutil.walk_packages(lineplanner.__path__, "lineplanner."):
        if module.name.split(".")[1] in _SHELLS:
            continue
        loaded = importlib.import_module(module.name)
        file = Path(str(loaded.__file__)).relative_to(folder.parent).as_posix()
        text = Path(str(loaded.__file__)).read_text(encoding="utf-8")
        for name, value in vars(loaded).items():
            for one in _constants_in(value) if _made_here(name, text) else ():
                if (one.name, one.value) not in seen:
                    seen.add((one.name, one.value))
                    yield Listed(
                        file=file,
                        name=one.name,
                        value=one.value,
                        unit=one.unit,
                        kind=None if file == _PHYSICAL else _kind_of(one),
                        status=one.source.status.value,
                        source=one.source.title,
                    )


def _kind_of(constant: Constant) -> Kind | None:
    """The kind that a constant's unit belongs to, if it is that of no other; of kelvins by their number."""
    if constant.unit == TEMPERATURE.unit:
        return TEMPERATURE if constant.value > _LARGEST_DIFFERENCE else TEMPERATURE_DIFFERENCE
    found = [kind for kind in KINDS.values() if kind.unit == constant.unit]
    return _MEANT.get(constant.unit, found[0] if len(found) == 1 else None)


def _constants_in(value: object) -> Iterator[Constant]:
    """A constant, or those in a table of a module."""
    if isinstance(value, Constant):
        yield value
    elif isinstance(value, Mapping | tuple | list):
        for one in value.values() if isinstance(value, Mapping) else value:
            yield from _constants_in(one)


def _made_here(name: str, source: str) -> bool:
    """Whether a module's text gives a name its value; other modules only import it."""
    return re.search(rf"^{re.escape(name)}(?:: \w+)? = ", source, re.MULTILINE) is not None


def _tables(library: Library) -> Iterator[Listed]:
    """The standards tables and the thresholds of the cautions; adopted limits as entered here."""
    adopted = library.site().adopted
    files = [p for kind in ("limits", "cautions") for p in library.paths(kind)]
    for path in dict.fromkeys(sorted(files)):
        record = library.open(path).record
        if isinstance(record, Limits):
            record = with_adopted(record, adopted)
        where = path.relative_to(library.folder).as_posix()
        yield from _sourced(record, where, "", None)


def _sourced(value: Any, file: str, name: str, kind: Kind | None) -> Iterator[Listed]:
    """The numbers with a source inside a record, named by their labels."""
    if isinstance(value, Sourced):
        yield Listed(
            file=file,
            name=name,
            value=value.value,
            unit="1" if kind is None else kind.unit,
            kind=kind,
            status=value.status.value,
            source=value.source,
        )
    elif isinstance(value, ConductivityTable):
        yield from _conductivity(value, file)
    elif isinstance(value, tuple):
        for one in value:
            yield from _sourced(one, file, name, kind)
    elif is_dataclass(value) and not isinstance(value, type):
        front = str(getattr(value, "name", "")) or name
        labels = {one.name: one.field for one in declared(type(value)).values()}
        for one in fields(value):
            field = labels.get(one.name)
            label = field.label if field else one.name
            inner = getattr(value, one.name)
            whole = f"{front}, {label}" if front and isinstance(inner, Sourced) else label
            yield from _sourced(inner, file, whole, field.kind if field and field.kind else RATIO)


def _conductivity(table: ConductivityTable, file: str) -> Iterator[Listed]:
    for row in table.rows:
        yield Listed(
            file=file,
            name=f"conductivity of {table.acid} acid at {row.strength:g} g/L",
            value=row.base.conductivity,
            unit=CONDUCTIVITY.unit,
            kind=CONDUCTIVITY,
            status=table.status.value,
            source=table.source,
        )


def sources_text(library: Library, style: Style) -> str:
    """As text, file by file."""
    lines: list[str] = []
    file = ""
    for one in listed(library):
        if one.file != file:
            lines += ["", one.file] if lines else [one.file]
            file = one.file
        shown = _shown(one, style)
        lines += wrapped(
            f"{one.name}: {shown.removesuffix(' 1')}  [{one.status}] {one.source}", first="  ", rest="    "
        )
    return "\n".join(lines)


def _shown(one: Listed, style: Style) -> str:
    """A value in the user's units; where the unit is no kind of the engine's, as the source has it."""
    if one.kind is None:
        return f"{one.value:.9g} {one.unit}"
    return style.show(one.value, one.kind, digits=_DIGITS if one.file.endswith(".py") else None)


def source_records(library: Library) -> list[dict[str, Any]]:
    """As the values that JSON holds, SI."""
    return [
        {
            "file": one.file,
            "name": one.name,
            "value": one.value,
            "unit": one.unit,
            "status": one.status,
            "source": one.source,
        }
        for one in listed(library)
    ]
