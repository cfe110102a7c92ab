"""Text with a unit -> SI float of a kind."""

import re
from math import inf, isfinite

from lineplanner.quantities import COUNT, Kind
from lineplanner.units.diagnosis import diagnose
from lineplanner.units.errors import UnitTextError, shown
from lineplanner.units.grammar import LONGEST, SPLIT, Refusal, Unit, clean, read_unit
from lineplanner.units.messages import GIVE, GIVE_UNIT
from lineplanner.units.registry import Conversion, conversion
from lineplanner.units.table import conversions
from lineplanner.units.trade import System, example

_MOST_KNOWN = 1000
_known: dict[tuple[str, str], Conversion] = conversions()  # by unit text as typed, and name of the kind


def parse(text: str, kind: Kind, *, system: System | None = None) -> float:
    """A text with one number and one unit as SI float of a kind; UnitTextError says what is wrong with it.

    `system` chooses the example that a message gives; nothing else depends on it.

    >>> from lineplanner.quantities import CURRENT_DENSITY
    >>> parse("24 A/ft2", CURRENT_DENSITY)
    258.33385000103334
    """
    match = SPLIT.fullmatch(text) if len(text) <= LONGEST else None
    if match:
        known = _known.get((match[2], kind.name))
        number = float(match[1])
        if known and number:
            value = number * known.factor + known.offset
            if value and known.low <= value < inf and -inf < value:
                return value
    try:
        return _read(text, kind)
    except Refusal as refusal:
        raise _error(refusal, text, kind, system) from None


def unit_conversion(text: str, kind: Kind) -> Conversion:
    """How a unit text converts to the SI unit of a kind; kept for the next time."""
    text = "" if text == "1" else text
    known = _known.get((text, kind.name))
    if known is None:
        try:
            known = _remember(text, kind, read_unit(text))
        except Refusal as refusal:
            raise _error(refusal, text, kind, None) from None
    return known


def _remember(text: str, kind: Kind, unit: Unit) -> Conversion:
    known = _known.get((text, kind.name))
    if known is not None:
        return known
    found = conversion(unit, kind)
    if len(_known) >= _MOST_KNOWN:
        _known.clear()
        _known.update(conversions())
    if kind != COUNT:  # a count is looked at each time: it must be whole
        _known[text, kind.name] = found
    return found


def _read(text: str, kind: Kind) -> float:
    """The long way: everything that is not a known unit with an ordinary number."""
    text = clean(text)
    match = SPLIT.fullmatch(text)
    if match is None:
        diagnose(text, Refusal("unit.form"))
    try:
        unit = read_unit(match[2])
    except Refusal as refusal:
        diagnose(text, refusal)
    number = float(match[1])
    lost = number == 0.0 and re.search("[1-9]", re.split("[eE]", match[1])[0]) is not None
    if lost or not isfinite(number):
        raise Refusal("unit.size")
    factor, offset, low = _remember(match[2], kind, unit)
    value = number * factor + offset
    if not isfinite(value) or (value == 0.0 and number != 0.0 and not offset):
        raise Refusal("unit.size")
    if value < low:
        raise Refusal("unit.below_absolute_zero")
    if kind == COUNT and not value.is_integer():
        raise Refusal("unit.wrong_kind")
    return value


def _error(refusal: Refusal, text: str, kind: Kind, system: System | None) -> UnitTextError:
    sample = example(kind, system)
    facts = {
        "token": shown(text.strip(" ")),
        "kind": kind.name,
        "a_kind": f"{'an' if kind.name[0] in 'aeiou' else 'a'} {kind.name}",
        "example": sample,
        "give": GIVE.get(kind.name, GIVE_UNIT).format(example=sample),
    }
    if refusal.key == "unit.difference_wanted" and (match := SPLIT.fullmatch(text)):
        facts["write"] = f"{match[1]} {refusal.facts['unit']}"
    return UnitTextError(refusal.key, **{**facts, **refusal.facts})
