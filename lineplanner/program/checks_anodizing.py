"""What alloy and film say about an anodizing run."""

from collections.abc import Iterator

from lineplanner.bath.growth import soft_share
from lineplanner.errors import Fact, Quantity
from lineplanner.findings import Finding, Level, note, upper
from lineplanner.program.anodizing import Films, films_of, grown
from lineplanner.program.checks import check_panel
from lineplanner.program.job import Job
from lineplanner.program.stages import Run
from lineplanner.quantities import (
    CURRENT_DENSITY,
    RATIO,
    THICKNESS,
    TIME,
)
from lineplanner.sources import Source, Status

_MIXING = Source(
    "an aluminium finishing association's reference guide: do not run 2xxx with other alloys",
    Status.PUBLISHED,
)


def check_anodizing(job: Job, run: Run, films: Films) -> Iterator[Finding]:
    """Current density against each alloy's usual limit, mixing, ceilings, soft film, the other law."""
    groups = {film.family.mix for _, film in films.items}
    if len(groups) > 1:
        facts = {"families": ", ".join(sorted({film.family.name for _, film in films.items}))}
        yield Finding(
            "mixed-alloys", Level.CAUTION, "mixed-alloys", _MIXING, fix="mixed-alloys.part", facts=facts
        )
    yield from check_panel(job, run)
    yield from check_alloy_time(run, films)
    hard = job.process.name == "anodize-hard"
    seen: set[str] = set()
    for (_, film), item_run in zip(films.items, run.items, strict=False):
        family = film.family
        if family.name in seen:
            continue
        seen.add(family.name)
        if run.panel_current is not None:
            most = family.most_hard if hard else family.most_sulfuric
            yield upper(
                "burning",
                value=item_run.density,
                limit=most.value,
                kind=CURRENT_DENSITY,
                source=most.origin,
                key="burning",
                fix="burning.lower",
                demand_firm=len(films.items) == 1,
                caution_at=most.caution_at,
                family=family.name,
            )
        ceiling = family.hard_ceiling if hard else job.process.thickness_ceiling
        yield upper(
            "ceiling",
            value=item_run.thickness,
            limit=ceiling.value,
            kind=THICKNESS,
            source=ceiling.origin,
            key="ceiling",
            fix="ceiling.ask",
            demand_firm=False,
            caution_at=ceiling.caution_at,
            family=family.name,
        )
        if run.total_time is not None and film.dissolution > 0.0:
            soft = job.tables.growth.soft_share
            yield upper(
                "soft-film",
                value=soft_share(
                    thickness=item_run.thickness, time=run.total_time, dissolution=film.dissolution
                ),
                limit=soft.value,
                kind=RATIO,
                source=soft.origin,
                key="soft-film",
                fix="soft-film.faster",
                caution_at=soft.caution_at,
                family=family.name,
            )
    if job.bath.kind == "sulfuric":
        yield from _other_law(job, run, films)


def check_alloy_time(run: Run, films: Films) -> Iterator[Finding]:
    """A caution where the time of an alloy that burns first is longer than the rule's, with no coupon to back it."""
    seen: set[str] = set()
    for _, film in films.items:
        family = film.family
        if (
            run.panel_current is None
            or run.total_time is None
            or not family.delicate
            or film.calibrated
            or family.name in seen
        ):
            continue
        if film.alloy_factor < 1.0:
            seen.add(family.name)
            row = family.growth_factor
            facts: dict[str, Fact] = {
                "family": family.name,
                "factor": Quantity(row.value, RATIO),
                "low": Quantity(row.low if row.low is not None else row.value, RATIO),
                "high": Quantity(row.high if row.high is not None else row.value, RATIO),
                "time": Quantity(run.total_time, TIME),
            }
            yield Finding(
                "alloy-time", Level.CAUTION, "alloy-time", row.origin, fix="alloy-time.coupon", facts=facts
            )


def _other_law(job: Job, run: Run, films: Films) -> Iterator[Finding]:
    """The law not in use as a cross-check: a note where the two lie further apart than the limit."""
    if run.forward is None or run.total_time is None or not films.items or run.thickness is None:
        return
    law = films.items[0][1].law
    other = films_of(job, "720" if law == "growth-dissolution" else "growth-dissolution")
    thickness = min(
        grown(film, density=other.density(film, run.forward), equivalent=1.0, time=run.total_time)
        for _, film in other.items
    )
    limit = job.tables.limits.law_difference
    apart = abs(thickness / run.thickness - 1.0)
    if apart > limit.value:
        yield note(
            "growth-law",
            "growth-law.apart",
            limit.origin,
            "growth-law.coupon",
            other=Quantity(thickness, THICKNESS),
            apart=Quantity(apart, RATIO),
            law=other.items[0][1].law,
        )
