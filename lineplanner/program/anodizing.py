"""Anodizing under current control: soft start, hold, and what happens where the volts run out."""

from dataclasses import dataclass

from lineplanner.bath.growth import film_rate, film_thickness
from lineplanner.bath.voltage import bath_drop, film_voltage
from lineplanner.inputs.line import Rectifier
from lineplanner.load import Item
from lineplanner.program.crossover import Held, Supply, hold_at_voltage
from lineplanner.program.growth import FilmLaw, family_of, film_law
from lineplanner.program.job import HALF_MINUTE, Job
from lineplanner.program.panel import panel_current, panel_step, rounded_up
from lineplanner.program.softstart import SoftStart, soft_start_of
from lineplanner.program.stages import ItemRun, Polarity, Run, Stage, unreachable
from lineplanner.quantities import (
    Area,
    Charge,
    Current,
    CurrentDensity,
    Rate,
    Ratio,
    Thickness,
    Time,
    Voltage,
)

ANODIC: Polarity = "work anodic"


@dataclass(frozen=True, slots=True, kw_only=True)
class Films:
    """Growth laws of the items, and the area they share the current over (weighted by what each alloy draws)."""

    items: tuple[tuple[Item, FilmLaw], ...]
    weighted_area: Area

    def density(self, law: FilmLaw, current: Current) -> CurrentDensity:
        return current * law.weight / self.weighted_area if self.weighted_area > 0.0 else 0.0


def films_of(job: Job, law: str | None = None) -> Films:
    """The growth law of each item. Parts on one rack share the volts: j is divided as a^(-1/p)."""
    tables, alloys = job.tables, job.tables.alloys
    items = tuple(
        (
            item,
            film_law(
                family_of(item.material, alloys), bath=job.bath, process=job.process, tables=tables, law=law
            ),
        )
        for item in job.areas.items
    )
    rest = job.areas.carrying - job.areas.parts_carrying
    reference = _common_weight(items)
    weighted = sum(item.carrying * film.weight for item, film in items) + rest * reference
    return Films(items=items, weighted_area=weighted)


def _common_weight(items: tuple[tuple[Item, FilmLaw], ...]) -> Ratio:
    """Rack metal and thieves draw like the mean of the parts."""
    area = sum(item.carrying for item, _ in items)
    return sum(item.carrying * film.weight for item, film in items) / area if area > 0.0 else 1.0


def grown(film: FilmLaw, *, density: CurrentDensity, equivalent: Time, time: Time) -> Thickness:
    """Film of one item after a program.

        h = f K (j t_e) - v t

    Parameters
        film: f, K and v of the item's family in this bath
        density: j, at set current [A/m^2]
        equivalent: t_e, time at set current that passes the charge of the program [s]
        time: t, since the current came on [s]
    Returns
        h, total per side; never below 0 [m]
    Valid
        as the growth law in use
    Source
        bath.growth.film_thickness
    Example
        >>> from types import SimpleNamespace
        >>> law = SimpleNamespace(growth=5.4621e-11, alloy_factor=1.0, dissolution=0.0)  # the 720 rule
        >>> round(grown(law, density=129.17, equivalent=3600.0, time=3600.0) * 1e6, 1)
        25.4
    """
    return film_thickness(
        charge_density=density * equivalent,
        time=time,
        growth=film.growth,
        alloy_factor=film.alloy_factor,
        dissolution=film.dissolution,
    )


def rate_of(film: FilmLaw, density: CurrentDensity) -> Rate:
    """How fast one item grows at a steady density; below zero it never gets anywhere.

        dh/dt = f K j - v

    Parameters
        film: f, K and v of the item's family in this bath
        density: j [A/m^2]
    Returns
        dh/dt, per side [m/s]
    Valid
        as the growth law in use
    Source
        bath.growth.film_rate
    Example
        >>> from types import SimpleNamespace
        >>> law = SimpleNamespace(growth=5.4621e-11, alloy_factor=1.0, dissolution=0.0)
        >>> round(rate_of(law, 129.17) * 60e6, 3)
        0.423
    """
    return film_rate(
        current_density=density,
        growth=film.growth,
        alloy_factor=film.alloy_factor,
        dissolution=film.dissolution,
    )


def hold_for(film: FilmLaw, aim: Thickness, *, density: CurrentDensity, start: SoftStart) -> Time | None:
    """How long to hold at full current until an item has its aim.

        h = f K j (t_e + t) - v (t_r + t)  solved for t

    Parameters
        film: f, K and v of the item's family in this bath
        aim: h, total per side [m]
        density: j, at full current [A/m^2]
        start: the soft start, of duration t_r and equivalent time t_e at full current
    Returns
        t; 0 where the soft start alone does it, None where no time ever does [s]
    Valid
        steady current after the soft start
    Source
        bath.growth.film_thickness, solved for time
    Example
        >>> from types import SimpleNamespace
        >>> law = SimpleNamespace(growth=5.4621e-11, alloy_factor=1.0, dissolution=0.0)  # the 720 rule
        >>> round(hold_for(law, 25.4e-6, density=129.17, start=SoftStart(segments=(), stepped=False)) / 60, 1)
        60.0
    """
    rate = rate_of(film, density)
    if rate <= 0.0:
        return None
    gross = rate + film.dissolution
    missing = aim - gross * start.equivalent + film.dissolution * start.duration
    return max(0.0, missing / rate)


def terminal_voltage(
    job: Job, film: FilmLaw, *, density: CurrentDensity, thickness: Thickness, current: Current
) -> Voltage:
    """Volts at the rectifier for one item: film, bath and circuit. An estimate.

        V = V_film(j, h) + j d / kappa + R I

    Parameters
        job: bath, gap d, conductivity kappa, resistance R of the circuit
        film: voltage factor and film gradient of the item's family
        density: j, of this item [A/m^2]
        thickness: h, film so far [m]
        current: I, of the whole load; without current no volts [A]
    Returns
        V, at the rectifier's terminals [V]
    Valid
        as the film voltage model: an assumption to be fitted to the shop's own log
    Source
        bath.voltage.film_voltage and bath_drop; Ohm's law for the circuit
    Example
        >>> terminal_voltage(None, None, density=0.0, thickness=0.0, current=0.0)  # nothing on, no volts
        0.0
    """
    if current <= 0.0:
        return 0.0
    return (
        film_voltage(
            current_density=density,
            thickness=thickness,
            temperature=job.bath.temperature,
            voltage_factor=film.family.voltage_factor.value,
            film_gradient=film.gradient,
            law=job.tables.growth,
        )
        + bath_drop(current_density=density, gap=job.gap, conductivity=job.conductivity)
        + job.resistance * current
    )


def run_anodizing(job: Job, rectifier: Rectifier, films: Films) -> Run:
    """Run the program on one rectifier: panel current, soft start, hold to the aim, volts along the way."""
    wanted = job.density * job.areas.carrying
    current = panel_current(wanted, panel_step(rectifier))
    start = soft_start_of(job.recipe, tuple(film.family for _, film in films.items), job.density)
    holds = [
        hold_for(film, job.aims.aim, density=films.density(film, current), start=start)
        for _, film in films.items
    ]
    limit = rectifier.voltage_limit if rectifier.voltage_limit is not None else rectifier.max_voltage
    known = [h for h in holds if h is not None]
    if len(known) < len(holds) or not known:
        return unreachable(
            rectifier=rectifier,
            set_current=wanted,
            peak_current=current,
            reachable=_most(films, start, current),
            voltage_limit=limit,
        )
    total = rounded_up(start.duration + max(known), HALF_MINUTE)
    slowest = films.items[max(range(len(holds)), key=lambda i: known[i])][1]
    program = _Program(job=job, films=films, start=start, current=current, limit=limit, slowest=slowest)
    return program.run(rectifier, wanted, total)


@dataclass(frozen=True, slots=True, kw_only=True)
class _Program:
    """One soft start and hold at one panel current."""

    job: Job
    films: Films
    start: SoftStart
    current: Current
    limit: Voltage
    slowest: FilmLaw

    def thickness(self, film: FilmLaw, equivalent: Time, time: Time) -> Thickness:
        density = self.films.density(film, self.current)
        return grown(film, density=density, equivalent=equivalent, time=time)

    def volts(self, share: Ratio, equivalent: Time, time: Time) -> Voltage:
        """Terminal volts at a share of the panel current: of the item that asks for most."""
        current = share * self.current
        return max(
            terminal_voltage(
                self.job,
                film,
                density=self.films.density(film, current),
                thickness=self.thickness(film, equivalent, time),
                current=current,
            )
            for film in {film.family.name: film for _, film in self.films.items}.values()
        )

    def run(self, rectifier: Rectifier, wanted: Current, total: Time) -> Run:
        start_stages = self._start_stages()
        t_r, t_e = self.start.duration, self.start.equivalent
        at_full, at_end = self.volts(1.0, t_e, t_r), self.volts(1.0, t_e + total - t_r, total)
        if max(at_full, at_end) <= self.limit:
            hold = _stage(
                "hold",
                "current",
                t_r,
                total,
                (self.current, self.current),
                (at_full, at_end),
                self._density(),
            )
            stages = (*start_stages, hold) if total > t_r else start_stages
            return self._finish(rectifier, wanted, stages, t_e + total - t_r, total, None, 0.0)
        held = hold_at_voltage(
            Supply(volts=self.volts, limit=self.limit),
            start=self.start,
            total=total,
            most_stretch=self._stretch_allowed(),
            thickness=lambda equivalent, time: self.thickness(self.slowest, equivalent, time),
            aim=self.job.aims.aim,
        )
        return self._finish_held(rectifier, wanted, held, total)

    def _stretch_allowed(self) -> Ratio:
        """No stretch on alloys that burn first unless a coupon of theirs is on record."""
        delicate = any(film.family.delicate and not film.calibrated for _, film in self.films.items)
        return 0.0 if delicate else self.job.tables.limits.stretch.value

    def _density(self) -> CurrentDensity:
        return self.current / self.job.areas.carrying

    def _start_stages(self) -> tuple[Stage, ...]:
        stages: list[Stage] = []
        time = equivalent = 0.0
        for segment in self.start.segments:
            later = equivalent + 0.5 * (segment.start + segment.end) * segment.duration
            ends = (segment.start * self.current, segment.end * self.current)
            volts = (
                self.volts(segment.start, equivalent, time),
                self.volts(segment.end, later, time + segment.duration),
            )
            name = "step" if self.start.stepped else "ramp"
            density = segment.end * self._density()
            stages.append(_stage(name, "current", time, time + segment.duration, ends, volts, density))
            time, equivalent = time + segment.duration, later
        return tuple(stages)

    def _finish(
        self,
        rectifier: Rectifier,
        wanted: Current,
        stages: tuple[Stage, ...],
        equivalent: Time,
        total: Time,
        reached: Time | None,
        stretch: Ratio,
    ) -> Run:
        items = tuple(
            ItemRun(
                part=item.part,
                current=self.films.density(film, self.current) * item.carrying,
                density=self.films.density(film, self.current),
                thickness=self.thickness(film, equivalent, total),
            )
            for item, film in self.films.items
        )
        charge: Charge = self.current * equivalent
        return Run(
            rectifier=rectifier,
            stages=stages,
            set_current=wanted,
            panel_current=self.current,
            peak_current=max(s.peak for s in stages),
            total_time=total,
            time_at_set=total - self.start.duration,
            forward=charge,
            reverse=0.0,
            thickness=min(i.thickness for i in items),
            reachable=None,
            items=items,
            start_voltage=self.volts(1.0, self.start.equivalent, self.start.duration),
            end_voltage=stages[-1].to_voltage,
            peak_voltage=max(max(s.from_voltage, s.to_voltage) for s in stages),
            voltage_limit=self.limit,
            limit_reached=reached,
            stretch=stretch,
        )

    def _finish_held(self, rectifier: Rectifier, wanted: Current, held: Held, planned: Time) -> Run:
        t_r, t_e = self.start.duration, self.start.equivalent
        density = self._density()
        stages = [s for s in self._start_stages() if s.end <= held.reached]
        if held.reached > t_r:
            ends = (self.current, self.current)
            volts = (self.volts(1.0, t_e, t_r), self.limit)
            stages.append(_stage("hold", "current", t_r, held.reached, ends, volts, density))
        ends = (held.share_at_start * self.current, held.share_at_end * self.current)
        begin = stages[-1].end if stages else 0.0
        stages.append(
            _stage(
                "hold",
                "voltage",
                begin,
                held.total,
                ends,
                (self.limit, self.limit),
                held.share_at_end * density,
            )
        )
        stretch = held.total / planned - 1.0
        return self._finish(
            rectifier, wanted, tuple(stages), held.equivalent, held.total, held.reached, stretch
        )


def _stage(
    name: str,
    control: str,
    start: Time,
    end: Time,
    currents: tuple[Current, Current],
    volts: tuple[Voltage, Voltage],
    density: CurrentDensity,
) -> Stage:
    return Stage(
        stage=name,  # type: ignore[arg-type]
        control=control,  # type: ignore[arg-type]
        polarity=ANODIC,
        start=start,
        end=end,
        from_current=currents[0],
        to_current=currents[1],
        from_voltage=volts[0],
        to_voltage=volts[1],
        density=density,
    )


def _most(films: Films, start: SoftStart, current: Current) -> Thickness:
    """What the film gets at most where it dissolves as fast as it grows: what the soft start leaves."""
    return min(
        grown(film, density=films.density(film, current), equivalent=start.equivalent, time=start.duration)
        for _, film in films.items
    )
