"""Which rectifier to take: the smallest that does it, else the one that comes nearest."""

import math
from collections.abc import Iterable
from dataclasses import dataclass

from lineplanner.errors import InputError
from lineplanner.findings import Finding, Level
from lineplanner.program.stages import Run


@dataclass(frozen=True, slots=True, kw_only=True)
class Proposal:
    """The rectifier to take, and of each other one by name the first check it fails: None where it fails none."""

    run: Run
    findings: tuple[Finding, ...]
    others: tuple[tuple[str, Finding | None], ...]


def failures(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """The findings that speak against a rectifier: stops, and comparisons without margin left."""
    return tuple(f for f in findings if _margin(f) < 0.0)


def _margin(finding: Finding) -> float:
    """Margin of a check; a stop that compares nothing counts as the worst, a note as no matter."""
    if finding.level is Level.NOTE or (finding.margin is None and finding.level is not Level.STOP):
        return math.inf
    if finding.margin is None:
        return -math.inf
    return finding.margin


def _size(run: Run) -> tuple[float, float]:
    rectifier = run.rectifier
    return (math.inf, math.inf) if rectifier is None else (rectifier.max_current, rectifier.max_voltage)


def _worst_first(findings: Iterable[Finding]) -> tuple[float, ...]:
    """Margins below zero, worst first, then a mark that ends the list: fewer failures compare as better."""
    return (*sorted(m for m in map(_margin, findings) if m < 0.0), math.inf)


def propose(checked: Iterable[tuple[Run, tuple[Finding, ...]]], *, named: str = "") -> Proposal:
    """The smallest rectifier that passes every check, else the one whose worst check is best.

    A rectifier named by the load is taken as it is. Raises InputError
    rectifier.nothing-checked where there is nothing to choose from.
    """
    tried = list(checked)
    if not tried:
        raise InputError("rectifier.nothing-checked")
    passing = [pair for pair in tried if not failures(pair[1])]
    own = [pair for pair in tried if pair[0].rectifier is not None and pair[0].rectifier.name == named]
    if own:
        chosen = own[0]
    elif passing:
        chosen = min(passing, key=lambda pair: _size(pair[0]))
    else:
        chosen = max(tried, key=lambda pair: (_worst_first(pair[1]), -_size(pair[0])[0]))
    others = tuple(
        (run.rectifier.name, next(iter(failures(findings)), None))
        for run, findings in tried
        if run is not chosen[0] and run.rectifier is not None
    )
    return Proposal(run=chosen[0], findings=chosen[1], others=others)
