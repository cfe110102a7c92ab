"""What is going on in a form, without Textual: the line one is on, what was typed and refused, entries under way."""

from dataclasses import dataclass, field
from functools import cache
from typing import Any
from weakref import WeakKeyDictionary

from lineplanner.inputs.declared import Path
from lineplanner.report.form_entries import (
    Draft,
    completed,
    draft_for,
    draft_of_form,
    still_fits,
    without,
)
from lineplanner.report.form_help import completed_text, fitting_rows, too_long
from lineplanner.report.form_names import names_for
from lineplanner.report.form_rows import Form, Heading, Known, Row
from lineplanner.report.forms import form_of
from lineplanner.tui.edited import Ref
from lineplanner.tui.session import Session


@dataclass(frozen=True, slots=True)
class Line:
    """One line of the form. refused is the reason why its text is not in force; draft says that nothing of it is."""

    row: Row | Heading
    text: str = ""
    refused: str = ""
    draft: Draft | None = None

    @property
    def typed(self) -> bool:
        """Whether something can be typed here."""
        return isinstance(self.row, Row) and not self.row.locked


@dataclass
class _Left:
    """What was typed and is not in force; kept when the form is left, so that nothing is lost."""

    refused: dict[Path, tuple[str, str]] = field(default_factory=dict)
    draft: Draft | None = None
    texts: dict[Path, str] = field(default_factory=dict)
    in_draft: dict[Path, str] = field(default_factory=dict)
    reason: str = ""

    def begin(self, draft: Draft | None) -> None:
        """Another draft, or none."""
        self.draft, self.texts, self.in_draft, self.reason = draft, {}, {}, ""

    def moved_up(self, gone: Path) -> None:
        """An entry is gone: what was typed in it goes too, and what was typed in later ones follows them."""
        *over, at = gone
        kept = {}
        for path, text in self.refused.items():
            place = path[len(over)] if path[: len(over)] == tuple(over) and len(path) > len(over) else None
            if place == at:
                continue
            later = isinstance(at, int) and isinstance(place, int) and place > at
            kept[(*over, int(place or 0) - 1, *path[len(gone) :]) if later else path] = text
        self.refused = kept


_LEFT: WeakKeyDictionary[Any, dict[Ref, _Left]] = WeakKeyDictionary()


class Sheet:
    """The lines of one record's form and where one is in them."""

    def __init__(self, session: Session, ref: Ref) -> None:
        self.session, self.ref = session, ref
        self.search = ""
        self.at = 0
        self._stems = cache(session.names)
        self.form = Form("", ())
        self.lines: tuple[Line, ...] = ()
        self._left = _LEFT.setdefault(session, {}).setdefault(ref, _Left())
        self.refresh()
        self.move_to(0)

    # --- lines -------------------------------------------------------------------------------------------

    @property
    def record(self) -> Any:
        return self.session.record(self.ref)

    @property
    def line(self) -> Line | None:
        """The line one is on; None where a search finds nothing."""
        return self.lines[self.at] if self.lines else None

    def refresh(self) -> None:
        """Read the record again, after any change of it; the place is kept."""
        here = self.line and (self.line.row.path, self.line.draft is None)
        known = self.known()
        self.form = form_of(self.record, known=known)
        self._forget_what_is_gone()
        self.lines = tuple(self._lines(known))
        places = [(one.row.path, one.draft is None) for one in self.lines]
        self.at = places.index(here) if here in places else max(min(self.at, len(places) - 1), 0)

    def _forget_what_is_gone(self) -> None:
        """Texts for fields that an undo or a removal took away."""
        left, paths = self._left, {row.path for row in self.form.values}
        left.refused = {path: text for path, text in left.refused.items() if path in paths}
        if left.draft is not None and not still_fits(self.record, left.draft):
            left.begin(None)

    def known(self) -> Known:
        session, (kind, _) = self.session, self.ref
        case = session.case
        return Known(
            style=session.style,
            stems=self._stems,
            names=names_for(kind, case),
            recipe=case.recipe if kind == "load" else None,
            text_of=lambda path: session.text_of(self.ref, path),
        )

    def _lines(self, known: Known) -> list[Line]:
        left = self._left
        found = [self._line(row) for row in fitting_rows(self.form, self.search)]
        if left.draft is None:
            return found
        draft = [Line(Heading(left.draft.place, self._draft_label(), removes=True), draft=left.draft)]
        draft += [
            Line(row, left.texts.get(row.path, ""), left.in_draft.get(row.path, ""), left.draft)
            for row in left.draft.rows(known, level=1)
        ]
        place = left.draft.place[:-1] if left.draft.place else ("form",)
        last = max(
            (i for i, one in enumerate(found) if one.row.path[: len(place)] == place), default=len(found) - 1
        )
        return [*found[: last + 1], *draft, *found[last + 1 :]]

    def _line(self, row: Row | Heading) -> Line:
        if isinstance(row, Heading):
            return Line(row)
        text, reason = self._left.refused.get(row.path, (row.text, ""))
        return Line(row, text, reason)

    def _draft_label(self) -> str:
        left = self._left
        assert left.draft is not None
        return f"new: {left.draft.label} - not in force yet"

    @property
    def note(self) -> str:
        """On an entry under way: what it still lacks."""
        line, left = self.line, self._left
        if line is None or line.draft is None or left.draft is None:
            return ""
        done = completed(self.record, left.draft, left.texts, self.session.style.system)
        if done.missing:
            return f"{self._draft_label()}, still missing: {', '.join(done.missing)}"
        return f"{self._draft_label()}: {left.reason}" if left.reason else self._draft_label()

    # --- moving ------------------------------------------------------------------------------------------

    def move(self, step: int) -> bool:
        """To the next line in a direction that one can stand on; False at the end."""
        at = self.at + step
        while 0 <= at < len(self.lines):
            if stands(self.lines[at]):
                self.at = at
                return True
            at += 1 if step > 0 else -1
        return False

    def move_to(self, at: int) -> None:
        """To a line, or the nearest below it that one can stand on."""
        self.at = max(0, min(at, len(self.lines) - 1))
        if self.lines and not stands(self.lines[self.at]) and not self.move(1):
            self.move(-1)

    def find(self, text: str) -> None:
        """Show only the fields that hold the words of a text."""
        self.search = text
        self.refresh()
        first = next((at for at, one in enumerate(self.lines) if isinstance(one.row, Row)), 0)
        self.move_to(first if text.strip() else self.at)

    # --- giving values -----------------------------------------------------------------------------------

    def give(self, text: str) -> str:
        """Give the line one is on a text. Returns the reason of a refusal; the old value is then in force."""
        line = self.line
        if line is None or not isinstance(line.row, Row) or line.row.locked:
            return ""
        text = completed_text(line.row, text)
        if line.draft is not None:
            return self._give_draft(line.row, text)
        if text == line.row.text.strip():
            self._left.refused.pop(line.row.path, None)
            self.refresh()
            return ""
        reason = self._set(line.row, text)
        if reason:
            self._left.refused[line.row.path] = (text, reason)
        else:
            self._left.refused.pop(line.row.path, None)
        self.refresh()
        return reason

    def _set(self, row: Row, text: str) -> str:
        if self.ref[0] == "part" and row.path == ("form",):
            return self._begin_form(row, text)
        return too_long(row, text) or self.session.set_value(self.ref, row.path, text) or ""

    def _begin_form(self, row: Row, text: str) -> str:
        draft = draft_of_form(self.record, text)
        return f"Choose one of {', '.join(row.choices)}" if draft is None else self._begin(draft)

    def _begin(self, draft: Draft) -> str:
        if self._left.draft is not None:
            return f"finish {self._left.draft.label} first, or take it out with F9"
        self._left.begin(draft)
        self.search = ""
        self.refresh()
        first = next(i for i, one in enumerate(self.lines) if one.draft is not None)
        self.move_to(first + 1)
        return ""

    def _give_draft(self, row: Row, text: str) -> str:
        left = self._left
        assert left.draft is not None
        left.texts[row.path] = text
        done = completed(self.record, left.draft, left.texts, self.session.style.system)
        left.reason, left.in_draft = "", dict(done.refused or {})
        if done.record is not None:
            label = left.draft.label if left.draft.form else f"add {left.draft.label}"
            left.reason = "; ".join(self.session.set_record(self.ref, done.record, label))
            if not left.reason:
                left.begin(None)
        self.refresh()
        return left.in_draft.get(row.path, left.reason)

    def drop(self) -> str:
        """Drop the refused text of the line one is on, which an undo means first; the text, "" if there is none."""
        line = self.line
        if line is None or not line.refused or line.draft is not None:
            return ""
        text, _ = self._left.refused.pop(line.row.path)
        self.refresh()
        return text

    # --- entries -----------------------------------------------------------------------------------------

    def add(self) -> str:
        """Begin an entry of the list one is in, or the group one is on; says why not."""
        line = self.line
        if line is None:
            return "nothing can be added here"
        row = line.row
        path = row.path if isinstance(row, Heading) else row.list_at
        draft = draft_for(self.record, path) if path is not None and line.draft is None else None
        return "nothing can be added here" if draft is None else self._begin(draft)

    def removable(self) -> str:
        """What F9 would take out, in words; empty where there is nothing."""
        line = self.line
        if line is None:
            return ""
        if line.draft is not None:
            return f"{line.draft.label} (not in force yet)"
        path = self._removed_path(line.row)
        labels = {one.path: one.label for one in self.form.rows if isinstance(one, Heading)}
        if path is None or path in labels:
            return labels.get(path or (), "")
        return f"{labels[path[:-1]]} {line.row.label.partition(',')[0]}"  # a pair has no heading of its own

    def remove(self) -> str:
        """Take out the entry or group one is in; returns the reason of a refusal."""
        line, left = self.line, self._left
        if line is None:
            return ""
        if line.draft is not None:
            left.begin(None)
            self.refresh()
            self.move_to(self.at)
            return ""
        path = self._removed_path(line.row)
        if path is None:
            return "nothing can be taken out here"
        changed = without(self.record, path)
        reason = "; ".join(self.session.set_record(self.ref, changed, f"take out {self.removable()}"))
        if not reason:
            left.moved_up(path)
        self.refresh()
        over = path[:-1] if isinstance(path[-1], int) else path
        self.move_to(next((at for at, one in enumerate(self.lines) if one.row.path == over), self.at))
        return reason

    def _removed_path(self, row: Row | Heading) -> Path | None:
        if isinstance(row, Heading):
            return row.path if row.removes else None
        return row.entry

    @property
    def unfinished(self) -> tuple[str, ...]:
        """What was typed and is not in force."""
        found = [row.label for row in self.form.values if row.path in self._left.refused]
        draft = self._left.draft
        return (*found, *([f"new: {draft.label}"] if draft is not None else []))


def stands(line: Line) -> bool:
    """Whether one can stand on a line: on values, and on headings where something can be added or taken out."""
    return isinstance(line.row, Row) or line.row.adds or line.row.removes
