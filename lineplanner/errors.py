"""The errors that reach a user: a message key and named facts; the report words them."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Protocol


class KindOfQuantity(Protocol):
    """What a message needs to know of a quantity: its name and the SI unit it is held in."""

    @property
    def name(self) -> str: ...
    @property
    def unit(self) -> str: ...


@dataclass(frozen=True, slots=True)
class Quantity:
    """A number with its kind, in SI: what a message, a finding or a figure carries.

    at_most says that more than the number would be too much: it is never printed rounded up.
    """

    value: float
    kind: KindOfQuantity
    at_most: bool = False


Fact = str | int | Quantity
Facts = Mapping[str, Fact]


@dataclass(frozen=True, slots=True)
class Problem:
    """One thing that is wrong in an input: where in the record, which message, with which facts.

    path holds the keys from the record's root, list positions as int.
    """

    path: tuple[str | int, ...]
    key: str
    facts: Facts = field(default_factory=dict)


class PlannerError(Exception):
    """Cannot compute: the message key and its facts. Never carries a number in a sentence."""

    def __init__(self, key: str, /, **facts: Fact) -> None:
        super().__init__(key)
        self.key = key
        self.facts: Facts = facts


class InputError(PlannerError):
    """An input cannot be used; the user can change it."""


class ProblemsError(InputError):
    """Several problems of one record, all at once."""

    def __init__(self, problems: list[Problem]) -> None:
        super().__init__("problems", count=len(problems))
        self.problems = problems
