"""What a command does not use it does not load."""

import subprocess
import sys

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
