"""An app on a pseudo-terminal: keys in, the time until the answer is there, bytes out. POSIX alone."""

import os
import select
import subprocess
import time
from collections.abc import Iterator
from dataclasses import dataclass

_WAIT = 10.0  # seconds until a screen that does not answer is given up
_QUIET = 0.05  # seconds without output after which a repaint is over
_SETTLED = 0.12  # the same where a repaint may come in pieces


@dataclass(frozen=True, slots=True)
class Repaint:
    """Seconds from a key to the first and to the last byte of what it changed, and what was sent."""

    first: float
    last: float
    sent: bytes


class Screen:
    """An app on a pseudo-terminal of its own."""

    def __init__(self, command: list[str], size: tuple[int, int], own: dict[str, str] | None = None) -> None:
        import fcntl
        import pty
        import struct
        import termios

        self.master, slave = pty.openpty()
        fcntl.ioctl(slave, termios.TIOCSWINSZ, struct.pack("HHHH", size[1], size[0], 0, 0))
        env = {**os.environ, "TERM": "xterm-256color", "COLORTERM": "truecolor", "TEXTUAL_ANIMATIONS": "none"}
        self.all = b""
        self.child = subprocess.Popen(
            command, stdin=slave, stdout=slave, stderr=slave, env=env | (own or {}), start_new_session=True
        )
        os.close(slave)

    def press(self, key: str, answer: str) -> tuple[float, int]:
        """Seconds until the answer is on the terminal, and how many bytes the repaint took in all."""
        begin = time.perf_counter()
        os.write(self.master, key.encode())
        size = self._until(answer)
        took = time.perf_counter() - begin
        return took, size + sum(len(more) for more in self._read(_QUIET))

    def repaint(self, key: str) -> Repaint:
        """What a key does to the terminal, until nothing more comes."""
        begin = time.perf_counter()
        os.write(self.master, key.encode())
        sent, times = b"", []
        while select.select([self.master], [], [], _SETTLED if times else _WAIT)[0]:
            sent += os.read(self.master, 1 << 16)
            times.append(time.perf_counter() - begin)
        if not times:
            raise TimeoutError(key)
        return Repaint(times[0], times[-1], sent)

    def type(self, keys: str) -> None:
        """Keys whose repaint nobody measures."""
        os.write(self.master, keys.encode())
        self.settle(2 * _SETTLED)

    def settle(self, seconds: float) -> None:
        """Read on for a while."""
        end = time.perf_counter() + seconds
        while time.perf_counter() < end:
            self.drain()

    def seen(self, text: str) -> float:
        """The time at which a text was on the terminal for the first time."""
        end = time.perf_counter() + _WAIT
        while text.encode() not in self.all:
            if time.perf_counter() > end:
                raise TimeoutError(text)
            self.drain()
        return time.perf_counter()

    def drain(self) -> None:
        """Take what there is to read, waiting a moment for it."""
        if select.select([self.master], [], [], 0.01)[0]:
            self.all += os.read(self.master, 1 << 16)

    def close(self) -> None:
        """End the app."""
        self.child.kill()
        self.child.wait()
        os.close(self.master)

    def _until(self, answer: str) -> int:
        seen, end = b"", time.perf_counter() + _WAIT
        while answer.encode() not in seen:
            if time.perf_counter() > end:
                raise TimeoutError(answer)
            for more in self._read(0.01):
                seen += more
                if answer.encode() in seen:
                    break
        return len(seen)

    def _read(self, quiet: float) -> Iterator[bytes]:
        while select.select([self.master], [], [], quiet)[0]:
            yield os.read(self.master, 1 << 16)
