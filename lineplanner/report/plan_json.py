"""A plan as JSON: stable keys in a stable order, SI unless the key says otherwise, never NaN or infinity."""

import json
import math
from collections.abc import Mapping
from typing import Any

from lineplanner import __version__
from lineplanner.findings import Finding
from lineplanner.plan import Plan
from lineplanner.program.stages import Stage
from lineplanner.report.plan_id import plan_id
from lineplanner.report.setpoints import caution_text, fix_of, rectifier_of, text_of
from lineplanner.report.style import Style
from lineplanner.sources import Constant, Source, Status

FORMAT = "lineplanner plan 1"
COVERAGE = Constant(
    "coverage of the band",
    0.95,
    "1",
    Source("half-widths of the uncertainty table are stated for 95 %", Status.DERIVED),
)
HOUR = 3600.0  # s
GAS_AT = "25 degC, 101325 Pa, peak stage"

Json = dict[str, Any]


def plan_json(plan: Plan, style: Style) -> str:
    """The plan as JSON text."""
    return json.dumps(plan_record(plan, style), indent=2, ensure_ascii=True, allow_nan=False)


def _gaps(plan: Plan) -> Json:
    """Gaps between parts, named by their numbers; null where no two hang side by side."""
    gaps = plan.gaps
    return {
        "least_m": gaps.least,
        "between": None if gaps.between is None else _said(gaps.between),
        "overlapping": [_said(pair) for pair in gaps.overlapping],
        "near": [_said(pair) for pair in gaps.near],
    }


def _said(pair: tuple[int, int]) -> str:
    return f"{pair[0]} to {pair[1]}"


def plan_record(plan: Plan, style: Style) -> Json:
    """The plan as the values that JSON holds."""
    rectifier = rectifier_of(plan)
    return {
        "format": FORMAT,
        "plan_id": plan_id(plan),
        "made_with": f"lineplanner {__version__}",
        "load": plan.case.name,
        "rectifier": None if rectifier is None else rectifier.name,
        "process": plan.recipe.process,
        "control": control_of(plan),
        "recipe": _recipe(plan),
        "area": _area(plan),
        "current": _current(plan),
        "program": [] if plan.stopped or plan.run is None else [_stage(s) for s in plan.run.stages],
        "time": _time(plan),
        "charge_Ah": _charge(plan),
        "thickness": _thickness(plan),
        "voltage": _voltage(plan),
        "heat": _heat(plan),
        "gas": _gas(plan),
        "binding": None if plan.binding is None or plan.binding.margin is None else _binding(plan.binding),
        "findings": [_finding(f, style) for f in plan.findings],
        "cautions": [
            {
                "id": c.id,
                "word": c.word,
                "moment": moment,
                "text": caution_text(c, style),
                "source": str(c.source),
            }
            for c in plan.cautions
            for moment in [", ".join(c.moments)]
        ],
        "dimensions": _dimensions(plan),
        "deposit": _deposit(plan),
        "position": plan.position,
        "others": [
            {"rectifier": name, "check": f and f.check, "level": f and f.level.value}
            for name, f in plan.others
        ],
        "gaps": _gaps(plan),
    }


def control_of(plan: Plan) -> str:
    """current, voltage, or mixed where the volts meet their limit on the way."""
    controls = set() if plan.run is None else {s.control for s in plan.run.stages} - {"off"}
    return "mixed" if len(controls) > 1 else plan.control


def number(value: float | None) -> float | None:
    """A number that JSON can hold; what is not finite is no figure."""
    return None if value is None or not math.isfinite(value) else float(value)


def _unless_stopped(plan: Plan, value: float | None) -> float | None:
    return None if plan.stopped else number(value)


def _recipe(plan: Plan) -> Json:
    return {
        "name": plan.recipe.name,
        "revision": plan.recipe.revision,
        "status": plan.status,
        "deviations": [
            {
                "field": d.field,
                "recipe": number(d.recipe),
                "load": number(d.load),
                "inside_range": d.inside_range,
            }
            for d in plan.deviations
        ],
    }


def _area(plan: Plan) -> Json:
    areas = plan.areas
    return {
        "parts_m2": number(areas.parts_wet),
        "rack_m2": number(areas.rack_wet),
        "thieves_m2": number(areas.thieves_wet),
        "total_m2": number(areas.wet),
        "carrying_m2": number(areas.carrying),
        "significant_m2": number(areas.significant),
        "items": [_item(plan, index) for index in range(len(areas.items))],
    }


def _item(plan: Plan, index: int) -> Json:
    item = plan.areas.items[index]
    runs = () if plan.run is None else plan.run.items
    run = runs[index] if index < len(runs) else None
    return {
        "part": item.part,
        "material": item.material.name,
        "count": item.count,
        "each_m2": number(item.wet / item.count),
        "total_m2": number(item.wet),
        "carrying_m2": number(item.carrying),
        "current_A": _unless_stopped(plan, None if run is None else run.current),
        "thickness_m": _unless_stopped(plan, None if run is None else run.thickness),
    }


def _current(plan: Plan) -> Json:
    run, density = plan.run, plan.recipe.current_density
    by_current = density is not None and plan.control == "current"
    return {
        "density_A_per_m2": number(density.value) if by_current and density is not None else None,
        "set_A": _unless_stopped(plan, None if run is None else run.set_current),
        "panel_set_A": _unless_stopped(plan, None if run is None else run.panel_current),
        "peak_A": number(None if run is None else run.peak_current),
    }


def _stage(stage: Stage) -> Json:
    return {
        "stage": stage.stage,
        "control": stage.control,
        "from_s": number(stage.start),
        "to_s": number(stage.end),
        "from_A": number(stage.from_current),
        "to_A": number(stage.to_current),
        "from_V": number(stage.from_voltage),
        "to_V": number(stage.to_voltage),
        "polarity": stage.polarity,
    }


def _time(plan: Plan) -> Json:
    run = plan.run
    return {
        "total_s": _unless_stopped(plan, None if run is None else run.total_time),
        "at_set_current_s": _unless_stopped(plan, None if run is None else run.time_at_set),
    }


def _charge(plan: Plan) -> Json:
    run = plan.run
    amounts = {} if run is None else {"counter": run.counter, "forward": run.forward, "reverse": run.reverse}
    return {key: in_hours(plan, amounts.get(key)) for key in ("counter", "forward", "reverse")}


def in_hours(plan: Plan, charge: float | None) -> float | None:
    """A charge in ampere-hours, None where a stop prevents it."""
    return None if charge is None else _unless_stopped(plan, charge / HOUR)


def _thickness(plan: Plan) -> Json:
    found, aims = plan.thickness, plan.aims
    return {
        "target_m": number(aims.aim),
        "expected_m": _unless_stopped(plan, found.expected),
        "low_m": _unless_stopped(plan, found.low),
        "high_m": _unless_stopped(plan, found.high),
        "coverage": COVERAGE.value,
        "minimum_m": number(aims.minimum),
        "maximum_m": number(aims.maximum),
    }


def _voltage(plan: Plan) -> Json:
    run = plan.run
    return {
        "start_V": _unless_stopped(plan, None if run is None else run.start_voltage),
        "end_V": _unless_stopped(plan, None if run is None else run.end_voltage),
        "peak_V": _unless_stopped(plan, None if run is None else run.peak_voltage),
        "limit_V": number(None if run is None else run.voltage_limit),
        "limit_reached_s": _unless_stopped(plan, None if run is None else run.limit_reached),
    }


def _heat(plan: Plan) -> Json:
    found = plan.emissions
    return {
        "into_bath_peak_W": number(None if found is None else found.heat_peak),
        "into_bath_mean_W": number(None if found is None else found.heat_mean),
        "electrical_peak_W": number(None if found is None else found.electrical_peak),
    }


def _gas(plan: Plan) -> Json:
    found = plan.emissions
    return {
        "hydrogen_m3_per_h": number(None if found is None else found.hydrogen * HOUR),
        "oxygen_m3_per_h": number(None if found is None else found.oxygen * HOUR),
        "at": GAS_AT,
    }


def _binding(finding: Finding) -> Json:
    return {"check": finding.check, "margin": number(finding.margin)}


def _finding(finding: Finding, style: Style) -> Json:
    return {
        "check": finding.check,
        "level": finding.level.value,
        "value": number(finding.value),
        "limit": number(finding.limit),
        "unit": None if finding.kind is None else finding.kind.unit,
        "margin": number(finding.margin),
        "text": text_of(finding, style),
        "fix": fix_of(finding, style) or None,
        "source": str(finding.source),
        "status": finding.source.status.value,
    }


def numeric_leaves(record: object, path: str = "") -> Mapping[str, float]:
    """Every number of a JSON record by its key path, as `--explain` takes it."""
    found: dict[str, float] = {}
    if isinstance(record, Mapping):
        for key, value in record.items():
            found |= numeric_leaves(value, f"{path}.{key}" if path else str(key))
    elif isinstance(record, list):
        for index, value in enumerate(record):
            found |= numeric_leaves(value, f"{path}[{index}]")
    elif isinstance(record, int | float) and not isinstance(record, bool):
        found[path] = float(record)
    return found


def _dimensions(plan: Plan) -> Json:
    """Change of size; growth is positive."""
    outcome = plan.outcome
    grown = None if outcome is None else outcome.grown
    return {
        "build_up_m": _unless_stopped(plan, None if outcome is None else outcome.build_up),
        "removed_m": _unless_stopped(plan, None if outcome is None else outcome.removed),
        "per_side_m": _unless_stopped(plan, grown),
        "on_diameter_m": _unless_stopped(plan, None if grown is None else 2.0 * grown),
    }


def _deposit(plan: Plan) -> Json:
    """How fast the coating grows at the end; for chrome its efficiency and what it takes from the bath."""
    outcome = plan.outcome
    rate = None if outcome is None else outcome.rate * 1e6 * HOUR
    return {
        "rate_um_per_h": _unless_stopped(plan, rate),
        "efficiency": _unless_stopped(plan, None if outcome is None else outcome.efficiency),
        "chromic_acid_kg": _unless_stopped(plan, None if outcome is None else outcome.chromic_acid),
    }
