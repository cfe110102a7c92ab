"""Rules between the fields of a load, and between a load and its rack, line, recipe, bath and parts."""

import re
from collections import Counter
from collections.abc import Iterator, Mapping

from lineplanner.errors import Problem
from lineplanner.inputs.bath import Bath, BathKind
from lineplanner.inputs.declared import Path
from lineplanner.inputs.hanging import Tip, tip_names, tip_places
from lineplanner.inputs.line import Line
from lineplanner.inputs.load import Hang, Load
from lineplanner.inputs.material import Material
from lineplanner.inputs.rack import Rack
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.rules import known, twice
from lineplanner.inputs.tables import Process, Tables

BATH_OF: Mapping[Process, BathKind] = {
    "anodize-sulfuric": "sulfuric",
    "anodize-hard": "sulfuric",
    "anodize-chromic": "chromic",
    "anodize-boric-sulfuric": "boric-sulfuric",
    "anodize-tartaric-sulfuric": "tartaric-sulfuric",
    "chrome-hard": "chrome",
}


_LONG_NUMBER = re.compile(r"\d{5}")  # no row has ten thousand tips; a run of them would be spelled out


def hang_problems(load: Load) -> list[Problem]:
    """What does not fit together in a load, whatever rack and line it is for."""
    found = [] if load.hangs else [Problem((), "load.nothing")]
    found += twice([thief.name for thief in load.thieves], ("thieves",), "thief")
    for index, hang in enumerate(load.hangs):
        path: Path = ("hangs", index)
        given = [name for name in ("tips", "at", "count") if getattr(hang, name)]
        if not given:
            found.append(Problem(path, "load.hang_none"))
        elif len(given) > 1:
            found.append(Problem((*path, given[1]), "load.hang_one", {"given": len(given)}))
        long = next((entry for entry in hang.tips if _LONG_NUMBER.search(entry)), None)
        if long is not None:
            found.append(Problem((*path, "tips"), "load.tip_number", {"tip": long}))
            continue
        tips, each = len(tip_names(hang)), hang.tips_each
        if tips % each:
            found.append(Problem((*path, "tips"), "load.tips_each", {"tips": tips, "each": each}))
    return found


def rack_fit_problems(load: Load, rack: Rack) -> list[Problem]:
    """Hangs that the rack cannot take: unknown or doubly taken tips, free positions where there are none."""
    places = tip_places(rack)
    taken: dict[tuple[str, str], int] = {}
    found = []
    for index, hang in enumerate(load.hangs):
        path: Path = ("hangs", index)
        if hang.at and rack.hanging != "free":
            found.append(Problem((*path, "at"), "load.not_free", {"rack": load.rack}))
        found += _tips(hang, places, load.rack, path)
        found += _taken(hang, taken, path)
    return found


def _tips(hang: Hang, places: Mapping[str, Tip], rack: str, path: Path) -> Iterator[Problem]:
    """The first tip of a hang that the rack does not have, and the first that does not reach its side."""
    names = tip_names(hang)
    unknown = next((name for name in names if name not in places), None)
    if unknown is not None:
        yield Problem(
            (*path, "tips"), "load.tip_unknown", {"tip": unknown, "rack": rack, "known": _runs(places)}
        )
    for name in names:
        side = places[name].row.side if name in places else "both"
        if side not in ("both", hang.side):
            yield Problem((*path, "side"), "load.tip_side", {"tip": name, "side": side})
            return


def _runs(places: Mapping[str, Tip]) -> str:
    """The tips of a rack as runs: A1-A6."""
    rows = {tip.row.name: tip.row.count for tip in places.values()}
    return known(f"{name}1-{name}{count}" if count > 1 else f"{name}1" for name, count in rows.items())


def _taken(hang: Hang, taken: dict[tuple[str, str], int], path: Path) -> list[Problem]:
    """The first tip that a hang names twice, and the first that another hang has; notes what it takes itself."""
    names, number = tip_names(hang), int(path[-1]) + 1
    repeated = next((name for name, times in Counter(names).items() if times > 1), None)
    found = [] if repeated is None else [Problem((*path, "tips"), "load.tip_repeated", {"tip": repeated})]
    shared = [
        Problem((*path, "tips"), "load.tip_twice", {"tip": name, "side": side, "other": other})
        for name in names
        for side in (("front", "back") if hang.side == "both" else (hang.side,))
        if (other := taken.setdefault((name, side), number)) != number
    ]
    return found + shared[:1]


def line_fit_problems(load: Load, line: Line) -> list[Problem]:
    """A tank that the line does not have, a rectifier that is not there or does not feed it."""
    tanks = [tank.name for tank in line.tanks]
    found = []
    if load.tank not in tanks:
        found.append(
            Problem(("tank",), "load.tank", {"name": load.tank, "line": load.line, "known": known(tanks)})
        )
    if not load.rectifier:
        return found
    rectifiers = {one.name: one for one in line.rectifiers}
    if load.rectifier not in rectifiers:
        facts = {"name": load.rectifier, "line": load.line, "known": known(rectifiers)}
        found.append(Problem(("rectifier",), "load.rectifier", facts))
    elif load.tank in tanks and load.tank not in rectifiers[load.rectifier].tanks:
        feeding = known(one.name for one in line.rectifiers if load.tank in one.tanks)
        facts = {"name": load.rectifier, "tank": load.tank, "known": feeding}
        found.append(Problem(("rectifier",), "load.feeds", facts))
    return found


def tanks_for(recipe: Recipe, line: Line, baths: Mapping[str, Bath]) -> list[str]:
    """The tanks of a line whose bath a recipe runs in. baths by the name of the file."""
    wanted = BATH_OF[recipe.process]
    return [tank.name for tank in line.tanks if tank.bath in baths and baths[tank.bath].kind == wanted]


def bath_fit_problems(load: Load, recipe: Recipe, name: str, bath: Bath) -> list[Problem]:
    """A recipe whose process does not run in the bath of the load's tank."""
    if BATH_OF[recipe.process] == bath.kind:
        return []
    facts = {
        "recipe": load.recipe,
        "wanted": BATH_OF[recipe.process],
        "tank": load.tank,
        "bath": name,
        "kind": bath.kind,
    }
    return [Problem(("recipe",), "load.bath", facts)]


def base_problems(load: Load, recipe: Recipe, bases: Mapping[int, tuple[str, Material]]) -> list[Problem]:
    """Hangs of a metal that the process cannot run on. bases holds the material of each hang by its position."""
    field, label = (
        ("substrate", "substrate") if recipe.process == "chrome-hard" else ("family", "alloy family")
    )
    return [
        Problem(
            ("hangs", index, "part"),
            "load.base",
            {"part": load.hangs[index].part, "material": name, "label": label, "process": recipe.process},
        )
        for index, (name, material) in bases.items()
        if getattr(material, field) is None
    ]


def process_problems(recipe: Recipe, tables: Tables) -> list[Problem]:
    """A process that the standards tables say nothing about."""
    if any(row.name == recipe.process for row in tables.processes):
        return []
    return [Problem(("process",), "table.no_row", {"table": "processes", "name": recipe.process})]


def family_problems(bath: Bath, tables: Tables) -> list[Problem]:
    """A chrome bath whose family the standards tables say nothing about."""
    if bath.family is None or any(row.name == bath.family for row in tables.chrome):
        return []
    return [Problem(("family",), "table.no_row", {"table": "chrome-baths", "name": bath.family})]
