"""A run as figures that can be asked why."""

from collections.abc import Mapping

from lineplanner.program.job import Job
from lineplanner.program.panel import panel_step
from lineplanner.program.runner import Runner
from lineplanner.program.stages import Run, Stage
from lineplanner.program.story_settings import aim_figure, setting_figure
from lineplanner.program.story_volts import volt_figures
from lineplanner.quantities import (
    CHARGE,
    CURRENT,
    CURRENT_DENSITY,
    THICKNESS,
    TIME,
    VOLTAGE,
)
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

_ARITHMETIC = Source("arithmetic", Status.DERIVED)
_INTEGRAL = Source("integral of the current over the program", Status.DERIVED)
_SOLVED = Source("solved over the whole program", Status.DERIVED)
_GUM = Source(
    "JCGM 100:2008 (GUM), clause 5.1: combined by partial derivatives at the solution", Status.MEMORY
)
_FILM_VOLTS = Source("film voltage model of this program: an estimate", Status.ASSUMPTION)
_CELL_VOLTS = Source("cell voltage model of this program: an estimate", Status.ASSUMPTION)


def run_figures(
    job: Job, runner: Runner, run: Run, carrying: Figure, *, resistance: Figure
) -> dict[str, Figure]:
    """Figures of current, program, time, charge and volts by key path."""
    figures = _currents(job, run, carrying)
    set_by = figures["current.panel_set_A"] if run.panel_current is not None else figures["current.peak_A"]
    figures |= _times(job, runner, run, set_by)
    figures |= _charges(run, set_by, figures)
    figures |= volt_figures(job, run, set_by, resistance)
    for index, stage in enumerate(run.stages):
        figures |= _stage(job, index, stage, set_by, figures)
    for index, item in enumerate(run.items):
        path = f"area.items[{index}]"
        name = job.areas.items[index].name
        figures[f"{path}.current_A"] = result(
            f"{name}, current of all",
            item.current,
            CURRENT,
            "share of the set current by carrying area and alloy",
            "I_i = I A_i w_i / sum A w",
            _ARITHMETIC,
            set_by,
            carrying,
        )
        figures[f"{path}.thickness_m"] = result(
            f"{name}, thickness expected",
            item.thickness,
            THICKNESS,
            "growth over the program",
            "h = sum growth x charge - loss",
            runner.law,
            runner.law_figure,
            figures[f"{path}.current_A"],
        )
    return figures


def _currents(job: Job, run: Run, carrying: Figure) -> dict[str, Figure]:
    change = job.case.load.change
    figures: dict[str, Figure] = {}
    if run.set_current is not None:
        changed = change is not None and change.current_density is not None
        density = setting_figure(job, "current density", job.density, CURRENT_DENSITY, changed=changed)
        set_current = result(
            "set current",
            run.set_current,
            CURRENT,
            "current density x carrying area",
            "I = i A_c",
            _ARITHMETIC,
            density,
            carrying,
        )
        figures |= {"current.density_A_per_m2": density, "current.set_A": set_current}
        if run.panel_current is not None and run.rectifier is not None:
            entered = run.rectifier.panel_step is not None
            title = (
                f"panel step of {run.rectifier.name}"
                if entered
                else "1 % of the rating, to the nearest 1, 2 or 5"
            )
            step = given(
                "panel step",
                panel_step(run.rectifier),
                CURRENT,
                Source(title, Status.ENTERED if entered else Status.ASSUMPTION),
            )
            figures["current.panel_set_A"] = result(
                "panel setting",
                run.panel_current,
                CURRENT,
                "set current to the nearest panel step",
                "I_p = round(I / step) step",
                _ARITHMETIC,
                set_current,
                step,
            )
    inputs = (
        [figures["current.panel_set_A"]]
        if "current.panel_set_A" in figures
        else [carrying, *_peak_inputs(job)]
    )
    figures["current.peak_A"] = result(
        "peak current",
        run.peak_current,
        CURRENT,
        "largest current of any stage",
        "max I",
        _ARITHMETIC,
        *inputs,
    )
    return figures


def _peak_inputs(job: Job) -> list[Figure]:
    if job.recipe.peak_density is not None:
        return [
            setting_figure(
                job, "planning peak current density", job.recipe.peak_density, CURRENT_DENSITY, changed=False
            )
        ]
    row = job.process.peak_density
    return [given("planning peak current density", row.value, CURRENT_DENSITY, row.origin)]


def _times(job: Job, runner: Runner, run: Run, set_by: Figure) -> dict[str, Figure]:
    if run.total_time is None:
        return {}
    aim = aim_figure(job)
    words = "the time at which the slowest part has its aim, rounded up to the clock"
    solved = result(
        "time at set current",
        run.time_at_set,
        TIME,
        words,
        "h(t) = aim",
        _SOLVED,
        aim,
        runner.law_figure,
        set_by,
    )
    before = [given(s.stage, s.duration, TIME, _stage_source(job, s)) for s in run.stages[:-1]]
    lead_in = result(
        "lead-in stages",
        run.total_time - (run.time_at_set or 0.0),
        TIME,
        "sum of the stages before the last",
        "t_0 = sum t",
        _ARITHMETIC,
        *(before or [given("no stage before", 0.0, TIME, Source("recipe", Status.ENTERED))]),
    )
    total = result(
        "total time",
        run.total_time,
        TIME,
        "lead-in stages + time at set current",
        "t = t_0 + t_set",
        _ARITHMETIC,
        lead_in,
        solved,
    )
    return {"time.at_set_current_s": solved, "time.total_s": total}


def _charges(run: Run, set_by: Figure, figures: Mapping[str, Figure]) -> dict[str, Figure]:
    if run.forward is None or run.reverse is None:
        return {}
    inputs = [set_by, figures["time.total_s"]] if "time.total_s" in figures else [set_by]
    forward = result(
        "charge forward",
        run.forward,
        CHARGE,
        "current x time over the forward stages",
        "Q = sum I t",
        _INTEGRAL,
        *inputs,
    )
    back = result(
        "charge reverse",
        run.reverse,
        CHARGE,
        "current x time over the reverse stages",
        "Q = sum I t",
        _INTEGRAL,
        *inputs,
    )
    counter = result(
        "ampere-hour counter",
        run.counter,
        CHARGE,
        "forward + reverse",
        "Q = Q_f + Q_r",
        _ARITHMETIC,
        forward,
        back,
    )
    return {"charge_Ah.forward": forward, "charge_Ah.reverse": back, "charge_Ah.counter": counter}


def _stage(
    job: Job, index: int, stage: Stage, set_by: Figure, figures: Mapping[str, Figure]
) -> dict[str, Figure]:
    path = f"program[{index}]"
    source = _stage_source(job, stage)
    words = "share of the set current" if stage.control == "current" else "as planned for this stage"
    volts = figures.get("voltage.peak_V", set_by)
    found = {}
    for key, label, value in (
        ("from_A", "amperes from", stage.from_current),
        ("to_A", "amperes to", stage.to_current),
    ):
        found[f"{path}.{key}"] = result(
            f"{stage.stage}, {label}", value, CURRENT, words, "I = share x I_set", source, set_by
        )
    for key, label, value in (
        ("from_V", "volts from", stage.from_voltage),
        ("to_V", "volts to", stage.to_voltage),
    ):
        found[f"{path}.{key}"] = result(
            f"{stage.stage}, {label}",
            value,
            VOLTAGE,
            "voltage model at this stage, or its setting",
            "V(I, h)",
            volts.source,
            volts,
        )
    for key, label, value in (("from_s", "begins", stage.start), ("to_s", "ends", stage.end)):
        found[f"{path}.{key}"] = given(f"{stage.stage}, {label}", value, TIME, source)
    return found


def _stage_source(job: Job, stage: Stage) -> Source:
    """Who says how this stage is run."""
    recipe, name = job.recipe, f"recipe {job.recipe.name} rev {job.recipe.revision}"
    own = {
        "ramp": recipe.soft_start is not None or bool(recipe.voltages),
        "step": recipe.soft_start is not None,
        "wait": recipe.soak is not None,
        "reverse": recipe.reverse_time is not None,
        "strike": recipe.strike_time is not None,
    }
    if stage.stage in ("hold", "plate"):
        return _SOLVED
    return (
        Source(name, Status.ENTERED)
        if own.get(stage.stage)
        else Source("alloy and substrate tables", Status.PRACTICE)
    )
