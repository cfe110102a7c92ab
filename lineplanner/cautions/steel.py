"""When a caution on hydrogen embrittlement applies."""

from lineplanner.cautions.contents import ACIDS, step_contents
from lineplanner.cautions.facts import Situation
from lineplanner.cautions.measures import exceeds, reaches, stated
from lineplanner.errors import Fact, Facts
from lineplanner.quantities import TEMPERATURE, TIME
from lineplanner.sources import Constant, Source, Status

BAKE_STRENGTH = Constant(
    "tensile strength from which plated steel is baked",
    1.0e9,
    "Pa",
    Source("ASTM B849, scope; ASTM B850-98 (2009), first row of its table", Status.PUBLISHED),
)
AUTHORITY_STRENGTH = Constant(
    "tensile strength from which the design owner decides",
    1.641e9,
    "Pa",
    Source("SAE AMS 2460, scope: 238 ksi", Status.PUBLISHED),
)
AUTHORITY_HARDNESS = Constant(
    "hardness from which the design owner decides",
    48.0,
    "HRC",
    Source("SAE AMS 2460, scope", Status.PUBLISHED),
)
BELOW_TEMPER = Constant(
    "how far a bake stays below the last temper", 28.0, "K", Source("MIL-STD-867C, 5.5", Status.PUBLISHED)
)
# What stands where a figure of the bake is not known or the bake is not released.
RULE_WITHIN = "the rule's delay"
RULE_TIME = "the rule's hours"
RULE_HEAT = "the rule's heat (ask first)"
RULE_UNNAMED = "a rule still to be named"


def _meets_hydrogen(situation: Situation) -> bool:
    """Whether parts are plated, run in acid, pickled or stripped."""
    return situation.process is not None or bool(
        step_contents(situation) & (ACIDS | {"not known", "fluoride"})
    )


def _at_least(situation: Situation, *, strength: float, hardness: float) -> bool:
    """Whether strength or hardness reaches a limit, as far as either is known."""
    known_strength, known_hardness = situation.steel_tensile_strength, situation.steel_hardness
    return (known_strength is not None and reaches(known_strength, strength)) or (
        known_hardness is not None and reaches(known_hardness, hardness)
    )


def hardened(situation: Situation) -> bool:
    """Whether steel may crack from hydrogen. Steel of unknown strength may."""
    if situation.steel is False or not _meets_hydrogen(situation):
        return False
    unknown = situation.steel_tensile_strength is None and situation.steel_hardness is None
    return unknown or _at_least(
        situation, strength=BAKE_STRENGTH.value, hardness=situation.thresholds.bake_hardness.value
    )


def ultra_high(situation: Situation) -> bool:
    """Whether steel is so strong that no table releases it. Unknown steel is not taken for it."""
    return hardened(situation) and _at_least(
        situation, strength=AUTHORITY_STRENGTH.value, hardness=AUTHORITY_HARDNESS.value
    )


def stress_relief(situation: Situation) -> Facts | None:
    """he-stress-relief: hard steel worked after heat treatment, or nobody says it was not."""
    return {} if hardened(situation) and situation.worked_after_hardening is not False else None


def bake_released(situation: Situation) -> bool:
    """Whether all that a bake must respect is known and respected."""
    bake, temper = situation.bake_temperature, situation.tempering_temperature
    if bake is None or temper is None or situation.bake_time is None or situation.case_hardened is not False:
        return False
    if situation.steel_tensile_strength is None and situation.steel_hardness is None:
        return False
    if ultra_high(situation) and not situation.design_authority:
        return False
    return not exceeds(bake, temper - BELOW_TEMPER.value)


def bake(situation: Situation) -> Facts | None:
    """he-bake: steel that takes up hydrogen; hours and temperature only once the bake is released."""
    if not hardened(situation):
        return None
    within: Fact = RULE_WITHIN if situation.bake_within is None else stated(situation.bake_within, TIME)
    time: Fact = RULE_TIME
    temperature: Fact = RULE_HEAT
    if bake_released(situation):
        time = stated(situation.bake_time, TIME)
        temperature = stated(situation.bake_temperature, TEMPERATURE)
    return {
        "bake_within": within,
        "bake_time": time,
        "bake_temperature": temperature,
        "bake_rule": situation.bake_rule or RULE_UNNAMED,
    }


def authority(situation: Situation) -> Facts | None:
    """he-uhs: the design owner's authority is needed."""
    return {} if ultra_high(situation) else None
