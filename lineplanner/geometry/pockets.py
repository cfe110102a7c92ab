"""Whether a part, as it hangs, keeps gas or solution in a pocket."""

from lineplanner.geometry.pose import Axis, Pose, height
from lineplanner.geometry.shape import shape_of
from lineplanner.inputs.part import Part

_LEVEL = 1e-9  # a mouth that leans less than this looks sideways


def traps_gas(part: Part, pose: Pose) -> bool:
    """Whether a blind hole or bore, or the cup of the part, opens downwards."""
    return any(rise < -_LEVEL for rise in _mouths(part, pose))


def traps_liquid(part: Part, pose: Pose) -> bool:
    """Whether a blind hole or bore, or the cup of the part, opens upwards: it carries solution out."""
    return any(rise > _LEVEL for rise in _mouths(part, pose))


def _mouths(part: Part, pose: Pose) -> list[float]:
    """How far upwards each mouth looks: 1 straight up, -1 straight down."""
    shape = shape_of(part)
    along = _rise(pose, shape.axis)
    blind = [o for o in shape.openings if o.blind and not o.plugged]
    mouths = [along if opening.open_high else -along for opening in blind]
    if part.cup != "none":
        up = _rise(pose, "v")
        mouths.append(up if part.cup == "up" else -up)
    return mouths


def _rise(pose: Pose, axis: Axis) -> float:
    return height((0.0, 0.0), pose.turn, edge_on=pose.edge_on, axis=axis).c
