"""Units at the edge: text with a unit -> SI float, SI float -> text; the trade's unit words.

grammar splits, diagnosis says what is wrong, registry converts (it alone loads pint, at first use), table
holds the usual conversions worked out by it, reading joins the four; trade holds the trade's units, display
prints in them.
"""

from lineplanner.units.display import echo, show, to_unit
from lineplanner.units.errors import UnitTextError
from lineplanner.units.messages import MESSAGES
from lineplanner.units.reading import parse
from lineplanner.units.trade import System, example, units_of

__all__ = ["MESSAGES", "System", "UnitTextError", "echo", "example", "parse", "show", "to_unit", "units_of"]
