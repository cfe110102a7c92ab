"""The files of the site as a stock: found by any text in them, copied, renamed, taken out if nothing uses them."""

from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path as DiskPath
from typing import TYPE_CHECKING

from lineplanner.errors import InputError
from lineplanner.files.checking import references
from lineplanner.files.problems import FilesError
from lineplanner.tui.edited import Ref

if TYPE_CHECKING:
    from lineplanner.tui.session import Session

KINDS = ("part", "rack", "recipe", "material", "bath", "line", "load")


@dataclass(frozen=True, slots=True)
class Filed:
    """A file of the site: what it is called, all that it is found by, what uses it; unread if it cannot be read."""

    ref: Ref
    name: str
    found_by: str
    users: tuple[Ref, ...] = ()
    unread: bool = False


def stock(session: "Session") -> list[Filed]:
    """Every file of the site by kind and name, as edited."""
    found: dict[Ref, tuple[str, str, bool]] = {}
    users: dict[Ref, list[Ref]] = {}
    for kind in KINDS:
        for stem in session.names(kind):
            ref = (kind, stem)
            try:
                entry = session.library.entry(kind, stem)
            except FilesError:
                found[ref] = ("cannot be read", stem, True)
                continue
            found[ref] = (entry.record.name, f"{stem} {entry.record.name} {entry.document.text}", False)
            for _, used_kind, used in references(entry.record):
                users.setdefault((used_kind, used), []).append(ref)
    return [
        Filed(ref, name, f"{ref[0]} {text}".casefold(), tuple(dict.fromkeys(users.get(ref, ()))), unread)
        for ref, (name, text, unread) in found.items()
    ]


def copied(session: "Session", ref: Ref, stem: str) -> DiskPath:
    """A copy of a file, as edited, under another name. Raises FilesError for a name that is none or is taken."""
    return session.create(ref[0], stem, session.text_to_file(ref))


def take_out(session: "Session", ref: Ref) -> DiskPath:
    """Take a file out of the site; it stays beside the others under a hidden name, which is returned.

    Raises InputError where something uses it, it is open, or it holds changes.
    """
    _free(session, ref)
    return session.hide(ref)


def renamed(session: "Session", ref: Ref, stem: str) -> DiskPath:
    """A file under another name. Raises InputError where something uses it under the old one."""
    _free(session, ref)
    path = copied(session, ref, stem)
    session.hide(ref)
    return path


def _free(session: "Session", ref: Ref) -> None:
    users = next((one.users for one in stock(session) if one.ref == ref), ())
    if users:
        raise InputError("stock.used", file=ref[1], users=", ".join(_said(users)))
    if session.name and ref in session.refs():
        raise InputError("stock.open", file=ref[1], load=session.name)
    if ref in session.dirty:
        raise InputError("stock.changed", file=ref[1])


def _said(users: tuple[Ref, ...]) -> Iterator[str]:
    for kind, stem in users[:5]:
        yield f"{kind} {stem}"
    if len(users) > 5:
        yield f"{len(users) - 5} more"
