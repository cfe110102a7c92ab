"""The grammar of a number with a unit: splits a text into both. Knows no unit library."""

import re
from dataclasses import dataclass
from difflib import get_close_matches
from functools import cache
from pathlib import Path
from typing import NamedTuple, NoReturn

LONGEST = 60  # characters of a text with a unit; honest ones have half of that
_HIGHEST_POWER = 4
_MOST_FACTORS = 6

NUMBER = r"[+-]?(?:[0-9]+(?:\.[0-9]+)?|\.[0-9]+)(?:[eE][+-]?[0-9]+)?"
SPLIT = re.compile(rf" *({NUMBER}) *(.*?) *", re.DOTALL)

# All that may occur; the rest (control characters, full-width digits) is refused unread.
# Written as code points where two characters look alike: micro signs, ohm signs, dots, raised digits.
_ALLOWED = re.compile(
    "[ -~\u00b5\u03bc\u00b0\u03a9\u2126\u00b7\u22c5\u00b2\u00b3\u00b9\u2070\u2074-\u2079\u207b]*"
)
_BLANKS = str.maketrans("\u00a0\u2009\u202f", "   ")
_LETTERS = str.maketrans(
    {
        "\u00b5": "u",
        "\u03bc": "u",
        "\u00b0": "deg",
        "\u03a9": "ohm",
        "\u2126": "ohm",
        "\u00b7": "*",
        "\u22c5": "*",
    }
)
_RAISED = str.maketrans("\u2070\u00b9\u00b2\u00b3\u2074\u2075\u2076\u2077\u2078\u2079\u207b", "0123456789-")
_RAISED_RUN = re.compile("[\u2070\u00b9\u00b2\u00b3\u2074-\u2079\u207b]+")

_FACTOR = r"(?:[A-Za-z_]+|%)(?:\^?-?[0-9]{1,2})?"
_PRODUCT = rf"{_FACTOR}(?:[*/]{_FACTOR})*"
_ITEM = rf"(?:{_FACTOR}|\({_PRODUCT}\))"
_UNIT = re.compile(rf"(?:/?{_ITEM}(?:[*/]{_ITEM})*)?")
_PIECE = re.compile(r"([*/]?)(\(?)([A-Za-z_]+|%)(?:\^?(-?[0-9]+))?(\)?)")


class Refusal(Exception):  # noqa: N818 (an answer, turned into UnitTextError before it leaves this room)
    """Why a text is refused: a message key, with what the message needs besides the token."""

    def __init__(self, key: str, **facts: str) -> None:
        super().__init__(key)
        self.key = key
        self.facts = facts


class Factor(NamedTuple):
    """A unit by its defined name, with its power."""

    name: str
    power: int


@dataclass(frozen=True, slots=True)
class Unit:
    """A unit text that was read. No factors: a plain number."""

    factors: tuple[Factor, ...]

    @property
    def canonical(self) -> str:
        """The unit spelled for the unit library: defined names only, nothing as typed."""
        return " * ".join(name if power == 1 else f"{name} ** {power}" for name, power in self.factors)

    @property
    def single(self) -> str | None:
        """The name of the unit if it stands alone."""
        return self.factors[0].name if len(self.factors) == 1 and self.factors[0].power == 1 else None

    @property
    def names(self) -> frozenset[str]:
        return frozenset(factor.name for factor in self.factors)


@cache
def definition_lines() -> tuple[str, ...]:
    """The lines of the definitions file that lies beside this module."""
    return tuple(Path(__file__).with_name("definitions.txt").read_text(encoding="utf-8").splitlines())


@cache
def spellings() -> dict[str, str]:
    """Every accepted spelling of a unit, with the name it is defined by."""
    found = {"%": "percent"}
    for line in definition_lines():
        if "=" not in line or line.startswith("#"):
            continue
        name, _, *others = (item.strip() for item in line.split("="))
        for spelling in (name, *others):
            found[spelling] = name
            if "offset:" in line:
                found[f"delta_{spelling}"] = f"delta_{name}"
    return found


@cache
def scales() -> frozenset[str]:
    """The temperature scales with a zero of their own, by their defined names."""
    return frozenset(
        name.removeprefix("delta_") for name in spellings().values() if name.startswith("delta_")
    )


def clean(text: str) -> str:
    """The text without outer blanks; refuses what cannot be a number with a unit at all."""
    if len(text) > LONGEST:
        raise Refusal("unit.too_long")
    text = text.translate(_BLANKS).strip(" ")
    if not text:
        raise Refusal("unit.empty")
    if not _ALLOWED.fullmatch(text):
        raise Refusal("unit.characters")
    return text


def read_unit(text: str) -> Unit:
    """The factors of a unit text: names with whole powers, products, quotients, one level of parentheses.

    >>> read_unit("W/(m² K)").canonical
    'watt * meter ** -2 * kelvin ** -1'
    """
    plain = _plain(text)
    if not _UNIT.fullmatch(plain):
        raise Refusal("unit.form")
    factors: list[Factor] = []
    group = 1
    for mark, opened, typed, power, closed in _PIECE.findall(plain):
        sign = -1 if mark == "/" else 1
        if opened:
            group, sign = sign, 1
        factors.append(Factor(_defined_name(typed), sign * group * int(power or 1)))
        if closed:
            group = 1
    if len(factors) > _MOST_FACTORS or any(not 1 <= abs(f.power) <= _HIGHEST_POWER for f in factors):
        raise Refusal("unit.form")
    return Unit(_as_differences(factors))


def _plain(text: str) -> str:
    """A unit text in plain letters, every power as `^n`, every product as `*`, without blanks."""
    text = text.replace("**", "^").translate(_LETTERS)
    text = _RAISED_RUN.sub(lambda run: f"^{run[0].translate(_RAISED)} ", text)
    text = re.sub(r" *\^ *", "^", re.sub(r"^ *1 *(?=/)", "", text))
    text = re.sub(r" *([*/]) *", r"\1", text.strip(" "))
    return re.sub(r" +", "*", re.sub(r"(?<=\() +| +(?=\))", "", text))


def _defined_name(typed: str) -> str:
    name = spellings().get(typed)
    return _refuse_name(typed) if name is None else name


def _as_differences(factors: list[Factor]) -> tuple[Factor, ...]:
    """A degree beside other units or with a power can only be a difference: W/(m2 degC)."""
    if len(factors) == 1 and factors[0].power == 1:
        return tuple(factors)
    return tuple(Factor(f"delta_{f.name}", f.power) if f.name in scales() else f for f in factors)


_NOT_TAKEN = {
    "C": "unit.letter_c",
    "F": "unit.letter_f",
    "ton": "unit.ton",
    "tons": "unit.ton",
    "sq": "unit.square",
}


def _refuse_name(typed: str) -> NoReturn:
    """Refuses a name that is not defined, with the nearest one that is."""
    if typed in _NOT_TAKEN:
        raise Refusal(_NOT_TAKEN[typed])
    alike = [known for known in spellings() if known.casefold() == typed.casefold()]
    near = alike or get_close_matches(typed, spellings(), n=1, cutoff=0.6)
    if near:
        raise Refusal("unit.unknown_near", unit=typed, nearest=near[0])
    raise Refusal("unit.unknown", unit=typed)
