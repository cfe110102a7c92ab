"""What a recipe aims at, as total coating per side."""

from dataclasses import dataclass

from lineplanner.bath.growth import thickness_of_weight
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.tables import ProcessDefaults
from lineplanner.quantities import Thickness


@dataclass(frozen=True, slots=True, kw_only=True)
class Aims:
    """Aim and window as total coating per side, grinding stock included."""

    aim: Thickness
    minimum: Thickness | None
    maximum: Thickness | None


def aims_of(recipe: Recipe, process: ProcessDefaults) -> Aims:
    """The aim and its window as total coating per side: halved if given on diameter, build-up made total."""
    return Aims(
        aim=_total(_asked(recipe, process), recipe, process),
        minimum=None if recipe.minimum is None else _total(recipe.minimum, recipe, process),
        maximum=None if recipe.maximum is None else _total(recipe.maximum, recipe, process),
    )


def _asked(recipe: Recipe, process: ProcessDefaults) -> Thickness:
    if recipe.aim is not None:
        return recipe.aim.value
    assert recipe.aim_weight is not None  # the recipe's rules ask for one of the two
    return thickness_of_weight(weight=recipe.aim_weight, apparent_density=process.apparent_density.value)


def _total(thickness: Thickness, recipe: Recipe, process: ProcessDefaults) -> Thickness:
    per_side = 0.5 * thickness if recipe.measured == "on diameter" else thickness
    total = per_side / process.build_up_share.value if recipe.counted == "build-up" else per_side
    return total + recipe.stock
