"""Our own colours: dark, light, and plain for terminals of 16 colours or none. Colour is never the only carrier."""

from collections.abc import Mapping

from textual.theme import Theme

DARK, LIGHT, PLAIN = "lineplanner-dark", "lineplanner-light", "lineplanner-plain"

# Names that the stylesheets use, with their colour in each theme. `on-` is what is written on a ground.
_COLOURS: Mapping[str, tuple[str, str, str]] = {
    "ground": ("#10151c", "#f7f5f0", "ansi_default"),
    "raised": ("#1b232e", "#e8e5dc", "ansi_default"),
    "ink": ("#e6e9ee", "#171a20", "ansi_default"),
    "faint": ("#a3adba", "#4c525c", "ansi_default"),
    "chosen": ("#2b5a86", "#bcd6ee", "ansi_default"),
    "on-chosen": ("#ffffff", "#0c1622", "ansi_default"),
    "changed": ("#7fd6c2", "#00594b", "ansi_cyan"),
    "set": ("#ffffff", "#000000", "ansi_default"),
    "ok": ("#86d28b", "#17591f", "ansi_green"),
    "second": ("#c9a8f0", "#5b2a8c", "ansi_default"),
    "note": ("#9fc0e8", "#1d4b82", "ansi_default"),
    "caution": ("#ffd75f", "#6e4a00", "ansi_yellow"),
    "warning": ("#ffaf5f", "#843c00", "ansi_yellow"),
    "danger": ("#ff9188", "#a3100c", "ansi_red"),
}
# Every pair of ink and ground that the stylesheets make.
PAIRS: tuple[tuple[str, str], ...] = (
    *(
        (ink, "ground")
        for ink in ("ink", "faint", "changed", "set", "ok", "second", "note", "caution", "warning", "danger")
    ),
    *(
        (ink, "raised")
        for ink in ("ink", "faint", "changed", "set", "ok", "second", "note", "caution", "warning", "danger")
    ),
    ("on-chosen", "chosen"),
)


def colours(theme: str) -> dict[str, str]:
    """The colours of a theme by name."""
    place = (DARK, LIGHT, PLAIN).index(theme)
    return {name: values[place] for name, values in _COLOURS.items()}


def _theme(name: str) -> Theme:
    own = colours(name)
    scroll = {
        f"scrollbar{part}{state}": own[colour]
        for part, colour in (("", "faint"), ("-background", "raised"), ("-corner-color", "raised"))
        for state in (("", "-hover", "-active") if part != "-corner-color" else ("",))
    }
    textuals = {  # names of Textual's own that stand for one of ours
        "foreground-muted": own["faint"],
        "text": own["ink"],
        "text-muted": own["faint"],
        "ansi-background": own["ground"],
        "ansi-foreground": own["ink"],
        "input-cursor-foreground": own["ground"],
        "input-cursor-background": own["ink"],
        "input-cursor-text-style": "reverse" if name == PLAIN else "none",
        "input-selection-foreground": own["on-chosen"],
        "input-selection-background": own["chosen"],
    }
    return Theme(
        name=name,
        primary=own["note"],
        secondary=own["second"],
        accent=own["changed"],
        success=own["ok"],
        warning=own["warning"],
        error=own["danger"],
        foreground=own["ink"],
        background=own["ground"],
        surface=own["ground"],
        panel=own["raised"],
        dark=name != LIGHT,
        ansi=name == PLAIN,
        variables=own | scroll | textuals,
    )


THEMES: tuple[Theme, ...] = (_theme(DARK), _theme(LIGHT), _theme(PLAIN))
