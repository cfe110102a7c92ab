"""The circuit of a load, rectifier to part: its elements in series, each with its resistance and story."""

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Literal

from lineplanner.circuit.conductors import bar_resistance, resistivity_at
from lineplanner.circuit.rack import RackPath, rack_paths
from lineplanner.circuit.touch import contacts_element
from lineplanner.inputs.case import Case
from lineplanner.inputs.line import Bus, FlightBar, Joint
from lineplanner.inputs.tables import ProcessDefaults
from lineplanner.load import LoadAreas, conductor_named
from lineplanner.quantities import (
    COUNT,
    ICE_POINT,
    LENGTH,
    RATIO,
    RESISTANCE,
    RESISTIVITY,
    TEMPERATURE,
    Area,
    Current,
    Resistance,
    Resistivity,
    Temperature,
    Voltage,
)
from lineplanner.sources import Source, Status, weakest
from lineplanner.trace import Figure, given, result

Role = Literal["bus", "joint", "saddle", "flight bar", "rack", "contacts"]

_SERIES = Source("resistances in series", Status.DERIVED)
_BAR = Source("Ohm's law for a bar, resistivity at its working temperature", Status.DERIVED)
_BAR_TEMPERATURE = Source("flight bar taken as warm as the hotter of bath and shop air", Status.ASSUMPTION)
_BUS_TEMPERATURE = Source("bus taken as warm as in hot shop air", Status.ASSUMPTION)
_SHOP_AIR = ICE_POINT.value + 40.0  # K
_UNIFORM = Source("bar loaded evenly along its length", Status.DERIVED)
# Far-end drop of a bar loaded evenly, against the drop of the whole current through the whole bar.
FED_SHARE = {"one end": 0.5, "both ends": 0.125}


@dataclass(frozen=True, slots=True, kw_only=True)
class Element:
    """One element in series. section is that of all its paths together; None where it is not a bar."""

    name: str
    role: Role
    resistance: Resistance
    section: Area | None
    paths: int
    figure: Figure


@dataclass(frozen=True, slots=True, kw_only=True)
class Circuit:
    """Rectifier terminals to parts. `missing` names what was not entered and so is not counted."""

    elements: tuple[Element, ...]
    missing: tuple[str, ...]

    @property
    def resistance(self) -> Resistance:
        return sum(e.resistance for e in self.elements)

    def of(self, *roles: Role) -> tuple[Element, ...]:
        """The elements of some roles, in the order of the circuit."""
        return tuple(e for e in self.elements if e.role in roles)

    def drop(self, current: Current) -> Voltage:
        """Volts lost between rectifier terminals and part.

            U = I sum R

        Parameters
            current: I, of the whole load [A]
        Returns
            U [V]
        Valid
            elements in `missing` are not in it
        Source
            Ohm's law
        Example
            >>> Circuit(elements=(), missing=("bus",)).drop(1000.0)
            0.0
        """
        return current * self.resistance

    @property
    def figure(self) -> Figure:
        """Resistance of the circuit with all that it is made of."""
        return result(
            "resistance from rectifier to part",
            self.resistance,
            RESISTANCE,
            "elements in series added",
            "R = R_bus + R_joints + R_bar + R_rack + R_contacts",
            _SERIES,
            *(e.figure for e in self.elements),
        )


def circuit_of(case: Case, areas: LoadAreas, process: ProcessDefaults) -> Circuit:  # noqa: ARG001
    """The circuit that feeds a load. Nothing is assumed in place of what was not entered: it is named."""
    tank = case.tank
    elements = [_bus(bus, case) for bus in tank.bus]
    elements += [_joint(joint, case) for joint in tank.joints]
    missing = [name for name, entered in (("bus", tank.bus), ("joints", tank.joints)) if not entered]
    if tank.flight_bar is None:
        missing.append("flight bar")
    else:
        elements.append(_flight_bar(tank.flight_bar, case))
    hooks, splines = rack_paths(case, "hook"), rack_paths(case, "spline")
    elements += [_rack(path) for path in (hooks, splines) if path is not None]
    missing += [name for name, path in (("rack hooks", hooks), ("rack splines", splines)) if path is None]
    contacts, unknown = contacts_element(case, areas)
    if contacts is not None:
        resistance, paths, figure = contacts
        elements.append(
            Element(
                name="contacts",
                role="contacts",
                resistance=resistance,
                section=None,
                paths=paths,
                figure=figure,
            )
        )
    missing += ["contacts"] if contacts is None else [f"contacts of {name}" for name in unknown]
    return Circuit(elements=tuple(elements), missing=tuple(missing))


def _warm(case: Case, conductor: str, temperature: Temperature, source: Source) -> tuple[Resistivity, Figure]:
    """Resistivity of a table row at a working temperature, with its story."""
    row = conductor_named(case.tables.conductors, conductor)
    rho = resistivity_at(
        resistivity=row.resistivity.value,
        coefficient=row.temperature_coefficient.value,
        temperature=temperature,
    )
    status = weakest(row.resistivity.status, row.temperature_coefficient.status)
    cold = given(
        f"resistivity of {conductor} at 20 degC", row.resistivity.value, RESISTIVITY, row.resistivity.origin
    )
    at = given("working temperature", temperature, TEMPERATURE, source)
    law = Source("IEC 60028, linear law", status)
    words, formula = "resistivity at the metal's temperature", "rho = rho20 (1 + alpha (T - T20))"
    return rho, result(f"resistivity of {conductor}, warm", rho, RESISTIVITY, words, formula, law, cold, at)


def _entered(case: Case) -> Source:
    return Source(f"line file {case.line.name}, tank {case.tank.name}", Status.ENTERED)


def _sizes(case: Case, bar: Bus | FlightBar) -> Iterator[Figure]:
    for label, value in (("length", bar.length), ("width", bar.width), ("thickness", bar.thickness)):
        yield given(label, value, LENGTH, _entered(case))


def _bus(bus: Bus, case: Case) -> Element:
    warm = (_SHOP_AIR, _BUS_TEMPERATURE) if bus.temperature is None else (bus.temperature, _entered(case))
    rho, story = _warm(case, bus.conductor, *warm)
    section = bus.width * bus.thickness * bus.bars
    resistance = bar_resistance(resistivity=rho, length=bus.length, section=section)
    bars = given("bars side by side", float(bus.bars), COUNT, _entered(case))
    words = "both poles' length over the section of all bars"
    inputs = (story, *_sizes(case, bus), bars)
    figure = result(f"bus {bus.name}", resistance, RESISTANCE, words, "R = rho L / (n w t)", _BAR, *inputs)
    return Element(
        name=bus.name, role="bus", resistance=resistance, section=section, paths=bus.bars, figure=figure
    )


def _joint(joint: Joint, case: Case) -> Element:
    resistance = joint.resistance * joint.count / joint.parallel
    entered = _entered(case)
    inputs = (
        given("resistance of one", joint.resistance, RESISTANCE, entered),
        given("in series", float(joint.count), COUNT, entered),
        given("side by side", float(joint.parallel), COUNT, entered),
    )
    words = "in series added, side by side divided"
    figure = result(f"joint {joint.name}", resistance, RESISTANCE, words, "R = n R1 / p", _SERIES, *inputs)
    role: Role = "saddle" if joint.type == "saddle" else "joint"
    return Element(
        name=joint.name, role=role, resistance=resistance, section=None, paths=joint.parallel, figure=figure
    )


def _flight_bar(bar: FlightBar, case: Case) -> Element:
    """The bar with its load spread evenly: what counts is the drop to the far end, or to the middle."""
    warmest = max(case.bath.temperature, case.site.ambient)
    rho, story = _warm(case, bar.conductor, warmest, _BAR_TEMPERATURE)
    section = bar.width * bar.thickness
    whole = bar_resistance(resistivity=rho, length=bar.length, section=section)
    share = FED_SHARE[bar.fed]
    inputs = (story, *_sizes(case, bar), given(f"fed at {bar.fed}", share, RATIO, _UNIFORM))
    words, formula = "bar between the saddles, load spread evenly", "R = k rho L / (w t), k = 1/2 or 1/8"
    figure = result("flight bar", share * whole, RESISTANCE, words, formula, _UNIFORM, *inputs)
    return Element(
        name="flight bar",
        role="flight bar",
        resistance=share * whole,
        section=section,
        paths=1,
        figure=figure,
    )


def _rack(path: RackPath) -> Element:
    return Element(
        name=path.name,
        role="rack",
        resistance=path.resistance,
        section=path.section,
        paths=path.paths,
        figure=path.figure,
    )
