"""What every screen of ours can do: say something on the last line, list its commands, tell a text in full."""

from __future__ import annotations

from collections.abc import Iterable
from typing import TYPE_CHECKING, Any, ClassVar

from textual.actions import parse
from textual.app import App
from textual.binding import Binding, BindingType
from textual.dom import DOMNode
from textual.message import Message
from textual.screen import Screen

from lineplanner.errors import PlannerError
from lineplanner.report.words import error_text
from lineplanner.tui.screens.ask import PickScreen
from lineplanner.tui.screens.why import TextScreen
from lineplanner.tui.widgets.hints import Hints, key_said

if TYPE_CHECKING:
    from lineplanner.tui.session import Session

TOO_SMALL = (
    "small terminal: made for 80 columns and 24 rows, this one has {width} and {height}; everything scrolls"
)
LEAST = (80, 24)


class PlannerScreen(Screen[None]):
    """A screen with a session behind it and hints at its foot."""

    HORIZONTAL_BREAKPOINTS: list[tuple[int, str]] | None = [  # noqa: RUF012 - as textual declares it
        (0, "-narrow"),
        (100, "-wide"),
        (160, "-xwide"),
    ]
    VERTICAL_BREAKPOINTS: list[tuple[int, str]] | None = [(0, "-low"), (20, "-high")]  # noqa: RUF012
    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("ctrl+p", "commands", "all commands", show=False, priority=True),
    ]

    FIRST_HINTS: ClassVar[tuple[tuple[str, str], ...]] = ()

    class Fault(Message):
        """Something went wrong that is the program's own fault."""

        def __init__(self, what: str, error: BaseException) -> None:
            super().__init__()
            self.what, self.error = what, error

    def __init__(self, session: Session) -> None:
        super().__init__(classes="-ascii" if session.style.ascii else None)
        self.session = session
        self.hints = Hints(self.FIRST_HINTS, ascii_only=session.style.ascii)

    def retell(self) -> None:
        """Word everything anew, in the session's style."""

    def key_comes(self) -> None:
        """A key was pressed, before anybody takes it: what was said for the last one goes."""
        self.hints.say("")

    def say(self, text: str, *, grave: bool = False) -> None:
        """A sentence on the last line until the next key; one that does not fit is told in full."""
        if grave and len(text) > self.size.width - 2:
            self.tell("", text.splitlines())
        else:
            self.hints.say(text, grave=grave)

    def tell(self, title: str, lines: Iterable[str]) -> None:
        """A text in full, over this screen."""
        self.app.push_screen(TextScreen(title, lines, ascii_only=self.session.style.ascii))

    def cannot(self, error: PlannerError) -> None:
        """What could not be done, in words."""
        self.say(error_text(error, self.session.style), grave=True)

    def on_resize(self) -> None:
        width, height = self.size
        if width < LEAST[0] or height < LEAST[1]:
            self.hints.say(TOO_SMALL.format(width=width, height=height))
        elif self.hints.said.startswith(TOO_SMALL[:14]):
            self.hints.say("")

    # --- all commands ------------------------------------------------------------------------------------

    def commands(self) -> list[tuple[str, Any]]:
        """Every command of ours in force here, as title and what runs it: of the screen first, then of its widgets."""
        focused = [] if self.focused is None else list(self.focused.ancestors_with_self)
        widgets = [node for node in focused if node is not self and not isinstance(node, App)]
        found: dict[str, tuple[str, Any]] = {}
        for node in (self, self.app, *widgets):
            for binding in _own_bindings(node):
                name, parameters = _parsed(binding.action)
                if binding.description and name != "commands" and node.check_action(name, parameters):
                    keys = ", ".join(key_said(key.strip()) for key in binding.key.split(","))
                    title = f"{binding.description}   {keys}"
                    found.setdefault(binding.description, (title, (binding.action, node)))
        return list(found.values())

    def action_commands(self) -> None:
        picker = PickScreen("Command", self.commands(), ascii_only=self.session.style.ascii)
        self.app.push_screen(picker, self._run_command)

    def _run_command(self, chosen: tuple[str, Any] | None) -> None:
        if chosen is not None:
            action, node = chosen
            self.call_later(self.app.run_action, action, node)


def _own_bindings(node: DOMNode) -> list[Binding]:
    """The bindings that our classes declare; Textual's own on fields and boxes are no commands."""
    ours = [cls for cls in type(node).__mro__ if cls.__module__.startswith("lineplanner.")]
    return [one for cls in ours for one in vars(cls).get("BINDINGS", ()) if isinstance(one, Binding)]


def _parsed(action: str) -> tuple[str, tuple[object, ...]]:
    """The name of an action without its target, and its parameters."""
    _, name, parameters = parse(action)
    return name, parameters
