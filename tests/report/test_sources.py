"""Every constant and every value of the tables is listed with status, source and file."""

import ast
import re
from dataclasses import fields
from pathlib import Path

import lineplanner
from lineplanner.files.library import Library
from lineplanner.inputs.tables import Limits
from lineplanner.report.sources import listed, source_records, sources_text
from lineplanner.report.style import Style
from lineplanner.sources import Status

PACKAGE = Path(lineplanner.__file__).parent


def constants_in_sources() -> set[str]:
    """Names of all Constants that the package's sources make with a literal name."""
    found = set()
    for file in PACKAGE.rglob("*.py"):
        for node in ast.walk(ast.parse(file.read_text(encoding="utf-8"))):
            made = isinstance(node, ast.Call) and ast.unparse(node.func) == "Constant"
            if made and isinstance(
                node.args[0], ast.Constant
            ):  # a name put together is met in the list below
                found.add(node.args[0].value)
    return found


def test_every_constant_of_the_sources_is_listed(library: Library) -> None:
    names = {one.name for one in listed(library)}
    assert constants_in_sources() - names == set()
    assert "enthalpy of formation of corundum" in names


def test_every_limit_is_listed_with_the_status_it_has_here(library: Library) -> None:
    rows = [one for one in listed(library) if one.file == "configs/standards/limits.toml"]
    assert len(rows) == len(fields(Limits))
    adopted = [row for row in rows if row.source.startswith("adopted by ")]
    assert {row.status for row in adopted} == {Status.ENTERED.value}
    assert len(adopted) == len(library.site().adopted)


def test_every_number_has_a_source_and_a_known_status(library: Library) -> None:
    known = {status.value for status in Status}
    for row in source_records(library):
        assert row["source"].strip(), row
        assert row["status"] in known, row
        assert row["file"].endswith((".py", ".toml")), row


def test_all_tables_are_there(library: Library) -> None:
    files = {one.file for one in listed(library) if one.file.startswith("configs/")}
    standards = {
        f"configs/standards/{path.name}" for path in (library.folder / "configs/standards").glob("*.toml")
    }
    assert files == standards | {"configs/cautions/cautions.toml"}


def test_tables_come_before_the_constants_of_the_program(library: Library) -> None:
    kinds = [one.file.endswith(".py") for one in listed(library)]
    assert kinds == sorted(kinds)


def test_the_text_follows_the_unit_system_and_prints_no_temperature_in_kelvin(library: Library) -> None:
    metric, us = (sources_text(library, Style(system, ascii=True)) for system in ("metric", "us"))  # type: ignore[arg-type]
    assert "  coolest bake of the chart: 190 degC  " in metric
    assert "  coolest bake of the chart: 374 degF  " in us  # 190 x 1.8 + 32
    assert "  how far a bake stays below the last temper: 28 K  " in metric
    assert "  how far a bake stays below the last temper: 50.4 degF  " in us  # 28 x 1.8
    assert ": 500 mV" in us
    assert not re.search(r": [\d.e-]+ (A/dm2|dm2|um|mm|g/L|degC)  \[", us)
    assert re.search(r": [\d.e-]+ (A/dm2|um|g/L|degC|K)  \[", metric)


def test_a_constant_keeps_six_digits(library: Library) -> None:
    text = sources_text(library, Style("metric", ascii=True))
    assert "  Faraday constant: 96485.3321 C/mol  " in text
    assert "  current density of the stated film voltage: 1.29167 A/dm2  " in text  # 12 A/ft2


def test_the_text_names_each_file_once(library: Library) -> None:
    lines = sources_text(library, Style("metric", ascii=True)).splitlines()
    heads = [line for line in lines if line and not line.startswith(" ")]
    assert len(heads) == len(set(heads))
    assert "lineplanner/quantities.py" in heads
