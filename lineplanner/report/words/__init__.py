"""Every sentence of the program by its key: one lookup for findings, ways out, reasons and errors.

checks.py     what recipe, alloy and substrate say of a run, the window, the pipeline
capacity.py   what rectifier, bus, contacts, rack, cooling and exhaust say
reasons.py    why an area of a face is what it is
errors.py     what cannot be computed
racking.py    what the gaps between parts say, why a move of the hand is not possible
names.py      checks, stages, processes and statuses as they are called

Each module of sentences holds MESSAGES: key -> template with facts in braces.
"""

from __future__ import annotations

import importlib
import pkgutil
from collections.abc import Mapping
from functools import cache
from typing import TYPE_CHECKING

from lineplanner.errors import Facts, PlannerError, ProblemsError
from lineplanner.report.style import Style, as_style

if TYPE_CHECKING:
    from lineplanner.units import System


@cache
def messages() -> Mapping[str, str]:
    """All templates by key. A key of two modules is a fault."""
    found: dict[str, str] = {}
    for module in pkgutil.iter_modules(__path__):
        own = getattr(importlib.import_module(f"{__name__}.{module.name}"), "MESSAGES", {})
        twice = found.keys() & own.keys()
        if twice:
            raise KeyError(f"two sentences for {', '.join(sorted(twice))}")
        found |= own
    return found


def sentence(key: str, facts: Facts, style: Style | System) -> str:
    """The sentence of a key with its facts filled in, quantities in the style's units.

    >>> sentence("level.dry", {"part": "lug", "count": 3}, "metric")
    '3 x lug: no part of them is in the solution'
    """
    return messages()[key].format_map(_Shown(facts, as_style(style)))


class _Shown(dict[str, str]):
    """The facts as text, each shown when the sentence asks for it."""

    def __init__(self, facts: Facts, style: Style) -> None:
        super().__init__()
        self.facts, self.style = facts, style

    def __missing__(self, name: str) -> str:
        return self.style.fact(self.facts[name])


def error_text(error: PlannerError, style: Style | System) -> str:
    """An error as the lines a person reads: each problem with its place, what is wrong, what to do."""
    from lineplanner.files import problems

    style = as_style(style)
    listed = getattr(error, "problems", None)
    if listed is not None or isinstance(error, ProblemsError):
        return "\n".join(problems.word(one, style.system) for one in listed or ())
    if error.key in messages():
        return sentence(error.key, error.facts, style)
    return problems.text_of(error.key, error.facts, style.system)
