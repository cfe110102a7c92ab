"""Parts and poses that several tests use, and ways to change them. Numbers as drawn are in mm."""

import dataclasses
import math
import typing
from typing import Any

import pytest
from hypothesis import strategies as st

from lineplanner.geometry import Ledger, Pose, extent, ledger, problems, shape_of
from lineplanner.inputs.part import (
    Bore,
    Hole,
    Outline,
    Part,
    Plate,
    ProfilePoint,
    Section,
    Slot,
    Stated,
    Tube,
    Turned,
    Vertex,
)
from lineplanner.quantities import AREA, LENGTH, Field

MM = 1e-3
MM2 = 1e-6
MM3 = 1e-9
RULES = {"hole_ratio": 2.0, "promise_ratio": 1.0, "thread_factor": 1.5}
NAMED: dict[str, Any] = {"name": "drawn for a test", "material": "6061"}


def rectangle(width: float, height: float) -> Outline:
    return Outline(shape="rectangle", width=width * MM, height=height * MM)


def plate(width: float = 100, height: float = 60, thickness: float = 6, **more: Any) -> Plate:
    """A plate with sizes in mm."""
    return Plate(
        form="plate", outline=rectangle(width, height), thickness=thickness * MM, **{**NAMED, **more}
    )


def hole(u: float, v: float, diameter: float, depth: float | None = None, **more: Any) -> Hole:
    """A hole with sizes in mm."""
    return Hole(
        at=(u * MM, v * MM), diameter=diameter * MM, depth=None if depth is None else depth * MM, **more
    )


def profile(*corners: tuple[float, float]) -> tuple[ProfilePoint, ...]:
    """Corners (axis, radius) in mm."""
    return tuple(ProfilePoint(axis=axis * MM, radius=radius * MM) for axis, radius in corners)


def turned(*corners: tuple[float, float], **more: Any) -> Turned:
    return Turned(form="turned", profile=profile(*corners), **{**NAMED, **more})


def tube(diameter: float = 50, inner: float = 40, length: float = 100, **more: Any) -> Tube:
    sizes = {"diameter": diameter * MM, "inner_diameter": inner * MM, "length": length * MM}
    return Tube(form="tube", **sizes, **{**NAMED, **more})


def section(outline: Outline, length: float = 200, **more: Any) -> Section:
    return Section(form="section", outline=outline, length=length * MM, **{**NAMED, **more})


def points(*corners: tuple[float, ...]) -> Outline:
    """Corners (u, v) or (u, v, bulge) in mm."""
    return Outline(
        shape="points",
        points=tuple(
            Vertex(at=(c[0] * MM, c[1] * MM), bulge=(c[2] if len(c) > 2 else 0.0) * MM) for c in corners
        ),
    )


def stated(**more: Any) -> Stated:
    box = {"width": 0.2, "height": 0.1, "depth": 0.05}
    return Stated(form="stated", area=0.08, measured_by="solid model", **box, **{**NAMED, **more})


L_SHAPE = points((0, 0), (80, 0), (80, 20, 3), (20, 20, -4), (20, 70), (0, 70))

ONE_OF_EACH: dict[str, Part] = {
    "cover": Plate(
        form="plate",
        outline=Outline(shape="rounded-rectangle", width=0.1, height=0.06, radius=0.01),
        thickness=0.006,
        holes=(hole(-35, -15, 8), hole(35, 15, 6, threaded=True), hole(0, 0, 12, 4)),
        slots=(
            Slot(at=(0.03, -0.012), length=0.03, width=0.007, turn=0.4),
            Slot(at=(-0.02, 0.015), length=0.02, width=0.006, depth=0.003),
        ),
        hang=(-0.035, 0.02),
        **NAMED,
    ),
    "bracket": Plate(form="plate", outline=L_SHAPE, thickness=0.012, hang=(0.01, 0.06), **NAMED),
    "washer": Plate(
        form="plate",
        outline=Outline(shape="ring", diameter=0.05, inner_diameter=0.02),
        thickness=0.03,
        **NAMED,
    ),
    "channel": section(points((0, 0), (40, 0), (40, 30), (36, 30), (36, 4), (4, 4), (4, 30), (0, 30)), 150),
    "manifold": section(rectangle(60, 40), 120, hollows=(rectangle(20, 10),), hang=(0.01, 0.05)),
    "shaft": turned(
        (0, 4), (10, 12), (40, 12), (40, 20), (70, 15), (70, 8), (90, 0), bores=(Bore(diameter=0.006, depth=0.05),)
    ),
    "bush": turned((0, 20), (50, 25), bores=(Bore(diameter=0.016),), hang=(0.0, 0.05)),
    "spacer": tube(),
    "casting": stated(),
}  # fmt: skip


PARTS = st.sampled_from(sorted(ONE_OF_EACH)).map(ONE_OF_EACH.__getitem__)
TURNS = st.one_of(
    st.floats(-math.pi, math.pi), st.sampled_from([0.0, math.pi / 2, math.pi, -math.pi / 2, 1e-7])
)
POSES = st.builds(Pose, st.floats(-2, 2), st.floats(-2, 0), TURNS, st.booleans())
SHARES = st.floats(0.0, 1.0)


Case = tuple[Part, tuple[str | int, ...], str, dict[str, Any]]


def expect_refused(part: Part, path: tuple[str | int, ...], key: str, facts: dict[str, Any]) -> None:
    """The part has exactly this problem, there, with these facts (numbers in SI) among its own."""
    found = problems(part)
    assert [(problem.path, problem.key) for problem in found] == [(path, key)]
    told = {fact: getattr(value, "value", value) for fact, value in found[0].facts.items()}
    assert {fact: told[fact] for fact in facts} == pytest.approx(facts, abs=1e-9)


def areas(part: Part, pose: Pose | None = None, level: float | None = None, **rules: float) -> Ledger:
    """The ledger under the usual rules of these tests."""
    return ledger(part, **{**RULES, **rules}, pose=pose, level=level)


def row(book: Ledger, face: str) -> Any:
    return next(row for row in book.rows if row.face == face)


def scaled(record: Any, by: float) -> Any:
    """The same record with every length times `by` and every area times its square."""
    hints = typing.get_type_hints(type(record), include_extras=True)
    changed = {}
    for entry in dataclasses.fields(record):
        notes = getattr(hints[entry.name], "__metadata__", ())
        kind = next((n.kind for n in notes if isinstance(n, Field)), None)
        changed[entry.name] = _scaled_value(getattr(record, entry.name), by, kind)
    return dataclasses.replace(record, **changed)


def _scaled_value(value: Any, by: float, kind: Any) -> Any:
    if dataclasses.is_dataclass(value):
        return scaled(value, by)
    if isinstance(value, tuple):
        return tuple(_scaled_value(v, by, LENGTH if isinstance(v, float) else None) for v in value)
    return value * {LENGTH: by, AREA: by**2}.get(kind, 1.0) if isinstance(value, float) else value


def between(part: Part, pose: Pose, share: float) -> float:
    """A level at a share of the part's height."""
    _, low, _, high = extent(shape_of(part), pose)
    return low + share * (high - low)
