"""How well the bath conducts: table by strength and temperature, dissolved metals, strength by weight."""

from itertools import pairwise

from lineplanner.bath.faraday import ALUMINIUM, CHROMIC_ACID, CHROMIUM, IRON, SULFURIC_ACID
from lineplanner.errors import InputError, Quantity
from lineplanner.inputs.tables import ConductivityRow, ConductivityTable
from lineplanner.quantities import CONCENTRATION, Concentration, Conductivity, Ratio, Temperature

# Weight share and kg/m^3 of sulfuric acid at 20 degC, from the density model that acid_wt_fraction names.
_STRENGTHS = (
    (0.00, 0.0),
    (0.05, 51.60),
    (0.10, 106.69),
    (0.15, 165.46),
    (0.20, 228.08),
    (0.25, 294.77),
    (0.30, 365.77),
    (0.35, 441.33),
    (0.40, 521.74),
    (0.45, 607.30),
    (0.50, 698.36),
)


def _at(row: ConductivityRow, temperature: Temperature) -> Conductivity:
    return row.base.conductivity * (1.0 + row.coefficient * (temperature - row.base.temperature))


def bath_conductivity(
    *, strength: Concentration, temperature: Temperature, table: ConductivityTable
) -> Conductivity:
    """How well the bath conducts.

        kappa(c, T) = kappa0(c) (1 + a(c) (T - T0)), a straight line in c between the rows

    Parameters
        strength: c, free sulfuric acid or chromic acid [kg/m^3]
        temperature: T, of the bath [K]
        table: kappa0, a and T0 for each strength
    Returns
        kappa [S/m]
    Valid
        between the first and the last row; see outside_table. Weaker acid: in proportion from zero, some 10 %
        low; stronger: the last row. Far below the base temperature the straight line is an extrapolation
    Source
        the source of the table
    Example
        >>> from types import SimpleNamespace as N
        >>> def row(c, kappa):
        ...     return N(strength=c, base=N(temperature=293.15, conductivity=kappa), coefficient=0.013)
        >>> table = N(rows=(row(100.0, 40.0), row(200.0, 60.0)))
        >>> round(bath_conductivity(strength=150.0, temperature=293.15, table=table), 6)
        50.0
    """
    rows = table.rows
    if strength <= rows[0].strength:
        return _at(rows[0], temperature) * strength / rows[0].strength
    for low, high in pairwise(rows):
        if strength <= high.strength:
            share = (strength - low.strength) / (high.strength - low.strength)
            return (1.0 - share) * _at(low, temperature) + share * _at(high, temperature)
    return _at(rows[-1], temperature)


def outside_table(strength: Concentration, table: ConductivityTable) -> bool:
    """Whether a strength lies outside the rows of the table, so that the conductivity is no interpolation."""
    return not table.rows[0].strength <= strength <= table.rows[-1].strength


def acid_bound(aluminium: Concentration) -> Concentration:
    """How much sulfuric acid the dissolved aluminium binds.

        c = 3 M(H2SO4) / (2 M(Al)) c_Al

    Parameters
        aluminium: c_Al, dissolved [kg/m^3]
    Returns
        c, total less free acid [kg/m^3]
    Valid
        aluminium as its sulfate
    Source
        stoichiometry of aluminium sulfate
    Example
        10 g/L aluminium:

        >>> round(acid_bound(10.0), 1)
        54.5
    """
    return 1.5 * SULFURIC_ACID.value / ALUMINIUM.value * aluminium


def conductivity_with_aluminium(
    *, conductivity: Conductivity, aluminium: Concentration, relative_loss: float
) -> Conductivity:
    """How well a sulfuric bath conducts with aluminium in it, at the same free acid.

        kappa = kappa0 (1 - b c_Al)

    Parameters
        conductivity: kappa0, of the free acid alone [S/m]
        aluminium: c_Al, dissolved [kg/m^3]
        relative_loss: b, relative loss for each g/L [m^3/kg]
    Returns
        kappa [S/m]
    Raises
        InputError conductivity.aluminium where the straight line leaves nothing
    Valid
        up to about 25 g/L
    Source
        common practice; the loss is a value the site may enter
    Example
        >>> round(conductivity_with_aluminium(conductivity=55.8, aluminium=10.0, relative_loss=0.012), 2)
        49.1
    """
    share = 1.0 - relative_loss * aluminium
    if share <= 0.0:
        raise InputError("conductivity.aluminium", aluminium=Quantity(aluminium, CONCENTRATION))
    return conductivity * share


def conductivity_with_metals(
    *,
    conductivity: Conductivity,
    chromic_acid: Concentration,
    trivalent_chromium: Concentration,
    iron: Concentration,
) -> Conductivity:
    """How well a chrome bath conducts with trivalent chromium and iron in it.

        kappa = kappa0 (1 - 3 (c3 / M(Cr) + cFe / M(Fe)) / (c / M(CrO3)))

    Parameters
        conductivity: kappa0, of the clean bath [S/m]
        chromic_acid: c, in the bath [kg/m^3]
        trivalent_chromium: c3, in the bath [kg/m^3]
        iron: cFe, in the bath [kg/m^3]
    Returns
        kappa, lowest that it can be: each metal ion ties up three hydrogen ions [S/m]
    Raises
        InputError conductivity.metals where the metals tie up all acid
    Valid
        metals well below the acid; a bound, so the volts come out high
    Source
        charge balance; one hydrogen ion for each chromium of the acid
    Example
        10 g/L iron in 250 g/L:

        >>> round(conductivity_with_metals(
        ...     conductivity=56.0, chromic_acid=250.0, trivalent_chromium=0.0, iron=10.0), 2)
        43.97
    """
    tied = 3.0 * (trivalent_chromium / CHROMIUM.value + iron / IRON.value)
    share = 1.0 - tied * CHROMIC_ACID.value / chromic_acid
    if share <= 0.0:
        raise InputError(
            "conductivity.metals",
            trivalent_chromium=Quantity(trivalent_chromium, CONCENTRATION),
            iron=Quantity(iron, CONCENTRATION),
        )
    return conductivity * share


def acid_wt_fraction(acid: Concentration) -> Ratio:
    """What weight share of sulfuric acid a strength in grams per litre is, at 20 degC.

        w = c / rho, a straight line between the rows of the density table

    Parameters
        acid: c, sulfuric acid [kg/m^3]
    Returns
        w, weight share [1]
    Raises
        InputError acid.strength above the last row
    Valid
        0 to 50 % by weight without dissolved metal
    Source
        Laliberte, J. Chem. Eng. Data 54, 2009, p. 1725: density model of aqueous solutions with the
        coefficients carried by the thermo package 0.6 (read there), worked at 20 degC
    Example
        >>> round(acid_wt_fraction(165.5) * 100, 1)
        15.0
    """
    if not 0.0 <= acid <= _STRENGTHS[-1][1]:
        raise InputError("acid.strength", acid=Quantity(acid, CONCENTRATION))
    for (low, start), (high, end) in pairwise(_STRENGTHS):
        if acid <= end:
            return low + (high - low) * (acid - start) / (end - start)
    return _STRENGTHS[-1][0]
