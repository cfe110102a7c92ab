"""Loads in a list: what to set and whether it may run, one row each; a load that cannot be read says so."""

from dataclasses import replace

from lineplanner.errors import PlannerError
from lineplanner.files.library import Library
from lineplanner.findings import Level
from lineplanner.plan import Plan, plan
from lineplanner.report.digits import NONE, run_time_said, use
from lineplanner.report.listing_lines import UNREAD, said_below
from lineplanner.report.rows import Listed
from lineplanner.report.setpoints import (
    SET,
    caution_line,
    setpoint_lines,
    verdict_line,
    verdict_word,
    worst,
)
from lineplanner.report.style import Style
from lineplanner.report.words import error_text
from lineplanner.report.words.names import check_name, number_of
from lineplanner.units import System

__all__ = ["list_load", "listed", "said_below", "unread"]
WIDE = 10_000  # characters: whoever shows a line cuts it


def listed(plan: Plan, style: Style) -> Listed:
    """A load that was planned."""
    stem, load, run = plan.case.name, plan.case.load, plan.run
    setting, total = NONE, NONE
    if run is not None and not plan.stopped and run.total_time is not None:
        setting = setpoint_lines(plan, style, WIDE)[0].removeprefix(SET).partition("   ")[0]
        total = run_time_said(run.total_time, plan.recipe.process, style)
    known = (stem, load.name, load.order, load.lot, load.recipe, plan.filed.name, plan.case.tank.name)
    return Listed(
        stem,
        (stem, plan.filed.name, plan.case.tank.name, setting, total, verdict_short(plan, style)),
        worst(plan).value,
        " ".join(known).casefold(),
        verdict_line(plan, style),
        caution_line(plan, style, width=WIDE),
    )


def unread(stem: str, error: PlannerError, style: Style) -> Listed:
    """A load that cannot be planned, with its first problem."""
    problem = error_text(error, style).splitlines()[0]
    return Listed(stem, (stem, UNREAD, "", NONE, NONE, problem), "unread", stem, f"{UNREAD}: {problem}")


def verdict_short(plan: Plan, style: Style) -> str:
    """The verdict in few words: its word, the check that it names, what marks the recipe."""
    word = verdict_word(plan)
    if worst(plan) in (Level.STOP, Level.CAUTION):
        first = plan.findings[0]
        share = "" if use(first, style) == NONE else f" {use(first, style)}"
        word += f" {check_name(first.check)}{share}"
    parts = [word]
    if plan.status != "approved":
        parts.append("draft")
    if plan.deviations and plan.findings[0].check != "deviation":
        parts.append(number_of(len(plan.deviations), "deviation"))
    return ", ".join(parts)


def list_load(library: Library, stem: str, systems: tuple[System, ...], style: Style) -> dict[System, Listed]:
    """A load as listed in several unit systems, so that nothing is planned again when they change."""
    styles = {system: replace(style, system=system) for system in systems}
    try:
        made = plan(library.case(stem))
    except PlannerError as error:
        return {system: unread(stem, error, one) for system, one in styles.items()}
    return {system: listed(made, one) for system, one in styles.items()}
