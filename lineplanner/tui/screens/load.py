"""A load: what to set, whether it may run, what can hurt; below it one view at a time, all edits one key each."""

from __future__ import annotations

from collections.abc import Callable
from typing import ClassVar

from textual import on
from textual.app import ComposeResult
from textual.binding import Binding, BindingType
from textual.content import Content
from textual.widgets import Static

from lineplanner.errors import InputError, PlannerError
from lineplanner.files.problems import FileChangedError
from lineplanner.inputs.load import Load
from lineplanner.plan import Plan
from lineplanner.racking import changed_places, exchanged, one_less, one_more
from lineplanner.report.views import head_of, title_text
from lineplanner.report.words import error_text
from lineplanner.tui.edited import Ref
from lineplanner.tui.screens.ask import AskScreen, PickScreen, PromptScreen
from lineplanner.tui.screens.hanging import KEYS, NOTE, RACK, HangingScreen
from lineplanner.tui.screens.records import RecordList
from lineplanner.tui.screens.why import TextScreen, why_screen
from lineplanner.tui.session import Session
from lineplanner.tui.widgets.head import HeadLines
from lineplanner.tui.widgets.rack_view import RackView
from lineplanner.tui.widgets.text import tidy
from lineplanner.tui.widgets.viewbar import ViewBar
from lineplanner.tui.widgets.views import VIEWS, LoadView, view_named

WIDGETS = ("head", "viewbar", "views", "rack_view")
SET_FIGURE = "current.panel_set_A"
CHANGED = ("S saves this load under another name. R gives up what is not saved and reads the files again.",)


class LoadScreen(HangingScreen):
    """The plan of one load on one screen."""

    CSS_PATH = ["load.tcss", *(f"../widgets/{name}.tcss" for name in WIDGETS)]  # noqa: RUF012 - as textual does
    AUTO_FOCUS = ""
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("question_mark", "why", "why"),
        KEYS[0],
        Binding("u", "app.units", "units"),
        Binding("plus,equals_sign", "count(1)", "one more"),
        Binding("minus", "count(-1)", "one less"),
        *KEYS[1:],
        Binding("w", "swap", "swap part"),
        Binding("e", "edit", "edit"),
        Binding("L", "library", "library", show=False),
        Binding("z", "undo", "undo"),
        Binding("s", "save", "save"),
        Binding("c", "view('cautions')", "cautions"),
        Binding("q", "leave", "back"),
        Binding("y,Z", "redo", "redo", show=False),
        Binding("S", "save_as", "save under another name", show=False),
        Binding("Q", "app.quit", "quit the program", show=False),
        Binding("R", "revert", "back to what is saved", show=False),
        Binding("left_square_bracket", "entry(-1)", "entry before", show=False),
        Binding("right_square_bracket", "entry(1)", "next entry", show=False),
        *(
            Binding(str(n + 1), f"view('{name}')", f"view: {name}", show=False)
            for n, name in enumerate(VIEWS)
        ),
        Binding("escape,f10", "leave", "back", show=False),
    ]

    def __init__(self, session: Session, *, hanging: bool = False) -> None:
        super().__init__(session)
        self.begin_hanging = hanging
        self.title_line = Static(id="title", markup=False)
        self.head = HeadLines(id="head", ascii_only=session.style.ascii)
        self.bar = ViewBar(VIEWS, id="bar")
        self.views: dict[str, LoadView] = {}
        self.view = VIEWS[0]
        self.told: Plan | None = None
        self.unsaved = False
        self.hang = 0

    def compose(self) -> ComposeResult:
        yield self.title_line
        yield self.head
        yield self.bar
        yield self.hints

    async def on_mount(self) -> None:
        self.retell()
        await self.action_view(self.view)
        if self.begin_hanging:
            self.hang_on(on=True)

    # --- showing -----------------------------------------------------------------------------------------

    @property
    def body(self) -> LoadView | None:
        """The view in sight, once it is there."""
        return self.views.get(self.view)

    def retell(self, moved: frozenset[str] = frozenset()) -> None:
        """The plan as it is now; figures that the last edit moved carry a mark."""
        plan, style = self.session.plan, self.session.style
        self.told = plan
        self._title()
        self.head.show(head_of(plan, style, max(self.size.width - 2, 20)), moved)
        for view in self.views.values():
            view.stale = True
        if self.body is not None:
            self.body.tell(self.session, moved)

    def _title(self) -> None:
        dirty = bool(self.session.dirty)
        if dirty != self.unsaved:
            self.unsaved = dirty
            self.hints.redraw()
        unsaved = "   * not saved" if dirty else ""
        demo = "   (demo)" if self.session.packaged else ""
        room = max(self.size.width - len(unsaved) - len(demo) - 2, 20)
        text = f" {title_text(self.session.plan, room)}{unsaved}{demo}"
        title = Content(tidy(text, ascii_only=self.session.style.ascii))
        self.title_line.update(title, layout=False)

    def key_comes(self) -> None:
        super().key_comes()
        self.head.unmark()
        if self.body is not None:
            self.body.unmark()

    def on_resize(self) -> None:
        super().on_resize()
        self.call_after_refresh(self.retell)

    def on_screen_resume(self) -> None:
        if self.told is not None and self.session.name and self.told is not self.session.plan:
            self.retell(self.session.moved)

    # --- views -------------------------------------------------------------------------------------------

    async def action_view(self, name: str) -> None:
        """Another view; each is made when it is first asked for."""
        first = not self.views  # then the setpoints stay in sight
        for view in self.views.values():
            view.display = view is self.views.get(name)
        self.view = name
        if self.hanging and name != RACK:
            self.hang_on(on=False)
        self.show_bar()
        chosen = self.body
        if chosen is None:
            chosen = self.views[name] = view_named(name, ascii_only=self.session.style.ascii)
            await self.mount(chosen, before=self.hints)
            chosen.select(self.hang)
        if chosen.stale:
            chosen.tell(self.session)
        if not self.bar.has_focus:
            chosen.take_focus(scroll=not first)
        if not first and self.has_class("-low"):
            self.call_after_refresh(chosen.scroll_visible, animate=False, top=True)

    @on(ViewBar.Chosen)
    async def _bar(self, event: ViewBar.Chosen) -> None:
        await self.action_view(event.name)

    @on(LoadView.Picked)
    def _picked(self, event: LoadView.Picked) -> None:
        self.hang = event.hang

    @on(LoadView.WhyWanted)
    def _row_chosen(self, event: LoadView.WhyWanted) -> None:
        self.why(event.path)

    # --- why ---------------------------------------------------------------------------------------------

    def action_why(self) -> None:
        path = None if self.head.has_focus or self.body is None else self.body.path
        self.why(path or self.head.path or SET_FIGURE)

    def why(self, path: str) -> None:
        self.app.push_screen(why_screen(self.session.plan, path, self.session.style))

    # --- edits -------------------------------------------------------------------------------------------

    @property
    def load_ref(self) -> Ref:
        return ("load", self.session.name)

    @property
    def rack_view(self) -> RackView | None:
        return self.body if isinstance(self.body, RackView) else None

    @property
    def hinted_first(self) -> frozenset[str]:
        """With work that is not saved, how to save it and how to take it back."""
        if self.hanging:
            return super().hinted_first
        return frozenset({"save", "undo"}) if self.unsaved else frozenset()

    def show_bar(self) -> None:
        self.bar.show(self.view, NOTE if self.hanging else "")

    def edit(self, change: Callable[[Load], Load], label: str) -> bool:
        """One edit of the load; False where it is refused, and why in words."""
        try:
            record = change(self.session.case.load)
        except InputError as error:
            self.say(error_text(error, self.session.style))
            return False
        problems = self.session.set_record(self.load_ref, record, label)
        if problems:
            self.say("; ".join(problems), grave=True)
            return False
        self.retell(self.session.moved)
        return True

    def action_count(self, step: int) -> None:
        place, rack = self.hang, self.session.case.rack
        if step > 0:
            self.edit(lambda load: one_more(load, rack, place), "one part more")
        else:
            self.edit(lambda load: one_less(load, place), "one part less")

    def action_entry(self, step: int) -> None:
        self.hang = (self.hang + step) % len(self.session.case.load.hangs)
        for view in self.views.values():
            view.select(self.hang)
        where = f"entry {self.hang + 1} of {len(self.session.case.load.hangs)}"
        self.say(f"{where}: {self.session.case.load.hangs[self.hang].part}")

    def action_swap(self) -> None:
        stems = list(self.session.library.stems("part"))
        here = self.session.case.load.hangs[self.hang].part
        choices = [(stem, stem) for stem in stems if stem != here]
        picker = PickScreen(f"Part in place of {here}", choices, ascii_only=self.session.style.ascii)
        self.app.push_screen(picker, self._swap)

    def _swap(self, part: str | None) -> None:
        if part is not None:
            place = self.hang
            self.edit(
                lambda load: exchanged(load, place, part),
                f"{part} in place of {self.session.case.load.hangs[place].part}",
            )

    def action_library(self) -> None:
        from lineplanner.tui.screens.library import LibraryScreen

        self.app.push_screen(LibraryScreen(self.session))

    def action_edit(self) -> None:
        self.app.push_screen(RecordList(self.session))

    def action_undo(self) -> None:
        if self._at_home(self.session.undone_elsewhere, "taken back"):
            self._back(self.session.undo, "undone")

    def action_redo(self) -> None:
        if self._at_home(self.session.redone_elsewhere, "made again"):
            self._back(self.session.redo, "done again")

    def _at_home(self, elsewhere: str, word: str) -> bool:
        """Whether a step stays at this load; a step elsewhere would change what nobody looks at."""
        if elsewhere:
            self.say(f"the last change was made at {elsewhere}: open that load, then it can be {word}")
        return not elsewhere

    def _back(self, step: Callable[[], str | None], word: str) -> None:
        """A step through what was done; while hanging, in hand is then what it put back."""
        before = self.session.case.load
        label = step()
        if self.hanging and self.rack_view is not None:
            self.rack_view.hand.hold(changed_places(before, self.session.case.load)[:1] or self.hand.keys)
        self._step(label, word)

    def _step(self, label: str | None, word: str) -> None:
        self.hang = min(self.hang, len(self.session.case.load.hangs) - 1)
        self.retell(self.session.moved if label else frozenset())
        self.say(f"nothing can be {word}" if label is None else f"{word}: {label}")

    # --- saving and leaving ------------------------------------------------------------------------------

    def action_save(self) -> None:
        if self._saved():
            self.retell()

    def _saved(self) -> bool:
        """Whether everything is on disk now."""
        try:
            paths = self.session.save()
        except FileChangedError as error:
            said = error_text(error, self.session.style).splitlines()
            self.tell("Not saved", [*said, "", *CHANGED])
            return False
        except PlannerError as error:
            self.cannot(error)
            return False
        names = ", ".join(path.name for path in paths)
        text = f"saved: {names}" if paths else "nothing to save: all of it is on disk"
        beside = ", ".join(f"{kind} {stem}" for kind, stem in self.session.changed_beside())
        if beside:
            text += f"; {beside} changed on disk meanwhile: open the load again"
        self.say(text, grave=bool(beside))
        return True

    def action_save_as(self) -> None:
        prompt = PromptScreen(
            "Save this load under the name", self._save_as, ascii_only=self.session.style.ascii
        )
        self.app.push_screen(prompt, self._saved_as)

    def _save_as(self, stem: str) -> str | None:
        try:
            self.session.save_as(stem)
        except PlannerError as error:
            return error_text(error, self.session.style)
        return None

    def _saved_as(self, stem: str | None) -> None:
        if stem is not None:
            self.retell()
            self.say(f"saved as {stem}; this is the load in sight now")

    def action_revert(self) -> None:
        if not self.session.dirty:
            self.say("nothing to take back: all of it is on disk")
            return
        answers = (("r", "take all changes back to what is saved", "revert"), ("q", "leave them", "stay"))
        self.ask("Take back what is not saved?", answers, self._revert)

    def _revert(self, answer: str | None) -> None:
        if answer != "revert":
            return
        if self._given_up():
            self._step("to what is saved", "back")

    def _given_up(self) -> bool:
        """Give up what is not saved. False where what is on disk cannot be planned any more: told, then left."""
        try:
            self.session.revert()
        except PlannerError as error:
            said = error_text(error, self.session.style).splitlines()
            text = TextScreen("On disk by now:", said, ascii_only=self.session.style.ascii)
            self.app.push_screen(text, lambda _: self.dismiss(None))
            return False
        return True

    def ask(
        self, question: str, answers: tuple[tuple[str, str, str], ...], then: Callable[[str | None], None]
    ) -> None:
        """A question about what is not saved."""
        lines = [f"{kind} {stem}" for kind, stem in self.session.dirty]
        self.app.push_screen(AskScreen(question, lines, answers, ascii_only=self.session.style.ascii), then)

    def action_leave(self) -> None:
        if not self.session.dirty:
            self.dismiss(None)
            return
        answers = (
            ("s", "save it, then go", "save"),
            ("d", "discard it", "discard"),
            ("q", "stay here", "stay"),
        )
        self.ask("Not saved:", answers, self._leave)

    def _leave(self, answer: str | None) -> None:
        if (answer == "discard" and self._given_up()) or (answer == "save" and self._saved()):
            self.dismiss(None)
