"""What to set, whether it may run, what can hurt: the lines of a load that never leave the screen."""

from __future__ import annotations

from typing import ClassVar

from rich.segment import Segment
from rich.style import Style
from textual.binding import Binding, BindingType
from textual.strip import Strip

from lineplanner.report.rows import Head, Line, Piece
from lineplanner.tui.widgets.kept_lines import KeptLines
from lineplanner.tui.widgets.text import tidy

_TONES = {"stop": "danger", "caution": "caution"}
_WORDS = {"DANGER": "danger", "WARNING": "warning", "CAUTION": "caution", "NOTICE": "note"}
_EMPTY = Head((), Piece(""), "", "", "")


class HeadLines(KeptLines, can_focus=True):
    """Setpoints, verdict, caution. With the focus here, left and right choose a figure to ask about."""

    ALLOW_SELECT = False
    COMPONENT_CLASSES: ClassVar[set[str]] = {
        *(
            f"head--{name}"
            for name in ("set", "changed", "chosen", "ok", "note", "caution", "warning", "danger")
        ),
    }
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("left,up", "across(-1)", "figure before", show=False),
        Binding("right,down", "across(1)", "next figure", show=False),
    ]

    def __init__(self, *, id: str | None = None, ascii_only: bool = False) -> None:  # noqa: A002
        super().__init__(id=id)
        self.ascii = ascii_only
        self.head = _EMPTY
        self.moved: frozenset[str] = frozenset()
        self.chosen = 0

    def show(self, head: Head, moved: frozenset[str] = frozenset()) -> None:
        """Show the head of a plan; figures that moved carry a mark."""
        if len(self._lines(head)) != len(self._lines(self.head)):
            self.styles.height = len(self._lines(head))
        self.head, self.moved = head, moved
        self.chosen = min(self.chosen, max(0, len(self._figures) - 1))
        self.redraw()

    def unmark(self) -> None:
        """Take the marks of a change away."""
        if self.moved:
            self.moved = frozenset()
            self.redraw_later()

    @property
    def path(self) -> str | None:
        """The figure that is chosen here."""
        return self._figures[self.chosen].path if self._figures else self.head.verdict.path

    @property
    def _figures(self) -> list[Piece]:
        verdict = [self.head.verdict] if self.head.verdict.path else []
        return [piece for line in self.head.setpoints for piece in line if piece.path] + verdict

    def _lines(self, head: Head) -> tuple[Line, ...]:
        caution = ((Piece(head.caution),),) if head.caution else ()
        return (*head.setpoints, (head.verdict,), *caution) if head.setpoints else ()

    def action_across(self, step: int) -> None:
        self.chosen = max(0, min(self.chosen + step, len(self._figures) - 1))
        self.redraw()

    # --- drawing -----------------------------------------------------------------------------------------

    def draw_line(self, y: int) -> Strip:
        width, lines = self.size.width, self._lines(self.head)
        if y >= len(lines):
            return Strip([Segment(" " * width, self.look())], width)
        base = self._base(y)
        segments = [Segment(" ", base)]
        for piece in lines[y]:
            mark, style = self._marked(piece, base)
            if mark:  # takes the place of the blank before
                segments[-1] = Segment(segments[-1].text[:-1] + mark, segments[-1].style)
            segments.append(Segment(tidy(piece.text, ascii_only=self.ascii), style))
        return Strip(segments).adjust_cell_length(width, base)

    def _base(self, y: int) -> Style:
        count = len(self.head.setpoints)
        if y < count:
            return self.look("head--set")
        if y == count:
            return self.look(f"head--{_TONES.get(self.head.level, 'ok')}")
        return self.look(f"head--{_WORDS.get(self.head.caution_word, 'note')}")

    def _marked(self, piece: Piece, base: Style) -> tuple[str, Style]:
        """The mark before a piece and its style: chosen to be asked about, or moved by the last edit."""
        if piece.path is None:
            return "", base
        if self.has_focus and self._figures and self._figures[self.chosen] is piece:
            return ">", self.look("head--chosen")
        if piece.path in self.moved:
            return "*", self.look("head--changed")
        return "", base
