"""Whether the parts of a load leave each other room."""

from collections.abc import Mapping

from lineplanner.errors import Quantity
from lineplanner.findings import Finding, Level, lower
from lineplanner.inputs.case import Case
from lineplanner.quantities import LENGTH
from lineplanner.racking.gaps import Gaps
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given

_DRAWN = Source("outlines of the parts in the rack plane", Status.DERIVED)


def gap_figures(gaps: Gaps) -> Mapping[str, Figure]:
    """The least gap as a figure that can be asked why; none where no two parts hang side by side."""
    if gaps.least is None:
        return {}
    return {"gaps.least_m": given("least gap between parts", gaps.least, LENGTH, _DRAWN)}


def check_gaps(gaps: Gaps, case: Case) -> tuple[Finding, ...]:
    """Parts that overlap, and the least gap against what the recipe asks for: cautions, for a hand can part them."""
    found = []
    if gaps.overlapping:
        one, other = gaps.overlapping[0]
        facts = {"one": one, "other": other, "count": len(gaps.overlapping)}
        found.append(Finding("overlap", Level.CAUTION, "gaps.overlap", _DRAWN, fix="gaps.apart", facts=facts))
    asked = case.recipe.spacing
    if asked is not None and gaps.least is not None and gaps.between is not None:
        one, other = gaps.between
        found.append(
            lower(
                "gaps",
                value=gaps.least,
                limit=asked,
                kind=LENGTH,
                source=Source(f"recipe {case.recipe.name} rev {case.recipe.revision}", Status.ENTERED),
                key="gaps",
                fix="gaps.wider",
                demand_firm=False,
                one=one,
                other=other,
                count=len(gaps.near) + len(gaps.overlapping),
                least=Quantity(gaps.least, LENGTH),
                asked=Quantity(asked, LENGTH),
            )
        )
    return tuple(found)
