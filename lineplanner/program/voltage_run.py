"""Films run by voltage: stages of volts, current planned from a peak, thickness from the charge."""

from collections.abc import Sequence

from lineplanner.inputs.line import Rectifier
from lineplanner.program.anodizing import ANODIC, Films, grown, rate_of
from lineplanner.program.job import HALF_MINUTE, Job
from lineplanner.program.panel import rounded_up
from lineplanner.program.stages import ItemRun, Run, Stage, unreachable
from lineplanner.quantities import Charge, Current, CurrentDensity, Thickness, Time


def densities(job: Job) -> tuple[CurrentDensity, CurrentDensity]:
    """Planning peak and mean current density in the hold: of the recipe, else of the process table."""
    peak, mean = job.recipe.peak_density, job.recipe.mean_density
    return (
        peak if peak is not None else job.process.peak_density.value,
        mean if mean is not None else job.process.mean_density.value,
    )


def run_by_voltage(job: Job, rectifier: Rectifier, films: Films) -> Run:
    """Run a voltage program: the last hold is as long as the aim needs, unless the recipe fixes it.

    Current rises to the planning peak at the end of each ramp and holds its mean after it: an estimate.
    """
    peak, mean = (d * job.areas.carrying for d in densities(job))
    stages: list[Stage] = []
    time = volts = current = 0.0
    for index, stage in enumerate(job.recipe.voltages):
        if stage.ramp > 0.0:
            stages.append(
                _stage("ramp", time, time + stage.ramp, (current, peak), (volts, stage.to.value), job)
            )
            time += stage.ramp
        volts, current = stage.to.value, mean
        hold = stage.hold
        if hold is None:
            hold = last_hold(films, stages, time, mean, job.aims.aim)
            if hold is None:
                return unreachable(
                    rectifier=rectifier,
                    set_current=None,
                    peak_current=peak,
                    reachable=0.0,
                    voltage_limit=None,
                )
        if hold > 0.0 or index == len(job.recipe.voltages) - 1:
            stages.append(_stage("hold", time, time + hold, (mean, mean), (volts, volts), job))
            time += hold
    return _finish(rectifier, films, tuple(stages), peak, time)


def last_hold(
    films: Films, stages: Sequence[Stage], time: Time, mean: Current, aim: Thickness
) -> Time | None:
    """How long the last voltage is held until the slowest item has its aim.

        h = f K (j / I)(Q + I t) - v (t_0 + t)  solved for t, t_0 + t rounded up to half minutes

    Parameters
        films: f, K, v and the shared area of the items
        stages: those before, with their charge Q
        time: t_0, their end [s]
        mean: I, mean current in the hold [A]
        aim: h, total per side [m]
    Returns
        t; None where no time gets there [s]
    Valid
        a steady mean current: an estimate
    Source
        bath.growth.film_thickness, solved for time
    Example
        >>> last_hold(Films(items=(), weighted_area=1.0), (), 0.0, 100.0, 2e-6) is None
        True
    """
    charge = sum(s.charge for s in stages)
    holds = []
    for _, film in films.items:
        density = films.density(film, mean)
        rate = rate_of(film, density)
        if rate <= 0.0:
            return None
        so_far = (rate + film.dissolution) * charge / mean - film.dissolution * time
        holds.append(max(0.0, (aim - so_far) / rate))
    return rounded_up(time + max(holds), HALF_MINUTE) - time if holds else None


def _finish(rectifier: Rectifier, films: Films, stages: tuple[Stage, ...], peak: Current, total: Time) -> Run:
    charge: Charge = sum(s.charge for s in stages)
    items = tuple(
        ItemRun(
            part=item.part,
            current=films.density(film, peak) * item.carrying,
            density=films.density(film, peak),
            thickness=grown(film, density=films.density(film, peak), equivalent=charge / peak, time=total),
        )
        for item, film in films.items
    )
    return Run(
        rectifier=rectifier,
        stages=stages,
        set_current=None,
        panel_current=None,
        peak_current=peak,
        total_time=total,
        time_at_set=stages[-1].duration,
        forward=charge,
        reverse=0.0,
        thickness=min(i.thickness for i in items),
        reachable=None,
        items=items,
        start_voltage=stages[0].to_voltage,
        end_voltage=stages[-1].to_voltage,
        peak_voltage=max(s.to_voltage for s in stages),
        voltage_limit=rectifier.most_voltage,
        limit_reached=None,
        stretch=0.0,
    )


def _stage(
    name: str, start: Time, end: Time, currents: tuple[Current, Current], volts: tuple[float, float], job: Job
) -> Stage:
    return Stage(
        stage=name,  # type: ignore[arg-type]
        control="voltage",
        polarity=ANODIC,
        start=start,
        end=end,
        from_current=currents[0],
        to_current=currents[1],
        from_voltage=volts[0],
        to_voltage=volts[1],
        density=currents[1] / job.areas.carrying,
    )
