"""When a caution on current, voltage, polarity and magnetic field applies."""

from lineplanner.cautions.facts import Situation
from lineplanner.cautions.measures import exceeds, full_on_crest, implant_distance, reaches, stated
from lineplanner.errors import Facts
from lineplanner.quantities import CURRENT, LENGTH, VOLTAGE
from lineplanner.sources import Constant, Source, Status

WET_TOUCH = Constant(
    "direct voltage that may be touched in wet places",
    30.0,
    "V",
    Source("IEC 60598: limits for touching without a cover", Status.PUBLISHED),
)
GUARDED = Constant(
    "voltage from which live parts are guarded",
    50.0,
    "V",
    Source("29 CFR 1910.303(g)(2)(i)", Status.PUBLISHED),
)
DRY_TOUCH = Constant(
    "direct voltage above which bare conductors are guarded and dry touch is ruled out",
    60.0,
    "V",
    Source("NEC Article 669; IEC 60598", Status.PUBLISHED),
)


def _peak_voltage(situation: Situation) -> float | None:
    """Highest volts a hand could meet: where a lost contact drives the supply. None: not known."""
    ceiling = situation.rated_voltage if situation.voltage_limit is None else situation.voltage_limit
    crest: float | None = 0.0
    if situation.phase_controlled_unfiltered is not False:
        crest = _crest(situation)
    if ceiling is None or crest is None:
        return None
    return max(ceiling, crest, situation.planned_peak_voltage or 0.0)


def _crest(situation: Situation) -> float | None:
    """The crest of a phase-controlled supply, from its full-on volts or from its rating."""
    if situation.full_on_voltage is not None:
        return full_on_crest(situation.full_on_voltage)
    if situation.rated_voltage is None:
        return None
    return full_on_crest(situation.rated_voltage * situation.thresholds.full_on_ratio.value)


def _highest(situation: Situation) -> float | None:
    """What decides over 60 V: the peak or the rectifier's own maximum. None: one of them is not known."""
    peak = _peak_voltage(situation)
    if peak is None or situation.rated_voltage is None:
        return None
    return max(peak, situation.rated_voltage)


def _at_bars(situation: Situation) -> bool:
    """Whether somebody comes near energised bars."""
    return situation.process is not None or situation.maintenance


def over_sixty(situation: Situation) -> Facts | None:
    """dc-60: peak or rectifier maximum above 60 V, or not known."""
    if not _at_bars(situation):
        return None
    highest = _highest(situation)
    if highest is not None and not exceeds(highest, DRY_TOUCH.value):
        return None
    return {"peak_voltage": stated(highest, VOLTAGE)}


def from_fifty(situation: Situation) -> Facts | None:
    """dc-50: peak from 50 V to 60 V."""
    peak = _peak_voltage(situation)
    if not _at_bars(situation) or over_sixty(situation) is not None or peak is None:
        return None
    return {"peak_voltage": stated(peak, VOLTAGE)} if reaches(peak, GUARDED.value) else None


def wet(situation: Situation) -> Facts | None:
    """dc-wet: peak above 30 V and below 50 V."""
    peak = _peak_voltage(situation)
    if not _at_bars(situation) or over_sixty(situation) is not None or peak is None:
        return None
    between = exceeds(peak, WET_TOUCH.value) and not reaches(peak, GUARDED.value)
    return {"peak_voltage": stated(peak, VOLTAGE)} if between else None


def arc(situation: Situation) -> Facts | None:
    """dc-arc: every load goes in and out; few amperes at many volts draw an arc as well."""
    return {} if situation.process is not None else None


def ring(situation: Situation) -> Facts | None:
    """dc-ring: a rectifier that heats whatever bridges the bars."""
    rating = situation.rated_current
    heats = rating is None or reaches(rating, situation.thresholds.arc_current.value)
    return {} if _at_bars(situation) and heats else None


def live_entry(situation: Situation) -> Facts | None:
    """live-entry: the recipe lowers the rack with volts on."""
    return {} if situation.live_entry else None


def lockout(situation: Situation) -> Facts | None:
    """lockout: hands on bus, anodes, reversing link or in a drained tank."""
    return {} if situation.maintenance or situation.sludge_work or situation.tank_entry else None


def polarity(situation: Situation) -> Facts | None:
    """polarity: the work changes its sign within the run, or may have done so since the last one."""
    changed = situation.reverse_stage or situation.family_changed is not False
    return {} if situation.process is not None and changed else None


def implant(situation: Situation) -> Facts | None:
    """implant: the field of the bus reaches the limit for implants where people stand."""
    if situation.process is None:
        return None
    current = situation.planned_peak_current
    current = situation.rated_current if current is None else current
    if current is None:
        return {"implant_distance": stated(None, LENGTH), "peak_current": stated(None, CURRENT)}
    limits = situation.thresholds
    if not reaches(current, limits.implant_current.value):
        return None
    distance = implant_distance(
        current=current,
        limit_current=limits.implant_current.value,
        limit_distance=limits.implant_distance.value,
    )
    return {"implant_distance": stated(distance, LENGTH), "peak_current": stated(current, CURRENT)}
