"""Faraday's law: what mass and what thickness a charge makes of a metal or an oxide."""

from dataclasses import dataclass

from lineplanner.quantities import FARADAY, Density, Equivalent, Growth, MolarMass, Ratio
from lineplanner.sources import Constant, Source, Status

_WEIGHTS = Source(
    "IUPAC standard atomic weights, abridged values, as carried by the periodictable package 2.1",
    Status.PUBLISHED,
)
_SUM = Source("sum of IUPAC standard atomic weights", Status.DERIVED)


def _weight(element: str, value: float) -> Constant:
    return Constant(f"molar mass of {element}", value, "kg/mol", _WEIGHTS)


def _sum(compound: str, value: float) -> Constant:
    return Constant(f"molar mass of {compound}", value, "kg/mol", _SUM)


HYDROGEN = _weight("hydrogen", 1.008e-3)
OXYGEN = _weight("oxygen", 15.999e-3)
ALUMINIUM = _weight("aluminium", 26.9815384e-3)
SULFUR = _weight("sulfur", 32.06e-3)
CHROMIUM = _weight("chromium", 51.9961e-3)
IRON = _weight("iron", 55.845e-3)
ALUMINA = _sum("aluminium oxide", 2.0 * ALUMINIUM.value + 3.0 * OXYGEN.value)
CHROMIC_ACID = _sum("chromium trioxide", CHROMIUM.value + 3.0 * OXYGEN.value)
SULFURIC_ACID = _sum("sulfuric acid", 2.0 * HYDROGEN.value + SULFUR.value + 4.0 * OXYGEN.value)

ALUMINIUM_DENSITY = Constant(
    "density of aluminium at 20 degC",
    2700.0,
    "kg/m^3",
    Source("element table of the periodictable package 2.1: 2.6989 g/cm3, rounded", Status.PUBLISHED),
)


def mass_per_charge(*, electrons: Ratio, molar_mass: MolarMass) -> Equivalent:
    """What mass one coulomb makes or dissolves when no charge is lost.

        E = M / (z F)

    Parameters
        electrons: z, electrons for each formula unit [1]
        molar_mass: M, of that formula unit [kg/mol]
    Returns
        E, mass for each coulomb [kg/C]
    Valid
        any electrode reaction at full efficiency
    Source
        Faraday's law of electrolysis; Faraday constant from the SI defining constants
    Example
        Hard chrome, grams for each ampere-hour:

        >>> round(mass_per_charge(electrons=6, molar_mass=51.9961e-3) * 1000 * 3600, 6)
        0.323341
    """
    return molar_mass / (electrons * FARADAY.value)


def thickness_per_charge(*, electrons: Ratio, molar_mass: MolarMass, density: Density) -> Growth:
    """What thickness one coulomb on a square metre makes when no charge is lost.

        k = M / (z F rho)

    Parameters
        electrons: z, electrons for each formula unit [1]
        molar_mass: M, of that formula unit [kg/mol]
        density: rho, of the layer as it lies on the part, pores and cracks included [kg/m^3]
    Returns
        k, thickness times area for each coulomb [m^3/C]
    Valid
        an even layer at full efficiency
    Source
        Faraday's law of electrolysis
    Example
        Hard chrome of 7.1 g/cm3, one hour at 1 A/dm2, in um:

        >>> k = thickness_per_charge(electrons=6, molar_mass=51.9961e-3, density=7100.0)
        >>> round(k * 100.0 * 3600 * 1e6, 3)
        4.554
    """
    return mass_per_charge(electrons=electrons, molar_mass=molar_mass) / density


@dataclass(frozen=True, slots=True)
class Couple:
    """An electrode reaction: what is made or dissolved, by how many electrons."""

    name: str
    electrons: float
    molar_mass: Constant
    density: Constant | None = None

    @property
    def equivalent(self) -> Equivalent:
        """Mass for each coulomb [kg/C]."""
        return mass_per_charge(electrons=self.electrons, molar_mass=self.molar_mass.value)

    def growth(self, density: Density | None = None) -> Growth:
        """Thickness for each coulomb on a square metre [m^3/C], at the density given or the couple's own."""
        if density is None:
            if self.density is None:
                raise ValueError(f"{self.name} has no density of its own")
            density = self.density.value
        return self.equivalent / density


CHROMIUM_DEPOSIT = Couple("chromium from chromic acid", 6.0, CHROMIUM)
ALUMINIUM_OXIDISED = Couple("aluminium to its ion or oxide", 3.0, ALUMINIUM, ALUMINIUM_DENSITY)
OXIDE_FORMED = Couple("aluminium oxide", 6.0, ALUMINA)
