"""Two marks on one scale: watch from the first, too high from the second."""

from collections.abc import Mapping
from dataclasses import replace

from lineplanner.errors import Fact
from lineplanner.findings import Finding, upper
from lineplanner.inputs.values import Sourced
from lineplanner.quantities import Kind


def between_marks(
    check: str,
    *,
    value: float,
    watch: Sourced,
    fail: Sourced,
    kind: Kind,
    facts: Mapping[str, Fact],
    demand_firm: bool,
) -> Finding:
    """Above the second mark a failed check, between the two a caution, below the first what is left to it."""
    over = value > fail.value
    limit = fail if over else watch
    finding = upper(
        check,
        value=value,
        limit=limit.value,
        kind=kind,
        source=limit.origin,
        key=f"{check}.fail" if over else (f"{check}.watch" if value > watch.value else check),
        fix=f"{check}.act",
        demand_firm=demand_firm and over,  # the first mark only ever cautions
        caution_at=1.0,  # the first mark is the early one
    )
    return replace(finding, facts=facts)
