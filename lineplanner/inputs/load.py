"""A load: parts hung on a rack, for a recipe, in a tank."""

from dataclasses import dataclass
from typing import Annotated, Literal

from lineplanner.inputs.rack import Spot, Thief
from lineplanner.inputs.recipe import Change
from lineplanner.quantities import ANGLE, COUNT, LENGTH, Angle, Field, Length


@dataclass(frozen=True, slots=True, kw_only=True)
class Hang:
    """Equal parts hung alike: on tips, at free positions, or merely counted (taken as fully in the solution)."""

    part: Annotated[str, Field(None, "part", ref="part")]
    tips: Annotated[tuple[str, ...], Field(None, "tips", "A1, A2, ... or a run: A1-A6")] = ()
    at: Annotated[tuple[Spot, ...], Field(None, "free positions")] = ()
    count: Annotated[
        int | None, Field(COUNT, "count", "where neither tips nor positions are given", low=1)
    ] = None
    tips_each: Annotated[int, Field(COUNT, "tips that hold one part", low=1, high=50)] = 1
    turn: Annotated[Angle, Field(ANGLE, "turn in the rack plane", "counter-clockwise")] = 0.0
    facing: Annotated[Literal["flat", "edge-on"], Field(None, "facing")] = "flat"
    side: Annotated[Literal["front", "back", "both"], Field(None, "side", "both: one part on each side")] = (
        "front"
    )
    material: Annotated[str | None, Field(None, "material", "if other than the part's", ref="material")] = (
        None
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Load:
    """What goes into the tank together."""

    name: Annotated[str, Field(None, "name")]
    order: Annotated[str, Field(None, "order")] = ""
    lot: Annotated[str, Field(None, "lot")] = ""
    recipe: Annotated[str, Field(None, "recipe", ref="recipe")]
    rack: Annotated[str, Field(None, "rack", ref="rack")]
    line: Annotated[str, Field(None, "line", ref="line")]
    tank: Annotated[str, Field(None, "tank")]
    rectifier: Annotated[str, Field(None, "rectifier", "left out: the smallest that does it")] = ""
    solution_drop: Annotated[
        Length | None,
        Field(LENGTH, "solution surface below the flight bar", "if other than the tank's", low=0.0),
    ] = None
    hangs: Annotated[tuple[Hang, ...], Field(None, "what hangs where", key="hang")]
    thieves: Annotated[tuple[Thief, ...], Field(None, "thieves hung for this load", key="thief")] = ()
    change: Annotated[Change | None, Field(None, "changes of the recipe for this load")] = None
    note: Annotated[str, Field(None, "note")] = ""
