"""A figure asked why: value, formula, inputs down to what was given, sources, statuses counted."""

import re
from collections import Counter
from collections.abc import Iterable, Iterator, Mapping
from difflib import get_close_matches
from typing import Any

from lineplanner.errors import InputError
from lineplanner.findings import Finding
from lineplanner.plan import Plan
from lineplanner.quantities import RATIO, TIME
from lineplanner.report.digits import CHROME, is_lower_limit, run_time
from lineplanner.report.layout import WIDTH, wrapped
from lineplanner.report.plan_json import COVERAGE, numeric_leaves, plan_record
from lineplanner.report.setpoints import fix_of, text_of
from lineplanner.report.style import Style
from lineplanner.report.words.names import WEAK, check_name, counted_statuses
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

CHECK = "check:"
ALL = "all"
_DEMAND = Source("demand of this plan", Status.DERIVED)
_MOST_NEAR = 5
# Keys of the JSON that are null where the process has no such figure.
_MAY_LACK = frozenset(
    {
        "current.density_A_per_m2",
        "current.set_A",
        "current.panel_set_A",
        "time.total_s",
        "time.at_set_current_s",
        "thickness.expected_m",
        "thickness.low_m",
        "thickness.high_m",
        "thickness.minimum_m",
        "thickness.maximum_m",
        "voltage.start_V",
        "voltage.end_V",
        "voltage.peak_V",
        "voltage.limit_V",
        "voltage.limit_reached_s",
        "binding",
        "binding.margin",
    }
)


def stories(plan: Plan) -> Mapping[str, Figure]:
    """The story of every figure by its key path in the JSON; checks of a plan by `check:NAME` too."""
    found: dict[str, Figure] = dict(plan.figures)
    found["thickness.coverage"] = given("coverage of the band", COVERAGE.value, RATIO, COVERAGE.source)
    for index, deviation in enumerate(plan.deviations):
        path = f"recipe.deviations[{index}]"
        filed = Source(f"recipe {plan.filed.name} rev {plan.filed.revision}", Status.ENTERED)
        here = Source(f"load {plan.case.name}", Status.ENTERED)
        found[f"{path}.recipe"] = given(deviation.label, deviation.recipe, deviation.kind, filed)
        found[f"{path}.load"] = given(deviation.label, deviation.load, deviation.kind, here)
    for index, finding in enumerate(plan.findings):
        path, story = f"findings[{index}]", _check_story(finding, found)
        found[f"{path}.margin"] = story
        for key, number in (("value", finding.value), ("limit", finding.limit)):
            if number is not None and story.inputs:
                found[f"{path}.{key}"] = story.inputs[0 if key == "value" else 1]
    if plan.binding is not None:
        found["binding.margin"] = _check_story(plan.binding, found)
    return found


def _check_story(finding: Finding, figures: Mapping[str, Figure]) -> Figure:
    """Demand against limit, the demand with its own story where it is a figure of the plan."""
    label = f"{check_name(finding.check)}, margin"
    if finding.value is None or finding.limit is None:
        return given(label, finding.margin, RATIO, finding.source)
    own = next((f for f in figures.values() if f.value == finding.value and f.kind == finding.kind), None)
    demand = own or given("demand", finding.value, finding.kind, _DEMAND)
    limit = given("limit", finding.limit, finding.kind, finding.source)
    formula = "m = demand / limit - 1" if is_lower_limit(finding) else "m = 1 - demand / limit"
    words = "what is left to the limit, as a share of it"
    return result(label, finding.margin, RATIO, words, formula, finding.source, demand, limit)


# --- which figures were asked for -------------------------------------------------------------------------


def asked(plan: Plan, names: Iterable[str]) -> list[tuple[str, Figure]]:
    """The figures of some names: a key path, a part of one, `check:NAME`, or `all`. Raises InputError for others."""
    told = stories(plan)
    printed = numeric_leaves(plan_record(plan, Style()))
    every = {path: told[path] for path in printed if path in told}
    found: dict[str, Figure] = {}
    for name in names:
        for path in _paths(name, every, plan):
            found[path] = every[path]
    return list(found.items())


def _paths(name: str, every: Mapping[str, Figure], plan: Plan) -> list[str]:
    if name == ALL:
        return list(every)
    if name in every:
        return [name]
    if name in stories(plan) or name in _MAY_LACK:
        raise InputError("figure.none", figure=name)
    if name.startswith(CHECK):
        wanted = name.removeprefix(CHECK)
        paths = [f"findings[{i}].margin" for i, f in enumerate(plan.findings) if f.check == wanted]
    else:
        paths = [path for path in every if re.match(rf"{re.escape(name)}[.\[]", path)]
    if paths:
        return paths
    raise InputError("figure.unknown", figure=name, nearest=nearest_names(name, every, plan))


def nearest_names(name: str, every: Mapping[str, Figure], plan: Plan) -> str:
    """The names that are most like one that is not known."""
    checks = dict.fromkeys(f"{CHECK}{f.check}" for f in plan.findings)
    groups = dict.fromkeys(path.partition(".")[0].partition("[")[0] for path in every)
    known = [*every, *groups, *checks]
    near = get_close_matches(name, known, _MOST_NEAR, cutoff=0.4)
    if not near:
        tails = {path.rpartition(".")[2]: path for path in every}
        near = [tails[tail] for tail in get_close_matches(name, tails, _MOST_NEAR, cutoff=0.4)]
    return ", ".join(f"`{one}`" for one in near or groups)


# --- as text ---------------------------------------------------------------------------------------------


def explanation(plan: Plan, names: Iterable[str], style: Style) -> list[str]:
    """The figures asked for as lines, each with all it rests on."""
    lines: list[str] = []
    told: set[int] = set()
    for path, figure in asked(plan, names):
        finding = _finding_of(path, plan)
        name = path if finding is None else f"{CHECK}{finding.check}"
        lines += ["", name] if lines else [name]
        if finding is not None:
            lines += wrapped(f"{finding.level.value}: {text_of(finding, style)}", first="  ")
            lines += wrapped(f"way out: {fix_of(finding, style)}", first="  ") if finding.fix else []
        lines += _told(figure, style, plan, 1, told)
        lines += wrapped(f"rests on: {counted_statuses(status_counts([figure]))}", first="  ")
    return lines


def _finding_of(path: str, plan: Plan) -> Finding | None:
    match = re.fullmatch(r"findings\[(\d+)\]\.margin", path)
    if match:
        return plan.findings[int(match[1])]
    return plan.binding if path == "binding.margin" else None


def _told(figure: Figure, style: Style, plan: Plan, depth: int, told: set[int]) -> Iterator[str]:
    """A figure and its inputs, indented; one that was told already is only named."""
    indent = "  " * depth
    head = f"{figure.label}: {value_text(figure, style, plan)}  [{figure.status.value}]"
    if not figure.inputs:
        yield from wrapped(f"{head} {figure.source}", WIDTH, first=indent, rest=f"{indent}    ")
        return
    if id(figure) in told:
        yield from wrapped(f"{head} (told above)", WIDTH, first=indent, rest=f"{indent}    ")
        return
    told.add(id(figure))
    yield from wrapped(head, WIDTH, first=indent, rest=f"{indent}    ")
    yield from wrapped(f"= {figure.words}", WIDTH, first=f"{indent}  ")
    yield from wrapped(f"{figure.formula}   ({figure.source})", WIDTH, first=f"{indent}  ")
    for one in figure.inputs:
        yield from _told(one, style, plan, depth + 1, told)


def value_text(figure: Figure, style: Style, plan: Plan) -> str:
    """The value of a figure as the rest of the report prints its kind."""
    if figure.value is None:
        return "none"
    if isinstance(figure.value, str) or figure.kind is None:
        return str(figure.value)
    if figure.kind == TIME and plan.recipe.process == CHROME and figure.value >= HOUR:
        return f"{run_time(figure.value, CHROME, style)} h:min"
    return style.show(figure.value, figure.kind)


HOUR = 3600.0  # s


# --- statuses --------------------------------------------------------------------------------------------


def status_counts(figures: Iterable[Figure]) -> Counter[str]:
    """How many given numbers and formulas of each status some figures rest on, each counted once."""
    seen: dict[tuple[str, str], str] = {}
    visited: set[int] = set()
    stack = list(figures)
    while stack:
        figure = stack.pop()
        if id(figure) in visited:
            continue
        visited.add(id(figure))
        label = "" if figure.inputs else figure.label
        seen[label, figure.source.title] = figure.status.value
        stack.extend(figure.inputs)
    return Counter(seen.values())


def rests_on(plan: Plan) -> str:
    """What the whole plan rests on that is not firm: `rests on 3 assumptions, 1 from memory`."""
    counts = counted_statuses(status_counts(plan.figures.values()), WEAK)
    return f"rests on {counts}" if counts else "rests on nothing assumed or remembered"


# --- as JSON ---------------------------------------------------------------------------------------------


def why_record(plan: Plan, names: Iterable[str]) -> dict[str, Any]:
    """The figures asked for as the values that JSON holds."""
    return {path: _record(figure) for path, figure in asked(plan, names)}


def _record(figure: Figure) -> dict[str, Any]:
    return {
        "label": figure.label,
        "value": figure.value,
        "unit": None if figure.kind is None else figure.kind.unit,
        "words": figure.words,
        "formula": figure.formula,
        "source": figure.source.title,
        "status": figure.status.value,
        "inputs": [_record(one) for one in figure.inputs],
    }
