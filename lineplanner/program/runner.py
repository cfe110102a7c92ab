"""One face for the three kinds of program: current-controlled anodizing, voltage-run films, hard chrome."""

from collections.abc import Iterable
from dataclasses import dataclass
from typing import Protocol

from lineplanner.findings import Finding
from lineplanner.inputs.line import Rectifier
from lineplanner.inputs.shares import PositionShares
from lineplanner.program.anodizing import Films, films_of, hold_for, rate_of
from lineplanner.program.band import Input, forward_anodizing, forward_chrome, uncertain_inputs
from lineplanner.program.checks_anodizing import check_anodizing
from lineplanner.program.checks_chrome import check_chrome
from lineplanner.program.chrome import run_chrome
from lineplanner.program.controlled import run_anodizing
from lineplanner.program.deposition import Deposition, deposition_of
from lineplanner.program.growth import FilmLaw
from lineplanner.program.job import HALF_MINUTE, MINUTE, Job
from lineplanner.program.softstart import soft_start_of
from lineplanner.program.stages import Run
from lineplanner.program.voltage_run import last_hold, run_by_voltage
from lineplanner.quantities import CurrentDensity, Rate, Ratio, Thickness, Time
from lineplanner.sources import Source
from lineplanner.trace import Figure


class Runner(Protocol):
    """What the plan asks of a program, whatever the process."""

    @property
    def control(self) -> str: ...
    @property
    def clock(self) -> Time: ...
    @property
    def law(self) -> Source: ...
    @property
    def law_figure(self) -> Figure: ...
    def run(self, rectifier: Rectifier) -> Run: ...
    def checks(self, run: Run) -> Iterable[Finding]: ...
    def inputs(self, run: Run, shares: PositionShares | None) -> tuple[Input, ...]: ...
    def time_for(self, run: Run, thickness: Thickness) -> Time | None: ...
    def efficiency(self, density: CurrentDensity) -> Ratio | None: ...
    def rate(self, run: Run) -> Rate: ...
    @property
    def film_share(self) -> Ratio: ...


@dataclass(frozen=True, slots=True, kw_only=True)
class Anodizing:
    """Anodizing, by current or by voltage."""

    job: Job
    films: Films
    by_voltage: bool

    @property
    def control(self) -> str:
        return "voltage" if self.by_voltage else "current"

    @property
    def clock(self) -> Time:
        return HALF_MINUTE

    @property
    def law(self) -> Source:
        return self._first.figure.source

    @property
    def law_figure(self) -> Figure:
        return self._first.figure

    @property
    def _first(self) -> FilmLaw:
        return self.films.items[0][1]

    @property
    def film_share(self) -> Ratio:
        """The smallest alloy factor: what copper-rich alloys do not grow they lose to oxygen."""
        return min(min(1.0, film.alloy_factor) for _, film in self.films.items)

    def run(self, rectifier: Rectifier) -> Run:
        run = run_by_voltage if self.by_voltage else run_anodizing
        return run(self.job, rectifier, self.films)

    def checks(self, run: Run) -> Iterable[Finding]:
        return check_anodizing(self.job, run, self.films)

    def inputs(self, run: Run, shares: PositionShares | None) -> tuple[Input, ...]:
        film = self._slowest(run)
        forward = forward_anodizing(self.job, run, self.films, film)
        return uncertain_inputs(self.job, run, forward, calibrated=film.calibrated, shares=shares)

    def _slowest(self, run: Run) -> FilmLaw:
        return min(zip(run.items, self.films.items, strict=True), key=lambda pair: pair[0].thickness)[1][1]

    def time_for(self, run: Run, thickness: Thickness) -> Time | None:
        if self.by_voltage and run.stages:
            last = run.stages[-1]
            hold = last_hold(self.films, run.stages[:-1], last.start, last.from_current, thickness)
            return None if hold is None else last.start + hold
        if run.panel_current is None:
            return None
        start = soft_start_of(self.job.recipe, tuple(f.family for _, f in self.films.items), self.job.density)
        film = self._slowest(run)
        hold = hold_for(film, thickness, density=self.films.density(film, run.panel_current), start=start)
        return None if hold is None else start.duration + hold

    def rate(self, run: Run) -> Rate:
        """Growth of the slowest part at the last stage's current."""
        film = self._slowest(run)
        return rate_of(film, self.films.density(film, run.stages[-1].to_current))

    def efficiency(self, density: CurrentDensity) -> Ratio | None:  # noqa: ARG002 - anodizing has none
        return None


@dataclass(frozen=True, slots=True, kw_only=True)
class Chrome:
    """Hard chrome."""

    job: Job
    deposition: Deposition

    @property
    def control(self) -> str:
        return "current"

    @property
    def clock(self) -> Time:
        return MINUTE

    @property
    def law(self) -> Source:
        return self.deposition.family.reference_efficiency.origin

    @property
    def law_figure(self) -> Figure:
        return self.deposition.story(self.job.density)

    @property
    def film_share(self) -> Ratio:
        return 0.0

    def run(self, rectifier: Rectifier) -> Run:
        return run_chrome(self.job, rectifier, self.deposition)

    def checks(self, run: Run) -> Iterable[Finding]:
        return check_chrome(self.job, run, self.deposition)

    def inputs(self, run: Run, shares: PositionShares | None) -> tuple[Input, ...]:
        forward = forward_chrome(self.job, run, self.deposition)
        return uncertain_inputs(self.job, run, forward, calibrated=self.deposition.calibrated, shares=shares)

    def time_for(self, run: Run, thickness: Thickness) -> Time | None:
        if run.panel_current is None or run.thickness is None or run.total_time is None:
            return None
        rate = self.deposition.rate(run.panel_current / self.job.areas.carrying)
        return run.total_time + (thickness - run.thickness) / rate if rate > 0.0 else None

    def rate(self, run: Run) -> Rate:
        """Deposit at the plating current."""
        return self.deposition.rate(run.stages[-1].density)

    def efficiency(self, density: CurrentDensity) -> Ratio | None:
        return self.deposition.efficiency(density)


def runner_of(job: Job) -> Runner:
    """The program of a process: hard chrome, a voltage program, or anodizing by current."""
    if job.process.name == "chrome-hard":
        return Chrome(job=job, deposition=deposition_of(job.bath, job.tables.chrome))
    return Anodizing(job=job, films=films_of(job), by_voltage=bool(job.recipe.voltages))
