"""What a load changes of its recipe: the recipe as run, and the deviations that card and JSON list."""

from collections.abc import Iterator
from dataclasses import dataclass, replace
from math import isclose

from lineplanner.errors import Problem
from lineplanner.inputs.declared import declared
from lineplanner.inputs.recipe import Change, Recipe
from lineplanner.inputs.recipe_rules import recipe_problems
from lineplanner.inputs.values import Ranged
from lineplanner.quantities import RATIO, Kind

_NOISE = 1e-12  # relative; what two spellings of one value may differ by after conversion


@dataclass(frozen=True, slots=True)
class Deviation:
    """One changed setting, in SI. recipe is None where the recipe leaves the setting to the tables."""

    field: str
    label: str
    kind: Kind
    recipe: float | None
    load: float
    inside_range: bool


def deviations(recipe: Recipe, change: Change | None) -> tuple[Deviation, ...]:
    """Settings that a load runs otherwise than its recipe says; a change to the recipe's own value is none."""
    found = []
    for name, label, kind, value in _changed(change):
        setting = _setting(recipe, name)
        if setting is None:
            found.append(Deviation(name, label, kind, None, value, inside_range=False))
        elif not isclose(value, setting.value, rel_tol=_NOISE):
            found.append(Deviation(name, label, kind, setting.value, value, _inside(setting, value)))
    return tuple(found)


def apply_change(recipe: Recipe, change: Change | None) -> Recipe:
    """The recipe as the load runs it. Ranges and approval stay those of the recipe as filed."""
    changed: dict[str, object] = {}
    for name, _, _, value in _changed(change):
        setting = _setting(recipe, name)
        new = replace(setting, value=value) if setting else Ranged(value=value)
        if name == "hold_voltage" and recipe.voltages:
            changed["voltages"] = (*recipe.voltages[:-1], replace(recipe.voltages[-1], to=new))
        elif name != "hold_voltage":
            changed[name] = new
    if recipe.reverse == "none" and changed.keys() & {"reverse_density", "reverse_time"}:
        changed["reverse"] = "own"
    return replace(recipe, **changed)  # type: ignore[arg-type]


def change_problems(recipe: Recipe, change: Change | None) -> list[Problem]:
    """Changes that the recipe has no place for, as problems of the load."""
    if change is None:
        return []
    found = []
    if change.hold_voltage is not None and not recipe.voltages:
        found.append(Problem(("change", "hold_voltage"), "load.no_voltages"))
    if change.aim is not None and recipe.aim is None:
        found.append(Problem(("change", "aim"), "load.aim_weight"))
    if change.current_density is not None and recipe.current_density is None:
        found.append(Problem(("change", "current_density"), "load.no_density"))
    if found or recipe_problems(recipe):
        return found
    return [
        Problem(("change", str(one.path[0])), one.key, one.facts)
        for one in recipe_problems(apply_change(recipe, change))
        if one.key.startswith("recipe.own_")  # a value outside its range is a deviation, not a mistake
    ]


def _changed(change: Change | None) -> Iterator[tuple[str, str, Kind, float]]:
    """Name, label, kind and value of every number that a change gives."""
    for one in declared(Change).values() if change else ():
        value = getattr(change, one.name)
        if isinstance(value, float) and one.field is not None:
            yield one.name, one.field.label, one.field.kind or RATIO, value


def _setting(recipe: Recipe, name: str) -> Ranged | None:
    if name == "hold_voltage":
        return recipe.voltages[-1].to if recipe.voltages else None
    setting = getattr(recipe, name)
    return setting if isinstance(setting, Ranged) else None


def _inside(setting: Ranged, value: float) -> bool:
    """Whether a value lies in the range, its ends included as they were typed."""
    ends = [end for end in (setting.low, setting.high) if end is not None]
    return setting.holds(value) or any(isclose(value, end, rel_tol=_NOISE) for end in ends)
