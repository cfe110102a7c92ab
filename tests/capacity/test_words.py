"""Every key that a check uses has a sentence, and no sentence lies idle."""

import ast
import re
from pathlib import Path

import lineplanner.capacity
from lineplanner.report.words import messages
from lineplanner.report.words.capacity import MESSAGES

ROOM = Path(lineplanner.capacity.__file__).parent
TREES = [ast.parse(file.read_text(encoding="utf-8")) for file in sorted(ROOM.glob("*.py"))]
TEXTS = {
    node.value
    for tree in TREES
    for node in ast.walk(tree)
    if isinstance(node, ast.Constant) and isinstance(node.value, str)
}
# Keys put together at run time: a check's name with one of these endings.
ENDINGS = (
    ".near",
    ".fewer",
    ".less",
    ".larger",
    ".smaller",
    ".thicker",
    ".watch",
    ".fail",
    ".act",
    ".notice",
)


def test_every_key_written_out_has_a_sentence() -> None:
    keys = {text for text in TEXTS if re.fullmatch(r"[a-z]+(-[a-z]+)*\.[a-z-]+", text)}
    assert keys
    assert keys - messages().keys() == set()


def test_no_sentence_lies_idle() -> None:
    idle = [key for key in MESSAGES if key not in TEXTS and not key.endswith(ENDINGS)]
    assert idle in ([], ["rack-air", "rack-bath"])  # named by their place


def test_a_sentence_ends_without_a_stop_and_promises_nothing() -> None:
    for text in MESSAGES.values():
        assert not text.endswith(".")
        assert not re.search(r"\b(safe|compliant)\b", text, re.IGNORECASE)
