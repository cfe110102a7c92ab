"""What a command costs from a cold interpreter, against the interpreter itself. Disk and byte code are warm."""

import os
import subprocess
import sys
import tempfile
from collections.abc import Callable
from pathlib import Path

from timing import Turn, measured, show_ratios

SHOP = Path(__file__).parents[2]
BARE = "python -c pass"
COMMANDS = {
    BARE: ("-c", "pass"),
    "lineplanner --version": ("-m", "lineplanner", "--version"),
    "lineplanner plan valve-blocks-24": ("-m", "lineplanner", "plan", "valve-blocks-24"),
    "of it: numpy": ("-c", "import numpy"),
    "of it: numpy and shapely": ("-c", "import shapely"),
    "of it: pydantic": ("-c", "import pydantic"),
    "of it: pint": ("-c", "import pint"),
}
TARGETS = {"lineplanner --version": 6.0, "lineplanner plan valve-blocks-24": 40.0}
RUNS = 15


def run() -> None:
    """Print the commands as multiples of a bare interpreter."""
    with tempfile.TemporaryDirectory() as folder:
        turns = {name: _child(arguments, folder) for name, arguments in COMMANDS.items()}
        show_ratios("a command from cold", measured(turns, runs=RUNS), BARE, TARGETS)


def _child(arguments: tuple[str, ...], byte_code: str) -> Turn:
    """A child that keeps its byte code in a folder of its own, also where the environment forbids to write any."""
    command = [sys.executable, *arguments]
    environment = {k: v for k, v in os.environ.items() if k != "PYTHONDONTWRITEBYTECODE"}
    environment["PYTHONPYCACHEPREFIX"] = byte_code

    def child() -> object:
        return subprocess.run(command, cwd=SHOP, env=environment, check=True, capture_output=True)

    def turn() -> Callable[[], object]:
        return child

    return turn
