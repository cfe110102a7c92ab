"""The circuit of a load: what each element resists, and what is said where nothing was entered."""

from collections.abc import Callable

import pytest

from lineplanner.circuit import Circuit, circuit_of
from lineplanner.circuit.touch import part_conductor
from lineplanner.inputs.case import Case
from lineplanner.inputs.line import Bus, FlightBar, Joint
from lineplanner.inputs.load import Hang
from lineplanner.inputs.rack import Member
from lineplanner.load import load_areas
from lineplanner.program.recipe_for import process_of
from lineplanner.sources import Status

Make = Callable[..., Case]


def circuit(case: Case) -> Circuit:
    process = process_of(case)
    return circuit_of(case, load_areas(case, process), process)


def bar(fed: str, length: float = 2.0) -> FlightBar:
    return FlightBar(conductor="copper-bus", length=length, width=0.1, thickness=0.01, fed=fed)


def spline(top: float, bottom: float, name: str = "spline", role: str = "spline") -> Member:
    return Member(name=name, role=role, start=(0.0, top), end=(0.0, bottom), width=0.025, thickness=0.006)


@pytest.mark.parametrize(("fed", "millivolts"), [("one end", 35.55), ("both ends", 8.89)])
def test_an_evenly_loaded_flight_bar_drops_a_quarter_when_fed_at_both_ends(
    make_case: Make, fed, millivolts
) -> None:
    # 97 % copper: 0.01777 uohm m x 2 m / 1000 mm2 = 35.54 uohm; x 2000 A / 2 = 35.5 mV, / 8 = 8.89 mV
    element = circuit(make_case(flight_bar=bar(fed))).of("flight bar")[0]
    assert 2000.0 * element.resistance * 1e3 == pytest.approx(millivolts, rel=0.005)


def test_a_long_bus_of_two_bars_a_pole_at_60_degrees(make_case: Make) -> None:
    # 24 m / (2 x 1200 mm2) x 0.01777 uohm m x (1 + 0.0039 x 40) = 205.4 uohm; x 5000 A = 1.027 V
    bus = Bus(
        name="B",
        conductor="copper-bus",
        length=24.0,
        width=0.12,
        thickness=0.01,
        bars=2,
        temperature=333.15,
    )
    element = circuit(make_case(bus=(bus,))).of("bus")[0]
    assert element.resistance * 1e6 == pytest.approx(205.4, abs=0.1)
    assert (element.section, element.paths) == (pytest.approx(2400e-6), 2)


def test_joints_add_in_series_and_share_side_by_side(make_case: Make) -> None:
    # 16 x 1 uohm = 16; 2 x 20 uohm / 4 = 10
    joints = (
        Joint(name="bolts", type="bolted", count=16, resistance=1e-6),
        Joint(name="saddles", type="saddle", count=2, parallel=4, resistance=20e-6),
    )
    found = circuit(make_case(joints=joints))
    assert [e.role for e in found.of("joint", "saddle")] == ["joint", "saddle"]
    assert [e.resistance for e in found.of("joint", "saddle")] == pytest.approx([16e-6, 10e-6])


def test_a_spline_counts_whole_above_the_surface_and_half_below_it(make_case: Make) -> None:
    # surface 0.2 m down: 0.2 + 1.0/2 = 0.7 m of the 1.2 m; 0.0401e-6 x 0.7 / 150e-6 = 187.1 uohm at 20 degC
    element = circuit(make_case(members=(spline(0.0, 1.2),))).of("rack")[0]
    assert element.resistance == pytest.approx(0.0401e-6 * 0.7 / 150e-6, rel=1e-9)


def test_a_spline_wholly_in_the_solution_counts_half(make_case: Make) -> None:
    element = circuit(make_case(members=(spline(0.3, 1.3),))).of("rack")[0]
    assert element.resistance == pytest.approx(0.0401e-6 * 0.5 / 150e-6, rel=1e-9)


def test_hooks_in_series_with_splines_each_side_by_side(make_case: Make) -> None:
    one_hook = spline(-0.2, 0.0, "hook", "hook")
    hooks = (one_hook, spline(-0.2, 0.0, "other hook", "hook"))
    splines = (spline(0.3, 1.3), spline(0.3, 1.3, "second"), spline(0.3, 1.3, "third"))
    frame = spline(0.3, 1.3, "bar", "crossbar")
    found = circuit(make_case(members=(*hooks, *splines, frame))).of("rack")
    rho = 0.0401e-6 / 150e-6
    assert [e.resistance for e in found] == pytest.approx([rho * 0.2 / 2, rho * 0.5 / 3], rel=1e-9)


def test_contacts_of_all_parts_stand_side_by_side(make_case: Make) -> None:
    # 4 parts of 2 contacts on 6061: a = sqrt(20/(pi 1e9)) = 79.79 um; (2 x 0.0401)/(4 a) = 251.3 uohm; / 8 = 31.4
    found = circuit(make_case(conductor="aluminium-6061-t6")).of("contacts")[0]
    assert found.paths == 8
    assert found.resistance * 1e6 == pytest.approx(251.3 / 8, rel=1e-3)


def test_current_that_goes_to_a_thief_does_not_pass_the_contacts(make_case: Make) -> None:
    from dataclasses import replace

    from lineplanner.inputs.rack import Thief

    case = make_case()
    robbed = replace(case, load=replace(case.load, thieves=(Thief(name="t", area=0.4, factor=1.0),)))
    # parts 0.4 m2 of 0.8 m2: half the current, a quarter of the heat
    ratio = circuit(robbed).of("contacts")[0].resistance / circuit(case).of("contacts")[0].resistance
    assert ratio == pytest.approx(0.25, rel=1e-9)


def test_what_was_not_entered_is_named_and_not_assumed(make_case: Make) -> None:
    found = circuit(make_case(hang=Hang(part="plate", count=4)))
    assert found.elements == ()
    assert found.resistance == 0
    assert found.missing == ("bus", "joints", "flight bar", "rack hooks", "rack splines", "contacts")


def test_a_part_metal_stands_for_the_row_of_its_own_name(make_case: Make) -> None:
    conductors = make_case().tables.conductors
    names = {
        m: part_conductor(conductors, m) for m in ("copper", "steel", "stainless", "aluminium", "cast-iron")
    }
    assert {m: c.name for m, c in names.items() if c} == {
        "copper": "copper-bus",
        "steel": "steel",
        "stainless": "stainless-304",
        "aluminium": "aluminium-6061-t6",
        "cast-iron": "stainless-304",
    }
    assert part_conductor((), "steel") is None


def full(make_case: Make, **changes) -> Circuit:
    bus = Bus(name="B", conductor="copper-bus", length=10.0, width=0.1, thickness=0.01)
    joints = (Joint(name="bolts", type="bolted", count=4, resistance=2e-6),)
    members = (spline(-0.2, 0.0, "hook", "hook"), spline(0.0, 1.2))
    settings = {"bus": (bus,), "joints": joints, "flight_bar": bar("both ends"), "members": members}
    return circuit(make_case(**{**settings, **changes}))


def test_the_elements_add_up_and_nothing_is_missing(make_case: Make) -> None:
    found = full(make_case)
    assert found.missing == ()
    assert [e.role for e in found.elements] == ["bus", "joint", "flight bar", "rack", "rack", "contacts"]
    assert found.resistance == pytest.approx(sum(e.resistance for e in found.elements))
    assert found.drop(1000.0) == pytest.approx(1000.0 * found.resistance)


def test_a_warmer_bath_raises_the_resistance_of_rack_bar_and_contacts(make_case: Make) -> None:
    cold, warm = full(make_case), full(make_case, temperature=328.15)
    for before, after in zip(cold.elements, warm.elements, strict=True):
        if before.role in ("rack", "contacts", "flight bar"):
            assert after.resistance > before.resistance
        else:
            assert after.resistance == before.resistance


def test_every_element_can_be_asked_why(make_case: Make) -> None:
    found = full(make_case)
    for element in found.elements:
        assert element.figure.value == pytest.approx(element.resistance)
        assert element.figure.formula
        assert list(element.figure.leaves())
    statuses = {leaf.status for leaf in found.figure.leaves()}
    assert Status.ENTERED in statuses
    assert Status.ASSUMPTION in statuses  # contact force
