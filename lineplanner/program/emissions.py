"""Heat and gas of a run, and what the exhaust makes of the gas."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass

from lineplanner.bath.gas import hydrogen_flow, oxygen_flow
from lineplanner.bath.heat import REACTION_VOLTAGE, bath_heat_anodizing, bath_heat_chrome
from lineplanner.program.job import Job
from lineplanner.program.stages import Run, Stage
from lineplanner.quantities import (
    ATMOSPHERE,
    CURRENT,
    FLOW,
    ICE_POINT,
    POWER,
    VOLTAGE,
    Current,
    CurrentDensity,
    Flow,
    Power,
    Ratio,
    Voltage,
)
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

GAS_TEMPERATURE = ICE_POINT.value + 25.0  # K; the gas figures are stated at 25 degC and one atmosphere
_FARADAY = Source("Faraday's law and the ideal gas law, at 25 degC and 101325 Pa", Status.DERIVED)
_HEAT = Source("current x (volts at the tank + reaction volts)", Status.DERIVED)
_VOLTS = Source("voltage model of this program", Status.ASSUMPTION)
_OXYGEN = Source("charge that grows no film is taken to make oxygen", Status.ASSUMPTION)

# Current efficiency of chrome at a current density; None where the process is anodizing.
Efficiency = Callable[[CurrentDensity], Ratio | None]


@dataclass(frozen=True, slots=True, kw_only=True)
class Emissions:
    """Heat and gas of a run. None where no run could be made."""

    heat_peak: Power
    heat_mean: Power
    electrical_peak: Power
    hydrogen: Flow
    oxygen: Flow
    figures: Mapping[str, Figure]


def emissions_of(job: Job, run: Run, *, efficiency: Efficiency, film_share: Ratio) -> Emissions | None:
    """Heat into the bath and gas of a run; efficiency answers None for anodizing.

    film_share is the share of an anodizing charge that grows film, for the oxygen.
    """
    live = [s for s in run.stages if s.control != "off" and s.duration > 0.0]
    if not live:
        return None
    heats = [_heats(job, s, efficiency) for s in live]
    time = sum(s.duration for s in live)
    gases = [_gases(s, efficiency, film_share) for s in live]
    hydrogen_current = max(h for h, _ in gases)
    oxygen_current = max(o for _, o in gases)
    gas = {"temperature": GAS_TEMPERATURE, "pressure": ATMOSPHERE.value}
    hydrogen = hydrogen_flow(current=hydrogen_current, share=1.0, **gas)
    oxygen = oxygen_flow(current=oxygen_current, share=1.0, **gas)
    peak = max(max(h) for h in heats)
    mean = sum(0.5 * (h[0] + h[1]) * s.duration for h, s in zip(heats, live, strict=True)) / time
    electrical = max(max(s.from_current * s.from_voltage, s.to_current * s.to_voltage) for s in live)
    return Emissions(
        heat_peak=peak,
        heat_mean=mean,
        electrical_peak=electrical,
        hydrogen=hydrogen,
        oxygen=oxygen,
        figures=_figures(live, peak, mean, electrical, hydrogen, oxygen, hydrogen_current, oxygen_current),
    )


def _heats(job: Job, stage: Stage, efficiency: Efficiency) -> tuple[Power, Power]:
    """Heat into the bath at both ends of a stage, from the volts at the tank."""
    return (
        _heat(job, stage, stage.from_current, stage.from_voltage, efficiency),
        _heat(job, stage, stage.to_current, stage.to_voltage, efficiency),
    )


def _heat(job: Job, stage: Stage, current: Current, terminal: Voltage, efficiency: Efficiency) -> Power:
    if current <= 0.0:
        return 0.0
    at_tank = max(0.0, terminal - job.resistance * current)
    share = efficiency(current / job.areas.carrying)
    if share is None:
        return bath_heat_anodizing(current=current, voltage=at_tank)
    if stage.polarity != "work cathodic":
        share = 0.0
    return max(0.0, bath_heat_chrome(current=current, voltage=at_tank, efficiency=share))


def _gases(stage: Stage, efficiency: Efficiency, film_share: Ratio) -> tuple[Current, Current]:
    """The part of a stage's peak current that makes hydrogen, and the part that makes oxygen."""
    share = efficiency(stage.density)
    if share is None:
        return stage.peak, (1.0 - film_share) * stage.peak
    plating = stage.polarity == "work cathodic"
    return stage.peak * (1.0 - (share if plating else 0.0)), stage.peak


def _figures(
    live: list[Stage],
    peak: Power,
    mean: Power,
    electrical: Power,
    hydrogen: Flow,
    oxygen: Flow,
    hydrogen_current: Current,
    oxygen_current: Current,
) -> Mapping[str, Figure]:
    current = given(
        "peak current", max(s.peak for s in live), CURRENT, Source("program of this plan", Status.DERIVED)
    )
    volts = given("volts, estimate", max(max(s.from_voltage, s.to_voltage) for s in live), VOLTAGE, _VOLTS)
    reaction = given("reaction volts", REACTION_VOLTAGE.value, VOLTAGE, REACTION_VOLTAGE.source)
    share = given("hydrogen-making current", hydrogen_current, CURRENT, _FARADAY)
    oxygen_share = given("oxygen-making current", oxygen_current, CURRENT, _OXYGEN)
    law = "dV/dt = I R T / (z F p)"
    return {
        "heat.into_bath_peak_W": result(
            "heat into the bath, peak",
            peak,
            POWER,
            "current x (tank volts + reaction)",
            "P = I (V + E)",
            _HEAT,
            current,
            volts,
            reaction,
        ),
        "heat.into_bath_mean_W": result(
            "heat into the bath, mean",
            mean,
            POWER,
            "mean over the time with current on",
            "P = sum P t / sum t",
            _HEAT,
            current,
            volts,
            reaction,
        ),
        "heat.electrical_peak_W": result(
            "electrical power, peak",
            electrical,
            POWER,
            "current x terminal volts",
            "P = I V",
            _HEAT,
            current,
            volts,
        ),
        "gas.hydrogen_m3_per_h": result(
            "hydrogen", hydrogen, FLOW, "two electrons for each molecule", law, _FARADAY, share
        ),
        "gas.oxygen_m3_per_h": result(
            "oxygen", oxygen, FLOW, "four electrons for each molecule", law, _FARADAY, oxygen_share
        ),
    }
