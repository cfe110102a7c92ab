"""The README's commands, run as printed. RENEW=1 writes what they print back into it."""

import os
import re
import shlex
import subprocess
import sys
from pathlib import Path

ROOT = Path(__file__).parents[1]
README = ROOT / "README.md"
BLOCK = re.compile(r"```console\n(.*?)```\n", re.DOTALL)
SHOWN = 24  # lines of a long answer that the README shows


def answered(command: str) -> list[str]:
    """What a command of the README prints on stdout, from the project's own folder."""
    words = shlex.split(command)
    assert words[0] == "lineplanner"
    done = subprocess.run(
        [sys.executable, "-m", "lineplanner", *words[1:]],
        cwd=ROOT,
        capture_output=True,
        text=True,
        encoding="utf-8",
        env={**os.environ, "PYTHONUTF8": "1", "NO_COLOR": "1"},
        check=False,
    )
    assert done.returncode in {0, 1, 2}, done.stderr
    return [line.rstrip() for line in (done.stdout or done.stderr).splitlines()]


def commands_of(block: str) -> list[tuple[str, list[str]]]:
    """The commands of a block with the lines printed under each."""
    found: list[tuple[str, list[str]]] = []
    for line in block.splitlines():
        if line.startswith("$ "):
            found.append((line[2:], []))
        else:
            found[-1][1].append(line)
    return found


def renewed(block: str) -> str:
    """A block with what its commands print now; long answers are cut and end in a line of dots."""
    lines = []
    for command, _ in commands_of(block):
        out = answered(command)
        lines += [f"$ {command}", *(out if len(out) <= SHOWN else [*out[:SHOWN], "..."])]
    return "\n".join(lines) + "\n"


def test_the_readme_shows_what_its_commands_print() -> None:
    text = README.read_text(encoding="utf-8")
    if os.environ.get("RENEW"):
        README.write_text(BLOCK.sub(lambda m: f"```console\n{renewed(m[1])}```\n", text), encoding="utf-8")
        return
    blocks = BLOCK.findall(text)
    assert len(blocks) >= 5
    for block in blocks:
        assert renewed(block) == block
