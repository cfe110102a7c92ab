"""A session: one person's work on the loads of a site, kept on disk when saved and in a journal until then."""

from collections import Counter
from collections.abc import Iterator
from contextlib import suppress
from dataclasses import replace
from datetime import date
from pathlib import Path as DiskPath

from lineplanner.errors import PlannerError
from lineplanner.files.library import Library
from lineplanner.files.memory import remember, remembered, site_key
from lineplanner.files.problems import FilesError
from lineplanner.files.site import SiteFolder
from lineplanner.files.writing import dump
from lineplanner.inputs.approval import approved
from lineplanner.inputs.load import Load
from lineplanner.inputs.load_rules import tanks_for
from lineplanner.racking import added
from lineplanner.report.style import Style
from lineplanner.tui.edited import Ref, redrafted
from lineplanner.tui.journal import Journal
from lineplanner.tui.recovery import Recovery, found_recovery, journal_line
from lineplanner.tui.workbench import Workbench


class Session(Workbench):
    """What the screens work on. Nothing of the site's files changes before `save`.

    memory is the folder for journal and memory; without one nothing is kept between runs.
    """

    def __init__(self, library: Library, *, style: Style, memory: DiskPath | None) -> None:
        super().__init__(library, style)
        self._memory = memory
        key = site_key(library.place)
        self._journal = Journal(memory, key)
        self.recovery: Recovery | None = found_recovery(memory, key)

    # --- the site ----------------------------------------------------------------------------------------

    @property
    def site_name(self) -> str:
        """What the site calls itself; the folder's name if that cannot be read."""
        try:
            return self.library.site().name
        except FilesError:
            return self.library.folder.name

    @property
    def packaged(self) -> bool:
        """Whether this is the demo shop out of the package; the first save makes the user's own of it."""
        return self.place.packaged

    @property
    def place(self) -> SiteFolder:
        """The site's folder."""
        return self._disk.library.place

    def names(self, kind: str) -> list[str]:
        """The names of the site's files of a kind: what a reference may say."""
        return list(self._disk.library.stems(kind))

    def loads(self) -> list[str]:
        """The names of the loads in order."""
        return self.names("load")

    @property
    def last_load(self) -> str | None:
        """The load worked on last; without one that which the site shows first."""
        known = self.loads()
        said = self._remembered("load")
        if said not in known:
            try:
                said = self.library.site().first_load
            except FilesError:
                said = None
        return said if said in known else None

    def toggle_units(self) -> None:
        """Metric in place of US units, or the other way; remembered for this site."""
        self.style = replace(self.style, system="us" if self.style.system == "metric" else "metric")
        self._remember(units=self.style.system)

    def open(self, stem: str) -> None:
        """Open a load, as edited or as it is on disk by now. Raises PlannerError if it cannot be planned."""
        super().open(stem)
        self._remember(load=stem)

    def approve(self, recipe: str, by: str, on: str | None = None) -> list[str]:
        """Approve a recipe as it stands; on is the day, today if not said. The problems if it is refused."""
        by = by.strip()
        if not by:
            return ["no name is given. Say who approves the recipe"]
        on = on or date.today().isoformat()  # noqa: DTZ011 - the day as the shop's calendar has it
        ref = ("recipe", recipe)
        record = approved(self.record(ref), by=by, on=on)
        return self.set_record(ref, record, f"approved by {by} (recipe {recipe})")

    def changed_beside(self) -> tuple[Ref, ...]:
        """Files that the open load is planned from and that somebody else changed since they were read."""
        return tuple(self._disk.changed(self.refs()))

    # --- new loads ---------------------------------------------------------------------------------------

    def tanks_for(self, recipe: str) -> list[tuple[str, str, str]]:
        """Line, tank and bath that a recipe may run in, those that it runs in already first. Raises FilesError."""
        record = self.library.record("recipe", recipe)
        found: list[tuple[str, str, str]] = []
        for line in self.names("line"):
            known = self.library.record("line", line)
            baths = {tank.bath: self.library.record("bath", tank.bath) for tank in known.tanks}
            bath_of = {tank.name: tank.bath for tank in known.tanks}
            found += [(line, tank, bath_of[tank]) for tank in tanks_for(record, known, baths)]
        used = Counter((one.line, one.tank) for one in self._readable_loads() if one.recipe == recipe)
        return sorted(found, key=lambda one: -used[one[:2]])

    def _readable_loads(self) -> Iterator[Load]:
        for stem in self.names("load"):
            with suppress(FilesError):
                yield self.library.record("load", stem)

    def new_load(self, stem: str, recipe: str, tank: tuple[str, str], rack: str, part: str) -> None:
        """A load of one part on the first place of a rack, written and opened.

        Raises PlannerError, and leaves no file, where it cannot be planned.
        """
        empty = Load(name=stem, recipe=recipe, rack=rack, line=tank[0], tank=tank[1], hangs=())
        load = added(empty, self.library.record("rack", rack), part).load
        path = self._disk.create("load", stem, dump(load, "load", self.style.system))
        try:
            self.open(stem)
        except PlannerError:
            path.unlink()
            raise

    # --- files of the site -------------------------------------------------------------------------------

    def create(self, kind: str, stem: str, text: str) -> DiskPath:
        """A new file. Raises FilesError for a name that is none or is taken, or a text that does not read."""
        return self._disk.create(kind, stem, text)

    def text_to_file(self, ref: Ref) -> str:
        """The text of a file as edited, comments and order as they are."""
        return self._disk.text(ref, self.library.entry(*ref))

    def hide(self, ref: Ref) -> DiskPath:
        """Take a file out of the site, kept under a hidden name. Raises FilesError where that is not possible."""
        return self._disk.hide(ref)

    # --- saving ------------------------------------------------------------------------------------------

    def save(self) -> list[DiskPath]:
        """Save all that is not saved. Raises FileChangedError, and writes nothing, if one was changed on disk."""
        refs = self.dirty
        try:
            return self._disk.save({ref: self.library.entry(*ref) for ref in refs}) if refs else []
        finally:
            self._edited()

    def save_as(self, stem: str) -> DiskPath:
        """Save the open load under a new name, and go on with that one. The old one is as it is on disk again."""
        old: Ref = ("load", self._now.name)
        path = self._disk.save_new(stem, self.library.entry(*old))
        drafts = dict(self._history.drafts)
        if old in drafts:
            drafts[old] = self._disk.entry(old)
        self._commit(drafts, f"saved as {stem} (load {old[1]})", stem)
        self._remember(load=stem)
        return path

    def revert(self) -> None:
        """Give up all that is not saved. Of files that were changed on disk the new ones count; then undo ends."""
        name = self.name
        if self.changed_on_disk or self._disk.outdated():
            self._start_over(keep=())
            if name:
                self.open(name)
        elif self.dirty:
            drafts = {ref: self._disk.entry(ref) for ref in self._history.drafts}
            try:
                self._commit(drafts, "gave up what was not saved", name)
            except PlannerError:  # the open load stands on what is given up
                self._start_over(keep=())
                raise

    # --- recovery ----------------------------------------------------------------------------------------

    def recover(self) -> None:
        """Take up what was not saved when the program ended, as one edit. Raises PlannerError if it cannot be."""
        if self.recovery is None:
            return
        drafts = dict(self._history.drafts)
        for ref in self.recovery.changes:
            entry = self.library.entry(*ref)
            drafts[ref] = redrafted(entry, self.recovery.values(ref, entry))
        self._commit(drafts, "recovered what was not saved", self.recovery.load)
        self.discard_recovery()

    def discard_recovery(self) -> None:
        """Do away with what was not saved when the program ended."""
        if self.recovery is not None:
            self.recovery.journal.remove()
            self.recovery = None

    @property
    def protected(self) -> bool:
        """Whether unsaved work outlives the program; False if there is no memory or its disk takes nothing."""
        return self._memory is not None and not self._journal.failed

    def close(self) -> None:
        """End the session. What is not saved stays in the journal and is offered at the next start."""
        self._journal.close()
        if self.recovery is not None:
            self.recovery.journal.release()

    # --- inside ------------------------------------------------------------------------------------------

    def _edited(self) -> None:
        """The journal follows what is not saved."""
        unsaved = {ref: self._disk.entry(ref) for ref in self.dirty}
        if unsaved:
            self._journal.write(journal_line(self.name, self.library, unsaved))
        else:
            self._journal.clear()

    def _remembered(self, key: str) -> str | None:
        return remembered(self._memory, self.place).get(key) if self._memory else None

    def _remember(self, **values: str) -> None:
        if self._memory is None:
            return
        known = {
            key: one for key, one in remembered(self._memory, self.place).items() if key in ("load", "units")
        }
        if known | values != known:
            remember(self._memory, self.place, known | values)
