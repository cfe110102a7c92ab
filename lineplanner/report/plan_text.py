"""A plan as text: what to set, whether it may run, what can hurt, then why."""

from lineplanner.findings import Level
from lineplanner.inputs.approval import content_hash
from lineplanner.inputs.recipe import Recipe
from lineplanner.plan import Plan
from lineplanner.report.cautions_text import cautions_in_full
from lineplanner.report.checks_text import checks_lines, circuit_lines, others_lines, said
from lineplanner.report.digits import told_apart
from lineplanner.report.explain import rests_on
from lineplanner.report.layout import wrapped
from lineplanner.report.plan_id import plan_id
from lineplanner.report.program_text import areas_lines, program_lines, thickness_lines
from lineplanner.report.setpoints import caution_line, setpoint_lines, verdict_line
from lineplanner.report.style import Style
from lineplanner.report.words.names import number_of, process_name

DRAFT = "DRAFT RECIPE"
CHANGED = "(changed since it was approved)"
LAST_LINE = "Planning estimate; safety data sheet, local codes, qualified people decide."


def plan_text(plan: Plan, style: Style) -> str:
    """The whole plan."""
    lines = [*heading_lines(plan, style), ""]
    lines += setpoint_lines(plan, style)
    lines += wrapped(verdict_line(plan, style), rest="  ")
    lines += [line for f in plan.findings if f.level is Level.STOP for line in said(f, style)]
    caution = caution_line(plan, style)
    lines += [caution] if caution else []
    parts = {
        "PROGRAM": program_lines(plan, style),
        "THICKNESS": thickness_lines(plan, style),
        "AREAS": areas_lines(plan, style),
        "CIRCUIT": circuit_lines(plan, style),
        "CHECKS": checks_lines(plan, style),
        "OTHER RECTIFIERS": others_lines(plan, style),
        "STEPS": steps_lines(plan, style),
        "CAUTIONS": cautions_in_full(plan.cautions, style),
    }
    for title, part in parts.items():
        lines += ["", title, *part] if part else []
    lines += ["", *wrapped(f"plan {plan_id(plan)}, {rests_on(plan)}", rest="  "), LAST_LINE]
    return "\n".join(lines)


def heading_lines(plan: Plan, style: Style) -> list[str]:
    """Load, order and lot as typed; recipe with revision, status and deviations; tank."""
    case, load = plan.case, plan.case.load
    typed = [f"{name} {text}" for name, text in (("order", load.order), ("lot", load.lot)) if text]
    lines = wrapped("   ".join([case.name, load.name, *typed]), rest="  ")
    lines += wrapped(
        f"{recipe_said(plan)}   {process_name(plan.recipe.process)} in tank {case.tank.name}", rest="  "
    )
    return lines + deviation_lines(plan, style)


def recipe_said(plan: Plan) -> str:
    """Name, revision, status, and how many deviations."""
    counted = f", {number_of(len(plan.deviations), 'deviation')}" if plan.deviations else ""
    return f"{plan.filed.name} rev {plan.filed.revision} {status_said(plan)}{counted}"


def status_said(plan: Plan) -> str:
    """The status of the recipe: a changed one was approved with other values than it has now."""
    if plan.status == "approved":
        return "approved"
    return f"{DRAFT} {CHANGED}" if changed_since_approval(plan.filed) else DRAFT


def changed_since_approval(recipe: Recipe) -> bool:
    """Whether a recipe that is filed as approved has other values than those that were approved."""
    content = recipe.approved_content
    return recipe.status == "approved" and content != "" and content != content_hash(recipe)


def deviation_lines(plan: Plan, style: Style) -> list[str]:
    """Each setting that the load runs otherwise than its recipe says, with who changed it."""
    lines: list[str] = []
    for one in plan.deviations:
        here, filed = style.show(one.load, one.kind), "left to the tables"
        if one.recipe is not None:
            here, filed = told_apart(one.load, one.recipe, one.kind, style)
        where = "inside the range" if one.inside_range else "OUTSIDE THE RANGE"
        text = f"deviation: {one.label} {here}, recipe {filed}: {where}"
        lines += wrapped(text, first="  ", rest="    ")
    change = plan.case.load.change
    if plan.deviations and change is not None and change.why:
        lines += wrapped(f"why: {change.why}", first="  ", rest="    ")
    return lines


def steps_lines(plan: Plan, style: Style) -> list[str]:
    """The recipe's steps before and after, and the notes of recipe and load."""
    lines: list[str] = []
    for when, steps in (("before", plan.recipe.before), ("after", plan.recipe.after)):
        said = []
        for step in steps:
            tank = f" ({step.tank})" if step.tank else ""
            time = f" {style.time_said(step.time)}" if step.time else ""
            said.append(f"{step.name}{tank}{time}")
        lines += wrapped(f"{when}: {'; '.join(said)}", first="  ", rest="    ") if said else []
    for whose, text in (("recipe", plan.recipe.note), ("load", plan.case.load.note)):
        lines += wrapped(f"note of the {whose}: {text}", first="  ", rest="    ") if text else []
    return lines
