"""The files of a site as edited: drafts over what was read, and each file read once."""

from collections.abc import Container, Mapping
from dataclasses import fields, is_dataclass, replace
from pathlib import Path as DiskPath
from typing import Any

from lineplanner.files.cases import open_case
from lineplanner.files.library import Library, Place
from lineplanner.files.models import build
from lineplanner.files.problems import FilesError
from lineplanner.files.reading import Entry, _rules_of
from lineplanner.inputs.cautions import CautionTexts
from lineplanner.inputs.site import Site
from lineplanner.inputs.tables import Tables

Ref = tuple[str, str]
"""A file by its kind and its name: ("load", "valve-blocks-24")."""
Drafts = Mapping[Ref, Entry]


class Reading:
    """What was read of a site, so that a session sees one state of it."""

    def __init__(self, library: Library) -> None:
        self.library = library
        self.entries: dict[Ref, Entry] = {}
        self.tables: tuple[Site, Tables] | None = None
        self.cautions: CautionTexts | None = None

    def again(self, keep: Container[Ref]) -> None:
        """Forget what was read, so that files changed on disk are seen; the library reads only those again."""
        self.entries = {ref: entry for ref, entry in self.entries.items() if ref in keep}
        self.tables = self.cautions = None

    def moved_to(self, library: Library) -> None:
        """From now on the files of another folder with the same content."""
        before, self.library = self.library.folder, library
        for ref, entry in self.entries.items():
            path = library.folder / entry.document.path.relative_to(before)
            self.entries[ref] = replace(entry, document=replace(entry.document, path=path))


class EditedLibrary(Library):
    """A library that answers with drafts where there are some. Never changes; an edit makes another one."""

    def __init__(self, reading: Reading, drafts: Drafts) -> None:
        super().__init__(reading.library.place)
        self.reading, self.drafts = reading, drafts

    def open(self, path: DiskPath, kind: str | None = None) -> Entry:
        """A file by its path, as on disk."""
        return self.reading.library.open(path, kind)

    def entry(self, kind: str, name: str, place: Place | None = None) -> Entry:
        """A file by kind and name: as edited, else as read."""
        ref = (kind, name)
        known = self.drafts.get(ref) or self.reading.entries.get(ref)
        if known is None:
            known = self.reading.library.entry(kind, name, place)
            self.reading.entries[ref] = known
        return known

    def site(self) -> Site:
        """The site's own settings, as edited."""
        found: Site = self.entry("site", "site").record
        return found

    def tables(self) -> Tables:
        """All standards tables, with the limits that the site as edited adopted."""
        site, known = self.site(), self.reading.tables
        if known is None or known[0] is not site:
            known = (site, super().tables())
            self.reading.tables = known
        return known[1]

    def cautions(self) -> CautionTexts:
        """The texts of the cautions."""
        found = self.reading.cautions or super().cautions()
        self.reading.cautions = found
        return found

    def check(self, ref: Ref) -> None:
        """Raise FilesError with what a draft refers to in vain."""
        from lineplanner.files.checking import references
        from lineplanner.inputs.declared import file_path

        if ref[0] == "load":
            open_case(self, ref[1])
            return
        entry, found = self.entry(*ref), []
        for path, kind, name in references(entry.record):
            if name not in self.stems(kind):
                problem = self.unknown(kind, name)
                key_path = file_path(type(entry.record), path)
                found.append(entry.document.problem(key_path, problem.key, **problem.facts))
        if found:
            raise FilesError(found)


def redrafted(entry: Entry, raw: Mapping[str, Any]) -> Entry:
    """The entry with other values. Raises FilesError with what a reader of the file would say."""
    values = {key: value for key, value in raw.items() if key != "format"}
    record, problems = build(entry.kind.record, values)
    document = replace(entry.document, raw=raw)
    if problems:
        raise FilesError([document.problem(one.path, one.key, **one.facts) for one in problems])
    made = Entry(entry.kind, _sharing(entry.record, record), document)
    broken = [made.problem(one) for one in _rules_of(entry.kind, record)]
    if broken:
        raise FilesError(broken)
    return made


def _sharing(old: Any, new: Any) -> Any:
    """The new record made of the old one's pieces where they are equal: what is remembered goes by identity."""
    if old == new:
        return old
    if type(old) is not type(new):
        return new
    if isinstance(new, tuple):
        same = {one: one for one in old}
        return tuple(
            same[one] if one in same else _sharing(old[i], one) if i < len(old) else one
            for i, one in enumerate(new)
        )
    if not is_dataclass(new) or isinstance(new, type):
        return new
    return replace(
        new, **{one.name: _sharing(getattr(old, one.name), getattr(new, one.name)) for one in fields(new)}
    )
