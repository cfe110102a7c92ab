"""The unit library is loaded once, and only when a unit has to be converted that the table does not hold."""

import subprocess
import sys

PROGRAM = """
import sys
from lineplanner.quantities import CURRENT, LENGTH, RATIO
from lineplanner.units import UnitTextError, parse, show, units_of, example
units_of(CURRENT), example(CURRENT)
assert parse("50 %", RATIO) == 0.5
for text in ("", "5", "2,5 mm", "9**9**9 mm", "5 qqq"):
    try:
        parse(text, LENGTH)
    except UnitTextError:
        pass
parse("5 mm", LENGTH), parse("0 mm", LENGTH), show(0.0, LENGTH, "us")
print("pint" in sys.modules)
parse("5 millimeter", LENGTH)
print("pint" in sys.modules)
from lineplanner.units.registry import registry
parse("5 amperes", CURRENT)
print(registry.cache_info().misses)
"""


def test_refusing_a_text_or_reading_a_usual_unit_loads_no_unit_library() -> None:
    done = subprocess.run([sys.executable, "-c", PROGRAM], capture_output=True, encoding="utf-8", check=True)
    assert done.stdout.split() == ["False", "True", "1"]
