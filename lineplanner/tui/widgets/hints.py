"""The last line: keys for what can be done here, or what the program has to say until the next key."""

from __future__ import annotations

from typing import ClassVar

from rich.segment import Segment
from textual.strip import Strip

from lineplanner.tui.widgets.kept_lines import KeptLines
from lineplanner.tui.widgets.text import fitted, tidy

LAST = ("ctrl+p", "all commands")
_KEYS = {
    "question_mark": "?",
    "plus": "+",
    "minus": "-",
    "full_stop": ".",
    "greater_than_sign": ">",
    "less_than_sign": "<",
    "left_square_bracket": "[",
    "right_square_bracket": "]",
}


def key_said(key: str) -> str:
    """A key as it is printed.

    >>> key_said("question_mark"), key_said("f2"), key_said("ctrl+p"), key_said("S")
    ('?', 'F2', 'ctrl+p', 'S')
    """
    shown = _KEYS.get(key, key)
    return shown.upper() if shown[0] == "f" and shown[1:].isdigit() else shown


class Hints(KeptLines):
    """Hints from the bindings in force, as many as fit; `say` puts a sentence in their place."""

    ALLOW_SELECT = False
    COMPONENT_CLASSES: ClassVar[set[str]] = {"hints--key", "hints--said", "hints--grave"}

    def __init__(self, first: tuple[tuple[str, str], ...] = (), *, ascii_only: bool = False) -> None:
        super().__init__()
        self.first = first
        self.ascii = ascii_only
        self.said, self.grave = "", False
        self._known: dict[frozenset[str], list[tuple[str, str]]] = {}

    def on_mount(self) -> None:
        self.screen.bindings_updated_signal.subscribe(self, lambda _: self._renewed())

    def _renewed(self) -> None:
        self._known = {}
        self.redraw()

    def say(self, text: str, *, grave: bool = False) -> None:
        """Say something until the next key."""
        if text or self.said:
            self.said, self.grave = text, grave
            self.redraw()

    def _hints(self) -> list[tuple[str, str]]:
        """Key and what it does, each action once, in the order of the bindings; known until bindings change."""
        wanted: frozenset[str] = getattr(self.screen, "hinted_first", frozenset())
        if wanted not in self._known:
            self._known[wanted] = self._listed(wanted)
        return self._known[wanted]

    def _listed(self, first: frozenset[str]) -> list[tuple[str, str]]:
        found: dict[str, tuple[str, str]] = {}
        bindings = sorted(
            self.screen.active_bindings.items(),
            key=lambda one: (one[1].node is self.app, one[1].binding.action.partition("(")[0] not in first),
        )
        for key, active in bindings:
            if active.binding.show and active.enabled:
                found.setdefault(active.binding.action, (key_said(key), active.binding.description))
        return list(found.values())

    def draw_line(self, y: int) -> Strip:
        width, base = self.size.width, self.look()
        if self.said and y == 0:
            style = self.look("hints--grave" if self.grave else "hints--said")
            return Strip([Segment(fitted(f" {tidy(self.said, ascii_only=self.ascii)}", width), style)], width)
        segments = [Segment(" ", base)]
        key_style = self.look("hints--key")
        left = width - 1 - len(" ".join(LAST))
        for key, text in (*self.first, *self._hints()) if y == 0 else ():
            size = len(key) + len(text) + 3
            if size <= left:
                segments += [Segment(key, key_style), Segment(f" {text}  ", base)]
                left -= size
        segments += [Segment(LAST[0], key_style), Segment(f" {LAST[1]}", base)]
        return Strip(segments).adjust_cell_length(width, base)
