"""Growth of anodic film: the 720 rule, growth with loss, weight, build-up."""

from lineplanner.bath.faraday import ALUMINIUM_OXIDISED, OXIDE_FORMED
from lineplanner.inputs.tables import GrowthLaw
from lineplanner.quantities import (
    ICE_POINT,
    ChargeDensity,
    Concentration,
    CurrentDensity,
    Density,
    Growth,
    Rate,
    Ratio,
    SurfaceMass,
    Temperature,
    Thickness,
    Time,
)
from lineplanner.sources import Constant, Source, Status

_RULE = Source(
    "S. Westre, How to Apply the 720 Rule to Current Density Anodizing, Products Finishing: formula, table",
    Status.PUBLISHED,
)
_MIL = 25.4e-6  # m, exact
_SQUARE_FOOT = 0.3048**2  # m^2, exact

RULE_720 = Constant("720 rule", 720.0, "A min/(ft2 mil)", _RULE)
GROWTH_720 = Constant(
    "growth per charge of the 720 rule",
    _MIL / (RULE_720.value * 60.0 / _SQUARE_FOOT),
    "m^3/C",
    Source(f"{_RULE.title}; converted to SI", Status.DERIVED),
)
LOSS_TEMPERATURE = Constant(
    "temperature at which the loss of the growth law is stated",
    ICE_POINT.value + 20.0,
    "K",
    Source("definition of the growth law", Status.DERIVED),
)


def film_rate(
    *, current_density: CurrentDensity, growth: Growth, alloy_factor: Ratio, dissolution: Rate
) -> Rate:
    """How fast a film thickens; below zero it goes back faster than it grows.

        dh/dt = f K j - v

    Parameters
        current_density: j, per carrying area [A/m^2]
        growth: K, thickness per charge before loss [m^3/C]
        alloy_factor: f, growth of this alloy against the rule [1]
        dissolution: v, effective loss to the acid; 0 for the 720 rule [m/s]
    Returns
        dh/dt, per side; negative means no time reaches any thickness [m/s]
    Valid
        steady current; growth and loss in the range their source covers
    Source
        time derivative of the film thickness law; see film_thickness
    Example
        The 720 rule at 12 A/ft2, minutes for one mil:

        >>> rate = film_rate(
        ...     current_density=12 / 0.3048**2, growth=GROWTH_720.value, alloy_factor=1.0, dissolution=0.0
        ... )
        >>> round(25.4e-6 / rate / 60, 6)
        60.0
    """
    return alloy_factor * growth * current_density - dissolution


def film_thickness(
    *, charge_density: ChargeDensity, time: Time, growth: Growth, alloy_factor: Ratio, dissolution: Rate
) -> Thickness:
    """How thick a film is after a charge and a time.

        h = f K q - v t

    Parameters
        charge_density: q, charge per carrying area [C/m^2]
        time: t, time in the acid with current on [s]
        growth: K, thickness per charge before loss [m^3/C]
        alloy_factor: f, growth of this alloy against the rule [1]
        dissolution: v, effective loss to the acid; 0 for the 720 rule [m/s]
    Returns
        h, total thickness per side; 0 where the loss has taken it all [m]
    Valid
        any current program, through its charge; constant temperature and acid. The loss shows first as a
        softer outer film
    Source
        720 rule: S. Westre, Products Finishing (read). Growth with loss: model of this program (assumption)
    Example
        60 minutes at 12 A/ft2 by the 720 rule, in um:

        >>> q = 12 / 0.3048**2 * 3600
        >>> h = film_thickness(
        ...     charge_density=q, time=3600, growth=GROWTH_720.value, alloy_factor=1.0, dissolution=0.0
        ... )
        >>> round(h * 1e6, 3)
        25.4
    """
    return max(0.0, alloy_factor * growth * charge_density - dissolution * time)


def dissolution_rate(*, temperature: Temperature, acid: Concentration, law: GrowthLaw) -> Rate:
    """How fast the acid takes film back.

        v = v20 (c / c0)^n 2^((T - 20 degC) / dT)

    Parameters
        temperature: T, of the bath [K]
        acid: c, free sulfuric acid; 0 in a bath without it, then there is no loss [kg/m^3]
        law: v20, c0, n and dT of the growth table
    Returns
        v, effective loss of thickness [m/s]
    Valid
        sulfuric baths near the reference acid, about -5 to 25 degC; outside it is an extrapolation
    Source
        model of this program (assumption); that dissolution rises with temperature and acid: Mason and
        Fowle, J. Electrochem. Soc. 101, 1954, p. 53 (from memory)
    Example
        >>> from types import SimpleNamespace as N
        >>> law = N(dissolution=N(value=0.03e-6 / 60), doubling=N(value=10.0),
        ...         acid_reference=N(value=165.0), acid_power=N(value=1.0))
        >>> round(dissolution_rate(temperature=303.15, acid=165.0, law=law) * 1e6 * 60, 3)
        0.06
    """
    if acid <= 0.0:
        return 0.0
    strength = (acid / law.acid_reference.value) ** law.acid_power.value
    warmth = (temperature - LOSS_TEMPERATURE.value) / law.doubling.value
    return float(law.dissolution.value * strength * 2.0**warmth)


def soft_share(*, thickness: Thickness, time: Time, dissolution: Rate) -> Ratio:
    """What the acid has taken against the film that is left: the mark of a soft outer film.

        s = v t / h

    Parameters
        thickness: h, per side [m]
        time: t, time in the acid with current on [s]
        dissolution: v, effective loss to the acid [m/s]
    Returns
        s, loss over thickness; infinite where a loss leaves no film, 0 without a loss [1]
    Valid
        as the growth law it comes from
    Source
        ratio of the two terms of the film thickness law
    Example
        Two hours at 0.03 um/min, 23.6 um left:

        >>> round(soft_share(thickness=23.6e-6, time=7200, dissolution=0.03e-6 / 60), 4)
        0.1525
    """
    loss = dissolution * time
    if loss <= 0.0:
        return 0.0
    return loss / thickness if thickness > 0.0 else float("inf")


def retained_yield(apparent_density: Density, growth: Growth = GROWTH_720.value) -> Ratio:
    """What share of the oxide that the charge could make stays on the part.

        y = rho K / E        E = M(Al2O3) / (6 F)

    Parameters
        apparent_density: rho, coating weight over thickness, pores included [kg/m^3]
        growth: K, thickness left per charge; the 720 rule if left out [m^3/C]
    Returns
        y, retained coating yield by mass; sulfate in the film lets it exceed the yield of aluminium [1]
    Valid
        sulfuric films; not a current efficiency
    Source
        Faraday's law for aluminium oxide, six electrons
    Example
        A film of 2.32 g/cm3 grown as the 720 rule says:

        >>> round(retained_yield(2320.0), 4)
        0.7195
    """
    return apparent_density * growth / OXIDE_FORMED.equivalent


def growth_ceiling(*, oxide_share: Ratio, apparent_density: Density) -> Growth:
    """The most thickness a charge can leave when no aluminium is lost.

        K = E / (w rho)      E = M(Al2O3) / (6 F)

    Parameters
        oxide_share: w, mass share of aluminium oxide in the film, the rest is mostly sulfate [1]
        apparent_density: rho, coating weight over thickness, pores included [kg/m^3]
    Returns
        K, thickness per charge that a calibrated value cannot exceed [m^3/C]
    Valid
        films of aluminium oxide; a measured value near it asks for a new coupon: check area, meter, units
    Source
        Faraday's law for aluminium oxide, six electrons
    Example
        2.6 g/cm3 with 86 % oxide, in um for each A min/dm2:

        >>> round(growth_ceiling(oxide_share=0.86, apparent_density=2600.0) * 1e6 * 6000, 3)
        0.473
    """
    return OXIDE_FORMED.equivalent / (oxide_share * apparent_density)


def aluminium_consumed(charge_density: ChargeDensity) -> Thickness:
    """What depth of metal a charge turns into film and dissolved aluminium.

        d = M q / (3 F rho)

    Parameters
        charge_density: q, charge per carrying area [C/m^2]
    Returns
        d, depth of aluminium per side [m]
    Valid
        all charge oxidises aluminium; oxygen on copper-rich alloys makes it less
    Source
        Faraday's law, three electrons, 2.70 g/cm3
    Example
        One ampere-hour on a square decimetre, in um:

        >>> round(aluminium_consumed(3600 / 0.01) * 1e6, 3)
        12.429
    """
    return ALUMINIUM_OXIDISED.growth() * charge_density


def build_up_of_growth(growth: Growth) -> Ratio:
    """What share of the film stands above the old surface, from the charge it took.

        g = 1 - k / K        k = M(Al) / (3 F rho)

    Parameters
        growth: K, thickness left per charge [m^3/C]
    Returns
        g, build-up over total thickness [1]
    Valid
        all charge oxidises aluminium
    Source
        Faraday's law, three electrons, 2.70 g/cm3
    Example
        >>> round(build_up_of_growth(GROWTH_720.value), 3)
        0.368
    """
    return 1.0 - ALUMINIUM_OXIDISED.growth() / growth


def build_up_share(*, apparent_density: Density, oxide_share: Ratio, aluminium_kept: Ratio) -> Ratio:
    """What share of the film stands above the old surface, from what the film is made of.

        g = 1 - w rho / (r rho_Al y)      r = M(Al2O3) / (2 M(Al))

    Parameters
        apparent_density: rho, coating weight over thickness, pores included [kg/m^3]
        oxide_share: w, mass share of aluminium oxide in the film [1]
        aluminium_kept: y, share of the oxidised aluminium that stays in the film, at most 1 [1]
    Returns
        g, build-up over total thickness; below zero the part gets smaller [1]
    Valid
        w rho below r rho_Al y for a part that grows
    Source
        mass balance of aluminium, 2.70 g/cm3
    Example
        A hard film of 2.6 g/cm3, 86 % oxide, 87.7 % of the aluminium kept:

        >>> round(build_up_share(apparent_density=2600.0, oxide_share=0.86, aluminium_kept=0.877), 3)
        0.5
    """
    # Metal that carries one kg of oxide takes this volume; the density cancels the charge.
    metal = ALUMINIUM_OXIDISED.growth() / OXIDE_FORMED.equivalent
    return 1.0 - oxide_share * apparent_density * metal / aluminium_kept


def coating_weight(*, thickness: Thickness, apparent_density: Density) -> SurfaceMass:
    """What a coating weighs on each square metre.

        W = h rho

    Parameters
        thickness: h, total, per side [m]
        apparent_density: rho, pores included [kg/m^3]
    Returns
        W, weight of the unsealed coating per area [kg/m^2]
    Valid
        unsealed coatings; sealing adds water
    Source
        definition of apparent density
    Example
        18 um at 2.32 g/cm3, in mg/cm2:

        >>> round(coating_weight(thickness=18e-6, apparent_density=2320.0) * 100, 2)
        4.18
    """
    return thickness * apparent_density


def thickness_of_weight(*, weight: SurfaceMass, apparent_density: Density) -> Thickness:
    """What thickness a coating weight stands for.

        h = W / rho

    Parameters
        weight: W, of the unsealed coating per area [kg/m^2]
        apparent_density: rho, pores included [kg/m^3]
    Returns
        h, total, per side [m]
    Valid
        unsealed coatings
    Source
        definition of apparent density
    Example
        1000 mg/ft2 at 2.32 g/cm3, in um:

        >>> round(thickness_of_weight(weight=1000e-6 / 0.3048**2, apparent_density=2320.0) * 1e6, 2)
        4.64
    """
    return weight / apparent_density
