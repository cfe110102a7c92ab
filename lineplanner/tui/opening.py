"""What the opening screen shows before there is a session: light to load, so that the list is there at once."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import asdict, dataclass, replace
from pathlib import Path as DiskPath
from typing import TYPE_CHECKING, Any

from lineplanner.files.folders import stems_of
from lineplanner.files.listing_memory import program_stamp, remember_rows, remembered_rows, site_stamp
from lineplanner.files.memory import remembered
from lineplanner.report.rows import COLUMNS, Listed
from lineplanner.report.style import Style

if TYPE_CHECKING:
    from lineplanner.files.library import Library
    from lineplanner.files.site import SiteFolder
    from lineplanner.tui.session import Session
    from lineplanner.units import System

SYSTEMS: tuple[System, ...] = ("metric", "us")
Known = dict[str, Mapping["System", Listed]]


@dataclass(frozen=True, slots=True)
class SiteFacts:
    """What the first frame says of a site besides its loads."""

    name: str
    units: System
    first_load: str | None = None


def facts_of(library: Library) -> SiteFacts:
    """The facts as the site's file gives them. Raises FilesError."""
    site = library.site()
    return SiteFacts(site.name, site.units, site.first_load)


class KeptRows:
    """The list kept between two runs: shown only if program, files and letters are the same to the byte.

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

    def take(self, site: SiteFolder, stamp: str | None) -> tuple[Known, SiteFacts | None]:
        """The rows and facts kept under a stamp; None where there are none."""
        if self._memory is None or stamp is None:
            return {}, None
        try:
            kept = remembered_rows(self._memory, site, stamp)
            facts = _facts(**kept["site"])
            found: Known = {
                stem: {system: _listed(stem, by_system[system]) for system in SYSTEMS}
                for stem, by_system in kept["loads"].items()
            }
        except (AttributeError, LookupError, TypeError, ValueError):
            return {}, None
        self._kept = (stamp, frozenset(found))
        return found, facts

    def keep(self, site: SiteFolder, stamp: str | None, rows: Known, facts: SiteFacts) -> None:
        """Keep rows worked out since a stamp was taken, if it holds still. What cannot be read is not kept."""
        read = {stem: one for stem, one in rows.items() if all(row.level != "unread" for row in one.values())}
        if self._memory is None or stamp is None or self._kept == (stamp, frozenset(read)):
            return
        if self.stamp(site) == stamp and program_stamp() == self._program:
            texts = {stem: {system: asdict(row) for system, row in one.items()} for stem, one in read.items()}
            remember_rows(self._memory, site, stamp, {"site": asdict(facts), "loads": texts})
            self._kept = (stamp, frozenset(read))


def _facts(name: Any, units: Any, first_load: Any) -> SiteFacts:
    """Facts out of their texts. Raises ValueError if they are none."""
    if not isinstance(name, str) or units not in SYSTEMS or not isinstance(first_load, str | None):
        raise ValueError(units)
    return SiteFacts(name, units, first_load)


def _listed(stem: str, texts: Mapping[str, Any]) -> Listed:
    """A row out of its texts. Raises TypeError or ValueError if they are none."""
    row = Listed(**{**texts, "cells": tuple(texts["cells"])})
    parts = (row.stem, row.level, row.found_by, row.verdict, row.caution, *row.cells)
    if row.stem != stem or len(row.cells) != len(COLUMNS) or not all(isinstance(one, str) for one in parts):
        raise ValueError(stem)
    return row


class Opening:
    """The site by name and its loads; `session` makes the session that takes over.

    units are those asked for, else those of the last run on this site, else the site's own. Raises FilesError
    where nothing is kept of the site and its own file cannot be read.
    """

    dirty = ()
    name = ""

    def __init__(
        self,
        place: SiteFolder,
        *,
        units: System | None = None,
        ascii_only: bool = False,
        memory: DiskPath | None,
    ) -> None:
        self.place, self.memory = place, memory
        self.kept = KeptRows(memory, ascii_only=ascii_only)
        self.stamp = self.kept.stamp(place)
        self.known, facts = self.kept.take(place, self.stamp)
        self.facts = facts or facts_of(self._library())
        self._last = {} if memory is None else remembered(memory, place)
        self.style = Style(units or self._last_units or self.facts.units, ascii_only)

    @property
    def _last_units(self) -> System | None:
        return next((one for one in SYSTEMS if one == self._last.get("units")), None)

    @property
    def site_name(self) -> str:
        return self.facts.name

    @property
    def packaged(self) -> bool:
        return self.place.packaged

    def loads(self) -> list[str]:
        return list(stems_of(self.place.path, "load"))

    @property
    def last_load(self) -> str | None:
        loads = self.loads()
        return next((one for one in (self._last.get("load"), self.facts.first_load) if one in loads), None)

    def toggle_units(self) -> None:
        self.style = replace(self.style, system="us" if self.style.system == "metric" else "metric")

    def session(self) -> Session:
        """The session; what it needs is loaded now."""
        from lineplanner.tui.session import Session

        return Session(self._library(), style=self.style, memory=self.memory)

    def _library(self) -> Library:
        from lineplanner.files.library import Library

        return Library(self.place)
