"""A site with one value changed at random: every command answers with 0, 1 or 2, and never touches a file."""

import random
import re
import shutil
from pathlib import Path

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from lineplanner.cli import main

ROOT = Path(__file__).parents[2]
VALUE = re.compile(r'(?P<head>^[^#\n]*?= *|\[ *|, *)(?P<value>"[^"\n]*"|true|false|-?\d+(?:\.\d+)?)')
UNIT = re.compile(r'"(?P<number>-?[\d.]+) ?(?P<unit>[^"\d][^"]*)?"')

# What a mistaken hand or a broken export writes in place of a value.
FOREIGN = [
    '""',
    '"abc"',
    '"1,5 mm"',
    '"nan mm"',
    '"9**9**9 A"',
    "true",
    "[]",
    "{}",
    "3",
    "-1",
    '"unknown"',
    '"[/b]"',
]
FACTORS = [0.0, -1.0, 1e-9, 1e-3, 0.01, 0.1, 0.5, 2.0, 10.0, 1e3, 1e6, 1e12]


@pytest.fixture(scope="module")
def site(tmp_path_factory: pytest.TempPathFactory) -> Path:
    folder = tmp_path_factory.mktemp("site")
    for name in ("configs", "rack_library"):
        shutil.copytree(ROOT / name, folder / name)
    return folder


def changed(text: str, chance: random.Random) -> str:
    """The text with one value replaced: another size, or something foreign."""
    places = list(VALUE.finditer(text))
    place = chance.choice(places)
    value = place["value"]
    sized = UNIT.fullmatch(value)
    if sized is not None and chance.random() < 0.7:
        number = float(sized["number"]) * chance.choice(FACTORS)
        new = f'"{number:.9g} {sized["unit"] or ""}"'
    elif re.fullmatch(r"-?\d+(\.\d+)?", value) and chance.random() < 0.7:
        new = str(int(float(value) * chance.choice(FACTORS)))
    else:
        new = chance.choice(FOREIGN)
    return text[: place.start("value")] + new + text[place.end("value") :]


def check_one(site: Path, seed: int, capsys: pytest.CaptureFixture[str]) -> None:
    chance = random.Random(seed)
    load = chance.choice(sorted((site / "rack_library" / "loads").glob("*.toml"))).stem
    path = chance.choice(sorted(site.rglob("*.toml")))
    good = path.read_text(encoding="utf-8")
    bad = changed(good, chance)
    try:
        path.write_text(bad, encoding="utf-8")
        for command in (
            ["plan", load],
            ["plan", load, "--json"],
            ["card", load, "--units", "us"],
            ["plan", load, "--explain", "all"],
            ["check", str(path)],
            ["area", load],
        ):
            code = main([*command, "--site", str(site)] if command[0] != "check" else command)
            out, err = capsys.readouterr()
            assert code in {0, 1, 2}, (path, load, command, err)
            assert "nan" not in out.lower().split(), (path, load, command)
            assert "Traceback" not in out + err
            if code == 2:
                assert err or out
        assert path.read_text(encoding="utf-8") == bad
    finally:
        path.write_text(good, encoding="utf-8")


@given(st.integers(0, 10**9))
@settings(
    max_examples=25,
    deadline=None,
    derandomize=True,
    suppress_health_check=[HealthCheck.function_scoped_fixture],
)
def test_a_site_with_one_changed_value_never_breaks_a_command(
    site: Path, capsys: pytest.CaptureFixture[str], seed: int
) -> None:
    check_one(site, seed, capsys)


@pytest.mark.slow
@pytest.mark.timeout(1200)
@given(st.integers(0, 10**9))
@settings(max_examples=400, deadline=None, suppress_health_check=[HealthCheck.function_scoped_fixture])
def test_many_sites_with_one_changed_value(site: Path, capsys: pytest.CaptureFixture[str], seed: int) -> None:
    check_one(site, seed, capsys)
