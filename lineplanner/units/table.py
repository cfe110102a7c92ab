"""Conversions worked out beforehand: conversions.txt beside this module, so that usual units need no library.

The unit library stays the authority: `renew` writes every row from it, and a test works every row out again.
After a change of definitions.txt, of the trade's units or of the units that the demo shop is written in (add
a row `kind | unit`), run: python -c "from lineplanner.units.table import renew; renew()"
"""

from pathlib import Path

from lineplanner.quantities import COUNT, KINDS
from lineplanner.units.grammar import read_unit
from lineplanner.units.registry import Conversion, conversion
from lineplanner.units.trade import units_of

TABLE = Path(__file__).with_name("conversions.txt")
_HEAD = (
    "# kind | unit as typed | factor | offset | lowest SI value. Written by lineplanner.units.table.renew.\n"
)

Key = tuple[str, str]  # unit text as typed, name of the kind


def conversions() -> dict[Key, Conversion]:
    """The rows of the table."""
    return {
        (row[1], row[0]): Conversion(float(row[2]), float(row[3]), float(row[4]))
        for row in _rows()
        if len(row) > 2
    }


def wanted() -> list[Key]:
    """What the table is to hold: the trade's units of every kind, and the units it already names.

    A count is left out: it is looked at each time, for it must be whole.
    """
    found = {
        ("" if unit == "1" else unit, kind.name)
        for kind in KINDS.values()
        for unit in units_of(kind)
        if kind != COUNT
    }
    return sorted(found | {(row[1], row[0]) for row in _rows()}, key=lambda key: (key[1], key[0]))


def worked_out(key: Key) -> Conversion:
    """A row from the unit library."""
    unit, kind = key
    return conversion(read_unit(unit), KINDS[kind])


def renew() -> None:
    """Write the table anew from the unit library."""
    lines = [
        " | ".join((kind, unit, *(repr(number) for number in worked_out((unit, kind)))))
        for unit, kind in wanted()
    ]
    TABLE.write_text(_HEAD + "\n".join(lines) + "\n", encoding="utf-8", newline="\n")


def _rows() -> list[list[str]]:
    """The fields of each line; kind and unit alone where the numbers are still to be written."""
    if not TABLE.exists():
        return []
    lines = TABLE.read_text(encoding="utf-8").splitlines()
    return [[field.strip() for field in line.split("|")] for line in lines if line and line[0] != "#"]
