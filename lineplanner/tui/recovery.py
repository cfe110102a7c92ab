"""What the journal of a program that ended holds: the edits that were not saved, offered at the next start."""

from collections.abc import Mapping
from dataclasses import dataclass
from pathlib import Path as DiskPath
from typing import Any

from lineplanner.files.differences import Change, applied, differences
from lineplanner.files.problems import FileChangedError, FileProblem
from lineplanner.files.reading import Entry
from lineplanner.tui.edited import EditedLibrary, Ref
from lineplanner.tui.journal import Leftover, leftover
from lineplanner.tui.worded import edits


@dataclass(frozen=True, slots=True)
class Recovery:
    """Unsaved edits of an earlier run. load: where they were made; lines: what differs from the files."""

    load: str
    lines: tuple[str, ...]
    changes: Mapping[Ref, tuple[Change, ...]]
    journal: Leftover

    def values(self, ref: Ref, entry: Entry) -> Any:
        """The values of a file with the edits in them. Raises FileChangedError if they have no place there any more."""
        try:
            return applied(entry.document.raw, self.changes[ref])
        except LookupError:
            raise FileChangedError([FileProblem(entry.document.path, None, (), "file.changed")]) from None


def journal_line(load: str, library: EditedLibrary, on_disk: Mapping[Ref, Entry]) -> dict[str, Any]:
    """All that is not saved, for the journal: of each file what counts against what is on disk."""
    changes: list[dict[str, Any]] = []
    lines: list[str] = []
    for ref, entry in on_disk.items():
        old, new = entry.document.raw, library.entry(*ref).document.raw
        changes += [
            {"ref": ref, "path": one.path, "old": one.old, "new": one.new}
            for one in differences(old, new, by_word=False)
        ]
        lines += edits(library, ref, old, new)
    return {"load": load, "lines": lines, "changes": changes}


def found_recovery(memory: DiskPath | None, key: str) -> Recovery | None:
    """What a program that ended left in the journal of a site."""
    found = leftover(memory, key)
    if found is None:
        return None
    try:
        load, lines, changes = _read(found.line)
    except (KeyError, TypeError, ValueError):
        found.release()  # not written by this version
        return None
    return Recovery(load, lines, changes, found)


def _read(line: Mapping[str, Any]) -> tuple[str, tuple[str, ...], dict[Ref, tuple[Change, ...]]]:
    found: dict[Ref, tuple[Change, ...]] = {}
    for one in line["changes"]:
        kind, stem = map(str, one["ref"])
        path = tuple(step if isinstance(step, int) else str(step) for step in one["path"])
        found[kind, stem] = (*found.get((kind, stem), ()), Change(path, one["old"], one["new"]))
    return str(line["load"]), tuple(map(str, line["lines"])), found
