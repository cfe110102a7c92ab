"""The areas of a load as figures that can be asked why."""

from collections.abc import Mapping

from lineplanner.geometry import Ledger
from lineplanner.inputs.case import Case
from lineplanner.load.areas import Item, LoadAreas
from lineplanner.load.metal import Metal
from lineplanner.quantities import AREA, COUNT, RATIO
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

_SUM = Source("sum over what hangs in the solution", Status.DERIVED)
_LEDGER = Source("area of the drawing below the solution level, face by face", Status.DERIVED)
_RACK = Source("perimeter times length below the solution level", Status.DERIVED)


def area_figures(case: Case, areas: LoadAreas) -> Mapping[str, Figure]:
    """Figures by key path: area.total_m2, area.items[0].each_m2, ..."""
    figures: dict[str, Figure] = {}
    wet, carrying, significant = [], [], []
    for index, item in enumerate(areas.items):
        path = f"area.items[{index}]"
        each, total, current, promised = _item_figures(case, item)
        figures |= {f"{path}.each_m2": each, f"{path}.total_m2": total, f"{path}.carrying_m2": current}
        figures[f"{path}.count"] = total.inputs[0]
        wet.append(total)
        carrying.append(current)
        significant.append(promised)
    parts = result(
        "area of the parts", areas.parts_wet, AREA, "sum of the items", "A_parts = sum n A", _SUM, *wet
    )
    rack = [_metal(m, case.rack.name) for m in areas.rack]
    thieves = [_metal(m, "thief") for m in areas.thieves]
    rack_wet = result(
        "bare rack metal", areas.rack_wet, AREA, "sum of members and tips", "A_rack = sum A", _RACK, *rack
    )
    thieves_wet = result(
        "thieves", areas.thieves_wet, AREA, "sum of thieves", "A_thieves = sum A", _SUM, *thieves
    )
    counted = [_counted(m, f) for m, f in zip((*areas.rack, *areas.thieves), (*rack, *thieves), strict=True)]
    figures |= {
        "area.parts_m2": parts,
        "area.rack_m2": rack_wet,
        "area.thieves_m2": thieves_wet,
        "area.total_m2": result(
            "wet area",
            areas.wet,
            AREA,
            "parts + rack + thieves",
            "A = A_parts + A_rack + A_thieves",
            _SUM,
            parts,
            rack_wet,
            thieves_wet,
        ),
        "area.carrying_m2": result(
            "carrying area",
            areas.carrying,
            AREA,
            "parts + rack and thieves by their current factor",
            "A_c = sum A_parts,c + sum f A_metal",
            _SUM,
            *carrying,
            *counted,
        ),
        "area.significant_m2": result(
            "significant area",
            areas.significant,
            AREA,
            "sum over the items",
            "A_s = sum n A_s",
            _SUM,
            *significant,
        ),
    }
    return figures


def _count(item: Item) -> Figure:
    return given(f"{item.name}, parts hung", float(item.count), COUNT, Source("load file", Status.ENTERED))


def _at_level(item: Item) -> tuple[Figure, ...]:
    """The parts that the solution level leaves out or cuts: they carry less than the faces below say."""
    source = Source("solution level", Status.ENTERED)
    return tuple(
        given(f"{item.name}, of them {word} the solution", float(number), COUNT, source)
        for word, number in (("above", item.dry), ("partly above", item.cut))
        if number
    )


def _item_figures(case: Case, item: Item) -> tuple[Figure, Figure, Figure, Figure]:
    """One part's wet area, and the item's wet, carrying and significant area."""
    count, faces = _count(item), _face_figures(case, item)
    level = _at_level(item)
    name = item.name
    mean = item.wet / item.count
    each = result(
        f"{name}, one part, wet",
        mean,
        AREA,
        "faces below the solution level",
        "A = sum A_face",
        _LEDGER,
        *faces,
    )
    total = result(
        f"{name}, all, wet",
        item.wet,
        AREA,
        "parts x wet area, each at its place",
        "n A",
        _SUM,
        count,
        *level,
        each,
    )
    carrying = result(
        f"{name}, all, carrying",
        item.carrying,
        AREA,
        "wet faces by mask, hole rule and surface factor",
        "A_c = sum n A_face,c",
        _SUM,
        count,
        *level,
        *faces,
    )
    promised = result(
        f"{name}, all, significant",
        item.significant,
        AREA,
        "significant faces",
        "A_s = sum n A_face,s",
        _SUM,
        count,
        *level,
        *faces,
    )
    return each, total, carrying, promised


def _face_figures(case: Case, item: Item) -> tuple[Figure, ...]:
    part = case.parts[item.part]
    if part.form == "stated":
        source = Source(f"stated area, {part.measured_by}", Status.ENTERED)
    else:
        source = Source(
            f"drawing of {item.part}{f', {part.drawing}' if part.drawing else ''}", Status.ENTERED
        )
    ledger: Ledger = item.ledger
    return tuple(given(f"{item.name} {row.face}", row.carrying_area, AREA, source) for row in ledger.rows)


def _metal(metal: Metal, rack: str) -> Figure:
    return given(f"{rack} {metal.name}", metal.area, AREA, Source(f"rack file {rack}", Status.ENTERED))


def _counted(metal: Metal, area: Figure) -> Figure:
    factor = given(f"current factor, {metal.why}", metal.factor, RATIO, metal.source)
    return result(
        f"{area.label}, carrying",
        metal.carrying,
        AREA,
        "bare area x current factor",
        "f A",
        _SUM,
        area,
        factor,
    )
