"""The checks as a table, gravest and tightest first, each with its way out; other rectifiers; the circuit."""

from lineplanner.circuit import Element
from lineplanner.findings import Finding, Level
from lineplanner.plan import Plan
from lineplanner.quantities import RESISTANCE, VOLTAGE
from lineplanner.report.digits import is_lower_limit, told_apart, use
from lineplanner.report.layout import WIDTH, columns, shortened, wrapped
from lineplanner.report.setpoints import fix_of, text_of
from lineplanner.report.style import Style
from lineplanner.report.words.names import check_name, short_status

# The fact that tells rows of one check apart.
_OF = ("family", "part", "member", "role", "bar", "joint")
HEADING = ("check", "demand", "limit", "use", "level", "limit is")
NAME = 30  # characters of a name in the table
_MARK = {Level.STOP: "STOP", Level.CAUTION: "CAUTION", Level.NOTE: "note", Level.OK: "ok"}


def checks_lines(plan: Plan, style: Style) -> list[str]:
    """Every comparison: demand, limit, percent, status of the limit; then what each says that is not ok."""
    rows = [HEADING, *check_rows(plan, style).values()]
    lines = columns(rows, right=(1, 2, 3)) if len(rows) > 1 else []
    for finding in plan.findings:
        if finding.level is not Level.OK:
            lines += said(finding, style)
    return lines


def check_rows(plan: Plan, style: Style) -> dict[int, tuple[str, ...]]:
    """The cells of every comparison by the place of its finding; notes last."""
    compared = [n for n, f in enumerate(plan.findings) if f.value is not None and f.limit is not None]
    compared.sort(key=lambda n: plan.findings[n].level is Level.NOTE)
    checks = [plan.findings[n].check for n in compared]
    return {
        n: _row(plan.findings[n], style, named=checks.count(check) > 1)
        for n, check in zip(compared, checks, strict=True)
    }


def _row(finding: Finding, style: Style, *, named: bool) -> tuple[str, ...]:
    assert finding.kind is not None
    assert finding.value is not None
    assert finding.limit is not None
    least = ">= " if is_lower_limit(finding) else ""
    of = next((str(finding.facts[name]) for name in _OF if name in finding.facts), "") if named else ""
    value, limit = told_apart(finding.value, finding.limit, finding.kind, style)
    return (
        shortened(f"{check_name(finding.check)} {of}".rstrip(), NAME),
        value,
        least + limit,
        use(finding, style),
        _MARK[finding.level],
        short_status(finding.source.status.value),
    )


def said(finding: Finding, style: Style, width: int = WIDTH) -> list[str]:
    """A finding in words, with its way out."""
    fix = fix_of(finding, style)
    text = f"{_MARK[finding.level]} {check_name(finding.check)}: {text_of(finding, style)}."
    return wrapped(f"{text} {fix}." if fix else text, width, first="  ", rest="    ")


def others_lines(plan: Plan, style: Style) -> list[str]:
    """The other rectifiers of the tank, each with the first check that it fails."""
    lines: list[str] = []
    for name, finding in plan.others:
        text = "meets its checks too" if finding is None else text_of(finding, style)
        lines += wrapped(f"{name}: {text.removeprefix(f'{name}: ')}", first="  ", rest="    ")
    return lines


def circuit_lines(plan: Plan, style: Style) -> list[str]:
    """What each element between rectifier and part takes at the peak current."""
    current = None if plan.run is None else plan.run.peak_current
    elements = plan.circuit.elements
    rows = [(e.name, style.show(e.resistance, RESISTANCE), _drop(e, current, style)) for e in elements]
    total = plan.circuit.resistance
    whole = "" if current is None else style.show(plan.circuit.drop(current), VOLTAGE)
    rows.append(("together", style.show(total, RESISTANCE), whole))
    lines = columns(rows, right=(1, 2))
    if plan.circuit.missing:
        lines += wrapped(f"not entered, so not counted: {', '.join(plan.circuit.missing)}", first="  ")
    return lines


def _drop(element: Element, current: float | None, style: Style) -> str:
    return "" if current is None else style.show(element.resistance * current, VOLTAGE)
