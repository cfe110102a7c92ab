"""The words for a refused text. Placeholders are the facts of UnitTextError."""

# What to type instead, by the name of the kind; all other kinds want a unit.
GIVE_UNIT = "a number with a unit such as `{example}`"
GIVE = {
    "ratio": "a plain number or percent such as `{example}`",
    "count": "a whole number such as `{example}`",
}

MESSAGES: dict[str, str] = {
    "unit.empty": "Nothing is entered. Give {give}",
    "unit.too_long": "`{token}` is longer than any number with a unit. Give {give}",
    "unit.characters": "`{token}` holds characters that no number and no unit has. Give {give}",
    "unit.markup": "`{token}` holds brackets or signs that no unit has. Give {give}",
    "unit.not_finite": "`{token}` is no amount. Give {give}",
    "unit.decimal_comma": "`{token}` has a decimal comma. Use a point: `{write}`",
    "unit.grouping": (
        "`{token}` has a mark or a blank between its digits. "
        "Write the digits together, with a point for decimals, such as `{example}`"
    ),
    "unit.clock": "`{token}` reads like a clock. Write one number with its unit such as `80 min`",
    "unit.hours_and_minutes": "`{token}` is two numbers. Write one: `{write}`",
    "unit.fraction": "`{token}` is a fraction. Use a point: `{write}`",
    "unit.sign": "`{token}` has a sign that does not belong to its number. Give {give}",
    "unit.point": "`{token}` has a point out of place. Give {give}",
    "unit.expression": "`{token}` is arithmetic or a range, which is not worked out here. Give {give}",
    "unit.two_numbers": "`{token}` holds more than one number. Give {give}",
    "unit.missing_number": "`{token}` does not begin with a number. Give {give}",
    "unit.size": "`{token}` is beyond the numbers that can be computed with. Give {give}",
    "unit.missing": "`{token}` has no unit. Give {give}",
    "unit.form": "`{token}` has a unit that cannot be read. Give {give}",
    "unit.unknown": "`{token}`: the unit `{unit}` is not known. Give {give}",
    "unit.unknown_near": "`{token}`: the unit `{unit}` is not known; the nearest is `{nearest}`. Give {give}",
    "unit.letter_c": "`{token}`: `C` is not taken, it may mean two things. Write `degC` or `coulomb`",
    "unit.letter_f": "`{token}`: `F` is not taken, it may mean two things. For a temperature write `degF`",
    "unit.ton": "`{token}`: a ton may mean several things. Write `TR` for cooling, `tonne` for 1000 kg",
    "unit.square": "`{token}`: write the square as a power, such as `ft2` or `in2`",
    "unit.wrong_kind": "`{token}` is not {a_kind}. Give {give}",
    "unit.difference_wanted": "`{token}` is a temperature, not a temperature difference. Write `{write}`",
    "unit.absolute_wanted": ("`{token}` is a temperature difference, not a temperature. Give {give}"),
    "unit.below_absolute_zero": "`{token}` is below absolute zero. Give {give}",
}
