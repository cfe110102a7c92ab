"""What the drawing of a part adds up to: its volume and its drawn area."""

import math

from lineplanner.geometry.faces import Shape
from lineplanner.geometry.shape import shape_of
from lineplanner.geometry.surface import NO_CUTS
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.part import Part
from lineplanner.quantities import Area, Volume

_DRAWN: Memo[Part, float] = Memo(512)


def volume(part: Part) -> Volume:
    """Metal volume of a part, for its mass and its soak.

        V = A t; of a turned part sum of pi/3 (r_1^2 + r_1 r_2 + r_2^2) h; less holes, bores and hollows

    Parameters
        part: any form
    Returns
        V [m^3]
    Raises
        ProblemsError: something is wrong with the part
    Valid
        Threads count as drawn. A stated part has no drawing: its box, which is the most it can be.
    Source
        Derived: prism and frustum of a cone.
    Example
        >>> from lineplanner.inputs.part import Tube
        >>> tube = Tube(
        ...     form="tube", name="spacer", material="6061", diameter=0.05, inner_diameter=0.04, length=0.1
        ... )
        >>> round(volume(tube) * 1e6, 2)
        70.69
    """
    return shape_of(part).volume


def drawn_total(part: Part) -> Area:
    """All of the drawn surface of a part, to compare with what somebody stated.

        A = sum of the faces, with every hole wall to its full depth

    Parameters
        part: any form
    Returns
        A [m^2]
    Raises
        ProblemsError: something is wrong with the part
    Valid
        Without surface factors, masks, contact marks and hole rules; a stated part gives its stated area.
    Source
        Derived: sum of the faces.
    Example
        >>> from lineplanner.inputs.part import Outline, Plate
        >>> square = Outline(shape="rectangle", width=0.1, height=0.1)
        >>> plate = Plate(form="plate", name="panel", material="6061", outline=square, thickness=0.002)
        >>> round(drawn_total(plate) * 1e2, 3)
        2.08
    """
    return _DRAWN.get(part, None, lambda: _drawn(shape_of(part)))


def _drawn(shape: Shape) -> float:
    return math.fsum(float(area) for face in shape.faces for area in face.surface.areas(NO_CUTS))
