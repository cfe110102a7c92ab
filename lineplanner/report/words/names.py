"""Checks, stages, processes and statuses as they are called."""

from collections.abc import Iterable, Mapping

# Where the check's key with its hyphens taken out does not read well.
_CHECKS: Mapping[str, str] = {
    "aim": "aim",
    "area-stated": "stated area",
    "band-maximum": "thickness maximum",
    "band-minimum": "thickness minimum",
    "burning": "burning",
    "ceiling": "thickness ceiling",
    "level": "solution level",
    "recipe-base": "alloy or substrate",
    "voltage-limit": "voltage limit",
    "bright-window": "rough deposit",
    "milky-window": "milky deposit",
    "efficiency-range": "range of the efficiency model",
    "efficiency-cap": "ceiling of the efficiency model",
    "preset": "start of the deposit",
    "growth-law": "growth law",
    "places": "hanging places",
    "gaps": "gaps between parts",
}
_PLURAL = frozenset(
    {
        "contacts",
        "joints",
        "volts",
        "bolted joints",
        "saddles",
        "hanging places",
        "titanium volts",
        "gaps between parts",
    }
)
_WORK: Mapping[str, str] = {"work anodic": "work +", "work cathodic": "work -", "off": "off"}
_PROCESSES: Mapping[str, str] = {
    "anodize-sulfuric": "sulfuric anodize",
    "anodize-hard": "hard anodize",
    "anodize-chromic": "chromic anodize",
    "anodize-boric-sulfuric": "boric-sulfuric anodize",
    "anodize-tartaric-sulfuric": "tartaric-sulfuric anodize",
    "chrome-hard": "hard chrome",
}
# Status -> one and several, as "rests on" counts them.
_RESTS: Mapping[str, tuple[str, str]] = {
    "entered here": ("entered here", "entered here"),
    "measured here": ("measured here", "measured here"),
    "derived": ("derived", "derived"),
    "published (read)": ("published (read)", "published (read)"),
    "published (from memory)": ("from memory", "from memory"),
    "common practice": ("of common practice", "of common practice"),
    "assumption": ("assumption", "assumptions"),
}
# Status of a limit in a narrow column.
_SHORT: Mapping[str, str] = {
    "published (read)": "published",
    "published (from memory)": "from memory",
    "common practice": "practice",
    "entered here": "entered",
    "measured here": "measured",
}
WEAK = ("assumption", "published (from memory)", "common practice")


def check_name(check: str) -> str:
    """A check as it is called.

    >>> check_name("band-minimum"), check_name("soft-film")
    ('thickness minimum', 'soft film')
    """
    return _CHECKS.get(check, check.replace("-", " "))


def its(name: str) -> str:
    """`its` or `their`, by the name before it."""
    return "their" if name in _PLURAL else "its"


def short_status(status: str) -> str:
    """A status in a narrow column.

    >>> short_status("published (from memory)")
    'from memory'
    """
    return _SHORT.get(status, status)


def work(polarity: str) -> str:
    """The sign of the work.

    >>> work("work anodic")
    'work +'
    """
    return _WORK[polarity]


def process_name(process: str) -> str:
    """A process as it is called."""
    return _PROCESSES[process]


def counted_statuses(counts: Mapping[str, int], only: Iterable[str] | None = None) -> str:
    """How many figures of each status.

    >>> counted_statuses({"derived": 4, "assumption": 3, "published (from memory)": 1}, WEAK)
    '3 assumptions, 1 from memory'
    """
    order = list(only) if only is not None else list(_RESTS)
    parts = [f"{counts[one]} {_RESTS[one][counts[one] > 1]}" for one in order if counts.get(one)]
    return ", ".join(parts)


def number_of(count: int, one: str, many: str | None = None) -> str:
    """A count with its word.

    >>> number_of(1, "note"), number_of(3, "note")
    ('1 note', '3 notes')
    """
    return f"{count} {one if count == 1 else many or f'{one}s'}"
