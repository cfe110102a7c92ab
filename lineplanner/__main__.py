"""The door: answers --version at once, hands everything else to the shells."""

import gc
import os
import sys

from lineplanner import __version__

INTERRUPTED = 130
NEW_OBJECTS = 200_000  # more than a plan makes: a command ends before the collector would find anything


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

    code = cli.main(arguments)
    gc.freeze()  # files are closed by now: nothing is left that the interpreter must look through on its way out
    return code


if __name__ == "__main__":
    sys.exit(main())
