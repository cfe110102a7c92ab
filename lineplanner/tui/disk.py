"""The side of a session that is on disk: what was read, what was saved since, and saving."""

import re
from collections.abc import Container, Iterable, Iterator, Mapping
from dataclasses import replace
from pathlib import Path as DiskPath

from lineplanner.files.content import digest_of
from lineplanner.files.document import Stamp, failed
from lineplanner.files.library import Library
from lineplanner.files.problems import FileChangedError, FileProblem, FilesError
from lineplanner.files.reading import Entry
from lineplanner.files.saving import save, save_checked
from lineplanner.tui.edited import EditedLibrary, Reading, Ref

_STEM = re.compile(r"[a-z0-9]+(?:-[a-z0-9]+)*")
# Names that Windows keeps for devices, with any ending: a file of such a name is never a new one there.
_DEVICES = re.compile(r"con|prn|aux|nul|com[0-9]|lpt[0-9]")


class Disk:
    """The files of a site as they were read, with those saved since. Texts are made from the first reading."""

    def __init__(self, library: Library) -> None:
        self.reading = Reading(library)
        self._saved: dict[Ref, Entry] = {}

    @property
    def library(self) -> Library:
        return self.reading.library

    def entry(self, ref: Ref) -> Entry:
        """A file as it is on disk, as far as this session knows."""
        return self._saved.get(ref) or self._first(ref)

    def changed(self, refs: Iterable[Ref]) -> Iterator[Ref]:
        """Those of some files that somebody else changed or took away."""
        return (ref for ref in refs if not _is(self.entry(ref)))

    def outdated(self) -> list[Ref]:
        """Those of all files read that somebody else changed or took away."""
        return list(self.changed(self.reading.entries))

    def forget(self, keep: Container[Ref]) -> None:
        """Read everything but some files again when it is asked for."""
        self._saved = {ref: entry for ref, entry in self._saved.items() if ref in keep}
        self.reading.again(keep)

    def save(self, entries: Mapping[Ref, Entry]) -> list[DiskPath]:
        """Write entries to their files, the packaged shop's to the user's own. Raises FileChangedError, FilesError."""
        self._make_writable()
        changed = [
            FileProblem(self.entry(ref).document.path, None, (), "file.changed")
            for ref in self.changed(entries)
        ]
        if changed:
            raise FileChangedError(changed)
        texts = {ref: self.text(ref, entry) for ref, entry in entries.items()}
        for ref, text in texts.items():
            known = self.entry(ref).document
            stamp = save(known.path, text, known.stamp)
            self._saved[ref] = _written(entries[ref], known.path, text, stamp)
        return [self.entry(ref).document.path for ref in entries]

    def save_new(self, stem: str, entry: Entry) -> DiskPath:
        """Write a load to a file of its own. Raises FilesError for a name that is none or is taken."""
        self._check_new("load", stem)
        text = self.text(("load", entry.document.path.stem), entry)
        self._make_writable()
        path = self.library.folder_of("load") / f"{stem}.toml"
        stamp = save(path, text, None)
        self.reading.entries["load", stem] = _written(entry, path, text, stamp)
        return path

    def create(self, kind: str, stem: str, text: str) -> DiskPath:
        """A new file of a kind. Raises FilesError for a name that is none or is taken, or a text that does not read."""
        self._check_new(kind, stem)
        self._make_writable()
        path = self.library.folder_of(kind) / f"{stem}.toml"
        save_checked(path, text, None, kind)
        return path

    def _check_new(self, kind: str, stem: str) -> None:
        """Raise FilesError for a name that is none or is taken."""
        if not _STEM.fullmatch(stem):
            raise FilesError([FileProblem(None, None, (), "file.stem", {"stem": stem[:60]})])
        if _DEVICES.fullmatch(stem) or stem in self.library.stems(kind):
            path = self.library.folder_of(kind) / f"{stem}.toml"
            raise FileChangedError([FileProblem(path, None, (), "file.exists")])

    def _first(self, ref: Ref) -> Entry:
        return EditedLibrary(self.reading, {}).entry(*ref)

    def hide(self, ref: Ref) -> DiskPath:
        """Give a file a hidden name, so that it is no file of the site any more. Raises FilesError."""
        self._make_writable()
        path = self.entry(ref).document.path
        number = next(n for n in range(1, 10_000) if not _hidden(path, n).exists())
        try:
            path.rename(_hidden(path, number))
        except OSError as error:
            raise failed(path, "file.not_written", why=error.strerror or type(error).__name__) from error
        self._saved.pop(ref, None)
        self.reading.entries.pop(ref, None)
        return _hidden(path, number)

    def text(self, ref: Ref, entry: Entry) -> str:
        """The text of a file with the values of an entry."""
        from lineplanner.files.amending import read_back  # at the first save: the TOML editor takes its time

        return read_back(self._first(ref).document, entry)

    def _make_writable(self) -> None:
        """From the first save on, changes of the packaged shop go to the user's own copy."""
        own = self.library.for_writing()
        if own is not self.library:
            self.reading.moved_to(own)


def _hidden(path: DiskPath, number: int) -> DiskPath:
    return path.with_name(f".{path.stem}.{number}.removed")


def _is(entry: Entry) -> bool:
    try:
        return digest_of(entry.document.path.read_bytes()) == entry.document.stamp.digest
    except OSError:
        return False


def _written(entry: Entry, path: DiskPath, text: str, stamp: Stamp) -> Entry:
    return replace(entry, document=replace(entry.document, path=path, text=text, stamp=stamp))
