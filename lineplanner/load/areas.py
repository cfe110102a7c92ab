"""Parts on their places: the areas of the load, item by item."""

from collections.abc import Callable, Iterator, Mapping
from dataclasses import dataclass, field
from functools import partial

from lineplanner.geometry import Ledger, Pose, drawn_total, extent, ledger, shape_of, volume
from lineplanner.inputs.case import Case
from lineplanner.inputs.hanging import Tip, spots_of, tip_names, tip_places
from lineplanner.inputs.load import Hang
from lineplanner.inputs.material import Material
from lineplanner.inputs.part import Part
from lineplanner.inputs.tables import ProcessDefaults
from lineplanner.load.metal import Metal, conductor_named, rack_metal, thief_metal
from lineplanner.quantities import Area, Current, Length, Mass, Ratio


@dataclass(frozen=True, slots=True, kw_only=True)
class Item:
    """All parts of one drawing and one material on the rack. Areas are sums over them in m^2.

    contacts and contact_current are those of one part, the least of all places; None where only counted. dry and cut
    count the parts wholly and partly above the solution level.
    """

    part: str
    name: str
    material: Material
    count: int
    wet: Area
    carrying: Area
    significant: Area
    largest_carrying: Area
    contacts: int | None
    contact_current: Current | None
    contact_metal: str
    stated: bool
    drawn: Area
    stated_area: Area | None
    mass_each: Mass
    wet_each: Area
    dry: int
    cut: int
    ledger: Ledger


@dataclass(frozen=True, slots=True, kw_only=True)
class LoadAreas:
    """The areas of a load in m^2. carrying is what the current is divided over."""

    items: tuple[Item, ...]
    rack: tuple[Metal, ...]
    thieves: tuple[Metal, ...]
    counted_only: bool
    parts_wet: Area
    rack_wet: Area
    thieves_wet: Area
    wet: Area
    parts_carrying: Area
    carrying: Area
    significant: Area
    stated_share: Ratio = field(default=0.0)


def load_areas(case: Case, process: ProcessDefaults) -> LoadAreas:
    """The areas of a load: every part at its place under the solution level, the rack, the thieves."""
    drop = case.load.solution_drop if case.load.solution_drop is not None else case.tank.solution_drop
    items = tuple(_items(case, process, drop))
    rack = tuple(rack_metal(case.rack, case.tables.conductors, case.tables.limits, process, drop))
    thieves = tuple(thief_metal(t, process) for t in (*case.rack.thieves, *case.load.thieves))
    parts_wet = sum(i.wet for i in items)
    parts_carrying = sum(i.carrying for i in items)
    rack_wet, thieves_wet = sum(m.area for m in rack), sum(m.area for m in thieves)
    stated = sum(i.carrying for i in items if i.stated)
    return LoadAreas(
        items=items,
        rack=rack,
        thieves=thieves,
        counted_only=any(h.count is not None for h in case.load.hangs),
        parts_wet=parts_wet,
        rack_wet=rack_wet,
        thieves_wet=thieves_wet,
        wet=parts_wet + rack_wet + thieves_wet,
        parts_carrying=parts_carrying,
        carrying=parts_carrying + sum(m.carrying for m in (*rack, *thieves)),
        significant=sum(i.significant for i in items),
        stated_share=stated / parts_carrying if parts_carrying > 0.0 else 0.0,
    )


@dataclass(slots=True)
class _Sum:
    """Running sums of one item."""

    material: Material
    count: int = 0
    wet: float = 0.0
    carrying: float = 0.0
    significant: float = 0.0
    largest: float = 0.0
    wet_each: float = 0.0
    dry: int = 0
    cut: int = 0
    contacts: int | None = None
    contact_current: float | None = None
    contact_metal: str = ""
    ledger: Ledger | None = None
    seen: set[tuple[int, int]] = field(default_factory=set)  # identity of a row of tips, and tips to a part


def _items(case: Case, process: ProcessDefaults, drop: Length) -> Iterator[Item]:
    sums: dict[tuple[str, str], _Sum] = {}
    places = tip_places(case.rack)
    hung: dict[tuple[str, float, str], _Hung] = {}
    for hang in case.load.hangs:
        part = case.parts[hang.part]
        kind = hang.part, hang.turn, hang.facing
        if kind not in hung:
            hung[kind] = _hung(part, hang, process)
        material = hang.material or part.material
        if (hang.part, material) not in sums:
            sums[hang.part, material] = _Sum(case.materials[material])
        total = sums[hang.part, material]
        for part_ledger, number in _ledgers(hung[kind], hang, places, drop):
            _add(total, part_ledger, number, hung[kind].full)
        _add_contacts(total, case, part, hang, places)
    for (stem, _), total in sums.items():
        part = case.parts[stem]
        if total.ledger is None:  # a hang without places: its rules have refused it
            continue
        yield Item(
            part=stem,
            name=part.name,
            material=total.material,
            count=total.count,
            wet=total.wet,
            carrying=total.carrying,
            significant=total.significant,
            largest_carrying=total.largest,
            contacts=total.contacts,
            contact_current=total.contact_current,
            contact_metal=total.contact_metal,
            stated=part.form == "stated",
            drawn=drawn_total(part),
            stated_area=part.stated_area,
            mass_each=part.mass if part.mass is not None else volume(part) * total.material.density,
            wet_each=total.wet_each,
            dry=total.dry,
            cut=total.cut,
            ledger=total.ledger,
        )


@dataclass(frozen=True, slots=True, kw_only=True)
class _Hung:
    """A part as it hangs: its ledger in the solution, and at the levels that cut it; top above its hanging point."""

    full: Ledger
    top: Length
    at: Callable[[Length], Ledger]
    cut: dict[Length, Ledger] = field(default_factory=dict)


def _hung(part: Part, hang: Hang, process: ProcessDefaults) -> _Hung:
    rule = partial(
        ledger,
        part,
        hole_ratio=process.hole_ratio.value,
        promise_ratio=process.promise_ratio.value,
        thread_factor=process.thread_factor.value,
    )
    pose = Pose(0.0, 0.0, hang.turn, hang.facing == "edge-on")
    return _Hung(
        full=rule(),
        top=extent(shape_of(part), pose)[3],
        at=lambda level: rule(pose=pose, level=level),
    )


def _ledgers(
    hung: _Hung, hang: Hang, places: Mapping[str, Tip], drop: Length
) -> Iterator[tuple[Ledger, int]]:
    """The ledger of each part of a hang with how many parts share it."""
    if hang.count is not None:
        yield hung.full, hang.count
        return
    sides = 2 if hang.side == "both" else 1
    under = 0
    for _, spot_drop in spots_of(hang, places):
        level = round(spot_drop - drop, 9)  # of the solution above the hanging point
        if hung.top <= level:
            under += sides
            continue
        if level not in hung.cut:
            hung.cut[level] = hung.at(level)
        yield hung.cut[level], sides
    if under:
        yield hung.full, under


def _add(total: _Sum, part_ledger: Ledger, number: int, full: Ledger) -> None:
    total.count += number
    total.wet += part_ledger.wet * number
    total.carrying += part_ledger.carrying * number
    total.significant += part_ledger.significant * number
    if part_ledger is not full:
        total.dry += number if part_ledger.wet <= 0.0 else 0
        total.cut += number if 0.0 < part_ledger.wet < full.wet else 0
    if total.ledger is None or part_ledger.carrying > total.largest:
        total.ledger = part_ledger
        total.largest = part_ledger.carrying
        total.wet_each = part_ledger.wet


def _add_contacts(total: _Sum, case: Case, part: Part, hang: Hang, places: Mapping[str, Tip]) -> None:
    """The fewest contacts, and the weakest of them, that hold one part of the item."""
    if hang.tips:
        for name in tip_names(hang):
            row = places[name].row
            if (id(row), hang.tips_each) in total.seen:  # tips of one row are alike
                continue
            total.seen.add((id(row), hang.tips_each))
            conductor = conductor_named(case.tables.conductors, row.conductor)
            rated = row.rated_current if row.rated_current is not None else conductor.contact_current.value
            _weaker(total, row.contacts * hang.tips_each, rated, row.conductor)
    elif part.contacts:
        own, metal = case.rack.contact_current, case.rack.conductor
        rated = (
            own if own is not None else conductor_named(case.tables.conductors, metal).contact_current.value
        )
        _weaker(total, sum(c.count for c in part.contacts), rated, metal)


def _weaker(total: _Sum, contacts: int, rated: Current, metal: str) -> None:
    if (
        total.contacts is None
        or total.contact_current is None
        or contacts * rated < total.contacts * total.contact_current
    ):
        total.contacts, total.contact_current, total.contact_metal = contacts, rated, metal
