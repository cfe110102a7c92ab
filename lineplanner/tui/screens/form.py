"""The form of one record: every field with its value, changed in place, with the setpoints above."""

from __future__ import annotations

from collections.abc import Callable
from typing import ClassVar

from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.containers import Horizontal, Vertical
from textual.content import Content
from textual.events import MouseScrollDown, MouseScrollUp
from textual.widgets import Input, Static

from lineplanner.inputs.approval import effective_status
from lineplanner.inputs.recipe import Recipe
from lineplanner.report.form_help import figure_of, help_lines
from lineplanner.report.setpoints import setpoint_lines
from lineplanner.report.views import head_of
from lineplanner.tui.edited import Ref
from lineplanner.tui.screens.base import PlannerScreen
from lineplanner.tui.session import Session
from lineplanner.tui.sheet import Sheet
from lineplanner.tui.widgets.form_lines import FormLines
from lineplanner.tui.widgets.head import HeadLines
from lineplanner.tui.widgets.quantity_field import QuantityField
from lineplanner.tui.widgets.text import tidy

_LOW = 16  # rows of a terminal below which verdict and caution give way to the fields
_SLACK = 2  # lines that stay in view below the one with the cursor


class Finder(Input):
    """The search over the fields; down, tab or Enter goes to them."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("enter,down,tab,up,shift+tab", "screen.to_fields", "to the fields", show=False),
    ]


class RecordForm(PlannerScreen):
    """All fields of a record. One input moves through them; leaving a field gives what stands in it."""

    CSS_PATH = "form.tcss"
    AUTO_FOCUS = "Entry"
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("f10", "close", "close", priority=True),
        Binding("f2", "help", "help"),
        Binding("ctrl+f", "find", "find", priority=True),
        Binding("ctrl+n", "add", "add", priority=True),
        Binding("f9", "remove", "take out"),
        Binding("f4", "approve", "approve"),
        Binding("f7", "undo", "undo", priority=True),
        Binding("f8", "redo", "redo", priority=True),
        Binding("f3", "why", "why"),
        Binding("ctrl+w,escape", "close", "close", show=False, priority=True),
    ]

    def __init__(self, session: Session, ref: Ref) -> None:
        super().__init__(session)
        self.ref = ref
        self.sheet = Sheet(session, ref)
        ascii_only = session.style.ascii
        self.title_line = Static(id="title", markup=False)
        self.head = HeadLines(ascii_only=ascii_only)
        self.finder = Finder(compact=True)
        self.field = QuantityField(session.style)
        self.above = FormLines("above", ascii_only=ascii_only)
        self.below = FormLines("below", ascii_only=ascii_only)
        self._top = 0

    def compose(self) -> ComposeResult:
        yield self.title_line
        yield self.head
        with Horizontal(id="search"):
            yield Static("find: ", markup=False)
            yield self.finder
        with Vertical(id="fields"):
            yield self.above
            yield self.field
            yield self.below
        yield self.hints

    def on_mount(self) -> None:
        for one in self.query(Input):
            one.cursor_blink = False
        self.show()

    def on_resize(self) -> None:
        super().on_resize()
        self._head()
        self.call_after_refresh(self._place)

    def on_screen_resume(self) -> None:
        self.retell()

    # --- showing -----------------------------------------------------------------------------------------

    def retell(self) -> None:
        """Read the record again; a text that is being typed stays."""
        line, typed = self.sheet.line, self.field.entry.value
        here = self._here
        self.sheet.refresh()
        self.show()
        if line is not None and line.typed and typed != line.text and here == self._here:
            self.field.entry.value = typed
            self.field.entry.cursor_position = len(typed)

    def finish(self) -> tuple[str, ...]:
        """Give what is being typed, as before leaving the program; what of the form is then not in force."""
        self.show(*self._give())
        return self.sheet.unfinished

    def show(self, *notes: str) -> None:
        """Everything anew, in the same breath as the change; notes stand first under the field."""
        self._head()
        if self.finder.value != self.sheet.search:
            with self.finder.prevent(Input.Changed):
                self.finder.value = self.sheet.search
        own = (self.sheet.note,) if self.sheet.note else ()
        self.field.show(self.sheet.line, self.session.style, *notes, *own)
        self._place()

    def _head(self) -> None:
        (kind, stem), record = self.ref, self.sheet.record
        status = (
            f"   rev {record.revision} {effective_status(record).upper()}"
            if isinstance(record, Recipe)
            else ""
        )
        unsaved = "   * not saved" if self.ref in self.session.dirty else ""
        title = tidy(f"{kind} {stem}{status}{unsaved}   {record.name}", ascii_only=self.session.style.ascii)
        self.title_line.update(Content(f" {title}"), layout=False)
        self.head.show(
            head_of(self.session.plan, self.session.style, max(self.size.width - 2, 20)), self.session.moved
        )
        if self.size.height < _LOW:
            self.head.styles.height = 1

    def _place(self) -> None:
        """Lines above and below the field, so that it is in view with a little room below."""
        sheet, room = self.sheet, max(self.query_one("#fields").size.height, 4)
        at = sheet.at
        own = min(self.field.lines, room)
        self._top = max(min(self._top, at), at - max(room - own - _SLACK, 0), 0)
        above = sheet.lines[self._top : at]
        below = sheet.lines[at + 1 : at + 1 + room]
        self.above.show(above, self._top, len(above))
        self.below.show(below, at + 1, len(below))

    def key_comes(self) -> None:
        super().key_comes()
        self.head.unmark()

    # --- moving and giving -------------------------------------------------------------------------------

    def _give(self, *, again: bool = False) -> list[str]:
        """Give what stands in the field; again: also what was refused before. Notes: what the setpoints were."""
        line, text = self.sheet.line, self.field.entry.value
        untouched = line is not None and text == line.text and not (again and line.refused)
        if line is None or not line.typed or (untouched and line.draft is None):
            return []
        before = self._setpoints()
        self.sheet.give(text)
        return [f"setpoints were: {before}"] if self._setpoints() != before else []

    def _setpoints(self) -> str:
        return setpoint_lines(self.session.plan, self.session.style, 1000)[0].removeprefix("SET").strip()

    def action_take(self) -> None:
        self.show(*self._give(again=True))

    def action_step(self, step: int) -> None:
        here = self._here
        notes = self._give()
        if here == self._here and not self._moved(step) and step < 0:
            self.finder.focus()
        self.show(*notes)

    @property
    def _here(self) -> tuple[object, ...] | None:
        line = self.sheet.line
        return None if line is None else (*line.row.path, line.draft)

    def _moved(self, step: int) -> bool:
        """Move some lines up or down; False where not even the first of them was to be had."""
        moves = [self.sheet.move(1 if step > 0 else -1) for _ in range(abs(step))]
        return moves[0]

    def on_form_lines_picked(self, event: FormLines.Picked) -> None:
        event.stop()
        lines = self.sheet.lines
        picked = lines[event.at] if event.at < len(lines) else None
        notes = self._give()
        self.sheet.move_to(event.at if picked not in self.sheet.lines else self.sheet.lines.index(picked))
        self.show(*notes)
        self.field.entry.focus()

    def on_mouse_scroll_down(self, event: MouseScrollDown) -> None:
        event.stop()
        self.action_step(3)

    def on_mouse_scroll_up(self, event: MouseScrollUp) -> None:
        event.stop()
        self.action_step(-3)

    # --- search ------------------------------------------------------------------------------------------

    def action_find(self) -> None:
        self.show(*self._give())
        self.finder.focus()

    def on_input_changed(self, event: Input.Changed) -> None:
        if isinstance(event.input, Finder):
            self.sheet.find(event.value)
            self.show()

    def action_to_fields(self) -> None:
        self.field.entry.focus()

    # --- entries, help, why ------------------------------------------------------------------------------

    def action_add(self) -> None:
        notes = self._give()
        reason = self.sheet.add()
        self.show(*notes)
        if reason:
            self.say(reason)
        self.field.entry.focus()

    def action_remove(self) -> None:
        from lineplanner.tui.screens.ask import AskScreen

        what = self.sheet.removable()
        if not what:
            self.say("nothing can be taken out here")
            return
        answers = [("y", "take it out", "yes"), ("n", "leave it as it is", "no")]
        question = AskScreen(f"Take out {what}?", (), answers, ascii_only=self.session.style.ascii)
        self.app.push_screen(question, self._remove_if)

    def _remove_if(self, answer: str | None) -> None:
        if answer != "yes":
            return
        before = self._setpoints()
        reason = self.sheet.remove()
        self.show(*([f"setpoints were: {before}"] if self._setpoints() != before else []))
        if reason:
            self.say(f"not taken out: {reason}", grave=True)

    def action_help(self) -> None:
        if self.sheet.line is not None:
            row, record = self.sheet.line.row, self.sheet.record
            self.tell(row.label, help_lines(row, record, self.session.style)[1:])

    def action_why(self) -> None:
        from lineplanner.tui.screens.why import why_screen

        if self.sheet.line is not None:
            figure = figure_of(self.sheet.line.row.path)
            self.app.push_screen(why_screen(self.session.plan, figure, self.session.style))

    # --- approval, undo, closing -------------------------------------------------------------------------

    def check_action(self, action: str, parameters: tuple[object, ...]) -> bool | None:
        if action == "approve":
            return self.ref[0] == "recipe"
        return super().check_action(action, parameters)

    def action_approve(self) -> None:
        from lineplanner.tui.screens.ask import PromptScreen

        self.show(*self._give())
        if self.sheet.unfinished:
            self.say(
                f"not approved: {', '.join(self.sheet.unfinished)} is typed but not in force", grave=True
            )
            return
        question = "Who approves this recipe as it stands? Type the name"
        self.app.push_screen(
            PromptScreen(question, self._approved_by, ascii_only=self.session.style.ascii), self._say_approved
        )

    def _approved_by(self, name: str) -> str | None:
        return "; ".join(self.session.approve(self.ref[1], name)) or None

    def _say_approved(self, name: str | None) -> None:
        self.retell()
        self.say("not approved" if name is None else f"approved by {name}")

    def action_undo(self) -> None:
        self._give()
        dropped = self.sheet.drop()
        if self.sheet.line is not None and self.sheet.line.draft is not None:
            self.show()
            self.say("this entry is not in force yet: F9 takes it out")
        elif dropped:
            self.show()
            self.say(f"dropped: {dropped}")
        else:
            self._back("undone", "nothing to undo", self.session.undo, self.session.undone_elsewhere)

    def action_redo(self) -> None:
        self._back("done again", "nothing to do again", self.session.redo, self.session.redone_elsewhere)

    def _back(self, word: str, nothing: str, step: Callable[[], str | None], elsewhere: str) -> None:
        if elsewhere:
            self.say(f"that change was made at {elsewhere}: open that load for it")
            return
        label = step()
        self.sheet.refresh()
        self.show()
        self.say(f"{word}: {label}" if label else nothing)

    def action_close(self) -> None:
        left = self.finish()
        if left:
            self.app.notify(
                f"{', '.join(left)}: typed but not in force. The form keeps it for the next time",
                severity="warning",
                markup=False,
            )
        self.dismiss(None)
