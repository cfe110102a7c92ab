"""Benchmarks: times and ratios of one run, targets beside them. Nothing is asserted.

.venv/bin/python tests/benchmarks/run.py              all
.venv/bin/python tests/benchmarks/run.py replan text  some
"""

import platform
import sys

import filling
import gestures
import replan
import screens
import startup
import text

BENCHMARKS = {
    "startup": startup.run,
    "text": text.run,
    "replan": replan.run,
    "screens": screens.run,
    "gestures": gestures.run,
    "filling": filling.run,
}


def main(names: list[str]) -> int:
    """Run the named benchmarks; 2 where a name is not known."""
    unknown = [name for name in names if name not in BENCHMARKS]
    if unknown:
        print(f"no such benchmark: {', '.join(unknown)}. There are: {', '.join(BENCHMARKS)}", file=sys.stderr)
        return 2
    print(f"Python {platform.python_version()} on {platform.machine()}")
    for name in names or BENCHMARKS:
        BENCHMARKS[name]()
    return 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
