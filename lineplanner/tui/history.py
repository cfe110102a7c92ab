"""Undo without limit: every state of a session, and which one counts."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from types import MappingProxyType

from lineplanner.tui.edited import Drafts


@dataclass(frozen=True, slots=True)
class State:
    """The files as edited after one edit: label says what it changed, load where it was made and where it led."""

    drafts: Drafts
    label: str = ""
    came_from: str = ""
    load: str = ""


@dataclass(slots=True)
class History:
    """The states in order; those after the one that counts can be redone until an edit takes their place."""

    states: tuple[State, ...] = field(default_factory=lambda: (State(MappingProxyType({})),))
    at: int = 0

    @property
    def drafts(self) -> Drafts:
        """The files that were edited, as they count now."""
        return self.states[self.at].drafts

    @property
    def touched(self) -> Mapping[tuple[str, str], None]:
        """Every file that any state has a draft of."""
        return {ref: None for state in self.states for ref in state.drafts}

    def add(self, state: State) -> None:
        """A new state after the one that counts."""
        self.states = (*self.states[: self.at + 1], state)
        self.at += 1

    @property
    def undone(self) -> tuple[State, State] | None:
        """The state to take back, and the one before it; None at the start."""
        return (self.states[self.at], self.states[self.at - 1]) if self.at else None

    @property
    def redone(self) -> State | None:
        """The state to take up again; None at the end."""
        return self.states[self.at + 1] if self.at + 1 < len(self.states) else None
