"""Where a caution begins: each edge with its source."""

import math
from collections.abc import Callable
from typing import Any

import pytest

from lineplanner.cautions.facts import Situation
from lineplanner.cautions.rules import applicable
from lineplanner.errors import Fact, Facts, Quantity

Make = Callable[..., Situation]
CHROME = {"process": "chrome-hard", "sulfuric_share": None}


def met(situation: Situation) -> dict[str, Facts]:
    return {applied.id: applied.facts for applied in applicable(situation)}


def number(fact: Fact) -> float:
    assert isinstance(fact, Quantity)
    return fact.value


# --- volts -----------------------------------------------------------------------------------------------
# 30 V wet and 60 V dry: IEC 60598; 50 V: 29 CFR 1910.303(g)(2)(i); 60 V: NEC Article 669.

VOLTS = [
    (30.0, None),
    (30.1, "dc-wet"),
    (49.9, "dc-wet"),
    (50.0, "dc-50"),
    (60.0, "dc-50"),
    (60.1, "dc-60"),
    (100.0, "dc-60"),
]


@pytest.mark.parametrize(("volts", "expected"), VOLTS)
def test_the_three_voltage_cautions_meet_without_gap_or_overlap(
    volts: float, expected: str | None, quiet: Make
) -> None:
    found = met(quiet(voltage_limit=None, rated_voltage=volts))
    shown = [id_ for id_ in ("dc-wet", "dc-50", "dc-60") if id_ in found]
    assert shown == ([expected] if expected else [])
    if expected:
        assert number(found[expected]["peak_voltage"]) == volts


def test_the_set_limit_counts_where_there_is_one_and_the_rating_where_there_is_none(quiet: Make) -> None:
    assert "dc-wet" in met(quiet(voltage_limit=40.0, rated_voltage=55.0, planned_peak_voltage=12.0))
    assert "dc-50" in met(quiet(voltage_limit=None, rated_voltage=55.0, planned_peak_voltage=12.0))


def test_planned_volts_above_the_limit_count(quiet: Make) -> None:
    assert "dc-50" in met(quiet(voltage_limit=40.0, rated_voltage=60.0, planned_peak_voltage=52.0))


def test_a_rectifier_above_60_volts_is_a_danger_whatever_limit_is_set(quiet: Make) -> None:
    found = met(quiet(voltage_limit=20.0, rated_voltage=75.0))
    assert number(found["dc-60"]["peak_voltage"]) == 75.0


def test_an_unfiltered_phase_controlled_supply_counts_with_its_full_on_crest(quiet: Make) -> None:
    # Derived: crest = pi/3 x full-on volts. 60 V fully on: 1.0472 x 60 = 62.83 V.
    found = met(quiet(phase_controlled_unfiltered=True, full_on_voltage=60.0, rated_voltage=58.0))
    assert number(found["dc-60"]["peak_voltage"]) == pytest.approx(62.83, abs=0.01)
    # Without the full-on volts 1.1 x rated (common practice): 1.0472 x 1.1 x 50 = 57.60 V.
    found = met(quiet(phase_controlled_unfiltered=True, rated_voltage=50.0))
    assert number(found["dc-50"]["peak_voltage"]) == pytest.approx(57.60, abs=0.01)


def test_a_supply_of_unknown_kind_counts_as_an_unfiltered_one(quiet: Make) -> None:
    same = {"rated_voltage": 50.0, "voltage_limit": 18.0}
    assert met(quiet(phase_controlled_unfiltered=None, **same)) == met(
        quiet(phase_controlled_unfiltered=True, **same)
    )


def test_a_low_limit_does_not_lower_the_crest_of_an_unfiltered_supply(quiet: Make) -> None:
    assert "dc-60" in met(quiet(phase_controlled_unfiltered=True, voltage_limit=10.0, rated_voltage=60.0))


# --- amperes ---------------------------------------------------------------------------------------------


def test_the_implant_distance_follows_from_the_field_of_a_straight_bar(quiet: Make) -> None:
    # Hand-worked, Ampere's law: B = mu0 I / (2 pi r) = 2e-7 x 10 000 / r; B = 0.5 mT at r = 4.00 m.
    found = met(quiet(planned_peak_current=10_000.0))
    distance = number(found["implant"]["implant_distance"])
    assert distance == pytest.approx(4.0, rel=1e-9)
    assert 4e-7 * math.pi * 10_000.0 / (2.0 * math.pi * distance) == pytest.approx(0.5e-3, rel=1e-9)


@pytest.mark.parametrize(("amperes", "applies"), [(1249.9, False), (1250.0, True)])
def test_the_implant_caution_begins_where_half_a_metre_sees_half_a_millitesla(
    *, amperes: float, applies: bool, quiet: Make
) -> None:
    # 2e-7 x 1250 / 0.5 = 5e-4 T
    assert ("implant" in met(quiet(planned_peak_current=amperes))) is applies


@pytest.mark.parametrize(("amperes", "applies"), [(99.9, False), (100.0, True)])
def test_rings_glow_from_100_amperes_and_any_load_can_arc(
    *, amperes: float, applies: bool, quiet: Make
) -> None:
    # common practice, no source
    found = met(quiet(planned_peak_current=amperes, rated_current=amperes))
    assert "dc-arc" in found
    assert ("dc-ring" in found) is applies


def test_a_gold_ring_across_the_poles_heats_by_a_thousand_kelvin_a_second() -> None:
    # Hand-worked, what the dc-ring text rests on: I2R = 1000^2 x 0.22e-3 = 220 W;
    # 220 / (1.737 g x 0.129 J/gK) = 982 K/s. Heat capacity of gold: handbook value, from memory.
    watts = 1000.0**2 * 0.22e-3
    assert watts == pytest.approx(220.0)
    assert watts / (1.737 * 0.129) == pytest.approx(982.0, rel=0.01)


# --- size of a hard chrome site: 40 CFR 63.341, from memory; 8400 h x 0.7 = 5880 h -------------------------

SITES = [
    (10_204.0, False),
    (10_204.09, True),  # 60e6 / 5880 = 10 204.0816 A
    (60e6 / 5880, True),  # exactly 60 000 000 Ah is large
    (10_000.0, False),  # 3000 + 3000 + 4000 A: 58 800 000 Ah
    (12_000.0, True),  # 6000 + 6000 A: 70 560 000 Ah
]


@pytest.mark.parametrize(("amperes", "large"), SITES)
def test_a_site_is_large_from_60_million_ampere_hours(*, amperes: float, large: bool, quiet: Make) -> None:
    found = met(quiet(**CHROME, installed_chrome_current=amperes))
    assert ("cr6-size-large" in found) is large


def test_the_potential_is_told_in_full(quiet: Make) -> None:
    found = met(quiet(**CHROME, installed_chrome_current=12_000.0))
    assert number(found["cr6-size-large"]["potential_charge"]) / 3600.0 == pytest.approx(70_560_000.0)


# --- surface tension: 40 CFR 63.342 as amended 2012 --------------------------------------------------------

READINGS = [
    (40.0, "stalagmometer", False),
    (40.1, "stalagmometer", True),
    (33.0, "tensiometer", False),
    (34.0, "tensiometer", True),
    (None, "tensiometer", True),
    (30.0, None, True),
    (None, None, True),
]


@pytest.mark.parametrize(("dynes", "meter", "applies"), READINGS)
def test_the_surface_tension_limit_belongs_to_the_meter(
    *, dynes: float | None, meter: str | None, applies: bool, quiet: Make
) -> None:
    # 1 dyn/cm = 1e-5 N / 1e-2 m; the conversion's last digit must not count as above the limit
    reading = None if dynes is None else dynes * 1e-5 / 1e-2
    situation = quiet(
        **CHROME, wetting_agent_is_control=True, surface_tension=reading, surface_tension_meter=meter
    )
    assert ("cr6-surface-tension" in met(situation)) is applies


# --- hydrogen: lower flammable limit 4 %, a quarter of it 1 % (29 CFR 1910.124(b)(3), state copy) ----------

SHARES = [
    (0.004, None),
    (0.00401, "h2-lean"),
    (0.01, "h2-lean"),
    (0.01001, "h2-rich"),
]


@pytest.mark.parametrize(("share", "expected"), SHARES)
def test_hydrogen_is_watched_above_a_tenth_and_stopped_above_a_quarter_of_its_limit(
    share: float, expected: str | None, quiet: Make
) -> None:
    found = met(quiet(hydrogen_share=share))
    assert [id_ for id_ in ("h2-lean", "h2-rich") if id_ in found] == ([expected] if expected else [])


def test_a_tank_without_exhaust_and_a_tank_of_unknown_exhaust_are_told_apart(quiet: Make) -> None:
    none = met(quiet(exhaust="none", hydrogen_share=None))
    unknown = met(quiet(exhaust=None, hydrogen_share=None))
    assert "h2-rich" in none
    assert "exhaust-unknown" not in none
    assert "exhaust-unknown" in unknown
    assert "h2-rich" not in unknown


# --- acid: 5 % and 15 % sulfuric acid by mass, Regulation (EC) 1272/2008 Annex VI, from memory;
#     pH 2 and 11.5: the same, Annex I, 3.2.3.1 -----------------------------------------------------------

STRENGTHS = [
    (0.2, 0.5, "DANGER"),
    (0.15, 0.5, "DANGER"),
    (0.1496, 0.5, "DANGER"),  # 14.96 % is 15.0 %: what 165 g/L comes to
    (0.1494, 0.5, "WARNING"),
    (0.05, 3.0, "WARNING"),
    (0.0496, 3.0, "WARNING"),
    (0.049, 3.0, None),
    (0.049, 2.0, "WARNING"),
    (0.049, 2.1, None),
    (0.049, 11.4, None),
    (0.049, 11.5, "WARNING"),
    (0.049, None, "WARNING"),
    (None, 3.0, "DANGER"),
]


@pytest.mark.parametrize(("share", "ph", "word"), STRENGTHS)
def test_the_word_of_an_acid_follows_its_strength(
    share: float | None, ph: float | None, word: str | None, quiet: Make
) -> None:
    found = [a.word for a in applicable(quiet(sulfuric_share=share, ph=ph)) if a.id == "acid-burn"]
    assert found == ([word] if word else [])


@pytest.mark.parametrize(
    ("steps", "word"),
    [
        ({"nitric-desmut"}, "DANGER"),
        ({"chromic-desmut"}, "DANGER"),
        ({"sulfuric-pickle"}, "DANGER"),
        ({"other"}, "DANGER"),
        ({"caustic-etch"}, "WARNING"),
        ({"hydrochloric-strip"}, "WARNING"),
    ],
    ids=lambda value: value if isinstance(value, str) else "-".join(sorted(value)),
)
def test_the_word_of_an_acid_follows_the_gravest_tank(steps: set[Any], word: str, quiet: Make) -> None:
    weak = quiet(sulfuric_share=0.02, ph=3.0, steps=frozenset(steps))
    assert [a.word for a in applicable(weak) if a.id == "acid-burn"] == [word]


@pytest.mark.parametrize(("share", "applies"), [(0.0029, False), (0.003, True)])
def test_boric_acid_is_cautioned_from_0_3_percent(*, share: float, applies: bool, quiet: Make) -> None:
    # Regulation (EC) 1272/2008, H360FD from 0.3 %: from memory
    assert ("boric" in met(quiet(process="anodize-boric-sulfuric", boric_share=share))) is applies


# --- air: 29 CFR 1910.1026(c), 5 ug/m3 -------------------------------------------------------------------


@pytest.mark.parametrize(
    ("micrograms", "applies"), [(5.0, False), (5.01, True), (2.5, False)], ids=["at", "above", "action-level"]
)
def test_the_area_is_regulated_above_the_exposure_limit(
    *, micrograms: float, applies: bool, quiet: Make
) -> None:
    assert ("cr6-area" in met(quiet(**CHROME, exposure_result=micrograms * 1e-9))) is applies


# --- steel: 1000 MPa ASTM B849 and B850; 1641 MPa, 48 HRC AMS 2460; 31 HRC from memory ---------------------

STEELS = [
    (999e6, None, None),
    (1000e6, None, "he-bake"),
    (1640e6, None, "he-bake"),
    (1641e6, None, "he-uhs"),
    (None, 30.9, None),
    (None, 31.0, "he-bake"),
    (None, 47.9, "he-bake"),
    (None, 48.0, "he-uhs"),
    (999e6, 48.0, "he-uhs"),  # the stronger of the two answers counts
    (None, None, "he-bake"),  # unknown counts as hard, not as ultra-high
]


@pytest.mark.parametrize(("strength", "hardness", "expected"), STEELS)
def test_steel_is_judged_by_strength_or_hardness_whichever_is_graver(
    strength: float | None, hardness: float | None, expected: str | None, quiet: Make
) -> None:
    found = met(quiet(**CHROME, steel=True, steel_tensile_strength=strength, steel_hardness=hardness))
    assert ("he-bake" in found) is (expected is not None)
    assert ("he-uhs" in found) is (expected == "he-uhs")


READY = {
    **CHROME,
    "steel": True,
    "steel_tensile_strength": 1.3e9,
    "case_hardened": False,
    "tempering_temperature": 500.0,
    "bake_temperature": 472.0,  # 28 K below the temper
    "bake_time": 12 * 3600.0,
    "bake_within": 3 * 3600.0,
    "bake_rule": "B850",
}


def test_a_bake_is_told_once_all_it_depends_on_is_known(quiet: Make) -> None:
    facts = met(quiet(**READY))["he-bake"]
    assert number(facts["bake_time"]) == 43_200.0
    assert number(facts["bake_temperature"]) == 472.0
    assert facts["bake_rule"] == "B850"


@pytest.mark.parametrize(
    "doubt",
    [
        {"tempering_temperature": 499.9},  # MIL-STD-867C, 5.5: 28 K below the last temper
        {"tempering_temperature": None},
        {"case_hardened": None},
        {"case_hardened": True},
        {"steel_tensile_strength": None},
        {"steel_tensile_strength": 1.7e9},  # no authority of the design owner
        {"bake_time": None},  # no row of the table
        {"bake_temperature": None},
    ],
    ids=lambda doubt: f"{next(iter(doubt))}-{next(iter(doubt.values()))}",
)
def test_a_bake_is_not_told_while_anything_it_depends_on_is_in_doubt(
    doubt: dict[str, Any], quiet: Make
) -> None:
    facts = met(quiet(**READY | doubt))["he-bake"]
    told = (facts["bake_time"], facts["bake_temperature"])
    assert told == ("the rule's hours", "the rule's heat (ask first)")
    assert number(facts["bake_within"]) == 10_800.0


def test_the_design_owner_may_release_the_strongest_steel_and_its_caution_stays(quiet: Make) -> None:
    found = met(quiet(**READY | {"steel_tensile_strength": 1.7e9, "design_authority": True}))
    assert number(found["he-bake"]["bake_time"]) == 43_200.0
    assert "he-uhs" in found


# --- heat ------------------------------------------------------------------------------------------------


@pytest.mark.parametrize(("celsius", "applies"), [(49.9, False), (50.0, True)])
def test_a_bath_is_hot_from_50_degrees(*, celsius: float, applies: bool, quiet: Make) -> None:
    # common practice, no source
    found = met(quiet(bath_temperature=celsius + 273.15))
    assert ("hot" in found) is applies
    if applies:
        assert number(found["hot"]["hottest"]) == pytest.approx(323.15)


def test_the_hottest_of_bath_and_steps_is_told_and_a_cold_one_never(quiet: Make) -> None:
    found = met(quiet(bath_temperature=328.15, hottest_step=370.15))
    assert number(found["hot"]["hottest"]) == 370.15
    sealed = met(quiet(bath_temperature=293.15, steps=frozenset({"hot-water-seal"})))
    assert sealed["hot"]["hottest"] == "a step before or after"


def test_a_confirmed_heater_guard_is_told_and_takes_nothing_away(quiet: Make) -> None:
    confirmed = met(quiet(heater="electric immersion", heater_guards_confirmed=True))
    assert confirmed["heater-dry"]["heater_guards"] == "confirmed"
    assert met(quiet(heater="electric immersion"))["heater-dry"]["heater_guards"] == "unconfirmed"


def test_the_shortfall_of_supply_air_is_told(quiet: Make) -> None:
    found = met(quiet(exhaust_sum=5.0, supply_air=3.5))
    assert number(found["makeup-air"]["air_shortfall"]) == pytest.approx(1.5)
