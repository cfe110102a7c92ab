"""Stop-off polygons on flat faces: which zone of the face they cover."""

from collections.abc import Iterable

import numpy as np
import shapely
from shapely.geometry.base import BaseGeometry

from lineplanner.geometry.outline import Line, lines, moved
from lineplanner.geometry.surface import Edges, Flat
from lineplanner.inputs.part import Mask, Outline


def with_zones(face: Flat, masks: Iterable[Mask]) -> Flat:
    """The face with its covered zone: the union of its masks, as far as they lie on it."""
    covered = covered_zone(face, masks)
    edges = _edges(covered)
    return face if edges is None else Flat(face.at, face.lines, edges, min(float(covered.area), face.area))


def covered_zone(face: Flat, masks: Iterable[Mask]) -> BaseGeometry:
    """What the polygons of masks cover of a face, in its plane, in m."""
    zones = shapely.union_all([_zone(mask) for mask in masks if mask.outline is not None])
    return shapely.intersection(region(face.lines), zones)


def region(signed: Iterable[tuple[Line, int]]) -> BaseGeometry:
    """Lines as one region of chords: sign +1 around material, -1 around openings."""
    rings = [(shapely.Polygon(line.ring().points), sign) for line, sign in signed]
    material = shapely.union_all([ring for ring, sign in rings if sign > 0])
    return shapely.difference(material, shapely.union_all([ring for ring, sign in rings if sign < 0]))


def outline_region(outline: Outline) -> BaseGeometry:
    """An outline as a region of chords."""
    outer, *inner = lines(outline)
    return region([(outer, 1), *((line, -1) for line in inner)])


def _zone(mask: Mask) -> BaseGeometry:
    outer, *inner = lines(mask.outline) if mask.outline is not None else ()
    return region([(moved(outer, mask.at), 1), *((moved(line, mask.at), -1) for line in inner)])


def _edges(zone: BaseGeometry) -> Edges | None:
    """The sides of a region, counter-clockwise around material and clockwise around openings."""
    starts, ends = [], []
    for polygon in shapely.get_parts(zone):
        if polygon.geom_type != "Polygon":
            continue  # a touching edge or corner covers nothing
        facing = shapely.orient_polygons(polygon)
        for ring in (facing.exterior, *facing.interiors):
            points = shapely.get_coordinates(ring)
            starts.append(points[:-1])
            ends.append(points[1:])
    if not starts:
        return None
    first, last = np.concatenate(starts), np.concatenate(ends)
    return Edges(first, last, np.zeros(len(first)), float(shapely.area(zone)))
