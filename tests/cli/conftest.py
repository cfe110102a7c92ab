"""The program as a person starts it: a fresh interpreter, a folder of its own."""

import os
import subprocess
import sys
from collections.abc import Callable, Mapping
from pathlib import Path

import pytest

CHECKOUT = Path(__file__).parents[2]
Run = Callable[..., subprocess.CompletedProcess[str]]


@pytest.fixture
def run(tmp_path: Path) -> Run:
    """Runs `lineplanner ...` below an empty folder, with the demo site unless the arguments name one."""

    def started(
        *arguments: str, env: Mapping[str, str] | None = None, code: str | None = None
    ) -> subprocess.CompletedProcess[str]:
        own = {k: v for k, v in os.environ.items() if k not in ("NO_COLOR", "PYTHONWARNINGS", "COLUMNS")}
        own |= {
            "PYTHONPATH": str(CHECKOUT),
            "XDG_DATA_HOME": str(tmp_path / "data"),
            "PYTHONIOENCODING": "utf-8",
        }
        program = ["-m", "lineplanner"] if code is None else ["-c", code]
        return subprocess.run(
            [sys.executable, "-W", "error", *program, *arguments],
            cwd=tmp_path,
            env=own | dict(env or {}),
            capture_output=True,
            encoding="utf-8",
            check=False,
        )

    return started
