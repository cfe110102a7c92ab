"""Damaged files of every kind: problems or a record, never another exception, and the file stays as it is."""

import tempfile
from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from lineplanner.files.kinds import kinds
from lineplanner.files.problems import UnitSystem, word
from lineplanner.files.reading import check
from tests.files.samples import text_of

SYSTEMS: tuple[UnitSystem, ...] = ("metric", "us")
KINDS = [*kinds(), "part-turned", "part-section", "part-tube", "part-stated"]
OTHER_PARTS = {
    "part-turned": """\
format = "lineplanner part 1"
form = "turned"
name = "Pin"
material = "steel"
profile = [
    { axis = "0 mm", radius = "10 mm" },
    { axis = "50 mm", radius = "10 mm" },
]
[[bore]]
diameter = "5 mm"
depth = "20 mm"
""",
    "part-section": """\
format = "lineplanner part 1"
form = "section"
name = "Rail"
material = "6061-t6"
length = "1 m"
[outline]
shape = "points"
points = [{ at = ["0 mm", "0 mm"] }, { at = ["20 mm", "0 mm"], bulge = "2 mm" }, { at = ["0 mm", "20 mm"] }]
[[mask]]
face = "side"
start = "0 mm"
end = "10 mm"
""",
    "part-tube": """\
format = "lineplanner part 1"
form = "tube"
name = "Tube"
material = "6061-t6"
diameter = "20 mm"
inner_diameter = "16 mm"
length = "300 mm"
""",
    "part-stated": """\
format = "lineplanner part 1"
form = "stated"
name = "Casting"
material = "6061-t6"
area = "5 dm2"
width = "100 mm"
height = "80 mm"
depth = "40 mm"
measured_by = "A. Smith, from the model"
""",
}
WORDS = [
    '"unknown"', '"-5 mm"', '"1e300 mm"', '"0"', '""', '" "', "5", "-1", "0.0", "nan", "-inf", "true", "[]", "{}",
    "[[]]", "{ a = 1 }", "2026-03-14", "2026-03-14T10:00:00", "07:32:00", '"A1-A99999999"', '"\\u0000"', '"\\u202e"',
    "9" * 5000, '"' + "x" * 5000 + '"', "[" * 500 + "]" * 500, '["1 mm", "2 mm", "3 mm"]', '[["1 mm"]]', "1e999",
]  # fmt: skip


def sample(kind: str) -> str:
    return OTHER_PARTS.get(kind) or text_of(kind)


def outcome(content: bytes) -> None:
    """Read it: a record, or problems that can be worded; nothing else, and the file is not touched."""
    with tempfile.TemporaryDirectory() as folder:
        path = Path(folder) / "fuzz.toml"
        path.write_bytes(content)
        for problem in check(path):
            for system in SYSTEMS:
                text = word(problem, system)
                assert text.isprintable()
                assert ": " in text
            assert problem.line is None or 1 <= problem.line <= content.count(b"\n") + 1
        assert path.read_bytes() == content


@pytest.mark.parametrize("kind", KINDS)
@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_a_file_cut_anywhere_is_refused_or_read(kind: str, data: st.DataObject) -> None:
    content = sample(kind).encode()
    outcome(content[: data.draw(st.integers(0, len(content)))])


@pytest.mark.parametrize("kind", KINDS)
@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_a_file_with_any_byte_changed_is_refused_or_read(kind: str, data: st.DataObject) -> None:
    content = bytearray(sample(kind).encode())
    for _ in range(data.draw(st.integers(1, 5))):
        content[data.draw(st.integers(0, len(content) - 1))] = data.draw(st.integers(0, 255))
    outcome(bytes(content))


@pytest.mark.parametrize("kind", KINDS)
@settings(max_examples=60, deadline=None)
@given(data=st.data())
def test_a_file_with_values_of_any_type_is_refused_or_read(kind: str, data: st.DataObject) -> None:
    lines = sample(kind).splitlines()
    for _ in range(data.draw(st.integers(1, 4))):
        index = data.draw(st.integers(1, len(lines) - 1))
        key = lines[index].split(" = ")[0]
        lines[index] = f"{key} = {data.draw(st.sampled_from(WORDS))}"
    outcome("\n".join(lines).encode())


@pytest.mark.parametrize("kind", KINDS)
@settings(max_examples=40, deadline=None)
@given(data=st.data())
def test_a_file_with_lines_lost_or_repeated_is_refused_or_read(kind: str, data: st.DataObject) -> None:
    lines = sample(kind).splitlines()
    for _ in range(data.draw(st.integers(1, 4))):
        index = data.draw(st.integers(0, len(lines) - 1))
        lines[index : index + 1] = data.draw(st.sampled_from([[], [lines[index]] * 2, [lines[index] * 2]]))
        lines = lines or [""]
    outcome("\n".join(lines).encode())


@settings(deadline=None)
@given(st.binary(max_size=300))
def test_any_bytes_are_refused_or_read(content: bytes) -> None:
    outcome(content)


@pytest.mark.parametrize(
    "content",
    [
        b'format = "lineplanner part 1"\nform = "plate"\n' + b"a = 1\n" * 100_000,
        b'format = "lineplanner part 1"\n' + b"".join(b"k%d = 1\n" % n for n in range(100_000)),
        b'format = "lineplanner load 1"\n' + b"[[hang]]\n" * 100_000,
        b'format = "lineplanner load 1"\nnote = "' + b"x" * 1_900_000 + b'"\n',
        b'format = "lineplanner load 1"\n' + b"a." * 900_000 + b"a = 1\n",
        b'format = "lineplanner load 1"\n[' + b"a." * 10_000 + b"a]\n",
    ],
    ids=["one key", "many keys", "many tables", "long text", "long key", "long heading"],
)
def test_a_huge_file_is_answered(content: bytes) -> None:
    outcome(content)
