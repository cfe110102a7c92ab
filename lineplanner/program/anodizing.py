"""Growth laws of the items of an anodizing load, and the volts they take."""

from dataclasses import dataclass

from lineplanner.bath.growth import film_rate, film_thickness
from lineplanner.bath.voltage import bath_drop, film_voltage
from lineplanner.load import Item
from lineplanner.program.growth import FilmLaw, family_of, film_law
from lineplanner.program.job import Job
from lineplanner.program.softstart import SoftStart
from lineplanner.program.stages import Polarity
from lineplanner.quantities import (
    Area,
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
