"""Remembered results for records that never change. It lives here because every room may import inputs."""

import threading
from collections.abc import Callable, Hashable
from typing import Generic, TypeVar

Record = TypeVar("Record")
Result = TypeVar("Result")


class Memo(Generic[Record, Result]):
    """Results by the identity of a frozen record and a key; the oldest leave when it is full.

    A record is kept with its result, so that its identity cannot pass to another one meanwhile. The result
    may depend on nothing but record and key; whoever gets it must not change it.
    """

    __slots__ = ("_kept", "_lock", "_room")

    def __init__(self, room: int) -> None:
        self._room = room
        self._kept: dict[tuple[int, Hashable], tuple[Record, Result]] = {}
        self._lock = threading.Lock()

    def __len__(self) -> int:
        return len(self._kept)

    def get(self, record: Record, key: Hashable, make: Callable[[], Result]) -> Result:
        """The remembered result, or the one made now."""
        kept = self._kept.get((id(record), key))
        if kept is not None:
            return kept[1]
        result = make()
        with self._lock:
            while len(self._kept) >= self._room:
                del self._kept[next(iter(self._kept))]
            self._kept[(id(record), key)] = (record, result)
        return result
