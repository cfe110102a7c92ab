"""The rack picture: parts to scale, one of them selected."""

from collections.abc import Callable, Iterable
from dataclasses import dataclass, replace
from typing import ClassVar

import numpy as np
from rich.segment import Segment
from rich.style import Style as RichStyle
from textual import events
from textual.binding import Binding, BindingType
from textual.geometry import Region
from textual.strip import Strip
from textual.widget import Widget

from lineplanner.report.picture import Direction, Scene
from lineplanner.tui.widgets.rack_cells import BLANK, Cells, Ink
from lineplanner.tui.widgets.raster import ACROSS, Codes, Indices, View, text_of

_CLASSES = [f"rack-canvas--{ink.name.lower().replace('_', '-')}" for ink in Ink]  # in the order of inks

Point = tuple[float, float]
Pick = Callable[[int | None], object]


@dataclass(slots=True)
class _Drag:
    """What the mouse holds: a part or nothing, where it took it, and the picture from before."""

    owner: int | None
    start: Point
    scene: Scene
    moved: bool = False


class RackCanvas(Widget, can_focus=True):
    """Draws a scene and lets a part be picked by arrows, n, N or mouse.

    on_pick is called with the owner, in the handler of the key or click that picked it.
    """

    ALLOW_SELECT = False
    COMPONENT_CLASSES: ClassVar[set[str]] = set(_CLASSES)
    DEFAULT_CSS = """
    RackCanvas {
        width: 1fr;
        height: 1fr;
        min-height: 3;
        & > .rack-canvas--rack { color: $foreground-muted; }
        & > .rack-canvas--frame { color: $foreground-muted; }
        & > .rack-canvas--level { color: $secondary; }
        & > .rack-canvas--part { color: $foreground; }
        & > .rack-canvas--dry { color: $warning; }
        & > .rack-canvas--back { color: $foreground-muted; }
        & > .rack-canvas--masked { color: $warning; }
        & > .rack-canvas--tip { color: $foreground-muted; }
        & > .rack-canvas--number { color: $foreground; }
        & > .rack-canvas--note { color: $foreground-muted; }
        & > .rack-canvas--close { color: $error; text-style: bold; }
        & > .rack-canvas--selected { color: $accent; text-style: bold; }
        & > .rack-canvas--selected-number { color: $accent; text-style: bold reverse; }
    }
    """
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("left", "toward('left')", "part to the left", show=False, id="rack.left"),
        Binding("right", "toward('right')", "part to the right", show=False, id="rack.right"),
        Binding("up", "toward('up')", "part above", show=False, id="rack.up"),
        Binding("down", "toward('down')", "part below", show=False, id="rack.down"),
        *(
            Binding(
                f"shift+{way}", f"toward('{way}', 10)", f"ten steps {way}", show=False, id=f"rack.far-{way}"
            )
            for way in ("left", "right", "up", "down")
        ),
        Binding("n", "next", "next part", id="rack.next"),
        Binding("greater_than_sign", "zoom(1.5)", "nearer", show=False, id="rack.nearer"),
        Binding("less_than_sign", "zoom(0.6667)", "farther", show=False, id="rack.farther"),
        Binding("g", "fit", "the whole rack", show=False, id="rack.fit"),
        *(
            Binding(f"ctrl+{way}", f"pan({x}, {y})", f"look {way}", show=False, id=f"rack.look-{way}")
            for way, x, y in (("left", -8, 0), ("right", 8, 0), ("up", 0, -4), ("down", 0, 4))
        ),
        Binding("N", "previous", "previous part", show=False, id="rack.previous"),
    ]

    def __init__(
        self,
        on_pick: Pick | None = None,
        *,
        ascii_only: bool = False,
        name: str | None = None,
        id: str | None = None,  # noqa: A002 - Textual's own word
        classes: str | None = None,
    ) -> None:
        super().__init__(name=name, id=id, classes=classes)
        self.on_pick = on_pick
        self.ascii_only = ascii_only
        self.scene: Scene | None = None
        self.selected: int | None = None
        self.marked: frozenset[int] = frozenset()
        self.carry: Callable[[Direction, int], object] | None = (
            None  # arrows go there while parts are carried
        )
        # While parts are carried: where the mouse lets go of them, and the corners of a field it draws.
        self.drop: Callable[[Point], object] | None = None
        self.field: Callable[[Point, Point], object] | None = None
        self._drag: _Drag | None = None
        # From the width of a cell and the most cells: a bar of the scale, and its text.
        self.scaled: Callable[[float, int], tuple[int, str]] | None = None
        self._view: View | None = None  # None: fitted
        self._cells: Cells | None = None
        self._codes: Codes = np.empty((0, 0), dtype=np.uint32)
        self._inks: Indices = np.empty((0, 0), dtype=np.int32)
        self._strips: list[Strip | None] = []
        self._styled: tuple[list[RichStyle], Indices] | None = None
        self._marked: tuple[int, int, int, int] | None = None

    # --- what is shown -----------------------------------------------------------------------------------

    def show(self, scene: Scene | None, selected: int | None = None, marked: Iterable[int] = ()) -> None:
        """Another scene, with these parts of it selected and marked; the view stays if the extent is the same."""
        if scene is None or self.scene is None or scene.extent != self.scene.extent:
            self._view = None
        self.scene = scene
        self.selected, self.marked = self._known(selected), frozenset(marked)
        before = None if self._cells is None else (self._codes, self._inks)
        self._forget()
        if before is None or self._built() is None:
            self.refresh()
        else:
            self._refresh_changed(*before)

    def select(self, owner: int | None, marked: Iterable[int] | None = None) -> None:
        """Select a part, and mark others, without telling on_pick; repaints the cells of those concerned only."""
        owner = self._known(owner)
        marks = self.marked if marked is None else frozenset(marked)
        if owner == self.selected and marks == self.marked:
            return
        self.selected, self.marked = owner, marks
        if self._cells is None:
            self.refresh()
            return
        before = self._marked
        self._mark()
        touched = [box for box in (before, self._marked) if box is not None]
        for _, top, _, bottom in touched:
            self._strips[top:bottom] = [None] * (bottom - top)
        regions = [Region.from_corners(*box) for box in touched]
        if len(regions) == 2 and regions[0].y < regions[1].bottom and regions[1].y < regions[0].bottom:
            regions = [regions[0].union(regions[1])]  # a row is sent from its start: once, not twice
        if regions:
            self.refresh(*regions)

    def next(self) -> None:
        """Pick the part after the selected one; after the last comes the first."""
        self._step(1)

    def previous(self) -> None:
        """Pick the part before the selected one."""
        self._step(-1)

    def toward(self, direction: Direction) -> None:
        """Pick the neighbour in a direction, if there is one."""
        found = None if self.scene is None else self.scene.neighbour(self.selected, direction)
        if found is not None:
            self.pick(found)

    def pick(self, owner: int | None) -> None:
        """Select a part and tell on_pick at once."""
        self.select(owner)
        if self.on_pick is not None:
            self.on_pick(self.selected)

    def owner_at(self, column: float, row: float) -> int | None:
        """The part under a cell of the canvas, or a part of a cell; on the selected one what hangs behind it."""
        cells = self._built()
        found = None if cells is None else cells.owner_at(column, row)
        if found is not None and found == self.selected and self.scene is not None:
            twin = self.scene.parts[found].twin
            return found if twin is None else twin
        return found

    def fit(self) -> None:
        """Show all of the scene."""
        self._look(None)

    def zoom(self, factor: float) -> None:
        """Nearer or farther, about the selected part if there is one."""
        if self.scene is not None and self._built() is not None:
            about = None if self.selected is None else self.scene.parts[self.selected].centre
            self._look(self._seen().zoomed(factor, about))

    def pan(self, columns: float, rows: float) -> None:
        """Move the window over the scene by cells."""
        if self.scene is not None and self._built() is not None:
            self._look(self._seen().panned(columns, rows))

    # --- events ------------------------------------------------------------------------------------------

    def action_toward(self, direction: Direction, steps: int = 1) -> None:
        if self.carry is not None:
            self.carry(direction, steps)
        else:
            self.toward(direction)

    def action_zoom(self, factor: float) -> None:
        self.zoom(factor)

    def action_fit(self) -> None:
        self.fit()

    def action_pan(self, columns: int, rows: int) -> None:
        self.pan(columns, rows)

    def action_next(self) -> None:
        self.next()

    def action_previous(self) -> None:
        self.previous()

    def on_mouse_down(self, event: events.MouseDown) -> None:
        """Pick what is under the pointer; an empty place changes nothing."""
        found = self.owner_at(*self._cell(event))
        if found is not None:
            event.stop()
            self.pick(found)
        if self.carry is not None and self.scene is not None and self._built() is not None:
            event.stop()
            self._drag = _Drag(found, self._place(event), self.scene)
            self.capture_mouse()

    def on_mouse_move(self, event: events.MouseMove) -> None:
        """A part that is dragged is seen where it is."""
        if self._drag is None or self._drag.owner is None:
            return
        event.stop()
        self._drag.moved = True
        across, up = (to - at for to, at in zip(self._place(event), self._drag.start, strict=True))
        seen = replace(self._drag.scene.moved(self._drag.owner, across, up), extent=self._drag.scene.extent)
        self.show(seen, self.selected, self.marked)

    def on_mouse_up(self, event: events.MouseUp) -> None:
        """Let go of a part where the mouse is, or of the corner of a field."""
        drag = self._let_go()
        if drag is None:
            return
        event.stop()
        (x, y), (start_x, start_y) = self._place(event), drag.start
        if drag.owner is None:
            if self.field is not None and (x, y) != drag.start:
                self.field((start_x, -start_y), (x, -y))
        elif drag.moved and self.drop is not None:
            at = drag.scene.parts[drag.owner].at
            self.drop((at[0] + x - start_x, -(at[1] + y - start_y)))

    def on_mouse_capture_lost(self) -> None:
        self._let_go()

    def _let_go(self) -> "_Drag | None":
        """End a drag: the part is drawn again where it hangs."""
        drag, self._drag = self._drag, None
        if drag is not None:
            self.release_mouse()
            if drag.moved:
                self.show(drag.scene, self.selected, self.marked)
        return drag

    def _cell(self, event: events.MouseEvent) -> tuple[float, float]:
        return event.pointer_x - self.gutter.left, event.pointer_y - self.gutter.top

    def _place(self, event: events.MouseEvent) -> "Point":
        """The place of the picture under the pointer."""
        return self._seen().place(*self._cell(event))

    def on_resize(self) -> None:
        self._forget()

    def notify_style_update(self) -> None:
        """A theme change: the same cells in other colours."""
        super().notify_style_update()
        self._strips, self._styled = [None] * len(self._strips), None

    def render_line(self, y: int) -> Strip:
        """One line of the picture, kept until it changes."""
        if self._built() is None or y >= len(self._strips):
            return Strip.blank(self.size.width, self.rich_style)
        strip = self._strips[y]
        if strip is None:
            strip = self._strips[y] = self._strip(y)
        return strip

    # --- inside ------------------------------------------------------------------------------------------

    def _known(self, owner: int | None) -> int | None:
        count = 0 if self.scene is None else len(self.scene.parts)
        return owner if owner is not None and 0 <= owner < count else None

    def _step(self, by: int) -> None:
        count = 0 if self.scene is None else len(self.scene.parts)
        if count:
            first = 0 if by > 0 else count - 1
            self.pick(first if self.selected is None else (self.selected + by) % count)

    def _look(self, view: View | None) -> None:
        self._view = view
        self._forget()
        self.refresh()

    def _forget(self) -> None:
        self._cells, self._marked, self._strips = None, None, []

    def _seen(self) -> View:
        """The view of the present size."""
        assert self.scene is not None
        width, height = self.size
        if self._view is None:
            return View.fitted(self.scene.extent, width, height)
        return View(width, height, self._view.x, self._view.y, self._view.scale)

    def _built(self) -> Cells | None:
        """The cells of scene and size, drawn if they are not yet."""
        if self._cells is None and self.scene is not None and self.size.area:
            view = self._seen()
            bar = None if self.scaled is None else self.scaled(ACROSS / view.scale, view.columns // 5)
            self._cells = Cells(self.scene, view, ascii_only=self.ascii_only, scale=bar)
            self._strips = [None] * self.size.height
            self._mark()
        return self._cells

    def _refresh_changed(self, codes: Codes, inks: Indices) -> None:
        """Repaint the cells that are others than before: rows that follow each other as one region."""
        if codes.shape != self._codes.shape:
            self.refresh()
            return
        other = (codes != self._codes) | (inks != self._inks)
        rows = np.flatnonzero(other.any(axis=1))
        for run in np.split(rows, np.flatnonzero(np.diff(rows) > 1) + 1) if len(rows) else ():
            columns = np.flatnonzero(other[run].any(axis=0))
            box = (int(columns[0]), int(run[0]), int(columns[-1]) + 1, int(run[-1]) + 1)
            self.refresh(Region.from_corners(*box))

    def _mark(self) -> None:
        assert self._cells is not None
        self._codes, inks, self._marked = self._cells.with_selected(self.selected, self.marked)
        self._inks = _joined_blanks(self._codes, inks.astype(np.int32))

    def _strip(self, y: int) -> Strip:
        """A row as runs of one ink."""
        styles, same = self._styles()
        codes, inks = self._codes[y], same[self._inks[y]]
        ends = [*(np.flatnonzero(np.diff(inks)) + 1).tolist(), len(inks)]
        starts = [0, *ends[:-1]]
        text = text_of(codes)
        runs = [
            Segment(text[a:b], styles[ink])
            for a, b, ink in zip(starts, ends, inks[starts].tolist(), strict=True)
        ]
        return Strip(runs, len(inks))

    def _styles(self) -> tuple[list[RichStyle], Indices]:
        """The style of each ink, and of each ink the first that looks the same: fewer runs, fewer bytes."""
        if self._styled is None:
            styles = [self.get_component_rich_style(name) for name in _CLASSES]
            self._styled = styles, np.array([styles.index(style) for style in styles], dtype=np.int32)
        return self._styled


def _joined_blanks(codes: Codes, inks: Indices) -> Indices:
    """Inks with blank cells in the ink before them, so that a row has fewer runs; never in a reversed one."""
    columns = np.arange(codes.shape[1])
    before = np.maximum.accumulate(np.where(codes == BLANK, 0, columns), axis=1)
    joined = np.take_along_axis(inks, before, axis=1)
    return np.where((joined == Ink.SELECTED_NUMBER) & (codes == BLANK), inks, joined)
