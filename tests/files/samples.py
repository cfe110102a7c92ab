"""Small valid files of every kind, and a small site made of them."""

from pathlib import Path
from typing import Any

from lineplanner.files.kinds import format_line, kinds
from lineplanner.inputs.cautions import DECLARED
from lineplanner.inputs.declared import Declared, Shape, declared, described, shape_of
from lineplanner.quantities import COUNT, RATIO, Field
from lineplanner.units import example, show

SITE = """\
format = "lineplanner site 1"
name = "Example shop"
units = "us"
altitude = "200 m"
ambient = "35 degC"
"""

LINE = """\
format = "lineplanner line 1"
name = "Line one"

[[rectifier]]
name = "R1"
max_current = "3000 A"
max_voltage = "24 V"
tanks = ["T1"]
type = "phase-controlled"
pulses = 6

[[tank]]
name = "T1"
bath = "acid"
volume = "4000 L"
solution_drop = "10 cm"
gap = "30 cm"
counter_electrode = "lead"
exhaust = { flow = "unknown" }

[[tank.bus]]
name = "run"
conductor = "copper"
length = "12 m"
width = "100 mm"
thickness = "10 mm"
"""

BATH = """\
format = "lineplanner bath 1"
name = "Sulfuric"
kind = "sulfuric"
temperature = "20 degC"
sulfuric_acid = "180 g/L"
"""

RECIPE = """\
format = "lineplanner recipe 1"
name = "Clear"
revision = "3"
process = "anodize-sulfuric"
bases = ["6xxx"]
aim = { value = "10 um", low = "8 um", high = "12 um" }
minimum = "8 um"
current_density = { value = "12 A/ft2", low = "10 A/ft2", high = "15 A/ft2" }
"""

MATERIAL = """\
format = "lineplanner material 1"
name = "6061-T6"
metal = "aluminium"
alloy = "6061"
family = "6xxx"
density = "2.7 g/cm3"
specific_heat = "0.9 kJ/(kg K)"
"""

RACK = """\
format = "lineplanner rack 1"
name = "Spline"
conductor = "titanium"
width = "600 mm"
height = "900 mm"

[[member]]
name = "spine"
role = "spline"
start = ["0 mm", "0 mm"]
end = ["0 mm", "900 mm"]
width = "25 mm"
thickness = "6 mm"

[[tip_row]]
name = "A"
count = 6
start = ["0 mm", "200 mm"]
step = ["0 mm", "100 mm"]
kind = "spring"
conductor = "titanium"
"""

PART = """\
format = "lineplanner part 1"
form = "plate"
name = "Lug"
material = "6061-t6"
thickness = "4 mm"

[outline]
shape = "rectangle"
width = "60 mm"
height = "40 mm"

[[hole]]
at = ["10 mm", "0 mm"]
diameter = "6 mm"
"""

LOAD = """\
format = "lineplanner load 1"
name = "Six lugs"
recipe = "clear"
rack = "spline"
line = "line-one"
tank = "T1"

[[hang]]
part = "lug"
tips = ["A1-A6"]
"""

PLACES = {
    "configs/site.toml": SITE,
    "configs/lines/line-one.toml": LINE,
    "configs/baths/acid.toml": BATH,
    "configs/recipes/clear.toml": RECIPE,
    "configs/materials/6061-t6.toml": MATERIAL,
    "rack_library/racks/spline.toml": RACK,
    "rack_library/parts/lug.toml": PART,
    "rack_library/loads/six-lugs.toml": LOAD,
}
NAMES = {  # rows that the files above refer to
    "alloys": ["6xxx"],
    "conductors": ["copper", "titanium", "aluminium 6061"],
    "substrates": ["steel"],
    "processes": ["anodize-sulfuric"],
}


def _amount(field: Field | None) -> str:
    """An amount of a kind within the bounds of its field, as TOML."""
    kind = field.kind if field and field.kind else RATIO
    low = (field.above if field.low is None else field.low) if field else None
    high = field.high if field else None
    if low is not None and high is not None:
        value = (low + high) / 2
    else:
        value = high if high is not None else (low + 1.0 if low else 0.5)
    if kind in (RATIO, COUNT):
        return repr(value)
    return f'"{show(value, kind, "metric", digits=12)}"' if low or high else f'"{example(kind)}"'


def _value(one: Declared, name: str) -> str:
    shape, inside = shape_of(one.type)
    if shape is Shape.RECORD and set(declared(inside[0])) >= {"value", "source", "status"}:
        return f'{{ value = {_amount(one.field)}, source = "example", status = "assumption" }}'
    if shape is Shape.RECORD:
        fields = [each for each in declared(inside[0]).values() if each.required]
        return f"{{ {', '.join(f'{each.key} = {_value(each, name)}' for each in fields)} }}"
    if shape is Shape.MANY:
        item, _ = described(inside[0])
        words = one.key if shape_of(item)[0] is Shape.WORDS else shape_of(item)[1][0]
        return f'["{words}"]'
    plain = {
        Shape.NUMBER: _amount(one.field),
        Shape.COUNT: "1",
        Shape.YES_NO: "false",
        Shape.DATE: "2026-03-14",
    }
    if shape in plain:
        return plain[shape]
    return f'"{inside[0]}"' if shape is Shape.CHOICE and one.key != "name" else f'"{name}"'


def _row(record: type, name: str) -> list[str]:
    return [f"{one.key} = {_value(one, name)}" for one in declared(record).values() if one.required]


def table_text(kind: str) -> str:
    """A valid standards file, every number made up within its bounds."""
    found = kinds()[kind]
    lines = [f'format = "{format_line(kind)}"']
    if not found.rows:
        return "\n".join([*lines, *_row(found.record, "")]) + "\n"
    one = next(iter(declared(found.record).values()))
    item, _ = described(shape_of(one.type)[1][0])
    for name in NAMES.get(kind, ["conventional"]):
        rows = ["row = []"] if kind == "conductivity" else []
        lines += [
            "",
            f"[[{one.key}]]",
            *(row for row in _row(item, name) if not row.startswith("row =")),
            *rows,
        ]
    return "\n".join(lines) + "\n"


def caution_text() -> str:
    """All cautions with words of no meaning."""
    lines = ['format = "lineplanner cautions 1"', "[threshold]"]
    record: Any = declared(kinds()["cautions"].record)["threshold"].type
    lines += _row(record, "")
    for name, (word, values) in DECLARED.items():
        text = " ".join(f"{{{value}}}" for value in sorted(values)) or "Take care."
        lines += ["", "[[caution]]", f'id = "{name}"', f'word = "{word}"', "rank = 1", 'moment = ["after"]']
        lines += [f'text = "{text}"', 'short = "Take care"', 'source = "example"']
        lines += ["as_of = 2026-03-14", 'status = "assumption"']
    return "\n".join(lines) + "\n"


def text_of(kind: str) -> str:
    """A valid file of a kind."""
    texts = {text.split()[3]: text for text in PLACES.values()}
    if kind == "cautions":
        return caution_text()
    return texts[kind] if kind in texts else table_text(kind)


def make_site(folder: Path) -> Path:
    """A small complete site in a folder."""
    texts = dict(PLACES)
    texts |= {
        f"configs/standards/{kind}.toml": table_text(kind) for kind, one in kinds().items() if one.table
    }
    texts["configs/cautions/cautions.toml"] = caution_text()
    for name, text in texts.items():
        path = folder / name
        path.parent.mkdir(parents=True, exist_ok=True)
        path.write_text(text, encoding="utf-8")
    return folder
