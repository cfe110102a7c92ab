"""The approval of a recipe: it holds for a hash of the values that were approved."""

import hashlib
import json
from dataclasses import fields, is_dataclass, replace
from typing import Literal

from lineplanner.inputs.memo import Memo
from lineplanner.inputs.recipe import Recipe

_APPROVAL = frozenset({"status", "approved_by", "approved_on", "approved_content"})
_DIGITS = 10  # significant; unit spellings of one value agree to more, settings never differ by less
_LENGTH = 16  # hexadecimal digits: no two recipes of a shop share them by chance
_HASHES: Memo[Recipe, str] = Memo(256)


def content_hash(recipe: Recipe) -> str:
    """A hash of all values but the approval itself. Key order, comments and unit spelling do not count.

    A value left at its default does not count either, so that an approval outlives a new kind of setting.
    """
    return _HASHES.get(recipe, None, lambda: _hashed(recipe))


def _hashed(recipe: Recipe) -> str:
    text = json.dumps(
        _plain(recipe, leave_out=_APPROVAL), sort_keys=True, ensure_ascii=True, separators=(",", ":")
    )
    return hashlib.sha256(text.encode("ascii")).hexdigest()[:_LENGTH]


def effective_status(recipe: Recipe) -> Literal["draft", "approved"]:
    """Approved only by a named person, on a named day, and for exactly these values."""
    named = bool(recipe.approved_by.strip() and recipe.approved_on.strip())
    same = recipe.approved_content == content_hash(recipe)
    return "approved" if recipe.status == "approved" and named and same else "draft"


def approved(recipe: Recipe, *, by: str, on: str) -> Recipe:
    """The recipe, approved as it stands."""
    content = content_hash(recipe)
    return replace(recipe, status="approved", approved_by=by, approved_on=on, approved_content=content)


def _plain(value: object, leave_out: frozenset[str] = frozenset()) -> object:
    """A value as JSON knows it, numbers as text of ten digits."""
    if isinstance(value, float):
        return f"{value + 0.0:.{_DIGITS}g}"
    if isinstance(value, tuple):
        return [_plain(one) for one in value]
    if is_dataclass(value):
        return {
            one.name: _plain(getattr(value, one.name))
            for one in fields(value)
            if one.name not in leave_out and getattr(value, one.name) != one.default
        }
    return value
