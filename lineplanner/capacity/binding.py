"""Which check of a plan binds first."""

from collections.abc import Iterable

from lineplanner.findings import Finding, Level


def binding(findings: Iterable[Finding]) -> Finding | None:
    """The comparison with the smallest margin; a stop before any caution. Notes compare nothing that binds.

    A band that lies inside its window binds nothing either: nothing more can be hung or set by it.
    """
    compared = [f for f in findings if f.margin is not None and f.level is not Level.NOTE and not _inside(f)]
    return min(compared, key=lambda f: (f.level is not Level.STOP, f.margin), default=None)


def _inside(finding: Finding) -> bool:
    return finding.check in ("band-minimum", "band-maximum") and finding.level is Level.OK
