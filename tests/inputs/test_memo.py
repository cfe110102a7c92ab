"""Results remembered for records that never change: they belong to one record, and a new record gets its own."""

from dataclasses import replace
from typing import Any

from lineplanner.inputs.approval import approved, content_hash, effective_status
from lineplanner.inputs.hanging import tip_names, tip_places
from lineplanner.inputs.load import Hang
from lineplanner.inputs.memo import Memo
from lineplanner.inputs.rack import Rack, TipRow
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.values import Ranged


def test_a_remembered_result_belongs_to_its_record_and_key() -> None:
    made: list[Any] = []

    def make(value: int) -> int:
        made.append(value)
        return value

    memo: Memo[list[int], int] = Memo(2)
    one, same_content = [1], [1]
    assert memo.get(one, "a", lambda: make(1)) == 1
    assert memo.get(one, "a", lambda: make(2)) == 1
    assert memo.get(same_content, "a", lambda: make(3)) == 3
    assert memo.get(one, "b", lambda: make(4)) == 4
    assert len(memo) == 2  # the oldest has left
    assert memo.get(one, "a", lambda: make(5)) == 5
    assert made == [1, 3, 4, 5]


def rack(count: int) -> Rack:
    row = TipRow(
        name="A", count=count, start=(0.1, 0.2), step=(0.1, 0.0), kind="hook", conductor="titanium-2"
    )
    return Rack(name="test", conductor="titanium-2", width=1.0, height=1.0, tips=(row,))


def test_a_rack_with_a_tip_more_has_its_own_places() -> None:
    two = rack(2)
    assert list(tip_places(two)) == ["A1", "A2"]
    assert tip_places(two) is tip_places(two)
    assert list(tip_places(replace(two, tips=rack(3).tips))) == ["A1", "A2", "A3"]


def test_a_hang_that_is_moved_has_its_own_tips() -> None:
    hang = Hang(part="lug", tips=("A1-A2",))
    assert tip_names(hang) == ("A1", "A2")
    assert tip_names(replace(hang, tips=("A2-A3",))) == ("A2", "A3")
    assert tip_names(hang) == ("A1", "A2")


def test_a_recipe_that_is_changed_loses_its_approval_although_its_hash_was_known() -> None:
    draft = Recipe(
        name="test",
        revision="1",
        process="anodize-hard",
        bases=("6000",),
        aim=Ranged(value=5e-5),
        current_density=Ranged(value=250.0),
    )
    recipe = approved(draft, by="process engineer", on="2025-01-14")
    assert effective_status(recipe) == "approved"
    changed = replace(recipe, aim=Ranged(value=4e-5))
    assert content_hash(changed) != content_hash(recipe)
    assert effective_status(changed) == "draft"
    assert effective_status(recipe) == "approved"
