"""Rows, tables and lines in pieces: the shapes in which a report hands its texts to a screen."""

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Piece:
    """A stretch of a line; path is the figure it prints, None for blanks and words."""

    text: str
    path: str | None = None


Line = tuple[Piece, ...]


@dataclass(frozen=True, slots=True)
class Row:
    """One row of a view: its cells, the figure that it is about, a word for its colour, the figure of each cell."""

    cells: tuple[str, ...]
    path: str | None = None
    mark: str = ""
    paths: tuple[str | None, ...] = ()

    def path_at(self, column: int) -> str | None:
        """The figure of a cell, else that of the row."""
        return (self.paths[column] if column < len(self.paths) else None) or self.path


@dataclass(frozen=True, slots=True)
class Table:
    """Rows under headings; `right` are the columns set flush right."""

    columns: tuple[str, ...]
    right: frozenset[int]
    rows: tuple[Row, ...]


@dataclass(frozen=True, slots=True)
class Head:
    """What is always in sight of a load: what to set, whether it may run, what can hurt."""

    setpoints: tuple[Line, ...]
    verdict: Piece
    level: str
    caution: str
    caution_word: str


@dataclass(frozen=True, slots=True)
class Listed:
    """A load in the list: its cells, what it is found by, its whole verdict and gravest caution."""

    stem: str
    cells: tuple[str, ...]
    level: str = ""
    found_by: str = ""
    verdict: str = ""
    caution: str = ""


COLUMNS = ("load", "recipe", "tank", "SET", "total", "verdict")
RIGHT = frozenset({3, 4})


def waiting(stem: str) -> Listed:
    """A load of which nothing is known yet."""
    return Listed(stem, (stem, "", "", "", "", "..."), found_by=stem)
