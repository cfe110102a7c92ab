"""A figure with its story: formula, inputs, source, status."""

from collections.abc import Iterator
from dataclasses import dataclass

from lineplanner.quantities import Kind
from lineplanner.sources import Source, Status


@dataclass(frozen=True, slots=True)
class Figure:
    """One number of a plan that can be asked why.

    value is SI, text for a choice, or None where the process or a stop leaves no number.
    formula is the equation with the source's symbols; words says it as a supervisor would.
    A leaf (no inputs) is something given: its source says by what.
    """

    label: str
    value: float | str | None
    kind: Kind | None
    words: str
    formula: str
    source: Source
    inputs: tuple["Figure", ...] = ()

    @property
    def status(self) -> Status:
        return self.source.status

    def leaves(self) -> Iterator["Figure"]:
        """The given numbers this figure rests on, each once."""
        seen: set[int] = set()
        stack: list[Figure] = [self]
        while stack:
            figure = stack.pop()
            if id(figure) in seen:
                continue
            seen.add(id(figure))
            if figure.inputs:
                stack.extend(reversed(figure.inputs))
            else:
                yield figure


def given(label: str, value: float | str | None, kind: Kind | None, source: Source) -> Figure:
    """A leaf: a number that was entered, read, measured or assumed."""
    return Figure(label, value, kind, "", "", source)


def result(
    label: str,
    value: float | str | None,
    kind: Kind | None,
    words: str,
    formula: str,
    source: Source,
    *inputs: Figure,
) -> Figure:
    """A computed figure with the formula and the figures it was made from."""
    return Figure(label, value, kind, words, formula, source, inputs)
