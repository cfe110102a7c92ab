"""A rack picture as characters and inks in cells; knows no Textual and no style."""

from collections.abc import Collection, Iterator
from enum import IntEnum
from unicodedata import combining, east_asian_width

import numpy as np
from numpy.typing import NDArray

from lineplanner.report.picture import BAR_LABEL, LEVEL_LABEL, Hung, Scene
from lineplanner.report.style import plain
from lineplanner.tui.widgets import raster
from lineplanner.tui.widgets.raster import NOBODY, Codes, Indices, View

Inks = NDArray[np.uint8]

BLANK = ord(" ")
LEAST_WIDE = 3  # cells across from which a part carries its number
_NEAR = 4  # cells more than its number that a part has at most with brackets at its sides
_KEY_ROWS = 8  # rows from which there is room for a key
_HATCH_SEEN, _HATCH_HIDDEN = ord("x"), ord("/")
_TIP_FREE, _CONTACT = ord("o"), ord("*")
_KEY = {
    "x": "stopped off",
    "/": "stopped off behind",
    "o": "free tip",
    "*": "contact",
    "b": "on the back",
    "!": "overlaps or too near",
    "+": "edge of the rack",
}


class Ink(IntEnum):
    """What a cell shows: the index of its style."""

    GROUND = 0
    RACK = 1
    LEVEL = 2
    PART = 3
    DRY = 4
    BACK = 5
    MASKED = 6
    TIP = 7
    NUMBER = 8
    NOTE = 9
    SELECTED = 10
    SELECTED_NUMBER = 11
    FRAME = 12
    CLOSE = 13


class Cells:
    """A scene in a window: codes and inks of every cell, and whose each cell is. Nothing selected in it yet."""

    def __init__(
        self, scene: Scene, view: View, *, ascii_only: bool = False, scale: tuple[int, str] | None = None
    ) -> None:
        """scale is a bar of so many cells and its text."""
        self.scene, self.view, self.ascii_only, self.scale = scene, view, ascii_only, scale
        self.codes: Codes = np.full((view.rows, view.columns), BLANK, dtype=np.uint32)
        self.inks: Inks = np.zeros((view.rows, view.columns), dtype=np.uint8)
        self._order = scene.back_first
        self._rank = np.empty_like(self._order)
        self._rank[self._order] = np.arange(len(self._order), dtype=np.int32)
        self._boxes = self._cell_boxes()
        self._taken = np.zeros((view.rows, view.columns), dtype=bool)  # cells that text has
        self._stopped: Indices = np.empty((0, 0), dtype=np.int32)  # whose stop-off a cell shows
        self.outlined: Indices = np.full((view.rows, view.columns), NOBODY, dtype=np.int32)
        self.filled: Indices = np.full((2 * view.rows, view.columns), NOBODY, dtype=np.int32)
        if view.rows > 0 and view.columns > 0:
            self._draw()

    def owner_at(self, column: float, row: float) -> int | None:
        """The part under a cell or a part of one: the area there, else the line there, else the nearest box."""
        x, y = int(np.floor(column)), int(np.floor(row))
        if not (0 <= x < self.view.columns and 0 <= y < self.view.rows):
            return None
        for found in (self.filled[int(np.floor(2 * row)), x], self.outlined[y, x]):
            if found != NOBODY:
                return int(found)
        left, top, right, bottom = self._boxes.T
        around = np.flatnonzero((left <= x) & (x <= right) & (top <= y) & (y <= bottom))
        if not len(around):
            return None
        size = (right - left + 1)[around] * (bottom - top + 1)[around]
        return int(around[np.argmin(size)])

    def box_of(self, owner: int) -> tuple[int, int, int, int]:
        """First column and row, last column and row of a part; may lie outside the window."""
        left, top, right, bottom = self._boxes[owner].tolist()
        return left, top, right, bottom

    def with_selected(
        self, owner: int | None, marked: Collection[int] = ()
    ) -> tuple[Codes, Inks, tuple[int, int, int, int] | None]:
        """Codes and inks with one part selected and some marked: the first in brackets, the others in parentheses.

        Also the cells that differ: left, top, right, bottom (exclusive).
        """
        count = len(self.scene.parts)
        owners = [one for one in marked if 0 <= one < count and one != owner]
        owners += [owner] if owner is not None and 0 <= owner < count else []
        if not owners:
            return self.codes, self.inks, None
        codes, inks = self.codes.copy(), self.inks.copy()
        own = np.concatenate([self.scene.edges[self.scene.slice_of(one)] for one in owners])
        whose = np.zeros(len(own), dtype=np.int32)
        edges = self.view.edges(own, *self._grid)
        _, mine = raster.outline(edges, whose, self.view.columns, self.view.rows, *self._grid)
        inks[(mine != NOBODY) & ~self._taken] = Ink.SELECTED
        for one in owners:
            for column, row, text in self._selected_marks(one, "[]" if one == owner else "()"):
                _write(codes, inks, column, row, text, Ink.SELECTED_NUMBER)
        changed = np.argwhere((codes != self.codes) | (inks != self.inks))
        if not len(changed):
            return codes, inks, None
        (top, left), (bottom, right) = changed.min(axis=0).tolist(), changed.max(axis=0).tolist()
        return codes, inks, (left, top, right + 1, bottom + 1)

    def _selected_marks(self, owner: int, signs: str) -> Iterator[tuple[int, int, str]]:
        """The number, and two signs around it or around the part; inside the window."""
        left, top, right, bottom = self.box_of(owner)
        columns, rows = self.view.columns, self.view.rows
        if right < 0 or bottom < 0 or left >= columns or top >= rows:
            return
        row = min(max((top + bottom) // 2, 0), rows - 1)
        width = right - left + 1
        label = self._label(self.scene.parts[owner], width)
        start = left + (width - len(label)) // 2
        if label and 0 <= start <= columns - len(label):
            yield start, row, label
        first, last = (left, right) if width >= LEAST_WIDE else (left - 1, right + 1)
        beside = start - 1, start + len(label)
        if label and (width > len(label) + _NEAR or first > beside[0] or last < beside[1]):
            first, last = beside  # rather than far off the number, and never on it
        yield max(first, 0), row, signs[0]
        yield min(last, columns - 1), row, signs[1]

    @property
    def _grid(self) -> tuple[int, int]:
        """Dots to a cell, across and down."""
        return (1, 1) if self.ascii_only else (raster.ACROSS, raster.DOWN)

    def _cell_boxes(self) -> Indices:
        """Of each part: first column and row, last column and row."""
        boxes = np.array([hung.box for hung in self.scene.parts]).reshape(-1, 4)
        low = np.floor(self.view.points(boxes[:, [0, 3]]))
        high = np.maximum(np.ceil(self.view.points(boxes[:, [2, 1]])) - 1, low)
        return np.hstack((low, high)).clip(-1e6, 1e6).astype(np.int32)

    def _draw(self) -> None:
        self._fill()
        self._lines()
        self._levels()
        self._masks()
        self._tips()
        self._numbers()
        self._mark_small()
        self._notes()

    def _fill(self) -> None:
        edges = self.view.edges(self.scene.edges, 1, 2)
        ranks = raster.fill(edges, self._rank[self.scene.owners], self.view.columns, 2 * self.view.rows)
        self.filled = self._owners(ranks)

    def _owners(self, ranks: Indices) -> Indices:
        """Owners of ranks in the order of drawing; nobody stays nobody."""
        return np.append(self._order, np.int32(NOBODY))[ranks]

    def _lines(self) -> None:
        """Outlines of rack and parts; the rack is hidden behind parts on the front, dry parts are dotted."""
        scene, view, (across, down) = self.scene, self.view, self._grid
        edges = view.edges(scene.edges, across, down)
        drawn = np.argsort(self._rank[scene.owners], kind="stable")
        dots, self.outlined = raster.outline(
            edges[drawn], scene.owners[drawn], view.columns, view.rows, across, down
        )
        rack, crossed = raster.outline(
            view.edges(scene.members, across, down), scene.member_ids, view.columns, view.rows, across, down
        )
        front = np.array([hung.side == "front" for hung in scene.parts] + [False])[self.filled]
        hidden = (
            front.repeat(2, axis=0).repeat(2, axis=1) if not self.ascii_only else front[::2] | front[1::2]
        )
        rack &= ~hidden
        inks = np.array([_ink_of(hung) for hung in scene.parts] + [Ink.GROUND], dtype=np.uint8)[self.outlined]
        if self.ascii_only:
            upright = np.abs(np.diff(scene.members[:, 1::2])) > np.abs(np.diff(scene.members[:, ::2]))
            bars = np.where(np.append(upright[:, 0], False), ord("|"), ord("-"))
            codes = np.where(rack, bars[self._longest(crossed)], BLANK)
            codes = np.where(dots, np.where(inks == Ink.DRY, ord("."), ord("#")), codes)
        else:
            if (inks == Ink.DRY).any():
                thin = np.repeat(np.repeat(inks == Ink.DRY, down, axis=0), across, axis=1)
                thin[(np.add.outer(np.arange(len(dots)), np.arange(dots.shape[1])) % 2) == 0] = False
                dots &= ~thin
            codes = raster.packed(dots | rack)
        self.codes = codes.astype(np.uint32)
        lines = rack if self.ascii_only else raster.packed(rack) != BLANK
        self.inks = np.where(self.outlined != NOBODY, inks, np.where(lines, Ink.RACK, Ink.GROUND)).astype(
            np.uint8
        )

    def _longest(self, crossed: Indices) -> Indices:
        """Of each cell the edge of the rack member there that is longest: its direction is that of the member."""
        scene = self.scene
        if not len(scene.members):
            return crossed
        length = np.hypot(*(scene.members[:, 2:] - scene.members[:, :2]).T)
        order = np.lexsort((length, scene.member_ids))
        last = np.append(np.flatnonzero(np.diff(scene.member_ids[order])), len(order) - 1)
        return np.append(order[last], len(order)).astype(np.int32)[crossed]

    def _levels(self) -> None:
        """Flight bar and solution level across the window, where no part's outline is."""
        left, _, right, top = self.scene.frame
        bar = self.view.points(np.array([(left, top), (right, top), (left, self.scene.level)]))
        row = int(np.clip(np.floor(bar[0, 1]), -1, self.view.rows))
        begin, end = (int(np.clip(np.floor(x), 0, self.view.columns - 1)) for x in bar[:2, 0])
        self._corners()
        self._across(row, slice(begin, end + 1), "=", Ink.RACK)
        self._across(int(np.clip(np.floor(bar[2, 1]), -1, self.view.rows)), slice(None), "~", Ink.LEVEL)

    def _corners(self) -> None:
        """The corners of the rack, where nothing else is."""
        left, low, right, _ = self.scene.frame
        cells = self.view.points(np.array([(left, low), (right, low)]))
        cells = np.stack((np.floor(cells[0]), np.ceil(cells[1]) - 1))
        cells[:, 1] = cells[1, 1]
        for column, row in cells.clip(-1, 1e6).astype(int).tolist():
            if (
                0 <= column < self.view.columns
                and 0 <= row < self.view.rows
                and self.codes[row, column] == BLANK
            ):
                self.codes[row, column], self.inks[row, column] = ord("+"), Ink.FRAME

    def _across(self, row: int, columns: slice, letter: str, ink: Ink) -> None:
        if 0 <= row < self.view.rows:
            free = self.outlined[row, columns] == NOBODY
            self.codes[row, columns][free] = ord(letter)
            self.inks[row, columns][free] = ink

    def _masks(self) -> None:
        """Stop-off hatched inside its part: x where it faces the viewer, / where not."""
        scene, view = self.scene, self.view
        if not len(scene.zones):
            return
        edges = view.edges(scene.zones, 1, 1)
        order = np.argsort(scene.zone_seen, kind="stable").astype(np.int32)  # what is seen lies on top
        ranks = np.argsort(order).astype(np.int32)[scene.zone_ids]
        drawn = np.argsort(ranks, kind="stable")
        _, touched = raster.outline(edges[drawn], ranks[drawn], view.columns, view.rows, 1, 1)
        inside = raster.fill(edges, ranks, view.columns, view.rows)
        ids = np.append(order, np.int32(NOBODY))[np.where(inside != NOBODY, inside, touched)]
        within = np.append(scene.zone_owner, np.int32(NOBODY))[ids]
        upper, lower = self.filled[::2], self.filled[1::2]
        plug = (inside != NOBODY) & (upper == NOBODY) & (lower == NOBODY)  # in an opening
        mine = (upper == within) | (lower == within) | plug
        hatched = (ids != NOBODY) & mine & (self.outlined == NOBODY)
        seen = np.append(scene.zone_seen, np.bool_(False))[ids]
        self.codes[hatched] = np.where(seen, _HATCH_SEEN, _HATCH_HIDDEN)[hatched]
        self.inks[hatched] = Ink.MASKED
        self._stopped = np.where(hatched, within, NOBODY)

    def _mark_small(self) -> None:
        """One mark for each zone of parts that show none yet: in the middle of its edges, or beside the number."""
        scene = self.scene
        if not len(scene.zones):
            return
        shown = np.zeros(len(scene.parts) + 1, dtype=bool)
        shown[self._stopped[self.inks == Ink.MASKED]] = True
        zones = np.flatnonzero(~shown[scene.zone_owner])
        sums = [np.bincount(scene.zone_ids, values) for values in scene.zones[:, :2].T]
        middle = np.column_stack(sums) / np.bincount(scene.zone_ids)[:, None]
        column, row = np.floor(self.view.points(middle[zones])).astype(np.int64).T
        on = (column >= 0) & (column < self.view.columns) & (row >= 0) & (row < self.view.rows)
        zones, column, row = zones[on], column[on], row[on]
        right = np.clip(self._boxes[scene.zone_owner[zones], 2], 0, self.view.columns - 1)
        column = np.where(self._taken[row, column], right, column)
        self.codes[row, column] = np.where(scene.zone_seen[zones], _HATCH_SEEN, _HATCH_HIDDEN)
        self.inks[row, column] = Ink.MASKED

    def _tips(self) -> None:
        """Free tips, and where parts are held if there is room beside their outline."""
        scene = self.scene
        for points, letter in ((scene.contacts, _CONTACT), (scene.tips[~scene.tip_taken], _TIP_FREE)):
            cells = np.floor(self.view.points(points)).astype(np.int64)
            x, y = cells[((cells >= 0) & (cells < (self.view.columns, self.view.rows))).all(axis=1)].T
            free = self.outlined[y, x] == NOBODY
            self.codes[y[free], x[free]] = letter
            self.inks[y[free], x[free]] = Ink.TIP

    def _label(self, hung: Hung, width: int) -> str:
        """What fits on a part so many cells wide: the number may touch its outline, more may not."""
        if width < LEAST_WIDE:
            return ""
        fits = [text for text in hung.labels if len(text) <= width - 2]
        return fits[0] if fits else hung.labels[-1] if len(hung.labels[-1]) < width else ""

    def _numbers(self) -> None:
        """Numbers on the parts; what hangs behind another is named there."""
        for owner in self._order.tolist():
            hung = self.scene.parts[owner]
            if hung.twin is not None and hung.side == "back":
                continue
            left, top, right, bottom = self.box_of(owner)
            label = self._label(hung, right - left + 1)
            row, column = (top + bottom) // 2, left + (right - left + 1 - len(label)) // 2
            if label and 0 <= row < self.view.rows and 0 <= column <= self.view.columns - len(label):
                self._text(column, row, label, Ink.NUMBER)

    def _notes(self) -> None:
        """Names of level and bar, what is not drawn, and what the marks mean."""
        scene, rows = self.scene, self.view.rows
        for y, label, ink in ((scene.level, LEVEL_LABEL, Ink.LEVEL), (0.0, BAR_LABEL, Ink.RACK)):
            row = int(np.clip(np.floor(self.view.points(np.array([(0.0, y)]))[0, 1]), -1, rows))
            if 0 <= row < rows and self.view.columns > 2 * len(label):
                self._text(self._gap(row, f" {label} "), row, f" {label} ", ink)
        first = min(2, max(rows - 1, 0))
        for row, said in enumerate(scene.aside[: rows - first], first):
            line = _narrow(plain(said) if self.ascii_only else said)
            self._text(1 if self.view.columns > len(line) else 0, row, line, Ink.NOTE)
        if rows >= _KEY_ROWS:
            shown = self._marks()
            lines = [f"{mark} {text}" for mark, text in _KEY.items() if mark in shown]
            for row, line in zip(range(rows - len(lines), rows), lines, strict=True):
                if (self.codes[row, 1 : len(line) + 2] == BLANK).all():
                    self._text(1, row, line, Ink.NOTE)

        if self.scale is not None:
            self._scale(*self.scale)

    def _scale(self, cells: int, said: str) -> None:
        """The bar of the scale in the last row at the right, where nothing else is."""
        text = f"|{'-' * max(cells - 2, 0)}| {_narrow(plain(said) if self.ascii_only else said)}"
        row, column = self.view.rows - 1, self.view.columns - len(text) - 1
        if row > _KEY_ROWS and column > 0 and (self.codes[row, column - 1 :] == BLANK).all():
            self._text(column, row, text, Ink.NOTE)

    def _marks(self) -> set[str]:
        """The marks of the key that stand in the picture."""
        marked = np.isin(self.inks, (Ink.MASKED, Ink.TIP, Ink.DRY, Ink.FRAME))
        found = {chr(code) for code in np.unique(self.codes[marked])} - {"b", "!"}
        found |= {"b"} if any(hung.side == "back" for hung in self.scene.parts) else set()
        return found | ({"!"} if any(hung.close for hung in self.scene.parts) else set())

    def _gap(self, row: int, text: str) -> int:
        """The first column from which a text covers no part, else the first."""
        busy = np.concatenate(([0], np.cumsum((self.outlined[row] != NOBODY) | self._taken[row])))
        free = np.flatnonzero(busy[len(text) :] == busy[: -len(text)])
        return int(free[min(1, len(free) - 1)]) if len(free) else 0

    def _text(self, column: int, row: int, text: str, ink: Ink) -> None:
        _write(self.codes, self.inks, column, row, text, ink)
        self._taken[row, column : column + len(text)] = True


def _ink_of(hung: Hung) -> Ink:
    if hung.close:
        return Ink.CLOSE
    return Ink.DRY if hung.wetness == "dry" else Ink.BACK if hung.side == "back" else Ink.PART


def _narrow(text: str) -> str:
    """Text in which every character takes one cell: what somebody typed may not shift the picture."""
    wide = {
        letter
        for letter in text
        if not letter.isprintable() or combining(letter) or east_asian_width(letter) in "WF"
    }
    return "".join("?" if letter in wide else letter for letter in text)


def _write(codes: Codes, inks: Inks, column: int, row: int, text: str, ink: Ink) -> None:
    letters = np.frombuffer(text.encode("utf-32-le"), dtype="<u4")[: codes.shape[1] - column]
    codes[row, column : column + len(letters)] = letters
    inks[row, column : column + len(letters)] = ink
