"""Edits in words: what a label of undo and an offer of recovery say."""

from collections.abc import Mapping
from contextlib import suppress
from pathlib import Path as DiskPath
from typing import Any

from lineplanner.files.differences import Change, differences
from lineplanner.files.kinds import kinds
from lineplanner.files.problems import FileProblem, FilesError, UnitSystem, text_of, token
from lineplanner.inputs.declared import Path, Shape
from lineplanner.tui.edited import EditedLibrary, Ref
from lineplanner.tui.filed import filed_value
from lineplanner.tui.places import Place, place_of, records_of
from lineplanner.tui.typed import as_text, shown_at

_NOT_SET = "not set"


def edits(library: EditedLibrary, ref: Ref, old: Any, new: Any) -> list[str]:
    """What differs in a file: `current density: 24 A/ft2 -> 26 A/ft2 (load valve-blocks-24)`."""
    found = []
    for change in differences(old, new, by_word=False):
        place = _place(ref[0], change.path)
        for one, inside in _parted(place, change):
            label = inside.label if inside else ", ".join(map(str, change.path))
            before, after = (_said(library, ref, inside, value) for value in (one.old, one.new))
            found.append(f"{label}: {before} -> {after} ({ref[0]} {ref[1]})")
    return found


def edit_label(library: EditedLibrary, ref: Ref, old: Any, new: Any) -> str:
    """An edit by the first of what differs."""
    found = edits(library, ref, old, new)
    return f"{found[0]}, and {len(found) - 1} more" if len(found) > 1 else found[0] if found else ""


def _parted(place: Place | None, change: Change) -> list[tuple[Change, Place | None]]:
    """A record that comes or goes as a whole, but for an entry of a list, by its fields."""
    record = next((one for one in (change.new, change.old) if isinstance(one, Mapping)), {})
    if (
        place is None
        or place.shape is not Shape.RECORD
        or place.is_setting
        or isinstance(change.path[-1], int)
    ):
        return [(change, place)]
    return [
        (
            Change((*change.path, key), (change.old or {}).get(key), (change.new or {}).get(key)),
            place.inside(key),
        )
        for key in record
    ]


def _said(library: EditedLibrary, ref: Ref, place: Place | None, value: Any) -> str:
    """A value as typed, a record by what it says; in place of none what counts then."""
    if value is None and place is not None:
        return _without(library, ref, place) or _NOT_SET
    if not isinstance(value, Mapping) or place is None or place.is_setting:
        return token(as_text(value)) or _NOT_SET
    said = []
    for key, one in value.items():
        with suppress(LookupError):
            said.append(f"{place.inside(key).labels[-1]} {token(as_text(one))}")
    return ", ".join(said) or _NOT_SET


def _without(library: EditedLibrary, ref: Ref, place: Place) -> str:
    """What counts where a field is left out: its default, or what the recipe says."""
    if place.keys[:1] == ("change",) and ref[0] == "load" and len(place.keys) > 1:
        with suppress(FilesError, LookupError):
            recipe = library.entry("recipe", library.entry(*ref).record.recipe)
            name = str(place.keys[1])
            last = len(recipe.record.voltages) - 1
            path: Path = ("voltages", last, "to") if name == "hold_voltage" else (name,)
            return shown_at(recipe.record, recipe.document.raw, path, "metric")
    if place.default is None or place.shape is Shape.RECORD:
        return ""
    return as_text(filed_value(place.default, place.type, place.field, "metric"))


def reason(problems: list[FileProblem], ref: Ref, keys: Path, system: UnitSystem) -> str:
    """Why a text at a place is refused: the reader's sentence; of another place with what it is about."""
    here = next((one for one in problems if _belongs(one, ref, keys)), None)
    if here is not None:
        return text_of(here.key, here.facts, system)
    return placed(problems[0], system)


def placed(problem: FileProblem, system: UnitSystem) -> str:
    """A problem with its file and field as a person calls them."""
    said = text_of(problem.key, problem.facts, system)
    if problem.path is None:
        return said
    kind = _kind_of(problem.path)
    place = _place(kind, problem.key_path) if kind else None
    front = f"{kind} {problem.path.stem}".strip()
    return f"{front}, {place.label}: {said}" if place and place.labels else f"{front}: {said}"


def _belongs(problem: FileProblem, ref: Ref, keys: Path) -> bool:
    """Whether a problem is one of this field, of what it holds or of what holds it."""
    if problem.path is None or (_kind_of(problem.path), problem.path.stem) != ref:
        return False
    shorter = min(len(problem.key_path), len(keys))
    return bool(shorter) and problem.key_path[:shorter] == keys[:shorter]


def _place(kind: str, path: Path) -> Place | None:
    for record in records_of(kind):
        try:
            return place_of(record, path)
        except LookupError:
            continue
    return None


def _kind_of(path: DiskPath) -> str:
    """The kind that goes with the folder a file lies in; none for a table of the standards."""
    folders = {one.folder.name: "" if one.table else kind for kind, one in kinds().items()}
    return next((folders[above.name] for above in path.parents if above.name in folders), "")
