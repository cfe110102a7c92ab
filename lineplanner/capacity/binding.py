"""Which check of a plan binds first."""

import math
from collections.abc import Iterable

from lineplanner.findings import Finding, Level


def binding(findings: Iterable[Finding]) -> Finding | None:
    """The comparison with the smallest margin; a stop before any caution. Notes compare nothing that binds.

    A band that lies inside its window binds nothing either: nothing more can be hung or set by it.
    """
    compared = [f for f in findings if f.level is Level.STOP or (f.margin is not None and can_bind(f))]
    return min(compared, key=_tightness, default=None)


def _tightness(finding: Finding) -> tuple[bool, float]:
    """A stop by kind binds harder than any percentage."""
    return finding.level is not Level.STOP, -math.inf if finding.margin is None else finding.margin


def can_bind(finding: Finding) -> bool:
    """Whether a finding says anything about how much more would go: notes and a band inside its window do not."""
    inside = finding.check in ("band-minimum", "band-maximum") and finding.level is Level.OK
    return finding.level is not Level.NOTE and not inside
