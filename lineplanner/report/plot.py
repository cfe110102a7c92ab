"""The program over time as curves, and what they say at one time."""

from collections.abc import Callable, Iterable
from dataclasses import dataclass

from lineplanner.inputs.memo import Memo
from lineplanner.plan import Plan
from lineplanner.program.anodizing import grown
from lineplanner.program.recipe_for import job_of, process_of
from lineplanner.program.runner import Anodizing, Chrome, Runner, runner_of
from lineplanner.program.stages import Run, Stage
from lineplanner.quantities import THICKNESS, Charge, Current, Ratio, Thickness, Time, Voltage
from lineplanner.report.digits import CHROME, amperes, charge, hours, moment, volts
from lineplanner.report.setpoints import rectifier_of
from lineplanner.report.style import Style
from lineplanner.report.watch import moments
from lineplanner.report.words.names import work

NOTHING = "nothing to plot: a stop forbids this plan"
Point = tuple[Ratio, Ratio]

_STRETCHES = 24  # straight pieces that a stage of a curved line is drawn with
_TICKS = (0.0, 0.25, 0.5, 0.75, 1.0)
_NEAR = 1.5  # a limit this many times the peak still has room on the axis

_COURSES: Memo[Plan, "Course"] = Memo(4)


@dataclass(frozen=True, slots=True, kw_only=True)
class Series:
    """One curve: points are (share of the time, share of the axis); limit is a share of the axis, None if off it."""

    name: str
    unit: str
    points: tuple[Point, ...]
    top: str
    bottom: str
    limit: Ratio | None = None
    limit_text: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Mark:
    """A moment to look at the panel, as the card numbers them."""

    at: Ratio
    number: str
    name: str


@dataclass(frozen=True, slots=True, kw_only=True)
class Plot:
    """Curves over one time axis; without series, why says why not."""

    series: tuple[Series, ...] = ()
    marks: tuple[Mark, ...] = ()
    times: tuple[tuple[Ratio, str], ...] = ()
    clock: str = ""
    why: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class Reading:
    """What all curves say at one time."""

    time: str
    stage: str
    current: str
    voltage: str
    thickness: str
    counter: str
    work: str

    @property
    def line(self) -> str:
        """All of it on one line."""
        parts = (self.time, self.stage, self.current, self.voltage, self.thickness, self.counter, self.work)
        return "  ".join(part for part in parts if part)


@dataclass(frozen=True, slots=True)
class Course:
    """A run as it goes: what is on at a time, and the thickness by then."""

    run: Run
    total: Time
    thickness: Callable[[Time], Thickness]

    def stage_at(self, time: Time) -> Stage:
        """The stage under way; at a boundary the later one, at the end the last."""
        return next((s for s in self.run.stages if time < s.end), self.run.stages[-1])

    def at(self, time: Time) -> tuple[Stage, Current, Voltage, Charge]:
        """Stage, current, volts and counter at a time."""
        stage = self.stage_at(time)
        share = (time - stage.start) / stage.duration if stage.duration > 0.0 else 1.0
        current = stage.from_current + share * (stage.to_current - stage.from_current)
        voltage = stage.from_voltage + share * (stage.to_voltage - stage.from_voltage)
        return stage, current, voltage, charge_by(self.run, time)


def plot_of(plan: Plan, style: Style) -> Plot:
    """Current, expected volts and expected thickness over the run, each on an axis of its own."""
    course = course_of(plan)
    if course is None:
        return Plot(why=NOTHING)
    total, run = course.total, course.run
    process = plan.recipe.process
    return Plot(
        series=(
            _current(plan, run, total, style),
            _volts(run, total, style),
            _thickness(plan, course, style),
        ),
        marks=tuple(
            Mark(at=look.time / total, number=str(number), name=look.name)
            for number, look in enumerate(moments(plan), 1)
        ),
        times=tuple((share, _clock(share * total, process)) for share in _TICKS),
        clock=_clock_unit(process),
    )


def reading_at(plan: Plan, share: Ratio, style: Style) -> Reading | None:
    """What the curves say after a share of the run; None where there is nothing to run."""
    course = course_of(plan)
    if course is None:
        return None
    time = min(max(share, 0.0), 1.0) * course.total
    stage, current, voltage, counter = course.at(time)
    process = plan.recipe.process
    return Reading(
        time=f"{_clock(time, process)} {_clock_unit(process)}",
        stage=stage.stage,
        current=amperes(current, rectifier_of(plan), style),
        voltage=volts(voltage, style),
        thickness=style.show(course.thickness(time), THICKNESS),
        counter=charge(counter, style),
        work="" if stage.polarity == "off" else work(stage.polarity),
    )


def _clock(time: Time, process: str) -> str:
    return hours(time) if process == CHROME else moment(time, process)


def _clock_unit(process: str) -> str:
    return "h:min" if process == CHROME else "min"


def course_of(plan: Plan) -> Course | None:
    """The run of a plan as it goes; None where a stop forbids it or no time reaches the aim."""
    run = plan.run
    if run is None or plan.stopped or not run.stages or not run.total_time:
        return None
    return _COURSES.get(plan, None, lambda: _course(plan, run))


def _course(plan: Plan, run: Run) -> Course:
    process = process_of(plan.case)
    job = job_of(plan.case, process, plan.areas, plan.circuit.resistance)
    return Course(run, run.stages[-1].end, _growth(runner_of(job), run, plan.areas.carrying))


# --- thickness -------------------------------------------------------------------------------------------


def charge_by(run: Run, time: Time) -> Charge:
    """What the counter shows by a time."""
    return sum(_charge_of(stage, time) for stage in run.stages)


def _charge_of(stage: Stage, time: Time) -> Charge:
    """The charge of a stage by a time.

    Where its current is not quite straight, its own charge is shared out as if it were.
    """
    gone = min(max(time - stage.start, 0.0), stage.duration)
    straight = 0.5 * (stage.from_current + stage.to_current) * stage.duration
    bent = stage.charge / straight if straight > 0.0 else 1.0
    return bent * 0.5 * (stage.from_current + _end_current(stage, gone)) * gone


def _end_current(stage: Stage, gone: Time) -> Current:
    share = gone / stage.duration if stage.duration > 0.0 else 1.0
    return stage.from_current + share * (stage.to_current - stage.from_current)


def _growth(runner: Runner, run: Run, carrying: float) -> Callable[[Time], Thickness]:
    """Thickness of the slowest part over time, by the law that planned it."""
    if isinstance(runner, Chrome):
        deposition = runner.deposition

        def deposit(time: Time) -> Thickness:
            return sum(
                deposition.over_ramp(s.from_current / carrying, _end_current(s, gone) / carrying, gone)
                for s in run.stages
                if s.polarity == "work cathodic" and (gone := min(time - s.start, s.duration)) > 0.0
            )

        return deposit
    assert isinstance(runner, Anodizing)  # there is no third kind
    films = runner.films
    reference = run.panel_current if run.panel_current is not None else run.peak_current

    def film(time: Time) -> Thickness:
        equivalent = charge_by(run, time) / reference
        return min(
            grown(law, density=films.density(law, reference), equivalent=equivalent, time=time)
            for _, law in films.items
        )

    return film


# --- curves ----------------------------------------------------------------------------------------------


def _current(plan: Plan, run: Run, total: Time, style: Style) -> Series:
    rectifier = rectifier_of(plan)
    limit = None if rectifier is None else rectifier.max_current
    corners = _corners(run, total, lambda s: (s.from_current, s.to_current))
    name = "current, about" if plan.control == "voltage" else "current"
    return _series(
        name, "A", corners, limit, lambda value: amperes(value, rectifier, style), limit_word="rated"
    )


def _volts(run: Run, total: Time, style: Style) -> Series:
    corners = _corners(run, total, lambda s: (s.from_voltage, s.to_voltage))
    return _series("volts expected", "V", corners, run.voltage_limit, lambda value: volts(value, style))


def _thickness(plan: Plan, course: Course, style: Style) -> Series:
    times = [
        stage.start + step / _STRETCHES * stage.duration
        for stage in course.run.stages
        for step in range(_STRETCHES + 1)
    ]
    corners = [(time / course.total, course.thickness(time)) for time in times]
    said = style.show(plan.aims.aim, THICKNESS)
    return _series(
        "thickness expected",
        said.partition(" ")[2],
        corners,
        plan.aims.aim,
        lambda value: style.show(value, THICKNESS),
        limit_word="aim",
    )


def _corners(run: Run, total: Time, ends: Callable[[Stage], tuple[float, float]]) -> list[Point]:
    """Both ends of every stage: straight between them, upright where one stage begins higher than the last ended."""
    return [
        corner
        for stage in run.stages
        for corner in zip((stage.start / total, stage.end / total), ends(stage), strict=True)
    ]


def _series(
    name: str,
    unit: str,
    corners: Iterable[Point],
    limit: float | None,
    said: Callable[[float], str],
    *,
    limit_word: str = "limit",
) -> Series:
    """A curve on its axis from nothing to its peak, or to its limit where that is near."""
    points = list(corners)
    top = max(value for _, value in points)
    near = limit is not None and 0.0 < limit <= _NEAR * top
    if near and limit is not None:
        top = max(top, limit)
    top = top if top > 0.0 else 1.0
    return Series(
        name=name,
        unit=unit,
        points=tuple((share, value / top) for share, value in points),
        top=said(top),
        bottom=said(0.0),
        limit=limit / top if near and limit is not None else None,
        limit_text="" if limit is None else f"{limit_word} {said(limit)}",
    )
