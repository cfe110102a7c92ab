"""What a screen is handed: the report's own texts, cut into pieces that know their figure."""

from pathlib import Path

import pytest

from lineplanner.errors import InputError
from lineplanner.files.library import Library
from lineplanner.plan import Plan, plan
from lineplanner.report.card import card_lines
from lineplanner.report.cautions_text import cautions_in_full
from lineplanner.report.checks_text import checks_lines
from lineplanner.report.explain import explanation, stories
from lineplanner.report.layout import columns
from lineplanner.report.listing import list_load, listed, said_below
from lineplanner.report.picture import scene_of
from lineplanner.report.plan_json import numeric_leaves, plan_record
from lineplanner.report.plan_text import recipe_said
from lineplanner.report.program_text import area_notes, areas_lines, program_lines
from lineplanner.report.rows import Row, Table
from lineplanner.report.selected import item_of, selected_rows
from lineplanner.report.setpoints import caution_line, setpoint_lines, verdict_line
from lineplanner.report.style import Style
from lineplanner.report.view_tables import (
    areas_table,
    card_rows,
    caution_rows,
    check_said,
    checks_table,
    program_said,
    program_table,
)
from lineplanner.report.views import head_of, title_text, why_lines, why_title

LIBRARY = Library(Path(__file__).parents[2])
PLANS = {stem: plan(LIBRARY.case(stem)) for stem in LIBRARY.stems("load")}
STYLES = (Style("metric"), Style("us"), Style("us", ascii=True))
every_plan = pytest.mark.parametrize("made", PLANS.values(), ids=PLANS.keys())


def as_lines(table: Table) -> list[str]:
    return columns([table.columns, *(row.cells for row in table.rows)], right=table.right)


# --- head -------------------------------------------------------------------------------------------------


@every_plan
def test_the_pieces_of_the_head_joined_are_the_lines_of_the_report(made: Plan) -> None:
    for style in STYLES:
        for width in (38, 78, 158):
            head = head_of(made, style, width)
            joined = ["".join(piece.text for piece in line) for line in head.setpoints]
            assert joined == setpoint_lines(made, style, width)
            assert head.verdict.text == verdict_line(made, style, width)
            assert head.caution == caution_line(made, style, width=width)


@every_plan
def test_every_figure_of_the_setpoints_can_be_asked_why(made: Plan) -> None:
    told = stories(made)
    for line in head_of(made, STYLES[0], 158).setpoints:
        for piece in line:
            has_figure = any(c.isdigit() for c in piece.text) and "rectifier" not in piece.text
            assert (piece.path is not None) == has_figure, piece
            assert piece.path is None or piece.path in told


def test_the_figure_of_a_piece_is_the_one_that_it_prints() -> None:
    made = PLANS["valve-blocks-24"]
    record = plan_record(made, STYLES[0])
    pieces = {piece.path: piece.text for line in head_of(made, STYLES[0]).setpoints for piece in line}
    assert pieces["current.panel_set_A"] == f"{record['current']['panel_set_A']:.0f} A"
    assert pieces["time.total_s"] == f"{record['time']['total_s'] / 60:g} min"
    assert pieces["charge_Ah.counter"] == f"stop at {record['charge_Ah']['counter']:.0f} Ah"
    assert pieces["program[0].to_s"] == f"ramp {record['program'][0]['to_s'] / 60:g} min"


def test_a_title_too_long_gives_up_the_name_of_its_recipe_never_its_status_or_tank() -> None:
    made = PLANS["rod-40x900"]
    whole, short = title_text(made, 200), title_text(made, 64)
    assert whole == f"rod-40x900   {recipe_said(made)}   tank C1"
    assert len(short) <= 64
    assert short.endswith(whole[whole.index(" rev ") :])


# --- tables -----------------------------------------------------------------------------------------------


@every_plan
def test_the_stages_are_those_of_the_program_as_text(made: Plan) -> None:
    for style in STYLES:
        table, lines = program_table(made, style), program_lines(made, style)
        if table.rows:
            assert as_lines(table) == lines[: len(table.rows) + 1]
            assert (
                program_said(made, style)[: len(lines) - len(table.rows) - 1] == lines[len(table.rows) + 1 :]
            )
        else:
            assert program_said(made, style)[: len(lines)] == lines


@every_plan
def test_the_checks_are_those_of_the_report_with_the_rest_among_them(made: Plan) -> None:
    table = checks_table(made, STYLES[0])
    assert len(table.rows) == len(made.findings)
    printed = [" ".join(line.split()) for line in checks_lines(made, STYLES[0])]
    for row in table.rows:
        finding = made.findings[int(str(row.path)[9:].partition("]")[0])]
        if finding.value is not None and finding.limit is not None:
            name, *cells = (cell for place, cell in enumerate(row.cells) if place != 4)
            lines = [line for line in printed if line.endswith(" ".join(cells))]
            # where the report's table would be too wide it cuts names in their middle
            assert any(line.startswith(name) or ".." in line for line in lines), row


def test_a_bar_is_full_at_the_limit_and_never_before() -> None:
    for made in PLANS.values():
        for row in checks_table(made, STYLES[0]).rows:
            finding = made.findings[int(str(row.path)[9:].partition("]")[0])]
            if row.cells[4]:
                assert finding.margin is not None
                assert (row.cells[4] == "#" * 10) == (finding.margin <= 0.0)
                assert len(row.cells[4]) == 10
                tenths = float(row.cells[3].removeprefix("over ").partition(" ")[0]) / 10
                assert row.cells[4].count("#") == pytest.approx(min(10.0, tenths), abs=1.05)


@every_plan
def test_the_areas_are_those_of_the_report(made: Plan) -> None:
    for style in STYLES:
        table, lines = areas_table(made, style), areas_lines(made, style)[1:]
        assert area_notes(made, style) == lines[len(table.rows) :]
        for row, line in zip(table.rows, lines, strict=False):
            for place in (1, 2, 6, 7, 8):
                assert row.cells[place].partition(" ")[0] in line.split() or not row.cells[place]


@every_plan
def test_the_shares_of_the_current_add_up(made: Plan) -> None:
    shares = [float(row.cells[3].partition(" ")[0]) for row in areas_table(made, STYLES[0]).rows[:-1]]
    assert sum(shares) == pytest.approx(100.0, abs=0.5 * len(shares) + 0.5)  # each printed to 1 %


@every_plan
def test_card_and_cautions_are_the_reports_own_lines(made: Plan) -> None:
    for style in STYLES:
        assert [row.cells[0] for row in card_rows(made, style)] == card_lines(made, style)
        assert [row.cells[0] for row in caution_rows(made, style)] == cautions_in_full(made.cautions, style)


# --- why --------------------------------------------------------------------------------------------------


@every_plan
def test_every_row_of_every_view_has_an_answer_to_why(made: Plan) -> None:
    style = STYLES[0]
    rows: list[Row] = [*card_rows(made, style), *caution_rows(made, style)]
    for table in (program_table(made, style), checks_table(made, style), areas_table(made, style)):
        rows += table.rows
    printed = numeric_leaves(plan_record(made, style))
    for path in {path for row in rows for path in (row.path, *row.paths) if path}:
        assert why_title(made, path)
        if path in printed or path.startswith(("findings", "caution")):
            assert why_lines(made, path, style), path
        else:
            with pytest.raises(InputError) as caught:  # printed as `-`
                why_lines(made, path, style)
            assert caught.value.key == "figure.none"


def test_the_story_of_a_figure_is_that_of_the_command() -> None:
    made = PLANS["valve-blocks-24"]
    for path in ("current.panel_set_A", "findings[3].margin", "area.items[0].carrying_m2"):
        assert why_lines(made, path, STYLES[1]) == explanation(made, [path], STYLES[1])


def test_a_caution_says_when_it_holds_and_on_whose_word() -> None:
    made = PLANS["rod-40x900"]
    one = made.cautions[0]
    lines = " ".join(" ".join(why_lines(made, f"caution:{one.id}", STYLES[0])).split())
    assert lines.startswith(f"[{one.word}] ")
    assert f"when: {', '.join(one.moments)}" in lines
    assert str(one.source)[:40] in lines
    assert one.source.status.value in lines


def test_a_check_without_a_comparison_says_what_it_found_and_its_source() -> None:
    made = PLANS["lug-mix"]
    place = next(n for n, f in enumerate(made.findings) if f.margin is None)
    lines = why_lines(made, f"findings[{place}].margin", STYLES[0])
    assert lines[0] == f"check:{made.findings[place].check}"
    assert any(line.startswith("  source: ") for line in lines)
    assert check_said(made, f"findings[{place}].margin", STYLES[0])[0].split()[0] in (
        "STOP",
        "CAUTION",
        "note",
        "ok",
    )


# --- list and selected part -------------------------------------------------------------------------------


@every_plan
def test_the_list_says_what_the_setpoints_say(made: Plan) -> None:
    for style in STYLES:
        row = listed(made, style)
        first = setpoint_lines(made, style, 10_000)
        if made.stopped:
            assert row.cells[3:5] == ("-", "-")
            assert row.cells[5].startswith("STOP ")
        else:
            assert first[0].startswith(f"SET  {row.cells[3]}   ")
            assert row.cells[4] in " ".join(first)
        below = said_below(row, 78)
        assert below == [verdict_line(made, style, 78), caution_line(made, style, width=78)]


def test_a_load_that_is_none_is_listed_with_its_problem_in_every_unit_system() -> None:
    for row in list_load(LIBRARY, "valve-block-24", ("metric", "us"), STYLES[0]).values():
        assert row.cells[1] == "cannot be read"
        assert "The nearest is `valve-blocks-24`" in row.cells[5]
        assert row.cells[5] in " ".join(said_below(row, 300))


@every_plan
def test_the_selected_part_prints_the_figures_of_its_item(made: Plan) -> None:
    record = plan_record(made, STYLES[0])
    for hung in scene_of(made).parts[:3]:
        rows = selected_rows(made, STYLES[0], hung.hang, hung)
        item = record["area"]["items"][item_of(made, hung.hang)]
        assert rows[0].cells[0].startswith(f"part {hung.number} of ")
        assert any(f"all {item['count']}: " in row.cells[0] for row in rows) or item["count"] == 1
        assert all(row.path and row.path.startswith("area.items[") for row in rows[:-1])
        assert rows[-1].path is None  # where it hangs is no figure of the plan
