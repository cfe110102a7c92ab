"""A site's files by name, and a load with everything it refers to."""

import os
import shutil
import sys
from pathlib import Path

import pytest

from lineplanner.files.checking import check_in_site
from lineplanner.files.library import Library, open_library
from lineplanner.files.problems import FilesError, word
from lineplanner.files.site import find_site, packaged_site, writable
from lineplanner.inputs.load import Load
from lineplanner.sources import Status
from tests.files.samples import LINE, LOAD, MATERIAL, PART, make_site, table_text


@pytest.fixture
def site(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> Path:
    monkeypatch.chdir(tmp_path)
    monkeypatch.setenv("XDG_DATA_HOME", str(tmp_path / "user"))
    return make_site(tmp_path / "shop")


def change(site: Path, name: str, *changes: tuple[str, str]) -> None:
    path = site / name
    text = path.read_text(encoding="utf-8")
    for old, new in changes:
        assert old in text
        text = text.replace(old, new, 1)
    path.write_text(text, encoding="utf-8")


def told(site: Path, load: str = "six-lugs") -> list[str]:
    """What a case of the load is refused for."""
    with pytest.raises(FilesError) as caught:
        Library(site).case(load)
    return [word(problem).replace("\\", "/").removeprefix("shop/") for problem in caught.value.problems]


# --- a case ----------------------------------------------------------------------------------------------


def test_a_load_brings_every_record_it_refers_to(site: Path) -> None:
    case = Library(site).case("six-lugs")
    assert (case.name, case.load.name, case.recipe.name, case.rack.name) == (
        "six-lugs",
        "Six lugs",
        "Clear",
        "Spline",
    )
    assert (case.line.name, case.tank.name, case.bath.name) == ("Line one", "T1", "Sulfuric")
    assert (list(case.parts), list(case.materials), list(case.baths)) == (["lug"], ["6061-t6"], ["acid"])
    assert case.site.name == "Example shop"
    assert [row.name for row in case.tables.alloys] == ["6xxx"]
    assert case.cautions.cautions


def test_a_load_may_be_a_file_outside_the_library(site: Path, tmp_path: Path) -> None:
    mine = tmp_path / "mine.toml"
    mine.write_text(LOAD, encoding="utf-8")
    assert Library(site).case("mine.toml").name == "mine"
    assert Library(site).case(mine).name == "mine"


def test_the_problems_of_all_files_are_told_at_once(site: Path) -> None:
    change(
        site,
        "rack_library/loads/six-lugs.toml",
        ('tips = ["A1-A6"]', 'tips = ["A1-A7"]'),
        ('"line-one"', '"line-on"'),
    )
    change(site, "rack_library/parts/lug.toml", ('"6061-t6"', '"6061-t7"'))
    change(site, "configs/recipes/clear.toml", ('"10 um"', '"10 V"'))
    change(site, "configs/standards/alloys.toml", ("format", "fromat"))
    assert told(site) == [
        "configs/recipes/clear.toml:6: aim.value: `10 V` is not a thickness. Give a number with a unit such as `50 um`",
        "rack_library/loads/six-lugs.toml:5: line: `line-on` is not a line of this site. The nearest is `line-one`",
        "rack_library/parts/lug.toml:4: material: `6061-t7` is not a material of this site. The nearest is `6061-t6`",
        (
            "configs/standards/alloys.toml:1: has no format line. "
            'Begin the file with a line such as `format = "lineplanner KIND 1"`'
        ),
        "rack_library/loads/six-lugs.toml:10: hang[1].tips: `A7` is not a tip of rack `spline`. Its tips: `A1-A6`",
    ]


def test_each_place_that_names_a_missing_file_is_told(site: Path) -> None:
    change(site, "rack_library/loads/six-lugs.toml", ('part = "lug"', 'part = "xyz"'))
    path = site / "rack_library/loads/six-lugs.toml"
    path.write_text(
        path.read_text(encoding="utf-8") + '[[hang]]\npart = "xyz"\ncount = 2\n', encoding="utf-8"
    )
    assert told(site) == [
        f"rack_library/loads/six-lugs.toml:{line}: hang[{n}].part: `xyz` is not a part of this site. There are `lug`"
        for n, line in ((1, 9), (2, 12))
    ]


def test_a_kind_without_any_file_says_where_they_belong(site: Path) -> None:
    (site / "rack_library/racks/spline.toml").unlink()
    assert told(site) == [
        (
            "rack_library/loads/six-lugs.toml:4: rack: `spline` is not a rack of this site. "
            "There is none in shop/rack_library/racks"
        )
    ]


def test_a_load_that_is_not_there_is_told_with_the_nearest(site: Path) -> None:
    assert told(site, "six-lug") == [
        "rack_library/loads: `six-lug` is not a load of this site. The nearest is `six-lugs`"
    ]


@pytest.mark.parametrize("name", ["", "..", "a\0b", "*", "x" * 5000])
def test_a_load_of_a_strange_name_is_told(site: Path, name: str) -> None:
    (found,) = told(site, name)
    assert "is not a load of this site" in found
    assert len(found) < 250


def test_another_file_in_place_of_a_load_is_told(site: Path) -> None:
    assert told(site, "shop/rack_library/parts/lug.toml") == [
        (
            "rack_library/parts/lug.toml:1: format: `lineplanner part 1` is not the kind wanted here. "
            "This place takes `lineplanner load 1`"
        )
    ]


def test_the_tank_and_rectifier_of_a_load_must_be_on_its_line(site: Path) -> None:
    change(site, "rack_library/loads/six-lugs.toml", ('tank = "T1"', 'tank = "T9"\nrectifier = "R7"'))
    assert told(site) == [
        "rack_library/loads/six-lugs.toml:6: tank: `T9` is not a tank of line `line-one`. Its tanks: `T1`",
        (
            "rack_library/loads/six-lugs.toml:7: rectifier: `R7` is not a rectifier of line `line-one`. "
            "Its rectifiers: `R1`"
        ),
    ]


def test_a_recipe_must_fit_the_bath_and_its_bases_the_tables(site: Path) -> None:
    change(
        site, "configs/recipes/clear.toml", ("anodize-sulfuric", "chrome-hard"), ('"6xxx"', '"6xxx", "steel"')
    )
    assert told(site) == [
        (
            "rack_library/loads/six-lugs.toml:9: hang[1].part: part `lug` is of `6061-t6`, which has no substrate for "
            "`chrome-hard`. Check recipe and material"
        ),
        (
            "rack_library/loads/six-lugs.toml:3: recipe: recipe `clear` runs in a chrome bath; tank `T1` holds `acid`, "
            "a sulfuric bath. Choose another tank or recipe"
        ),
        (
            "configs/recipes/clear.toml:5: bases[1]: `6xxx` is not a substrate for `chrome-hard`. "
            "The substrates table knows `steel`"
        ),
        (
            "configs/recipes/clear.toml:4: process: the processes table of the standards has no row `chrome-hard`. "
            "Add the row, or correct the name"
        ),
    ]


def test_conductors_and_families_must_be_rows_of_the_tables(site: Path) -> None:
    change(
        site, "rack_library/racks/spline.toml", ('conductor = "titanium"\nwidth', 'conductor = "tin"\nwidth')
    )
    change(site, "configs/lines/line-one.toml", ('"copper"', '"cooper"'))
    change(site, "configs/materials/6061-t6.toml", ('"6xxx"', '"6000"'))
    assert told(site) == [
        (
            "rack_library/racks/spline.toml:3: conductor: `tin` is not in the conductors table. "
            "It knows `copper`, `titanium`, `aluminium 6061`"
        ),
        (
            "configs/lines/line-one.toml:23: tank[1].bus[1].conductor: `cooper` is not in the conductors table. "
            "It knows `copper`, `titanium`, `aluminium 6061`"
        ),
        "configs/materials/6061-t6.toml:5: family: `6000` is not a row of the alloys table. It knows `6xxx`",
    ]


def test_the_material_of_a_hang_goes_before_that_of_the_part(site: Path) -> None:
    (site / "configs/materials/other.toml").write_text(MATERIAL.replace("6061-T6", "Other"), encoding="utf-8")
    change(site, "rack_library/loads/six-lugs.toml", ('part = "lug"', 'part = "lug"\nmaterial = "other"'))
    assert list(Library(site).case("six-lugs").materials) == ["other"]


# --- names -----------------------------------------------------------------------------------------------


def test_two_files_of_one_kind_with_one_name_are_a_problem_for_whoever_names_it(site: Path) -> None:
    again = site / "rack_library/parts/old/lug.toml"
    again.parent.mkdir()
    again.write_text(PART, encoding="utf-8")
    assert told(site) == [
        (
            "rack_library/parts/old/lug.toml: `lug` is also the name of shop/rack_library/parts/lug.toml. "
            "Rename one of the two: references are file names"
        )
    ]


def test_files_of_two_kinds_may_share_a_name_and_subfolders_are_looked_into(site: Path) -> None:
    inside = site / "rack_library/racks/deep/er"
    inside.mkdir(parents=True)
    (site / "rack_library/racks/spline.toml").rename(inside / "spline.toml")
    (site / "rack_library/loads/six-lugs.toml").rename(site / "rack_library/loads/lug.toml")
    assert Library(site).case("lug").rack.name == "Spline"


def test_a_name_that_cannot_be_referred_to_is_a_problem_of_the_listing(site: Path) -> None:
    (site / "rack_library/parts/Big Lug.toml").write_text(PART, encoding="utf-8")
    (found,) = Library(site).listing_problems("part")
    assert word(found) == (
        f"{Path('shop/rack_library/parts/Big Lug.toml')}: `Big Lug` cannot be referred to. "
        "Name the file in lower case letters, digits and hyphens"
    )


def test_hidden_files_are_not_listed(site: Path) -> None:
    (site / "rack_library/parts/.lug.toml").write_text("broken", encoding="utf-8")
    assert list(Library(site).stems("part")) == ["lug"]


# --- standards -------------------------------------------------------------------------------------------


def test_rows_of_several_files_of_one_kind_are_joined(site: Path) -> None:
    more = table_text("alloys").replace('"6xxx"', '"7xxx"')
    (site / "configs/standards/more-alloys.toml").write_text(more, encoding="utf-8")
    assert [row.name for row in Library(site).tables().alloys] == ["6xxx", "7xxx"]


def test_a_row_that_another_file_has_already_is_told(site: Path) -> None:
    (site / "configs/standards/more-alloys.toml").write_text(table_text("alloys"), encoding="utf-8")
    assert told(site) == [
        (
            "configs/standards/more-alloys.toml:4: family[1].name: `6xxx` is the name of another row already. "
            "Give each its own name"
        )
    ]


def test_a_table_that_is_missing_or_there_twice_is_told(site: Path) -> None:
    (site / "configs/standards/growth.toml").unlink()
    shutil.copy(site / "configs/standards/limits.toml", site / "configs/standards/limits-2.toml")
    found = told(site)
    assert found == [
        (
            "configs/standards/limits.toml:1: format: gives what shop/configs/standards/limits-2.toml gives too. "
            "Only one file may be `lineplanner limits 1`"
        )
    ]
    (site / "configs/standards/limits-2.toml").unlink()
    assert told(site) == [
        "configs/standards: there is no file of format `lineplanner growth 1` here. `lineplanner start DIR` writes one"
    ]


def test_a_file_that_is_no_table_has_no_place_among_the_standards(site: Path) -> None:
    (site / "configs/standards/lug.toml").write_text(PART, encoding="utf-8")
    (found,) = told(site)
    assert found.startswith("configs/standards/lug.toml:1: format: this folder holds standards tables only. ")


def test_a_limit_that_the_site_adopted_counts_as_entered_here(site: Path) -> None:
    adopted = '[[adopted]]\nlimit = "bus_drop"\nadopted_by = "A. Smith"\nadopted_on = 2026-03-14\n'
    path = site / "configs/site.toml"
    path.write_text(path.read_text(encoding="utf-8") + adopted, encoding="utf-8")
    limits = Library(site).tables().limits
    assert limits.bus_drop.status is Status.ENTERED
    assert limits.bus_drop.source == "adopted by A. Smith, 2026-03-14; example"
    assert limits.bus_drop_chrome.status is Status.ASSUMPTION


def test_a_limit_that_does_not_exist_cannot_be_adopted(site: Path) -> None:
    entry = '[[adopted]]\nlimit = "{}"\nadopted_by = "A"\nadopted_on = "2026"\n'
    path = site / "configs/site.toml"
    names = ("bus_dorp", "xyzzy", "bus_drop", "bus_drop")
    path.write_text(path.read_text(encoding="utf-8") + "".join(map(entry.format, names)), encoding="utf-8")
    found = told(site)
    assert found[0] == (
        "configs/site.toml:7: adopted[1].limit: `bus_dorp` is not a limit that can be adopted. "
        "The nearest is `bus_drop`"
    )
    assert found[1].startswith(
        "configs/site.toml:11: adopted[2].limit: `xyzzy` is not a limit that can be adopted. "
    )
    assert found[2] == (
        "configs/site.toml:19: adopted[4].limit: `bus_drop` is adopted twice. Keep the entry that counts"
    )


def test_the_cautions_are_one_file(site: Path) -> None:
    shutil.copy(site / "configs/cautions/cautions.toml", site / "configs/cautions/more.toml")
    (found,) = told(site)
    assert found.startswith(
        "configs/cautions/more.toml: gives what shop/configs/cautions/cautions.toml gives too."
    )
    shutil.rmtree(site / "configs/cautions")
    assert told(site) == [
        "configs/cautions: there is no file of format `lineplanner cautions 1` here. `lineplanner start DIR` writes one"
    ]


# --- one file in its site ----------------------------------------------------------------------------------


def checked(site: Path, name: str) -> list[str]:
    problems = check_in_site(Library(site), site / name)
    return [word(problem).replace("\\", "/").removeprefix("shop/") for problem in problems]


def test_every_file_of_a_sound_site_is_sound_in_it(site: Path) -> None:
    files = sorted(site.rglob("*.toml"))
    assert len(files) > 15
    assert [problem for file in files for problem in check_in_site(Library(site), file)] == []


def test_a_file_is_checked_with_its_name_its_references_and_the_tables(site: Path) -> None:
    change(site, "configs/lines/line-one.toml", ('"acid"', '"acids"'), ('"copper"', '"cooper"'))
    assert checked(site, "configs/lines/line-one.toml") == [
        "configs/lines/line-one.toml:14: tank[1].bath: `acids` is not a bath of this site. The nearest is `acid`",
        (
            "configs/lines/line-one.toml:23: tank[1].bus[1].conductor: `cooper` is not in the conductors table. "
            "It knows `copper`, `titanium`, `aluminium 6061`"
        ),
    ]
    change(site, "configs/recipes/clear.toml", ('"6xxx"', '"6000"'))
    assert checked(site, "configs/recipes/clear.toml") == [
        (
            "configs/recipes/clear.toml:5: bases[1]: `6000` is not an alloy family, and `anodize-sulfuric` runs on "
            "aluminium. The alloys table knows `6xxx`"
        )
    ]
    (site / "rack_library/parts/Lug_2.toml").write_text(PART.replace('"6061-t6"', '"xyz"'), encoding="utf-8")
    assert checked(site, "rack_library/parts/Lug_2.toml") == [
        (
            "rack_library/parts/Lug_2.toml: `Lug_2` cannot be referred to. "
            "Name the file in lower case letters, digits and hyphens"
        ),
        "rack_library/parts/Lug_2.toml:4: material: `xyz` is not a material of this site. There are `6061-t6`",
    ]


def test_a_load_is_checked_with_all_that_it_needs(site: Path) -> None:
    change(site, "configs/recipes/clear.toml", ('"10 um"', '"10 V"'))
    (found,) = checked(site, "rack_library/loads/six-lugs.toml")
    assert found.startswith("configs/recipes/clear.toml:6: aim.value: `10 V` is not a thickness.")


def test_a_file_outside_the_site_is_checked_against_it(site: Path, tmp_path: Path) -> None:
    (tmp_path / "Mine.toml").write_text(PART, encoding="utf-8")
    assert check_in_site(Library(site), "Mine.toml") == []


# --- memory ----------------------------------------------------------------------------------------------


def test_a_file_is_read_once_until_it_changes_on_disk(site: Path) -> None:
    library = Library(site)
    first = library.record("load", "six-lugs")
    assert isinstance(first, Load)
    assert library.record("load", "six-lugs") is first
    change(site, "rack_library/loads/six-lugs.toml", ("Six lugs", "Few lugs"))
    os.utime(site / "rack_library/loads/six-lugs.toml", ns=(1, 1))
    assert library.record("load", "six-lugs").name == "Few lugs"


def test_a_broken_file_is_read_again_once_it_is_put_right(site: Path) -> None:
    library = Library(site)
    change(site, "rack_library/loads/six-lugs.toml", ("lineplanner load 1", "lineplanner lo 1"))
    for _ in range(2):
        with pytest.raises(FilesError):
            library.case("six-lugs")
    change(site, "rack_library/loads/six-lugs.toml", ("lineplanner lo 1", "lineplanner load 1"))
    assert library.case("six-lugs").name == "six-lugs"


# --- which site ------------------------------------------------------------------------------------------


def test_a_named_folder_goes_first_then_the_nearest_above(site: Path, tmp_path: Path) -> None:
    inside = site / "rack_library" / "parts"
    assert find_site(working=inside).path == site
    other = make_site(tmp_path / "other")
    assert find_site(other, working=inside).path == other
    assert open_library(working=inside).case("six-lugs").line.name == "Line one"


def test_then_the_users_own_folder_and_last_the_packaged_copy(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setenv("XDG_DATA_HOME", str(tmp_path / "user"))
    monkeypatch.setenv("LOCALAPPDATA", str(tmp_path / "user"))
    monkeypatch.setattr("sys.platform", "linux" if sys.platform == "darwin" else sys.platform)
    nowhere = tmp_path / "nowhere"
    nowhere.mkdir()
    found = find_site(working=nowhere)
    assert (found.path, found.packaged) == (packaged_site(), True)
    assert not (tmp_path / "user").exists()
    own = writable(found)
    assert (own.path, own.packaged) == (tmp_path / "user" / "lineplanner", False)
    assert find_site(working=nowhere) == own
    assert writable(own) == own


def test_a_folder_that_is_no_site_is_refused(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.chdir(tmp_path)
    (tmp_path / "half" / "configs").mkdir(parents=True)
    for name, said in (
        ("none", "none: there is no such folder. Name the folder that holds configs and rack_library"),
        ("half", "half: holds no rack_library. Name the folder that holds configs and rack_library"),
        ("a\0b", "a\\x00b: there is no such folder. Name the folder that holds configs and rack_library"),
    ):
        with pytest.raises(FilesError) as caught:
            find_site(name)
        assert str(caught.value) == said


def test_a_line_with_a_bath_that_is_not_there_is_told_in_the_line(site: Path) -> None:
    (site / "configs/lines/line-one.toml").write_text(
        LINE.replace('bath = "acid"', 'bath = "acids"'), encoding="utf-8"
    )
    assert told(site) == [
        "configs/lines/line-one.toml:14: tank[1].bath: `acids` is not a bath of this site. The nearest is `acid`"
    ]
