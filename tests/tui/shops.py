"""A shop to work in: the demo shop copied to a folder of the test, and a session on it."""

import shutil
from collections.abc import Iterator
from pathlib import Path
from typing import Any

from lineplanner.files.library import Library
from lineplanner.inputs.declared import Path as FieldPath
from lineplanner.inputs.declared import Shape, declared, described, shape_of
from lineplanner.report.style import Style
from lineplanner.tui.places import Place, place_of
from lineplanner.tui.session import Session

CHECKOUT = Path(__file__).parents[2]
LOAD = ("load", "valve-blocks-24")
RECIPE = ("recipe", "hardcoat-50-6061")
RACK = ("rack", "spline-24")
TIPS = "A1-A4, B1-B4, C1-C4, D1-D4, E1-E4, F1-F4"


def make_shop(folder: Path) -> Path:
    """The demo shop in a folder."""
    for name in ("configs", "rack_library"):
        shutil.copytree(CHECKOUT / name, folder / "shop" / name)
    return folder / "shop"


def session_on(shop: Path, memory: Path | None = None, load: str | None = LOAD[1]) -> Session:
    """A session on a shop with a load open."""
    session = Session(Library(shop), style=Style(), memory=memory)
    if load:
        session.open(load)
    return session


def content(folder: Path) -> dict[str, bytes]:
    """Every file of a folder with its bytes."""
    return {
        path.relative_to(folder).as_posix(): path.read_bytes()
        for path in sorted(folder.rglob("*"))
        if path.is_file()
    }


def file_of(session: Session, ref: tuple[str, str]) -> Path:
    """The file of a record."""
    return session.library.stems(ref[0])[ref[1]]


def fields_of(record: Any) -> Iterator[tuple[FieldPath, Place]]:
    """Every field of a record that takes a text, also those that are left out; of lists the entries there are."""
    yield from _inside(record, place_of(type(record), ()), ())


def _inside(value: Any, place: Place, path: FieldPath) -> Iterator[tuple[FieldPath, Place]]:
    if place.is_setting:
        yield path, place
    if place.shape is Shape.RECORD and value is not None:
        for one in declared(place.type).values():
            yield from _inside(getattr(value, one.name), place.inside(one.name), (*path, one.name))
    elif place.shape is Shape.MANY and shape_of(described(shape_of(place.type)[1][0])[0])[0] is Shape.RECORD:
        for index, one in enumerate(value):
            yield from _inside(one, place.inside(index), (*path, index))
    elif place.shape is not Shape.RECORD:
        yield path, place
