"""The recipe as the load runs it: its changes put in; the bath at the temperature of the run."""

from dataclasses import replace

from lineplanner.bath.conductivity import (
    bath_conductivity,
    conductivity_with_aluminium,
    conductivity_with_metals,
)
from lineplanner.inputs.bath import Bath
from lineplanner.inputs.case import Case
from lineplanner.inputs.change import apply_change
from lineplanner.inputs.tables import ConductivityTable, ProcessDefaults
from lineplanner.load import LoadAreas
from lineplanner.program.aims import aims_of
from lineplanner.program.job import Job
from lineplanner.quantities import Conductivity, Resistance


def as_run(case: Case) -> Case:
    """The case with the load's changes in its recipe, and the bath at the load's temperature if it names one."""
    change = case.load.change
    if change is None:
        return case
    bath = case.bath if change.temperature is None else replace(case.bath, temperature=change.temperature)
    return replace(case, recipe=apply_change(case.recipe, change), bath=bath)


def process_of(case: Case) -> ProcessDefaults:
    """The processes-table row of the recipe; reading a site has checked that it exists."""
    return next(row for row in case.tables.processes if row.name == case.recipe.process)


def job_of(case: Case, process: ProcessDefaults, areas: LoadAreas, resistance: Resistance) -> Job:
    """Load, recipe, bath and circuit as one job."""
    return Job(
        case=case,
        recipe=case.recipe,
        process=process,
        areas=areas,
        aims=aims_of(case.recipe, process),
        resistance=resistance,
        conductivity=conductivity_of(case.bath, case.tables.conductivity),
    )


def conductivity_of(bath: Bath, tables: tuple[ConductivityTable, ...]) -> Conductivity:
    """How well the bath conducts as it is: by its main acid, less for dissolved metal, times the shop's factor.

        kappa = k kappa_table(c, T), less for dissolved metal

    Parameters
        bath: acid, metals, temperature T and the shop's own factor k
        tables: one for sulfuric, one for chromic acid
    Returns
        kappa [S/m]
    Valid
        as the tables
    Source
        bath.conductivity
    Example
        >>> from lineplanner.inputs.tables import ConductivityPoint, ConductivityRow, ConductivityTable
        >>> from lineplanner.sources import Status
        >>> row = ConductivityRow(strength=165.3, coefficient=0.0136,
        ...     base=ConductivityPoint(temperature=291.15, conductivity=54.32))
        >>> table = ConductivityTable(acid="sulfuric", rows=(row,), uncertainty=0.1, source="", status=Status.MEMORY)
        >>> bath = Bath(name="b", kind="sulfuric", temperature=293.15, sulfuric_acid=165.3)
        >>> round(conductivity_of(bath, (table,)), 1)
        55.8
    """
    chromic = bath.chromic_acid is not None and bath.chromic_acid > 0.0
    table = next(t for t in tables if t.acid == ("chromic" if chromic else "sulfuric"))
    strength = bath.chromic_acid if chromic else bath.sulfuric_acid
    plain = bath_conductivity(strength=strength or 0.0, temperature=bath.temperature, table=table)
    if chromic and bath.kind == "chrome" and bath.chromic_acid is not None:
        plain = conductivity_with_metals(
            conductivity=plain,
            chromic_acid=bath.chromic_acid,
            trivalent_chromium=bath.trivalent_chromium or 0.0,
            iron=bath.iron or 0.0,
        )
    elif not chromic and bath.dissolved_aluminium:
        plain = conductivity_with_aluminium(
            conductivity=plain, aluminium=bath.dissolved_aluminium, relative_loss=table.aluminium_loss
        )
    return plain * bath.conductivity_factor
