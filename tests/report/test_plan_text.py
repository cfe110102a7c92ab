"""A plan as text: setpoints first, then verdict and gravest caution, then why."""

import re
from collections.abc import Callable
from dataclasses import replace

from lineplanner.files.library import Library
from lineplanner.findings import Finding, Level, note, upper
from lineplanner.inputs.cautions import MOMENTS
from lineplanner.plan import Plan, Thicknesses
from lineplanner.program.stages import unreachable
from lineplanner.quantities import CURRENT, THICKNESS
from lineplanner.report.area_ledger import areas_of
from lineplanner.report.area_text import area_text
from lineplanner.report.card import card_lines
from lineplanner.report.cautions_text import cautions_in_full
from lineplanner.report.checks_text import checks_lines, others_lines
from lineplanner.report.digits import charge
from lineplanner.report.explain import explanation
from lineplanner.report.plan_json import plan_json
from lineplanner.report.plan_text import LAST_LINE, plan_text, recipe_said
from lineplanner.report.program_text import areas_lines, program_lines, thickness_lines
from lineplanner.report.setpoints import caution_text
from lineplanner.report.style import Style
from lineplanner.sources import Source, Status

METRIC = Style("metric", ascii=True)
NAMEPLATE = Source("nameplate", Status.ENTERED)
USUAL = Source("usual", Status.PRACTICE)
Demo = Callable[[str], Plan]
PARTS = ["SET  ", "CHECKS MET|CAUTION|STOP", "DANGER|WARNING|CAUTION|NOTICE", "PROGRAM", "THICKNESS", "AREAS",
         "CIRCUIT", "CHECKS$", "CAUTIONS$", "plan "]  # fmt: skip


def test_the_parts_stand_in_their_order_of_importance(each_load: Plan) -> None:
    lines = plan_text(each_load, METRIC).splitlines()
    found, at = [], 0
    for part in PARTS:
        at = next(n for n, line in enumerate(lines) if n >= at and re.match(part, line))
        found.append(at)
    assert found == sorted(found)
    assert lines[-1] == LAST_LINE


def test_every_stage_has_a_row_and_the_last_counter_is_that_of_the_run(demo: Demo) -> None:
    made = demo("rod-40x900")
    assert made.run is not None
    lines = program_lines(made, METRIC)
    stages = [line.split()[0] for line in lines[1 : 1 + len(made.run.stages)]]
    assert stages == [stage.stage for stage in made.run.stages]
    assert f" {charge(made.run.counter, METRIC)} " in lines[len(made.run.stages)]
    assert lines[-1].strip() == "volts are estimates; the panel holds the current"


def test_a_stopped_plan_prints_no_program_and_no_expected_thickness(
    demo: Demo, with_a_stop: Callable[[Plan], Plan]
) -> None:
    made = with_a_stop(demo("valve-blocks-24"))
    assert program_lines(made, METRIC) == ["  none: a stop forbids this plan"]
    assert thickness_lines(made, METRIC) == [
        "  aim 50 um per side, total coating; minimum 40 um; maximum 60 um"
    ]


def test_the_band_is_split_between_loads_and_within_one(demo: Demo) -> None:
    lines = thickness_lines(demo("valve-blocks-24"), METRIC)
    assert re.match(r"  expected [\d.]+ um; 95 % between [\d.]+ um and [\d.]+ um", lines[1])
    assert re.match(r"  half-width between loads \d+ %, within a load \d+ %:", lines[2])
    assert any(line.split()[:1] == ["position"] and " within " in line for line in lines[3:])


def test_grinding_stock_is_said_to_be_part_of_the_aim(demo: Demo) -> None:
    assert thickness_lines(demo("rod-40x900"), METRIC)[0] == (
        "  aim 150 um per side, total coating, 75 um of it to grind off"
    )


def test_rack_metal_of_one_kind_shares_a_row(demo: Demo) -> None:
    lines = areas_lines(demo("valve-blocks-24"), METRIC)
    assert any(line.startswith("  spline 1 to spline 4 ") for line in lines)


def test_no_line_of_a_plan_is_wider_than_a_terminal(each_load: Plan) -> None:
    for style in (METRIC, Style("us", ascii=True), Style("metric")):
        assert [line for line in plan_text(each_load, style).splitlines() if len(line) > 80] == []


def test_no_table_of_areas_is_wider_than_a_terminal(library: Library) -> None:
    for name in (name for kind in ("load", "rack", "part") for name in library.stems(kind)):
        for style in (METRIC, Style("us", ascii=True)):
            lines = area_text(areas_of(library, name), style).splitlines()
            assert [line for line in lines if len(line) > 80] == [], name


def test_parts_of_one_name_are_told_apart_by_their_material(demo: Demo) -> None:
    rows = [line for line in areas_lines(demo("lug-mix"), METRIC) if line.startswith("  lifting lug")]
    assert [row.split("  ")[1] for row in rows] == ["lifting lug, 2024-T3", "lifting lug, 6061-T6"]
    alone = areas_lines(demo("valve-blocks-24"), METRIC)
    assert alone[1].startswith("  valve block  ")


def test_what_this_version_does_not_check_stands_under_the_areas(each_load: Plan) -> None:
    said = "  not checked by this version: room to the tank's walls and floor"
    assert areas_lines(each_load, METRIC)[-1] == said


# --- the status of the recipe -----------------------------------------------------------------------------


def test_a_recipe_whose_values_were_changed_after_its_approval_says_so(demo: Demo) -> None:
    made = demo("valve-blocks-24")
    changed = replace(made, status="draft", filed=replace(made.filed, minimum=1e-6))
    assert recipe_said(changed).endswith(" rev C DRAFT RECIPE (changed since it was approved)")
    never = replace(made.filed, status="draft", minimum=1e-6)
    assert recipe_said(replace(changed, filed=never)).endswith(" rev C DRAFT RECIPE")
    nameless = replace(made.filed, approved_content="")
    assert recipe_said(replace(changed, filed=nameless)).endswith(" rev C DRAFT RECIPE")
    assert recipe_said(made).endswith(" rev C approved")


# --- checks -----------------------------------------------------------------------------------------------

TIGHT = upper(
    "contacts",
    value=9.4,
    limit=10.0,
    kind=CURRENT,
    source=USUAL,
    key="contacts",
    fix="contacts.near",
    part="lug",
)
LOOSE = upper(
    "rack-rating", value=5.0, limit=10.0, kind=CURRENT, source=NAMEPLATE, key="rack-rating", rack="r"
)
ASIDE = replace(LOOSE, check="rack-drop", level=Level.NOTE, margin=-1.0, value=20.0)
UNKNOWN = note("places", "places.counted", USUAL, "places.hang")


def test_checks_stand_tightest_first_and_notes_last(demo: Demo) -> None:
    made = replace(demo("valve-blocks-24"), findings=(TIGHT, ASIDE, UNKNOWN, LOOSE))
    assert checks_lines(made, METRIC) == [
        "  check        demand  limit    use  level    limit is",
        "  contacts      9.4 A   10 A   94 %  CAUTION  practice",
        "  rack rating     5 A   10 A   50 %  ok       entered",
        "  rack drop      20 A   10 A  200 %  note     entered",
        "  CAUTION contacts: lug: 9.4 A for each part, its contacts carry 10 A. Close",
        "    to what its contacts carry: clean tips, firm grip, no more current.",
        "  note rack drop: Rack r: 20 A, rated 10 A.",
        "  note hanging places: Parts are only counted: all of them taken as in the",
        "    solution, places and contacts not known. Name tips or places in the",
        "    load.",
    ]


def test_rows_of_one_check_are_told_apart(demo: Demo) -> None:
    lines = checks_lines(demo("lug-mix"), METRIC)
    rows = [line for line in lines if line.startswith("  burning ")]
    assert len({row.split("  ")[1] for row in rows}) == len(rows) == 2


def test_every_comparison_has_a_row(each_load: Plan) -> None:
    compared = [f for f in each_load.findings if f.value is not None and f.limit is not None]
    lines = checks_lines(each_load, METRIC)
    assert len(
        [line for line in lines if re.search(r" (ok|CAUTION|STOP|note) +\w+( memory)?$", line)]
    ) == len(compared)


def test_the_other_rectifiers_say_what_they_fail_first(demo: Demo) -> None:
    made = replace(demo("valve-blocks-24"), others=(("R8", LOOSE), ("R9", None)))
    assert others_lines(made, METRIC) == ["  R8: Rack r: 5 A, rated 10 A", "  R9: meets its checks too"]


# --- cautions ---------------------------------------------------------------------------------------------


def test_cautions_are_grouped_by_moment_each_in_full_once(each_load: Plan) -> None:
    lines = cautions_in_full(each_load.cautions, METRIC)
    moments = [line.strip() for line in lines if re.match(r"  \S", line)]
    assert moments == [m for m in MOMENTS if any(m in c.moments for c in each_load.cautions)]
    text = re.sub(r"\s+", " ", " ".join(lines))
    for caution in each_load.cautions:
        said = re.sub(r"\s+", " ", caution_text(caution, METRIC))
        assert text.count(f"[{caution.word}] {said}") == 1
        assert len(re.findall(rf"\b{caution.id} \[{caution.word}\]", text)) == len(caution.moments) - 1


def test_a_draft_and_its_deviations_are_said_in_the_heading(demo: Demo) -> None:
    made = replace(demo("grip-rails-dye"), status="draft")
    lines = plan_text(made, METRIC).splitlines()
    assert "DRAFT RECIPE, 1 deviation" in " ".join(lines[:3])
    assert any(line.startswith("  deviation: current density ") for line in lines[:5])


# --- where there is no number to set ----------------------------------------------------------------------

NO_THICKNESS = Thicknesses(expected=None, low=None, high=None, band=None)


def without_a_run(made: Plan) -> Plan:
    """No rectifier feeds the tank."""
    facts = {"tank": "H1"}
    stop = Finding("rectifier", Level.STOP, "rectifier.none", NAMEPLATE, fix="rectifier.enter", facts=facts)
    bare = replace(made, run=None, others=(), thickness=NO_THICKNESS, emissions=None, figures={})
    return replace(bare, findings=(stop,), binding=None)


def without_a_time(made: Plan) -> Plan:
    """No time reaches the aim."""
    assert made.run is not None
    assert made.run.rectifier is not None
    run = unreachable(
        rectifier=made.run.rectifier, set_current=80.0, peak_current=80.0, reachable=2e-5, voltage_limit=75.0
    )
    key, fix = "aim.unreachable", "aim.more-current"
    stop = Finding("aim", Level.STOP, key, NAMEPLATE, THICKNESS, 2e-5, 5e-5, -0.6, fix)
    bare = replace(made, run=run, thickness=NO_THICKNESS, emissions=None, figures={})
    return replace(bare, findings=(stop,), binding=stop)


def everywhere(made: Plan) -> list[str]:
    """Card, text and JSON, each on one line."""
    texts = ("\n".join(card_lines(made, METRIC)), plan_text(made, METRIC), plan_json(made, METRIC))
    return [re.sub(r"\s+", " ", text) for text in texts]


def test_a_plan_that_no_rectifier_feeds_says_so_everywhere(each_load: Plan) -> None:
    made = without_a_run(each_load)
    for text in everywhere(made):
        assert "No rectifier of this line feeds tank H1" in text
        assert "Add tank H1 to a rectifier of the line, or choose another tank" in text
    assert '"peak_A": null' in plan_json(made, METRIC)
    assert explanation(made, ["all"], METRIC)


def test_an_aim_that_no_time_reaches_is_said_with_what_is_reached(each_load: Plan) -> None:
    made = without_a_time(each_load)
    for text in everywhere(made):
        assert "No time reaches the aim of 50 um; at most 20 um comes" in text
    assert plan_text(made, METRIC).count("nothing to set") == 1
    assert explanation(made, ["check:aim"], METRIC)[1].startswith("  stop: No time reaches the aim")
