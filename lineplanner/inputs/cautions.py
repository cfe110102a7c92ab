"""Texts of the cautions: words that a site may sharpen, never take away."""

import re
from collections import Counter
from dataclasses import dataclass
from datetime import date
from typing import Annotated, Literal

from lineplanner.errors import Problem
from lineplanner.inputs.values import Sourced
from lineplanner.quantities import CHARGE, COUNT, CURRENT, LENGTH, RATIO, TEMPERATURE, TIME, Field
from lineplanner.sources import Status

Word = Literal["DANGER", "WARNING", "CAUTION", "NOTICE"]
Moment = Literal[
    "before loading", "before current", "while current flows", "unloading", "after", "maintenance", "make-up"
]
WORDS: tuple[Word, ...] = ("DANGER", "WARNING", "CAUTION", "NOTICE")  # gravest first
MOMENTS: tuple[Moment, ...] = (
    "before loading",
    "before current",
    "while current flows",
    "unloading",
    "after",
    "maintenance",
    "make-up",
)
LONGEST_RAW = 200  # characters of a text as written
LONGEST_FILLED = 240  # characters with every value filled in
FILLED_VALUE = 12  # characters that a value may take
LONGEST_SHORT = 44  # characters of a short text with every value filled in

# id -> the word it has at least, and the values its text must show
DECLARED: dict[str, tuple[Word, frozenset[str]]] = {
    "cr6-core": ("DANGER", frozenset()),
    "cr6-limits": ("NOTICE", frozenset()),
    "cr6-area": ("WARNING", frozenset()),
    "cr6-hygiene": ("WARNING", frozenset()),
    "cr6-medical": ("NOTICE", frozenset()),
    "cr6-fire": ("DANGER", frozenset()),
    "cr6-elsewhere": ("WARNING", frozenset()),
    "cr6-surface-tension": ("WARNING", frozenset({"surface_tension"})),
    "cr6-suppressant": ("NOTICE", frozenset()),
    "cr6-size-large": ("NOTICE", frozenset({"potential_charge"})),
    "cr6-ah-log": ("NOTICE", frozenset({"load_charge", "rolling_charge", "permit_charge"})),
    "cr6-eu": ("NOTICE", frozenset()),
    "lead-anode": ("WARNING", frozenset()),
    "acid-burn": ("DANGER", frozenset()),
    "acid-into-water": ("DANGER", frozenset({"heat_rise"})),
    "acid-mist": ("WARNING", frozenset()),
    "fluoride-hf": ("DANGER", frozenset()),
    "nitric-nox": ("DANGER", frozenset()),
    "hcl-strip": ("WARNING", frozenset()),
    "solvent-stopoff": ("WARNING", frozenset()),
    "caustic-etch": ("WARNING", frozenset()),
    "no-mix": ("DANGER", frozenset()),
    "boric": ("WARNING", frozenset()),
    "nickel-seal": ("WARNING", frozenset()),
    "h2-lean": ("WARNING", frozenset({"hydrogen_share"})),
    "h2-rich": ("DANGER", frozenset({"exhaust_for_hydrogen", "current_for_hydrogen"})),
    "h2-foam": ("DANGER", frozenset()),
    "h2-pocket": ("DANGER", frozenset()),
    "fan-first": ("WARNING", frozenset()),
    "exhaust-unknown": ("NOTICE", frozenset()),
    "exhaust-short": ("WARNING", frozenset({"exhaust", "exhaust_needed", "exhaust_class"})),
    "makeup-air": ("NOTICE", frozenset({"air_shortfall"})),
    "dc-arc": ("WARNING", frozenset()),
    "live-entry": ("WARNING", frozenset()),
    "dc-ring": ("WARNING", frozenset()),
    "dc-50": ("WARNING", frozenset({"peak_voltage"})),
    "dc-60": ("DANGER", frozenset({"peak_voltage"})),
    "dc-wet": ("WARNING", frozenset({"peak_voltage"})),
    "lockout": ("WARNING", frozenset()),
    "polarity": ("NOTICE", frozenset()),
    "implant": ("WARNING", frozenset({"implant_distance", "peak_current"})),
    "he-stress-relief": ("WARNING", frozenset()),
    "he-bake": ("WARNING", frozenset({"bake_within", "bake_time", "bake_temperature", "bake_rule"})),
    "he-uhs": ("WARNING", frozenset()),
    "hot": ("CAUTION", frozenset({"hottest"})),
    "heater-dry": ("WARNING", frozenset({"heater_guards"})),
    "shower": ("WARNING", frozenset()),
    "tank-entry": ("DANGER", frozenset()),
    "spill": ("WARNING", frozenset()),
    "cr6-waste": ("NOTICE", frozenset({"chromium_mass"})),
    "estimate": ("NOTICE", frozenset()),
}


@dataclass(frozen=True, slots=True, kw_only=True)
class CautionText:
    """One caution as the site words it."""

    id: Annotated[str, Field(None, "id")]
    word: Annotated[Word, Field(None, "signal word", "may be raised, never lowered")]
    rank: Annotated[int, Field(COUNT, "rank", "within the word; what kills first has the lowest", low=0)]
    moment: Annotated[tuple[Moment, ...], Field(None, "moments")]
    text: Annotated[str, Field(None, "text", "ASCII; values by name in braces")]
    short: Annotated[
        str, Field(None, "short text", "what to do, for a card without room; at most 44 characters")
    ]
    source: Annotated[str, Field(None, "source")]
    as_of: Annotated[date, Field(None, "as of", "when the source was last looked at")]
    status: Annotated[Status, Field(None, "status", "of the weakest figure the text rests on")]


@dataclass(frozen=True, slots=True, kw_only=True)
class CautionThresholds:
    """Where a caution begins, as far as memory or common practice says. A site may only tighten them."""

    arc_current: Annotated[
        Sourced, Field(CURRENT, "current that arcs and heats a ring", above=0.0, high=100.0)
    ]
    implant_current: Annotated[
        Sourced, Field(CURRENT, "current that makes 0.5 mT at the distance below", above=0.0, high=1250.0)
    ]
    implant_distance: Annotated[Sourced, Field(LENGTH, "distance from the bus", low=0.5)]
    acid_share: Annotated[Sourced, Field(RATIO, "sulfuric acid by mass: irritant from", low=0.0, high=0.05)]
    strong_acid_share: Annotated[
        Sourced, Field(RATIO, "sulfuric acid by mass: severe burns from", low=0.0, high=0.15)
    ]
    boric_share: Annotated[Sourced, Field(RATIO, "boric acid by mass", low=0.0, high=0.003)]
    hydrogen_watch: Annotated[Sourced, Field(RATIO, "hydrogen in the exhaust: near", low=0.0, high=0.004)]
    full_on_ratio: Annotated[Sourced, Field(RATIO, "full-on volts over rated volts", low=1.1)]
    hot_bath: Annotated[Sourced, Field(TEMPERATURE, "hot bath from", low=273.15, high=323.15)]
    bake_hardness: Annotated[Sourced, Field(RATIO, "hardness that needs a bake", "HRC", low=0.0, high=31.0)]
    potential_time: Annotated[Sourced, Field(TIME, "hours a year of the size test", low=3.024e7)]
    potential_share: Annotated[Sourced, Field(RATIO, "share of time with current on", low=0.7, high=1.0)]
    large_site_charge: Annotated[
        Sourced, Field(CHARGE, "charge a year from which a site is large", above=0.0, high=2.16e11)
    ]


@dataclass(frozen=True, slots=True, kw_only=True)
class CautionTexts:
    """All cautions of a site."""

    cautions: Annotated[tuple[CautionText, ...], Field(None, "cautions", key="caution")]
    thresholds: Annotated[CautionThresholds, Field(None, "thresholds", key="threshold")]


def shown_values(text: str) -> tuple[str, ...]:
    """Names of the values in braces, in the order of the text."""
    return tuple(re.findall(r"\{(\w+)\}", text))


def text_problems(texts: CautionTexts) -> list[Problem]:
    """What is wrong with a site's texts: missing, weakened, too long, not readable on every terminal."""
    counts = Counter(caution.id for caution in texts.cautions)
    found = [Problem(("cautions",), "caution.missing", {"id": id_}) for id_ in DECLARED if id_ not in counts]
    for position, caution in enumerate(texts.cautions):
        if caution.id not in DECLARED:
            found.append(Problem(("cautions", position, "id"), "caution.unknown", {"id": caution.id}))
            continue
        if counts[caution.id] > 1:
            found.append(Problem(("cautions", position, "id"), "caution.twice", {"id": caution.id}))
        found += [
            Problem(("cautions", position, key), message, {"id": caution.id, **facts})
            for key, message, facts in _problems_of(caution)
        ]
    return found


def _problems_of(caution: CautionText) -> list[tuple[str, str, dict[str, str | int]]]:
    """The problems of one caution: key, message and facts."""
    least, _ = DECLARED[caution.id]
    found: list[tuple[str, str, dict[str, str | int]]] = []
    if WORDS.index(caution.word) > WORDS.index(least):
        found.append(("word", "caution.word_lowered", {"word": caution.word, "least": least}))
    if not caution.moment:
        found.append(("moment", "caution.no_moment", {}))
    return [*found, *_wording(caution, "text"), *_wording(caution, "short")]


def _wording(caution: CautionText, key: str) -> list[tuple[str, str, dict[str, str | int]]]:
    """What is wrong with the text of a caution, or with its short text, which need not show every value."""
    text: str = getattr(caution, key)
    values, whole = DECLARED[caution.id][1], key == "text"
    shown, filled = set(shown_values(text)), re.sub(r"\{\w+\}", "x" * FILLED_VALUE, text)
    most = LONGEST_FILLED if whole else LONGEST_SHORT
    found: list[tuple[str, str, dict[str, str | int]]] = []
    if not text.isascii():
        found.append((key, "caution.not_ascii", {}))
    if shown - values or (whole and shown != values) or "{" in filled or "}" in filled:
        found.append((key, "caution.values", {"values": ", ".join(sorted(values)) or "none"}))
    if whole and len(text) > LONGEST_RAW:
        found.append((key, "caution.too_long", {"length": len(text), "most": LONGEST_RAW}))
    elif len(filled) > most:
        found.append((key, "caution.too_long", {"length": len(filled), "most": most}))
    if re.search(r"\b(safe|compliant|compliance)\b", text, re.IGNORECASE):
        found.append((key, "caution.promise", {}))
    return found
