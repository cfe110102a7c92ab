"""The table of conversions against the unit library that it is written from."""

from pathlib import Path

import pytest

from lineplanner.quantities import COUNT, KINDS, THICKNESS
from lineplanner.units import parse, reading, table, units_of
from lineplanner.units.trade import LADDERS, TRADE

HELD = table.conversions()


@pytest.mark.parametrize("key", HELD, ids=lambda key: " ".join(key).strip())
def test_every_row_is_what_the_unit_library_says_to_the_last_bit(key: tuple[str, str]) -> None:
    assert HELD[key] == table.worked_out(key)


def test_the_table_holds_every_unit_of_every_kind() -> None:
    kinds = [kind for kind in KINDS.values() if kind != COUNT]
    usual = {("" if unit == "1" else unit, kind.name) for kind in kinds for unit in units_of(kind)}
    assert usual - HELD.keys() == set()
    assert set(table.wanted()) == HELD.keys()


def test_the_table_holds_what_small_and_large_amounts_are_shown_in() -> None:
    shown = {
        (unit, kind.name)
        for kind, row in TRADE.items()
        for main in (row.metric, row.us)
        for unit, _, _ in LADDERS.get(main, ())
    }
    assert shown - HELD.keys() == set()


def test_the_table_names_known_kinds_and_each_unit_once() -> None:
    lines = table.TABLE.read_text(encoding="utf-8").splitlines()[1:]
    assert len(lines) == len(HELD)
    assert {kind for _, kind in HELD} <= KINDS.keys()


def test_renewing_writes_the_file_that_is_there(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    written = table.TABLE.read_bytes()
    copy = tmp_path / "conversions.txt"
    copy.write_bytes(written)
    monkeypatch.setattr(table, "TABLE", copy)
    table.renew()
    assert copy.read_bytes() == written
    copy.write_bytes(written + b"thickness | uin\n")
    table.renew()
    assert table.conversions() == HELD | {("uin", "thickness"): table.worked_out(("uin", "thickness"))}


def test_without_the_table_the_unit_library_gives_the_same_values(monkeypatch: pytest.MonkeyPatch) -> None:
    texts = [(f"{7.3} {unit}", KINDS[kind]) for unit, kind in HELD]
    by_table = [parse(text, kind) for text, kind in texts]
    monkeypatch.setattr(reading, "_known", {})
    assert [parse(text, kind) for text, kind in texts] == by_table


def test_many_units_typed_do_not_push_the_table_out(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(reading, "_known", dict(HELD))
    monkeypatch.setattr(reading, "_MOST_KNOWN", len(HELD))
    parse("5 microns", THICKNESS)
    assert HELD.items() <= reading._known.items()
