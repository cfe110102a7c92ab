"""Metric or US, plain or with signs: how every figure of a report is printed."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import lru_cache
from typing import TYPE_CHECKING

from lineplanner.errors import Fact, KindOfQuantity, Quantity

if TYPE_CHECKING:  # a style is at hand before the first frame, what it takes to show a figure is not
    from lineplanner.quantities import Time
    from lineplanner.units import System

LONG = 7200.0  # s; from here a time in a sentence is said in hours
# A difference of temperature reads like a temperature; units tells them apart only to read them back.
_PLAIN: Mapping[str, str] = {"delta_degF": "degF", "delta_degC": "degC"}
_SIGNS: Mapping[str, str] = {
    "um": "µm",
    "uohm": "µohm",
    "degC": "°C",
    "degF": "°F",
    "dm2": "dm²",
    "m2": "m²",
    "ft2": "ft²",
    "in2": "in²",
    "cm2": "cm²",
    "mm2": "mm²",
    "m3": "m³",
    "ft3": "ft³",
    "cm3": "cm³",
}
# What a plain terminal gets in place of signs, also of those that people typed.
ASCII: Mapping[str, str] = {
    "µ": "u",
    "μ": "u",
    "°": "deg ",
    "²": "2",
    "³": "3",
    "·": " ",
    "×": "x",
    "–": "-",
    "—": "-",
    "Ω": "ohm",
    "°C": "degC",
    "°F": "degF",
}


@dataclass(frozen=True, slots=True)
class Style:
    """The unit system, and whether units are written with plain letters only."""

    system: System = "metric"
    ascii: bool = False

    def show(
        self,
        value: float,
        kind: KindOfQuantity,
        *,
        unit: str | None = None,
        step: float | None = None,
        digits: int | None = None,
        down: bool = False,
    ) -> str:
        """An SI value with its unit, in the digits of its kind; down: rounded to no more than it is."""
        return _shown(self, value, kind.name, unit, step, digits, down)

    def marked(self, text: str) -> str:
        """A shown value with the signs of this style: `50 um` or `50 µm`."""
        number, _, unit = text.partition(" ")
        for plain, read in _PLAIN.items():
            unit = unit.replace(plain, read)
        if not self.ascii:
            unit = signed(unit)
        return f"{number} {unit}" if unit else number

    def fact(self, fact: Fact) -> str:
        """A fact of a message: a quantity shown, words as they are."""
        if not isinstance(fact, Quantity):
            return str(fact)
        if fact.kind.name == "time":
            return self.time_said(fact.value)
        return self.show(fact.value, fact.kind, down=fact.at_most)

    def time_said(self, time: Time) -> str:
        """A time in a sentence: from two hours on in hours.

        >>> Style().time_said(7140.0), Style().time_said(19_560.0)
        ('119 min', '5.43 h')
        """
        from lineplanner.quantities import TIME

        return self.show(time, TIME, unit="h" if time >= LONG else None)


@lru_cache(maxsize=4096)  # one change of a load leaves most figures as they are
def _shown(
    style: Style,
    value: float,
    kind: str,
    unit: str | None,
    step: float | None,
    digits: int | None,
    down: bool,  # noqa: FBT001 - a cache knows its arguments by their place
) -> str:
    from lineplanner import units
    from lineplanner.quantities import KINDS

    text = units.show(value, KINDS[kind], style.system, unit=unit, step=step, digits=digits, down=down)
    return style.marked(text)


@lru_cache(maxsize=256)
def signed(unit: str) -> str:
    """A unit with signs in place of plain letters.

    >>> signed("A/dm2"), signed("W/(m2 K)")
    ('A/dm²', 'W/(m² K)')
    """
    word, text = "", ""
    for letter in f"{unit}\n":
        if letter.isalnum() or letter == "_":
            word += letter
            continue
        text += _SIGNS.get(word, word) + letter
        word = ""
    return text.removesuffix("\n")


def plain(text: str) -> str:
    """Text in ASCII letters only; what has no plain form becomes a question mark.

    >>> plain("50 µm at 20 °C, 2.4 A/dm²")
    '50 um at 20 degC, 2.4 A/dm2'
    """
    for sign, letters in sorted(ASCII.items(), key=lambda pair: -len(pair[0])):
        text = text.replace(sign, letters)
    return text.encode("ascii", "replace").decode("ascii")


def as_style(style: Style | System) -> Style:
    """A unit system alone stands for plain letters."""
    return Style(style, ascii=True) if isinstance(style, str) else style
