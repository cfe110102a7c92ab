"""The areas of a part, a rack or a load, face by face: what both text and JSON print."""

from collections.abc import Iterator
from dataclasses import dataclass
from difflib import get_close_matches
from pathlib import Path

from lineplanner.errors import Facts, InputError
from lineplanner.files.library import Library
from lineplanner.files.reading import Entry
from lineplanner.geometry import Ledger, ledger
from lineplanner.inputs.part import Part
from lineplanner.inputs.rack import Rack
from lineplanner.inputs.tables import Tables
from lineplanner.load import load_areas
from lineplanner.load.metal import Metal, rack_metal, thief_metal
from lineplanner.program.recipe_for import as_run, process_of
from lineplanner.quantities import Area, Ratio

KINDS = ("load", "rack", "part")


@dataclass(frozen=True, slots=True, kw_only=True)
class Row:
    """One face: its drawn area and what of it counts; why as message keys with facts."""

    face: str
    count: int
    area: Area
    wet: Area
    carrying: Area
    significant: Area
    factor: Ratio
    why: tuple[tuple[str, Facts], ...]


@dataclass(frozen=True, slots=True, kw_only=True)
class Areas:
    """The rows of a part, a rack or a load with their sums; `taken` says for which process and level."""

    name: str
    kind: str
    taken: str
    wet: Area
    carrying: Area
    significant: Area
    rows: tuple[Row, ...]


def areas_of(library: Library, file: str) -> Areas:
    """The areas of a file, or of a load, rack or part of the site by its name. Raises InputError."""
    entry = _entry(library, file)
    name = entry.document.path.stem
    if entry.kind.name == "load":
        return _of_load(library, entry)
    if entry.kind.name == "part":
        return _of_part(library, name, entry.record)
    if entry.kind.name == "rack":
        return _of_rack(name, entry.record, library.tables())
    raise InputError("area.kind", file=file, kind=entry.kind.name)


def _entry(library: Library, file: str) -> Entry:
    if file.endswith(".toml") or "/" in file or "\\" in file or Path(file).is_file():
        return library.open(Path(file))
    for kind in KINDS:
        if file in library.stems(kind):
            return library.entry(kind, file)
    names = [name for kind in KINDS for name in library.stems(kind)]
    near = get_close_matches(file, names, 3, cutoff=0.4) or names[:3]
    raise InputError("file.unknown", file=file, nearest=", ".join(f"`{one}`" for one in near))


def _of_part(library: Library, name: str, part: Part) -> Areas:
    """A part alone: fully in the solution, by the hole rule of the process its metal is usually for."""
    tables, metal = library.tables(), library.record("material", part.material).metal
    wanted = "anodize-sulfuric" if metal == "aluminium" else "chrome-hard"
    process = next(row for row in tables.processes if row.name == wanted)
    found = ledger(
        part,
        hole_ratio=process.hole_ratio.value,
        promise_ratio=process.promise_ratio.value,
        thread_factor=process.thread_factor.value,
    )
    return Areas(
        name=name,
        kind="part",
        taken=f"one part, all of it in the solution, hole rule of {wanted}",
        wet=found.wet,
        carrying=found.carrying,
        significant=found.significant,
        rows=tuple(_rows(found, "", 1)),
    )


def _of_rack(name: str, rack: Rack, tables: Tables) -> Areas:
    """A rack alone: all below the flight bar taken as in the solution; tips and thieves as for anodizing."""
    wanted = "anodize-sulfuric" if rack.conductor.startswith("alumin") or rack.tips else "chrome-hard"
    process = next(row for row in tables.processes if row.name == wanted)
    metals = [
        *rack_metal(rack, tables.conductors, tables.limits, process, 0.0),
        *(thief_metal(thief, process) for thief in rack.thieves),
    ]
    return Areas(
        name=name,
        kind="rack",
        taken=f"all below the flight bar taken as in the solution, factors of {wanted}",
        wet=sum(m.area for m in metals),
        carrying=sum(m.carrying for m in metals),
        significant=0.0,
        rows=tuple(_metal_rows(metals)),
    )


def _of_load(library: Library, entry: Entry) -> Areas:
    """A load as it hangs: the faces of one part of each item, then rack metal and thieves."""
    case = as_run(library.case(entry.document.path))
    areas = load_areas(case, process_of(case))
    rows = [row for item in areas.items for row in _rows(item.ledger, f"{item.part} ", item.count)]
    return Areas(
        name=entry.document.path.stem,
        kind="load",
        taken=f"as hung, {case.recipe.process}; faces are of one part, sums of all",
        wet=areas.wet,
        carrying=areas.carrying,
        significant=areas.significant,
        rows=(*rows, *_metal_rows([*areas.rack, *areas.thieves])),
    )


def _rows(found: Ledger, front: str, count: int) -> Iterator[Row]:
    for row in found.rows:
        yield Row(
            face=f"{front}{row.face}",
            count=count,
            area=row.area,
            wet=row.wet_area,
            carrying=row.carrying_area,
            significant=row.significant_area,
            factor=row.factor,
            why=tuple((reason.key, reason.facts) for reason in row.why),
        )


def _metal_rows(metals: list[Metal]) -> Iterator[Row]:
    for metal in metals:
        yield Row(
            face=metal.name,
            count=1,
            area=metal.area,
            wet=metal.area,
            carrying=metal.carrying,
            significant=0.0,
            factor=metal.factor,
            why=((f"surface.{metal.why}", {}),),
        )
