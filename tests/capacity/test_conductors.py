"""Contacts, rack, bus and joints against the amperes of a run."""

from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st

from lineplanner.capacity import check_bus, check_contacts, check_joints, check_rack
from lineplanner.findings import Level
from lineplanner.inputs.line import Bus, FlightBar, Joint
from lineplanner.inputs.load import Hang
from lineplanner.inputs.rack import Member
from lineplanner.program.recipe_for import process_of
from lineplanner.quantities import CURRENT, VOLTAGE
from lineplanner.sources import Status


@pytest.fixture
def contacts(make_case, make_run, areas_of):
    """Findings on the contacts of ten plates of 0.1 m2 at a current."""

    def check(current: float, run=None, **settings):
        case = make_case(**settings)
        return check_contacts(areas_of(case), run or make_run(current), process_of(case), case)

    return check


def test_a_titanium_contact_carries_eight_amperes(contacts, said) -> None:
    # 160 A over 1 m2: 16 A for each part on two contacts of 8 A; a finisher's published figure
    found = {f.check: f for f in contacts(160.0, conductor="titanium-2")}["contacts"]
    assert (found.value, found.limit) == (pytest.approx(16.0), 16.0)
    over = contacts(161.0, conductor="titanium-2")[0]
    assert (over.level, over.source.status) == (Level.STOP, Status.PUBLISHED)
    assert over.facts["needed"] == 3
    assert over.facts["density"].value == pytest.approx(160.0)
    assert "3" in said(over)[1]


def test_a_contact_figure_of_common_practice_only_cautions(contacts) -> None:
    found = contacts(700.0, process="chrome-hard", conductor="copper")[0]
    assert (found.source.status, found.level) == (Status.PRACTICE, Level.CAUTION)


def test_a_rated_contact_of_the_rack_file_counts_as_entered(contacts) -> None:
    found = contacts(500.0, conductor="copper", rated_contact=20.0)[0]
    assert (found.limit, found.source.status, found.level) == (40.0, Status.ENTERED, Level.STOP)


def test_the_peak_counts_for_contacts_and_not_only_the_hold(contacts, make_run, make_stage) -> None:
    run = make_run(100.0, make_stage("strike", 0.0, 30.0, 250.0), make_stage("plate", 30.0, 3600.0, 100.0))
    assert contacts(0.0, run, conductor="titanium-2")[0].value == pytest.approx(25.0)


def test_hard_coat_asks_for_two_contacts(contacts) -> None:
    one = {f.check: f for f in contacts(10.0, process="anodize-hard", contacts=1)}["contacts-number"]
    assert (one.level, one.facts["needed"]) == (Level.CAUTION, 2)  # common practice
    two = {f.check: f for f in contacts(10.0, process="anodize-hard", contacts=2)}["contacts-number"]
    assert (two.level, two.margin) == (Level.OK, None)


def test_parts_that_are_merely_counted_have_unknown_contacts(contacts, said) -> None:
    found = contacts(10.0, hang=Hang(part="plate", count=3))
    assert [(f.level, f.key) for f in found] == [(Level.NOTE, "contacts.unknown")]
    said(found[0])


# --- rack ------------------------------------------------------------------------------------------------


def bar(role: str, top: float, bottom: float, name: str = "") -> Member:
    return Member(
        name=name or role, role=role, start=(0.0, top), end=(0.0, bottom), width=0.025, thickness=0.006
    )


SPLINE = (bar("spline", 0.0, 1.2),)


@pytest.fixture
def rack(make_case, make_run, named):
    def check(current: float, members=SPLINE, **settings):
        return named(check_rack(make_run(current), make_case(members=members, **settings)))

    return check


def test_both_tiers_of_a_titanium_spline_are_shown(rack) -> None:
    # 6 x 25 mm at 100 A: in air of 25 degC 73 A give 30 K, in the bath 202 A give 5 K, drop tier 31 A/in2: 7.2 A
    found = rack(100.0, conductor="titanium-2")
    assert found["rack-air"].limit == pytest.approx(72.9, abs=0.2)
    assert found["rack-air"].level is Level.CAUTION  # heat transfer is an assumption
    assert found["rack-air"].facts["warms"].value == pytest.approx(62.0, abs=0.5)
    assert found["rack-bath"].limit == pytest.approx(201.9, abs=0.2)
    assert found["rack-bath"].level is Level.OK
    assert found["rack-drop"].limit == pytest.approx(7.2, abs=0.05)
    assert (found["rack-drop"].level, found["rack-drop"].key) == (Level.NOTE, "rack-drop.mild")


def test_the_drop_tier_cautions_for_other_metals_and_for_chrome(rack) -> None:
    # 6063: 510 A/in2 x 0.2325 in2 = 118.6 A
    aluminium = rack(150.0)["rack-drop"]
    assert (aluminium.limit, aluminium.level) == (pytest.approx(118.6, abs=0.1), Level.CAUTION)
    assert rack(100.0, process="chrome-hard", conductor="titanium-2")["rack-drop"].level is Level.CAUTION


def test_members_side_by_side_share_by_section(rack) -> None:
    two = (bar("spline", 0.0, 1.2, "left"), bar("spline", 0.0, 1.2, "right"))
    assert rack(100.0, two, conductor="titanium-2")["rack-air"].value == pytest.approx(50.0)


def test_a_spline_wholly_under_the_surface_is_not_judged_by_air(rack) -> None:
    found = rack(100.0, (bar("spline", 0.3, 1.2),))
    assert "rack-air" not in found
    assert "rack-bath" in found


def test_a_rack_rated_on_its_drawing_may_stop(rack) -> None:
    found = rack(100.0, rated_rack=90.0)["rack-rating"]
    assert (found.level, found.source.status) == (Level.STOP, Status.ENTERED)


def test_a_rack_without_members_is_said_to_be_unknown(rack) -> None:
    found = rack(100.0, ())
    assert [(f.level, f.key) for f in found.values()] == [(Level.NOTE, "rack.unknown")]


# --- bus and joints --------------------------------------------------------------------------------------


def bus(bars: int = 1, width: float = 0.1) -> Bus:
    return Bus(name="B", conductor="copper-bus", length=24.0, width=width, thickness=0.01, bars=bars)


@pytest.fixture
def bars(make_case, make_run, circuit_for, named):
    def check(current: float, **settings):
        case = make_case(**settings)
        return named(check_bus(circuit_for(case), make_run(current), case))

    return check


def test_a_pair_of_bars_for_5000_a_fails_heat_section_and_drop(bars) -> None:
    # 2 x 120 x 10 mm: 1.64 x about 1990 A = 3.26 kA; 970 A/in2 x 3.72 in2 = 3608 A; 24 m: about 0.95 V at 40 degC
    found = bars(5000.0, bus=(bus(2, 0.12),))
    assert found["bus-heat"].limit == pytest.approx(3230.0, rel=0.02)
    assert found["bus-section"].limit == pytest.approx(3608.0, rel=0.001)
    assert found["bus-drop"].value == pytest.approx(0.958, rel=0.005)
    assert {found[c].level for c in ("bus-heat", "bus-section", "bus-drop")} == {Level.CAUTION}


def test_a_rule_on_volts_never_stops_though_it_was_read(bars) -> None:
    bar = FlightBar(conductor="copper", length=2.0, width=0.05, thickness=0.01, fed="one end")
    found = bars(5000.0, flight_bar=bar)["bus-section"]
    assert (found.source.status, found.level) == (Status.PUBLISHED, Level.CAUTION)


def test_a_flight_bar_fed_at_both_ends_carries_half(bars) -> None:
    bar = FlightBar(conductor="copper-bus", length=2.0, width=0.1, thickness=0.01, fed="both ends")
    assert bars(1000.0, flight_bar=bar)["bus-heat"].value == 500.0
    assert bars(1000.0, flight_bar=replace(bar, fed="one end"))["bus-heat"].value == 1000.0


def test_chrome_has_less_to_lose_on_the_way_and_hard_coat_more(bars) -> None:
    # 24 m of 1000 mm2: 460 uohm at 40 degC; x 900 A = 0.414 V: over 0.3 V, under 0.5 V (common practice)
    settings = {"bus": (bus(),)}
    assert bars(900.0, **settings)["bus-drop"].level is Level.OK
    assert bars(900.0, process="chrome-hard", **settings)["bus-drop"].level is Level.CAUTION
    assert bars(1500.0, process="anodize-hard", **settings)["bus-drop"].level is Level.NOTE


def test_hot_air_lowers_what_a_bus_carries(bars) -> None:
    settings = {"bus": (bus(),)}
    cool, hot = bars(900.0, **settings), bars(900.0, ambient=323.15, **settings)
    # bar at 70 degC in both: 30 K over 40 degC, 20 K over 50 degC; (20/30)^(1.2/2) is about 0.79
    assert hot["bus-heat"].limit / cool["bus-heat"].limit == pytest.approx(0.79, abs=0.02)
    assert bars(900.0, ambient=350.0, **settings)["bus-heat"].limit == 0.0


def test_more_than_four_bars_are_said_to_be_outside_the_source(
    make_case, make_run, circuit_for, said
) -> None:
    case = make_case(bus=(bus(6),))
    notes = [f for f in check_bus(circuit_for(case), make_run(), case) if f.key == "bus-heat.group"]
    assert [f.level for f in notes] == [Level.NOTE]
    said(notes[0])


def test_a_bus_that_was_not_entered_is_said_to_be_unknown(bars) -> None:
    found = bars(900.0)
    assert {(n, f.level, f.key) for n, f in found.items()} == {
        (n, Level.NOTE, "conductor.unknown") for n in ("bus", "joints", "flight-bar")
    }


@pytest.mark.parametrize(
    ("microohm", "level", "key"),
    [(5.0, Level.OK, "joint"), (7.0, Level.CAUTION, "joint.watch"), (11.0, Level.CAUTION, "joint.fail")],
)
def test_a_bolted_joint_by_its_millivolts(make_case, make_run, said, microohm, level, key) -> None:
    # 1000 A x 5 uohm = 5 mV, watch to 10 mV: shop practice
    case = make_case(joints=(Joint(name="J", type="bolted", resistance=microohm * 1e-6),))
    found = check_joints(make_run(1000.0), case)[0]
    assert (found.kind, found.level, found.key) == (VOLTAGE, level, key)
    said(found)


def test_a_saddle_at_a_tenth_of_a_volt_and_5000_a_makes_500_watts(make_case, make_run, said) -> None:
    # 20 uohm x 5000 A = 0.1 V; x 5000 A = 500 W; two side by side take half the current: 0.05 V, 125 W each
    def found(parallel: int):
        joint = Joint(name="S", type="saddle", resistance=20e-6, parallel=parallel)
        return check_joints(make_run(5000.0), make_case(joints=(joint,)))[0]

    assert found(1).key == "saddle.watch"
    assert found(1).facts["watts"].value == pytest.approx(500.0)
    assert found(2).key == "saddle"
    assert found(2).facts["watts"].value == pytest.approx(125.0)
    assert found(2).facts["current"].value == pytest.approx(2500.0)
    assert found(2).facts["current"].kind is CURRENT
    for finding in (found(1), found(2)):
        said(finding)


@given(st.floats(1.0, 5000.0), st.floats(1.0, 5.0))
def test_more_current_never_raises_a_margin(
    make_case, make_run, areas_of, circuit_for, current, more
) -> None:
    joint = Joint(name="J", type="bolted", resistance=2e-6)
    case = make_case(members=SPLINE, bus=(bus(),), joints=(joint,))
    areas, circuit, process = areas_of(case), circuit_for(case), process_of(case)

    def margins(amperes: float) -> list[float]:
        run = make_run(amperes)
        found = [*check_contacts(areas, run, process, case), *check_rack(run, case)]
        found += [*check_bus(circuit, run, case), *check_joints(run, case)]
        return [f.value / f.limit for f in found if f.margin is not None and f.check != "joint"]

    assert all(b >= a for a, b in zip(margins(current), margins(current * more), strict=True))
