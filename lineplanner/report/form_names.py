"""Names that a field can be given: tanks and rectifiers of the line, rows of the standards tables."""

from collections.abc import Mapping

from lineplanner.inputs.case import Case
from lineplanner.inputs.declared import declared
from lineplanner.inputs.tables import Limits


def names_for(kind: str, case: Case) -> Mapping[str, tuple[str, ...]]:
    """Fitting names by the field of a record of a kind; other names are refused where the rules say so."""
    tables = case.tables
    conductors = tuple(row.name for row in tables.conductors)
    alloys = tuple(row.name for row in tables.alloys)
    substrates = tuple(row.name for row in tables.substrates)
    tanks = tuple(tank.name for tank in case.line.tanks)
    chrome = case.recipe.process == "chrome-hard"
    found: dict[str, dict[str, tuple[str, ...]]] = {
        "load": {"tank": tanks, "rectifier": tuple(one.name for one in case.line.rectifiers)},
        "recipe": {"bases": substrates if chrome else alloys},
        "material": {"family": alloys, "substrate": substrates},
        "rack": {"conductor": conductors},
        "line": {"conductor": conductors, "tanks": tanks},
        "bath": {"base": (*alloys, *substrates)},
        "site": {"limit": tuple(declared(Limits))},
    }
    return found.get(kind, {})
