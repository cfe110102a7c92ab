"""The recovery journal: what a program that died did not save is offered at the next start, once."""

import json
import subprocess
import sys
from collections.abc import Iterator
from dataclasses import replace
from pathlib import Path

import pytest

from lineplanner.files.memory import site_key
from lineplanner.files.problems import FileChangedError, FilesError
from lineplanner.files.site import SiteFolder
from lineplanner.tui import journal
from lineplanner.tui.journal import Journal, leftover
from lineplanner.tui.session import Session
from tests.tui.shops import CHECKOUT, LOAD, RECIPE, content, file_of, make_shop, session_on

DENSITY = ("change", "current_density")


@pytest.fixture
def shop(tmp_path: Path) -> Path:
    return make_shop(tmp_path)


@pytest.fixture
def memory(tmp_path: Path) -> Path:
    return tmp_path / "memory"


SESSIONS: list[Session] = []


@pytest.fixture(autouse=True)
def close_all() -> Iterator[None]:
    """Close what a test left open: a locked file is one that a running program has."""
    yield
    while SESSIONS:
        SESSIONS.pop().close()


def opened(shop: Path, memory: Path | None = None, load: str | None = LOAD[1]) -> Session:
    SESSIONS.append(session_on(shop, memory, load))
    return SESSIONS[-1]


def journals(memory: Path) -> list[Path]:
    return sorted(memory.glob("*.journal"))


EDITING = """
import sys
from collections.abc import Iterator
from dataclasses import replace
from pathlib import Path
sys.path.insert(0, {checkout!r})
from tests.tui.shops import LOAD, session_on
session = session_on(Path({shop!r}), Path({memory!r}))
for number in range(1, 10000):
    assert session.set_value(LOAD, ("order",), f"KY-{{number}}") is None
    print(number, flush=True)
"""


def killed_while_editing(shop: Path, memory: Path, edits: int) -> int:
    """A program that is killed in the middle of edits; the number of the last edit that it told of."""
    code = EDITING.format(checkout=str(CHECKOUT), shop=str(shop), memory=str(memory))
    program = subprocess.Popen([sys.executable, "-c", code], stdout=subprocess.PIPE, text=True)
    assert program.stdout is not None
    told = 0
    for line in program.stdout:
        told = int(line)
        if told >= edits:
            break
    program.kill()
    told = max([told, *(int(line) for line in program.stdout if line.endswith("\n"))])
    program.stdout.close()
    assert program.wait() != 0
    return told


def test_a_program_killed_while_editing_loses_at_most_the_last_edit(shop: Path, memory: Path) -> None:
    before = content(shop)
    told = killed_while_editing(shop, memory, edits=7)
    assert content(shop) == before
    session = opened(shop, memory, load=None)
    assert session.recovery is not None
    assert session.recovery.load == LOAD[1]
    (line,) = session.recovery.lines
    assert line in {f"order: KY-24817 -> KY-{number} (load valve-blocks-24)" for number in (told, told + 1)}
    session.recover()
    assert session.recovery is None
    assert session.name == LOAD[1]
    assert session.record(LOAD).order in (f"KY-{told}", f"KY-{told + 1}")
    assert session.dirty == (LOAD,)
    assert session.undo() == "recovered what was not saved"
    assert session.dirty == ()


def test_half_a_line_does_not_count(memory: Path) -> None:
    writer = Journal(memory, "shop")
    writer.write({"load": "a"})
    writer.write({"load": "b"})
    writer.close()
    (path,) = journals(memory)
    path.write_bytes(path.read_bytes() + b'{"load": "c", "chan')
    found = leftover(memory, "shop")
    assert found is not None
    assert found.line == {"load": "b"}
    found.release()


@pytest.mark.parametrize(
    "text", ["", "\n", "{}\n", "no json\n", "[1]\n", '{"load": \n', "\xff\xfe\n", "[" * 5000 + "\n"]
)
def test_a_journal_that_holds_nothing_is_cleared_away(memory: Path, text: str) -> None:
    memory.mkdir()
    (memory / "shop-1-0.journal").write_bytes(text.encode("latin-1"))
    assert leftover(memory, "shop") is None
    assert journals(memory) == []


@pytest.mark.parametrize(
    "line", [{"load": 1}, {"changes": [3]}, {"load": "", "lines": [], "changes": [{"ref": []}]}]
)
def test_a_journal_that_says_something_else_is_left_alone(shop: Path, memory: Path, line: object) -> None:
    memory.mkdir()
    path = memory / f"{site_key(SiteFolder(shop))}-1-0.journal"
    path.write_text(json.dumps(line) + "\n", encoding="utf-8")
    session = opened(shop, memory)
    assert session.recovery is None
    assert path.exists()


def test_what_is_offered_says_what_differs_in_which_file(shop: Path, memory: Path) -> None:
    session = opened(shop, memory)
    session.set_value(LOAD, DENSITY, "26 A/ft2")
    session.set_value(LOAD, ("hangs", 0, "tips"), "A1-A4")
    session.set_value(LOAD, ("hangs", 0, "turn"), "90 deg")
    session.set_value(RECIPE, ("aim", "low"), "46 um")
    followed = session.text_of(RECIPE, ("follows",))
    session.set_value(RECIPE, ("follows",), "x" * 100)
    session.close()
    again = opened(shop, memory, load=None)
    assert again.recovery is not None
    assert again.recovery.lines == (
        "hang 1, tips: A1-A4, B1-B4, C1-C4, D1-D4, E1-E4, F1-F4 -> A1-A4 (load valve-blocks-24)",
        "hang 1, turn in the rack plane: 0 deg -> 90 deg (load valve-blocks-24)",
        "current density: 24 A/ft2 -> 26 A/ft2 (load valve-blocks-24)",
        f"follows: {followed} -> {'x' * 57}... (recipe hardcoat-50-6061)",
        "aim, low: 45 um -> 46 um (recipe hardcoat-50-6061)",
    )
    again.recover()
    assert again.dirty == (LOAD, RECIPE)
    again.save()
    assert journals(memory) == []


def test_a_journal_goes_when_all_is_saved_undone_or_given_up(shop: Path, memory: Path) -> None:
    session = opened(shop, memory)
    assert journals(memory) == []
    for end in (session.save, session.undo, session.revert):
        session.set_value(LOAD, ("order",), f"KY-{end.__name__}")
        assert len(journals(memory)) == 1
        end()
        assert session.dirty == ()
        assert journals(memory) == []


def test_what_is_saved_is_not_offered_and_what_is_not_is(shop: Path, memory: Path) -> None:
    session = opened(shop, memory)
    session.set_value(LOAD, ("order",), "KY-1")
    session.save()
    session.set_value(LOAD, ("lot",), "B")
    session.close()
    again = opened(shop, memory, load=None)
    assert again.recovery is not None
    assert again.recovery.lines == ("lot: A -> B (load valve-blocks-24)",)
    again.discard_recovery()
    assert again.recovery is None
    again.close()
    assert opened(shop, memory, load=None).recovery is None


def test_two_running_programs_do_not_read_each_others_journal(shop: Path, memory: Path) -> None:
    first = opened(shop, memory)
    first.set_value(LOAD, ("order",), "KY-1")
    second = opened(shop, memory)
    assert second.recovery is None
    second.set_value(LOAD, ("lot",), "B")
    assert len(journals(memory)) == 2
    first.close()
    third = opened(shop, memory, load=None)
    assert third.recovery is not None
    assert third.recovery.lines == ("order: KY-24817 -> KY-1 (load valve-blocks-24)",)
    assert opened(shop, memory, load=None).recovery is None  # the third is asking about it
    third.close()
    fourth = opened(shop, memory, load=None)
    assert fourth.recovery is not None
    for session in (second, fourth):
        session.close()


def test_a_running_program_is_left_alone_by_one_that_starts(shop: Path, memory: Path) -> None:
    code = EDITING.format(checkout=str(CHECKOUT), shop=str(shop), memory=str(memory))
    program = subprocess.Popen([sys.executable, "-c", code], stdout=subprocess.PIPE, text=True)
    assert program.stdout is not None
    program.stdout.readline()
    program.stdout.readline()
    try:
        assert opened(shop, memory, load=None).recovery is None
        assert len(journals(memory)) == 1
    finally:
        program.kill()
        program.stdout.close()
        program.wait()
    assert opened(shop, memory, load=None).recovery is not None


def test_another_sites_journal_is_not_offered(shop: Path, memory: Path, tmp_path: Path) -> None:
    session = opened(shop, memory)
    session.set_value(LOAD, ("order",), "KY-1")
    session.close()
    assert opened(make_shop(tmp_path / "other"), memory, load=None).recovery is None


def test_edits_are_recovered_over_a_file_changed_meanwhile_where_they_still_fit(
    shop: Path, memory: Path
) -> None:
    session = opened(shop, memory)
    session.set_value(LOAD, ("hangs", 0, "side"), "back")
    session.undo()
    session.set_value(LOAD, ("order",), "KY-1")
    session.close()
    path = file_of(session, LOAD)
    path.write_text(path.read_text(encoding="utf-8").replace('lot = "A"', 'lot = "C"'), encoding="utf-8")
    again = opened(shop, memory, load=None)
    again.recover()
    assert (again.record(LOAD).order, again.record(LOAD).lot) == ("KY-1", "C")
    again.save()
    assert 'lot = "C"' in path.read_text(encoding="utf-8")


def test_edits_that_fit_no_more_are_told_and_stay_on_offer(shop: Path, memory: Path) -> None:
    session = opened(shop, memory)
    session.set_value(LOAD, ("hangs", 0, "tips"), "A1-A4")
    session.set_value(LOAD, ("recipe",), "hardcoat-50-2024")
    session.close()
    (shop / "configs/recipes/hardcoat-50-2024.toml").unlink()
    again = opened(shop, memory, load=None)
    with pytest.raises(FilesError, match="`hardcoat-50-2024` is not a recipe of this site"):
        again.recover()
    assert again.recovery is not None
    assert (again.dirty, again.name) == ((), "")
    path = file_of(again, LOAD)
    path.write_text(path.read_text(encoding="utf-8").split("[[hang]]")[0] + "hang = 3\n", encoding="utf-8")
    again.close()
    again = opened(shop, memory, load=None)
    with pytest.raises(FilesError):
        again.recover()
    again.close()
    assert len(journals(memory)) == 1


def test_a_place_that_is_gone_is_told_as_a_changed_file(shop: Path, memory: Path) -> None:
    session = opened(shop, memory)
    load = session.record(LOAD)
    hang = load.hangs[0]
    many = tuple(replace(hang, tips=(f"{row}1-{row}4",)) for row in "ABC")
    session.set_record(LOAD, replace(load, hangs=many), "split")
    session.save()
    session.set_value(LOAD, ("hangs", 2, "tips"), "C1")
    session.close()
    path = file_of(session, LOAD)
    text = path.read_text(encoding="utf-8")
    path.write_text(
        text[: text.rindex("[[hang]]")].replace('\n[[hang]]\npart = "valve-block"\ntips = ["B1-B4"]\n', ""),
        encoding="utf-8",
    )
    with pytest.raises(FileChangedError):
        opened(shop, memory, load=None).recover()


def test_a_disk_that_takes_no_journal_stops_no_edit(shop: Path, tmp_path: Path) -> None:
    blocked = tmp_path / "blocked"
    blocked.write_text("a file where the folder should be", encoding="utf-8")
    session = opened(shop, blocked / "memory")
    assert session.protected
    assert session.set_value(LOAD, ("order",), "KY-1") is None
    assert not session.protected
    session.close()
    assert not opened(shop).protected


def test_a_long_journal_is_begun_anew(memory: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(journal, "_MOST", 1000)
    writer = Journal(memory, "shop")
    for number in range(100):
        writer.write({"number": number, "words": "x" * 100})
        assert len(journals(memory)) == 1
        assert journals(memory)[0].stat().st_size < 1200
    writer.close()
    found = leftover(memory, "shop")
    assert found is not None
    assert found.line["number"] == 99
    found.remove()
    assert journals(memory) == []
