"""The door: version, exit codes, a reader that goes away, an interrupt."""

import subprocess
import sys

import lineplanner

# Stands in for the commands, so that only the door is under test.
STUB = """
import sys, types
cli = types.ModuleType("lineplanner.cli")
def main(arguments):
    {body}
cli.main = main
sys.modules["lineplanner.cli"] = cli
import lineplanner
lineplanner.cli = cli
from lineplanner.__main__ import main
sys.exit(main(["plan", "x"]))
"""


def door(body: str) -> subprocess.Popen[str]:
    return subprocess.Popen(
        [sys.executable, "-c", STUB.format(body=body)],
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        encoding="utf-8",
    )


def test_the_version_is_the_packages_own() -> None:
    run = subprocess.run(
        [sys.executable, "-m", "lineplanner", "--version"], capture_output=True, encoding="utf-8", check=True
    )
    assert run.stdout == f"lineplanner {lineplanner.__version__}\n"
    assert run.stderr == ""


def test_a_command_gets_its_arguments_and_its_exit_code_is_handed_on() -> None:
    with door("print(arguments); return 1") as process:
        assert process.communicate() == ("['plan', 'x']\n", "")
    assert process.returncode == 1


def test_an_interrupt_exits_with_130_and_no_traceback() -> None:
    with door("raise KeyboardInterrupt") as process:
        assert process.communicate() == ("", "")
    assert process.returncode == 130


def test_a_reader_that_goes_away_ends_the_program_quietly() -> None:
    with door("import time; time.sleep(0.3); print('x' * 1_000_000); return 0") as process:
        assert process.stdout is not None
        process.stdout.close()
        assert process.stderr is not None
        assert process.stderr.read() == ""
    assert process.returncode == 0


def test_handlers_of_the_exit_still_run_and_nothing_that_was_printed_is_lost() -> None:
    body = "import atexit; atexit.register(print, 'left'); print('x' * 1_000_000); return 2"
    with door(body) as process:
        assert process.communicate() == ("x" * 1_000_000 + "\nleft\n", "")
    assert process.returncode == 2
