"""What the bath, the steps and the line hold, as far as a rule asks."""

from collections.abc import Mapping
from functools import lru_cache

from lineplanner.cautions.facts import Chemical, MadeUp, Situation, StepKind
from lineplanner.inputs.tables import Process

CHROMIC: frozenset[Process] = frozenset({"chrome-hard", "anodize-chromic"})
SULFURIC: frozenset[Process] = frozenset(
    {"anodize-sulfuric", "anodize-hard", "anodize-boric-sulfuric", "anodize-tartaric-sulfuric"}
)

_CHROMIC_ACID: frozenset[Chemical] = frozenset({"chromic acid", "hexavalent chromium"})
_CAUSTIC: frozenset[Chemical] = frozenset({"caustic"})
_NITRIC: frozenset[Chemical] = frozenset({"nitric acid"})
_HYDROCHLORIC: frozenset[Chemical] = frozenset({"hydrochloric acid", "chloride"})
_NONE: frozenset[Chemical] = frozenset()

# Common practice of the trade: what such a tank usually holds, the worse make-up where two are usual.
STEP_CONTENTS: Mapping[StepKind, frozenset[Chemical]] = {
    "solvent-clean": frozenset({"organics"}),
    "clean": _CAUSTIC,
    "caustic-etch": _CAUSTIC,
    "caustic-strip": _CAUSTIC,
    "sulfuric-pickle": frozenset({"sulfuric acid"}),
    "sulfuric-desmut": frozenset({"sulfuric acid"}),
    "nitric-desmut": _NITRIC,
    "fluoride-desmut": _NITRIC | {"fluoride"},
    "fluoride-etch": frozenset({"fluoride"}),
    "chromic-desmut": _CHROMIC_ACID,
    "chromic-strip": _CHROMIC_ACID | {"phosphoric acid"},
    "chromate-conversion": _CHROMIC_ACID | {"fluoride"},
    "bright-dip": _NITRIC | {"phosphoric acid"},
    "nitric-strip": _NITRIC,
    "hydrochloric-pickle": _HYDROCHLORIC,
    "hydrochloric-strip": _HYDROCHLORIC,
    "dichromate-seal": frozenset({"hexavalent chromium"}),
    "nickel-acetate-seal": frozenset({"nickel"}),
    "nickel-seal": frozenset({"nickel", "fluoride"}),
    "hot-water-seal": _NONE,
    "stop-off-removal": frozenset({"organics"}),
    "oven": _NONE,
    "rinse": _NONE,
    "dye": _NONE,
    "grind": _NONE,
    "other": frozenset({"not known"}),
}
MADE_UP_CONTENTS: Mapping[MadeUp, frozenset[Chemical]] = {
    "sulfuric acid": frozenset({"sulfuric acid"}),
    "nitric acid": _NITRIC,
    "hydrochloric acid": _HYDROCHLORIC,
    "chromium trioxide": _CHROMIC_ACID,
    "caustic": _CAUSTIC,
    "other": frozenset({"not known"}),
}
ACIDS: frozenset[Chemical] = frozenset(
    {"sulfuric acid", "nitric acid", "hydrochloric acid", "phosphoric acid", "chromic acid"}
)
_ORGANIC_STOP_OFF = frozenset({"lacquer", "wax"})


def bath_contents(situation: Situation) -> frozenset[Chemical]:
    """What the process bath holds. Where nobody says, a hard chrome bath may hold fluoride."""
    found: set[Chemical] = set()
    if situation.process in SULFURIC:
        found.add("sulfuric acid")
    if situation.process in CHROMIC or situation.holds_hexavalent_chromium:
        found |= _CHROMIC_ACID
    if situation.holds_nitric:
        found.add("nitric acid")
    if situation.holds_fluoride or (situation.holds_fluoride is None and situation.process == "chrome-hard"):
        found.add("fluoride")
    return frozenset(found)


def step_contents(situation: Situation) -> frozenset[Chemical]:
    """What the tanks before and after the process hold."""
    return _held(situation.steps)


@lru_cache(maxsize=64)
def _held(steps: frozenset[StepKind]) -> frozenset[Chemical]:
    return frozenset[Chemical]().union(*(STEP_CONTENTS[step] for step in steps))


def handled_contents(situation: Situation) -> frozenset[Chemical]:
    """Whatever people at this load or this work come near: bath, steps, and what is made up."""
    made_up = (MADE_UP_CONTENTS[chemical] for chemical in situation.make_up)
    return bath_contents(situation).union(step_contents(situation), *made_up)


def line_contents(situation: Situation) -> frozenset[Chemical]:
    """Whatever could meet in a tank, a drain or a duct of the line."""
    organics = situation.stop_off & _ORGANIC_STOP_OFF
    return handled_contents(situation) | situation.on_line | (frozenset({"organics"}) if organics else _NONE)
