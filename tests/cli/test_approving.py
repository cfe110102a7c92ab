"""Approving a recipe: what is written, what is kept, what is refused."""

import re
import subprocess
from collections.abc import Callable
from datetime import date, timedelta
from pathlib import Path

import pytest

from lineplanner.files.reading import read
from lineplanner.inputs.approval import content_hash, effective_status
from lineplanner.inputs.recipe import Recipe

Run = Callable[..., subprocess.CompletedProcess[str]]
DRAFT = "chrome-plate-grind"


@pytest.fixture
def recipes(run: Run, tmp_path: Path) -> Path:
    run("start", "shop")
    return tmp_path / "shop" / "configs" / "recipes"


def test_an_approval_writes_who_when_and_the_hash_of_the_values(run: Run, recipes: Path) -> None:
    done = run("approve", DRAFT, "--by", "A. Berg", "--site", "shop")
    assert (done.returncode, done.stderr) == (0, "")
    kept: Recipe = read(recipes / f"{DRAFT}.toml", "recipe")
    assert effective_status(kept) == "approved"
    assert (kept.status, kept.approved_by, kept.approved_content) == (
        "approved",
        "A. Berg",
        content_hash(kept),
    )
    on = date.fromisoformat(kept.approved_on)
    assert abs(date.today() - on) <= timedelta(days=1)  # noqa: DTZ011 - midnight may pass during the test
    assert done.stdout == (
        f"{Path('shop/configs/recipes') / DRAFT}.toml: {kept.name} rev {kept.revision} approved by A. Berg "
        f"on {kept.approved_on}, content {kept.approved_content}\n"
    )
    assert re.search(r"rev 0\.9 approved\b", run("plan", "rod-40x900", "--site", "shop").stdout)


def test_an_approval_changes_no_other_line(run: Run, recipes: Path) -> None:
    path = recipes / f"{DRAFT}.toml"
    before = path.read_text(encoding="utf-8").splitlines()
    run("approve", str(path), "--by", "A. Berg")
    after = path.read_text(encoding="utf-8").splitlines()
    new = [line for line in after if line not in before]
    assert [line.partition(" =")[0] for line in new] == [
        "status",
        "approved_by",
        "approved_on",
        "approved_content",
    ]
    assert [line for line in after if line not in new] == [
        line for line in before if line != 'status = "draft"'
    ]
    assert any(line.startswith("# ") for line in after)


def test_a_recipe_that_was_changed_is_approved_again(run: Run, recipes: Path) -> None:
    path = recipes / "chrome-flash.toml"
    text = path.read_text(encoding="utf-8").replace('value = "31 A/dm2"', 'value = "30 A/dm2"')
    path.write_text(text, encoding="utf-8")
    assert effective_status(read(path, "recipe")) == "draft"
    assert run("approve", "chrome-flash", "--by", "A. Berg", "--site", "shop").returncode == 0
    assert effective_status(read(path, "recipe")) == "approved"
    assert "short: plated to size" in path.read_text(encoding="utf-8")


def test_without_a_site_the_users_own_copy_is_approved_never_the_packaged_one(
    run: Run, tmp_path: Path
) -> None:
    done = run("approve", DRAFT, "--by", "A. Berg")
    assert done.returncode == 0
    own = tmp_path / "data" / "lineplanner" / "configs" / "recipes" / f"{DRAFT}.toml"
    assert effective_status(read(own, "recipe")) == "approved"


def test_a_recipe_that_cannot_be_read_is_not_approved(run: Run, recipes: Path) -> None:
    path = recipes / f"{DRAFT}.toml"
    path.write_text(path.read_text(encoding="utf-8").replace('"40 A/dm2"', '"40 A"'), encoding="utf-8")
    before = path.read_bytes()
    done = run("approve", DRAFT, "--by", "A. Berg", "--site", "shop")
    assert (done.returncode, done.stdout) == (2, "")
    assert "current_density" in done.stderr
    assert "`40 A` is not a current density" in done.stderr
    assert path.read_bytes() == before


def test_a_recipe_with_a_base_that_no_table_has_is_not_approved(run: Run, recipes: Path) -> None:
    path = recipes / f"{DRAFT}.toml"
    path.write_text(path.read_text(encoding="utf-8").replace('"cast-iron"', '"cast-irn"'), encoding="utf-8")
    before = path.read_bytes()
    done = run("approve", DRAFT, "--by", "A. Berg", "--site", "shop")
    assert done.returncode == 2
    assert "`cast-irn` is not a substrate" in done.stderr
    assert path.read_bytes() == before


@pytest.mark.parametrize(
    ("arguments", "said"),
    [
        ((DRAFT, "--by", " "), "nobody is named. Say who approves it: `--by NAME`"),
        ((DRAFT,), "Missing option '--by'"),
        (
            ("chrome-flas", "--by", "A"),
            "`chrome-flas` is not a recipe of this site. The nearest is `chrome-flash`",
        ),
        (("shop/rack_library/loads/lug-mix.toml", "--by", "A"), "`lineplanner recipe 1`"),
        ((DRAFT, "--by", "A\x1b[2J"), "holds characters that cannot be shown"),
    ],
    ids=["nobody", "no-name", "unknown", "no-recipe", "characters"],
)
def test_what_cannot_be_approved_exits_with_2_and_says_why(
    run: Run, recipes: Path, arguments: tuple[str, ...], said: str
) -> None:
    before = {path: path.read_bytes() for path in recipes.iterdir()}
    done = run("approve", *arguments, "--site", "shop")
    assert (done.returncode, done.stdout) == (2, "")
    assert said in done.stderr
    assert {path: path.read_bytes() for path in recipes.iterdir()} == before
