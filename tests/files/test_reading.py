"""A broken file tells everything that is wrong with it at once, each thing at its line, in one form."""

from pathlib import Path

import pytest

from lineplanner.files.problems import FilesError, word
from lineplanner.files.reading import check, read
from lineplanner.inputs.line import Line
from lineplanner.inputs.part import Plate
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.values import Ranged
from lineplanner.quantities import THICKNESS
from lineplanner.units import parse
from tests.files.samples import LINE, LOAD, MATERIAL, PART, RACK, RECIPE, text_of


@pytest.fixture(autouse=True)
def in_folder(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.chdir(tmp_path)


def told(text: str, name: str = "x.toml") -> list[str]:
    """What `check` says of a text."""
    Path(name).write_text(text, encoding="utf-8")
    return [word(problem) for problem in check(name)]


def changed(text: str, *changes: tuple[str, str]) -> list[str]:
    """What `check` says of a valid text with some of its lines changed."""
    for old, new in changes:
        assert old in text
        text = text.replace(old, new, 1)
    return told(text)


BROKEN_LINE = """\
format = "lineplanner line 1"
name = "demo"
# a comment
[[rectifier]]
name = "R1"
max_current = "3000 A"
max_voltage = 18
tanks = ["T1"]
type = "phase-controled"
pulses = 4

[[rectifier]]
name = "R2"
max_curent = "3000 A"
max_voltage = "3 A/dm2"
tanks = [
    "T1",
    3,
]
type = "switch-mode"
ripple_curve = [
    { voltage_share = 0.5, ripple = 0.04 },
    { voltage_share = 0.5, riple = 0.04, bogus = 1 },
]

[[tank]]
name = ""
bath = "b"
volume = "0 gal"
solution_drop = "-10 cm"
cooling = "unknown"
gap = "unknown"
counter_electrode = "lead"
exhaust = { flow = "unknown", lid = "yes", proven = 1 }
flight_bar = "copper"
bus = { name = "run" }
"""


def test_every_problem_of_a_file_is_told_at_once_at_its_line() -> None:
    assert told(BROKEN_LINE) == [
        (
            "x.toml:7: rectifier[1].max_voltage: `18` has no unit. Give the voltage as text with its unit, such "
            'as `"18 V"`'
        ),
        (
            "x.toml:9: rectifier[1].type: `phase-controled` is not a choice here; the nearest is `phase-controlled`. "
            "Choose one of `phase-controlled`, `switch-mode`"
        ),
        "x.toml:10: rectifier[1].pulses: `4` is not a choice here. Choose one of `3`, `6`, `12`",
        "x.toml:14: rectifier[2].max_curent: `max_curent` is not a key here. The nearest is `max_current`",
        "x.toml:15: rectifier[2].max_voltage: `3 A/dm2` is not a voltage. Give a number with a unit such as `18 V`",
        'x.toml:18: rectifier[2].tanks[2]: `3` is not text. Put it in quotes: `"3"`',
        "x.toml:23: rectifier[2].ripple_curve[2].riple: `riple` is not a key here. The nearest is `ripple`",
        (
            "x.toml:23: rectifier[2].ripple_curve[2].bogus: `bogus` is not a key here. "
            "Keys here: `voltage_share`, `ripple`"
        ),
        "x.toml:27: tank[1].name: is empty: name. Put a name or a few words between the quotes",
        "x.toml:29: tank[1].volume: `0 gal` is not more than 0 gal. Check number and unit",
        "x.toml:30: tank[1].solution_drop: `-10 cm` is less than the least allowed, 0 cm. Check number and unit",
        "x.toml:32: tank[1].gap: `unknown` is not taken here. Give the value",
        "x.toml:34: tank[1].exhaust.proven: `1` is neither true nor false. Write `true` or `false` without quotes",
        "x.toml:34: tank[1].exhaust.lid: `yes` is neither true nor false. Write `true` or `false` without quotes",
        (
            "x.toml:35: tank[1].flight_bar: `copper` is not a table. "
            "Give its keys and values in braces or under a heading of its own"
        ),
        (
            "x.toml:36: tank[1].bus: is a single table where several may stand. Write `[[bus]]` with two "
            "brackets each side"
        ),
    ]


def test_a_missing_key_is_told_at_the_heading_of_its_table_with_a_line_to_add() -> None:
    assert changed(
        LINE, ('max_current = "3000 A"\n', ""), ('volume = "4000 L"\n', ""), ('name = "Line one"\n', "")
    ) == [
        'x.toml:1: name: is missing: name. Add a line such as `name = "..."`',
        'x.toml:3: rectifier[1].max_current: is missing: rated current. Add a line such as `max_current = "3000 A"`',
        'x.toml:10: tank[1].volume: is missing: solution volume. Add a line such as `volume = "4000 L"`',
    ]


def test_missing_tables_and_lists_are_shown_as_they_are_written() -> None:
    assert told('format = "lineplanner line 1"\nname = "x"\ntank = []\n') == [
        "x.toml:1: rectifier: is missing: rectifiers. Add a line such as `[[rectifier]]`"
    ]
    assert changed(RECIPE, ('bases = ["6xxx"]\n', "")) == [
        'x.toml:1: bases: is missing: for. Add a line such as `bases = ["..."]`'
    ]


def test_a_key_of_a_plain_table_is_told_at_its_own_line() -> None:
    found = changed(PART, ('width = "60 mm"', 'width = "60"'), ('at = ["10 mm", "0 mm"]', 'at = ["10 mm"]'))
    assert found == [
        "x.toml:9: outline.width: `60` has no unit. Give a number with a unit such as `120 mm`",
        'x.toml:13: hole[1].at: `[...]` is not a pair of lengths. Write two in a list, as in `["10 mm", "25 mm"]`',
    ]


def test_one_of_a_pair_is_told_by_its_position() -> None:
    assert changed(PART, ('at = ["10 mm", "0 mm"]', 'at = ["10 mm", 0]')) == [
        'x.toml:13: hole[1].at[2]: `0` has no unit. Give the length as text with its unit, such as `"120 mm"`'
    ]


def test_the_tag_of_a_form_of_part_does_not_show_in_a_path() -> None:
    assert changed(PART, ('thickness = "4 mm"', 'thickness = "4 V"')) == [
        "x.toml:5: thickness: `4 V` is not a length. Give a number with a unit such as `120 mm`"
    ]


@pytest.mark.parametrize("form", ['"plaet"', "5", "[1]", '""', "{ a = 1 }"])
def test_a_form_of_part_that_does_not_exist_is_told(form: str) -> None:
    (found,) = changed(PART, ('form = "plate"', f"form = {form}"))
    assert found.startswith("x.toml:2: form: ")
    assert found.endswith("`plate`, `section`, `turned`, `tube`, `stated`")


def test_a_part_without_a_form_asks_for_one() -> None:
    assert changed(PART, ('form = "plate"\n', "")) == [
        (
            'x.toml:1: form: is missing: the form of the part. Add `form = "plate"` or another of '
            "`plate`, `section`, `turned`, `tube`, `stated`"
        )
    ]


def test_a_setting_may_be_given_with_or_without_its_range() -> None:
    Path("r.toml").write_text(RECIPE, encoding="utf-8")
    recipe = read("r.toml")
    assert isinstance(recipe, Recipe)
    assert recipe.aim == Ranged(value=parse("10 um", THICKNESS), low=8e-6, high=1.2e-5)
    plain = RECIPE.replace('{ value = "10 um", low = "8 um", high = "12 um" }', '"10 um"')
    Path("r.toml").write_text(plain, encoding="utf-8")
    assert read("r.toml").aim == Ranged(value=parse("10 um", THICKNESS))


def test_a_problem_of_a_plain_setting_is_told_at_the_setting() -> None:
    assert changed(RECIPE, ('aim = { value = "10 um", low = "8 um", high = "12 um" }', 'aim = "10 V"')) == [
        "x.toml:6: aim: `10 V` is not a thickness. Give a number with a unit such as `50 um`"
    ]
    assert changed(RECIPE, ('{ value = "10 um", low = "8 um", high = "12 um" }', "[1]")) == [
        "x.toml:6: aim: `[...]` is not a setting. Give one value, or `{ value = ..., low = ..., high = ... }`"
    ]


def test_a_number_of_a_standards_table_must_have_its_source() -> None:
    text = text_of("cell-voltage")
    old = text.splitlines()[1]
    assert changed(text, (old, 'base = "4 V"')) == [
        'x.toml:2: base: `4 V` has no source. Write `{ value = ..., source = "...", status = "..." }`'
    ]


def test_a_standards_table_is_bounded_like_its_field() -> None:
    text = text_of("conductors")
    assert changed(text, ('value = "1.72 uohm cm"', 'value = "0 uohm cm"'), ('"assumption"', '"guess"')) == [
        "x.toml:6: conductor[1].resistivity.value: `0 uohm cm` is not more than 0 uohm cm. Check number and unit",
        (
            "x.toml:6: conductor[1].resistivity.status: `guess` is not a choice here. Choose one of "
            "`published (read)`, `published (from memory)`, `derived`, `common practice`, `assumption`, "
            "`entered here`, `measured here`"
        ),
    ]


def test_a_limit_is_shown_in_the_unit_that_was_typed() -> None:
    assert changed(text_of("bath"), ('"20 degC"', '"230 degF"'), ('"180 g/L"', '"120 oz/gal"')) == [
        "x.toml:4: temperature: `230 degF` is more than the most allowed, 212 degF. Check number and unit",
        "x.toml:5: sulfuric_acid: `120 oz/gal` is more than the most allowed, 80.1159 oz/gal. Check number and unit",
    ]


@pytest.mark.parametrize("number", ["nan", "inf", "1" + "0" * 400])
def test_a_number_that_is_no_amount_is_refused(number: str) -> None:
    text = text_of("bath") + f"conductivity_factor = {number}\n"
    (found,) = told(text)
    assert found.startswith("x.toml:6: conductivity_factor: `")
    assert found.endswith("` is not a number that can be used. Give an ordinary number")


def test_true_is_not_a_number_and_a_number_is_not_a_count_when_it_has_a_point() -> None:
    assert told(text_of("bath") + "conductivity_factor = true\n") == [
        'x.toml:6: conductivity_factor: `true` is not a ratio. Give it as text with its unit, such as `"0.5"`'
    ]
    assert changed(
        RACK, ("count = 6", "count = 6.0"), ('kind = "spring"', 'kind = "spring"\ncontacts = true')
    ) == [
        "x.toml:17: tip_row[1].count: `6.0` is not a whole number. Write it without quotes and without a point",
        "x.toml:21: tip_row[1].contacts: `true` is not a whole number. Write it without quotes and without a point",
    ]


def test_a_date_may_be_a_date_or_text() -> None:
    for written in ("2026-03-14", '"2026-03-14"'):
        Path("r.toml").write_text(f"{RECIPE}approved_on = {written}\n", encoding="utf-8")
        assert read("r.toml").approved_on == "2026-03-14"
    text = text_of("cautions")
    for written in ("2026-03-14", '"2026-03-14"'):
        assert changed(text, ("as_of = 2026-03-14", f"as_of = {written}")) == []
    (found,) = changed(text, ("as_of = 2026-03-14", 'as_of = "14 March"'))
    assert found.endswith("as_of: `14 March` is not a date. Write year, month and day, as in `2026-03-14`")


def test_unknown_is_an_answer_where_the_field_takes_it() -> None:
    Path("l.toml").write_text(LINE, encoding="utf-8")
    line = read("l.toml")
    assert isinstance(line, Line)
    assert line.tanks[0].exhaust is not None
    assert line.tanks[0].exhaust.flow is None


def test_control_characters_never_reach_the_screen() -> None:
    (found,) = changed(MATERIAL, ('"6061-T6"', '"\\u001b[2Jx"'))
    assert found == "x.toml:2: name: `\\x1b[2Jx` holds characters that cannot be shown. Take them out"


def test_a_long_value_is_repeated_in_part_only() -> None:
    (found,) = changed(PART, ('"4 mm"', f'"{"9" * 5000} mm"'))
    assert len(found) < 200


def test_after_a_hundred_problems_the_rest_is_counted() -> None:
    found = told(MATERIAL + "".join(f"bogus_{number} = 1\n" for number in range(300)))
    assert len(found) == 101
    assert found[-1] == "x.toml:1: and 200 more problems. Put the first ones right and check again"


# --- the format line -------------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("line", "said"),
    [
        (
            "",
            'x.toml:1: has no format line. Begin the file with a line such as `format = "lineplanner KIND 1"`',
        ),
        (
            'format = "lineplanner lin 1"\n',
            "x.toml:1: format: `lineplanner lin 1` is not a kind of file. The nearest is `lineplanner line 1`",
        ),
        (
            'format = "lineplanner line 2"\n',
            (
                "x.toml:1: format: `lineplanner line 2` was written for a newer lineplanner; this one reads version 1. "
                "Update lineplanner"
            ),
        ),
    ],
    ids=["none", "misspelt", "newer"],
)
def test_a_file_says_what_it_is(line: str, said: str) -> None:
    assert told(f'{line}name = "x"\n') == [said]


@pytest.mark.parametrize("value", ["5", '"toml"', '"lineplanner xyzzy 1"', "true", '["lineplanner line 1"]'])
def test_a_format_that_is_not_ours_is_told_with_the_kinds(value: str) -> None:
    (found,) = told(f"format = {value}\n")
    assert found.startswith("x.toml:1: format: `")
    assert "Write `lineplanner KIND 1` with one of `site`, `line`" in found


def test_a_file_without_a_format_is_told_the_kind_of_its_folder(tmp_path: Path) -> None:
    folder = tmp_path / "configs" / "recipes"
    folder.mkdir(parents=True)
    path = folder / "x.toml"
    path.write_text('name = "x"\n', encoding="utf-8")
    (found,) = check(path)
    assert found.facts == {"kind": "recipe"}


def test_a_file_of_another_kind_than_wanted_is_told() -> None:
    Path("x.toml").write_text(RACK, encoding="utf-8")
    (found,) = check("x.toml", "load")
    assert word(found) == (
        "x.toml:1: format: `lineplanner rack 1` is not the kind wanted here. This place takes `lineplanner load 1`"
    )


# --- rules between fields, told at their line --------------------------------------------------------------


def test_rules_between_fields_are_told_at_the_line_of_the_key_they_blame() -> None:
    assert changed(
        RECIPE,
        (
            'aim = { value = "10 um", low = "8 um", high = "12 um" }',
            'aim = { value = "10 um", low = "11 um" }',
        ),
        ('minimum = "8 um"', 'minimum = "12 um"'),
        ("current_density", "temperature"),
        ('{ value = "12 A/ft2", low = "10 A/ft2", high = "15 A/ft2" }', '"20 degC"'),
    ) == [
        (
            "x.toml:1: current_density: `anodize-sulfuric` needs current density or voltages. "
            "Add `current_density` or `[[voltage]]`"
        ),
        "x.toml:6: aim.low: the value 10 um is less than its own low, 11 um. Correct one of the two",
        "x.toml:7: minimum: the minimum 12 um is more than the aim 10 um. Raise the aim or lower the minimum",
    ]


def test_a_rule_in_a_list_of_tables_names_keys_as_the_file_does() -> None:
    assert changed(LOAD, ('tips = ["A1-A6"]', 'tips = ["A1-A6"]\ntips_each = 4')) == [
        "x.toml:10: hang[1].tips: 6 tips do not go round for parts on 4 tips each. Name a multiple of 4"
    ]


def test_an_aluminium_rack_asks_what_its_metal_is_like() -> None:
    assert changed(RACK, ('conductor = "titanium"', 'conductor = "aluminium 6061"')) == [
        (
            'x.toml:1: surface: an aluminium rack must say what its metal is like: `"stripped"` (bare, takes current '
            'like the parts), `"coated"` (still has its film, takes none) or `"stopped-off"` (covered, takes none). '
            'Add `surface = "..."`'
        )
    ]


def test_rules_of_drawn_parts_are_told_in_the_same_form() -> None:
    assert changed(PART, ('at = ["10 mm", "0 mm"]', 'at = ["10 mm", "0 mm"]\ndepth = "5 mm"')) == [
        "x.toml:14: hole[1].depth: `hole-1` is 5 mm deep in 4 mm of metal. Leave the depth out if it goes through"
    ]


def test_a_valid_file_becomes_its_record() -> None:
    Path("p.toml").write_text(PART, encoding="utf-8")
    part = read("p.toml")
    assert isinstance(part, Plate)
    assert (part.thickness, part.holes[0].diameter, part.holes[0].at) == (0.004, 0.006, (0.01, 0.0))


def test_reading_a_broken_file_raises_all_its_problems() -> None:
    Path("x.toml").write_text(BROKEN_LINE, encoding="utf-8")
    with pytest.raises(FilesError) as caught:
        read("x.toml")
    assert len(caught.value.problems) == 16
    assert str(caught.value).startswith("x.toml:7: rectifier[1].max_voltage: ")
