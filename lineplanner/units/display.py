"""SI float -> text with the trade's unit and digits."""

from decimal import ROUND_FLOOR, ROUND_HALF_UP, Decimal
from math import isfinite

from lineplanner.quantities import COUNT, RATIO, Kind
from lineplanner.units.reading import unit_conversion
from lineplanner.units.trade import (
    SIGNIFICANT,
    STEPS,
    THREE_DIGITS_ONLY,
    TRAILING_ZEROS,
    System,
    fitting_unit,
)

_MOST_DIGITS = 6  # of an entered number that an echo repeats in full
_LARGE, _SMALL = 1e12, 1e-6  # beyond: with exponent


def to_unit(value: float, kind: Kind, unit: str) -> float:
    """An SI value as number of a unit of its kind.

    >>> from lineplanner.quantities import CURRENT_DENSITY
    >>> round(to_unit(258.33385, CURRENT_DENSITY, "A/ft2"), 6)
    24.0
    """
    factor, offset, _ = unit_conversion(unit, kind)
    return (value - offset) / factor


def show(
    value: float,
    kind: Kind,
    system: System,
    *,
    digits: int | None = None,
    unit: str | None = None,
    step: float | None = None,
    down: bool = False,
) -> str:
    """An SI value as text. Without more: the trade's unit of the system and the trade's digits.

    digits: significant digits instead of the usual ones. unit: another unit of the kind.
    step: what the panel can be set to, in SI; the number is shown as the nearest multiple.
    down: never more than the value is, where the nearest would be.

    >>> from lineplanner.quantities import CURRENT, THICKNESS
    >>> show(0.0000254, THICKNESS, "us"), show(1234.0, CURRENT, "metric", step=10.0)
    ('1 mil', '1230 A')
    """
    unit = unit or fitting_unit(kind, system, value)
    number = _decimal(to_unit(value, kind, unit))
    rounding = ROUND_FLOOR if down else ROUND_HALF_UP
    if step is not None:
        factor = unit_conversion(unit, kind).factor
        text = _in_steps(number, _decimal(step / factor), rounding, keep_zeros=True)
    elif digits is not None:
        text = _significant(number, digits, rounding, whole=False)
    elif kind == COUNT:
        text = _in_steps(number, Decimal(1), rounding, keep_zeros=False)
    else:
        text = _usual(number, kind, unit, rounding)
    return _joined(text, unit)


def echo(value: float, kind: Kind) -> str:
    """What was understood, in both systems: an entered number with all its digits, the other with three.

    >>> from lineplanner.quantities import CURRENT_DENSITY
    >>> echo(250.0, CURRENT_DENSITY)
    '2.5 A/dm2 = 23.2 A/ft2'
    """
    units = [fitting_unit(kind, "metric", value), fitting_unit(kind, "us", value)]
    if kind == RATIO:
        units = ["1", "%"]
    texts = [_joined(_as_entered(_decimal(to_unit(value, kind, unit))), unit) for unit in units]
    return " = ".join(dict.fromkeys(texts))


def _decimal(number: float) -> Decimal:
    """A number as a person would write it: noise of the conversion past twelve digits is gone."""
    if not isfinite(number):
        raise ValueError(number)
    return Decimal(f"{number:.12g}")


def _joined(number: str, unit: str) -> str:
    return number if unit in ("1", "") else f"{number} {unit}"


def _usual(number: Decimal, kind: Kind, unit: str, rounding: str) -> str:
    step = STEPS.get(unit)
    if step:
        text = _in_steps(number, Decimal(step), rounding, keep_zeros=unit in TRAILING_ZEROS)
        # A small amount never reads as none; what is smaller yet is the noise of a computed zero.
        if Decimal(text) != 0 or abs(number) < Decimal(step) / 100:
            return text
        return _significant(number, 1, rounding, whole=False)
    return _significant(number, SIGNIFICANT, rounding, whole=kind not in THREE_DIGITS_ONLY)


def _in_steps(number: Decimal, step: Decimal, rounding: str, *, keep_zeros: bool) -> str:
    if abs(number) >= _LARGE:
        return _significant(number, SIGNIFICANT, rounding, whole=False)
    multiple = (number / step).quantize(Decimal(1), rounding) * step
    return _plain(multiple, keep_zeros=keep_zeros)


def _significant(number: Decimal, digits: int, rounding: str, *, whole: bool) -> str:
    if number == 0:
        return "0"
    if not _SMALL <= abs(number) < _LARGE:
        mantissa, _, exponent = f"{number:.{digits - 1}e}".partition("e")
        return f"{_plain(Decimal(mantissa), keep_zeros=False)}e{exponent}"
    place = number.adjusted() - digits + 1
    place = min(place, 0) if whole else place
    rounded = (number.scaleb(-place)).to_integral_value(rounding).scaleb(place)
    return _plain(rounded, keep_zeros=False)


def _as_entered(number: Decimal) -> str:
    """With as many digits as it ends within, else three."""
    for digits in range(SIGNIFICANT, _MOST_DIGITS + 1):
        text = _significant(number, digits, ROUND_HALF_UP, whole=True)
        if abs(Decimal(text) - number) <= abs(number) * Decimal("1e-9"):
            return text
    return _significant(number, SIGNIFICANT, ROUND_HALF_UP, whole=True)


def _plain(number: Decimal, *, keep_zeros: bool) -> str:
    """Digits without exponent, and no minus before zero."""
    text = format(abs(number) if number == 0 else number, "f")
    return text if keep_zeros or "." not in text else text.rstrip("0").rstrip(".")
