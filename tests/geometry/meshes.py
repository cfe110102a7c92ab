"""Triangle meshes of the same parts, made without the code under test: trimesh and shapely only.

Lengths in m. A mesh lies in u, v, w; `placed` turns it into the rack plane, y up. Circles have CHORDS sides, so
a round end face is low by (2/3) (pi / CHORDS)^2 of its area and a round wall by (1/6) (pi / CHORDS)^2.
"""

import math
from itertools import pairwise

import numpy as np
import shapely
import trimesh
from numpy.typing import NDArray

Array = NDArray[np.float64]
CHORDS = 1440
ERROR = (2 / 3) * (math.pi / CHORDS) ** 2 * 3  # 1e-5; times three for parts that are mostly holes


def circle(u: float, v: float, diameter: float) -> Array:
    angles = np.linspace(0, math.tau, CHORDS, endpoint=False)
    return np.column_stack((u + diameter / 2 * np.cos(angles), v + diameter / 2 * np.sin(angles)))


def stadium(u: float, v: float, length: float, width: float, turn: float = 0.0) -> Array:
    half = (length - width) / 2
    reach = np.array((half * math.cos(turn), half * math.sin(turn)))
    line = shapely.LineString(np.add([-reach, reach], (u, v)))
    return shapely.get_coordinates(line.buffer(width / 2, quad_segs=CHORDS // 4).exterior)[:-1]


def rounded(width: float, height: float, radius: float) -> Array:
    inner = shapely.box(radius - width / 2, radius - height / 2, width / 2 - radius, height / 2 - radius)
    return shapely.get_coordinates(inner.buffer(radius, quad_segs=CHORDS // 4).exterior)[:-1]


def flat(outer: Array, openings: list[Array], at: float) -> trimesh.Trimesh:
    """A flat face at w."""
    region = shapely.Polygon(outer, openings)
    triangles = shapely.get_parts(shapely.constrained_delaunay_triangles(region))
    corners = shapely.get_coordinates(shapely.get_exterior_ring(triangles)).reshape(-1, 4, 2)[:, :3]
    points = np.column_stack((corners.reshape(-1, 2), np.full(3 * len(corners), at)))
    return trimesh.Trimesh(points, np.arange(len(points)).reshape(-1, 3), process=False)


def wall(ring: Array, low: float, high: float) -> trimesh.Trimesh:
    """A side wall along w."""
    count = len(ring)
    points = np.vstack([np.column_stack((ring, np.full(count, w))) for w in (low, high)])
    here = np.arange(count)
    after = (here + 1) % count
    faces = np.vstack(
        [np.column_stack((here, after, here + count)), np.column_stack((after, after + count, here + count))]
    )
    return trimesh.Trimesh(points, faces, process=False)


def revolved(profile: list[tuple[float, float]]) -> trimesh.Trimesh:
    """(axis, radius) in m turned about v: cones, cylinders, and rings where the axis stands still."""
    unit = circle(0, 0, 2.0)
    cones = []
    for (low, low_radius), (high, high_radius) in pairwise(profile):
        cone = wall(unit, 0.0, 1.0)
        bottom = cone.vertices[:, 2] == 0.0
        radius = np.where(bottom, low_radius, high_radius)[:, None]
        points = np.column_stack((cone.vertices[:, :2] * radius, np.where(bottom, low, high)))
        cones.append(trimesh.Trimesh(points, cone.faces, process=False))
    return along_v(trimesh.util.concatenate(cones))


def along_v(mesh: trimesh.Trimesh) -> trimesh.Trimesh:
    """What was made along the third axis now lies along v; its second axis becomes w."""
    return trimesh.Trimesh(mesh.vertices[:, [0, 2, 1]], mesh.faces, process=False)


def placed(
    mesh: trimesh.Trimesh, hang: tuple[float, float], turn: float, *, edge_on: bool
) -> trimesh.Trimesh:
    """Hanging point to the origin, a quarter about v if edge-on, then the turn in the rack plane."""
    moved = mesh.copy()
    moved.apply_translation((-hang[0], -hang[1], 0.0) if not edge_on else (0.0, -hang[1], 0.0))
    if edge_on:
        moved.apply_transform(trimesh.transformations.rotation_matrix(math.pi / 2, (0, 1, 0)))
    moved.apply_transform(trimesh.transformations.rotation_matrix(turn, (0, 0, 1)))
    return moved


def area_below(mesh: trimesh.Trimesh, level: float) -> float:
    """Area lower than the level, cut by trimesh itself."""
    low, high = mesh.bounds[:, 1]
    if level <= low:
        return 0.0
    if level >= high:
        return float(mesh.area)
    cut = trimesh.intersections.slice_mesh_plane(mesh, plane_normal=(0, -1, 0), plane_origin=(0, level, 0))
    return float(cut.area)
