"""Each command by a real start of the program: what it prints where, and its exit code."""

import json
import re
import subprocess
from collections.abc import Callable
from pathlib import Path

import pytest

from lineplanner import __version__

CHECKOUT = Path(__file__).parents[2]
Run = Callable[..., subprocess.CompletedProcess[str]]
STOPPED_LOAD = "vent-panels-24"  # asks more of R2 than its nameplate


# --- plan -------------------------------------------------------------------------------------------------


def test_a_plan_is_printed_and_exits_with_0(run: Run) -> None:
    done = run("plan", "valve-blocks-24")
    assert (done.returncode, done.stderr) == (0, "")
    lines = done.stdout.splitlines()
    assert lines[0].startswith("valve-blocks-24   valve blocks, full rack   order KY-24817   lot A")
    assert any(line.startswith("SET  ") for line in lines[:6])
    assert lines[-1] == "Planning estimate; safety data sheet, local codes, qualified people decide."


def test_a_plan_with_a_stop_exits_with_1(run: Run) -> None:
    done = run("plan", STOPPED_LOAD)
    assert (done.returncode, done.stderr) == (1, "")
    assert "\nSTOP  rectifier rating " in done.stdout


def test_a_plan_as_json_is_json_alone(run: Run) -> None:
    done = run("plan", STOPPED_LOAD, "--json")
    assert (done.returncode, done.stderr) == (1, "")
    record = json.loads(done.stdout)
    assert record["format"] == "lineplanner plan 1"
    assert record["made_with"] == f"lineplanner {__version__}"
    assert record["current"]["set_A"] is None
    assert done.stdout.isascii()


def test_a_figure_is_explained(run: Run) -> None:
    done = run("plan", "valve-blocks-24", "--explain", "current.set_A", "--explain", "check:contacts")
    assert done.returncode == 0
    lines = done.stdout.splitlines()
    assert lines[0] == "current.set_A"
    assert "check:contacts" in lines


def test_json_and_explain_together_hold_the_stories_too(run: Run) -> None:
    record = json.loads(run("plan", "valve-blocks-24", "--json", "--explain", "time").stdout)
    assert list(record["why"]) == ["time.total_s", "time.at_set_current_s"]


def test_an_unknown_figure_exits_with_2_and_names_the_nearest(run: Run) -> None:
    done = run("plan", "valve-blocks-24", "--explain", "current.sett_A")
    assert (done.returncode, done.stdout) == (2, "")
    assert done.stderr.startswith(
        "lineplanner: `current.sett_A` is not a figure of this plan. The nearest: `current.set_A`"
    )


def test_an_unknown_load_exits_with_2_and_names_the_nearest(run: Run) -> None:
    done = run("plan", "valve-block-24")
    assert (done.returncode, done.stdout) == (2, "")
    assert "`valve-block-24` is not a load of this site. The nearest is `valve-blocks-24`" in done.stderr


def test_us_units_are_printed_where_asked_for(run: Run) -> None:
    metric, us = run("plan", "valve-blocks-24").stdout, run("plan", "valve-blocks-24", "--units", "us").stdout
    assert " dm²" in metric
    assert " ft²" in us
    assert " dm²" not in us


def test_options_may_stand_before_the_command(run: Run) -> None:
    assert (
        run("--units", "us", "plan", "valve-blocks-24").stdout
        == run("plan", "valve-blocks-24", "--units", "us").stdout
    )


def test_plain_letters_only_where_asked_for(run: Run) -> None:
    done = run("plan", "valve-blocks-24", "--ascii")
    assert done.stdout.isascii()
    assert " dm2" in done.stdout


def test_a_terminal_without_the_signs_gets_plain_letters(run: Run) -> None:
    done = run("plan", "valve-blocks-24", env={"PYTHONIOENCODING": "ascii"})
    assert done.returncode == 0
    assert done.stdout.isascii()


# --- card and no command ----------------------------------------------------------------------------------


def test_a_card_is_printed(run: Run) -> None:
    done = run("card", "rod-40x900")
    assert (done.returncode, done.stderr) == (0, "")
    assert done.stdout.startswith("RUN CARD  rod-40x900")
    assert run("card", STOPPED_LOAD).returncode == 1


def test_without_a_command_the_card_of_the_first_load_is_printed_and_said_on_stderr(run: Run) -> None:
    done = run()
    assert done.returncode == 0
    assert done.stdout == run("card", "valve-blocks-24").stdout
    assert done.stderr == (
        "lineplanner: no screen here; this is the run card of valve-blocks-24. Commands: lineplanner --help\n"
    )


def test_without_a_command_a_stopped_first_load_still_exits_with_0(run: Run, tmp_path: Path) -> None:
    run("start", "shop")
    site = tmp_path / "shop" / "configs" / "site.toml"
    text = site.read_text(encoding="utf-8")
    site.write_text(re.sub(r'first_load = ".*"', f'first_load = "{STOPPED_LOAD}"', text), encoding="utf-8")
    done = run("--site", "shop")
    assert done.returncode == 0
    assert "NOTHING TO SET" in done.stdout


# --- area, sources, check, start --------------------------------------------------------------------------


def test_areas_are_printed_for_a_part_a_rack_and_a_load(run: Run) -> None:
    for name in ("valve-block", "spline-24", "valve-blocks-24"):
        done = run("area", name)
        assert (done.returncode, done.stderr) == (0, ""), name
        assert done.stdout.splitlines()[0] == name
    assert json.loads(run("area", "valve-block", "--json").stdout)["format"] == "lineplanner area 1"
    done = run("area", "nothing-like-it")
    assert (done.returncode, done.stdout) == (2, "")


def test_how_many_more_fit_and_are_carried_is_printed(run: Run) -> None:
    done = run("fill", "guide-pins-flash", "--part", "guide-pin")
    assert (done.returncode, done.stderr) == (0, "")
    lines = done.stdout.splitlines()
    assert re.match(r"guide pin 16: \d+ more fit at the gap of 41 mm that hangs there", lines[0])
    assert any(line.startswith("SET  ") for line in lines)
    record = json.loads(run("fill", "guide-pins-flash", "--part", "guide-pin", "--json").stdout)
    assert record["format"] == "lineplanner fill 1"
    assert record["carried"] == record["fits"] > 0
    assert record["stop"] is None
    assert record["plan"]["area"]["items"][0]["count"] == 24 + record["carried"]
    assert f"{record['plan']['current']['panel_set_A']:.0f} A" in done.stdout


def test_more_of_a_part_that_does_not_hang_yet_begins_with_one(run: Run) -> None:
    done = run("fill", "valve-blocks-24", "--part", "lug")
    assert (done.returncode, done.stdout) == (2, "")  # every tip is taken
    assert "no free tip is left on rack spline-24" in done.stderr
    done = run("fill", "valve-blocks-24", "--part", "nut")
    assert done.returncode == 2
    assert run("fill", "valve-blocks-24").returncode == 2  # which part is not said


def test_sources_follow_the_units_asked_for(run: Run) -> None:
    assert "coolest bake of the chart: 374 °F " in run("sources", "--units", "us").stdout
    assert "coolest bake of the chart: 190 °C " in run("sources", "--units", "metric").stdout


def test_sources_are_listed(run: Run) -> None:
    done = run("sources")
    assert (done.returncode, done.stderr) == (0, "")
    assert "configs/standards/limits.toml" in done.stdout.splitlines()
    assert len(json.loads(run("sources", "--json").stdout)) > 100


def test_files_without_a_problem_exit_with_0(run: Run) -> None:
    done = run("check", str(CHECKOUT / "rack_library" / "loads" / "lug-mix.toml"))
    assert (done.returncode, done.stdout) == (0, "")
    assert done.stderr == "lineplanner: 1 file(s) read, 0 problem(s)\n"


def test_every_file_of_the_demo_shop_is_without_a_problem(run: Run) -> None:
    done = run("check", str(CHECKOUT / "configs"), str(CHECKOUT / "rack_library"))
    assert (done.returncode, done.stdout) == (0, "")


def test_each_problem_of_a_file_is_reported_with_line_and_key(run: Run, tmp_path: Path) -> None:
    (tmp_path / "bad.toml").write_text(
        'format = "lineplanner rack 1"\nname = "r"\nconductor = "titanium-2"\nwidth = "3 A"\nheigth = "1 m"\n',
        encoding="utf-8",
    )
    done = run("check", "bad.toml")
    assert done.returncode == 2
    lines = done.stdout.splitlines()
    assert lines[0].startswith(
        "bad.toml:4: width: `3 A` is not a length. Give a number with a unit such as `120 mm`"
    )
    assert any(
        line.startswith("bad.toml:5: heigth: `heigth` is not a key here. The nearest is `height`")
        for line in lines
    )


def test_a_load_is_checked_with_all_it_refers_to(run: Run, tmp_path: Path) -> None:
    run("start", "shop")
    load = tmp_path / "shop" / "rack_library" / "loads" / "lug-mix.toml"
    text = load.read_text(encoding="utf-8")
    load.write_text(text.replace('rack = "spline-24"', 'rack = "spline-25"'), encoding="utf-8")
    done = run("check", "shop/rack_library/loads/lug-mix.toml")
    assert done.returncode == 2
    assert "`spline-25` is not a rack of this site. The nearest is `spline-24`" in done.stdout


def test_check_without_a_file_says_what_it_needs(run: Run) -> None:
    done = run("check")
    assert done.returncode == 2
    assert done.stderr == "lineplanner: no file is named. Name one or more files, or `--schema KIND`\n"


def test_a_recipe_changed_since_its_approval_is_no_problem_and_is_told(run: Run, tmp_path: Path) -> None:
    run("start", "shop")
    recipe = tmp_path / "shop" / "configs" / "recipes" / "type-ii-clear.toml"
    recipe.write_text(recipe.read_text(encoding="utf-8") + '\n[[after]]\nname = "wipe"\n', encoding="utf-8")
    done = run("check", "shop/configs/recipes")
    assert (done.returncode, done.stdout) == (0, "")
    assert done.stderr.splitlines()[0] == (
        f"lineplanner: {Path('shop/configs/recipes/type-ii-clear.toml')}: changed since process engineer approved "
        "it, so it counts as a draft. Approve it again: "
        "`lineplanner approve shop/configs/recipes/type-ii-clear.toml --by NAME`"
    )
    assert "0 problem(s)" in done.stderr.splitlines()[-1]
    heading = " ".join(run("plan", "vent-panels-24", "--site", "shop").stdout.split()[:40])
    assert "DRAFT RECIPE (changed since it was approved)" in heading


@pytest.mark.parametrize(
    ("file", "kind"),
    [
        ("shop/rack_library/parts/new.toml", "part"),
        ("shop/configs/recipes/new.toml", "recipe"),
        ("shop/configs/site.toml", "site"),
        ("shop/configs/standards/new.toml", "KIND"),
        ("new.toml", "KIND"),
    ],
)
def test_an_empty_file_is_told_the_first_line_of_its_folder(
    run: Run, tmp_path: Path, file: str, kind: str
) -> None:
    run("start", "shop")
    (tmp_path / file).write_text("\n", encoding="utf-8")
    done = run("check", file)
    assert done.returncode == 2
    assert done.stdout == (
        f"{Path(file)}: has no format line. Begin the file with a line such as "
        f'`format = "lineplanner {kind} 1"`\n'
    )


def test_a_schema_is_printed_and_an_unknown_kind_lists_the_kinds(run: Run) -> None:
    assert json.loads(run("check", "--schema", "part").stdout)["title"] == "lineplanner part 1"
    done = run("check", "--schema", "nut")
    assert done.returncode == 2
    assert done.stderr.startswith("lineplanner: `nut` is not a kind of file. Kinds: `site`, ")


def test_a_site_is_started_and_its_loads_run(run: Run) -> None:
    done = run("start", "shop")
    assert (done.returncode, done.stderr) == (0, "")
    assert re.fullmatch(r"shop: \d+ files written\. Begin with `lineplanner --site shop`\n", done.stdout)
    assert run("plan", "valve-blocks-24", "--site", "shop").returncode == 0
    again = run("start", "shop")
    assert again.returncode == 2
    assert "holds configs already, and is left as it is" in again.stderr


def test_a_site_is_started_in_a_folder_that_is_named(run: Run, tmp_path: Path) -> None:
    for nothing in ("", " "):
        done = run("start", nothing)
        assert (done.returncode, done.stdout) == (2, "")
        said = "lineplanner: no folder is named. Name an empty or a new one: `lineplanner start DIR`\n"
        assert done.stderr == said
    assert list(tmp_path.iterdir()) == []


def test_a_command_to_type_has_quotes_round_a_folder_with_blanks(run: Run) -> None:
    assert run("start", "our shop").stdout.endswith('Begin with `lineplanner --site "our shop"`\n')


def test_a_site_that_is_none_exits_with_2(run: Run) -> None:
    done = run("plan", "valve-blocks-24", "--site", "nowhere")
    assert (done.returncode, done.stdout) == (2, "")
    assert "there is no such folder" in done.stderr


# --- the command line itself ------------------------------------------------------------------------------


@pytest.mark.parametrize(
    ("arguments", "said"),
    [
        (["plam"], "`plam` is not a command. The nearest is `plan`. See `lineplanner --help`"),
        (["plan"], "Missing argument 'LOAD'. See `lineplanner plan --help`"),
        (
            ["plan", "x", "--units", "si"],
            "--units: 'si' is not one of 'metric', 'us'. See `lineplanner plan --help`",
        ),
    ],
    ids=["command", "argument", "choice"],
)
def test_a_wrong_command_line_exits_with_2_and_says_where_help_is(
    run: Run, arguments: list[str], said: str
) -> None:
    done = run(*arguments)
    assert (done.returncode, done.stdout, done.stderr) == (2, "", f"lineplanner: {said}\n")


def test_help_names_every_command(run: Run) -> None:
    done = run("--help")
    assert (done.returncode, done.stderr) == (0, "")
    for command in ("plan", "card", "area", "check", "sources", "start", "approve"):
        assert re.search(rf"^  {command} ", done.stdout, re.MULTILINE)
    assert run("plan", "--help").returncode == 0


def test_the_version_is_printed_with_other_options_too(run: Run) -> None:
    assert run("--version", "--ascii").stdout == f"lineplanner {__version__}\n"
