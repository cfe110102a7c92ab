"""Rules between the fields of a recipe, and between a recipe and the standards tables."""

from collections.abc import Iterator

from lineplanner.errors import Problem, Quantity
from lineplanner.inputs.declared import Path, declared
from lineplanner.inputs.recipe import Recipe, VoltageStage
from lineplanner.inputs.rules import exceeds, known
from lineplanner.inputs.tables import Tables
from lineplanner.inputs.values import Ranged
from lineplanner.quantities import RATIO, THICKNESS, VOLTAGE, Kind

BY_VOLTAGE = ("anodize-chromic", "anodize-boric-sulfuric", "anodize-tartaric-sulfuric")


def recipe_problems(recipe: Recipe) -> list[Problem]:
    """What does not fit together in a recipe."""
    return [
        *([] if recipe.bases else [Problem(("bases",), "recipe.no_bases")]),
        *_aim(recipe),
        *(one for path, ranged, kind in settings(recipe) for one in _range(path, ranged, kind)),
        *_control(recipe),
        *_reverse(recipe),
    ]


def settings(recipe: Recipe) -> Iterator[tuple[Path, Ranged, Kind]]:
    """Every setting with a range that a recipe gives: where, what, of which kind."""
    for one in declared(Recipe).values():
        value = getattr(recipe, one.name)
        if isinstance(value, Ranged):
            yield (one.name,), value, one.field.kind if one.field and one.field.kind else RATIO
    for index, stage in enumerate(recipe.voltages):
        yield ("voltages", index, "to"), stage.to, VOLTAGE


def _aim(recipe: Recipe) -> Iterator[Problem]:
    if recipe.aim is None and recipe.aim_weight is None:
        yield Problem(("aim",), "recipe.no_aim")
    if recipe.aim is not None and recipe.aim_weight is not None:
        yield Problem(("aim_weight",), "recipe.two_aims")
    least, most = recipe.minimum, recipe.maximum
    facts = {
        name: Quantity(value, THICKNESS)
        for name, value in (
            ("minimum", least),
            ("maximum", most),
            ("aim", recipe.aim.value if recipe.aim else None),
        )
        if value is not None
    }
    if recipe.aim is not None and least is not None and exceeds(least, recipe.aim.value):
        yield Problem(("minimum",), "recipe.minimum", facts)
    if recipe.aim is not None and most is not None and exceeds(recipe.aim.value, most):
        yield Problem(("maximum",), "recipe.maximum", facts)
    if least is not None and most is not None and exceeds(least, most):
        yield Problem(("minimum",), "recipe.min_max", facts)


def _range(path: Path, ranged: Ranged, kind: Kind) -> Iterator[Problem]:
    value = Quantity(ranged.value, kind)
    if ranged.low is not None and exceeds(ranged.low, ranged.value):
        yield Problem(
            (*path, "low"), "recipe.range_low", {"value": value, "limit": Quantity(ranged.low, kind)}
        )
    if ranged.high is not None and exceeds(ranged.value, ranged.high):
        yield Problem(
            (*path, "high"), "recipe.range_high", {"value": value, "limit": Quantity(ranged.high, kind)}
        )


def _control(recipe: Recipe) -> Iterator[Problem]:
    process = {"process": recipe.process}
    if recipe.process in BY_VOLTAGE and not recipe.voltages:
        yield Problem(("voltages",), "recipe.no_voltages", process)
    elif recipe.process == "chrome-hard":
        if recipe.current_density is None:
            yield Problem(("current_density",), "recipe.no_density", process)
        if recipe.voltages:
            yield Problem(("voltages",), "recipe.by_current_only", process)
    elif recipe.current_density is None and not recipe.voltages:
        yield Problem(("current_density",), "recipe.no_control", process)
    yield from _holds(recipe.voltages)


def _holds(stages: tuple[VoltageStage, ...]) -> Iterator[Problem]:
    for index, stage in enumerate(stages[:-1]):
        if stage.hold is None:
            yield Problem(("voltages", index, "hold"), "recipe.hold")


def _reverse(recipe: Recipe) -> Iterator[Problem]:
    given = (("reverse_density", recipe.reverse_density), ("reverse_time", recipe.reverse_time))
    for name, value in given:
        if recipe.reverse == "own" and value is None:
            yield Problem((name,), f"recipe.own_{name}")
        if recipe.reverse == "none" and value is not None:
            yield Problem((name,), "recipe.reverse_unused")


def recipe_table_problems(recipe: Recipe, tables: Tables) -> list[Problem]:
    """Bases that the tables do not have, or that the process cannot run on."""
    anodizing = recipe.process != "chrome-hard"
    wanted = [row.name for row in (tables.alloys if anodizing else tables.substrates)]
    facts = {"process": recipe.process, "known": known(wanted)}
    return [
        Problem(
            ("bases", index),
            "recipe.base_of_" + ("anodize" if anodizing else "chrome"),
            facts | {"name": name},
        )
        for index, name in enumerate(recipe.bases)
        if name not in wanted
    ]
