"""Rules between the fields of a rack, a line, a bath or a material, and between them and the standards tables."""

from collections import Counter
from collections.abc import Iterable, Iterator, Sequence

from lineplanner.errors import Problem, Quantity
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.declared import Path
from lineplanner.inputs.line import Line, Rectifier, Tank
from lineplanner.inputs.material import Material
from lineplanner.inputs.rack import Member, Rack, TipRow
from lineplanner.inputs.tables import Tables
from lineplanner.quantities import VOLTAGE

_MOST_NAMES = 20
_NOISE = 1e-12  # relative; what two spellings of one value may differ by after conversion
_EVEN = 1e-9  # m; what rounding leaves


def exceeds(value: float, limit: float) -> bool:
    """Whether one entered value is more than another, past the noise of converting their units."""
    return value > limit + abs(limit) * _NOISE


def known(names: Iterable[str]) -> str:
    """Names as a message lists them: not so many that it cannot be read."""
    every = [f"`{name}`" for name in names]
    return ", ".join(every[:_MOST_NAMES] + ["..."] * (len(every) > _MOST_NAMES)) or "none"


def twice(names: Sequence[str], path: Path, what: str, last: str = "name") -> list[Problem]:
    """Names of a list that were used before in it."""
    seen: Counter[str] = Counter()
    found = []
    for index, name in enumerate(names):
        if seen[name]:
            found.append(Problem((*path, index, last), "name.twice", {"name": name, "what": what}))
        seen[name] += 1
    return found


# --- rack ------------------------------------------------------------------------------------------------


def rack_problems(rack: Rack) -> list[Problem]:
    """What does not fit together in a rack."""
    return [
        *_surface(rack),
        *twice([one.name for one in rack.members], ("members",), "member"),
        *twice([one.name for one in rack.thieves], ("thieves",), "thief"),
        *(one for index, member in enumerate(rack.members) for one in _member(member, ("members", index))),
        *_tip_rows(rack),
    ]


def _surface(rack: Rack) -> Iterator[Problem]:
    said = rack.surface or (rack.members and all(member.surface for member in rack.members))
    if rack.conductor.startswith("aluminium") and not said:
        yield Problem(("surface",), "rack.surface")


def _member(member: Member, path: Path) -> Iterator[Problem]:
    name = {"name": member.name}
    flat = (member.width, member.thickness)
    if member.diameter is None and None in flat:
        yield Problem(path, "rack.member_size", name)
    if member.diameter is not None and flat != (None, None):
        yield Problem((*path, "diameter"), "rack.member_two_sizes", name)
    if member.start == member.end:
        yield Problem((*path, "end"), "rack.member_length", name)


def _tip_rows(rack: Rack) -> Iterator[Problem]:
    """Rows named alike, rows without a step, and rows whose tips come out with the same name (A1 and A11)."""
    yield from twice([row.name for row in rack.tips], ("tips",), "row of tips")
    rows: dict[str, str] = {}
    for index, row in enumerate(rack.tips):
        if row.count > 1 and row.step == (0.0, 0.0):
            yield Problem(("tips", index, "step"), "rack.tip_step", {"name": row.name, "count": row.count})
        outside = next((number for number in (1, row.count) if not _on_rack(rack, row, number)), None)
        if outside is not None:
            yield Problem(("tips", index), "rack.tip_outside", {"tip": f"{row.name}{outside}"})
        for number in range(1, row.count + 1):
            tip = f"{row.name}{number}"
            if rows.setdefault(tip, row.name) != row.name:
                facts = {"tip": tip, "name": row.name, "other": rows[tip]}
                yield Problem(("tips", index, "name"), "rack.tip_name", facts)
                break


def _on_rack(rack: Rack, row: TipRow, number: int) -> bool:
    """Whether a tip of a row lies within width and height of its rack."""
    x, drop = (start + (number - 1) * step for start, step in zip(row.start, row.step, strict=True))
    return -_EVEN <= x <= rack.width + _EVEN and -_EVEN <= drop <= rack.height + _EVEN


# --- line ------------------------------------------------------------------------------------------------


def line_problems(line: Line) -> list[Problem]:
    """What does not fit together in a line."""
    tanks = [tank.name for tank in line.tanks]
    found = [
        Problem((), "line.none", {"what": what, "key": what})
        for what, rows in (("rectifier", line.rectifiers), ("tank", line.tanks))
        if not rows
    ]
    found += twice([one.name for one in line.rectifiers], ("rectifiers",), "rectifier")
    found += twice(tanks, ("tanks",), "tank")
    for index, rectifier in enumerate(line.rectifiers):
        found += _rectifier(rectifier, tanks, ("rectifiers", index))
    for index, tank in enumerate(line.tanks):
        found += twice([one.name for one in tank.bus], ("tanks", index, "bus"), "run of bus")
        found += twice([one.name for one in tank.joints], ("tanks", index, "joints"), "joint")
    return found


def _rectifier(rectifier: Rectifier, tanks: list[str], path: Path) -> Iterator[Problem]:
    if not rectifier.tanks:
        yield Problem((*path, "tanks"), "line.feeds_nothing", {"known": known(tanks)})
    for index, name in enumerate(rectifier.tanks):
        if name not in tanks:
            yield Problem((*path, "tanks", index), "line.tank", {"name": name, "known": known(tanks)})
    if rectifier.type == "phase-controlled" and rectifier.pulses is None:
        yield Problem((*path, "pulses"), "line.pulses")
    if rectifier.type == "switch-mode" and rectifier.pulses is not None:
        yield Problem((*path, "pulses"), "line.no_pulses")
    full, rated = rectifier.full_on_voltage, rectifier.max_voltage
    if full is not None and exceeds(rated, full):
        facts = {"full": Quantity(full, VOLTAGE), "rated": Quantity(rated, VOLTAGE)}
        yield Problem((*path, "full_on_voltage"), "line.full_on", facts)
    limit = rectifier.voltage_limit
    if limit is not None and limit > rated:
        over = {"limit": Quantity(limit, VOLTAGE), "rated": Quantity(rated, VOLTAGE)}
        yield Problem((*path, "voltage_limit"), "line.voltage_limit", over)


# --- bath and material -----------------------------------------------------------------------------------

# kind of bath -> what it cannot be without
_NEEDED = {
    "sulfuric": ("sulfuric_acid",),
    "boric-sulfuric": ("sulfuric_acid",),
    "tartaric-sulfuric": ("sulfuric_acid",),
    "chrome": ("family", "chromic_acid"),
}


def bath_problems(bath: Bath) -> list[Problem]:
    """What does not fit together in a bath."""
    found = [
        Problem((name,), f"bath.needs_{name}", {"kind": bath.kind})
        for name in _NEEDED.get(bath.kind, ())
        if getattr(bath, name) is None
    ]
    if bath.kind != "chrome" and bath.family is not None:
        found.append(Problem(("family",), "bath.family_of_chrome"))
    if bath.kind == "chrome" and bath.growth is not None:
        found.append(Problem(("growth",), "bath.growth_of_chrome"))
    if bath.family == "high-speed" and bath.fluoride:
        found.append(Problem(("fluoride",), "bath.high_speed_fluoride"))
    return found


def material_problems(material: Material) -> list[Problem]:
    """What does not fit together in a material: aluminium has a family, every other metal a substrate."""
    needed, other = ("family", "substrate") if material.metal == "aluminium" else ("substrate", "family")
    found = []
    if getattr(material, needed) is None:
        found.append(Problem((needed,), f"material.needs_{needed}", {"metal": material.metal}))
    if material.metal != "aluminium" and material.family is not None:
        found.append(Problem((other,), "material.family_of_aluminium", {"metal": material.metal}))
    return found


# --- against the standards tables ------------------------------------------------------------------------


def table_problems(record: Rack | Line | Material, tables: Tables) -> list[Problem]:
    """Names in a record that no row of the standards tables has."""
    if isinstance(record, Material):
        rows = (
            ("family", record.family, "alloys", [row.name for row in tables.alloys]),
            ("substrate", record.substrate, "substrates", [row.name for row in tables.substrates]),
        )
        return [
            Problem((field,), "material.row", {"name": name, "table": table, "known": known(names)})
            for field, name, table, names in rows
            if name is not None and name not in names
        ]
    conductors = [row.name for row in tables.conductors]
    used = _rack_conductors(record) if isinstance(record, Rack) else _line_conductors(record.tanks)
    return [
        Problem(path, "conductor.unknown", {"name": name, "known": known(conductors)})
        for path, name in used
        if name not in conductors
    ]


def _rack_conductors(rack: Rack) -> Iterator[tuple[Path, str]]:
    yield ("conductor",), rack.conductor
    for index, row in enumerate(rack.tips):
        yield ("tips", index, "conductor"), row.conductor


def _line_conductors(tanks: tuple[Tank, ...]) -> Iterator[tuple[Path, str]]:
    for index, tank in enumerate(tanks):
        for run, bus in enumerate(tank.bus):
            yield ("tanks", index, "bus", run, "conductor"), bus.conductor
        if tank.flight_bar is not None:
            yield ("tanks", index, "flight_bar", "conductor"), tank.flight_bar.conductor
