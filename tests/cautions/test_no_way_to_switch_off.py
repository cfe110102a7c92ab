"""No field takes away a caution that another demands: what gets worse keeps or sharpens its cautions."""

from collections.abc import Callable
from dataclasses import fields, replace
from typing import Any

import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from lineplanner.cautions.facts import Situation
from lineplanner.cautions.ranking import ranked
from lineplanner.cautions.rules import applicable
from lineplanner.inputs.cautions import DECLARED, CautionTexts

Make = Callable[..., Situation]
NONE: frozenset[str] = frozenset()

# Each field from mild to bad. None stands where not knowing counts as the worst.
CHAINS: dict[str, list[Any]] = {
    "holds_hexavalent_chromium": [False, None, True],
    "sulfuric_share": [0.0, 0.049, 0.05, 0.149, 0.15, 0.3],
    "holds_nitric": [False, True],
    "holds_fluoride": [False, None, True],
    "boric_share": [0.0, 0.002, 0.003, 0.01],
    "ph": [5.0, 2.0, None],
    "bath_temperature": [280.0, 323.15, 340.0],
    "heater": ["none", "steam or hot water", "electric immersion"],
    "heater_guards_confirmed": [True, False],
    "steps": [
        NONE,
        frozenset({"rinse"}),
        frozenset({"rinse", "caustic-etch"}),
        frozenset({"rinse", "caustic-etch", "nitric-desmut", "nickel-acetate-seal"}),
        frozenset(
            {"rinse", "caustic-etch", "nitric-desmut", "nickel-acetate-seal", "dichromate-seal", "other"}
        ),
    ],
    "hottest_step": [None, 320.0, 350.0],
    "on_line": [NONE, frozenset({"chloride"}), frozenset({"chloride", "cyanide"})],
    "stop_off": [
        NONE,
        frozenset({"tape"}),
        frozenset({"tape", "wax"}),
        frozenset({"tape", "wax", "lead-tape"}),
    ],
    "shower_confirmed": [True, False],
    "planned_peak_current": [10.0, 99.0, 100.0, 1250.0, 9000.0],
    "planned_peak_voltage": [None, 5.0, 31.0, 50.0, 61.0],
    "voltage_limit": [9.0, 31.0, 50.0, 60.0, 61.0],
    "rated_voltage": [12.0, 31.0, 50.0, 60.0, 61.0, None],
    "phase_controlled_unfiltered": [False, True, None],
    "rated_current": [50.0, 100.0, 5000.0, None],
    "reverse_stage": [False, True],
    "family_changed": [False, True, None],
    "live_entry": [False, True],
    "hydrogen_share": [0.0, 0.004, 0.005, 0.01, 0.011, 0.5],
    "exhaust": [9.0, 1.0, "none"],
    "exhaust_proven": [True, False],
    "exhaust_needed": [0.5, 2.0, 20.0],
    "exhaust_sum": [1.0, 5.0, 6.0, None],
    "supply_air": [7.0, 5.0, None],
    "foam": [False, None, True],
    "lid": [False, True, None],
    "part_traps_gas": [False, True],
    "lead": [False, True, None],
    "steel": [False, True, None],
    "steel_tensile_strength": [8e8, 1e9, 1.641e9, 1.9e9],
    "steel_hardness": [10.0, 31.0, 48.0, 60.0],
    "worked_after_hardening": [False, True, None],
    "case_hardened": [False, True, None],
    "exposure_result": [1e-9, 5e-9, 6e-9, None],
    "exposed_thirty_days": [False, True, None],
    "wetting_agent_is_control": [False, True],
    "surface_tension": [0.03, 0.035, 0.041, None],
    "surface_tension_meter": ["stalagmometer", "tensiometer", None],
    "suppressant_pfos": [False, True, None],
    "installed_chrome_current": [0.0, 10_000.0, 10_205.0, None],
    "permit_by_charge": [False, True, None],
    "drag_out_chromium": [0.0, 0.01, None],
    "region_eu": [False, True, None],
    "make_up": [NONE, frozenset({"caustic"}), frozenset({"caustic", "sulfuric acid", "chromium trioxide"})],
    "transfer": [False, True],
    "maintenance": [False, True],
    "sludge_work": [False, True],
    "tank_entry": [False, True],
}
# Neither better nor worse, or told only: drawn alike on both sides.
ALIKE: dict[str, list[Any]] = {
    "process": [
        None,
        "anodize-sulfuric",
        "anodize-hard",
        "anodize-chromic",
        "anodize-boric-sulfuric",
        "anodize-tartaric-sulfuric",
        "chrome-hard",
    ],
    "full_on_voltage": [None, 20.0, 58.0],
    "exhaust_class": [None, "A-1"],
    "exhaust_for_hydrogen": [None, 1.0],
    "current_for_hydrogen": [None, 1000.0],
    "tempering_temperature": [None, 600.0],
    "design_authority": [False, True],
    "bake_within": [None, 10_800.0],
    "bake_time": [None, 28_800.0],
    "bake_temperature": [None, 463.15],
    "bake_rule": [None, "B850"],
    "load_charge": [None, 1e6],
    "rolling_charge": [None, 1e9],
    "permit_charge": [None, 1e11],
    "make_up_rise": [None, 28.0],
}
# A caution that goes is followed by one at least as grave about the same thing.
FOLLOWED_BY = {
    "h2-lean": {"h2-rich"},
    "dc-wet": {"dc-50", "dc-60"},
    "dc-50": {"dc-60"},
    "exhaust-unknown": {"exhaust-short"},
    "cr6-elsewhere": {"cr6-core"},
}


@st.composite
def worsened(draw: st.DrawFn) -> tuple[dict[str, Any], dict[str, Any]]:
    """A situation, and the same with some of it worse."""
    before = {name: draw(st.sampled_from(values)) for name, values in ALIKE.items()}
    after = dict(before)
    moving = draw(st.sets(st.sampled_from(sorted(CHAINS)), min_size=1, max_size=6))
    for name, chain in CHAINS.items():
        start = draw(st.integers(0, len(chain) - 1))
        end = draw(st.integers(start, len(chain) - 1)) if name in moving else start
        before[name], after[name] = chain[start], chain[end]
    return before, after


def words(situation: Situation, texts: CautionTexts) -> dict[str, str]:
    return {caution.id: caution.word for caution in ranked(applicable(situation), texts)}


def test_every_field_of_a_situation_takes_part() -> None:
    names = {field.name for field in fields(Situation)} - {"thresholds"}
    assert names == CHAINS.keys() | ALIKE.keys()
    assert not CHAINS.keys() & ALIKE.keys()


@settings(max_examples=400, deadline=None)
@given(pair=worsened())
def test_a_situation_that_gets_worse_keeps_every_danger(
    pair: tuple[dict[str, Any], dict[str, Any]], texts: CautionTexts
) -> None:
    before = words(Situation(thresholds=texts.thresholds, **pair[0]), texts)
    after = words(Situation(thresholds=texts.thresholds, **pair[1]), texts)
    assert {id_ for id_, word in before.items() if word == "DANGER"} <= {
        id_ for id_, word in after.items() if word == "DANGER"
    }
    for lost in before.keys() - after.keys():
        assert FOLLOWED_BY.get(lost, set()) & after.keys(), lost


@settings(max_examples=100, deadline=None)
@given(
    pair=worsened(), name=st.sampled_from(["shower_confirmed", "exhaust_proven", "heater_guards_confirmed"])
)
def test_a_tick_in_a_box_takes_no_danger_away(
    pair: tuple[dict[str, Any], dict[str, Any]], name: str, texts: CautionTexts
) -> None:
    situation = Situation(thresholds=texts.thresholds, **pair[0])
    boxes: list[dict[str, Any]] = [{name: True}, {name: False}]
    ticked, unticked = (words(replace(situation, **box), texts) for box in boxes)
    assert {id_ for id_ in ticked if ticked[id_] == "DANGER"} == {
        id_ for id_ in unticked if unticked[id_] == "DANGER"
    }


@settings(max_examples=100, deadline=None)
@given(pair=worsened(), share=st.floats(0.1, 1.0))
def test_a_tighter_threshold_takes_nothing_away(
    pair: tuple[dict[str, Any], dict[str, Any]], share: float, texts: CautionTexts
) -> None:
    as_shipped = texts.thresholds
    lower = {
        name: replace(getattr(as_shipped, name), value=getattr(as_shipped, name).value * share)
        for name in ("arc_current", "implant_current", "acid_share", "strong_acid_share", "boric_share")
    }
    lower |= {
        name: replace(getattr(as_shipped, name), value=getattr(as_shipped, name).value * share)
        for name in ("hydrogen_watch", "bake_hardness", "large_site_charge")
    }
    situation = Situation(thresholds=as_shipped, **pair[0])
    before = words(situation, texts)
    after = words(replace(situation, thresholds=replace(as_shipped, **lower)), texts)
    assert before.keys() <= after.keys()


@settings(max_examples=100, deadline=None)
@given(pair=worsened())
def test_every_caution_of_any_situation_has_a_text_and_its_values(
    pair: tuple[dict[str, Any], dict[str, Any]], texts: CautionTexts
) -> None:
    applied = applicable(Situation(thresholds=texts.thresholds, **pair[1]))
    for one in applied:
        assert one.facts.keys() == DECLARED[one.id][1]
    assert len(ranked(applied, texts)) == len(applied)


def test_a_whole_shop_of_unknowns_shows_its_dangers_first(unknown: Make, texts: CautionTexts) -> None:
    shown = [caution.word for caution in ranked(applicable(unknown("chrome-hard")), texts)]
    assert shown == sorted(shown, key=["DANGER", "WARNING", "CAUTION", "NOTICE"].index)
    assert shown.count("DANGER") >= 5


@given(share=st.floats(0.0, 1.0))
def test_hydrogen_above_its_limit_is_never_answered_by_a_warning_alone(share: float, quiet: Make) -> None:
    assume(share > 0.0101)
    assert "h2-rich" in {applied.id for applied in applicable(quiet(hydrogen_share=share))}


@pytest.mark.parametrize("process", ["chrome-hard", "anodize-chromic"])
def test_a_chromic_bath_cannot_be_declared_free_of_chromium(process: str, unknown: Make) -> None:
    situation = unknown(process, holds_hexavalent_chromium=False)
    assert "cr6-core" in {applied.id for applied in applicable(situation)}
