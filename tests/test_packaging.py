"""What travels: both data folders in the wheel and the source archive, and they are found there."""

import os
import subprocess
import sys
import sysconfig
import tomllib
import venv
from pathlib import Path

import pytest

CHECKOUT = Path(__file__).parent.parent
BUILD = tomllib.loads((CHECKOUT / "pyproject.toml").read_text(encoding="utf-8"))["tool"]["hatch"]["build"]
CODE = {"lineplanner", "tests"}


def data_folders() -> set[str]:
    return {
        entry.name
        for entry in CHECKOUT.iterdir()
        if entry.is_dir() and not entry.name.startswith(".") and entry.name not in CODE | {"build", "dist"}
    }


def files_below(folder: Path) -> set[str]:
    return {
        str(file.relative_to(folder))
        for file in folder.rglob("*")
        if file.is_file() and "__pycache__" not in file.parts
    }


def test_every_data_folder_travels_in_the_wheel() -> None:
    assert BUILD["targets"]["wheel"]["force-include"] == {
        folder: f"lineplanner/_data/{folder}" for folder in data_folders()
    }


def test_everything_travels_in_the_source_archive() -> None:
    expected = {f"/{folder}" for folder in data_folders() | CODE}
    assert expected | {"/README.md", "/DEVELOPERS.md", "/pyproject.toml"} <= set(
        BUILD["targets"]["sdist"]["include"]
    )


@pytest.fixture(scope="module")
def installed(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """An environment with the built wheel, the libraries borrowed from this one; gives its executables."""
    pytest.importorskip("build")
    folder = tmp_path_factory.mktemp("packaging")
    # no wheel or sdist is named: the source archive is built, then the wheel from that archive
    subprocess.run(
        [sys.executable, "-m", "build", "--outdir", str(folder / "dist"), str(CHECKOUT)],
        check=True,
        capture_output=True,
    )
    (wheel,) = (folder / "dist").glob("*.whl")
    venv.create(folder / "env", with_pip=False)
    scheme = {"base": str(folder / "env"), "platbase": str(folder / "env")}
    site = Path(sysconfig.get_path("purelib", "venv", scheme))
    subprocess.run(
        [
            sys.executable,
            "-m",
            "pip",
            "--python",
            str(folder / "env"),
            "install",
            "-q",
            "--no-deps",
            str(wheel),
        ],
        check=True,
    )
    # A path named in a .pth file brings the libraries, but not this checkout's own editable install.
    (site / "libraries.pth").write_text(sysconfig.get_path("purelib"), encoding="utf-8")
    return Path(sysconfig.get_path("scripts", "venv", scheme))


def run_installed(installed: Path, home: Path, *arguments: str) -> str:
    """Run a program of that environment from an empty folder with an empty home."""
    homes = {name: str(home) for name in ("HOME", "USERPROFILE", "XDG_DATA_HOME", "APPDATA", "LOCALAPPDATA")}
    return subprocess.run(
        [str(installed / arguments[0]), *arguments[1:]],
        cwd=home,
        env={key: value for key, value in os.environ.items() if key != "PYTHONPATH"} | homes,
        stdin=subprocess.DEVNULL,
        capture_output=True,
        encoding="utf-8",
        check=True,
    ).stdout


@pytest.mark.slow
@pytest.mark.timeout(300)
def test_the_wheel_carries_every_data_file_and_runs_from_anywhere(installed: Path, tmp_path: Path) -> None:
    where = "import importlib.resources as r; print(r.files('lineplanner'))"
    package = Path(run_installed(installed, tmp_path, "python", "-c", where).strip())
    assert not package.is_relative_to(CHECKOUT)
    for folder in data_folders():
        assert files_below(package / "_data" / folder) == files_below(CHECKOUT / folder)
    assert run_installed(installed, tmp_path, "lineplanner", "--version").startswith("lineplanner ")


@pytest.mark.slow
@pytest.mark.timeout(300)
def test_the_wheel_finds_its_own_demo_site(installed: Path, tmp_path: Path) -> None:
    # with no terminal and no site of one's own: the run card of the packaged site's first load
    assert "SET" in run_installed(installed, tmp_path, "lineplanner")
