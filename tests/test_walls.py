"""The walls between the rooms hold, and each of them is seen to fall when somebody walks through it."""

import itertools
import os
import re
import shutil
import subprocess
import sys
import tomllib
from pathlib import Path

import pytest

# The walls are checked with the development tools; README's test command does without them.
pytest.importorskip("importlinter")

CHECKOUT = Path(__file__).parent.parent
CONTRACTS = tomllib.loads((CHECKOUT / "pyproject.toml").read_text(encoding="utf-8"))["tool"]["importlinter"][
    "contracts"
]
LAYERS = [
    [room.strip().strip("()") for room in line.split("|")]
    for line in next(contract for contract in CONTRACTS if contract["type"] == "layers")["layers"]
]
ROOMS = [room for line in LAYERS for room in line]
# library -> the only room that may import it
LIBRARIES = {
    "pint": "units",
    "textual": "tui",
    "rich": "tui",
    "tomllib": "files",
    "tomlkit": "files",
    "tomli_w": "files",
    "pydantic": "files",
    "click": "cli",
}
NAMES = {contract["id"]: contract["name"] for contract in CONTRACTS}


def verdicts(folder: Path) -> tuple[dict[str, bool], str]:
    """Run import-linter on the package in a folder: contract id -> kept, and all it printed."""
    code = "from importlinter.cli import lint_imports_command as run; run()"
    run = subprocess.run(
        [sys.executable, "-c", code, "--no-cache", "--no-logo"],
        cwd=folder,
        env=os.environ | {"PYTHONPATH": str(folder), "COLUMNS": "200", "NO_COLOR": "1"},
        capture_output=True,
        encoding="utf-8",
        check=False,
    )
    printed = run.stdout + run.stderr
    kept = {
        key: f"{name} KEPT" in printed
        for key, name in NAMES.items()
        if f"{name} KEPT" in printed or f"{name} BROKEN" in printed
    }
    assert kept.keys() == NAMES.keys(), printed
    assert (run.returncode == 0) == all(kept.values()), printed
    return kept, printed


@pytest.fixture
def house(tmp_path: Path) -> Path:
    """A copy of the project's contracts over a package with every room, each using what it may use."""
    shutil.copy(CHECKOUT / "pyproject.toml", tmp_path)
    package = tmp_path / "lineplanner"
    package.mkdir()
    (package / "__init__.py").touch()
    for above, below in zip(LAYERS, [*LAYERS[1:], []], strict=True):
        for room in above:
            imports = [f"import lineplanner.{other}\n" for other in below]
            imports += [f"import {library}\n" for library, owner in LIBRARIES.items() if owner == room]
            if room.startswith("__"):
                (package / f"{room}.py").write_text("".join(imports), encoding="utf-8")
            else:
                (package / room).mkdir()
                (package / room / "__init__.py").touch()
                (package / room / "inner.py").write_text("".join(imports), encoding="utf-8")
    return tmp_path


def breach(house: Path, room: str, imported: str) -> None:
    """Add one import to a room."""
    file = house / "lineplanner" / room / "__init__.py"
    file.write_text(f"{file.read_text(encoding='utf-8')}import {imported}\n", encoding="utf-8")


def broken(house: Path) -> set[str]:
    return {key for key, kept in verdicts(house)[0].items() if not kept}


def test_there_is_one_wall_for_the_rooms_and_one_per_outside_library() -> None:
    assert NAMES.keys() == {"layers", *LIBRARIES}


def test_every_wall_stands_in_the_package_as_it_is() -> None:
    kept, printed = verdicts(CHECKOUT)
    assert all(kept.values()), printed


def test_a_house_where_every_room_uses_what_it_may_keeps_every_wall(house: Path) -> None:
    assert broken(house) == set()


def test_a_stray_module_breaks_the_layers(house: Path) -> None:
    (house / "lineplanner" / "stray.py").touch()
    assert broken(house) == {"layers"}


def test_every_room_is_kept_from_the_room_above_it_and_from_the_room_beside_it(house: Path) -> None:
    forbidden = {
        (low, high)
        for above, below in itertools.pairwise(LAYERS[1:])  # nothing imports the door
        for low in below
        for high in above
    }
    forbidden |= {(one, other) for line in LAYERS for one in line for other in line if one != other}
    for room, imported in forbidden:
        breach(house, room, f"lineplanner.{imported}")
    kept, printed = verdicts(house)
    assert [key for key, stands in kept.items() if not stands] == ["layers"]
    # a direct import is printed as one step; a chain would end elsewhere
    seen = set(re.findall(r"-\s+lineplanner\.(\w+) -> lineplanner\.(\w+) ", printed))
    assert forbidden <= seen


@pytest.mark.parametrize("library", sorted(LIBRARIES))
def test_an_outside_library_in_a_room_of_the_engine_breaks_exactly_its_wall(
    house: Path, library: str
) -> None:
    breach(house, "bath", library)
    assert broken(house) == {library}


def test_no_room_but_its_owner_may_import_an_outside_library(house: Path) -> None:
    forbidden = {
        (room, library)
        for library, owner in LIBRARIES.items()
        for room in ROOMS
        if room != owner and not room.startswith("__")
    }
    for room, library in forbidden:
        breach(house, room, library)
    kept, printed = verdicts(house)
    assert {key for key, stands in kept.items() if not stands} == set(LIBRARIES)
    seen = set(re.findall(r"-\s+lineplanner\.(\w+) -> (\w+) ", printed))
    assert forbidden <= seen
