"""The open load as edited, and its plan. Every edit is a new state that is planned at once; undo has no limit."""

from collections.abc import Collection
from dataclasses import dataclass
from types import MappingProxyType
from typing import Any

from lineplanner.errors import PlannerError
from lineplanner.files.differences import same
from lineplanner.files.library import Library
from lineplanner.files.problems import FilesError
from lineplanner.inputs.case import Case
from lineplanner.inputs.declared import Path, Shape
from lineplanner.plan import Plan, plan
from lineplanner.report.style import Style
from lineplanner.report.words import error_text
from lineplanner.tui.disk import Disk
from lineplanner.tui.edited import Drafts, EditedLibrary, Ref, redrafted
from lineplanner.tui.filed import refiled
from lineplanner.tui.history import History, State
from lineplanner.tui.places import place_of
from lineplanner.tui.typed import shown_at, with_text
from lineplanner.tui.worded import edit_label, placed, reason

_LONGEST = 2000  # characters of a text at one field
_TOO_LONG = "longer than any text that is printed. Shorten it"


@dataclass(frozen=True, slots=True)
class _Opened:
    """A load worked out: its name, its case and its plan."""

    name: str
    case: Case
    plan: Plan


class Workbench:
    """Loads and what they need, edited in memory only."""

    def __init__(self, library: Library, style: Style) -> None:
        self._disk = Disk(library)
        self._history = History()
        self._opened: _Opened | None = None
        self.style = style
        self.moved: frozenset[str] = frozenset()

    @property
    def library(self) -> EditedLibrary:
        """The site's files as edited; it never changes, an edit makes another one."""
        return EditedLibrary(self._disk.reading, self._history.drafts)

    # --- the open load -----------------------------------------------------------------------------------

    def open(self, stem: str) -> None:
        """Open a load, as edited or as it is on disk by now. Raises PlannerError if it cannot be planned."""
        unsaved = self.dirty
        if set(self.changed_on_disk) - set(unsaved):
            self._start_over(keep=unsaved)
        self._disk.reading.again(self._history.touched)
        self._opened = self._worked_out(self._history.drafts, stem)
        self.moved = frozenset()

    @property
    def name(self) -> str:
        """The open load; empty if there is none."""
        return self._opened.name if self._opened else ""

    @property
    def case(self) -> Case:
        return self._now.case

    @property
    def plan(self) -> Plan:
        return self._now.plan

    def refs(self) -> tuple[Ref, ...]:
        """The records of the open load."""
        case = self.case
        return (
            ("load", self.name),
            ("recipe", case.load.recipe),
            ("rack", case.load.rack),
            ("line", case.load.line),
            ("bath", case.tank.bath),
            *(("part", name) for name in case.parts),
            *(("material", name) for name in case.materials),
            ("site", "site"),
        )

    def record(self, ref: Ref) -> Any:
        """A record as edited. Raises FilesError if it cannot be read."""
        return self.library.entry(*ref).record

    def text_of(self, ref: Ref, path: Path) -> str:
        """The value of a field as typed, or as a file would write what counts where it is left out."""
        entry = self.library.entry(*ref)
        return shown_at(entry.record, entry.document.raw, path, self.style.system)

    # --- edits -------------------------------------------------------------------------------------------

    def set_value(self, ref: Ref, path: Path, text: str) -> str | None:
        """Take a text at a field; the reason if it is refused, which leaves everything as it was."""
        if text.strip() == self.text_of(ref, path):
            return None
        entry = self.library.entry(*ref)
        place = place_of(type(entry.record), path)
        if place.shape is Shape.WORDS and len(text) > _LONGEST:
            return _TOO_LONG
        on_disk = self._disk.entry(ref).document.raw
        raw = with_text(type(entry.record), entry.document.raw, path, text, on_disk)
        try:
            self._edit(ref, raw)
        except FilesError as error:
            return reason(error.problems, ref, place.keys, self.style.system)
        except PlannerError as error:
            return error_text(error, self.style)
        return None

    def set_record(self, ref: Ref, record: Any, label: str) -> list[str]:
        """Put a record in place of one; what is equal in both stays as typed. The problems if it is refused."""
        entry = self.library.entry(*ref)
        try:
            self._edit(ref, refiled(entry.document.raw, entry.record, record, self.style.system), label)
        except FilesError as error:
            return [placed(one, self.style.system) for one in error.problems]
        except PlannerError as error:
            return [error_text(error, self.style)]
        return []

    def undo(self) -> str | None:
        """Take the last edit back, at the load where it was made. Its label; None if there is none."""
        found = self._history.undone
        if found is None:
            return None
        undone, before = found
        self._take(
            before.drafts, undone.came_from or self.name
        )  # recovered work was taken up where none was open
        self._history.at -= 1
        self._edited()
        return undone.label

    def redo(self) -> str | None:
        """Make the edit again that was taken back last. Its label; None if there is none."""
        state = self._history.redone
        if state is None:
            return None
        self._take(state.drafts, state.load)
        self._history.at += 1
        self._edited()
        return state.label

    @property
    def undone_elsewhere(self) -> str:
        """The load at which the last edit was made, where that is not the open one; taking it back leads there."""
        found = self._history.undone
        return found[0].came_from if found and found[0].came_from not in ("", self.name) else ""

    @property
    def redone_elsewhere(self) -> str:
        """The load at which the edit was made that is to be made again, where that is not the open one."""
        state = self._history.redone
        return state.load if state and state.load not in ("", self.name) else ""

    @property
    def can_undo(self) -> bool:
        return self._history.undone is not None

    @property
    def can_redo(self) -> bool:
        return self._history.redone is not None

    @property
    def dirty(self) -> tuple[Ref, ...]:
        """The files whose values are not those on disk."""
        return tuple(ref for ref in self._history.touched if not self._as_on_disk(ref))

    @property
    def changed_on_disk(self) -> tuple[Ref, ...]:
        """Edited files that somebody else changed meanwhile: they will not be overwritten."""
        return tuple(self._disk.changed(self._history.touched))

    # --- inside ------------------------------------------------------------------------------------------

    def _edited(self) -> None:
        """Called after each change of what counts or of what is saved."""

    @property
    def _now(self) -> _Opened:
        if self._opened is None:
            raise LookupError("no load is open")
        return self._opened

    def _edit(self, ref: Ref, raw: dict[str, Any], label: str | None = None) -> None:
        """One edit of one file: all is worked out first, so that a refusal leaves no trace."""
        entry = self.library.entry(*ref)
        if same(entry.document.raw, raw):
            return
        drafts = {**self._history.drafts, ref: redrafted(entry, raw)}
        if self._opened is None or ref not in self.refs():
            EditedLibrary(self._disk.reading, drafts).check(ref)
        self._commit(drafts, label or edit_label(self.library, ref, entry.document.raw, raw), self.name)

    def _commit(self, drafts: Drafts, label: str, load: str) -> None:
        came_from = self.name
        self._take(drafts, load)
        self._history.add(State(MappingProxyType(dict(drafts)), label, came_from, load))
        self._edited()

    def _take(self, drafts: Drafts, load: str) -> None:
        """Let drafts count, at a load. Raises PlannerError, and changes nothing, if it cannot be planned so."""
        before, self._opened = self._opened, self._worked_out(drafts, load)
        self.moved = _moved(before, self._opened)

    def _worked_out(self, drafts: Drafts, load: str) -> _Opened | None:
        if not load:
            return None
        case = EditedLibrary(self._disk.reading, drafts).case(load)
        return _Opened(load, case, plan(case))

    def _as_on_disk(self, ref: Ref) -> bool:
        return same(self._disk.entry(ref).document.raw, self.library.entry(*ref).document.raw)

    def _start_over(self, keep: Collection[Ref]) -> None:
        """Undo ends here: files that earlier states stand on are others by now."""
        drafts = {ref: self.library.entry(*ref) for ref in keep}
        self._history = History((State(MappingProxyType(drafts)),))
        self._disk.forget(keep)
        self._opened = None
        self._edited()


def _moved(before: _Opened | None, after: _Opened | None) -> frozenset[str]:
    """The figures whose values differ between two plans of one load."""
    if before is None or after is None or before.name != after.name:
        return frozenset()
    old, new = before.plan.figures, after.plan.figures
    return frozenset(
        path
        for path in {*old, *new}
        if path not in old or path not in new or old[path].value != new[path].value
    )
