"""What makes a mask, a contact mark, a texture or a significant face unusable on the part as drawn."""

import difflib
import math
from collections.abc import Iterator
from itertools import combinations

import shapely

from lineplanner.errors import Problem, Quantity
from lineplanner.geometry.faces import Face, Shape
from lineplanner.geometry.outline_rules import SLACK, outline_problems
from lineplanner.geometry.surface import Flat
from lineplanner.geometry.values import Path
from lineplanner.geometry.zones import covered_zone
from lineplanner.inputs.part import Common, Mask, Texture
from lineplanner.quantities import AREA, LENGTH

Band = Mask | Texture


def zone_outline_problems(part: Common) -> Iterator[Problem]:
    """The outlines of stop-off polygons, and a place without one: zone-place-not-used."""
    for number, mask in enumerate(part.masks):
        if mask.outline is not None:
            yield from outline_problems(mask.outline, ("masks", number, "outline"))
        elif mask.at != (0.0, 0.0):
            yield Problem(("masks", number, "at"), "zone-place-not-used")


def face_problems(shape: Shape) -> Iterator[Problem]:
    """Everything that names a face: the name, then what is said of it."""
    part, faces = shape.part, {face.name: face for face in shape.faces}
    named: list[tuple[Path, str]] = [(("masks", n, "face"), mask.face) for n, mask in enumerate(part.masks)]
    named += [(("contacts", n, "face"), contact.face) for n, contact in enumerate(part.contacts)]
    named += [(("textures", n, "face"), texture.face) for n, texture in enumerate(part.textures)]
    named += [(("significant", n), name) for n, name in enumerate(part.significant)]
    for path, name in named:
        if name not in faces:
            yield Problem(path, "face-unknown", _nearest(name, shape.names))
    for number, mask in enumerate(part.masks):
        if mask.face in faces:
            yield from _mask_problems(mask, faces[mask.face], ("masks", number))
    for number, texture in enumerate(part.textures):
        if texture.face in faces:
            yield from _band_problems(texture, faces[texture.face], ("textures", number))
    yield from _overlapping_textures(part)
    yield from _large_contacts(part, faces)


def _nearest(name: str, known: tuple[str, ...]) -> dict[str, str]:
    """The face as typed, the nearest known ones, and all known ones."""
    near = difflib.get_close_matches(name, known, n=3, cutoff=0.5)
    return {"face": name, "nearest": ", ".join(near), "known": ", ".join(known)}


def _mask_problems(mask: Mask, face: Face, path: Path) -> Iterator[Problem]:
    """zone-and-band; zone-not-flat {face}; zone-misses-face {face}; those of a band."""
    if mask.outline is None:
        yield from _band_problems(mask, face, path)
    elif mask.start is not None or mask.end is not None:
        yield Problem(path, "zone-and-band", {"face": face.name})
    elif not isinstance(face.surface, Flat):
        yield Problem((*path, "outline"), "zone-not-flat", {"face": face.name})
    elif shapely.area(covered_zone(face.surface, [mask])) <= 0.0:
        yield Problem((*path, "outline"), "zone-misses-face", {"face": face.name})


def _band_problems(band: Band, face: Face, path: Path) -> Iterator[Problem]:
    """band-not-along-axis {face}; band-empty {start, end}; band-outside-face {face, value, low, high}."""
    given = [(name, value) for name, value in (("start", band.start), ("end", band.end)) if value is not None]
    if not given:
        return
    if face.kind != "wall":
        yield Problem((*path, given[0][0]), "band-not-along-axis", {"face": face.name})
        return
    low, high = face.surface.span
    slack = SLACK * (high - low)
    outside = [(name, value) for name, value in given if not low - slack <= value <= high + slack]
    for name, value in outside:
        facts = {"value": _length(value), "low": _length(low), "high": _length(high)}
        yield Problem((*path, name), "band-outside-face", {"face": face.name, **facts})
    start, end = _ends(band)
    if not outside and max(start, low) >= min(end, high):
        facts = {"start": _length(max(start, low)), "end": _length(min(end, high))}
        yield Problem(path, "band-empty", facts)


def _ends(band: Band) -> tuple[float, float]:
    return (-math.inf if band.start is None else band.start), (math.inf if band.end is None else band.end)


def _overlapping_textures(part: Common) -> Iterator[Problem]:
    """textures-overlap {face}: two factors for one place."""
    for (_, first), (number, second) in combinations(enumerate(part.textures), 2):
        (start, end), (begin, close) = _ends(first), _ends(second)
        if first.face == second.face and max(start, begin) < min(end, close):
            yield Problem(("textures", number), "textures-overlap", {"face": second.face})


def _large_contacts(part: Common, faces: dict[str, Face]) -> Iterator[Problem]:
    """contact-larger-than-face {face, area, limit}: all marks of a face against its area without stop-off."""
    for name in sorted({contact.face for contact in part.contacts} & faces.keys()):
        marks = [(n, c) for n, c in enumerate(part.contacts) if c.face == name]
        area = math.fsum(contact.count * contact.area for _, contact in marks)
        limit = free_area(part, faces[name])
        if limit > 0.0 and area > limit:
            facts = {"area": Quantity(area, AREA), "limit": Quantity(limit, AREA)}
            yield Problem(
                ("contacts", marks[-1][0], "area"), "contact-larger-than-face", {"face": name, **facts}
            )


def free_area(part: Common, face: Face) -> float:
    """Area of a face that no mask covers, in m^2."""
    masks = [mask for mask in part.masks if mask.face == face.name]
    surface = face.surface
    if isinstance(surface, Flat):
        whole = any(mask.outline is None for mask in masks)
        covered = float(shapely.area(covered_zone(surface, masks)))
        return 0.0 if whole else max(surface.area - covered, 0.0)
    bands = [_ends(mask) for mask in masks]
    cuts = tuple(end for band in bands for end in band if math.isfinite(end))
    free = [not any(start < at < end for start, end in bands) for at in surface.stations(cuts).tolist()]
    return math.fsum(surface.areas(cuts)[free])


def _length(value: float) -> Quantity:
    return Quantity(value, LENGTH)
