"""A case from a load: every record that the load refers to, or the problems of all files involved at once."""

from collections.abc import Callable, Iterable
from dataclasses import dataclass, field
from pathlib import Path as DiskPath
from typing import Any, TypeVar

from lineplanner.errors import Problem
from lineplanner.files.library import Library
from lineplanner.files.problems import FileProblem, FilesError
from lineplanner.files.reading import Entry
from lineplanner.inputs.case import Case
from lineplanner.inputs.change import change_problems
from lineplanner.inputs.declared import Path, file_path
from lineplanner.inputs.line import Tank
from lineplanner.inputs.load import Load
from lineplanner.inputs.load_rules import (
    base_problems,
    bath_fit_problems,
    family_problems,
    line_fit_problems,
    process_problems,
    rack_fit_problems,
)
from lineplanner.inputs.material import Material
from lineplanner.inputs.recipe_rules import recipe_table_problems
from lineplanner.inputs.rules import table_problems
from lineplanner.inputs.tables import Tables

T = TypeVar("T")


def open_case(library: Library, load: DiskPath | str) -> Case:
    """The case of a load, given by its file or by its name. Raises FilesError with the problems of all files."""
    return _Case(library, load_entry(library, load)).made()


def load_entry(library: Library, load: DiskPath | str) -> Entry:
    """The file of a load: a path to a .toml file, or a name in the library."""
    text = str(load)
    if isinstance(load, DiskPath) or text.endswith(".toml") or "/" in text or "\\" in text:
        return library.open(DiskPath(load), "load")
    return library.entry("load", text)


@dataclass
class _Case:
    """Follows the references of a load; gathers problems instead of stopping at the first."""

    library: Library
    entry: Entry
    problems: list[FileProblem] = field(default_factory=list)
    followed: dict[tuple[str, str], Entry | None] = field(default_factory=dict)

    @property
    def load(self) -> Load:
        record: Load = self.entry.record
        return record

    def made(self) -> Case:
        load, entry = self.load, self.entry
        rack = self.follow(entry, ("rack",), "rack", load.rack)
        recipe = self.follow(entry, ("recipe",), "recipe", load.recipe)
        line = self.follow(entry, ("line",), "line", load.line)
        tank = self.tank(line)
        bath = self.bath(line, tank)
        materials = self.materials()
        site = self.gather(self.library.site)
        tables = self.gather(self.library.tables)
        cautions = self.gather(self.library.cautions)
        self.fit(rack, recipe, bath, materials)
        if tables is not None:
            self.look_up(tables, rack, line, recipe, bath)
        if self.problems or not (rack and recipe and line and tank and bath and site and tables and cautions):
            raise FilesError(_once(self.problems))
        return Case(
            name=entry.document.path.stem,
            load=load,
            recipe=recipe.record,
            rack=rack.record,
            line=line.record,
            tank=tank,
            bath=bath.record,
            baths=self.records("bath"),
            parts=self.records("part"),
            materials=self.records("material"),
            site=site,
            tables=tables,
            cautions=cautions,
        )

    # --- references --------------------------------------------------------------------------------------

    def follow(self, entry: Entry, path: Path, kind: str, name: str) -> Entry | None:
        """The file that a reference in another file names."""

        def place(key: str, facts: dict[str, str]) -> FileProblem:
            return entry.document.problem(file_path(type(entry.record), path), key, **facts)

        known = self.followed.get((kind, name))
        if known is None:  # also after a failure: each place that names a missing file is to be told
            known = self.gather(lambda: self.library.entry(kind, name, place))
            self.followed[kind, name] = known
        return known

    def gather(self, read: Callable[[], T]) -> T | None:
        """What a reader returns; None, and its problems noted, if it cannot."""
        try:
            return read()
        except FilesError as error:
            self.problems += error.problems
            return None

    def records(self, kind: str) -> dict[str, Any]:
        """The records of a kind that were followed, by name."""
        return {
            name: one.record for (of, name), one in self.followed.items() if of == kind and one is not None
        }

    def tank(self, line: Entry | None) -> Tank | None:
        if line is None:
            return None
        self.apply(self.entry, line_fit_problems(self.load, line.record))
        return next((tank for tank in line.record.tanks if tank.name == self.load.tank), None)

    def bath(self, line: Entry | None, tank: Tank | None) -> Entry | None:
        """The bath of the load's tank; those of the line's other tanks are followed too."""
        if line is None:
            return None
        baths = {
            other.name: self.follow(line, ("tanks", index, "bath"), "bath", other.bath)
            for index, other in enumerate(line.record.tanks)
        }
        return baths.get(tank.name) if tank else None

    def materials(self) -> dict[int, tuple[str, Material]]:
        """Name and record of the material of each hang, by its position: the hang's own or its part's."""
        found = {}
        for index, hang in enumerate(self.load.hangs):
            part = self.follow(self.entry, ("hangs", index, "part"), "part", hang.part)
            material, name = None, ""
            if hang.material is not None:
                name = hang.material
                material = self.follow(self.entry, ("hangs", index, "material"), "material", name)
            elif part is not None:
                name = part.record.material
                material = self.follow(part, ("material",), "material", name)
            if material is not None:
                found[index] = (name, material.record)
        return found

    # --- rules between files -----------------------------------------------------------------------------

    def apply(self, entry: Entry | None, problems: Iterable[Problem]) -> None:
        self.problems += [entry.problem(problem) for problem in problems] if entry else []

    def fit(
        self,
        rack: Entry | None,
        recipe: Entry | None,
        bath: Entry | None,
        materials: dict[int, tuple[str, Material]],
    ) -> None:
        """What of the load does not fit its rack, its recipe or its tank."""
        if rack:
            self.apply(self.entry, rack_fit_problems(self.load, rack.record))
        if recipe:
            self.apply(self.entry, change_problems(recipe.record, self.load.change))
            self.apply(self.entry, base_problems(self.load, recipe.record, materials))
        if recipe and bath:
            name = bath.document.path.stem
            self.apply(self.entry, bath_fit_problems(self.load, recipe.record, name, bath.record))

    def look_up(
        self, tables: Tables, rack: Entry | None, line: Entry | None, recipe: Entry | None, bath: Entry | None
    ) -> None:
        """Names in the files that the standards tables do not know."""
        materials = [one for (kind, _), one in self.followed.items() if kind == "material"]
        for one in (rack, line, *materials):
            self.apply(one, table_problems(one.record, tables) if one else [])
        if recipe:
            self.apply(recipe, recipe_table_problems(recipe.record, tables))
            self.apply(recipe, process_problems(recipe.record, tables))
        if bath:
            self.apply(bath, family_problems(bath.record, tables))


def _once(problems: list[FileProblem]) -> list[FileProblem]:
    """Problems without repetition, in the order found: the load first, then what it needs."""
    found: list[FileProblem] = []
    for one in problems:
        if one not in found:
            found.append(one)
    return found
