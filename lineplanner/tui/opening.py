"""What the opening screen shows before there is a session: light to load, so that the list is there at once."""

from __future__ import annotations

from dataclasses import replace
from pathlib import Path as DiskPath
from typing import TYPE_CHECKING

from lineplanner.files.library import Library
from lineplanner.files.memory import remembered
from lineplanner.report.style import Style

if TYPE_CHECKING:
    from lineplanner.tui.session import Session


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
        return next((one for one in said if one in self.loads()), None)

    def toggle_units(self) -> None:
        self.style = replace(self.style, system="us" if self.style.system == "metric" else "metric")

    def session(self) -> Session:
        """The session; what it needs is loaded now."""
        from lineplanner.tui.session import Session

        return Session(self.library, style=self.style, memory=self.memory)
