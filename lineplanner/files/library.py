"""A site's files by kind and name: listed, read when asked for, read again when changed on disk."""

import re
from collections.abc import Callable
from dataclasses import replace
from difflib import get_close_matches
from pathlib import Path as DiskPath
from typing import Any

from lineplanner.files.document import failed
from lineplanner.files.folders import STANDARDS, paths_of, stems_of, toml_files
from lineplanner.files.kinds import kinds
from lineplanner.files.problems import FileProblem, FilesError, listed, shown_path, token
from lineplanner.files.reading import Entry, read_entry, row_problems
from lineplanner.files.site import SiteFolder, find_site, writable
from lineplanner.inputs.adoption import with_adopted
from lineplanner.inputs.case import Case
from lineplanner.inputs.cautions import CautionTexts
from lineplanner.inputs.site import Site
from lineplanner.inputs.tables import Tables

_STEM = re.compile(r"[a-z0-9]+(?:-[a-z0-9]+)*")
Place = Callable[[str, dict[str, str]], FileProblem]
"""Makes the problem of a reference, at the place where the reference stands."""


def open_library(named: DiskPath | str | None = None, working: DiskPath | None = None) -> "Library":
    """The library of the site to work with; named is what --site says. Raises FilesError."""
    return Library(find_site(named, working))


class Library:
    """The files of one site. Nothing is read before it is asked for."""

    def __init__(self, site: SiteFolder | DiskPath) -> None:
        self.place = site if isinstance(site, SiteFolder) else SiteFolder(site)
        self.folder = self.place.path
        self._read: dict[tuple[DiskPath, str | None], tuple[tuple[int, int], Entry | FilesError]] = {}

    def for_writing(self) -> "Library":
        """The library that changes go to: itself, but for the packaged copy the user's own."""
        place = writable(self.place)
        return self if place == self.place else Library(place)

    # --- listing -----------------------------------------------------------------------------------------

    def folder_of(self, kind: str) -> DiskPath:
        """Where the files of a kind live."""
        return self.folder / kinds()[kind].folder

    def paths(self, kind: str) -> list[DiskPath]:
        """All files of a kind's folder, subfolders included."""
        return paths_of(self.folder, kind)

    def stems(self, kind: str) -> dict[str, DiskPath]:
        """The names of a kind with their files; of two files with one name the first."""
        return stems_of(self.folder, kind)

    def listing_problems(self, kind: str) -> list[FileProblem]:
        """Names that cannot be referred to, and names that two files share."""
        first = self.stems(kind)
        found = []
        for path in self.paths(kind):
            if not _STEM.fullmatch(path.stem):
                found.append(FileProblem(path, None, (), "file.stem", {"stem": path.stem}))
            if path != first[path.stem]:
                found.append(_of_one_name(path, first[path.stem]))
        return found

    # --- reading -----------------------------------------------------------------------------------------

    def open(self, path: DiskPath, kind: str | None = None) -> Entry:
        """A file's record and document; from memory while time and size on disk are the same."""
        try:
            found = path.stat()
            stamp = (found.st_mtime_ns, found.st_size)
        except (OSError, ValueError):
            return read_entry(path, kind)  # says what is wrong
        known = self._read.get((path, kind))
        if known is None or known[0] != stamp:
            known = (stamp, _entry_or_error(path, kind))
            self._read[path, kind] = known
        if isinstance(known[1], FilesError):
            raise FilesError(known[1].problems)
        return known[1]

    def entry(self, kind: str, name: str, place: Place | None = None) -> Entry:
        """The file of a kind with a name. place words the problem of a name that no file has."""
        named = [path for path in self.paths(kind) if path.stem == name]
        if not named:
            raise FilesError([self.unknown(kind, name, place)])
        if len(named) > 1:
            raise FilesError([_of_one_name(path, named[0]) for path in named[1:]])
        return self.open(named[0], kind)

    def record(self, kind: str, name: str) -> Any:
        """The record of a kind with a name. Raises FilesError."""
        return self.entry(kind, name).record

    def site(self) -> Site:
        """The site's own settings."""
        found: Site = self.open(self.folder_of("site") / "site.toml", "site").record
        return found

    def cautions(self) -> CautionTexts:
        """The texts of the cautions: the one file of their folder."""
        paths = self.paths("cautions")
        if not paths:
            raise failed(self.folder_of("cautions"), "site.no_tables", kind="cautions")
        if len(paths) > 1:
            raise failed(paths[1], "site.two_tables", kind="cautions", other=shown_path(paths[0]))
        found: CautionTexts = self.open(paths[0], "cautions").record
        return found

    def tables(self) -> Tables:
        """All standards tables, with the limits that the site adopted. Raises FilesError with every problem."""
        parts, problems = self._tables()
        site: Site | None = None
        try:
            site = self.site()
        except FilesError as error:
            problems += error.problems
        if problems or site is None:
            raise FilesError(problems)
        tables = Tables(**parts)
        return replace(tables, limits=with_adopted(tables.limits, site.adopted))

    def _tables(self) -> tuple[dict[str, Any], list[FileProblem]]:
        """What the standards files give, by field of Tables: rows of several files joined."""
        parts: dict[str, Any] = {}
        given: dict[str, DiskPath] = {}
        problems: list[FileProblem] = []
        for path in toml_files(self.folder / STANDARDS):
            try:
                entry = self.open(path)
            except FilesError as error:
                problems += error.problems
                continue
            field = entry.kind.table
            if field is None:
                tables = listed(name for name, kind in kinds().items() if kind.table)
                problems.append(entry.document.problem(("format",), "format.not_a_table", kinds=tables))
            elif entry.kind.rows:
                rows = parts.get(field, ()) + getattr(entry.record, field)
                problems += [
                    entry.problem(one) for one in row_problems(rows, field, len(parts.get(field, ())))
                ]
                parts[field] = rows
            elif field in parts:
                facts = {"kind": entry.kind.name, "other": shown_path(given[field])}
                problems.append(entry.document.problem(("format",), "site.two_tables", **facts))
            else:
                parts[field], given[field] = entry.record, path
        unread = bool(problems)  # a file that cannot be read may well hold what seems to be missing
        problems += [
            FileProblem(self.folder / STANDARDS, None, (), "site.no_tables", {"kind": name})
            for name, kind in kinds().items()
            if kind.table and kind.table not in parts and not unread
        ]
        return parts, problems

    def case(self, load: DiskPath | str) -> Case:
        """A load with every record it refers to. Raises FilesError with the problems of all files involved."""
        from lineplanner.files.cases import open_case

        return open_case(self, load)

    # --- problems of references --------------------------------------------------------------------------

    def unknown(self, kind: str, name: str, place: Place | None = None) -> FileProblem:
        """The problem of a name that no file of a kind has, with the nearest that one has."""
        place = place or (lambda key, facts: FileProblem(self.folder_of(kind), None, (), key, facts))
        stems = self.stems(kind)
        near = get_close_matches(name, stems, 1)
        facts = {"token": token(name), "kind": kind}
        if near:
            return place("reference.near", facts | {"nearest": near[0]})
        if stems:
            return place("reference.unknown", facts | {"stems": listed(stems)})
        return place("reference.none", facts | {"folder": shown_path(self.folder_of(kind))})


def _entry_or_error(path: DiskPath, kind: str | None) -> Entry | FilesError:
    try:
        return read_entry(path, kind)
    except FilesError as error:
        return error


def _of_one_name(path: DiskPath, first: DiskPath) -> FileProblem:
    facts = {"stem": path.stem, "other": shown_path(first)}
    return FileProblem(path, None, (), "file.two_of_one_name", facts)
