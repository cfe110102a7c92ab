"""A program against the contacts of the parts: amperes of each contact, and how many there are."""

import math
from collections.abc import Iterator
from dataclasses import replace

from lineplanner.capacity.demand import firm_current, fitting_density, peak_current
from lineplanner.circuit.contacts import contacts_needed
from lineplanner.errors import Fact, Quantity
from lineplanner.findings import Finding, Level, lower, note, upper
from lineplanner.inputs.case import Case
from lineplanner.inputs.tables import ProcessDefaults
from lineplanner.load import Item, LoadAreas, conductor_named
from lineplanner.program.panel import panel_step
from lineplanner.program.stages import Run
from lineplanner.quantities import COUNT, CURRENT, CURRENT_DENSITY, CurrentDensity
from lineplanner.sources import Source, Status


def check_contacts(areas: LoadAreas, run: Run, process: ProcessDefaults, case: Case) -> tuple[Finding, ...]:
    """Each item's contacts at the highest current: a contact burns in seconds, so no peak is forgiven."""
    if areas.carrying <= 0.0:
        return ()
    density = peak_current(run) / areas.carrying
    return tuple(f for item in areas.items for f in _item(item, run, density, process, case))


def _item(
    item: Item, run: Run, density: CurrentDensity, process: ProcessDefaults, case: Case
) -> Iterator[Finding]:
    if item.carrying <= 0.0:
        return
    if item.contacts is None or item.contact_current is None:
        loose = Source(f"load file {case.load.name}", Status.ENTERED)
        yield note("contacts", "contacts.unknown", loose, "contacts.hang", part=item.name)
        return
    demand, each = density * item.largest_carrying, item.contact_current
    limit = item.contacts * each
    facts: dict[str, Fact] = {
        "part": item.name,
        "contacts": item.contacts,
        "needed": max(contacts_needed(demand, each), math.ceil(process.contacts_each.value)),
        "each": Quantity(each, CURRENT),
        "metal": item.contact_metal,
        "demand": Quantity(demand, CURRENT),
        "allowed": Quantity(limit, CURRENT),
    }
    step = panel_step(run.rectifier) if run.rectifier is not None else 0.0
    fitting = fitting_density(run, peak_current(run) * limit / demand, step=step) if demand > 0.0 else None
    if fitting is not None:
        facts["density"] = Quantity(fitting, CURRENT_DENSITY, at_most=True)
    finding = upper(
        "contacts",
        value=demand,
        limit=limit,
        kind=CURRENT,
        source=_origin(item, case),
        key="contacts",
        fix="contacts.more" if demand > limit else "contacts.near",
        demand_firm=firm_current(run),
    )
    yield replace(finding, facts=facts)
    number = lower(
        "contacts-number",
        value=float(item.contacts),
        limit=process.contacts_each.value,
        kind=COUNT,
        source=process.contacts_each.origin,
        key="contacts-number",
        fix="contacts-number.more",
    )
    if number.level is Level.OK:  # a count that is enough is no margin that could bind
        number = replace(number, margin=None)
    yield replace(number, facts={"part": item.name, "contacts": item.contacts, "needed": facts["needed"]})


def _origin(item: Item, case: Case) -> Source:
    """Who says what one contact carries: the rack file, or the conductors table."""
    row = conductor_named(case.tables.conductors, item.contact_metal)
    if item.contact_current == row.contact_current.value:
        return row.contact_current.origin
    return Source(f"rack file {case.rack.name}, rated current of a contact", Status.ENTERED)
