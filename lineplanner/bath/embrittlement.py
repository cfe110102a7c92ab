"""Hydrogen in strong steel: how long to bake after plating."""

import math

from lineplanner.errors import InputError, Quantity
from lineplanner.quantities import COUNT, STRESS, Stress, Time
from lineplanner.sources import Constant, Source, Status

_CHART = Source("ASTM B850-98 (2009), hours as quoted on a plating shop's bake chart", Status.PUBLISHED)
_SCOPE = Source("ASTM B849, scope: steel of 1000 MPa and more", Status.PUBLISHED)
BAKE_FROM = Constant("strength from which steel is baked", 1000e6, "Pa", _SCOPE)
BAKE_TO = Constant("strength to which the table goes", 1800e6, "Pa", _CHART)
FIRST_CLASS_TO = Constant("strength to which the shortest bake goes", 1100e6, "Pa", _CHART)
CLASS_WIDTH = Constant("strength of one class", 100e6, "Pa", _CHART)
SHORTEST_BAKE = Constant("shortest bake", 8.0 * 3600.0, "s", _CHART)
BAKE_TEMPERATURE = Constant("coolest bake of the chart", 463.15, "K", _CHART)
BAKE_STEP = Constant("longer bake of each class", 2.0 * 3600.0, "s", _CHART)

# Rockwell C from which each bake holds, hours. At an edge that two classes share the longer bake stands.
_HARDNESS = ((31.0, 8), (33.0, 10), (36.0, 12), (39.0, 14), (43.0, 16), (45.0, 18), (47.0, 20), (49.0, 22))
HARDNESS_TO = Constant("hardness to which the table goes", 50.0, "HRC", _CHART)


def bake_time(tensile_strength: Stress) -> Time | None:
    """How long steel of this strength is baked at 190 to 220 degC after plating, at least.

        t = 8 h + 2 h ceil((Rm - 1100 MPa) / 100 MPa), not below 8 h

    Parameters
        tensile_strength: Rm, the highest the part can have [Pa]
    Returns
        t, at temperature; None below 1000 MPa: no bake by this table [s]
    Raises
        InputError bake.refer above 1800 MPa: the design owner decides
    Valid
        1000 to 1800 MPa. The chart notes that the standard has other values for unpeened and for chromium
        plated parts: the user's own copy decides. Case-hardened or low-tempered steel needs another class; a
        baked part can still fail
    Source
        ASTM B850-98 (2009) as quoted on a plating shop's bake chart; the edge at 1000 MPa from ASTM B849
    Example
        1450 MPa, in hours:

        >>> bake_time(1450e6) / 3600
        16.0
        >>> bake_time(900e6) is None
        True
    """
    strength = round(tensile_strength)  # whole pascals: unit conversion leaves dust at the edges
    if strength < BAKE_FROM.value:
        return None
    if strength > BAKE_TO.value:
        raise InputError("bake.refer", tensile_strength=Quantity(tensile_strength, STRESS))
    classes = max(0, math.ceil((strength - FIRST_CLASS_TO.value) / CLASS_WIDTH.value))
    return SHORTEST_BAKE.value + classes * BAKE_STEP.value


def bake_time_of_hardness(hardness: float) -> Time | None:
    """How long steel of this hardness is baked at 190 to 220 degC after plating, at least.

        the table row by hardness; at a shared edge the longer bake

    Parameters
        hardness: the highest the part can have, Rockwell C
    Returns
        t, at temperature; None below 31 HRC: no bake by this table [s]
    Raises
        InputError bake.refer-hardness above 50 HRC: the design owner decides
    Valid
        31 to 50 HRC. Where the strength is known too, the longer of both bakes stands
    Source
        ASTM B850-98 (2009) as quoted on a plating shop's bake chart
    Example
        49 HRC, in hours:

        >>> bake_time_of_hardness(49) / 3600
        22.0
    """
    if hardness > HARDNESS_TO.value:
        raise InputError("bake.refer-hardness", hardness=Quantity(hardness, COUNT))
    hours = [hours for edge, hours in _HARDNESS if hardness >= edge]
    return hours[-1] * 3600.0 if hours else None
