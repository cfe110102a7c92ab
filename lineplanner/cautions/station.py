"""When a caution on heat, first aid, tank work and the plan itself applies."""

from lineplanner.cautions.chemicals import acid_burn
from lineplanner.cautions.facts import Situation, StepKind
from lineplanner.cautions.measures import reaches, stated
from lineplanner.errors import Facts
from lineplanner.quantities import TEMPERATURE

# Common practice: run hot, or nobody says how.
_HOT_STEPS: frozenset[StepKind] = frozenset(
    {
        "clean",
        "caustic-etch",
        "caustic-strip",
        "chromic-strip",
        "bright-dip",
        "dichromate-seal",
        "nickel-acetate-seal",
        "nickel-seal",
        "hot-water-seal",
        "oven",
        "other",
    }
)


def hot(situation: Situation) -> Facts | None:
    """hot: a bath or step that scalds, or one of unknown temperature."""
    limit = situation.thresholds.hot_bath.value
    entered = (situation.bath_temperature, situation.hottest_step)
    scalding = [value for value in entered if value is not None and reaches(value, limit)]
    unknown = situation.process is not None and situation.bath_temperature is None
    if not (scalding or unknown or situation.steps & _HOT_STEPS):
        return None
    hottest = max(scalding, default=None)
    return {"hottest": "a step before or after" if hottest is None else stated(hottest, TEMPERATURE)}


def heater_dry(situation: Situation) -> Facts | None:
    """heater-dry: an electric immersion heater, or nobody says which heater it is."""
    unknown = situation.heater is None and situation.process is not None
    if situation.heater != "electric immersion" and not unknown:
        return None
    return {"heater_guards": "confirmed" if situation.heater_guards_confirmed else "unconfirmed"}


def shower(situation: Situation) -> Facts | None:
    """shower: something burns, and nobody confirmed the shower this shift."""
    return {} if acid_burn(situation) is not None and not situation.shower_confirmed else None


def tank_entry(situation: Situation) -> Facts | None:
    """tank-entry: somebody goes or leans into a drained tank or pit."""
    return {} if situation.tank_entry else None


def spill(situation: Situation) -> Facts | None:
    """spill: liquids or drums are moved."""
    return {} if situation.make_up or situation.transfer else None


def estimate(_situation: Situation) -> Facts | None:
    """estimate: always."""
    return {}
