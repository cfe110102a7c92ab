"""The declarations read as data: keys, defaults, shapes and paths."""

import pytest

from lineplanner.inputs.declared import Shape, declared, file_path, forms_of, record_at, shape_of
from lineplanner.inputs.line import Line, Rectifier, Tank
from lineplanner.inputs.load import Load
from lineplanner.inputs.part import Hole, Part, Plate
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.tables import Tables


def test_a_field_is_found_by_its_key_in_a_file() -> None:
    fields = declared(Line)
    assert list(fields) == ["name", "rectifier", "tank"]
    assert (fields["tank"].name, fields["tank"].required) == ("tanks", True)
    assert declared(Rectifier)["pulses"].default is None
    assert not declared(Rectifier)["pulses"].required


def test_the_fields_that_all_forms_of_part_share_come_first() -> None:
    assert list(declared(Plate))[:3] == ["name", "material", "mass"]
    assert list(declared(Plate))[-5:] == ["form", "outline", "thickness", "hole", "slot"]


def test_every_type_that_a_record_uses_has_a_shape() -> None:
    seen: set[type] = set()

    def look(bare: object) -> None:
        from lineplanner.inputs.declared import described

        shape, inside = shape_of(bare)
        if shape in (Shape.MANY, Shape.PAIR, Shape.FORMS):
            for one in inside:
                look(described(one)[0])
        elif shape is Shape.RECORD and bare not in seen:
            seen.add(inside[0])
            for field in declared(inside[0]).values():
                look(field.type)

    for record in (Line, Load, Recipe, Part, Tables):
        look(record)
    assert len(seen) > 30


def test_a_type_that_no_file_can_hold_is_refused() -> None:
    with pytest.raises(TypeError):
        shape_of(complex)


def test_a_path_of_names_becomes_a_path_of_keys() -> None:
    assert file_path(Line, ("tanks", 2, "joints", 0, "count")) == ("tank", 2, "joint", 0, "count")
    assert file_path(Recipe, ("voltages", 0, "to", "low")) == ("voltage", 0, "to", "low")
    assert file_path(Plate, ("holes", 1, "at", 0)) == ("hole", 1, "at", 0)
    assert file_path(Line, ("nothing", "inside")) == ("nothing", "inside")
    assert file_path(Line, ()) == ()


def test_the_record_of_a_table_is_found_by_its_path() -> None:
    assert record_at(Line, ("tank", 0)) is Tank
    assert record_at(Line, ()) is Line
    assert record_at(Part, ("hole", 3), "plate") is Hole
    assert record_at(Part, ("hole", 3), "tube") is None
    assert record_at(Line, ("none", 0)) is None


def test_a_part_has_its_forms() -> None:
    assert list(forms_of(Part)) == ["plate", "section", "turned", "tube", "stated"]
