"""Approving a recipe: who, today, and the hash of its values, written into its file."""

from datetime import date
from pathlib import Path

from lineplanner.errors import InputError
from lineplanner.files.checking import check_in_site
from lineplanner.files.editing import edit
from lineplanner.files.library import Library
from lineplanner.files.problems import FilesError, shown_path
from lineplanner.files.reading import Entry
from lineplanner.files.saving import save_checked
from lineplanner.inputs.approval import approved, effective_status
from lineplanner.inputs.recipe import Recipe

KEYS = ("status", "approved_by", "approved_on", "approved_content")


def approve(library: Library, named: str, *, by: str) -> str:
    """Write the approval into a recipe's file; returns what was approved. Raises FilesError, InputError."""
    if not by.strip():
        raise InputError("approve.nobody")
    library = library.for_writing()
    entry = _entry(library, named)
    path = entry.document.path
    problems = check_in_site(library, path)
    if problems:
        raise FilesError(problems)
    recipe: Recipe = approved(entry.record, by=by.strip(), on=date.today().isoformat())  # noqa: DTZ011 - the day here
    changed = edit(entry.document)
    for key in KEYS:
        changed.set_value((key,), getattr(recipe, key))
    save_checked(path, changed.text, entry.document.stamp, "recipe")
    kept: Recipe = library.open(path, "recipe").record
    if effective_status(kept) != "approved":
        raise RuntimeError(path)
    return (
        f"{shown_path(path)}: {kept.name} rev {kept.revision} approved by {kept.approved_by} "
        f"on {kept.approved_on}, content {kept.approved_content}"
    )


def _entry(library: Library, named: str) -> Entry:
    """A recipe of the site by its name, or any recipe file."""
    if named.endswith(".toml") or "/" in named or "\\" in named:
        return library.open(Path(named), "recipe")
    return library.entry("recipe", named)
