"""The 95 % band of a thickness, after the GUM: inputs, sensitivities, between and within loads."""

from collections.abc import Callable
from dataclasses import dataclass

from lineplanner.bath.uncertainty import Band, band, sensitivity
from lineplanner.inputs.line import Rectifier
from lineplanner.inputs.shares import PositionShares
from lineplanner.program.anodizing import Films
from lineplanner.program.deposition import Deposition
from lineplanner.program.growth import FilmLaw
from lineplanner.program.job import Job
from lineplanner.program.stages import Run
from lineplanner.quantities import RATIO, TEMPERATURE_DIFFERENCE, Ratio, TemperatureDifference, Thickness
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given

_STEP = 1e-4  # relative step of the central differences


@dataclass(frozen=True, slots=True, kw_only=True)
class Input:
    """One uncertain input: relative 95 % half-width, the sensitivity of the thickness to it, and its source."""

    name: str
    half_width: Ratio
    sensitivity: Ratio
    within: bool
    figure: Figure


@dataclass(frozen=True, slots=True, kw_only=True)
class Conditions:
    """What may differ from what the panel and the drawing say: factors, and kelvin on the bath."""

    density: Ratio = 1.0
    growth: Ratio = 1.0
    warmer: TemperatureDifference = 0.0


Forward = Callable[[Conditions], Thickness]


def uncertain_inputs(
    job: Job, run: Run, forward: Forward, *, calibrated: bool, shares: PositionShares | None
) -> tuple[Input, ...]:
    """The inputs of the band with their sensitivities at the solution."""
    table = job.tables.uncertainty
    chrome = job.process.name == "chrome-hard"
    to_density = sensitivity(lambda x: forward(Conditions(density=x)), 1.0, _STEP)
    position = _position(job, shares)
    if run.set_current is None:
        voltage = table.voltage_run
        origin = given("run by voltage", voltage.value, RATIO, voltage.origin)
        return (
            Input(
                name="run by voltage", half_width=voltage.value, sensitivity=1.0, within=False, figure=origin
            ),
            position,
        )
    growth_row = (
        (table.efficiency_coupon if calibrated else table.efficiency)
        if chrome
        else (table.film_yield_coupon if calibrated else table.film_yield)
    )
    to_growth = sensitivity(lambda x: forward(Conditions(growth=x)), 1.0, _STEP)
    return (
        _area(job, to_density),
        _ammeter(run, table.ammeter.value, table.ammeter.origin, to_density),
        Input(
            name="current efficiency" if chrome else "retained yield",
            half_width=growth_row.value,
            sensitivity=to_growth,
            within=False,
            figure=given("growth", growth_row.value, RATIO, growth_row.origin),
        ),
        _temperature(table.temperature.value, table.temperature.origin, forward),
        position,
    )


def _area(job: Job, slope: Ratio) -> Input:
    """Drawn and stated areas by their shares of the load; parts drawn alike err alike, so they add linearly."""
    table, stated = job.tables.uncertainty, job.areas.stated_share
    value = (1.0 - stated) * table.drawn_area.value + stated * table.stated_area.value
    row = table.stated_area if stated > 0.5 else table.drawn_area
    return Input(
        name="area",
        half_width=value,
        sensitivity=slope,
        within=False,
        figure=given("area", value, RATIO, row.origin),
    )


def _ammeter(run: Run, share: Ratio, origin: Source, slope: Ratio) -> Input:
    """The ammeter errs by a share of full scale, so a low reading errs more."""
    rectifier: Rectifier | None = run.rectifier
    if rectifier is None or not run.panel_current:
        half = 0.0
    else:
        if rectifier.ammeter is not None:
            share, origin = rectifier.ammeter, Source(f"nameplate of {rectifier.name}", Status.ENTERED)
        half = share * rectifier.max_current / run.panel_current
    return Input(
        name="ammeter",
        half_width=half,
        sensitivity=slope,
        within=False,
        figure=given("ammeter", half, RATIO, origin),
    )


def _temperature(half: TemperatureDifference, origin: Source, forward: Forward) -> Input:
    """A bath that is warmer or colder than entered, as a relative effect on the thickness."""
    base = forward(Conditions())
    change = 0.5 * abs(forward(Conditions(warmer=half)) - forward(Conditions(warmer=-half)))
    effect = change / base if base > 0.0 else 0.0
    figure = given("bath temperature", half, TEMPERATURE_DIFFERENCE, origin)
    return Input(name="bath temperature", half_width=effect, sensitivity=1.0, within=False, figure=figure)


def _position(job: Job, shares: PositionShares | None) -> Input:
    row = job.process.position_band
    half, origin = row.value, row.origin
    if shares is not None:
        half, origin = max(shares.mean - shares.low, shares.high - shares.mean) / shares.mean, shares.source
    return Input(
        name="position",
        half_width=half,
        sensitivity=1.0,
        within=True,
        figure=given("position", half, RATIO, origin),
    )


def band_of(inputs: tuple[Input, ...]) -> Band:
    """The inputs combined, those between loads and those within one kept apart."""
    return band(
        between={i.name: i.half_width * i.sensitivity for i in inputs if not i.within},
        within={i.name: i.half_width * i.sensitivity for i in inputs if i.within},
    )


def forward_anodizing(job: Job, run: Run, films: Films, film: FilmLaw) -> Forward:
    """Film of one item as a function of what may differ: the run's charge and time are kept."""
    assert run.forward is not None
    assert run.total_time is not None
    charge, time = films.density(film, run.forward), run.total_time
    doubling = job.tables.growth.doubling.value

    def thickness(there: Conditions) -> Thickness:
        gross = film.alloy_factor * film.growth * there.growth * charge * there.density
        loss: Thickness = film.dissolution * 2.0 ** (there.warmer / doubling) * time
        return gross - loss

    return thickness


def forward_chrome(job: Job, run: Run, deposition: Deposition) -> Forward:
    """Deposit as a function of what may differ: the run's stages are kept."""
    area = job.areas.carrying
    stages = [s for s in run.stages if s.polarity == "work cathodic"]

    def thickness(there: Conditions) -> Thickness:
        at = Deposition(
            family=deposition.family,
            temperature=deposition.temperature + there.warmer,
            chromic_acid=deposition.chromic_acid,
            calibration=deposition.calibration,
            calibrated=deposition.calibrated,
        )
        scale = there.density / area
        return there.growth * sum(
            at.over_ramp(s.from_current * scale, s.to_current * scale, s.duration) for s in stages
        )

    return thickness
