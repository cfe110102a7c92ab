"""From a planned load to the situation that the caution rules look at."""

from dataclasses import dataclass
from typing import Any

from lineplanner.bath.conductivity import acid_wt_fraction
from lineplanner.bath.embrittlement import BAKE_FROM, BAKE_TEMPERATURE, bake_time
from lineplanner.cautions.facts import Situation, StepKind
from lineplanner.errors import InputError
from lineplanner.geometry import Pose, traps_gas
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.case import Case
from lineplanner.inputs.line import Rectifier
from lineplanner.inputs.recipe import Recipe, SideStep
from lineplanner.load import LoadAreas
from lineplanner.program.stages import Run
from lineplanner.quantities import Concentration, Current, Flow, Ratio, Stress, Temperature

_HOT = frozenset(
    {"hot-water-seal", "dichromate-seal", "nickel-acetate-seal", "nickel-seal", "oven"}
)  # contents that are run hot
_WATER = 1000.0  # kg/m^3; for the mass share of dilute boric acid

# What a recipe's side step means to the caution rules.
_STEPS: dict[str, StepKind] = {
    "clean": "clean",
    "rinse": "rinse",
    "caustic-etch": "caustic-etch",
    "nitric-desmut": "nitric-desmut",
    "fluoride-desmut": "fluoride-desmut",
    "chromic-desmut": "chromic-desmut",
    "hydrochloric-strip": "hydrochloric-strip",
    "hot-water-seal": "hot-water-seal",
    "dichromate-seal": "dichromate-seal",
    "nickel-acetate-seal": "nickel-acetate-seal",
    "nickel-seal": "nickel-seal",
    "dye": "dye",
    "grind": "grind",
    "oven": "oven",
    "other": "other",
}


@dataclass(frozen=True, slots=True, kw_only=True)
class Gas:
    """What the run does to the air over the tank; None where it is not known."""

    hydrogen: Ratio | None = None
    exhaust_for_hydrogen: Flow | None = None
    current_for_hydrogen: Current | None = None


def situation_of(case: Case, areas: LoadAreas, run: Run | None, gas: Gas) -> Situation:
    """Everything the rules ask that records and plan can answer; the rest stays not known."""
    tank, recipe = case.tank, case.recipe
    return Situation(
        thresholds=case.cautions.thresholds,
        process=recipe.process,
        heater=tank.heater,
        heater_guards_confirmed=tank.heater_guards,
        steps=frozenset(_STEPS[s.content] for s in (*recipe.before, *recipe.after)),
        hottest_step=_hottest([*recipe.before, *recipe.after]),
        stop_off=frozenset(m.kind for h in case.load.hangs for m in case.parts[h.part].masks),
        shower_confirmed=tank.shower,
        live_entry=recipe.live_entry,
        hydrogen_share=gas.hydrogen,
        exhaust_for_hydrogen=gas.exhaust_for_hydrogen,
        current_for_hydrogen=gas.current_for_hydrogen,
        part_traps_gas=_gas_trapped(case),
        lead=tank.counter_electrode == "lead",
        installed_chrome_current=_installed_chrome(case),
        permit_by_charge=False,  # no record says that a permit counts ampere-hours
        region_eu=case.site.region == "eu",
        **_bath(case.bath),
        **_supply(case, run),
        **_air(case),
        **_steel(areas, recipe),
    )


def _hottest(steps: list[SideStep]) -> Temperature | None:
    """The hottest side step; None while a step that is run hot does not say how hot."""
    if any(s.temperature is None and s.content in _HOT for s in steps):
        return None
    return max((s.temperature for s in steps if s.temperature is not None), default=None)


def _bath(bath: Bath) -> dict[str, Any]:
    """What the solution holds."""
    return {
        "sulfuric_share": _sulfuric_share(bath.sulfuric_acid),
        "holds_fluoride": bath.fluoride,
        "boric_share": None if bath.boric_acid is None else bath.boric_acid / _WATER,
        "bath_temperature": bath.temperature,
    }


def _supply(case: Case, run: Run | None) -> dict[str, Any]:
    """What the rectifier gives and can give; without a run the strongest that can feed the tank."""
    feeding = [r for r in case.line.rectifiers if case.tank.name in r.tanks]
    rectifier = run.rectifier if run is not None else max(feeding, key=lambda r: r.most_voltage, default=None)
    if rectifier is None:
        return {}
    unit = {
        "planned_peak_current": rectifier.max_current,
        "voltage_limit": None if rectifier.voltage_limit is None else rectifier.most_voltage,
        "rated_voltage": rectifier.max_voltage,
        "full_on_voltage": rectifier.full_on_voltage,
        "phase_controlled_unfiltered": _unfiltered(rectifier),
        "rated_current": rectifier.max_current,
    }
    if run is None:
        return unit
    return unit | {
        "planned_peak_current": run.peak_current,
        "planned_peak_voltage": run.peak_voltage,
        "reverse_stage": any(s.stage == "reverse" for s in run.stages),
        "load_charge": run.counter,
    }


def _air(case: Case) -> dict[str, Any]:
    """What draws the mist off; nothing is known where no exhaust is entered."""
    exhaust = case.tank.exhaust
    if exhaust is None:
        return {}
    return {
        "exhaust": "none" if exhaust.flow == 0.0 else exhaust.flow,
        "exhaust_needed": exhaust.required,
        "exhaust_proven": exhaust.proven,
        "exhaust_sum": _exhaust_sum(case),
        "supply_air": exhaust.supply,
        "foam": exhaust.foam,
        "lid": exhaust.lid,
        "wetting_agent_is_control": exhaust.wetting_agent,
        "surface_tension": exhaust.surface_tension,
        "surface_tension_meter": exhaust.tension_meter,
    }


def _steel(areas: LoadAreas, recipe: Recipe) -> dict[str, Any]:
    """The strongest steel of the load; one of unknown strength counts as needing a bake."""
    steel = [i.material for i in areas.items if i.material.metal in ("steel", "stainless", "cast-iron")]
    if not steel:
        return {"steel": False}
    strength = max((m.tensile_strength for m in steel if m.tensile_strength is not None), default=None)
    hardness = max((m.hardness for m in steel if m.hardness is not None), default=None)
    unknown = any(m.tensile_strength is None and m.hardness is None for m in steel)
    if unknown and (strength is None or strength < BAKE_FROM.value):
        strength = hardness = None
    tempered = [m.tempering_temperature for m in steel]
    return {
        "steel": True,
        "steel_tensile_strength": strength,
        "steel_hardness": hardness,
        "worked_after_hardening": _any_yes([m.worked_after_hardening for m in steel]),
        "case_hardened": _any_yes([m.case_hardened for m in steel]),
        "tempering_temperature": min((t for t in tempered if t is not None), default=None)
        if None not in tempered
        else None,
        "design_authority": bool(recipe.owner_authority),
        "bake_within": recipe.oven_within,
        "bake_rule": recipe.bake_rule or None,
        **_bake(strength, recipe.bake_rule),
    }


def _bake(strength: Stress | None, rule: str) -> dict[str, Any]:
    """Hours and temperature of the rule that the recipe names, where this program holds its table."""
    if "B850" not in rule or strength is None:
        return {}
    try:
        return {"bake_time": bake_time(strength), "bake_temperature": BAKE_TEMPERATURE.value}
    except InputError:  # outside the table: the design owner decides
        return {}


def _any_yes(answers: list[str]) -> bool | None:
    """True if any part says yes, False if all say no, else not known."""
    if "yes" in answers:
        return True
    return False if set(answers) == {"no"} else None


def _sulfuric_share(acid: Concentration | None) -> Ratio | None:
    """Mass share of sulfuric acid; past the density table the plain ratio to water, which is more than the truth."""
    if acid is None:
        return None
    try:
        return acid_wt_fraction(acid)
    except InputError:
        return acid / _WATER


def _unfiltered(rectifier: Rectifier) -> bool:
    """A phase-controlled unit counts as unfiltered until its filter is entered."""
    return rectifier.type == "phase-controlled" and rectifier.filtered != "yes"


def _exhaust_sum(case: Case) -> Flow | None:
    """All exhausts of the line; with some not known what is known, if that alone is more than the supply."""
    flows = [t.exhaust.flow if t.exhaust is not None else None for t in case.line.tanks]
    known = sum(f for f in flows if f is not None)
    exhaust = case.tank.exhaust
    supply = None if exhaust is None else exhaust.supply
    return known if None not in flows or (supply is not None and known > supply) else None


def _gas_trapped(case: Case) -> bool:
    """Whether any part hangs with a hollow that faces down and keeps gas."""
    hung = {(hang.part, hang.turn, hang.facing) for hang in case.load.hangs}
    return any(
        traps_gas(case.parts[part], Pose(0.0, 0.0, turn, facing == "edge-on")) for part, turn, facing in hung
    )


def _installed_chrome(case: Case) -> Current:
    """Rated current of all rectifiers that can feed a hard chrome tank of the line."""
    chrome = {t.name for t in case.line.tanks if t.bath in case.baths and case.baths[t.bath].kind == "chrome"}
    return sum(r.max_current for r in case.line.rectifiers if chrome & set(r.tanks))
