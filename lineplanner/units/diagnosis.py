"""What is wrong with a text that is not one number with one unit: the most telling reason first."""

import re
from collections.abc import Callable
from typing import NamedTuple, NoReturn

from lineplanner.units.grammar import NUMBER, Refusal

_Match = re.Match[str]
_HOURS = r"(?:h|hr|hrs|hours?)"
_MINUTES = r"(?:m|min|mins|minutes?)"


class _Reason(NamedTuple):
    pattern: re.Pattern[str]
    key: str
    facts: Callable[[_Match], dict[str, str]]


def _with_point(match: _Match) -> dict[str, str]:
    return {"write": match.string.replace(",", ".", 1)}


def _in_minutes(match: _Match) -> dict[str, str]:
    minutes = 60.0 * float(match["hours"]) + float(match["minutes"])
    return {"write": f"{minutes:g} min"}


def _as_decimal(match: _Match) -> dict[str, str]:
    """A fraction with a point, digits as far as they end (inch fractions do, down to sixty-fourths)."""
    value = int(match["whole"] or 0) + int(match["top"]) / int(match["bottom"])
    return {"write": f"{value:.9g} {match['unit']}".strip()}


def _reason(pattern: str, key: str, facts: Callable[[_Match], dict[str, str]] = lambda _: {}) -> _Reason:
    return _Reason(re.compile(pattern), key, facts)


_DIGITS = r"[0-9]{1,9}(?:\.[0-9]{1,9})?"
_UNSIGNED = NUMBER.removeprefix("[+-]?")
# Searched in this order; each pattern is linear, and the text is short by then.
_REASONS = (
    _reason(r"[\[\]<>{}\\]", "unit.markup"),
    _reason(r"^[+-]?(?i:nan|inf|infinity)\b", "unit.not_finite"),
    _reason(r"[0-9],[0-9]{3}(?![0-9])(?<!^0,[0-9]{3})(?<![+-]0,[0-9]{3})", "unit.grouping"),
    _reason(r"[0-9]\.[0-9]+,[0-9]|,[0-9]+,", "unit.grouping"),
    _reason(r"^[+-]?[0-9]+,[0-9]+(?![0-9.,])", "unit.decimal_comma", _with_point),
    _reason(r"[0-9]['_][0-9]|^[+-]?[0-9]{1,3}(?: [0-9]{3})+(?![0-9])", "unit.grouping"),
    _reason(r"^[+-]?[0-9]+:[0-9]", "unit.clock"),
    _reason(
        rf"^(?P<hours>{_DIGITS}) ?{_HOURS} ?(?:and )?(?P<minutes>{_DIGITS}) ?{_MINUTES}?$",
        "unit.hours_and_minutes",
        _in_minutes,
    ),
    _reason(
        r"^(?:(?P<whole>[0-9]{1,4})[ -]+)?(?P<top>[0-9]{1,4}) ?/ ?(?P<bottom>[1-9][0-9]{0,3})"
        r" ?(?P<unit>(?:[A-Za-z][^ ]*)?)$",
        "unit.fraction",
        _as_decimal,
    ),
    _reason(r"^[+-] *[+-]|^[+-] ", "unit.sign"),
    _reason(r"\.\.|[0-9]\.(?![0-9])|\.[0-9]+\.|\.$|^[+-]?\.(?![0-9])", "unit.point"),
    _reason(rf"^{NUMBER} *(?:[*^(+x-] *\(?[0-9.(]|\*|\^|\(|/ *[0-9(])|^\(|(?<=[^eE])\+", "unit.expression"),
    _reason(rf"^{NUMBER}.* {_UNSIGNED}", "unit.two_numbers"),
    _reason(rf"^(?!{NUMBER})", "unit.missing_number"),
)


def diagnose(text: str, otherwise: Refusal) -> NoReturn:
    """Refuses a text for the first reason that fits, or for the reason already known."""
    for pattern, key, facts in _REASONS:
        match = pattern.search(text)
        if match:
            raise Refusal(key, **facts(match))
    raise otherwise
