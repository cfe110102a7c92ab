"""Thickness and its band as figures."""

from lineplanner.bath.uncertainty import Band
from lineplanner.program.band import Input
from lineplanner.program.job import Job
from lineplanner.program.runner import Runner
from lineplanner.program.stages import Run
from lineplanner.program.story_settings import aim_figure, setting_figure
from lineplanner.quantities import (
    RATIO,
    THICKNESS,
    Thickness,
)
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, result

_ARITHMETIC = Source("arithmetic", Status.DERIVED)
_GUM = Source(
    "JCGM 100:2008 (GUM), clause 5.1: combined by partial derivatives at the solution", Status.MEMORY
)
_FILM_VOLTS = Source("film voltage model of this program: an estimate", Status.ASSUMPTION)
_CELL_VOLTS = Source("cell voltage model of this program: an estimate", Status.ASSUMPTION)


def thickness_figures(
    job: Job,
    runner: Runner,
    run: Run,
    inputs: tuple[Input, ...],
    band: Band,
    *,
    low: Thickness,
    high: Thickness,
) -> dict[str, Figure]:
    """Figures of aim, window, expected thickness and its band."""
    aim = aim_figure(job)
    figures = {"thickness.target_m": aim, **_window(job)}
    if run.thickness is None:
        return figures
    words, formula = "of the slowest part, at the rounded time", "h = sum growth x charge - loss"
    expected = result(
        "thickness expected", run.thickness, THICKNESS, words, formula, runner.law, runner.law_figure, aim
    )
    half = _half_width(band, inputs)
    figures["thickness.expected_m"] = expected
    figures["thickness.low_m"] = _end("low", low, "of the slowest part, less the half-width", expected, half)
    figures["thickness.high_m"] = _end(
        "high", high, "of the fastest part, plus the half-width", expected, half
    )
    return figures


def _window(job: Job) -> dict[str, Figure]:
    """Minimum and maximum, where the recipe has them."""
    ends = (("minimum", job.aims.minimum), ("maximum", job.aims.maximum))
    return {
        f"thickness.{name}_m": setting_figure(job, name, value, THICKNESS, changed=False)
        for name, value in ends
        if value is not None
    }


def _end(name: str, value: Thickness, words: str, expected: Figure, half: Figure) -> Figure:
    """One end of the band."""
    sign = "-" if name == "low" else "+"
    label = f"thickness, {name} end of the band"
    return result(label, value, THICKNESS, words, f"h (1 {sign} U)", _ARITHMETIC, expected, half)


def _half_width(band: Band, inputs: tuple[Input, ...]) -> Figure:
    """The relative half-width with all that it is made of."""
    words, formula = "root of the sum of squares", "U = sqrt(sum (s u)^2)"
    return result("95 % half-width", band.total, RATIO, words, formula, _GUM, *_band_inputs(inputs))


def _band_inputs(inputs: tuple[Input, ...]) -> list[Figure]:
    return [
        result(
            f"{i.name}, {'within' if i.within else 'between'} loads",
            i.half_width * i.sensitivity,
            RATIO,
            "half-width x sensitivity",
            "s u",
            i.figure.source,
            i.figure,
        )
        for i in inputs
    ]
