"""What substrate and bath say about a hard chrome run."""

import re
from collections.abc import Iterator
from contextlib import suppress
from datetime import date

from lineplanner.bath.efficiency import at_cap, bright_window_high, bright_window_low, outside_range
from lineplanner.errors import Fact
from lineplanner.findings import Finding, Level, lower, note, upper
from lineplanner.inputs.values import Sourced
from lineplanner.program.checks import check_panel
from lineplanner.program.chrome import start_of, substrate_of
from lineplanner.program.deposition import Deposition
from lineplanner.program.job import Job
from lineplanner.program.stages import Run
from lineplanner.quantities import (
    CURRENT_DENSITY,
    RATIO,
    STRESS,
    Kind,
)
from lineplanner.sources import Source, Status

_PRESET = Source("substrates table", Status.PRACTICE)
_BRIGHT = Source(
    "Modern Electroplating, chromium chapter: bright range at 40 and 45 degC, extrapolated", Status.ASSUMPTION
)

_DAY = re.compile(r"(?<!\d)\d{4}-\d{2}-\d{2}(?!\d)")


def check_chrome(job: Job, run: Run, deposition: Deposition) -> Iterator[Finding]:
    """Plating current density against the bright window and the bath family's range; presets; strong steel."""
    yield from check_panel(job, run)
    yield from _presets(job)
    yield from _strong_steel(job)
    plating = [s for s in run.stages if s.stage == "plate"]
    if not plating:
        return
    density, temperature = plating[-1].density, deposition.temperature
    high = bright_window_high(temperature)
    yield upper(
        "bright-window",
        value=density,
        limit=high,
        kind=CURRENT_DENSITY,
        source=_BRIGHT,
        key="bright-window.high",
        fix="bright-window.lower",
        caution_at=1.0,
    )
    low = bright_window_low(temperature)
    if density < low:
        yield lower(
            "milky-window",
            value=density,
            limit=low,
            kind=CURRENT_DENSITY,
            source=_BRIGHT,
            key="bright-window.low",
            fix="bright-window.raise",
        )
    condition = {
        "current_density": density,
        "temperature": temperature,
        "chromic_acid": deposition.chromic_acid,
        "family": deposition.family,
    }
    for name in outside_range(**condition):  # type: ignore[arg-type]
        source = deposition.family.reference_efficiency.origin
        yield note("efficiency-range", "efficiency-range", source, "efficiency-range.coupon", condition=name)
    if at_cap(**condition):  # type: ignore[arg-type]
        yield note("efficiency-cap", "efficiency-cap", deposition.family.cap.origin)


def _presets(job: Job) -> Iterator[Finding]:
    """Where the recipe contradicts the preset of a substrate: it was told to, so a caution."""
    reverse = start_of(job).reverse_time > 0.0
    for name in sorted({substrate_of(i, job.tables.substrates).name for i in job.areas.items}):
        row = next(r for r in job.tables.substrates if r.name == name)
        if reverse and row.reverse_density.value <= 0.0:
            facts = {"substrate": name}
            yield Finding(
                "preset",
                Level.CAUTION,
                "preset.no-reverse",
                row.reverse_density.origin,
                fix="preset.follow",
                facts=facts,
            )
        if job.recipe.soak is not None and job.recipe.soak.real > 0.0 and not row.soak_in_bath:
            facts = {"substrate": name}
            yield Finding(
                "preset", Level.CAUTION, "preset.no-soak", _PRESET, fix="preset.preheat", facts=facts
            )
    if job.bath.fluoride and job.recipe.soak:
        yield Finding("preset", Level.CAUTION, "preset.fluoride-soak", _PRESET, fix="preset.preheat")


def _strong_steel(job: Job) -> Iterator[Finding]:
    """Steel that only the design owner may release; steel of unknown strength counts as one that needs care."""
    limits = job.tables.limits
    for item in job.areas.items:
        material = item.material
        if material.metal != "steel":
            continue
        strength, hardness = material.tensile_strength, material.hardness
        if strength is None and hardness is None:
            facts = {"part": item.name}
            yield Finding(
                "steel-strength",
                Level.CAUTION,
                "steel-strength.unknown",
                limits.bake_steel.origin,
                fix="steel-strength.enter",
                facts=facts,
            )
            continue
        for value, row, kind in (
            (strength, limits.strong_steel, STRESS),
            (hardness, limits.strong_hardness, RATIO),
        ):
            if value is not None and value >= row.value:
                yield _design_authority(job, item.name, value, row, kind)
                break


def _dated(authority: str) -> bool:
    """Whether a text names a document and its date: some letters, and a day as the calendar has it."""
    for found in _DAY.findall(authority):
        with suppress(ValueError):
            date.fromisoformat(found)
            return any(letter.isalpha() for letter in authority)
    return False


def _design_authority(job: Job, part: str, value: float, row: Sourced, kind: Kind) -> Finding:
    """A stop until the authority is entered, then a note that it is."""
    authority = job.recipe.owner_authority
    facts: dict[str, Fact] = {"part": part, "authority": authority}
    if _dated(authority):
        return note(
            "design-authority", "design-authority.entered", row.origin, part=part, authority=authority
        )
    level = Level.STOP if row.status.may_stop else Level.CAUTION
    key, fix = f"design-authority.{'undated' if authority else 'missing'}", "design-authority.enter"
    return Finding("design-authority", level, key, row.origin, kind, value, row.value, None, fix, facts)
