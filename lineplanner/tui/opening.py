"""What the opening screen shows before there is a session: light to load, so that the list is there at once."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import asdict, replace
from pathlib import Path as DiskPath
from typing import TYPE_CHECKING, Any

from lineplanner.files.library import Library
from lineplanner.files.listing_memory import program_stamp, remember_rows, remembered_rows, site_stamp
from lineplanner.files.memory import remembered
from lineplanner.files.site import SiteFolder
from lineplanner.report.rows import COLUMNS, Listed
from lineplanner.report.style import Style
from lineplanner.units import System

if TYPE_CHECKING:
    from lineplanner.tui.session import Session


SYSTEMS: tuple[System, ...] = ("metric", "us")
Known = dict[str, Mapping[System, Listed]]


class KeptRows:
    """Rows of the list kept between two runs: shown only if program, files and letters are the same to the byte.

    What counts is the program as it was at the start: one that is replaced while it runs keeps nothing.
    """

    def __init__(self, memory: DiskPath | None, *, ascii_only: bool) -> None:
        self._memory, self._letters = memory, "plain" if ascii_only else "signs"
        self._program = None if memory is None else program_stamp()
        self._kept: tuple[str, frozenset[str]] | None = None

    def stamp(self, site: SiteFolder) -> str | None:
        """What the rows of a site depend on, as it is now; None if nothing can be kept."""
        files = None if self._program is None else site_stamp(site)
        return None if files is None else f"{self._program} {files} {self._letters}"

    def rows(self, site: SiteFolder, stamp: str | None) -> Known:
        """The rows kept under a stamp."""
        if self._memory is None or stamp is None:
            return {}
        try:
            found: Known = {
                stem: {system: _listed(stem, by_system[system]) for system in SYSTEMS}
                for stem, by_system in remembered_rows(self._memory, site, stamp).items()
            }
        except (LookupError, TypeError, ValueError):
            return {}
        self._kept = (stamp, frozenset(found))
        return found

    def keep(self, site: SiteFolder, stamp: str | None, rows: Known) -> None:
        """Keep rows worked out since a stamp was taken, if it holds still. What cannot be read is not kept."""
        read = {stem: one for stem, one in rows.items() if all(row.level != "unread" for row in one.values())}
        if self._memory is None or stamp is None or self._kept == (stamp, frozenset(read)):
            return
        if self.stamp(site) == stamp and program_stamp() == self._program:
            texts = {stem: {system: asdict(row) for system, row in one.items()} for stem, one in read.items()}
            remember_rows(self._memory, site, stamp, texts)
            self._kept = (stamp, frozenset(read))


def _listed(stem: str, texts: Mapping[str, Any]) -> Listed:
    """A row out of its texts. Raises TypeError or ValueError if they are none."""
    row = Listed(**{**texts, "cells": tuple(texts["cells"])})
    parts = (row.stem, row.level, row.found_by, row.verdict, row.caution, *row.cells)
    if row.stem != stem or len(row.cells) != len(COLUMNS) or not all(isinstance(one, str) for one in parts):
        raise ValueError(stem)
    return row


class Opening:
    """The site by name and its loads; `session` makes the session that takes over."""

    dirty = ()
    name = ""

    def __init__(self, library: Library, *, style: Style, memory: DiskPath | None) -> None:
        self.library, self.style, self.memory = library, style, memory

    @property
    def site_name(self) -> str:
        return self.library.site().name

    @property
    def packaged(self) -> bool:
        return self.library.place.packaged

    def loads(self) -> list[str]:
        return list(self.library.stems("load"))

    @property
    def last_load(self) -> str | None:
        known = {} if self.memory is None else remembered(self.memory, self.library.place)
        said = (known.get("load"), self.library.site().first_load)
        loads = self.loads()
        return next((one for one in said if one in loads), None)

    def toggle_units(self) -> None:
        self.style = replace(self.style, system="us" if self.style.system == "metric" else "metric")

    def session(self) -> Session:
        """The session; what it needs is loaded now."""
        from lineplanner.tui.session import Session

        return Session(self.library, style=self.style, memory=self.memory)
