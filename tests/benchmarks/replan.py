"""Planning a load of 200 parts again after a change."""

import itertools
from collections.abc import Callable
from pathlib import Path

from loads import fewer, free_case, lower, moved, parted, tips_case
from timing import Turn, measured, show_times

from lineplanner.files.library import Library
from lineplanner.inputs.case import Case
from lineplanner.plan import plan

SHOP = Path(__file__).parents[2]
RUNS = 150
MOVE, CHANGE = 2e-3, 10e-3  # s


def run() -> None:
    """Print the times of a plan after a move, after a change of count and of the solution level."""
    library = Library(SHOP)
    tips, free = tips_case(library), free_case(library)
    turns: dict[str, Turn] = {}
    targets: dict[str, float] = {}
    for name, case in (("tips", tips), ("free", free)):
        turns |= {
            f"{name}: one part moved, same areas": _planned(case, moved),
            f"{name}: one part less or more": _planned(case, fewer),
            f"{name}: level changed, 20 parts cut by it": _planned(case, lower),
            f"{name}: moved, 200 hangs of one part": _planned(parted(case), moved),
        }
    for name in turns:
        targets[name] = MOVE if "moved" in name else CHANGE
    show_times("plan(case), 200 parts of 3 drawings", measured(turns, runs=RUNS, warm=10), targets)


def _planned(case: Case, change: Callable[[Case, int], Case]) -> Turn:
    numbers = itertools.count()

    def turn() -> Callable[[], object]:
        changed = change(case, next(numbers))
        return lambda: plan(changed)

    return turn
