"""Which cautions a situation demands: the table of rules, and the one function that asks them all."""

from collections.abc import Callable, Mapping

from lineplanner.cautions import chemicals, chromium, electric, gas, station, steel
from lineplanner.cautions.facts import Applied, Situation
from lineplanner.errors import Facts
from lineplanner.inputs.cautions import Word

# A rule answers with the values its text shows, or None where the caution does not apply.
Rule = Callable[[Situation], Facts | None]

RULES: Mapping[str, Rule] = {
    "cr6-core": chromium.anywhere,
    "cr6-limits": chromium.anywhere,
    "cr6-area": chromium.area,
    "cr6-hygiene": chromium.anywhere,
    "cr6-medical": chromium.medical,
    "cr6-fire": chromium.anywhere,
    "cr6-elsewhere": chromium.elsewhere,
    "cr6-surface-tension": chromium.surface_tension,
    "cr6-suppressant": chromium.suppressant,
    "cr6-size-large": chromium.size_large,
    "cr6-ah-log": chromium.charge_log,
    "cr6-eu": chromium.europe,
    "lead-anode": chemicals.lead,
    "acid-burn": chemicals.acid_burn,
    "acid-into-water": chemicals.acid_into_water,
    "acid-mist": chemicals.acid_mist,
    "fluoride-hf": chemicals.fluoride,
    "nitric-nox": chemicals.nitric,
    "hcl-strip": chemicals.hydrochloric,
    "solvent-stopoff": chemicals.solvent,
    "caustic-etch": chemicals.caustic,
    "no-mix": chemicals.no_mix,
    "boric": chemicals.boric,
    "nickel-seal": chemicals.nickel,
    "h2-lean": gas.lean,
    "h2-rich": gas.rich,
    "h2-foam": gas.foam,
    "h2-pocket": gas.pocket,
    "fan-first": gas.fan_first,
    "exhaust-unknown": gas.exhaust_unknown,
    "exhaust-short": gas.exhaust_short,
    "makeup-air": gas.makeup_air,
    "dc-arc": electric.arc,
    "live-entry": electric.live_entry,
    "dc-ring": electric.ring,
    "dc-50": electric.from_fifty,
    "dc-60": electric.over_sixty,
    "dc-wet": electric.wet,
    "lockout": electric.lockout,
    "polarity": electric.polarity,
    "implant": electric.implant,
    "he-stress-relief": steel.stress_relief,
    "he-bake": steel.bake,
    "he-uhs": steel.authority,
    "hot": station.hot,
    "heater-dry": station.heater_dry,
    "shower": station.shower,
    "tank-entry": station.tank_entry,
    "spill": station.spill,
    "cr6-waste": chromium.waste,
    "estimate": station.estimate,
}
# Where the situation decides the word.
WORDS_BY_RULE: Mapping[str, Callable[[Situation], Word]] = {"acid-burn": chemicals.acid_burn_word}


def applicable(situation: Situation) -> tuple[Applied, ...]:
    """The cautions that a situation demands, in the order of the table, with the values they show."""
    found = []
    for caution, rule in RULES.items():
        facts = rule(situation)
        if facts is not None:
            word = WORDS_BY_RULE[caution](situation) if caution in WORDS_BY_RULE else None
            found.append(Applied(id=caution, facts=facts, word=word))
    return tuple(found)
