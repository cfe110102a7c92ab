"""What recipe, alloy and substrate say about a run, apart from the line's capacity."""

from collections.abc import Iterable, Iterator

from lineplanner.bath.efficiency import at_cap, bright_window_high, bright_window_low, outside_range
from lineplanner.bath.growth import soft_share
from lineplanner.errors import Fact, Quantity
from lineplanner.findings import Finding, Level, lower, note, upper
from lineplanner.inputs.change import Deviation
from lineplanner.program.anodizing import Films, films_of, grown
from lineplanner.program.chrome import start_of, substrate_of
from lineplanner.program.deposition import Deposition
from lineplanner.program.job import Job
from lineplanner.program.stages import Run
from lineplanner.quantities import AREA, CURRENT_DENSITY, RATIO, STRESS, TEMPERATURE, THICKNESS, TIME, VOLTAGE
from lineplanner.sources import Source, Status

_RECIPE = Source("recipe", Status.ENTERED)
_MIXING = Source(
    "an aluminium finishing association's reference guide: do not run 2xxx with other alloys",
    Status.PUBLISHED,
)
_PRESET = Source("substrates table", Status.PRACTICE)
_BRIGHT = Source(
    "Modern Electroplating, chromium chapter: bright range at 40 and 45 degC, extrapolated", Status.ASSUMPTION
)


def check_deviations(changed: Iterable[Deviation]) -> Iterator[Finding]:
    """A caution for each setting that the load runs outside the range of its recipe."""
    for one in changed:
        if not one.inside_range:
            facts: dict[str, Fact] = {"setting": one.label, "here": Quantity(one.load, one.kind)}
            if one.recipe is not None:
                facts["filed"] = Quantity(one.recipe, one.kind)
            key = "deviation.outside" if one.recipe is not None else "deviation.unnamed"
            yield Finding("deviation", Level.CAUTION, key, _RECIPE, fix="deviation.owner", facts=facts)


def check_load(job: Job) -> Iterator[Finding]:
    """Areas against what was stated, parts left dry, parts merely counted, bases the recipe is not for."""
    limits = job.tables.limits
    for item in job.areas.items:
        if item.stated_area is not None:
            apart = abs(item.stated_area / item.drawn - 1.0)
            finding = upper(
                "area-stated",
                value=apart,
                limit=limits.area_difference.value,
                kind=RATIO,
                source=limits.area_difference.origin,
                key="area-stated",
                fix="area-stated.measure",
                demand_firm=False,
                part=item.name,
                stated=Quantity(item.stated_area, AREA),
                drawn=Quantity(item.drawn, AREA),
            )
            yield finding
        if item.dry:
            yield Finding(
                "level",
                Level.CAUTION,
                "level.dry",
                _RECIPE,
                fix="level.raise",
                facts={"part": item.name, "count": item.dry},
            )
        base = item.material.family if job.process.name != "chrome-hard" else item.material.substrate
        if base not in job.recipe.bases:
            facts = {"part": item.name, "base": str(base), "bases": ", ".join(job.recipe.bases)}
            yield Finding(
                "recipe-base", Level.CAUTION, "recipe-base", _RECIPE, fix="recipe-base.choose", facts=facts
            )
    if job.areas.counted_only:
        yield note("places", "places.counted", _RECIPE, "places.hang")
    temperature = job.recipe.temperature
    if temperature is not None and not temperature.holds(job.bath.temperature):
        degrees = {
            "bath": Quantity(job.bath.temperature, TEMPERATURE),
            "recipe": Quantity(temperature.value, TEMPERATURE),
        }
        yield Finding(
            "bath-temperature",
            Level.CAUTION,
            "bath-temperature",
            _RECIPE,
            fix="bath-temperature.bring",
            facts=degrees,
        )


def check_aim(run: Run, aim: float, law: Source) -> Iterator[Finding]:
    """A stop where no time reaches the aim; a caution where the voltage limit leaves it short or late."""
    if run.total_time is None:
        reachable = run.reachable or 0.0
        margin = reachable / aim - 1.0
        yield Finding(
            "aim", Level.STOP, "aim.unreachable", law, THICKNESS, reachable, aim, margin, "aim.more-current"
        )
        return
    assert run.thickness is not None
    if run.limit_reached is not None and run.voltage_limit is not None:
        short = run.thickness < aim * (1.0 - 1e-9)
        yield Finding(
            "voltage-limit",
            Level.CAUTION,
            "voltage-limit.short" if short else "voltage-limit.reached",
            Source("film voltage model of this program", Status.ASSUMPTION),
            VOLTAGE,
            run.voltage_limit,
            run.voltage_limit,
            run.thickness / aim - 1.0 if short else 0.0,
            "voltage-limit.lower",
            {
                "time": Quantity(run.limit_reached, TIME),
                "stretch": Quantity(run.stretch, RATIO),
                "thickness": Quantity(run.thickness, THICKNESS),
                "limit": Quantity(run.voltage_limit, VOLTAGE),
            },
        )


def check_anodizing(job: Job, run: Run, films: Films) -> Iterator[Finding]:
    """Current density against each alloy's usual limit, mixing, ceilings, soft film, the other law."""
    groups = {film.family.mix for _, film in films.items}
    if len(groups) > 1:
        facts = {"families": ", ".join(sorted({film.family.name for _, film in films.items}))}
        yield Finding(
            "mixed-alloys", Level.CAUTION, "mixed-alloys", _MIXING, fix="mixed-alloys.part", facts=facts
        )
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
                caution_at=1.0,
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
            caution_at=1.0,
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
                caution_at=1.0,
                family=family.name,
            )
    if job.bath.kind == "sulfuric":
        yield from _other_law(job, run, films)


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


def check_chrome(job: Job, run: Run, deposition: Deposition) -> Iterator[Finding]:
    """Plating current density against the bright window and the bath family's range; presets; strong steel."""
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
    reverse = any(s > 0.0 for s in [start_of(job).reverse_time])
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
    """Steel that only the design owner may release; steel of unknown strength is said to be so."""
    limit = job.tables.limits.strong_steel
    for item in job.areas.items:
        material = item.material
        if material.metal != "steel":
            continue
        strength = material.tensile_strength
        if strength is None and material.hardness is None:
            yield note(
                "steel-strength",
                "steel-strength.unknown",
                limit.origin,
                "steel-strength.enter",
                part=item.name,
            )
        elif (strength or 0.0) >= limit.value or (material.hardness or 0.0) >= STRONG_HARDNESS:
            level = Level.NOTE if job.recipe.owner_authority else Level.STOP
            facts = {"part": item.name, "authority": job.recipe.owner_authority}
            yield Finding(
                "design-authority",
                level,
                "design-authority.entered" if level is Level.NOTE else "design-authority.missing",
                limit.origin,
                STRESS,
                strength,
                limit.value,
                None if strength is None else 1.0 - strength / limit.value,
                None if level is Level.NOTE else "design-authority.enter",
                facts,
            )


STRONG_HARDNESS = 48.0  # HRC; AMS 2460, scope (read)
