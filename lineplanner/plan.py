"""THE pipeline: from a case to a plan, one line per stage."""

from collections.abc import Mapping
from dataclasses import dataclass

from lineplanner.bath.gas import dilution_flow, hydrogen_share
from lineplanner.bath.uncertainty import Band
from lineplanner.capacity import (
    Proposal,
    binding,
    can_bind,
    check_bus,
    check_contacts,
    check_cooling,
    check_hydrogen,
    check_joints,
    check_rack,
    check_rectifier,
    check_titanium_volts,
    propose,
)
from lineplanner.cautions.ranking import Caution, ranked
from lineplanner.cautions.rules import applicable
from lineplanner.cautions.situation import Gas, situation_of
from lineplanner.circuit import Circuit, circuit_of
from lineplanner.findings import Finding, Level
from lineplanner.inputs.approval import effective_status
from lineplanner.inputs.case import Case
from lineplanner.inputs.change import Deviation, deviations
from lineplanner.inputs.recipe import Recipe
from lineplanner.inputs.shares import PositionShares
from lineplanner.load import LoadAreas, load_areas
from lineplanner.load.story import area_figures
from lineplanner.program.aims import Aims
from lineplanner.program.band import Input, band_of
from lineplanner.program.checks import check_aim, check_deviations, check_load
from lineplanner.program.chrome import Start, start_of
from lineplanner.program.emissions import Emissions, emissions_of
from lineplanner.program.job import Job
from lineplanner.program.outcome import Outcome, outcome_of
from lineplanner.program.recipe_for import as_run, job_of, process_of
from lineplanner.program.runner import Runner, runner_of
from lineplanner.program.stages import Run
from lineplanner.program.story import run_figures
from lineplanner.program.story_thickness import thickness_figures
from lineplanner.program.window import check_window
from lineplanner.quantities import Thickness
from lineplanner.racking import Gaps, check_gaps, gap_figures, gaps_of
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure


@dataclass(frozen=True, slots=True, kw_only=True)
class Thicknesses:
    """Expected thickness and its 95 % band in m; None where no time reaches the aim."""

    expected: Thickness | None
    low: Thickness | None
    high: Thickness | None
    band: Band | None
    inputs: tuple[Input, ...] = ()


@dataclass(frozen=True, slots=True, kw_only=True)
class Plan:
    """Everything that is known of a load before the switch is closed.

    case and recipe are as run (the load's changes in them); filed is the recipe as its file says. run is that of the
    proposed rectifier, None where none feeds the tank; others are the rest, with their first failing check.
    findings are ranked, gravest and tightest first. figures are the figures that can be asked why, by key path.
    """

    case: Case
    filed: Recipe
    recipe: Recipe
    status: str
    deviations: tuple[Deviation, ...]
    areas: LoadAreas
    gaps: Gaps
    circuit: Circuit
    aims: Aims
    control: str
    run: Run | None
    others: tuple[tuple[str, Finding | None], ...]
    thickness: Thicknesses
    emissions: Emissions | None
    outcome: Outcome | None
    start: Start | None
    findings: tuple[Finding, ...]
    binding: Finding | None
    cautions: tuple[Caution, ...]
    figures: Mapping[str, Figure]
    position: str

    @property
    def stopped(self) -> bool:
        """Whether any finding forbids the plan."""
        return any(f.level is Level.STOP for f in self.findings)


def plan(case: Case, shares: PositionShares | None = None) -> Plan:
    """Plan a load: areas, circuit, program on each rectifier, capacity, cautions. Never runs the spread solver."""
    filed, changed = case.recipe, deviations(case.recipe, case.load.change)
    case = as_run(case)
    process = process_of(case)
    areas, gaps = load_areas(case, process), gaps_of(case, case.recipe.spacing or 0.0)
    if areas.parts_carrying <= 0.0:
        return _nothing_wet(case, filed, changed, areas, gaps, circuit_of(case, areas, process))
    circuit = circuit_of(case, areas, process)
    job = job_of(case, process, areas, circuit.resistance)
    runner = runner_of(job)
    proposal = propose_rectifier(case, runner)
    run = proposal.run if proposal else None
    thickness = thicknesses(runner, run, shares)
    emissions = (
        emissions_of(job, run, efficiency=runner.efficiency, film_share=runner.film_share) if run else None
    )
    figures = _figures(job, runner, run, circuit, thickness, emissions)
    outcome = outcome_of(job, runner, run, figures) if run else None
    findings = ranked_findings(
        [
            *check_deviations(changed),
            *check_load(job),
            *check_gaps(gaps, case),
            *_run_findings(job, runner, proposal, circuit, thickness, emissions),
        ]
    )
    return Plan(
        case=case,
        filed=filed,
        recipe=case.recipe,
        status=effective_status(filed),
        deviations=changed,
        areas=areas,
        gaps=gaps,
        circuit=circuit,
        aims=job.aims,
        control=runner.control,
        run=run,
        others=proposal.others if proposal else (),
        thickness=thickness,
        emissions=emissions,
        outcome=outcome,
        start=start_of(job) if process.name == "chrome-hard" else None,
        findings=findings,
        binding=binding(findings),
        cautions=_cautions(case, areas, run, emissions),
        figures={**figures, **gap_figures(gaps), **(outcome.figures if outcome else {})},
        position="default" if shares is None else "map",
    )


def propose_rectifier(case: Case, runner: Runner) -> Proposal | None:
    """Run the program on each rectifier of the tank (or on the one the load names) and propose one."""
    feeding = [r for r in case.line.rectifiers if case.tank.name in r.tanks]
    runs = [runner.run(r) for r in feeding]
    checked = tuple(
        (run, check_rectifier(run.rectifier, run, case)) for run in runs if run.rectifier is not None
    )
    return propose(checked, named=case.load.rectifier) if checked else None


def thicknesses(runner: Runner, run: Run | None, shares: PositionShares | None) -> Thicknesses:
    """The expected thickness of the slowest part with the band of the load around it."""
    if run is None or run.thickness is None:
        return Thicknesses(expected=None, low=None, high=None, band=None)
    inputs = runner.inputs(run, shares)
    band = band_of(inputs)
    fastest = max(i.thickness for i in run.items)
    low, high = run.thickness * max(0.0, 1.0 - band.total), fastest * (1.0 + band.total)
    return Thicknesses(expected=run.thickness, low=low, high=high, band=band, inputs=inputs)


def ranked_findings(findings: list[Finding]) -> tuple[Finding, ...]:
    """Gravest first; what is wrong by kind (alloy, mixture, level) before what is over by a percentage."""
    return tuple(sorted(findings, key=_rank))


def _rank(finding: Finding) -> tuple[int, bool, float]:
    grave = finding.level in (Level.STOP, Level.CAUTION)
    late = (finding.margin is not None) if grave else (finding.margin is None or not can_bind(finding))
    return (-finding.level.rank, late, finding.margin if finding.margin is not None else 0.0)


def _run_findings(
    job: Job,
    runner: Runner,
    proposal: Proposal | None,
    circuit: Circuit,
    thickness: Thicknesses,
    emissions: Emissions | None,
) -> list[Finding]:
    """What recipe, line and services say about the proposed run."""
    if proposal is None:
        return [_no_rectifier(job.case)]
    run, case = proposal.run, job.case
    found = [*proposal.findings, *check_aim(run, job.aims, runner.law), *runner.checks(run)]
    if thickness.band is not None and thickness.low is not None and thickness.high is not None:
        found += check_window(
            job.aims,
            low=thickness.low,
            high=thickness.high,
            band=thickness.band,
            solve=lambda wanted: runner.time_for(run, wanted),
            limited=run.limit_reached is not None,
            clock=runner.clock,
        )
    found += check_contacts(job.areas, run, job.process, case)
    found += check_rack(run, case)
    found += check_bus(circuit, run, case)
    found += check_joints(run, case)
    found += check_titanium_volts(run, case)
    if emissions is not None:
        found += check_cooling(emissions.to_cool, case)
        found += check_hydrogen(emissions.hydrogen, run, case)
    return found


def _no_rectifier(case: Case) -> Finding:
    source = Source(f"line {case.load.line}", Status.ENTERED)
    return Finding(
        "rectifier",
        Level.STOP,
        "rectifier.none",
        source,
        fix="rectifier.enter",
        facts={"tank": case.tank.name},
    )


def _cautions(
    case: Case, areas: LoadAreas, run: Run | None, emissions: Emissions | None
) -> tuple[Caution, ...]:
    """The cautions of the plan, gravest first."""
    exhaust = case.tank.exhaust
    flow = exhaust.flow if exhaust is not None else None
    gas = Gas()
    if emissions is not None and run is not None:
        needed = dilution_flow(hydrogen=emissions.hydrogen, share=case.tables.limits.hydrogen_limit.value)
        share = most = None
        if flow is not None:
            share = hydrogen_share(hydrogen=emissions.hydrogen, exhaust=flow) if flow > 0.0 else 1.0
            most = run.peak_current * flow / needed if needed > 0.0 else None
        gas = Gas(hydrogen=share, exhaust_for_hydrogen=needed, current_for_hydrogen=most)
    return ranked(applicable(situation_of(case, areas, run, gas)), case.cautions)


def _figures(
    job: Job,
    runner: Runner,
    run: Run | None,
    circuit: Circuit,
    thickness: Thicknesses,
    emissions: Emissions | None,
) -> Mapping[str, Figure]:
    """Every figure of the plan with its story, by key path."""
    figures = dict(area_figures(job.case, job.areas))
    if run is not None:
        figures |= run_figures(job, runner, run, figures["area.carrying_m2"], resistance=circuit.figure)
        if thickness.band is not None and thickness.low is not None and thickness.high is not None:
            figures |= thickness_figures(
                job, runner, run, thickness.inputs, thickness.band, low=thickness.low, high=thickness.high
            )
    if emissions is not None:
        figures |= emissions.figures
    return figures


def _nothing_wet(
    case: Case,
    filed: Recipe,
    changed: tuple[Deviation, ...],
    areas: LoadAreas,
    gaps: Gaps,
    circuit: Circuit,
) -> Plan:
    """A load on which no part carries current: there is no number to set."""
    source = Source("areas of the load", Status.DERIVED)
    dry = all(item.dry == item.count for item in areas.items)
    key, fix = ("level.nothing-wet", "level.raise") if dry else ("level.masked", "level.unmask")
    finding = Finding("level", Level.STOP, key, source, fix=fix)
    job = job_of(case, process_of(case), areas, circuit.resistance)
    findings = ranked_findings(
        [finding, *check_deviations(changed), *check_load(job), *check_gaps(gaps, case)]
    )
    return Plan(
        case=case,
        filed=filed,
        recipe=case.recipe,
        status=effective_status(filed),
        deviations=changed,
        areas=areas,
        gaps=gaps,
        circuit=circuit,
        aims=job.aims,
        control="voltage" if case.recipe.voltages else "current",
        run=None,
        others=(),
        thickness=Thicknesses(expected=None, low=None, high=None, band=None),
        emissions=None,
        outcome=None,
        start=None,
        findings=findings,
        binding=finding,
        cautions=_cautions(case, areas, None, None),
        figures={**area_figures(case, areas), **gap_figures(gaps)},
        position="default",
    )
