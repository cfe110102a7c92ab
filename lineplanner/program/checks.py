"""What recipe and load say about a run, whatever the process."""

from collections.abc import Iterable, Iterator

from lineplanner.errors import Fact, Quantity
from lineplanner.findings import Finding, Level, note, upper
from lineplanner.inputs.change import Deviation
from lineplanner.load import Item
from lineplanner.program.aims import Aims
from lineplanner.program.job import Job
from lineplanner.program.stages import Run
from lineplanner.quantities import (
    AREA,
    CURRENT_DENSITY,
    RATIO,
    TEMPERATURE,
    THICKNESS,
    TIME,
    VOLTAGE,
    Thickness,
)
from lineplanner.sources import Source, Status

PANEL_NOTE = 0.05  # relative difference from the recipe's current that is said (design rule of this program)
LEAST_OF_AIM = (
    0.9  # part of the aim below which a run held by its volts is stopped (design rule of this program)
)
_DUST = 1.0 - 1e-9  # a density that differs from its bound by float dust is inside
_RECIPE = Source("recipe", Status.ENTERED)


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
    """Each item against its drawing, the level and the recipe; parts merely counted; the bath's temperature."""
    for item in job.areas.items:
        yield from _stated(job, item)
        yield from _level(item)
        yield from _base(job, item)
    if job.areas.counted_only:
        yield note("places", "places.counted", _RECIPE, "places.hang")
    yield from _bath_temperature(job)


def _stated(job: Job, item: Item) -> Iterator[Finding]:
    """A stated area against the drawn one."""
    if item.stated_area is None:
        return
    limit = job.tables.limits.area_difference
    yield upper(
        "area-stated",
        value=abs(item.stated_area / item.drawn - 1.0),
        limit=limit.value,
        kind=RATIO,
        source=limit.origin,
        key="area-stated",
        fix="area-stated.measure",
        demand_firm=False,
        part=item.name,
        stated=Quantity(item.stated_area, AREA),
        drawn=Quantity(item.drawn, AREA),
    )


def _level(item: Item) -> Iterator[Finding]:
    """Parts that the level leaves dry or cuts, and parts of which nothing promised is coated."""
    if item.dry:
        dry: dict[str, Fact] = {"part": item.name, "count": item.dry}
        yield Finding("level", Level.CAUTION, "level.dry", _RECIPE, fix="level.raise", facts=dry)
    if item.cut:
        cut: dict[str, Fact] = {"part": item.name, "count": item.cut}
        yield Finding("level", Level.NOTE, "level.cut", _RECIPE, fix="level.mark", facts=cut)
    if item.significant <= 0.0 < item.carrying:
        part: dict[str, Fact] = {"part": item.name}
        yield Finding(
            "significant", Level.CAUTION, "significant.none", _RECIPE, fix="significant.faces", facts=part
        )


def _base(job: Job, item: Item) -> Iterator[Finding]:
    """An alloy or substrate that the recipe does not name."""
    base = item.material.substrate if job.process.name == "chrome-hard" else item.material.family
    if base in job.recipe.bases:
        return
    facts: dict[str, Fact] = {"part": item.name, "base": str(base), "bases": ", ".join(job.recipe.bases)}
    yield Finding("recipe-base", Level.STOP, "recipe-base", _RECIPE, fix="recipe-base.choose", facts=facts)


def _bath_temperature(job: Job) -> Iterator[Finding]:
    """The bath as entered against the recipe; what the load changes on purpose is a deviation, not said twice."""
    temperature, change = job.recipe.temperature, job.case.load.change
    own = change is None or change.temperature is None
    if not own or temperature is None or temperature.holds(job.bath.temperature):
        return
    facts: dict[str, Fact] = {
        "bath": Quantity(job.bath.temperature, TEMPERATURE),
        "recipe": Quantity(temperature.value, TEMPERATURE),
    }
    key, fix = "bath-temperature", "bath-temperature.bring"
    yield Finding("bath-temperature", Level.CAUTION, key, _RECIPE, fix=fix, facts=facts)


def check_aim(run: Run, aims: Aims, law: Source) -> Iterator[Finding]:
    """A stop where the aim or what must be there is out of reach; a caution where the volts make it short or late."""
    aim = aims.aim
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
            Level.STOP if run.thickness < _least(aims) * (1.0 - 1e-9) else Level.CAUTION,
            _limit_key(run, short=short),
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


def _limit_key(run: Run, *, short: bool) -> str:
    if short:
        return "voltage-limit.short"
    return "voltage-limit.reached" if run.stages[-1].control == "voltage" else "voltage-limit.passed"


def _least(aims: Aims) -> Thickness:
    """What must be there at the least: the recipe's minimum, or most of the aim."""
    return aims.minimum if aims.minimum is not None else LEAST_OF_AIM * aims.aim


def check_panel(job: Job, run: Run) -> Iterator[Finding]:
    """Current density that the panel's step leaves, against the recipe's: a caution outside its range."""
    setting = job.recipe.current_density
    if run.panel_current is None or run.set_current is None or setting is None or run.rectifier is None:
        return
    density = run.panel_current / job.areas.carrying
    low, high = setting.low, setting.high
    outside = (low is not None and density < low * _DUST) or (high is not None and density > high / _DUST)
    changed = low is not None and high is not None and not low <= setting.value <= high
    apart = abs(run.panel_current / run.set_current - 1.0)
    facts: dict[str, Fact] = {
        "density": Quantity(density, CURRENT_DENSITY),
        "recipe": Quantity(setting.value, CURRENT_DENSITY),
        "rectifier": run.rectifier.name,
    }
    source = Source(f"panel step of {run.rectifier.name}", Status.ENTERED)
    if outside and not changed:
        yield Finding("panel", Level.CAUTION, "panel.outside", source, fix="panel.finer", facts=facts)
    elif apart > PANEL_NOTE:
        yield Finding("panel", Level.NOTE, "panel.apart", source, fix="panel.finer", facts=facts)
