"""Heat and gas of a run, and what the exhaust makes of the gas."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass

from lineplanner.bath.gas import hydrogen_flow, oxygen_flow
from lineplanner.bath.heat import (
    REACTION_VOLTAGE,
    WATER_VOLTAGE,
    bath_heat_anodizing,
    bath_heat_chrome,
    cooling_heat_chrome,
)
from lineplanner.program.job import Job
from lineplanner.program.stages import Run, Stage
from lineplanner.quantities import (
    ATMOSPHERE,
    CURRENT,
    FLOW,
    ICE_POINT,
    POWER,
    TIME,
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
_HEAT = Source(
    "current x (volts at the tank and of the reaction); the volts are estimates", Status.ASSUMPTION
)
_VOLTS = Source("voltage model of this program", Status.ASSUMPTION)
_OXYGEN = Source("charge that grows no film is taken to make oxygen", Status.ASSUMPTION)

# Current efficiency of chrome at a current density; None where the process is anodizing.
Efficiency = Callable[[CurrentDensity], Ratio | None]


@dataclass(frozen=True, slots=True, kw_only=True)
class Emissions:
    """Heat and gas of a run; to_cool is what the cooling has to take: no mere moment, no credit for the reaction."""

    heat_peak: Power
    to_cool: Power
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
    chrome = job.process.name == "chrome-hard"
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
        to_cool=_to_cool(job, live, heats, efficiency),
        heat_mean=mean,
        electrical_peak=electrical,
        hydrogen=hydrogen,
        oxygen=oxygen,
        figures=_figures(
            live,
            heats,
            (peak, mean, electrical),
            (hydrogen, oxygen),
            (hydrogen_current, oxygen_current),
            chrome=chrome,
        ),
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


def _to_cool(job: Job, live: list[Stage], heats: list[tuple[Power, Power]], efficiency: Efficiency) -> Power:
    """The highest heat that lasts longer than a short time; in chrome the whole of the electrical power at the tank."""
    short = job.tables.limits.overload_time.value
    lasting = [i for i, s in enumerate(live) if s.duration > short] or list(range(len(live)))
    if efficiency(live[-1].density) is None:
        return max(max(heats[i]) for i in lasting)
    return max(_electrical(job, live[i]) for i in lasting)


def _electrical(job: Job, stage: Stage) -> Power:
    """Electrical power at the tank, circuit left out, at the hotter end of a stage."""
    ends = ((stage.from_current, stage.from_voltage), (stage.to_current, stage.to_voltage))
    return max(cooling_heat_chrome(current=i, voltage=max(0.0, v - job.resistance * i)) for i, v in ends)


def _gases(stage: Stage, efficiency: Efficiency, film_share: Ratio) -> tuple[Current, Current]:
    """The part of a stage's peak current that makes hydrogen, and the part that makes oxygen."""
    share = efficiency(stage.density)
    if share is None:
        return stage.peak, (1.0 - film_share) * stage.peak
    plating = stage.polarity == "work cathodic"
    return stage.peak * (1.0 - (share if plating else 0.0)), stage.peak


def _figures(
    live: list[Stage],
    ends: list[tuple[Power, Power]],
    heats: tuple[Power, Power, Power],
    gases: tuple[Flow, Flow],
    currents: tuple[Current, Current],
    *,
    chrome: bool,
) -> Mapping[str, Figure]:
    """Peak, mean and electrical heat, hydrogen and oxygen, with the currents that make them."""
    plan = Source("program of this plan", Status.DERIVED)
    current = given("peak current", max(s.peak for s in live), CURRENT, plan)
    volts = given("volts, estimate", max(max(s.from_voltage, s.to_voltage) for s in live), VOLTAGE, _VOLTS)
    constant = WATER_VOLTAGE if chrome else REACTION_VOLTAGE
    reaction = given("reaction volts", constant.value, VOLTAGE, constant.source)
    words = "current x (tank volts - reaction)" if chrome else "current x (tank volts + reaction)"
    power = "P = I (V - E)" if chrome else "P = I (V + E)"
    law = "dV/dt = I R T / (z F p)"
    share = given("hydrogen-making current", currents[0], CURRENT, _FARADAY)
    oxygen = given("oxygen-making current", currents[1], CURRENT, _FARADAY if chrome else _OXYGEN)
    peak = result("heat into the bath, peak", heats[0], POWER, words, power, _HEAT, current, volts, reaction)
    parts = [
        figure
        for stage, (first, last) in zip(live, ends, strict=True)
        for figure in (
            given(f"{stage.stage}, mean heat", 0.5 * (first + last), POWER, _HEAT),
            given(f"{stage.stage}, time", stage.duration, TIME, plan),
        )
    ]
    words_of_mean = "heat of each stage by its time, over the time with current on"
    mean = result(
        "heat into the bath, mean", heats[1], POWER, words_of_mean, "sum P t / sum t", _HEAT, *parts
    )
    electrical = result(
        "electrical power, peak",
        heats[2],
        POWER,
        "current x terminal volts",
        "P = I V",
        _HEAT,
        current,
        volts,
    )
    return {
        "heat.into_bath_peak_W": peak,
        "heat.into_bath_mean_W": mean,
        "heat.electrical_peak_W": electrical,
        "gas.hydrogen_m3_per_h": result(
            "hydrogen", gases[0], FLOW, "two electrons a molecule", law, _FARADAY, share
        ),
        "gas.oxygen_m3_per_h": result(
            "oxygen", gases[1], FLOW, "four electrons a molecule", law, _FARADAY, oxygen
        ),
    }
