"""Everything said of a face that is refused: message key, place and facts. Facts in SI."""

import pytest

from lineplanner.geometry import problems
from lineplanner.inputs.part import Bore, ContactMark, Mask, Texture
from tests.geometry.parts import Case, expect_refused, hole, plate, rectangle, stated, tube, turned

FACES: dict[str, Case] = {
    "mask on no face": (
        plate(masks=(Mask(face="frnt"),)),
        ("masks", 0, "face"),
        "face-unknown",
        {"face": "frnt", "nearest": "front", "known": "front, back, edge"},
    ),
    "contact on no face": (
        tube(contacts=(ContactMark(face="end"),)),
        ("contacts", 0, "face"),
        "face-unknown",
        {"face": "end", "known": "side, bore, bottom, top"},
    ),
    "texture on no face": (
        stated(textures=(Texture(face="outside", factor=1.2),)),
        ("textures", 0, "face"),
        "face-unknown",
        {"face": "outside", "nearest": "", "known": "all"},
    ),
    "significant face not there": (
        plate(holes=(hole(0, 0, 5, 3),), significant=("front", "hole-2")),
        ("significant", 1),
        "face-unknown",
        {"face": "hole-2", "nearest": "hole-1, hole-1-floor"},
    ),
    "band past the end": (
        tube(masks=(Mask(face="side", start=-0.06, end=0.0),)),
        ("masks", 0, "start"),
        "band-outside-face",
        {"face": "side", "value": -0.06, "low": -0.05, "high": 0.05},
    ),
    "band past the bore": (
        turned(
            (0, 10),
            (60, 10),
            bores=(Bore(diameter=0.005, depth=0.02),),
            textures=(Texture(face="bore", factor=1.2, end=0.03),),
        ),
        ("textures", 0, "end"),
        "band-outside-face",
        {"face": "bore", "value": 0.03, "low": 0.0, "high": 0.02},
    ),
    "band the wrong way round": (
        tube(masks=(Mask(face="side", start=0.02, end=0.01),)),
        ("masks", 0),
        "band-empty",
        {"start": 0.02, "end": 0.01},
    ),
    "band on a flat face": (
        tube(masks=(Mask(face="top", end=0.01),)),
        ("masks", 0, "end"),
        "band-not-along-axis",
        {"face": "top"},
    ),
    "band on a plate": (
        plate(textures=(Texture(face="edge", factor=1.2, start=0.0),)),
        ("textures", 0, "start"),
        "band-not-along-axis",
        {"face": "edge"},
    ),
    "zone on a round face": (
        tube(masks=(Mask(face="side", outline=rectangle(5, 5)),)),
        ("masks", 0, "outline"),
        "zone-not-flat",
        {"face": "side"},
    ),
    "zone and band at once": (
        tube(masks=(Mask(face="top", outline=rectangle(5, 5), start=0.0),)),
        ("masks", 0),
        "zone-and-band",
        {"face": "top"},
    ),
    "zone beside the face": (
        plate(masks=(Mask(face="front", outline=rectangle(10, 10), at=(0.056, 0.0)),)),
        ("masks", 0, "outline"),
        "zone-misses-face",
        {"face": "front"},
    ),
    "zone along the edge of the face": (
        plate(masks=(Mask(face="front", outline=rectangle(10, 10), at=(0.055, 0.0)),)),
        ("masks", 0, "outline"),
        "zone-misses-face",
        {"face": "front"},
    ),
    "zone over a hole only": (
        plate(holes=(hole(0, 0, 20),), masks=(Mask(face="front", outline=rectangle(5, 5)),)),
        ("masks", 0, "outline"),
        "zone-misses-face",
        {"face": "front"},
    ),
    "place without a zone": (
        plate(masks=(Mask(face="front", at=(0.01, 0.0)),)),
        ("masks", 0, "at"),
        "zone-place-not-used",
        {},
    ),
    "contact larger than its face": (
        plate(contacts=(ContactMark(face="front"), ContactMark(face="front", count=2, area=0.004))),
        ("contacts", 1, "area"),
        "contact-larger-than-face",
        {"face": "front", "area": 0.008, "limit": 0.006},
    ),
    "contact larger than what is left free": (
        plate(
            masks=(Mask(face="front", outline=rectangle(90, 60)),),
            contacts=(ContactMark(face="front", area=0.0007),),
        ),
        ("contacts", 0, "area"),
        "contact-larger-than-face",
        {"face": "front", "area": 0.0007, "limit": 0.0006},
    ),
    "textures overlapping": (
        tube(
            textures=(Texture(face="side", factor=1.2), Texture(face="side", factor=1.5, start=0.0, end=0.02))
        ),
        ("textures", 1),
        "textures-overlap",
        {"face": "side"},
    ),
    "texture below one": (
        tube(textures=(Texture(face="side", factor=0.9),)),
        ("textures", 0, "factor"),
        "too-low",
        {"field": "surface factor", "value": 0.9, "limit": 1.0},
    ),
}


@pytest.mark.parametrize("name", FACES)
def test_what_is_said_of_a_face_is_refused_with_place_and_facts(name: str) -> None:
    expect_refused(*FACES[name])


def test_all_problems_of_faces_come_at_once() -> None:
    wrong = plate(masks=(Mask(face="a"), Mask(face="back", start=0.0)), significant=("b",))
    assert [problem.path for problem in problems(wrong)] == [
        ("masks", 0, "face"),
        ("significant", 0),
        ("masks", 1, "start"),
    ]
