"""From a text with a unit to a quantity, once its unit is known."""

from timing import measured, show_times

from lineplanner.quantities import CURRENT_DENSITY, THICKNESS
from lineplanner.units import parse

TARGET = 2e-6  # s
NAMES = {"24 A/ft2": CURRENT_DENSITY, "50 um": THICKNESS}


def run() -> None:
    """Print the time of one parse."""
    turns = {
        f'parse("{text}", {kind.name})': (lambda t=text, k=kind: lambda: parse(t, k))
        for text, kind in NAMES.items()
    }
    show_times("text to quantity", measured(turns, runs=40, calls=5000), dict.fromkeys(turns, TARGET))
