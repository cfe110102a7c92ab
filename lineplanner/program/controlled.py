"""Anodizing under current control on one rectifier: soft start, hold, and what happens where the volts run out."""

import math
from dataclasses import dataclass

from lineplanner.inputs.line import Rectifier
from lineplanner.program.anodizing import ANODIC, Films, grown, hold_for, terminal_voltage
from lineplanner.program.crossover import Held, Supply, hold_at_voltage
from lineplanner.program.growth import FilmLaw
from lineplanner.program.job import HALF_MINUTE, Job
from lineplanner.program.panel import panel_current, panel_step, rounded_up
from lineplanner.program.softstart import SoftStart, soft_start_of
from lineplanner.program.stages import Control, ItemRun, Run, Stage, StageName, unreachable
from lineplanner.quantities import Charge, Current, CurrentDensity, Ratio, Thickness, Time, Voltage


def run_anodizing(job: Job, rectifier: Rectifier, films: Films) -> Run:
    """Run the program on one rectifier: panel current, soft start, hold to the aim, volts along the way."""
    wanted = job.density * job.areas.carrying
    low, high = job.current_range
    current = panel_current(wanted, panel_step(rectifier), low=low, high=high)
    start = soft_start_of(job.recipe, tuple(film.family for _, film in films.items), job.density)
    holds = [
        hold_for(film, job.aims.aim, density=films.density(film, current), start=start)
        for _, film in films.items
    ]
    limit = rectifier.most_voltage
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
        t_r, t_e = self.start.duration, self.start.equivalent
        ends = self.volts(1.0, t_e, t_r), self.volts(1.0, t_e + total - t_r, total)
        if max(ends) <= self.limit:
            stages = self._before(total)
            if total > t_r:
                stages.append(self._hold(t_r, total, (1.0, 1.0), ends, "current", total - t_r))
            return self._finish(rectifier, wanted, stages, t_e + total - t_r, total, None, 0.0)
        held = hold_at_voltage(
            Supply(volts=self.volts, limit=self.limit),
            start=self.start,
            total=total,
            most_stretch=self._stretch_allowed(),
            thickness=lambda equivalent, time: self.thickness(self.slowest, equivalent, time),
            aim=self.job.aims.aim,
        )
        stretch = held.total / total - 1.0
        stages = self._held_stages(held)
        return self._finish(rectifier, wanted, stages, held.equivalent, held.total, held.reached, stretch)

    def _stretch_allowed(self) -> Ratio:
        """No stretch on alloys that burn first unless a coupon of theirs is on record."""
        delicate = any(film.family.delicate and not film.calibrated for _, film in self.films.items)
        return 0.0 if delicate else self.job.tables.limits.stretch.value

    def _held_stages(self, held: Held) -> list[Stage]:
        """Soft start and hold up to the limit, then the decay at the limit in pieces."""
        t_r, t_e = self.start.duration, self.start.equivalent
        stages = self._before(held.reached)
        if held.reached > t_r:
            volts = self.volts(1.0, t_e, t_r), self.limit
            stages.append(self._hold(t_r, held.reached, (1.0, 1.0), volts, "current", held.reached - t_r))
        for (t0, e0, share0), (t1, e1, share1) in zip(held.points, held.points[1:], strict=False):
            at_limit = self.limit, self.limit
            stages.append(self._hold(t0, t1, (share0, share1), at_limit, "voltage", e1 - e0))
        return stages

    def _before(self, end: Time) -> list[Stage]:
        """The soft start's stages up to a time; the one in which it lies is cut there."""
        stages: list[Stage] = []
        time = equivalent = 0.0
        for segment in self.start.segments:
            if time >= end:
                break
            part = min(1.0, (end - time) / segment.duration)
            share = segment.start + (segment.end - segment.start) * part
            passed = 0.5 * (segment.start + share) * segment.duration * part
            stages.append(
                Stage(
                    stage="step" if self.start.stepped else "ramp",
                    control="current",
                    polarity=ANODIC,
                    start=time,
                    end=time + part * segment.duration,
                    from_current=segment.start * self.current,
                    to_current=share * self.current,
                    from_voltage=self.volts(segment.start, equivalent, time),
                    to_voltage=self.volts(share, equivalent + passed, time + part * segment.duration),
                    density=share * self._density(),
                )
            )
            time, equivalent = time + segment.duration, equivalent + passed
        return stages

    def _hold(
        self,
        start: Time,
        end: Time,
        shares: tuple[Ratio, Ratio],
        volts: tuple[Voltage, Voltage],
        control: Control,
        equivalent: Time,
    ) -> Stage:
        """A piece of the hold; equivalent is the time at panel current that passes its charge."""
        name: StageName = "hold"
        return Stage(
            stage=name,
            control=control,
            polarity=ANODIC,
            start=start,
            end=end,
            from_current=shares[0] * self.current,
            to_current=shares[1] * self.current,
            from_voltage=volts[0],
            to_voltage=volts[1],
            density=shares[1] * self._density(),
            passed=self.current * equivalent,
        )

    def _density(self) -> CurrentDensity:
        return self.current / self.job.areas.carrying

    def _finish(
        self,
        rectifier: Rectifier,
        wanted: Current,
        stages: list[Stage],
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
        at_set = (total if reached is None else reached) - self.start.duration
        at_full = self.volts(1.0, self.start.equivalent, self.start.duration)
        return Run(
            rectifier=rectifier,
            stages=tuple(stages),
            set_current=wanted,
            panel_current=self.current,
            peak_current=max(s.peak for s in stages),
            total_time=total,
            time_at_set=max(0.0, at_set),
            forward=charge,
            reverse=0.0,
            thickness=min(i.thickness for i in items),
            reachable=None,
            items=items,
            start_voltage=min(at_full, self.limit) if reached is not None else at_full,
            end_voltage=stages[-1].to_voltage,
            peak_voltage=max(max(s.from_voltage, s.to_voltage) for s in stages),
            voltage_limit=self.limit,
            limit_reached=reached,
            stretch=stretch,
            wanted_voltage=None if reached is None else self._wanted_voltage(total),
            asked=() if reached is None else tuple(self._before(math.inf)),
        )

    def _wanted_voltage(self, total: Time) -> Voltage:
        """Volts that the panel current would take at its hungriest, the limit aside."""
        t_r, t_e = self.start.duration, self.start.equivalent
        return max(self.volts(1.0, t_e, t_r), self.volts(1.0, t_e + max(0.0, total - t_r), total))


def _most(films: Films, start: SoftStart, current: Current) -> Thickness:
    """What the film gets at most where it dissolves as fast as it grows: what the soft start leaves."""
    return min(
        grown(film, density=films.density(film, current), equivalent=start.equivalent, time=start.duration)
        for _, film in films.items
    )
