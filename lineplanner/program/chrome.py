"""Hard chrome: soak, reverse etch, start, strike, plate."""

from dataclasses import dataclass, replace

from lineplanner.bath.heat import soak_time
from lineplanner.bath.voltage import chrome_cell_voltage
from lineplanner.inputs.line import Rectifier
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.tables import Substrate
from lineplanner.load import Item
from lineplanner.program.crossover import root
from lineplanner.program.deposition import Deposition
from lineplanner.program.job import HALF_MINUTE, MINUTE, Job
from lineplanner.program.panel import panel_current, panel_step, rounded_up
from lineplanner.program.stages import ItemRun, Polarity, Run, Stage, StageName, unreachable
from lineplanner.quantities import Current, CurrentDensity, Ratio, Thickness, Time, Voltage

CATHODIC: Polarity = "work cathodic"
ANODIC: Polarity = "work anodic"


@dataclass(frozen=True, slots=True, kw_only=True)
class Start:
    """How the load is brought to plating: preset of the substrates, overruled by the recipe."""

    soak: Time
    preheat: Time
    reverse_density: CurrentDensity
    reverse_time: Time
    hold: Time
    ramp: Time
    strike_ratio: Ratio
    strike_time: Time


def substrate_of(item: Item, substrates: tuple[Substrate, ...]) -> Substrate:
    """The substrates-table row of an item; reading a site has checked that it exists."""
    return next(row for row in substrates if row.name == item.material.substrate)


def start_of(job: Job) -> Start:
    """The start of a load: the most careful of its substrates' presets, then what the recipe says."""
    rows = [substrate_of(item, job.tables.substrates) for item in job.areas.items]
    recipe = job.recipe
    soak = recipe.soak if recipe.soak is not None else _soak(job)
    in_bath = all(row.soak_in_bath for row in rows) and not job.bath.fluoride
    reverse_density, reverse_time = _reverse(recipe, rows)
    strike_ratio = (
        recipe.strike_ratio.value if recipe.strike_ratio else min(r.strike_ratio.value for r in rows)
    )
    strike_time = recipe.strike_time.value if recipe.strike_time else min(r.strike_time.value for r in rows)
    return Start(
        soak=soak if in_bath else 0.0,
        preheat=0.0 if in_bath else soak,
        reverse_density=reverse_density,
        reverse_time=reverse_time,
        hold=max(r.start_hold.value for r in rows),
        ramp=max(r.start_ramp.value for r in rows),
        strike_ratio=strike_ratio,
        strike_time=strike_time if strike_ratio > 1.0 else 0.0,
    )


def _soak(job: Job) -> Time:
    """Until the slowest part has the bath's temperature, to half minutes."""
    longest = max(
        soak_time(
            mass=item.mass_each,
            area=item.wet_each,
            specific_heat=item.material.specific_heat,
            heat_transfer=job.tables.growth.heat_transfer.value,
        )
        for item in job.areas.items
        if item.wet_each > 0.0
    )
    return rounded_up(longest, HALF_MINUTE)


def _reverse(recipe: Recipe, rows: list[Substrate]) -> tuple[CurrentDensity, Time]:
    if recipe.reverse == "none" or recipe.reverse_tank:
        return 0.0, 0.0
    density, time = min(r.reverse_density.value for r in rows), min(r.reverse_time.value for r in rows)
    if recipe.reverse_density is not None:
        density = recipe.reverse_density.value
    if recipe.reverse_time is not None:
        time = recipe.reverse_time.value
    return (density, time) if density > 0.0 and time > 0.0 else (0.0, 0.0)


def run_chrome(job: Job, rectifier: Rectifier, deposition: Deposition) -> Run:
    """Run the program on one rectifier; the plating time is solved with ramp and strike counted in."""
    area = job.areas.carrying
    step = panel_step(rectifier)
    wanted = job.density * area
    low, high = job.current_range
    current = panel_current(wanted, step, low=low, high=high)
    limit = rectifier.most_voltage
    build = _Build(
        job=job, step=step, limit=limit, stages=[], asked=[], deposit=0.0, deposition=deposition, wanted=0.0
    )
    build.start(start_of(job), current)
    rate = deposition.rate(build.held(current) / area)
    if rate <= 0.0:
        return unreachable(
            rectifier=rectifier,
            set_current=wanted,
            peak_current=max([current, *(s.peak for s in build.stages)]),
            reachable=build.deposit,
            voltage_limit=limit,
        )
    plate = rounded_up(max(0.0, (job.aims.aim - build.deposit) / rate), MINUTE)
    build.add("plate", CATHODIC, plate, current, current)
    stretch = deposition.rate(current / area) / rate - 1.0
    return _finish(job, rectifier, build, wanted, current, plate, stretch)


@dataclass(slots=True, kw_only=True)
class _Build:
    """Stages as they are added, with the deposit so far."""

    job: Job
    step: Current
    limit: Voltage
    deposition: Deposition
    stages: list[Stage]
    asked: list[Stage]
    deposit: Thickness
    wanted: Voltage

    def start(self, start: Start, current: Current) -> None:
        area = self.job.areas.carrying
        if start.soak > 0.0:
            self.add("wait", "off", start.soak, 0.0, 0.0)
        if start.reverse_time > 0.0:
            reverse = panel_current(start.reverse_density * area, self.step)
            self.add("reverse", ANODIC, start.reverse_time, reverse, reverse)
        below = 0.0
        if start.hold > 0.0 or start.ramp > 0.0:
            share = self.job.tables.limits.below_threshold.value
            below = panel_current(share * self.deposition.threshold * area, self.step)
        if start.hold > 0.0:
            self.add("hold", CATHODIC, start.hold, below, below)
        if start.ramp > 0.0:
            self.add("ramp", CATHODIC, start.ramp, below, current)
        if start.strike_time > 0.0:
            strike = panel_current(start.strike_ratio * current, self.step)
            self.add("strike", CATHODIC, start.strike_time, strike, strike)

    def add(self, name: StageName, polarity: Polarity, time: Time, first: Current, last: Current) -> None:
        """A stage from one current to another, or to what the volts allow of it."""
        area = self.job.areas.carrying
        begin = self.stages[-1].end if self.stages else 0.0
        self.wanted = max(self.wanted, self.volts(first), self.volts(last))
        asked = Stage(
            stage=name,
            control="off" if polarity == "off" else "current",
            polarity=polarity,
            start=begin,
            end=begin + time,
            from_current=first,
            to_current=last,
            from_voltage=self.volts(first),
            to_voltage=self.volts(last),
            density=last / area,
        )
        self.asked.append(asked)
        if (first, last) != (self.held(first), self.held(last)):
            first, last = self.held(first), self.held(last)
            asked = replace(
                asked,
                control="voltage",
                from_current=first,
                to_current=last,
                from_voltage=self.volts(first),
                to_voltage=self.volts(last),
                density=last / area,
            )
        self.stages.append(asked)
        if polarity == CATHODIC:
            self.deposit += self.deposition.over_ramp(first / area, last / area, time)

    def held(self, current: Current) -> Current:
        """The current, or what of it the volts allow; 0 where they allow none."""
        if self.volts(current) <= self.limit:
            return current
        least = 1e-6 * current
        if self.volts(least) >= self.limit:
            return 0.0
        return root(lambda i: self.volts(i) - self.limit, least, current)

    def volts(self, current: Current) -> float:
        """Terminal volts: cell and circuit. An estimate, and a rough one for the reverse etch."""
        if current <= 0.0:
            return 0.0
        cell = chrome_cell_voltage(
            current_density=current / self.job.areas.carrying,
            gap=self.job.gap,
            conductivity=self.job.conductivity,
            cell=self.job.tables.cell,
        )
        return cell + self.job.resistance * current


def _finish(
    job: Job,
    rectifier: Rectifier,
    build: _Build,
    wanted: Current,
    current: Current,
    plate: Time,
    stretch: Ratio,
) -> Run:
    stages = tuple(build.stages)
    density = stages[-1].to_current / job.areas.carrying
    limited = next((s.start for s in stages if s.control == "voltage"), None)
    return Run(
        rectifier=rectifier,
        stages=stages,
        set_current=wanted,
        panel_current=current,
        peak_current=max(s.peak for s in stages),
        total_time=stages[-1].end,
        time_at_set=plate,
        forward=sum(s.charge for s in stages if s.polarity == CATHODIC),
        reverse=sum(s.charge for s in stages if s.polarity == ANODIC),
        thickness=build.deposit,
        reachable=None,
        items=tuple(
            ItemRun(part=i.part, current=density * i.carrying, density=density, thickness=build.deposit)
            for i in job.areas.items
        ),
        start_voltage=stages[-1].from_voltage,
        end_voltage=stages[-1].to_voltage,
        peak_voltage=max(max(s.from_voltage, s.to_voltage) for s in stages),
        voltage_limit=build.limit,
        limit_reached=limited,
        stretch=stretch,
        wanted_voltage=None if limited is None else build.wanted,
        asked=() if limited is None else tuple(build.asked[:-1]),
    )
