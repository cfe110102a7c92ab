"""When a caution on hydrogen, foam and exhaust applies."""

from lineplanner.cautions.contents import CHROMIC, step_contents
from lineplanner.cautions.facts import NOT_KNOWN, Situation
from lineplanner.cautions.measures import exceeds, stated
from lineplanner.errors import Facts
from lineplanner.quantities import CURRENT, FLOW, RATIO
from lineplanner.sources import Constant, Source, Status

LOWER_FLAMMABLE = Constant(
    "lower flammable limit of hydrogen in air, by volume",
    0.04,
    "1",
    Source("hydrogen safety tables: 4 % to 75 % in air", Status.PUBLISHED),
)
ALLOWED_SHARE = Constant(
    "share of the lower flammable limit that a tank's exhaust may reach",
    0.25,
    "1",
    Source("29 CFR 1910.124(b)(3), read in the Washington State copy", Status.PUBLISHED),
)


HYDROGEN_LIMIT = Constant(
    "hydrogen by volume that a tank's exhaust may reach",
    LOWER_FLAMMABLE.value * ALLOWED_SHARE.value,
    "1",
    Source("product of the two above", Status.DERIVED),
)


def lean(situation: Situation) -> Facts | None:
    """h2-lean: hydrogen near the limit, not above it."""
    share = situation.hydrogen_share
    if share is None or not exceeds(share, situation.thresholds.hydrogen_watch.value):
        return None
    return None if exceeds(share, HYDROGEN_LIMIT.value) else {"hydrogen_share": stated(share, RATIO)}


def rich(situation: Situation) -> Facts | None:
    """h2-rich: hydrogen above the limit, or no exhaust at all."""
    share = situation.hydrogen_share
    above = share is not None and exceeds(share, HYDROGEN_LIMIT.value)
    if not above and (situation.process is None or situation.exhaust != "none"):
        return None
    return {
        "exhaust_for_hydrogen": stated(situation.exhaust_for_hydrogen, FLOW),
        "current_for_hydrogen": stated(situation.current_for_hydrogen, CURRENT),
    }


def foam(situation: Situation) -> Facts | None:
    """h2-foam: a foam blanket on a gassing tank; a chromic bath has one unless the shop says otherwise."""
    likely = situation.foam is None and situation.process in CHROMIC
    return {} if situation.process is not None and (situation.foam or likely) else None


def pocket(situation: Situation) -> Facts | None:
    """h2-pocket: a lid, or a part that holds gas."""
    trapped = situation.lid is not False or situation.part_traps_gas
    return {} if situation.process is not None and trapped else None


def fan_first(situation: Situation) -> Facts | None:
    """fan-first: every gassing tank, and every step that fumes."""
    return {} if situation.process is not None or step_contents(situation) else None


def exhaust_unknown(situation: Situation) -> Facts | None:
    """exhaust-unknown: the flow is missing, or not proven this shift."""
    if situation.process is None or situation.exhaust == "none":
        return None
    unchecked = situation.exhaust is None or situation.hydrogen_share is None
    return {} if unchecked or not situation.exhaust_proven else None


def exhaust_short(situation: Situation) -> Facts | None:
    """exhaust-short: less than the tank rule asks for, or none."""
    flow, needed = situation.exhaust, situation.exhaust_needed
    if situation.process is None or flow is None:
        return None
    if not isinstance(flow, str) and (needed is None or not exceeds(needed, flow)):
        return None
    return {
        "exhaust": flow if isinstance(flow, str) else stated(flow, FLOW),
        "exhaust_needed": stated(needed, FLOW),
        "exhaust_class": situation.exhaust_class or NOT_KNOWN,
    }


def makeup_air(situation: Situation) -> Facts | None:
    """makeup-air: more air goes out than is known to come in."""
    if situation.process is None:
        return None
    out, supplied = situation.exhaust_sum, situation.supply_air
    if out is None or supplied is None:
        return {"air_shortfall": stated(None, FLOW)}
    return {"air_shortfall": stated(out - supplied, FLOW)} if exceeds(out, supplied) else None
