"""The contacts of a load in the circuit: those of all parts side by side, by Holm's constriction."""

from collections.abc import Mapping

from lineplanner.circuit.conductors import resistivity_at
from lineplanner.circuit.contacts import contact_resistance
from lineplanner.inputs.case import Case
from lineplanner.inputs.tables import Conductor
from lineplanner.load import Item, LoadAreas, conductor_named
from lineplanner.quantities import (
    COUNT,
    FORCE,
    RATIO,
    RESISTANCE,
    STRESS,
    Resistance,
    Resistivity,
    Temperature,
)
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

_SHARES = Source("current divided by carrying area; each item's contacts side by side", Status.DERIVED)
_HOLM = Source("R. Holm, Electric Contacts: constriction of one clean spot", Status.MEMORY)
# Which rows of the conductors table stand for a part's metal that has no row of its own name.
_STANDS_FOR: Mapping[str, str] = {"cast-iron": "steel", "stainless": "steel", "nickel": "steel"}


def part_conductor(conductors: tuple[Conductor, ...], metal: str) -> Conductor | None:
    """The conductors row for a part's metal: the worst of those named after it; None where there is none."""
    named = [c for c in conductors if c.name.startswith(metal)]
    like = named or [c for c in conductors if c.metal == _STANDS_FOR.get(metal, metal)]
    return max(like, key=lambda c: c.resistivity.value, default=None)


def contacts_element(
    case: Case, areas: LoadAreas
) -> tuple[tuple[Resistance, int, Figure] | None, tuple[str, ...]]:
    """Resistance, number and story of all contacts, and the items whose contacts are not known.

    An item that takes the share s of the current adds s^2 R1 / N: the mean drop by area.
    """
    resistance, paths = 0.0, 0
    figures: list[Figure] = []
    unknown: list[str] = []
    for item in areas.items:
        if item.carrying <= 0.0:
            continue
        one = _one(case, item)
        if one is None or item.contacts is None:
            unknown.append(item.name)
            continue
        share, count = item.carrying / areas.carrying, item.contacts * item.count
        resistance += share * share * one / count
        paths += count
        figures.append(_story(case, item, one, share, count))
    if not figures:
        return None, tuple(unknown)
    words = "each item's contacts by its share of the current"
    story = result("contacts", resistance, RESISTANCE, words, "R = sum s^2 R1 / N", _SHARES, *figures)
    return (resistance, paths, story), tuple(unknown)


def _at(row: Conductor, temperature: Temperature) -> Resistivity:
    return resistivity_at(
        resistivity=row.resistivity.value,
        coefficient=row.temperature_coefficient.value,
        temperature=temperature,
    )


def _one(case: Case, item: Item) -> Resistance | None:
    """One contact of an item; None where tip or part metal is not known."""
    part = part_conductor(case.tables.conductors, item.material.metal)
    if item.contacts is None or not item.contact_metal or part is None:
        return None
    limits, bath = case.tables.limits, case.bath.temperature
    return contact_resistance(
        force=limits.contact_force.value,
        hardness=limits.contact_hardness.value,
        first_resistivity=_at(conductor_named(case.tables.conductors, item.contact_metal), bath),
        second_resistivity=_at(part, bath),
    )


def _story(case: Case, item: Item, one: Resistance, share: float, count: int) -> Figure:
    limits = case.tables.limits
    force, hardness = limits.contact_force, limits.contact_hardness
    holm = result(
        f"{item.name}, one contact of {item.contact_metal}",
        one,
        RESISTANCE,
        "current pinched into the metal spot",
        "R1 = (rho1 + rho2) / (4 a), a = sqrt(F / (pi H))",
        _HOLM,
        given("force of one contact", force.value, FORCE, force.origin),
        given("hardness of the softer metal", hardness.value, STRESS, hardness.origin),
    )
    return result(
        f"{item.name}, contacts",
        share * share * one / count,
        RESISTANCE,
        "share of the current squared, over the number of contacts",
        "s^2 R1 / N",
        _SHARES,
        holm,
        given("share of the current", share, RATIO, _SHARES),
        given(
            "contacts", float(count), COUNT, Source(f"rack file {case.rack.name}, load file", Status.ENTERED)
        ),
    )
