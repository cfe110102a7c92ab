"""Every caution appears where its trigger is met, and only there. Sources: those named in the texts."""

from collections.abc import Callable
from typing import Any, get_args

import pytest

from lineplanner.cautions.contents import MADE_UP_CONTENTS, STEP_CONTENTS
from lineplanner.cautions.facts import Applied, MadeUp, Situation, StepKind
from lineplanner.cautions.rules import RULES, WORDS_BY_RULE, applicable
from lineplanner.inputs import recipe
from lineplanner.inputs.cautions import DECLARED, CautionTexts, shown_values
from lineplanner.inputs.tables import Process

Make = Callable[..., Situation]

CHROME = {
    "process": "chrome-hard",
    "sulfuric_share": None,
    "boric_share": None,
    "bath_temperature": 320.0,
    "voltage_limit": 9.0,
    "planned_peak_voltage": 6.0,
    "rated_voltage": 12.0,
}
HARD_STEEL = {"steel": True, "steel_tensile_strength": 1.2e9, "worked_after_hardening": False}
NOTHING = {"process": None}  # no load in the tank

# id -> what is changed on the quiet load so that it applies; and so that it does not
CASES: dict[str, tuple[list[dict[str, Any]], list[dict[str, Any]]]] = {
    "cr6-core": (
        [
            CHROME,
            {"process": "anodize-chromic"},
            {"steps": {"dichromate-seal"}},
            {"steps": {"chromic-strip"}},
            {"steps": {"chromic-desmut"}},
            {"steps": {"chromate-conversion"}},
            NOTHING | {"make_up": {"chromium trioxide"}},
        ],
        [{}, {"steps": {"nickel-seal", "hot-water-seal"}}, NOTHING | {"make_up": {"sulfuric acid"}}],
    ),
    "cr6-limits": ([CHROME], [{}]),
    "cr6-area": (
        [CHROME | {"exposure_result": None}, CHROME | {"exposure_result": 6e-9}],
        [CHROME, {"exposure_result": None}],
    ),
    "cr6-hygiene": ([CHROME], [{}]),
    "cr6-medical": (
        [CHROME | {"exposed_thirty_days": True}, CHROME | {"exposed_thirty_days": None}],
        [CHROME, {"exposed_thirty_days": True}],
    ),
    "cr6-fire": ([CHROME, NOTHING | {"make_up": {"chromium trioxide"}}], [{}]),
    "cr6-elsewhere": ([{"steps": {"dichromate-seal"}}], [{}, CHROME, CHROME | {"steps": {"chromic-strip"}}]),
    "cr6-surface-tension": (
        [CHROME | {"wetting_agent_is_control": True}],
        [
            CHROME,
            {"wetting_agent_is_control": True},
            CHROME
            | {
                "wetting_agent_is_control": True,
                "surface_tension": 0.030,
                "surface_tension_meter": "tensiometer",
            },
        ],
    ),
    "cr6-suppressant": (
        [CHROME | {"suppressant_pfos": True}, CHROME | {"suppressant_pfos": None}],
        [CHROME, {"suppressant_pfos": True}, {"suppressant_pfos": None, "steps": {"dichromate-seal"}}],
    ),
    "cr6-size-large": (
        [CHROME | {"installed_chrome_current": 12_000.0}, CHROME | {"installed_chrome_current": None}],
        [CHROME | {"installed_chrome_current": 10_000.0}, {"installed_chrome_current": 12_000.0}],
    ),
    "cr6-ah-log": (
        [CHROME | {"permit_by_charge": True}, CHROME | {"permit_by_charge": None}],
        [CHROME, {"permit_by_charge": True}],
    ),
    "cr6-eu": (
        [CHROME | {"region_eu": True}, CHROME | {"region_eu": None}],
        [CHROME, {"region_eu": True}],
    ),
    "lead-anode": (
        [
            {"lead": True},
            {"lead": None},
            CHROME | {"lead": True},
            {"stop_off": {"lead-tape"}},
            NOTHING | {"sludge_work": True},
        ],
        [{}, CHROME, {"stop_off": {"tape"}}],
    ),
    "acid-burn": (
        [
            {},
            CHROME,
            {"sulfuric_share": None},
            NOTHING | {"steps": {"nitric-desmut"}},
            NOTHING | {"steps": {"caustic-etch"}},
            NOTHING | {"steps": {"other"}},
            NOTHING | {"make_up": {"caustic"}},
        ],
        [
            NOTHING | {"sulfuric_share": None},
            NOTHING | {"sulfuric_share": None, "steps": {"rinse", "hot-water-seal", "oven", "dye"}},
            {"sulfuric_share": 0.02, "ph": 3.0},
        ],
    ),
    "acid-into-water": (
        [NOTHING | {"make_up": {"sulfuric acid"}}],
        [{}, NOTHING | {"make_up": {"chromium trioxide"}}],
    ),
    "acid-mist": (
        [
            {"exhaust": None},
            {"exhaust": "none"},
            {"exhaust": 1.9},
            {"exhaust_needed": None},
            {"exhaust_proven": False},
        ],
        [{}, {"exhaust": 2.0}, CHROME | {"exhaust": "none"}],
    ),
    "fluoride-hf": (
        [
            CHROME | {"holds_fluoride": True},
            CHROME | {"holds_fluoride": None},
            {"holds_fluoride": True},
            {"steps": {"fluoride-desmut"}},
            {"steps": {"nickel-seal"}},
        ],
        [{}, CHROME, {"holds_fluoride": None}, {"steps": {"nickel-acetate-seal"}}],
    ),
    "nitric-nox": (
        [{"steps": {"nitric-desmut"}}, {"steps": {"bright-dip"}}, {"holds_nitric": True}],
        [{}, {"steps": {"sulfuric-desmut"}}],
    ),
    "hcl-strip": (
        [{"steps": {"hydrochloric-strip"}}, {"steps": {"hydrochloric-pickle"}}],
        [{}, {"steps": {"nitric-strip"}}],
    ),
    "solvent-stopoff": (
        [{"stop_off": {"lacquer"}}, {"stop_off": {"wax"}}, {"steps": {"stop-off-removal"}}],
        [{}, {"stop_off": {"tape", "plug", "plastisol", "lead-tape"}}],
    ),
    "caustic-etch": (
        [{"steps": {"caustic-etch"}}, {"steps": {"caustic-strip"}}],
        [{}, {"steps": {"clean"}}],
    ),
    "no-mix": (
        [
            {"steps": {"caustic-etch"}},
            {"on_line": {"cyanide"}},
            {"on_line": {"hypochlorite"}},
            CHROME | {"on_line": {"sulfide or bisulfite"}},
            CHROME | {"stop_off": {"wax"}},
            CHROME | {"steps": {"hydrochloric-strip"}},
            NOTHING | {"steps": {"dichromate-seal"}, "on_line": {"chloride"}},
            {"steps": {"other"}},
            {"make_up": {"other"}},
        ],
        [
            {},
            CHROME,
            {"stop_off": {"wax"}},
            {"steps": {"hydrochloric-strip"}},
            NOTHING | {"on_line": {"cyanide"}},
        ],
    ),
    "boric": (
        [
            {"process": "anodize-boric-sulfuric", "boric_share": None},
            {"process": "anodize-boric-sulfuric", "boric_share": 0.008},
        ],
        [{}, {"boric_share": None}, {"process": "anodize-boric-sulfuric", "boric_share": 0.002}],
    ),
    "nickel-seal": (
        [{"steps": {"nickel-seal"}}, {"steps": {"nickel-acetate-seal"}}],
        [{}, {"steps": {"hot-water-seal"}}],
    ),
    "h2-lean": (
        [{"hydrogen_share": 0.005}],
        [{}, {"hydrogen_share": 0.011}, {"hydrogen_share": None}],
    ),
    "h2-rich": (
        [{"hydrogen_share": 0.011}, {"exhaust": "none", "hydrogen_share": None}],
        [{}, {"hydrogen_share": 0.005}, {"hydrogen_share": None}, NOTHING | {"exhaust": "none"}],
    ),
    "h2-foam": (
        [{"foam": True}, CHROME | {"foam": None}],
        [{}, {"foam": None}, CHROME, NOTHING | {"foam": True}],
    ),
    "h2-pocket": (
        [{"lid": True}, {"lid": None}, {"part_traps_gas": True}],
        [{}, NOTHING | {"lid": True}],
    ),
    "fan-first": (
        [{}, CHROME, NOTHING | {"steps": {"caustic-etch"}}],
        [NOTHING, NOTHING | {"steps": {"rinse"}}],
    ),
    "exhaust-unknown": (
        [
            {"exhaust": None},
            {"hydrogen_share": None},
            {"exhaust_proven": False},
        ],
        [{}, {"exhaust": "none"}, NOTHING | {"exhaust": None}],
    ),
    "exhaust-short": (
        [{"exhaust": 1.9}, {"exhaust": "none"}, {"exhaust": "none", "exhaust_needed": None}],
        [{}, {"exhaust": 2.0}, {"exhaust": None}],
    ),
    "makeup-air": (
        [{"supply_air": 4.9}, {"supply_air": None}, {"exhaust_sum": None}],
        [{}, {"supply_air": 6.0}],
    ),
    "dc-arc": (
        [{}, {"planned_peak_current": 5.0}, {"planned_peak_current": None}],
        [NOTHING | {"planned_peak_current": 500.0}],
    ),
    "live-entry": ([{"live_entry": True}], [{}]),
    "dc-ring": (
        [
            {"rated_current": 100.0},
            {"rated_current": None},
            NOTHING | {"rated_current": 3e3, "maintenance": True},
        ],
        [{}, NOTHING | {"rated_current": 3e3}],
    ),
    "dc-50": ([{"voltage_limit": 55.0, "rated_voltage": 55.0}], [{}, {"rated_voltage": 75.0}]),
    "dc-60": (
        [
            {"rated_voltage": 75.0},
            {"rated_voltage": None},
            {"voltage_limit": None, "rated_voltage": None},
            {"phase_controlled_unfiltered": None, "rated_voltage": 60.0},
        ],
        [{}, NOTHING | {"rated_voltage": 75.0}],
    ),
    "dc-wet": ([{"voltage_limit": 40.0, "rated_voltage": 45.0}], [{}, {"rated_voltage": 75.0}]),
    "lockout": (
        [NOTHING | {"maintenance": True}, {"tank_entry": True}, {"sludge_work": True}],
        [{}],
    ),
    "polarity": (
        [{"family_changed": True}, {"family_changed": None}, CHROME | {"reverse_stage": True}],
        [{}, NOTHING | {"family_changed": True}],
    ),
    "implant": (
        [
            {"planned_peak_current": 1250.0},
            {"planned_peak_current": None, "rated_current": 3000.0},
            {"planned_peak_current": None, "rated_current": None},
        ],
        [{}, {"planned_peak_current": 1249.0}, NOTHING | {"planned_peak_current": 5000.0}],
    ),
    "he-stress-relief": (
        [
            CHROME | HARD_STEEL | {"worked_after_hardening": True},
            CHROME | HARD_STEEL | {"worked_after_hardening": None},
        ],
        [CHROME | HARD_STEEL, {}, CHROME | {"steel": True, "steel_tensile_strength": 9e8}],
    ),
    "he-bake": (
        [
            CHROME | HARD_STEEL,
            CHROME | {"steel": True},
            CHROME | {"steel": None},
            CHROME | {"steel": True, "steel_tensile_strength": 9e8, "steel_hardness": 40.0},
            NOTHING | HARD_STEEL | {"steps": {"hydrochloric-strip"}},
        ],
        [
            {},
            CHROME | {"steel": True, "steel_tensile_strength": 9e8},
            CHROME | {"steel": True, "steel_hardness": 25.0},
            NOTHING | HARD_STEEL,
        ],
    ),
    "he-uhs": (
        [
            CHROME | {"steel": True, "steel_tensile_strength": 1.7e9},
            CHROME | {"steel": True, "steel_hardness": 50.0},
            CHROME | {"steel": True, "steel_tensile_strength": 1.7e9, "design_authority": True},
        ],
        [CHROME | HARD_STEEL, CHROME | {"steel": True}],
    ),
    "hot": (
        [
            {"bath_temperature": 330.0},
            {"bath_temperature": None},
            {"steps": {"oven"}},
            {"steps": {"hot-water-seal"}},
            {"hottest_step": 330.0},
        ],
        [{}, {"steps": {"rinse", "nitric-desmut"}}],
    ),
    "heater-dry": (
        [
            {"heater": "electric immersion"},
            {"heater": None},
            {"heater": "electric immersion", "heater_guards_confirmed": True},
        ],
        [{}, {"heater": "steam or hot water"}],
    ),
    "shower": (
        [{"shower_confirmed": False}],
        [{}, NOTHING | {"sulfuric_share": None, "shower_confirmed": False}],
    ),
    "tank-entry": ([NOTHING | {"tank_entry": True}], [{}, {"maintenance": True}]),
    "spill": ([NOTHING | {"make_up": {"other"}}, NOTHING | {"transfer": True}], [{}]),
    "cr6-waste": (
        [CHROME | {"drag_out_chromium": None}, CHROME | {"drag_out_chromium": 0.02}],
        [CHROME, {"drag_out_chromium": None}],
    ),
    "estimate": ([{}, CHROME, NOTHING], []),
}


def frozen(changes: dict[str, Any]) -> dict[str, Any]:
    return {name: frozenset(value) if isinstance(value, set) else value for name, value in changes.items()}


def met(situation: Situation) -> dict[str, Applied]:
    return {applied.id: applied for applied in applicable(situation)}


POSITIVE = [(id_, changes) for id_, (cases, _) in CASES.items() for changes in cases]
NEGATIVE = [(id_, changes) for id_, (_, cases) in CASES.items() for changes in cases]


def numbered(cases: list[tuple[str, dict[str, Any]]]) -> list[str]:
    return [f"{id_}-{position}" for position, (id_, _) in enumerate(cases)]


@pytest.mark.parametrize(("id_", "changes"), POSITIVE, ids=numbered(POSITIVE))
def test_a_caution_applies_where_its_trigger_is_met(
    id_: str, changes: dict[str, Any], quiet: Make, texts: CautionTexts
) -> None:
    applied = met(quiet(**frozen(changes)))
    assert id_ in applied
    text = next(caution.text for caution in texts.cautions if caution.id == id_)
    assert applied[id_].facts.keys() == set(shown_values(text)) == DECLARED[id_][1]


@pytest.mark.parametrize(("id_", "changes"), NEGATIVE, ids=numbered(NEGATIVE))
def test_a_caution_does_not_apply_where_its_trigger_is_not_met(
    id_: str, changes: dict[str, Any], quiet: Make
) -> None:
    assert id_ not in met(quiet(**frozen(changes)))


def test_every_caution_is_seen_to_come_and_every_one_but_the_last_to_stay_away() -> None:
    assert list(CASES) == list(RULES) == list(DECLARED)
    assert [id_ for id_, (positive, _) in CASES.items() if not positive] == []
    assert [id_ for id_, (_, negative) in CASES.items() if not negative] == ["estimate"]
    assert WORDS_BY_RULE.keys() <= RULES.keys()


def test_a_load_with_all_known_and_small_still_has_its_acid_fan_arc_and_the_estimate(quiet: Make) -> None:
    assert list(met(quiet())) == ["acid-burn", "fan-first", "dc-arc", "estimate"]


# What must appear on a load of which only the process is known: silence would pass for an answer.
ALWAYS_UNKNOWN = {
    "acid-burn",
    "dc-60",
    "dc-arc",
    "dc-ring",
    "implant",
    "polarity",
    "lead-anode",
    "h2-pocket",
    "exhaust-unknown",
    "makeup-air",
    "fan-first",
    "he-bake",
    "he-stress-relief",
    "hot",
    "heater-dry",
    "shower",
    "estimate",
}
CHROMIC_UNKNOWN = {
    "cr6-core",
    "cr6-limits",
    "cr6-area",
    "cr6-hygiene",
    "cr6-medical",
    "cr6-fire",
    "cr6-suppressant",
    "cr6-eu",
    "cr6-waste",
    "h2-foam",
}
OF_PROCESS = {
    "chrome-hard": CHROMIC_UNKNOWN | {"cr6-size-large", "cr6-ah-log", "fluoride-hf"},
    "anodize-chromic": CHROMIC_UNKNOWN,
    "anodize-sulfuric": {"acid-mist"},
    "anodize-hard": {"acid-mist"},
    "anodize-boric-sulfuric": {"acid-mist", "boric"},
    "anodize-tartaric-sulfuric": {"acid-mist"},
}


@pytest.mark.parametrize("process", get_args(Process))
def test_what_is_not_known_is_cautioned_about(process: str, unknown: Make) -> None:
    assert met(unknown(process)).keys() == ALWAYS_UNKNOWN | OF_PROCESS[process]


def test_a_value_that_is_not_known_is_said_to_be_not_known(unknown: Make) -> None:
    applied = met(unknown("chrome-hard"))
    for id_, name in [
        ("dc-60", "peak_voltage"),
        ("implant", "implant_distance"),
        ("cr6-size-large", "potential_charge"),
        ("cr6-waste", "chromium_mass"),
        ("makeup-air", "air_shortfall"),
    ]:
        assert applied[id_].facts[name] == "not known"
    bake = applied["he-bake"]
    assert (bake.facts["bake_within"], bake.facts["bake_rule"]) == (
        "the rule's delay",
        "a rule still to be named",
    )


def test_every_kind_of_step_that_a_recipe_can_name_has_contents() -> None:
    assert set(get_args(StepKind)) == STEP_CONTENTS.keys()
    assert set(get_args(recipe.Content)) <= STEP_CONTENTS.keys()
    assert set(get_args(MadeUp)) == MADE_UP_CONTENTS.keys()


def test_the_cautions_come_in_the_order_of_the_table(unknown: Make) -> None:
    found = [applied.id for applied in applicable(unknown("chrome-hard", maintenance=True))]
    assert found == [id_ for id_ in RULES if id_ in found]
    assert found == [applied.id for applied in applicable(unknown("chrome-hard", maintenance=True))]
