"""Colour, pipes, faults, interrupts, and what a command loads: by a real start of the program."""

import os
import re
import subprocess
import sys
from collections.abc import Callable
from pathlib import Path

import pytest

CHECKOUT = Path(__file__).parents[2]
Run = Callable[..., subprocess.CompletedProcess[str]]

# --- colour -----------------------------------------------------------------------------------------------

ON_A_TERMINAL = """
import io, sys
class Terminal(io.StringIO):
    encoding = "utf-8"
    def isatty(self): return True
sys.stdout = Terminal()
from lineplanner import cli
code = cli.main(sys.argv[1:])
sys.__stdout__.write(sys.stdout.getvalue())
sys.exit(code)
"""
ESCAPE = "\x1b["


def test_colour_is_only_for_a_terminal_and_only_where_nobody_declined_it(run: Run) -> None:
    load = ("card", "valve-blocks-24")
    coloured = run(*load, code=ON_A_TERMINAL, env={"TERM": "xterm"}).stdout
    assert f"{ESCAPE}91m{ESCAPE}1mDANGER" in coloured
    assert ESCAPE not in run(*load, code=ON_A_TERMINAL, env={"TERM": "xterm", "NO_COLOR": "1"}).stdout
    assert ESCAPE not in run(*load, code=ON_A_TERMINAL, env={"TERM": "dumb"}).stdout
    assert ESCAPE not in run(*load).stdout


def test_without_colour_the_words_are_all_still_there(run: Run) -> None:
    load = ("card", "valve-blocks-24")
    coloured = run(*load, code=ON_A_TERMINAL, env={"TERM": "xterm"}).stdout
    assert re.sub(r"\x1b\[[\d;]*m", "", coloured) == run(*load).stdout


# --- pipes and faults -------------------------------------------------------------------------------------


def test_a_reader_that_goes_away_ends_the_command_quietly(tmp_path: Path) -> None:
    process = subprocess.Popen(
        [sys.executable, "-m", "lineplanner", "plan", "valve-blocks-24", "--explain", "all"],
        cwd=tmp_path,
        env={**os.environ, "PYTHONPATH": str(CHECKOUT)},
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        encoding="utf-8",
    )
    assert process.stdout is not None
    assert process.stderr is not None
    process.stdout.close()
    assert process.stderr.read() == ""
    process.stderr.close()
    assert process.wait() == 0


FULL = Path("/dev/full")  # a device that takes nothing, as a full disk does


@pytest.mark.skipif(not FULL.exists(), reason="this system has no device that is always full")
@pytest.mark.parametrize("command", ["plan valve-blocks-24", "card rod-40x900", "sources", "--help"])
def test_an_output_that_cannot_be_written_exits_with_2_and_says_so(tmp_path: Path, command: str) -> None:
    with FULL.open("w", encoding="utf-8") as full:
        done = subprocess.run(
            [sys.executable, "-m", "lineplanner", *command.split()],
            cwd=tmp_path,
            env={**os.environ, "PYTHONPATH": str(CHECKOUT), "XDG_DATA_HOME": str(tmp_path)},
            stdout=full,
            stderr=subprocess.PIPE,
            encoding="utf-8",
            check=False,
        )
    assert done.returncode == 2
    assert done.stderr == (
        "lineplanner: the output cannot be written: No space left on device. What was printed is not whole\n"
    )
    assert not list(tmp_path.rglob("fault-*.txt"))


BROKEN = """
import sys
import lineplanner.plan
def broken(case): raise RuntimeError("inside")
lineplanner.plan.plan = broken
from lineplanner import cli
sys.exit(cli.main(sys.argv[1:]))
"""


def test_a_fault_exits_with_3_and_asks_to_report_it_with_its_log(run: Run, tmp_path: Path) -> None:
    done = run("plan", "valve-blocks-24", code=BROKEN)
    assert (done.returncode, done.stdout) == (3, "")
    found = re.fullmatch(
        r"lineplanner: this is a fault of lineplanner, not of your files\. Please report it with the log (.*)\n",
        done.stderr,
    )
    assert found
    log = Path(found[1])
    assert log.parent == tmp_path / "data" / "lineplanner" / "logs"
    text = log.read_text(encoding="utf-8")
    assert "RuntimeError: inside" in text
    assert "arguments: ['plan', 'valve-blocks-24']" in text


def test_a_fault_where_no_log_can_be_kept_in_the_data_folder_goes_to_the_temporary_one(
    run: Run, tmp_path: Path
) -> None:
    (tmp_path / "data").write_text("a file where a folder is wanted", encoding="utf-8")
    done = run("plan", "valve-blocks-24", code=BROKEN, env={"TMPDIR": str(tmp_path)})
    assert done.returncode == 3
    assert list(tmp_path.glob("fault-*.txt"))


INTERRUPTED = BROKEN.replace('RuntimeError("inside")', "KeyboardInterrupt")


def test_an_interrupted_command_exits_with_130(run: Run) -> None:
    done = run("plan", "valve-blocks-24", code=INTERRUPTED)
    assert (done.returncode, done.stdout) == (130, "")
    assert "Traceback" not in done.stderr


# --- what is loaded ---------------------------------------------------------------------------------------

LOADED = """
import sys
from lineplanner.__main__ import main
code = main(sys.argv[1:])
print(sorted({name.partition(".")[0] for name in sys.modules}), file=sys.stderr)
sys.exit(code)
"""


@pytest.mark.parametrize(
    "command", [["plan", "valve-blocks-24"], ["card", "rod-40x900"], ["sources"], []], ids=str
)
def test_a_headless_command_never_loads_the_screens(run: Run, command: list[str]) -> None:
    done = run(*command, code=LOADED)
    assert done.returncode == 0
    assert not re.search(r"'(textual|rich|pygments|trimesh)'", done.stderr)


@pytest.mark.parametrize("command", [["--help"], ["plan", "--help"], ["--version"]], ids=str)
def test_help_and_version_load_nothing_heavy(run: Run, command: list[str]) -> None:
    done = run(*command, code=LOADED)
    assert done.returncode == 0
    assert not re.search(r"'(numpy|shapely|pint|pydantic|tomlkit|textual)'", done.stderr)
