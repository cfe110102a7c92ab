"""The unit library, loaded at first use: how a unit converts to the SI unit of a kind."""

import math
import re
from functools import cache
from typing import TYPE_CHECKING, Any, NamedTuple

from lineplanner.quantities import (
    COUNT,
    PER_KELVIN,
    RATIO,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    Kind,
)
from lineplanner.units.grammar import Refusal, Unit, definition_lines, read_unit, scales

if TYPE_CHECKING:
    import pint


CELSIUS = "degree_Celsius"


class Conversion(NamedTuple):
    """SI value = number x factor + offset; below `low` the quantity does not exist."""

    factor: float
    offset: float = 0.0
    low: float = float("-inf")


@cache
def registry() -> "pint.UnitRegistry[Any]":
    """The registry of our own definitions; importing pint is slow, so it comes late."""
    import pint

    units: pint.UnitRegistry[Any] = pint.UnitRegistry(None)
    units.load_definitions(list(definition_lines()))
    return units


@cache
def si_unit(kind: Kind) -> str:
    """The SI unit of a kind as the unit library spells it. A kind may say C, which nobody else may."""
    return read_unit(re.sub(r"\bC\b", "coulomb", kind.unit)).canonical


def conversion(unit: Unit, kind: Kind) -> Conversion:
    """How a unit converts to the SI unit of a kind. Refuses a unit of another kind."""
    if kind in (RATIO, COUNT):
        return _of_plain_number(unit, kind)
    if not unit.factors:
        raise Refusal("unit.missing")
    if "percent" in unit.names and kind != PER_KELVIN:
        raise Refusal("unit.wrong_kind")
    if kind == TEMPERATURE_DIFFERENCE and unit.single in scales():
        raise Refusal("unit.difference_wanted", unit="delta_degC" if unit.single == CELSIUS else "delta_degF")
    if kind == TEMPERATURE:
        return _of_temperature(unit)
    return Conversion(_factor(unit.canonical, si_unit(kind)))


def _of_plain_number(unit: Unit, kind: Kind) -> Conversion:
    if not unit.factors:
        return Conversion(1.0)
    if kind == RATIO and unit.single == "percent":
        return Conversion(0.01)
    raise Refusal("unit.wrong_kind")


def _of_temperature(unit: Unit) -> Conversion:
    if any(name.startswith("delta_") for name in unit.names):
        raise Refusal("unit.absolute_wanted")
    scale = unit.single
    if scale not in scales():
        return Conversion(_factor(unit.canonical, "kelvin"), low=0.0)
    zero = float(registry().convert(0.0, scale, "kelvin"))
    return Conversion(_factor(f"delta_{scale}", "kelvin"), zero, 0.0)


_SHORT = 12  # significant digits: a factor that has no more is a short decimal
_DUST = 4  # last bits that a product of powers may be off


def _factor(source: str, target: str) -> float:
    """The factor between two units; 1 A/dm2 is 100 A/m2 and not a last bit less."""
    import pint

    try:
        found = float(registry().convert(1.0, source, target))
        short = float(f"{found:.{_SHORT}g}")
        return short if abs(short - found) <= _DUST * math.ulp(found) else found
    except pint.DimensionalityError:
        raise Refusal("unit.wrong_kind") from None
