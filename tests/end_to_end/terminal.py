"""The program on a real pseudo-terminal, its screen read back by a terminal emulator."""

import fcntl
import os
import pty
import re
import select
import signal
import struct
import subprocess
import sys
import termios
import time
from collections.abc import Callable, Mapping
from pathlib import Path

import pyte

CHECKOUT = Path(__file__).parents[2]
KEYS = {
    "enter": "\r",
    "escape": "\x1b",
    "up": "\x1b[A",
    "down": "\x1b[B",
    "right": "\x1b[C",
    "left": "\x1b[D",
}
KEYS |= {"f4": "\x1bOS", "delete": "\x1b[3~"}
KEYS |= {"tab": "\t", "ctrl+p": "\x10", "ctrl+q": "\x11", "ctrl+w": "\x17", "ctrl+t": "\x14"}
PATIENCE = 30.0  # s; a loaded machine is slow, a wrong screen stays wrong


class Terminal:
    """A started program; every press waits for what is to be seen then."""

    def __init__(
        self, folder: Path, *arguments: str, size: tuple[int, int], env: Mapping[str, str] | None = None
    ) -> None:
        self.screen = pyte.Screen(*size)
        self.stream = pyte.ByteStream(self.screen)
        self.output = b""
        self.presses = 0
        own = {
            k: v for k, v in os.environ.items() if k not in ("NO_COLOR", "COLUMNS", "LINES", "SSH_CONNECTION")
        }
        own |= {"TERM": "xterm-256color", "COLORTERM": "truecolor", "PYTHONPATH": str(CHECKOUT)}
        own |= {"XDG_DATA_HOME": str(folder / "data"), "HOME": str(folder), "LANG": "C.UTF-8"} | dict(
            env or {}
        )
        self.handle, inside = pty.openpty()
        fcntl.ioctl(inside, termios.TIOCSWINSZ, struct.pack("HHHH", size[1], size[0], 0, 0))
        self.program = subprocess.Popen(
            [sys.executable, "-m", "lineplanner", *arguments],
            cwd=folder,
            env=own,
            stdin=inside,
            stdout=inside,
            stderr=inside,
            start_new_session=True,
        )
        os.close(inside)

    def __enter__(self) -> "Terminal":
        return self

    def __exit__(self, *_: object) -> None:
        if self.program.poll() is None:
            self.program.kill()
        self.program.wait()
        os.close(self.handle)

    @property
    def text(self) -> str:
        """What the screen shows, without colours."""
        return "\n".join(line.rstrip() for line in self.screen.display)

    def read(self, wait: float = 0.05) -> bool:
        """Take what the program has written; whether there was anything."""
        ready, _, _ = select.select([self.handle], [], [], wait)
        if not ready:
            return False
        try:
            written = os.read(self.handle, 65536)
        except OSError:  # the program has ended
            return False
        self.output += written
        # The emulator does not know private parameters of the keyboard protocol and prints them.
        self.stream.feed(re.sub(rb"\x1b\[[<>=][0-9;]*u", b"", written))
        return bool(written)

    def until(self, seen: str | Callable[[str], bool]) -> str:
        """The screen once it shows a text, or fulfils a condition."""
        end = time.monotonic() + PATIENCE
        while time.monotonic() < end:
            if seen in self.text if isinstance(seen, str) else seen(self.text):
                while self.read():  # the rest of the picture
                    pass
                return self.text
            self.read()
        raise AssertionError(f"never seen: {seen!r}\n{self.text}")

    def press(self, key: str, seen: str | Callable[[str], bool]) -> str:
        """Press a key and wait for what it brings."""
        self.presses += 1
        os.write(self.handle, KEYS.get(key, key).encode())
        return self.until(seen)

    def type(self, text: str, seen: str | Callable[[str], bool]) -> str:
        """Type letter by letter, each counted."""
        self.presses += len(text)
        os.write(self.handle, text.encode())
        return self.until(seen)

    def mouse(self, *steps: tuple[int, int], seen: str | Callable[[str], bool]) -> str:
        """Press the left button at the first cell (from 0), drag over the others, let go at the last."""
        for code, last, (column, row) in (
            (0, "M", steps[0]),
            *((32, "M", step) for step in steps[1:]),
            (0, "m", steps[-1]),
        ):
            os.write(self.handle, f"\x1b[<{code};{column + 1};{row + 1}{last}".encode())
            self.read(0.1)
        return self.until(seen)

    def cell_of(self, text: str) -> tuple[int, int]:
        """Column and row (from 0) of a text on the screen."""
        row, line = next((n, line) for n, line in enumerate(self.screen.display) if text in line)
        return line.index(text), row

    def hang_up(self) -> int:
        """Drop the line; the exit code."""
        self.program.send_signal(signal.SIGHUP)
        return self.ended()

    def ended(self) -> int:
        """Wait for the end; the exit code."""
        end = time.monotonic() + PATIENCE
        while time.monotonic() < end:
            self.read()
            code = self.program.poll()
            if code is not None:
                while self.read(0.0):
                    pass
                return code
        raise AssertionError(f"never ended\n{self.text}")
