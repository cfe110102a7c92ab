"""The volts of a run as figures."""

from lineplanner.program.job import Job
from lineplanner.program.stages import Run
from lineplanner.program.story_settings import setting_figure
from lineplanner.quantities import (
    CONDUCTIVITY,
    LENGTH,
    TEMPERATURE,
    TIME,
    VOLTAGE,
)
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

_ARITHMETIC = Source("arithmetic", Status.DERIVED)
_GUM = Source(
    "JCGM 100:2008 (GUM), clause 5.1: combined by partial derivatives at the solution", Status.MEMORY
)
_FILM_VOLTS = Source("film voltage model of this program: an estimate", Status.ASSUMPTION)
_CELL_VOLTS = Source("cell voltage model of this program: an estimate", Status.ASSUMPTION)


def volt_figures(job: Job, run: Run, set_by: Figure, resistance: Figure) -> dict[str, Figure]:
    """Volts and their limit by key path."""
    figures: dict[str, Figure] = {}
    if run.voltage_limit is not None and run.rectifier is not None:
        entered = run.rectifier.voltage_limit is not None
        title = (
            f"voltage limit set on {run.rectifier.name}"
            if entered
            else f"rated voltage of {run.rectifier.name}"
        )
        figures["voltage.limit_V"] = given(
            "voltage limit", run.voltage_limit, VOLTAGE, Source(title, Status.ENTERED)
        )
    if run.set_current is None:
        setting = [
            setting_figure(job, "voltage stage", s.to.value, VOLTAGE, changed=_last_changed(job, i))
            for i, s in enumerate(job.recipe.voltages)
        ]
        words, formula, source = "the recipe's voltage program", "V set", Source("recipe", Status.ENTERED)
    else:
        setting = [set_by, *_volt_inputs(job), resistance]
        words, formula = "film or electrodes + bath + circuit", "V = V_film + j d / kappa + R I"
        source = _CELL_VOLTS if job.process.name == "chrome-hard" else _FILM_VOLTS
    for key, label, value in (
        ("start_V", "volts at the start", run.start_voltage),
        ("end_V", "volts at the end", run.end_voltage),
        ("peak_V", "volts at the peak", run.peak_voltage),
    ):
        if value is not None:
            figures[f"voltage.{key}"] = result(label, value, VOLTAGE, words, formula, source, *setting)
    if run.limit_reached is not None:
        figures["voltage.limit_reached_s"] = result(
            "voltage limit reached",
            run.limit_reached,
            TIME,
            "when volts meet the limit",
            "V(t) = limit",
            source,
            *setting,
        )
    return figures


def _last_changed(job: Job, index: int) -> bool:
    change = job.case.load.change
    return change is not None and change.hold_voltage is not None and index == len(job.recipe.voltages) - 1


def _volt_inputs(job: Job) -> list[Figure]:
    tank = Source(f"tank {job.case.tank.name} of the line file", Status.ENTERED)
    table = next(
        (
            t
            for t in job.tables.conductivity
            if t.acid == ("chromic" if job.bath.chromic_acid else "sulfuric")
        ),
        None,
    )
    kappa_source = Source(table.source, table.status) if table is not None else _FILM_VOLTS
    inputs = [
        given("work to counter-electrode", job.gap, LENGTH, tank),
        given("bath conductivity", job.conductivity, CONDUCTIVITY, kappa_source),
        given(
            "bath temperature",
            job.bath.temperature,
            TEMPERATURE,
            Source(f"bath {job.bath.name}", Status.ENTERED),
        ),
    ]
    if job.process.name == "chrome-hard":
        row = job.tables.cell.base
        return [*inputs, given("electrode volts at the reference density", row.value, VOLTAGE, row.origin)]
    row = job.tables.growth.film_voltage
    return [*inputs, given("film volts at the reference density", row.value, VOLTAGE, row.origin)]
