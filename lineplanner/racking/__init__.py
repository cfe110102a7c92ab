"""Racking: what each move of the hand does to a load. Every move takes a load and gives another one.

places.py   the parts of a load place by place, and a load made of places again
tips.py     which tips are free, and which is the next one
moves.py    to the next tip, once more, off, turned, to the other side, another part
fields.py   a field of tips filled in a pattern
spots.py    free positions: moved by steps of the grid, aligned, spaced evenly
room.py     where else a part may hang
gaps.py     the gaps between parts, by their outlines; fit.py: what they are held against
counts.py   one part more or less of an entry, another part in it
"""

from lineplanner.racking.counts import exchanged, one_less, one_more
from lineplanner.racking.fields import PATTERNS, Pattern, field_between, filled
from lineplanner.racking.fit import check_gaps, gap_figures
from lineplanner.racking.gaps import Gaps, gaps_of
from lineplanner.racking.moves import (
    added,
    again,
    faced,
    moved,
    put,
    reracked,
    sided,
    swapped,
    taken_off,
    turned,
)
from lineplanner.racking.places import Key, Racked, changed_places, places_of
from lineplanner.racking.room import room_for, with_first
from lineplanner.racking.spots import aligned, spaced
from lineplanner.racking.tips import Direction, runs_of

__all__ = [
    "PATTERNS",
    "Direction",
    "Gaps",
    "Key",
    "Pattern",
    "Racked",
    "added",
    "again",
    "aligned",
    "changed_places",
    "check_gaps",
    "exchanged",
    "faced",
    "field_between",
    "filled",
    "gap_figures",
    "gaps_of",
    "moved",
    "one_less",
    "one_more",
    "places_of",
    "put",
    "reracked",
    "room_for",
    "runs_of",
    "sided",
    "spaced",
    "swapped",
    "taken_off",
    "turned",
    "with_first",
]
