"""An approval holds for the values that were approved, however they are spelled, and for no others."""

from dataclasses import replace

import pytest

from lineplanner.inputs.approval import approved, content_hash, effective_status
from lineplanner.inputs.recipe import Recipe, SideStep, VoltageStage
from lineplanner.inputs.values import Ranged
from lineplanner.quantities import CURRENT_DENSITY, TEMPERATURE, THICKNESS, TIME
from lineplanner.units import parse

RECIPE = Recipe(
    name="Clear",
    revision="3",
    process="anodize-sulfuric",
    bases=("6xxx",),
    aim=Ranged(value=1e-5, low=8e-6, high=1.2e-5),
    current_density=Ranged(value=129.0),
    voltages=(VoltageStage(to=Ranged(value=15.0), ramp=60.0),),
    before=(SideStep(name="etch", time=120.0),),
)
CHANGES: list[dict[str, object]] = [
    {"name": "Other"},
    {"revision": "4"},
    {"process": "anodize-hard"},
    {"bases": ("6xxx", "7xxx")},
    {"aim": Ranged(value=1e-5, low=8e-6, high=1.3e-5)},
    {"aim": Ranged(value=1e-5)},
    {"minimum": 8e-6},
    {"current_density": Ranged(value=129.0001)},
    {"live_entry": True},
    {"note": "x"},
    {"voltages": ()},
    {"before": (SideStep(name="etch", time=121.0),)},
]


def test_an_approved_recipe_counts_as_approved() -> None:
    assert effective_status(RECIPE) == "draft"
    assert effective_status(approved(RECIPE, by="A. Smith", on="2026-03-14")) == "approved"


@pytest.mark.parametrize(
    "change", CHANGES, ids=[f"{number}-{next(iter(change))}" for number, change in enumerate(CHANGES)]
)
def test_a_changed_value_makes_it_a_draft_again(change: dict[str, object]) -> None:
    changed = replace(approved(RECIPE, by="A. Smith", on="2026-03-14"), **change)  # type: ignore[arg-type]
    assert content_hash(changed) != content_hash(RECIPE)
    assert effective_status(changed) == "draft"


@pytest.mark.parametrize(
    "change",
    [{"approved_by": " "}, {"approved_on": ""}, {"approved_content": ""}, {"status": "draft"}],
    ids=lambda change: next(iter(change)),
)
def test_an_approval_needs_a_person_a_day_a_status_and_the_content(change: dict[str, str]) -> None:
    assert effective_status(replace(approved(RECIPE, by="A. Smith", on="2026-03-14"), **change)) == "draft"  # type: ignore[arg-type]


def test_the_approval_itself_is_not_part_of_the_content() -> None:
    assert content_hash(approved(RECIPE, by="A. Smith", on="2026-03-14")) == content_hash(RECIPE)


@pytest.mark.parametrize(
    ("one", "other", "kind"),
    [
        ("25.4 um", "1 mil", THICKNESS),
        ("24 A/ft2", "24 ASF", CURRENT_DENSITY),
        ("0.0254 mm", "25.4 um", THICKNESS),
        ("20 degC", "68 degF", TEMPERATURE),
        ("90 s", "1.5 min", TIME),
    ],
)
def test_the_spelling_of_a_unit_is_not_part_of_the_content(one: str, other: str, kind: object) -> None:
    def with_value(text: str) -> Recipe:
        return replace(RECIPE, aim=Ranged(value=parse(text, kind)))  # type: ignore[arg-type]

    assert content_hash(with_value(one)) == content_hash(with_value(other))


def test_a_hash_stays_what_it_is_from_version_to_version() -> None:
    # A regression check: a new value here takes every approval in every shop back.
    assert content_hash(RECIPE) == "86c128d57a0ec840"


def test_a_value_left_at_its_default_does_not_count() -> None:
    assert content_hash(replace(RECIPE, reverse="preset", stock=0.0)) == content_hash(RECIPE)
