"""When a caution on acids, caustic, metals in solution and what must not meet applies."""

import math

from lineplanner.cautions.contents import (
    ACIDS,
    SULFURIC,
    bath_contents,
    handled_contents,
    line_contents,
    step_contents,
)
from lineplanner.cautions.facts import Chemical, Situation
from lineplanner.cautions.measures import exceeds, reaches, stated
from lineplanner.errors import Facts
from lineplanner.inputs.cautions import Word
from lineplanner.quantities import TEMPERATURE_DIFFERENCE
from lineplanner.sources import Constant, Source, Status

_CLP = Source("Regulation (EC) 1272/2008, Annex I, 3.2.3.1", Status.PUBLISHED)
CORROSIVE_BELOW = Constant("pH at or below which a mixture counts as corrosive", 2.0, "1", _CLP)
CORROSIVE_ABOVE = Constant("pH at or above which a mixture counts as corrosive", 11.5, "1", _CLP)

_FAMILIES: tuple[frozenset[Chemical], ...] = (
    ACIDS,
    frozenset({"caustic"}),
    frozenset({"cyanide"}),
    frozenset({"hypochlorite"}),
    frozenset({"sulfide or bisulfite"}),
    frozenset({"not known"}),
)
_OXIDISERS: frozenset[Chemical] = frozenset({"chromic acid", "hexavalent chromium", "nitric acid"})
_MEET_OXIDISERS: frozenset[Chemical] = frozenset(
    {"organics", "hydrochloric acid", "chloride", "sulfide or bisulfite"}
)
_STRONG: frozenset[Chemical] = frozenset({"chromic acid", "nitric acid", "not known"})


def percent_reaches(share: float, limit: float) -> bool:
    """Whether a mass share, rounded to 0.1 %, is at or above a limit: 14.96 % is 15.0 %."""
    tenths = math.floor(share * 1000.0 + 0.5 + 1e-6)
    return reaches(tenths / 1000.0, limit)


def _sulfuric_from(situation: Situation, share: float) -> bool:
    """Whether a sulfuric bath is at least so strong; not known counts as strong."""
    entered = situation.sulfuric_share
    if entered is None:
        return situation.process in SULFURIC
    return percent_reaches(entered, share)


def _burns_badly(situation: Situation) -> bool:
    """Whether content or strength alone makes it a severe burn."""
    acid_step = "sulfuric acid" in step_contents(situation)  # its strength is not known
    strong_bath = _sulfuric_from(situation, situation.thresholds.strong_acid_share.value)
    made_up = bool(situation.make_up - {"caustic"})
    return acid_step or strong_bath or made_up or bool(handled_contents(situation) & _STRONG)


def _corrosive(situation: Situation) -> bool:
    """Whether pH, or a weaker acid or alkali, makes it a burn all the same."""
    ph = situation.ph
    by_ph = situation.process is not None and (
        ph is None or ph <= CORROSIVE_BELOW.value or ph >= CORROSIVE_ABOVE.value
    )
    beside_bath = handled_contents(situation) - bath_contents(situation)
    by_content = bool(beside_bath & (ACIDS | {"caustic", "fluoride"})) or bool(situation.holds_fluoride)
    return by_ph or by_content or _sulfuric_from(situation, situation.thresholds.acid_share.value)


def acid_burn(situation: Situation) -> Facts | None:
    """acid-burn: acid or alkali that burns, in the bath, a step or the make-up."""
    return {} if _burns_badly(situation) or _corrosive(situation) else None


def acid_burn_word(situation: Situation) -> Word:
    """The word of acid-burn: weak sulfuric acid, and what only its pH makes corrosive, is a warning."""
    return "DANGER" if _burns_badly(situation) else "WARNING"


def acid_into_water(situation: Situation) -> Facts | None:
    """acid-into-water: concentrated sulfuric acid is added."""
    rise = stated(situation.make_up_rise, TEMPERATURE_DIFFERENCE)
    return {"heat_rise": rise} if "sulfuric acid" in situation.make_up else None


def acid_mist(situation: Situation) -> Facts | None:
    """acid-mist: sulfuric anodize whose exhaust is absent, not proven, or not shown to be enough."""
    if situation.process not in SULFURIC:
        return None
    flow, needed = situation.exhaust, situation.exhaust_needed
    captured = (
        flow is not None
        and not isinstance(flow, str)
        and needed is not None
        and situation.exhaust_proven
        and not exceeds(needed, flow)
    )
    return None if captured else {}


def fluoride(situation: Situation) -> Facts | None:
    """fluoride-hf: fluoride, bifluoride, fluosilicate or hydrofluoric acid."""
    return {} if "fluoride" in handled_contents(situation) else None


def nitric(situation: Situation) -> Facts | None:
    """nitric-nox: nitric acid meets metal."""
    return {} if "nitric acid" in handled_contents(situation) else None


def hydrochloric(situation: Situation) -> Facts | None:
    """hcl-strip: a hydrochloric strip or pickle."""
    return {} if situation.steps & {"hydrochloric-strip", "hydrochloric-pickle"} else None


def solvent(situation: Situation) -> Facts | None:
    """solvent-stopoff: lacquer, wax or solvent at the part."""
    by_step = situation.steps & {"stop-off-removal", "solvent-clean"}
    return {} if by_step or situation.stop_off & {"lacquer", "wax"} else None


def caustic(situation: Situation) -> Facts | None:
    """caustic-etch: caustic on aluminium."""
    return {} if situation.steps & {"caustic-etch", "caustic-strip"} else None


def no_mix(situation: Situation) -> Facts | None:
    """no-mix: two things on the line that must not meet."""
    present = line_contents(situation)
    families = sum(bool(present & family) for family in _FAMILIES)
    oxidised = bool(present & _OXIDISERS and present & _MEET_OXIDISERS)
    return {} if families > 1 or oxidised else None


def boric(situation: Situation) -> Facts | None:
    """boric: boric acid strong enough to be classed as harmful to reproduction."""
    share = situation.boric_share
    if share is None:
        return {} if situation.process == "anodize-boric-sulfuric" else None
    return {} if reaches(share, situation.thresholds.boric_share.value) else None


def nickel(situation: Situation) -> Facts | None:
    """nickel-seal: a seal with nickel salts."""
    return {} if "nickel" in step_contents(situation) else None


def lead(situation: Situation) -> Facts | None:
    """lead-anode: lead electrodes, liner or tape, or work on their sludge."""
    electrodes = situation.process is not None and situation.lead is not False
    return {} if electrodes or "lead-tape" in situation.stop_off or situation.sludge_work else None
