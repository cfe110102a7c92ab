"""What a setting changed at the load means for its recipe: value and range as filed, and what the load runs."""

from lineplanner.inputs.change import Deviation, deviations
from lineplanner.inputs.declared import declared
from lineplanner.inputs.recipe import Change, Recipe
from lineplanner.inputs.values import Ranged
from lineplanner.quantities import RATIO, Kind
from lineplanner.report.style import Style

DEVIATION = "deviation"
OUTSIDE = "deviation, OUTSIDE THE RANGE"
BY_TABLES = "deviation, NO RANGE IN THE RECIPE"


def beside_change(recipe: Recipe, change: Change, name: str, style: Style) -> tuple[str, str]:
    """What stands beside a changeable setting, and its mark: deviation, outside the range, or none."""
    kind = _kind_of(name)
    setting = setting_of(recipe, name)
    filed = "not in the recipe" if setting is None else f"recipe {_filed(setting, kind, style)}"
    found = next((one for one in deviations(recipe, change) if one.field == name), None)
    if found is None:
        return f"{filed}; the load runs it as filed" if setting is not None else filed, ""
    return f"{filed}; the load runs {style.show(found.load, kind)}", mark_of(found)


def mark_of(found: Deviation) -> str:
    """A deviation in words that stand without colour."""
    if found.inside_range:
        return DEVIATION
    return BY_TABLES if found.recipe is None else OUTSIDE


def setting_of(recipe: Recipe, name: str) -> Ranged | None:
    """The recipe's own setting behind a change."""
    if name == "hold_voltage":
        return recipe.voltages[-1].to if recipe.voltages else None
    setting = getattr(recipe, name)
    return setting if isinstance(setting, Ranged) else None


def _kind_of(name: str) -> Kind:
    own = declared(Change)[name].field
    return own.kind or RATIO if own is not None else RATIO


def _filed(setting: Ranged, kind: Kind, style: Style) -> str:
    """A setting with its allowed range."""
    value = style.show(setting.value, kind)
    low, high = (None if end is None else style.show(end, kind) for end in (setting.low, setting.high))
    if low is not None and high is not None:
        return f"{value}, range {low} to {high}"
    if low is not None:
        return f"{value}, at least {low}"
    return f"{value}, at most {high}" if high is not None else f"{value}, no range"
