"""Lines and areas as dots and cells of a terminal. All numbers here are without dimension.

A cell is two dots across and four down (braille), and twice as high as wide, so a dot is square. Dots count
from the top left; a picture's y counts upwards. Edges are x, y to x, y: shape (n, 4).
"""

from dataclasses import dataclass, replace

import numpy as np
from numpy.typing import NDArray

Array = NDArray[np.float64]
Indices = NDArray[np.int32]
Flags = NDArray[np.bool_]
Codes = NDArray[np.uint32]
Box = tuple[float, float, float, float]

ACROSS, DOWN = 2, 4
NOBODY = -1
BRAILLE = 0x2800
_BITS = ((0, 3), (1, 4), (2, 5), (6, 7))  # of a dot by row and column in its cell (Unicode, braille patterns)
_DEEPEST, _FARTHEST = 1e9, 1e-9  # dots per unit: no zoom goes beyond


@dataclass(frozen=True, slots=True)
class View:
    """What of a picture shows in a window of cells: the place in its middle, and dots per unit."""

    columns: int
    rows: int
    x: float
    y: float
    scale: float

    @classmethod
    def fitted(cls, box: Box, columns: int, rows: int) -> "View":
        """All of a box (left, low, right, high), as large as it goes; half a dot is left free all around."""
        width, height = max(box[2] - box[0], 1e-12), max(box[3] - box[1], 1e-12)
        scale = min((ACROSS * columns - 1) / width, (DOWN * rows - 1) / height)
        return cls(columns, rows, (box[0] + box[2]) / 2, (box[1] + box[3]) / 2, max(scale, 1e-12))

    def zoomed(self, factor: float, about: tuple[float, float] | None = None) -> "View":
        """Nearer (factor over 1) or farther; the place `about` keeps its cell."""
        scale = min(max(self.scale * factor, _FARTHEST), _DEEPEST)
        x, y = about if about is not None else (self.x, self.y)
        keep = self.scale / scale
        return replace(self, x=x + (self.x - x) * keep, y=y + (self.y - y) * keep, scale=scale)

    def panned(self, columns: float, rows: float) -> "View":
        """The window moved over the picture by cells, right and down."""
        x, y = self.x + columns * ACROSS / self.scale, self.y - rows * DOWN / self.scale
        return replace(self, x=x, y=y)

    def edges(self, edges: Array, across: int = ACROSS, down: int = DOWN) -> Array:
        """Edges in dots of a grid with so many to a cell."""
        return self.points(edges.reshape(-1, 2), across, down).reshape(-1, 4)

    def points(self, points: Array, across: int = 1, down: int = 1) -> Array:
        """Points (n, 2) in dots of a grid with so many to a cell; cells if not told otherwise."""
        x = (points[:, 0] - self.x) * (self.scale / ACROSS) + self.columns / 2
        y = (self.y - points[:, 1]) * (self.scale / DOWN) + self.rows / 2
        return np.column_stack((x * across, y * down))

    def place(self, column: float, row: float) -> tuple[float, float]:
        """The place of the picture under a cell or a part of one."""
        x = self.x + (column - self.columns / 2) * ACROSS / self.scale
        return x, self.y - (row - self.rows / 2) * DOWN / self.scale


def outline(
    edges: Array, owners: Indices, columns: int, rows: int, across: int = ACROSS, down: int = DOWN
) -> tuple[Flags, Indices]:
    """The dots that edges pass, and of each cell whose edge passed it last; edges are in dots."""
    width, height = columns * across, rows * down
    dots = np.zeros((height, width), dtype=bool)
    owned = np.full((rows, columns), NOBODY, dtype=np.int32)
    (x0, y0, x1, y1), kept = _clipped(edges, width, height)
    # Steps of less than a dot: a step of just one would leave out a dot where rounding takes it back.
    counts = np.maximum(np.abs(x1 - x0), np.abs(y1 - y0)).astype(np.int64) + 2
    counts[(np.floor(x0) == np.floor(x1)) & (np.floor(y0) == np.floor(y1))] = 1
    which = np.repeat(np.arange(len(kept)), counts)
    share = np.arange(len(which)) - np.repeat(np.cumsum(counts) - counts, counts)
    share = share / np.maximum(counts - 1, 1)[which]
    x = np.clip((x0[which] + share * (x1 - x0)[which]).astype(np.int64), 0, width - 1)
    y = np.clip((y0[which] + share * (y1 - y0)[which]).astype(np.int64), 0, height - 1)
    dots[y, x] = True
    owned[y // down, x // across] = owners[kept][which]
    return dots, owned


def fill(edges: Array, owners: Indices, width: int, height: int) -> Indices:
    """Whose area each dot's middle lies in, by even-odd; the largest owner where several do. Edges in dots."""
    owned = np.full((height, width), NOBODY, dtype=np.int32)
    x0, y0, x1, y1 = edges.T
    first = np.clip(np.ceil(np.minimum(y0, y1) - 0.5), 0, height).astype(np.int64)
    last = np.clip(np.ceil(np.maximum(y0, y1) - 0.5), 0, height).astype(np.int64)
    counts = last - first
    which = np.repeat(np.arange(len(edges)), counts)
    row = np.arange(len(which)) - np.repeat(np.cumsum(counts) - counts, counts) + first[which]
    share = (row + 0.5 - y0[which]) / (y1 - y0)[which]
    x = x0[which] + share * (x1 - x0)[which]
    owner = owners[which]
    order = np.lexsort((x, row, owner))
    x, row, owner = x[order], row[order][0::2], owner[order][0::2]
    begin = np.clip(np.ceil(x[0::2] - 0.5), 0, width).astype(np.int64)
    length = np.clip(np.ceil(x[1::2] - 0.5), 0, width).astype(np.int64) - begin
    span = np.repeat(np.arange(len(begin)), length)
    across = np.arange(len(span)) - np.repeat(np.cumsum(length) - length, length) + begin[span]
    owned[row[span], across] = owner[span]
    return owned


def packed(dots: Flags) -> Codes:
    """Dots as braille characters, blank cells as spaces: code points of shape (rows, columns)."""
    lit = dots.view(np.uint8)
    bits = np.zeros((dots.shape[0] // DOWN, dots.shape[1] // ACROSS), dtype=np.uint8)
    for down in range(DOWN):
        for across in range(ACROSS):
            bits |= lit[down::DOWN, across::ACROSS] << _BITS[down][across]
    return np.where(bits > 0, np.uint32(BRAILLE) + bits, np.uint32(ord(" "))).astype(np.uint32)


def text_of(codes: Codes) -> str:
    """Code points as text."""
    return codes.astype("<u4").tobytes().decode("utf-32-le")


def _clipped(edges: Array, width: float, height: float) -> tuple[Array, NDArray[np.int64]]:
    """What of edges lies in the window (Liang and Barsky), as columns (4, n), and which edges these are."""
    columns = np.ascontiguousarray(edges.T)
    if not len(edges) or (
        columns.min() >= 0.0 and columns[::2].max() <= width and columns[1::2].max() <= height
    ):
        return columns, np.arange(len(edges))
    start, span = edges[:, :2], edges[:, 2:] - edges[:, :2]
    enter, leave = np.zeros(len(edges)), np.ones(len(edges))
    for axis, size in ((0, width), (1, height)):
        for along, room in ((-span[:, axis], start[:, axis]), (span[:, axis], size - start[:, axis])):
            still = along == 0.0
            at = room / np.where(still, 1.0, along)
            enter = np.where(along < 0.0, np.maximum(enter, at), enter)
            leave = np.where(along > 0.0, np.minimum(leave, at), leave)
            leave = np.where(still & (room < 0.0), -1.0, leave)
    kept = np.flatnonzero(enter <= leave)
    ends = [start[kept] + t[kept, None] * span[kept] for t in (enter, leave)]
    return np.ascontiguousarray(np.hstack(ends).T), kept
