"""The same parts as triangle meshes, made and cut by trimesh and shapely: another package computes the same thing.

Wet areas agree within the meshes' own error, which is stated beside them in meshes.py.
"""

import math
from functools import cache

import numpy as np
import pytest
import trimesh

from lineplanner.geometry import Pose, extent, shape_of
from lineplanner.inputs.part import Bore, Outline, Part, Plate, Slot
from tests.geometry import meshes as m
from tests.geometry.parts import L_SHAPE, NAMED, areas, hole, plate, section, tube, turned

COVER = Plate(
    form="plate",
    outline=Outline(shape="rounded-rectangle", width=0.1, height=0.06, radius=0.01),
    thickness=0.006,
    holes=(hole(-35, -15, 8), hole(0, 0, 12, 4)),
    slots=(Slot(at=(0.03, -0.01), length=0.03, width=0.007, turn=0.4),),
    hang=(-0.035, 0.02),
    **NAMED,
)
BOX = plate(100, 60, 20)
CYLINDER = turned((0, 15), (90, 15))
SPACER = tube(50, 40, 100)
SHAFT = turned(
    (0, 4), (10, 12), (40, 12), (40, 20), (70, 15), (70, 8), (90, 3),
    bores=(Bore(diameter=0.006, depth=0.05),), hang=(0.0, 0.08),
)  # fmt: skip
CHANNEL = section(L_SHAPE, 150, hang=(0.01, 0.07))
BRACKET = Plate(form="plate", outline=L_SHAPE, thickness=0.012, hang=(0.01, 0.06), **NAMED)


def l_ring() -> m.Array:
    """The outline of the bracket by its own arcs: through (80, 20) and (20, 20) outwards 3, through the next in 4."""
    return np.vstack(
        [
            [(0, 0), (80, 0)],
            _arc((80, 20), (20, 20), (50, 23)),
            _arc((20, 20), (20, 70), (16, 45)),
            [(20, 70), (0, 70)],
        ]
    ) * (1e-3)


def _arc(start: tuple[float, float], end: tuple[float, float], top: tuple[float, float]) -> m.Array:
    """Points on the circle through three points, from start to before the end, in equal steps of its angle."""
    p, q, r = (complex(*point) for point in (start, top, end))
    w = (r - p) / (q - p)
    centre = (q - p) * (w - abs(w) ** 2) / (2j * w.imag) + p
    turn = np.angle((r - centre) / (p - centre))
    z = centre + (p - centre) * np.exp(1j * turn * np.linspace(0, 1, 400, endpoint=False))
    return np.column_stack((z.real, z.imag))


@cache
def mesh_of(name: str) -> trimesh.Trimesh:
    match name:
        case "box":
            return trimesh.creation.box((0.1, 0.06, 0.02))
        case "cylinder":
            rod = trimesh.creation.cylinder(0.015, 0.09, sections=m.CHORDS)
            rod.apply_translation((0, 0, 0.045))
            return m.along_v(rod)
        case "spacer":
            return m.along_v(trimesh.creation.annulus(0.02, 0.025, 0.1, sections=m.CHORDS))
        case "channel":
            ring = l_ring()
            ends = [m.flat(ring, [], w) for w in (-0.075, 0.075)]
            return m.along_v(trimesh.util.concatenate([*ends, m.wall(ring, -0.075, 0.075)]))
        case "bracket":
            ring = l_ring()
            sides = [m.flat(ring, [], w) for w in (-0.006, 0.006)]
            return trimesh.util.concatenate([*sides, m.wall(ring, -0.006, 0.006)])
        case "shaft":
            return _shaft()
        case _:
            return _cover()


def _shaft() -> trimesh.Trimesh:
    outside = [(0, 4), (10, 12), (40, 12), (40, 20), (70, 15), (70, 8), (90, 3), (90, 0)]
    inside = [(50, 0), (50, 3), (0, 3), (0, 4)]
    return m.revolved([(axis / 1e3, radius / 1e3) for axis, radius in [*inside, *outside[1:]]])


def _cover() -> trimesh.Trimesh:
    outer, through = m.rounded(0.1, 0.06, 0.01), m.circle(-0.035, -0.015, 0.008)
    blind, slot = m.circle(0, 0, 0.012), m.stadium(0.03, -0.01, 0.03, 0.007, 0.4)
    return trimesh.util.concatenate(
        [
            m.flat(outer, [through, blind, slot], 0.003),
            m.flat(outer, [through, slot], -0.003),
            m.flat(blind, [], -0.001),
            m.wall(outer, -0.003, 0.003),
            m.wall(through, -0.003, 0.003),
            m.wall(slot, -0.003, 0.003),
            m.wall(blind, -0.001, 0.003),
        ]
    )


PARTS: dict[str, Part] = {
    "box": BOX,
    "cylinder": CYLINDER,
    "spacer": SPACER,
    "channel": CHANNEL,
    "bracket": BRACKET,
    "shaft": SHAFT,
    "cover": COVER,
}
POSES = {
    "upright": Pose(),
    "turned": Pose(turn=0.37),
    "lying": Pose(turn=math.pi / 2),
    "upside down": Pose(turn=2.9),
    "edge-on": Pose(edge_on=True),
    "edge-on and leaning": Pose(turn=-0.52, edge_on=True),
    "edge-on and lying": Pose(turn=math.pi / 2, edge_on=True),
}


@pytest.mark.parametrize("name", PARTS)
def test_the_whole_area_is_that_of_the_mesh(name: str) -> None:
    assert areas(PARTS[name]).wet == pytest.approx(mesh_of(name).area, rel=m.ERROR)


@pytest.mark.parametrize("pose", POSES)
@pytest.mark.parametrize("name", PARTS)
def test_the_area_below_a_level_is_that_of_the_cut_mesh(name: str, pose: str) -> None:
    part, at = PARTS[name], POSES[pose]
    mesh = m.placed(mesh_of(name), part.hang, at.turn, edge_on=at.edge_on)
    left, low, right, high = extent(shape_of(part), at)
    assert mesh.bounds[:, :2].ravel() == pytest.approx([left, low, right, high], abs=2e-5)
    for share in (0.07, 0.31, 0.5, 0.78, 0.96):
        level = low + share * (high - low)
        expected = m.area_below(mesh, level)
        # a chord of the code under test lies up to 1.2 um within these arcs: r (1 - cos(pi / 800)), r = 150 mm
        shift = m.area_below(mesh, level + 1.2e-6) - m.area_below(mesh, level - 1.2e-6)
        assert areas(part, at, level).wet == pytest.approx(expected, rel=0.0, abs=m.ERROR * expected + shift)
