"""The door: answers --version at once, hands everything else to the shells."""

from __future__ import annotations

import gc
import os
import sys
from typing import TYPE_CHECKING

from lineplanner import __version__

if TYPE_CHECKING:
    from lineplanner.cli.opened import Options

INTERRUPTED = 130
NEW_OBJECTS = 200_000  # more than a plan makes: a command ends before the collector would find anything

SESSION_OBJECTS = 300_000  # the screens collect between keys, not while one is answered


def main(arguments: list[str] | None = None) -> int:
    """Run one command; the return value is the exit code."""
    arguments = sys.argv[1:] if arguments is None else arguments
    try:
        code = _run(arguments)
        sys.stdout.flush()
    except BrokenPipeError:
        # The reader has gone; what is still buffered must not raise again at exit.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return 0
    except KeyboardInterrupt:
        return INTERRUPTED
    return code


def _run(arguments: list[str]) -> int:
    if arguments == ["--version"]:
        sys.stdout.write(f"lineplanner {__version__}\n")
        return 0
    gc.set_threshold(NEW_OBJECTS)
    from lineplanner import cli

    code = cli.main(arguments, _screens) if _on_a_screen() else cli.main(arguments)
    gc.freeze()  # files are closed by now: nothing is left that the interpreter must look through on its way out
    return code


def _on_a_screen() -> bool:
    """Whether a person sits at a terminal that can move its cursor."""
    streams = (sys.stdin, sys.stdout, sys.stderr)
    return os.environ.get("TERM") != "dumb" and all(one is not None and one.isatty() for one in streams)


def _screens(options: Options) -> int:
    """The screens; only here are they loaded. Raises FilesError where there is no site to work with."""
    from lineplanner.cli.fault import kept
    from lineplanner.cli.opened import plain_letters
    from lineplanner.files.site import find_site
    from lineplanner.tui.app import run

    gc.set_threshold(SESSION_OBJECTS)

    def fault(error: BaseException) -> str:
        return kept([], (type(error), error, error.__traceback__))

    return run(find_site(options.site), options.units, fault, ascii_only=plain_letters(options))


if __name__ == "__main__":
    sys.exit(main())
