"""Two loads of 200 parts, three drawings each, made from records of the demo shop."""

from collections.abc import Iterator
from dataclasses import replace
from typing import Any

from lineplanner.files.cases import open_case
from lineplanner.files.library import Library
from lineplanner.inputs.case import Case
from lineplanner.inputs.load import Hang
from lineplanner.inputs.rack import Spot, TipRow

PARTS_BY_NAME = {"valve-block": 80, "test-coupon": 60, "hose-adapter": 60}  # the block has seven holes
MATERIAL = "6061-t6"
ROWS, IN_ROW = 10, 21  # a tip to spare in each row, so that a part can move without a change of level
LEFT, ACROSS = 0.05, 0.1
TOP, DOWN = 0.32, 0.16
_CUT = 0.35  # solution drop that cuts every part of the upper row
_STAGGER = 0.002  # free positions of a row lie apart in height, so that a level cuts each one differently


def tips_case(library: Library) -> Case:
    """200 parts on the tips of a rack, every hang in runs of tips."""
    rows = tuple(
        TipRow(
            name=chr(ord("A") + row),
            count=IN_ROW,
            start=(LEFT, TOP + row * DOWN),
            step=(ACROSS, 0.0),
            kind="spring",
            conductor="titanium-2",
            contacts=2,
            bare_area=3e-4,
            side="both",
        )
        for row in range(ROWS)
    )
    names = [f"{row.name}{number + 1}" for row in rows for number in range(IN_ROW - 1)]
    hangs = tuple(Hang(part=part, material=MATERIAL, tips=tuple(tips)) for part, tips in _shared(names))
    return _case(library, hangs, tips=rows, hanging="tips")


def free_case(library: Library) -> Case:
    """200 parts at free positions, no two of a row at the same height."""
    spots: list[Spot] = [
        (LEFT + number * ACROSS, TOP + row * DOWN + number * _STAGGER)
        for row in range(ROWS)
        for number in range(IN_ROW - 1)
    ]
    hangs = tuple(Hang(part=part, material=MATERIAL, at=tuple(at)) for part, at in _shared(spots))
    return _case(library, hangs, tips=(), hanging="free")


def moved(case: Case, turn: int) -> Case:
    """The case with one part moved to a place of the same height; turn after turn it goes and comes back."""
    first = case.load.hangs[0]
    if first.tips:
        row = first.tips[0][0]
        place = f"{row}{IN_ROW}" if turn % 2 else first.tips[0]
        hang = replace(first, tips=(place, *first.tips[1:]))
    else:
        (x, drop), *others = first.at
        hang = replace(first, at=((x + 1e-4 * (turn % 50), drop), *others))
    return _with(case, hang)


def fewer(case: Case, turn: int) -> Case:
    """The case with one to three parts less on its last hang."""
    *others, last = case.load.hangs
    keep = -1 - turn % 3
    hang = replace(last, tips=last.tips[:keep], at=last.at[:keep])
    return replace(case, load=replace(case.load, hangs=(*others, hang)))


def lower(case: Case, turn: int) -> Case:
    """The case with a solution level that it never had, which cuts the upper row of parts."""
    return replace(case, load=replace(case.load, solution_drop=_CUT + 1e-5 * turn))


def parted(case: Case) -> Case:
    """The case with every part as a hang of its own, as somebody may have hung them one by one."""
    hangs = tuple(one for hang in case.load.hangs for one in _singles(hang))
    return replace(case, load=replace(case.load, hangs=hangs))


def _singles(hang: Hang) -> Iterator[Hang]:
    for tip in hang.tips:
        yield replace(hang, tips=(tip,))
    for spot in hang.at:
        yield replace(hang, at=(spot,))


def _with(case: Case, first: Hang) -> Case:
    return replace(case, load=replace(case.load, hangs=(first, *case.load.hangs[1:])))


def _shared(places: list[Any]) -> Iterator[tuple[str, list[Any]]]:
    begin = 0
    for part, count in PARTS_BY_NAME.items():
        yield part, places[begin : begin + count]
        begin += count


def _case(library: Library, hangs: tuple[Hang, ...], **rack: Any) -> Case:
    case = open_case(library, "valve-blocks-24")
    return replace(
        case,
        load=replace(case.load, hangs=hangs),
        rack=replace(case.rack, **rack),
        parts={part: library.record("part", part) for part in PARTS_BY_NAME},
    )
