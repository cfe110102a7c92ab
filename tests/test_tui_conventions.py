"""What the screens may not do: compute with quantities, print numbers of their own, know the formulas."""

import ast
import re
from pathlib import Path

import pytest

TUI = Path(__file__).parent.parent / "lineplanner" / "tui"
# The rasteriser is plain geometry of dots without a unit.
FILES = sorted(file for file in TUI.rglob("*.py") if file.name != "raster.py")
FORMULAS = ("bath", "circuit", "capacity", "program", "load", "spread")
# Names that stand for what the engine computed.
COMPUTED = frozenset(
    {
        "plan",
        "run",
        "stage",
        "stages",
        "finding",
        "figure",
        "areas",
        "area",
        "item",
        "items",
        "metal",
        "metals",
    }
    | {"thickness", "emissions", "outcome", "rectifier", "recipe", "proposal", "circuit", "case", "reading"}
)
NUMBER_FORMAT = re.compile(r"[.,]|[eEfFgGn%]$")


def names_in(node: ast.AST) -> set[str]:
    """Every name that an attribute is taken of, along a chain: session.plan.run.x gives session, plan, run."""
    found: set[str] = set()
    if isinstance(node, ast.Call) and ast.unparse(node.func) == "len":
        return found  # how many there are is no quantity
    for one in ast.iter_child_nodes(node):
        found |= names_in(one)
    if isinstance(node, ast.Attribute):
        base = node.value
        while isinstance(base, ast.Subscript | ast.Call):
            base = base.value if isinstance(base, ast.Subscript) else base.func
        if isinstance(base, ast.Name):
            found.add(base.id)
        elif isinstance(base, ast.Attribute):
            found.add(base.attr)
    return found


def breaches(source: str) -> list[str]:
    """What a module of the screens does that is not its business."""
    found: list[str] = []
    for node in ast.walk(ast.parse(source)):
        if isinstance(node, ast.BinOp):
            computed = (names_in(node.left) | names_in(node.right)) & COMPUTED
            if computed and not isinstance(node.op, ast.BitOr):
                found.append(f"line {node.lineno}: computes with {', '.join(sorted(computed))}")
        elif isinstance(node, ast.FormattedValue) and node.format_spec is not None:
            spec = "".join(
                str(part.value) if isinstance(part, ast.Constant) else ""
                for part in getattr(node.format_spec, "values", ())
            )
            if NUMBER_FORMAT.search(spec):
                found.append(f"line {node.lineno}: formats a number with {spec!r}")
        elif isinstance(node, ast.Call) and ast.unparse(node.func) in ("round", "format"):
            if names_in(node) & COMPUTED:
                found.append(f"line {node.lineno}: rounds or formats a figure")
        elif isinstance(node, ast.ImportFrom) and node.module:
            room = [*node.module.split("."), "", ""][1]
            if node.module.startswith("lineplanner.") and room in FORMULAS:
                found.append(f"line {node.lineno}: imports from {node.module}")
    return found


@pytest.mark.parametrize("file", FILES, ids=lambda file: str(file.relative_to(TUI)))
def test_the_screens_compute_no_figure(file: Path) -> None:
    assert breaches(file.read_text(encoding="utf-8")) == []


@pytest.mark.parametrize(
    "code",
    [
        "amperes = plan.run.set_current * 2",
        "text = session.plan.thickness.high - 1.0",
        "x = plan.findings[0].margin / 2",
        "x = 1.0 - finding.margin",
        'text = f"{value:.1f} A"',
        'text = f"{value:g}"',
        "x = round(plan.run.total_time)",
        "from lineplanner.program.panel import panel_step",
    ],
)
def test_a_breach_is_seen(code: str) -> None:
    assert len(breaches(code)) == 1


@pytest.mark.parametrize(
    "code",
    [
        "width = self.size.width - 2",
        'text = f"{name:<{width}}"',
        "count = hang.count + 1",
        "Session | None",
        "last = len(session.case.load.hangs) - 1",
        "from lineplanner.report.setpoints import setpoint_lines",
    ],
)
def test_what_lays_out_a_screen_is_no_breach(code: str) -> None:
    assert breaches(code) == []
