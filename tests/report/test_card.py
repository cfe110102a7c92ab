"""The run card: 76 columns, at most 60 lines, in the order of the interface, no danger ever hidden.

Golden cards are renewed by LINEPLANNER_RENEW_GOLDEN=1; they hold what this program printed, nothing from outside.
"""

import os
import re
from collections.abc import Callable
from dataclasses import replace
from pathlib import Path

import pytest

from lineplanner.inputs.values import Ranged
from lineplanner.plan import Plan
from lineplanner.program.stages import Stage
from lineplanner.quantities import LENGTH
from lineplanner.report.card import LINES, RAMP_ROWS, bath_said, card_lines, card_text, ramp_rows
from lineplanner.report.layout import WIDTH
from lineplanner.report.setpoints import caution_short, caution_text
from lineplanner.report.style import Style
from lineplanner.report.watch import moments

GOLDEN = Path(__file__).parents[1] / "golden"
METRIC = Style("metric", ascii=True)
STYLES = [METRIC, Style("us", ascii=True), Style("metric")]
NAMES = ["metric-plain", "us-plain", "metric-signs"]
Demo = Callable[[str], Plan]


@pytest.fixture(params=STYLES, ids=NAMES)
def style(request: pytest.FixtureRequest) -> Style:
    found: Style = request.param
    return found


def test_a_card_fits_on_one_sheet(each_load: Plan, style: Style) -> None:
    lines = card_lines(each_load, style)
    assert len(lines) <= LINES
    assert max(map(len, lines)) <= WIDTH


def test_a_card_of_a_stopped_plan_fits_too(
    each_load: Plan, style: Style, with_a_stop: Callable[[Plan], Plan]
) -> None:
    lines = card_lines(with_a_stop(each_load), style)
    assert len(lines) <= LINES
    assert max(map(len, lines)) <= WIDTH


def joined(lines: list[str]) -> str:
    return re.sub(r"\s+", " ", " ".join(lines))


def test_every_danger_of_a_demo_load_is_on_its_card_in_full(each_load: Plan, style: Style) -> None:
    text = joined(card_lines(each_load, style))
    for caution in each_load.cautions:
        if caution.word == "DANGER":
            assert f"[DANGER] {joined([caution_text(caution, style)])}" in text


def test_every_caution_is_on_the_card_with_its_word(each_load: Plan, style: Style) -> None:
    text = joined(card_lines(each_load, style))
    for caution in each_load.cautions:
        in_full = f"[{caution.word}] {joined([caution_text(caution, style)])}" in text
        phrase = re.escape(caution_short(caution, each_load, style))
        named = re.search(rf"\[{caution.word}\] (?:[^\[\]]+; )?{phrase}", text)
        assert in_full or named, caution.id


def test_no_caution_is_named_by_its_id(each_load: Plan, with_a_stop: Callable[[Plan], Plan]) -> None:
    for made in (each_load, with_a_stop(each_load)):
        text = joined(card_lines(made, METRIC))
        ids = [c.id for c in made.cautions if "-" in c.id]
        assert [one for one in ids if re.search(rf"(?<![\w-]){one}(?![\w-])", text)] == []


def test_a_card_with_shortened_cautions_says_where_they_are_in_full(each_load: Plan) -> None:
    text = joined(card_lines(each_load, METRIC))
    if any(f"[{c.word}] {joined([caution_text(c, METRIC)])}" not in text for c in each_load.cautions):
        assert f"(in full: lineplanner plan {each_load.case.name})" in text


def test_dangers_are_named_even_where_there_is_no_room_at_all(demo: Demo) -> None:
    made = demo("rod-40x900")
    note = "x" * 70
    change = replace(made.case.load, hangs=made.case.load.hangs * 40, note=note)
    text = joined(card_lines(replace(made, case=replace(made.case, load=change)), METRIC))
    dangers = [caution_short(c, made, METRIC) for c in made.cautions if c.word == "DANGER"]
    assert f"[DANGER] {'; '.join(dangers)}" in text


# --- bath, notes, outage, what is not checked -------------------------------------------------------------


@pytest.mark.parametrize(
    ("bath", "low", "high", "said"),
    [
        (328.15, 327.15, 330.15, "bath 55 degC (54 to 57)"),
        (328.15, None, None, "bath 55 degC (recipe 56 degC)"),
        (328.15, 327.15, None, "bath 55 degC (at least 54)"),
        (328.15, None, 330.15, "bath 55 degC (at most 57)"),
    ],
)
def test_the_bath_is_told_with_the_range_of_the_recipe(
    demo: Demo, bath: float, low: float | None, high: float | None, said: str
) -> None:
    made = demo("rod-40x900")
    case = replace(made.case, bath=replace(made.case.bath, temperature=bath))
    filed = replace(made.filed, temperature=Ranged(value=329.15, low=low, high=high))
    assert bath_said(replace(made, case=case, filed=filed), METRIC) == said
    assert (
        bath_said(replace(made, case=case, filed=replace(made.filed, temperature=None)), METRIC)
        == "bath 55 degC"
    )


def test_the_bath_stands_first_before_current(each_load: Plan) -> None:
    if not each_load.stopped:
        assert re.search(
            r"BEFORE CURRENT \[ \] bath -?[\d.]+ degC \(-?[\d.]+ to -?[\d.]+\);",
            joined(card_lines(each_load, METRIC)),
        )


def test_the_notes_of_recipe_and_load_are_on_the_card(demo: Demo) -> None:
    made = demo("guide-pins-flash")
    load = replace(made.case.load, note="Second lot of three.")
    text = joined(card_lines(replace(made, case=replace(made.case, load=load)), METRIC))
    assert f"NOTE of the recipe {made.recipe.note}" in text
    assert "NOTE of the load Second lot of three." in text


def test_a_note_that_is_too_long_says_where_it_is_whole(demo: Demo) -> None:
    made = demo("valve-blocks-24")
    long = replace(made.case.load, note="word " * 100)
    lines = card_lines(replace(made, case=replace(made.case, load=long)), METRIC)
    assert "  ... (in full: lineplanner plan valve-blocks-24)" in lines
    assert len(lines) <= LINES


def test_a_stopped_card_has_no_list_to_tick(each_load: Plan, with_a_stop: Callable[[Plan], Plan]) -> None:
    text = joined(card_lines(with_a_stop(each_load), METRIC))
    assert "[ ]" not in text
    assert "BEFORE CURRENT the current stays off: a stop forbids this plan" in text


def test_a_hard_chrome_card_says_what_an_outage_asks_for(each_load: Plan) -> None:
    text = joined(card_lines(each_load, METRIC))
    said = "Outage: log when and how long; the recipe has no restart, so a person decides on it." in text
    assert said == (each_load.recipe.process == "chrome-hard" and not each_load.stopped)


def test_what_is_not_checked_stands_where_the_parts_are_hung(each_load: Plan) -> None:
    text = joined(card_lines(each_load, METRIC))
    least = each_load.gaps.least
    gaps = "" if least is None else f"; gaps from {METRIC.show(least, LENGTH)}"
    assert re.search(rf" HANG [^:].*{re.escape(gaps)}; tank fit unchecked AREA ", text)


def test_a_recipe_changed_since_its_approval_says_so_on_the_card(demo: Demo) -> None:
    made = demo("valve-blocks-24")
    filed = replace(made.filed, note="another note")
    text = joined(card_lines(replace(made, filed=filed, status="draft"), METRIC))
    assert "rev C DRAFT RECIPE (changed since it was approved)" in text


ORDER = ["RUN CARD  ", "CHECKS MET|CAUTION|STOP", "DANGER", "SET  |NOTHING TO SET", "BEFORE CURRENT", "AFTER CURRENT",
         "HANG  ", "AREA  ", "This plan rests on", "CAUTIONS  ", "ACTUAL  ", "Planning estimate;"]  # fmt: skip


def test_the_parts_stand_in_the_order_of_the_interface(each_load: Plan) -> None:
    lines = card_lines(each_load, METRIC)
    found = [next(n for n, line in enumerate(lines) if re.match(part, line)) for part in ORDER]
    assert found == sorted(found)
    assert lines[-1] == "Planning estimate; safety data sheet, local codes, qualified people decide."


def test_a_card_can_be_printed_in_ascii(each_load: Plan) -> None:
    text = card_text(each_load, METRIC)
    typed = "".join(
        [each_load.case.load.name, each_load.filed.name, *(p.name for p in each_load.case.parts.values())]
    )
    assert [letter for letter in text if not letter.isascii() and letter not in typed] == []


def test_a_stopped_plan_prints_the_reason_in_place_of_set_and_watch(
    demo: Demo, with_a_stop: Callable[[Plan], Plan]
) -> None:
    made = with_a_stop(demo("valve-blocks-24"))
    lines = card_lines(made, METRIC)
    assert not [line for line in lines if line.startswith(("SET", "WATCH"))]
    assert "NOTHING TO SET: a stop forbids this plan" in lines
    assert "Nothing on this rack is in the solution, so there is nothing to set." in joined(lines)
    assert made.run is not None
    assert f"{made.run.panel_current:.0f} A " not in "\n".join(lines)


def test_a_draft_recipe_is_called_so_and_a_deviation_is_printed(demo: Demo) -> None:
    made = demo("grip-rails-dye")
    draft = joined(card_lines(replace(made, status="draft"), METRIC))
    assert "DRAFT RECIPE, 1 deviation" in draft
    assert "current density 2.05 A/dm2, recipe 1.72 A/dm2: OUTSIDE THE RANGE" in draft
    assert "why: line supervisor: late order; process engineer told, not yet agreed" in draft
    approved = joined(card_lines(replace(made, status="approved"), METRIC))
    assert "DRAFT" not in approved
    assert f"approved, 1 deviation {made.filed.approved_by}".rstrip() in approved


def test_order_and_lot_stand_as_typed(demo: Demo) -> None:
    assert card_lines(demo("pump-covers-12"), METRIC)[0].startswith(
        "RUN CARD  pump-covers-12   order KY-24790   lot B   plan "
    )


# --- watch ------------------------------------------------------------------------------------------------


def test_there_are_five_moments_and_the_last_is_the_end_of_the_run(each_load: Plan) -> None:
    run = each_load.run
    if run is None or not run.stages:
        return
    looks = moments(each_load)
    assert len(looks) == 5
    assert [m.time for m in looks] == sorted(m.time for m in looks)
    assert looks[-1].time == run.total_time
    assert looks[-1].counter == pytest.approx(run.counter)
    assert looks[-1].voltage == pytest.approx(run.stages[-1].to_voltage)


def test_the_counter_of_a_moment_is_the_charge_passed_until_then(demo: Demo) -> None:
    """Hand-worked: ramp 0 to 100 A in 300 s, then 100 A to 1500 s.

    Half of the hold is at 300 + 0.5 x 1200 = 900 s: 0.5 x 100 x 300 + 100 x 600 = 75 000 C.
    """
    made = demo("valve-blocks-24")
    assert made.run is not None
    common = {"control": "current", "polarity": "work anodic", "density": 1.0}
    ramp = Stage(stage="ramp", start=0.0, end=300.0, from_current=0.0, to_current=100.0, from_voltage=0.0,
                 to_voltage=20.0, **common)  # type: ignore[arg-type]  # fmt: skip
    hold = Stage(stage="hold", start=300.0, end=1500.0, from_current=100.0, to_current=100.0, from_voltage=20.0,
                 to_voltage=40.0, **common)  # type: ignore[arg-type]  # fmt: skip
    run = replace(made.run, stages=(ramp, hold), total_time=1500.0)
    look = next(m for m in moments(replace(made, run=run)) if m.name == "50 % of hold")
    assert (look.time, look.current, look.voltage, look.counter) == (900.0, 100.0, 30.0, 75_000.0)


# --- ramp by hand -----------------------------------------------------------------------------------------


def ramp(stage: str, start: float, end: float, first: float, last: float) -> Stage:
    return Stage(stage=stage, control="current", polarity="work cathodic", start=start, end=end,
                 from_current=first, to_current=last, from_voltage=0.0, to_voltage=0.0, density=1.0)  # type: ignore[arg-type]  # fmt: skip


def test_a_ramp_by_hand_passes_the_charge_of_the_ramp_in_at_most_ten_rows() -> None:
    rows = ramp_rows([ramp("ramp", 0.0, 240.0, 0.0, 300.0)])
    assert len(rows) == RAMP_ROWS
    times, shares = [row[0] for row in rows], [row[2] for row in rows]
    charge = sum(300.0 * s * (b - a) for s, a, b in zip(shares, times, times[1:], strict=False))
    assert charge == pytest.approx(0.5 * 300.0 * 240.0)  # triangle under a straight ramp
    assert (times[-1], shares[-1]) == (240.0, 1.0)


def test_steps_are_set_one_by_one_and_many_are_drawn_together() -> None:
    steps = [ramp("step", 60.0 * n, 60.0 * (n + 1), 10.0 * n, 10.0 * n) for n in range(4)]
    assert [row[0] for row in ramp_rows(steps)] == [0.0, 60.0, 120.0, 180.0]
    assert len(ramp_rows(steps * 10)) <= RAMP_ROWS


def test_a_rectifier_that_ramps_needs_no_table(demo: Demo) -> None:
    assert " | " not in card_text(demo("valve-blocks-24"), METRIC)
    assert " | " in card_text(demo("seal-plates-4"), METRIC)  # R5 has no ramp


# --- golden -----------------------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("load", "kind"),
    [("valve-blocks-24", "metric"), ("rod-40x900", "metric"), ("vent-panels-24", "us")],
    ids=["hard-anodize", "hard-chrome", "stopped"],
)
def test_a_card_is_the_golden_one(demo: Demo, load: str, kind: str) -> None:
    path = GOLDEN / f"card-{load}-{kind}.txt"
    text = card_text(demo(load), Style(kind, ascii=True)) + "\n"  # type: ignore[arg-type]
    if os.environ.get("LINEPLANNER_RENEW_GOLDEN"):
        path.write_text(text, encoding="utf-8")
    assert text == path.read_text(encoding="utf-8")
