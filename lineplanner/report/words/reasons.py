"""Why an area of a face is what it is."""

MESSAGES = {
    "dry-above-level": "{area} above the solution",
    "masked": "{area} stopped off",
    "plugged": "plugged: {area} stays dry",
    "contact-mark": "{count} contact marks take {area}",
    "part-surface-factor": "surface {factor} of the drawn one, whole part",
    "surface-factor": "surface {factor} of the drawn one: {because}",
    "thread-factor": "tapped: {factor} of the drawn wall",
    "hole-deeper-than-counted": "hole {diameter} across, {depth} deep: current counted {reach} deep from "
    "{ends} open end(s)",
    "floor-not-reached": "floor {depth} down a hole {diameter} across: current counted only {reach} deep",
    "hole-rule-all": "hole rule `all`: the whole wall carries current",
    "hole-rule-none": "hole rule `none`: no wall carries current",
    "deeper-than-promised": "thickness promised {reach} deep from {ends} open end(s) of {depth}",
    "not-significant": "not among the significant faces",
    "significant-stated": "significant area as stated: {area}",
    "chords": "arcs as chords within {within}",
    "box-share": "share of the box below the solution: {share}",
    # rack metal, by the state of its surface
    "surface.stripped": "stripped: takes current like the parts",
    "surface.bare": "bare: takes current like the parts",
    "surface.coated": "coated by its own film: takes none",
    "surface.titanium": "titanium: takes little",
    "surface.stopped-off": "stopped off: takes none",
    "surface.thief": "thief: takes current by its factor",
}


def surface_word(surface: str) -> str:
    """The state of rack metal in a word.

    >>> surface_word("coated")
    'coated by its own film'
    """
    return MESSAGES[f"surface.{surface}"].partition(":")[0]
