"""The areas of a part, a rack or a load, face by face, as text and as JSON."""

import json
from collections.abc import Callable
from pathlib import Path

import pytest

from lineplanner.errors import InputError
from lineplanner.files.library import Library
from lineplanner.files.problems import FilesError
from lineplanner.plan import Plan
from lineplanner.report.area_json import area_record
from lineplanner.report.area_ledger import areas_of
from lineplanner.report.area_text import area_text
from lineplanner.report.style import Style
from lineplanner.report.words import error_text

METRIC = Style("metric", ascii=True)
KEYS = ["format", "name", "wet_m2", "carrying_m2", "significant_m2", "faces"]
FACE = ["face", "m2", "wet", "factor", "significant", "why"]
Demo = Callable[[str], Plan]


@pytest.mark.parametrize(
    "name", ["valve-block", "spline-24", "valve-blocks-24"], ids=["part", "rack", "load"]
)
def test_the_json_has_the_keys_of_the_interface_in_their_order(library: Library, name: str) -> None:
    record = json.loads(json.dumps(area_record(areas_of(library, name), METRIC), allow_nan=False))
    assert list(record)[: len(KEYS)] == KEYS
    assert record["format"] == "lineplanner area 1"
    for face in record["faces"]:
        assert list(face)[: len(FACE)] == FACE
        assert isinstance(face["wet"], bool)


def test_the_faces_of_a_part_add_up(library: Library) -> None:
    record = area_record(areas_of(library, "valve-block"), METRIC)
    for key in ("wet_m2", "carrying_m2", "significant_m2"):
        assert sum(face[key] for face in record["faces"]) == pytest.approx(record[key], rel=1e-12)


def test_the_areas_of_a_load_are_those_of_its_plan(library: Library, each_load: Plan) -> None:
    areas = areas_of(library, each_load.case.name)
    assert areas.wet == each_load.areas.wet
    assert areas.carrying == each_load.areas.carrying
    assert areas.significant == each_load.areas.significant


def test_a_load_names_its_rack_metal_and_why_it_counts(library: Library) -> None:
    text = area_text(areas_of(library, "pump-covers-12"), METRIC)
    assert "stripped: takes current like the parts" in text


def test_a_plate_of_known_size_has_its_area(library: Library, tmp_path: Path) -> None:
    """Hand-worked: 2 x 100 x 50 + 2 x (100 + 50) x 2 = 10 600 mm2 = 1.06 dm2."""
    file = tmp_path / "plate.toml"
    file.write_text(
        'format = "lineplanner part 1"\nname = "plate"\nmaterial = "6061-t6"\nform = "plate"\n'
        'thickness = "2 mm"\n[outline]\nshape = "rectangle"\nwidth = "100 mm"\nheight = "50 mm"\n',
        encoding="utf-8",
    )
    areas = areas_of(library, str(file))
    assert areas.wet == pytest.approx(0.0106, rel=1e-9)
    assert area_text(areas, METRIC).splitlines() == [
        "plate",
        "  one part, all of it in the solution, hole rule of anodize-sulfuric",
        "  wet             1.06 dm2",
        "  carrying        1.06 dm2",
        "  significant     1.06 dm2",
        "",
        "  face, in dm2  count  drawn  factor   wet  carrying  significant",
        "  front             1    0.5   100 %   0.5       0.5          0.5",
        "  back              1    0.5   100 %   0.5       0.5          0.5",
        "  edge              1   0.06   100 %  0.06      0.06         0.06",
    ]


def test_a_name_that_is_none_is_answered_with_the_nearest(library: Library) -> None:
    with pytest.raises(InputError) as raised:
        areas_of(library, "valve-blok")
    assert error_text(raised.value, "metric").startswith(
        "`valve-blok` is neither a file nor a load, rack or part of this site. The nearest: `valve-block"
    )


def test_a_file_without_an_area_is_refused(library: Library) -> None:
    with pytest.raises(InputError) as raised:
        areas_of(library, str(library.folder / "configs" / "site.toml"))
    assert error_text(raised.value, "metric").endswith(
        "is a file of kind `site`, which has no area. Name a part, a rack or a load"
    )


def test_a_file_that_is_not_there_is_said_to_be_missing(library: Library) -> None:
    with pytest.raises(FilesError) as raised:
        areas_of(library, "nowhere.toml")
    assert "there is no such file" in error_text(raised.value, "metric")
