"""What is written from a record reads back as the same record."""

from pathlib import Path
from typing import Any

import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from lineplanner.files.kinds import kinds
from lineplanner.files.models import build
from lineplanner.files.problems import UnitSystem
from lineplanner.files.reading import read, read_entry
from lineplanner.files.site import packaged_site
from lineplanner.files.writing import amount, dump
from lineplanner.inputs.declared import Declared, Shape, declared, described, forms_of, shape_of
from lineplanner.inputs.recipe import Recipe
from lineplanner.quantities import COUNT, KINDS, RATIO, Field, Kind
from lineplanner.units import parse
from tests.files.samples import PART, RACK, text_of

SYSTEMS: tuple[UnitSystem, ...] = ("metric", "us")
DEMO = sorted(
    path for name in ("configs", "rack_library") for path in (packaged_site() / name).rglob("*.toml")
)


def again(text: str, folder: Path) -> Any:
    path = folder / "again.toml"
    path.write_text(text, encoding="utf-8")
    return read(path)


@pytest.mark.parametrize("system", SYSTEMS)
@pytest.mark.parametrize("kind", kinds())
def test_a_record_of_every_kind_reads_back_the_same(kind: str, system: UnitSystem, tmp_path: Path) -> None:
    record = again(text_of(kind), tmp_path)
    assert again(dump(record, kind, system), tmp_path) == record


@pytest.mark.parametrize("system", SYSTEMS)
def test_every_file_of_the_demo_shop_reads_back_the_same(system: UnitSystem, tmp_path: Path) -> None:
    for path in DEMO:
        entry = read_entry(path)
        assert again(dump(entry.record, entry.kind.name, system), tmp_path) == entry.record, path


def test_a_file_is_written_in_declared_order_with_defaults_left_out(tmp_path: Path) -> None:
    assert dump(again(PART, tmp_path), "part") == (
        'format = "lineplanner part 1"\n'
        'name = "Lug"\n'
        'material = "6061-t6"\n'
        'form = "plate"\n'
        'thickness = "4 mm"\n'
        "\n"
        "[outline]\n"
        'shape = "rectangle"\n'
        'width = "60 mm"\n'
        'height = "40 mm"\n'
        "\n"
        "[[hole]]\n"
        'at = ["10 mm", "0 mm"]\n'
        'diameter = "6 mm"\n'
    )


def test_units_are_those_of_the_system(tmp_path: Path) -> None:
    text = dump(again(RACK.replace('"600 mm"', '"24 in"'), tmp_path), "rack", "us")
    assert 'width = "24 in"' in text
    assert 'thickness = "6 mm"' in text or "in" in text


@given(
    st.sampled_from(sorted(KINDS)), st.floats(allow_nan=False, allow_infinity=False), st.sampled_from(SYSTEMS)
)
def test_every_amount_reads_back_as_exactly_the_same_number(
    name: str, value: float, system: UnitSystem
) -> None:
    kind = KINDS[name]
    assume(kind != COUNT)
    assume(value == 0.0 or 1e-30 < abs(value) < 1e30)
    assume(name != "temperature" or value >= 0.0)
    assert parse(amount(value, kind, system), kind) == value


# --- records of any content ------------------------------------------------------------------------------


def values(bare: Any, field: Field | None) -> st.SearchStrategy[Any]:
    """Values that a field may hold, rules between fields aside."""
    shape, inside = shape_of(bare)
    if shape is Shape.NUMBER:
        return numbers(field)
    if shape is Shape.COUNT:
        low = int(field.low or 0) if field else 0
        return st.integers(low, int(field.high) if field and field.high else low + 50)
    if shape is Shape.YES_NO:
        return st.booleans()
    if shape is Shape.WORDS:
        return st.text("aZ09 .-\"'\\#{}[]=\n\t\u00b5\u00e4\u6f22", max_size=8).map(lambda text: f"x{text}")
    if shape is Shape.DATE:
        return st.dates()
    if shape is Shape.CHOICE:
        return st.sampled_from(inside)
    if shape is Shape.PAIR:
        return st.tuples(*(values(*described(one)) for one in inside))
    if shape is Shape.MANY:
        item, own = described(inside[0])
        return st.lists(values(item, own or field), max_size=3).map(tuple)
    return records(inside[0], field)


def numbers(field: Field | None) -> st.SearchStrategy[float]:
    kind: Kind = field.kind if field and field.kind else RATIO
    bounds = [one for one in (field.low, field.above) if one is not None] if field else []
    low = max([*bounds, 1.0 if kind.unit == "K" else -1e3])
    if field and field.high is not None:
        high = field.high
        return st.integers(1, 999).map(lambda n: low + (high - low) * n / 1000)
    return st.integers(1, 10**7).map(lambda n: low + n / 977)


def records(record: type, outer: Field | None = None) -> st.SearchStrategy[Any]:
    def one(each: Declared) -> st.SearchStrategy[Any]:
        found = values(each.type, each.field or outer)
        optional = each.default is None and not each.required
        return found | st.just(each.default) if optional or not each.required else found

    return st.builds(record, **{each.name: one(each) for each in declared(record).values()})


@settings(max_examples=60, deadline=None)
@given(
    st.data(),
    st.sampled_from(["rack", "load", "line", "recipe", "bath", "material", "site"]),
    st.sampled_from(SYSTEMS),
)
def test_a_record_of_any_content_reads_back_the_same(
    data: st.DataObject, kind: str, system: UnitSystem
) -> None:
    import tomllib

    record = data.draw(records(kinds()[kind].record))
    raw = tomllib.loads(dump(record, kind, system))
    assert raw.pop("format") == f"lineplanner {kind} 1"
    found, problems = build(kinds()[kind].record, raw)
    assert problems == []
    assert found == record


@settings(max_examples=40, deadline=None)
@given(st.data())
def test_a_part_of_any_form_reads_back_the_same(data: st.DataObject) -> None:
    import tomllib

    forms = forms_of(kinds()["part"].record)
    record = data.draw(records(forms[data.draw(st.sampled_from(sorted(forms)))]))
    raw = tomllib.loads(dump(record, "part"))
    raw.pop("format")
    assert build(kinds()["part"].record, raw) == (record, [])


def test_a_recipe_is_declared_as_a_recipe() -> None:
    assert kinds()["recipe"].record is Recipe
