"""The hand: which places of the load are held, and how often the next move is made."""

from collections.abc import Iterable
from dataclasses import dataclass, field

from lineplanner.racking import Key
from lineplanner.report.picture import Scene

_MOST = 9999


@dataclass(slots=True)
class Hand:
    """The place last chosen, the places marked besides, and the count typed before a move."""

    key: Key | None = None
    marked: list[Key] = field(default_factory=list)
    typed: str = ""

    @property
    def keys(self) -> list[Key]:
        """The places in hand: those marked, else the one last chosen, which comes first among them too."""
        if not self.marked:
            return [] if self.key is None else [self.key]
        return sorted(self.marked, key=lambda key: key != self.key)

    def mark(self) -> None:
        """Mark the place last chosen, or no longer."""
        if self.key is None:
            return
        if self.key in self.marked:
            self.marked.remove(self.key)
        else:
            self.marked.append(self.key)

    def hold(self, keys: Iterable[Key]) -> None:
        """Hold these places from now on: after a move of several they stay marked."""
        held = list(keys)
        self.key = held[0] if held else None
        self.marked = held if len(held) > 1 else []

    def count(self, digit: str) -> str:
        """One more digit of the count; what is typed by now."""
        self.typed = str(min(int(self.typed + digit), _MOST)).lstrip("0")
        return self.typed

    def times(self) -> int:
        """How often the next move is made; then the count is used up."""
        times, self.typed = int(self.typed or 1), ""
        return times


def key_of(scene: Scene | None, owner: int | None) -> Key | None:
    """The place at which a part of the picture hangs."""
    if scene is None or owner is None or owner >= len(scene.parts):
        return None
    return scene.parts[owner].hang, scene.parts[owner].position


def owners_of(scene: Scene | None, keys: Iterable[Key]) -> list[int]:
    """The parts of the picture at some places: of two at one place both."""
    wanted = set(keys)
    return [] if scene is None else [p.owner for p in scene.parts if (p.hang, p.position) in wanted]
