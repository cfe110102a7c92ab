"""The door: answers --version at once, hands everything else to the shells."""

import os
import sys

from lineplanner import __version__

INTERRUPTED = 130


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
    from lineplanner import cli

    return cli.main(arguments)


if __name__ == "__main__":
    sys.exit(main())
