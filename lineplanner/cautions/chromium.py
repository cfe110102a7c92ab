"""When a caution on hexavalent chromium applies."""

from lineplanner.cautions.contents import bath_contents, handled_contents, step_contents
from lineplanner.cautions.facts import Situation
from lineplanner.cautions.measures import exceeds, potential_charge, reaches, stated
from lineplanner.errors import Facts
from lineplanner.quantities import CHARGE, MASS, SURFACE_TENSION
from lineplanner.sources import Constant, Source, Status

EXPOSURE_LIMIT = Constant(
    "exposure limit, 8 h mean",
    5e-9,
    "kg/m^3",
    Source("29 CFR 1910.1026(c), as chromium", Status.PUBLISHED),
)
_SUBPART_N = Source("40 CFR 63 Subpart N as amended 77 FR 58220, 2012", Status.PUBLISHED)
TENSION_LIMITS = {
    "stalagmometer": Constant("surface tension, stalagmometer", 0.040, "N/m", _SUBPART_N),
    "tensiometer": Constant("surface tension, tensiometer", 0.033, "N/m", _SUBPART_N),
}


def handled(situation: Situation) -> bool:
    """Whether bath, a step or the make-up brings hexavalent chromium."""
    return "hexavalent chromium" in handled_contents(situation)


def in_bath(situation: Situation) -> bool:
    """Whether the electrolytic tank itself holds hexavalent chromium."""
    return "hexavalent chromium" in bath_contents(situation)


def anywhere(situation: Situation) -> Facts | None:
    """cr6-core, cr6-limits, cr6-hygiene, cr6-fire."""
    return {} if handled(situation) else None


def area(situation: Situation) -> Facts | None:
    """cr6-area: above the limit, or no air survey on file."""
    result = situation.exposure_result
    return {} if handled(situation) and (result is None or exceeds(result, EXPOSURE_LIMIT.value)) else None


def medical(situation: Situation) -> Facts | None:
    """cr6-medical: until the shop says that nobody is exposed that often."""
    return {} if handled(situation) and situation.exposed_thirty_days is not False else None


def elsewhere(situation: Situation) -> Facts | None:
    """cr6-elsewhere: a chromate tank on a line that is not chromic."""
    return {} if "hexavalent chromium" in step_contents(situation) and not in_bath(situation) else None


def surface_tension(situation: Situation) -> Facts | None:
    """cr6-surface-tension: the wetting agent is the control, and its reading does not show that it works."""
    if not (in_bath(situation) and situation.wetting_agent_is_control):
        return None
    reading, meter = situation.surface_tension, situation.surface_tension_meter
    if reading is not None and meter is not None and not exceeds(reading, TENSION_LIMITS[meter].value):
        return None
    return {"surface_tension": stated(reading, SURFACE_TENSION)}


def suppressant(situation: Situation) -> Facts | None:
    """cr6-suppressant: until the shop says that its fume suppressant holds no PFOS."""
    return {} if in_bath(situation) and situation.suppressant_pfos is not False else None


def size_large(situation: Situation) -> Facts | None:
    """cr6-size-large: installed chrome amperes at or above the break-point, or not known."""
    if situation.process != "chrome-hard":
        return None
    limits = situation.thresholds
    if situation.installed_chrome_current is None:
        return {"potential_charge": stated(None, CHARGE)}
    potential = potential_charge(
        installed_current=situation.installed_chrome_current,
        time=limits.potential_time.value,
        share=limits.potential_share.value,
    )
    large = reaches(potential, limits.large_site_charge.value)
    return {"potential_charge": stated(potential, CHARGE)} if large else None


def charge_log(situation: Situation) -> Facts | None:
    """cr6-ah-log: the size claim or the permit counts ampere-hours."""
    if situation.process != "chrome-hard" or situation.permit_by_charge is False:
        return None
    return {
        "load_charge": stated(situation.load_charge, CHARGE),
        "rolling_charge": stated(situation.rolling_charge, CHARGE),
        "permit_charge": stated(situation.permit_charge, CHARGE),
    }


def europe(situation: Situation) -> Facts | None:
    """cr6-eu: in the EU or EEA, or the site does not say."""
    return {} if handled(situation) and situation.region_eu is not False else None


def waste(situation: Situation) -> Facts | None:
    """cr6-waste: whenever something is dragged out."""
    mass = situation.drag_out_chromium
    return {"chromium_mass": stated(mass, MASS)} if handled(situation) and mass != 0.0 else None
