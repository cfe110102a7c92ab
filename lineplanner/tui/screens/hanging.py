"""Hanging on the picture: the keys of the hand. Every key is one edit, planned and drawn at once."""

from __future__ import annotations

import math
from collections.abc import Callable
from functools import partial
from typing import TYPE_CHECKING, Literal

from textual.binding import Binding

from lineplanner.racking import (
    PATTERNS,
    Direction,
    Pattern,
    Racked,
    added,
    again,
    aligned,
    faced,
    field_between,
    filled,
    moved,
    places_of,
    put,
    reracked,
    sided,
    spaced,
    swapped,
    taken_off,
    turned,
)
from lineplanner.tui.screens.ask import AskScreen, PickScreen, PromptScreen
from lineplanner.tui.screens.base import PlannerScreen
from lineplanner.tui.widgets.rack_view import RackView

if TYPE_CHECKING:
    from lineplanner.advice import More
    from lineplanner.inputs.load import Load
    from lineplanner.inputs.rack import Rack, Spot
    from lineplanner.tui.widgets.hand import Hand

RACK = "rack"
NOTE = "HANGING   arrows carry, . hangs one more, h ends"
TURN = math.pi / 2
KEYS = (
    Binding("h", "hang", "hang"),
    Binding("full_stop", "again", "once more"),
    Binding("m", "more", "how many more", show=False),
    Binding("a", "add", "add part"),
    Binding("o", "fill", "fill field"),
    Binding("delete,backspace", "take_off", "take off"),
    Binding("x", "mark", "mark"),
    Binding("X", "mark_alike", "mark all of a kind", show=False),
    Binding("t", "turn(1)", "turn"),
    Binding("T", "turn(-1)", "turn a quarter back", show=False),
    Binding("f", "face", "flat or edge-on", show=False),
    Binding("b", "side", "front, back or both", show=False),
    Binding("w", "swap_held", "swap the parts in hand", show=False),
    Binding("l", "align('row')", "align in a row", show=False),
    Binding("i", "align('column')", "align in a column", show=False),
    Binding("v", "space", "space evenly", show=False),
    Binding("K", "rerack", "hang all on another rack", show=False),
    Binding("escape", "let_go", "let go", show=False),
    *(Binding(digit, f"times('{digit}')", show=False) for digit in "0123456789"),
)
"""Keys of the hand; all but the first are in force only while parts are being hung."""
_WHILE_HANGING = frozenset(one.action.partition("(")[0] for one in KEYS) - {"hang", "more"}


class HangingScreen(PlannerScreen):
    """What the screen of a load can do with the parts in hand. `rack_view` and `edit` are the load screen's."""

    hanging = False

    @property
    def hinted_first(self) -> frozenset[str]:
        """Actions whose keys are told first."""
        return _WHILE_HANGING | {"hang"} if self.hanging else frozenset()

    @property
    def rack_view(self) -> RackView | None:
        """The picture, where it is in sight; a screen without one hangs nothing."""
        return None

    def edit(self, change: Callable[[Load], Load], label: str) -> bool:  # noqa: ARG002 - the load screen's
        """One edit of the load; False where it is refused, as here where no load is shown."""
        return False

    async def action_view(self, name: str) -> None:
        """Another view, where there are several."""

    def show_bar(self) -> None:
        """Show the bar of views anew, where there is one."""

    def check_action(self, action: str, parameters: tuple[object, ...]) -> bool | None:
        if action in _WHILE_HANGING and not (self.hanging and self.rack_view is not None):
            return False
        return super().check_action(action, parameters)

    @property
    def hand(self) -> Hand:
        """What is in hand."""
        assert self.rack_view is not None
        return self.rack_view.hand

    # --- hanging or not ----------------------------------------------------------------------------------

    async def action_hang(self) -> None:
        """Begin to hang parts, or end it."""
        if not self.hanging and self.rack_view is None:
            await self.action_view(RACK)
        self.hang_on(on=not self.hanging)

    def hang_on(self, *, on: bool) -> None:
        """Whether parts are being hung: arrows then carry what is in hand."""
        self.hanging = on
        view = self.rack_view
        if view is not None:
            view.canvas.carry = self._carry if on else None
            view.canvas.drop = self._drop if on else None
            view.canvas.field = self._draw_field if on else None
            view.canvas.focus()
            view.hand.typed = ""
            if not on:
                view.hand.marked = []
                view.remark()
        self.show_bar()
        self.refresh_bindings()

    def action_let_go(self) -> None:
        """Let go of the marks; without any, end hanging."""
        if self.hand.marked or self.hand.typed:
            self.hand.marked, self.hand.typed = [], ""
            assert self.rack_view is not None
            self.rack_view.remark()
        else:
            self.hang_on(on=False)

    def action_times(self, digit: str) -> None:
        """A digit of the count before a move."""
        typed = self.hand.count(digit)
        self.say(f"{typed} times: . hangs so many more" if typed else "")

    # --- moves -------------------------------------------------------------------------------------------

    def move(self, change: Callable[[Load, Rack], Racked], label: str) -> None:
        """One move of the hand as one edit; afterwards the hand holds what it moved."""
        hand, found = self.hand, []
        before = (hand.key, list(hand.marked))

        def made(load: Load) -> Load:
            racked = change(load, self.session.case.rack)
            found.append(racked)
            hand.hold(racked.keys)
            return racked.load

        if not self.edit(made, label):
            hand.key, hand.marked = before
        elif found[-1].short:
            self.say(f"{found[-1].short} more found no place on the rack")

    def _carry(self, direction: Direction, steps: int) -> None:
        keys, steps = self.hand.keys, steps * self.hand.times()
        self.move(lambda load, rack: moved(load, rack, keys, direction, steps), f"moved {direction}")

    def _drop(self, spot: Spot) -> None:
        """The mouse let go of a part: on the free tip nearest to there."""
        keys = self.hand.keys
        self.move(lambda load, rack: put(load, rack, keys, spot), "moved by hand")

    def _draw_field(self, one: Spot, other: Spot) -> None:
        """The mouse drew a field over tips: filled with the part in hand."""
        field = field_between(self.session.case.rack, one, other)
        key = next(iter(self.hand.keys), None)
        if field and key is not None:
            self.move(lambda load, rack: filled(load, rack, key, PATTERNS[0], field), f"{field} filled")

    def action_again(self) -> None:
        """What is in hand once more, or so often as was typed."""
        times, key = self.hand.times(), next(iter(self.hand.keys), None)
        if key is None:
            self.say("no part is in hand: add one")
            return
        label = "one part more" if times == 1 else f"{times} parts more"
        self.move(lambda load, rack: again(load, rack, key, times), label)

    def action_take_off(self) -> None:
        keys = self.hand.keys
        label = "a part taken off" if len(keys) == 1 else f"{len(keys)} parts taken off"
        self.move(lambda load, _: taken_off(load, keys), label)

    def action_turn(self, quarters: int) -> None:
        keys = self.hand.keys
        self.move(lambda load, _: turned(load, keys, quarters * TURN), "turned a quarter")

    def action_face(self) -> None:
        keys = self.hand.keys
        self.move(lambda load, _: faced(load, keys), "flat or edge-on")

    def action_side(self) -> None:
        keys = self.hand.keys
        self.move(lambda load, rack: sided(load, rack, keys), "another side")

    def action_align(self, along: str) -> None:
        keys = self.hand.keys
        way: Literal["row", "column"] = "row" if along == "row" else "column"
        self.move(lambda load, _: aligned(load, keys, way), f"aligned in a {way}")

    def action_space(self) -> None:
        keys = self.hand.keys
        self.move(lambda load, rack: spaced(load, rack, keys), "spaced evenly")

    # --- marks -------------------------------------------------------------------------------------------

    def action_mark(self) -> None:
        self.hand.mark()
        self._marked()

    def action_mark_alike(self) -> None:
        """Mark every part of the kind in hand."""
        load, key = self.session.case.load, self.hand.key
        if key is not None:
            part = load.hangs[key[0]].part
            self.hand.marked = [one for one in places_of(load) if load.hangs[one[0]].part == part]
        self._marked()

    def _marked(self) -> None:
        assert self.rack_view is not None
        self.rack_view.remark()
        self.say(f"{len(self.hand.marked)} marked" if self.hand.marked else "no part marked")

    # --- moves that ask first ----------------------------------------------------------------------------

    def action_add(self) -> None:
        stems = [(stem, stem) for stem in self.session.library.stems("part")]
        self._pick("Part to hang", stems, self._added)

    def _added(self, part: str | None) -> None:
        if part is not None:
            self.move(lambda load, rack: added(load, rack, part), f"{part} added")

    def action_swap_held(self) -> None:
        stems = [(stem, stem) for stem in self.session.library.stems("part")]
        self._pick("Part in place of those in hand", stems, self._swapped)

    def _swapped(self, part: str | None) -> None:
        if part is not None:
            keys = self.hand.keys
            self.move(lambda load, _: swapped(load, keys, part), f"{part} in place of the parts in hand")

    def action_fill(self) -> None:
        self._pick("Fill", [(pattern, pattern) for pattern in PATTERNS], self._fill_field)

    def _fill_field(self, pattern: Pattern | None) -> None:
        if pattern is None:
            return
        asked = "Field: two tips (A1-C4), a row (A), rows (A-C); nothing: the whole rack"
        prompt = PromptScreen(asked, lambda _: None, ascii_only=self.session.style.ascii)
        self.app.push_screen(prompt, partial(self._filled, pattern))

    def _filled(self, pattern: Pattern, field: str | None) -> None:
        key = next(iter(self.hand.keys), None)
        if field is not None and key is not None:
            label = f"{pattern} of {field or 'the rack'} filled"
            self.move(lambda load, rack: filled(load, rack, key, pattern, field), label)

    def action_rerack(self) -> None:
        here = self.session.case.load.rack
        stems = [(stem, stem) for stem in self.session.library.stems("rack") if stem != here]
        self._pick(f"Rack in place of {here}", stems, self._reracked)

    def _reracked(self, name: str | None) -> None:
        if name is not None:
            new = self.session.library.record("rack", name)
            self.move(lambda load, rack: reracked(load, rack, new, name), f"all on rack {name}")

    def action_more(self) -> None:
        """How many more of the part in hand; hung in one step if wanted."""
        from lineplanner.advice import how_many_more
        from lineplanner.report.more_text import more_lines

        view = self.rack_view
        key = None if view is None else next(iter(view.hand.keys), None)
        if key is None:
            self.say("no part is chosen on the picture")
            return
        more = how_many_more(self.session.case, key)
        answers = [("q", "leave the load as it is", "stay")]
        if more.carried:
            answers.insert(0, ("h", f"hang {more.carried} more", "hang"))
        ask = AskScreen(
            "How many more",
            more_lines(more, self.session.style),
            answers,
            ascii_only=self.session.style.ascii,
        )
        self.app.push_screen(ask, partial(self._more, more))

    def _more(self, more: More, answer: str | None) -> None:
        if answer == "hang":
            self.move(lambda _load, _rack: more.racked, f"{more.carried} parts more")

    def _pick(self, question: str, choices: list[tuple[str, str]], then: Callable[..., None]) -> None:
        self.app.push_screen(PickScreen(question, choices, ascii_only=self.session.style.ascii), then)
