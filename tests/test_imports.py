"""What a command does not use it does not load."""

import subprocess
import sys
from pathlib import Path

SHOP = Path(__file__).parents[1]
HEAVY = {"numpy", "shapely", "pint", "pydantic", "click", "textual", "rich", "tomlkit"}


def loaded_by(*arguments: str) -> set[str]:
    """Top-level packages in a fresh interpreter after one command."""
    code = (
        "import sys; from lineplanner.__main__ import main; "
        "code = main(sys.argv[1:]); print(*sys.modules, file=sys.stderr); sys.exit(code)"
    )
    run = subprocess.run(
        [sys.executable, "-c", code, *arguments], capture_output=True, encoding="utf-8", check=True
    )
    return {module.split(".")[0] for module in run.stderr.split()}


def test_the_version_is_answered_before_anything_heavy_is_loaded() -> None:
    loaded = loaded_by("--version")
    assert "lineplanner" in loaded
    assert loaded & HEAVY == set()


def test_planning_the_demo_shop_loads_no_unit_library() -> None:
    """A unit that the shop is written in and the table lacks: see lineplanner.units.table."""
    loads = sorted(path.stem for path in (SHOP / "rack_library" / "loads").rglob("*.toml"))
    assert len(loads) > 10
    code = (
        "import sys; from lineplanner.__main__ import main\n"
        "for load in sys.argv[1:]:\n"
        "    for units in ('metric', 'us'): assert main(['card', load, '--units', units]) in (0, 1), load\n"
        "sys.exit('pint' in sys.modules)"
    )
    run = subprocess.run(
        [sys.executable, "-c", code, *loads], check=False, cwd=SHOP, capture_output=True, encoding="utf-8"
    )
    assert (run.returncode, run.stderr) == (0, "")
