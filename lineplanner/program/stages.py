"""Stages of a current program, and what one run of it gives."""

from dataclasses import dataclass
from typing import Literal

from lineplanner.inputs.line import Rectifier
from lineplanner.quantities import Charge, Current, CurrentDensity, Thickness, Time, Voltage

StageName = Literal["wait", "ramp", "step", "hold", "reverse", "strike", "plate", "restart"]
Control = Literal["current", "voltage", "off"]
Polarity = Literal["work anodic", "work cathodic", "off"]


@dataclass(frozen=True, slots=True, kw_only=True)
class Stage:
    """One stage: currents are linear in time between its ends and never negative; polarity carries the sign.

    Voltages are at the rectifier's terminals: an estimate under current control, the setting under voltage control.
    density is that of the part at the stage's end, per carrying area. passed is the charge where the current is not
    linear (a decay at the voltage limit); None where it is.
    """

    stage: StageName
    control: Control
    polarity: Polarity
    start: Time
    end: Time
    from_current: Current
    to_current: Current
    from_voltage: Voltage
    to_voltage: Voltage
    density: CurrentDensity
    passed: Charge | None = None

    @property
    def duration(self) -> Time:
        return self.end - self.start

    @property
    def charge(self) -> Charge:
        if self.passed is not None:
            return self.passed
        return 0.5 * (self.from_current + self.to_current) * (self.end - self.start)

    def current_at(self, time: Time) -> Current:
        """Current at a time inside the stage, on the straight line between its ends [A]."""
        share = (time - self.start) / self.duration if self.duration > 0.0 else 1.0
        return self.from_current + share * (self.to_current - self.from_current)

    def charge_until(self, time: Time) -> Charge:
        """Charge from the stage's begin to a time inside it [C]; of a decay its share by the straight line."""
        straight = 0.5 * (self.from_current + self.current_at(time)) * (time - self.start)
        whole = 0.5 * (self.from_current + self.to_current) * self.duration
        return straight * self.charge / whole if whole > 0.0 else 0.0

    @property
    def peak(self) -> Current:
        return max(self.from_current, self.to_current)


@dataclass(frozen=True, slots=True, kw_only=True)
class ItemRun:
    """One item of the load in a run: its current (all its parts), its density and the thickness it gets."""

    part: str
    current: Current
    density: CurrentDensity
    thickness: Thickness


@dataclass(frozen=True, slots=True, kw_only=True)
class Run:
    """The program run on one rectifier: stages, time, charge, thickness, volts. None: no number to set.

    Where the limit holds the current back, wanted_voltage is what the set current would take, and asked the stages
    before the main one as they are set on the panel, with the current that the limit leaves out of the stages.
    """

    rectifier: Rectifier | None
    stages: tuple[Stage, ...]
    set_current: Current | None
    panel_current: Current | None
    peak_current: Current
    total_time: Time | None
    time_at_set: Time | None
    forward: Charge | None
    reverse: Charge | None
    thickness: Thickness | None
    reachable: Thickness | None
    items: tuple[ItemRun, ...]
    start_voltage: Voltage | None
    end_voltage: Voltage | None
    peak_voltage: Voltage | None
    voltage_limit: Voltage | None
    limit_reached: Time | None
    stretch: float
    wanted_voltage: Voltage | None = None
    asked: tuple[Stage, ...] = ()

    @property
    def counter(self) -> Charge | None:
        """What the ampere-hour counter shows: forward and reverse added."""
        return None if self.forward is None or self.reverse is None else self.forward + self.reverse


def unreachable(
    *,
    rectifier: Rectifier,
    set_current: Current | None,
    peak_current: Current,
    reachable: Thickness,
    voltage_limit: Voltage | None,
) -> Run:
    """A run without a number to set: no time reaches the aim; what is reached at most."""
    return Run(
        rectifier=rectifier,
        stages=(),
        set_current=set_current,
        panel_current=None,
        peak_current=peak_current,
        total_time=None,
        time_at_set=None,
        forward=None,
        reverse=None,
        thickness=None,
        reachable=reachable,
        items=(),
        start_voltage=None,
        end_voltage=None,
        peak_voltage=None,
        voltage_limit=voltage_limit,
        limit_reached=None,
        stretch=0.0,
    )
