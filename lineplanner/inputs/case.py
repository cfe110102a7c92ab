"""A case: one load with every record it refers to, ready to be planned."""

from collections.abc import Mapping
from dataclasses import dataclass

from lineplanner.inputs.bath import Bath
from lineplanner.inputs.cautions import CautionTexts
from lineplanner.inputs.line import Line, Tank
from lineplanner.inputs.load import Load
from lineplanner.inputs.material import Material
from lineplanner.inputs.part import Part
from lineplanner.inputs.rack import Rack
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.site import Site
from lineplanner.inputs.tables import Tables


@dataclass(frozen=True, slots=True, kw_only=True)
class Case:
    """All that a plan is made from. `recipe` is as filed; `load.change` is applied by the plan.

    bath is that of the tank; baths are those of all tanks of the line, by name of the file.
    """

    name: str
    load: Load
    recipe: Recipe
    rack: Rack
    line: Line
    tank: Tank
    bath: Bath
    baths: Mapping[str, Bath]
    parts: Mapping[str, Part]
    materials: Mapping[str, Material]
    site: Site
    tables: Tables
    cautions: CautionTexts
