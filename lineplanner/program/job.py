"""A job: load, recipe, bath and circuit brought together, ready to be run on a rectifier."""

from dataclasses import dataclass

from lineplanner.inputs.bath import Bath
from lineplanner.inputs.case import Case
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.tables import ProcessDefaults, Tables
from lineplanner.load import LoadAreas
from lineplanner.program.aims import Aims
from lineplanner.quantities import Conductivity, Current, CurrentDensity, Length, Resistance, Time


@dataclass(frozen=True, slots=True, kw_only=True)
class Job:
    """What every kind of program is computed from. recipe has the load's changes in it."""

    case: Case
    recipe: Recipe
    process: ProcessDefaults
    areas: LoadAreas
    aims: Aims
    resistance: Resistance
    conductivity: Conductivity

    @property
    def bath(self) -> Bath:
        return self.case.bath

    @property
    def tables(self) -> Tables:
        return self.case.tables

    @property
    def gap(self) -> Length:
        return self.case.tank.gap

    @property
    def density(self) -> CurrentDensity:
        """The recipe's current density; its rules ask for one under current control."""
        assert self.recipe.current_density is not None
        return self.recipe.current_density.value

    @property
    def current_range(self) -> tuple[Current | None, Current | None]:
        """The recipe's range as currents of this load; open where the load runs outside it on purpose."""
        setting = self.recipe.current_density
        if setting is None or not setting.holds(setting.value):
            return None, None
        low = None if setting.low is None else setting.low * self.areas.carrying
        return low, None if setting.high is None else setting.high * self.areas.carrying


HALF_MINUTE: Time = 30.0
MINUTE: Time = 60.0
