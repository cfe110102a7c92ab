"""Colours: every pair of ink and ground that the stylesheets make is readable."""

import re
from pathlib import Path

import pytest

from lineplanner.tui import theme

TUI = Path(theme.__file__).parent
LEAST = 4.5  # WCAG 2.2 (2023), success criterion 1.4.3, level AA for text; read


def luminance(colour: str) -> float:
    """Relative luminance of an sRGB colour: WCAG 2.2, definition `relative luminance`; read."""
    channels = [int(colour[n : n + 2], 16) / 255 for n in (1, 3, 5)]
    linear = [c / 12.92 if c <= 0.04045 else ((c + 0.055) / 1.055) ** 2.4 for c in channels]
    return 0.2126 * linear[0] + 0.7152 * linear[1] + 0.0722 * linear[2]


def contrast(ink: str, ground: str) -> float:
    """Contrast ratio: WCAG 2.2, definition `contrast ratio`."""
    low, high = sorted((luminance(ink), luminance(ground)))
    return (high + 0.05) / (low + 0.05)


def test_the_ratio_of_black_on_white_is_21_as_its_definition_says() -> None:
    assert contrast("#000000", "#ffffff") == pytest.approx(21.0)
    assert contrast("#777777", "#ffffff") == pytest.approx(4.48, abs=0.005)  # by hand: 1.05 / 0.2346


@pytest.mark.parametrize("name", [theme.DARK, theme.LIGHT])
@pytest.mark.parametrize(("ink", "ground"), theme.PAIRS)
def test_every_pair_is_readable(name: str, ink: str, ground: str) -> None:
    own = theme.colours(name)
    assert contrast(own[ink], own[ground]) >= LEAST


def rules(text: str) -> list[str]:
    """The innermost blocks of a stylesheet."""
    return re.findall(r"\{([^{}]*)\}", text)


SHEETS = sorted(TUI.rglob("*.tcss"))


@pytest.mark.parametrize("sheet", SHEETS, ids=lambda sheet: sheet.name)
def test_a_stylesheet_uses_our_names_alone_and_only_listed_pairs(sheet: Path) -> None:
    text = sheet.read_text(encoding="utf-8")
    assert not re.search(r"#[0-9a-fA-F]{6}\b|rgb\(", text)
    known = set(theme.colours(theme.DARK)) | {"foreground-muted", "accent", "warning", "foreground"}
    assert set(re.findall(r"\$([a-z-]+)", text)) <= known
    for block in rules(text):
        ink = re.search(r"(?<![-\w])color: \$([a-z-]+)", block)
        ground = re.search(r"background: \$([a-z-]+)", block)
        if ink and ground:
            assert (ink[1], ground[1]) in theme.PAIRS


def test_the_plain_theme_has_no_colour_of_its_own_beyond_the_sixteen() -> None:
    assert all(value.startswith("ansi_") for value in theme.colours(theme.PLAIN).values())
