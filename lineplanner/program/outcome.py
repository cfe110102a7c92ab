"""What a run leaves on the part and takes from the bath: dimensions, deposit rate, consumption."""

from collections.abc import Mapping
from dataclasses import dataclass

from lineplanner.bath.efficiency import chromic_acid_consumption
from lineplanner.bath.faraday import CHROMIUM_DEPOSIT
from lineplanner.program.job import Job
from lineplanner.program.runner import Runner
from lineplanner.program.stages import Run
from lineplanner.quantities import MASS, RATE, RATIO, THICKNESS, Mass, Rate, Ratio, Thickness
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

_STEPS = Source("steps before and after, of the recipe", Status.ENTERED)
_SUM = Source("arithmetic", Status.DERIVED)
_FARADAY = Source("Faraday's law, six electrons for each chromium atom", Status.DERIVED)
_ALL = Source("a deposit stands on the old surface whole", Status.DERIVED)


@dataclass(frozen=True, slots=True, kw_only=True)
class Outcome:
    """Dimensions per side (grow: positive), and for chrome efficiency, rate and chromic acid used.

    grown is the surface as it comes out of the tank, before any grinding; removed is what side steps take off.
    """

    build_up: Thickness
    removed: Thickness
    grown: Thickness
    efficiency: Ratio | None
    rate: Rate
    chromic_acid: Mass | None
    figures: Mapping[str, Figure]


def outcome_of(job: Job, runner: Runner, run: Run, known: Mapping[str, Figure]) -> Outcome | None:
    """The outcome of a run, told from its known figures; None where no time reaches the aim."""
    if run.thickness is None:
        return None
    chrome = job.process.name == "chrome-hard"
    share = 1.0 if chrome else job.process.build_up_share.value
    removed = sum(s.removed for s in (*job.recipe.before, *job.recipe.after))
    build_up = share * run.thickness
    steady = run.stages[-1].density
    efficiency = runner.efficiency(steady)
    consumed = _consumed(job, run)
    figures = _figures(job, build_up, removed, known["thickness.expected_m"], chrome=chrome)
    if efficiency is not None and consumed is not None:
        law = "eta = k min(cap, eta0 g(i, T)/g0 (1 - a (c - c0)))"
        figures["deposit.efficiency"] = result(
            "current efficiency", efficiency, RATIO, "at the last stage", law, runner.law, runner.law_figure
        )
        words = "deposit of all forward stages"
        figures["deposit.chromic_acid_kg"] = result(
            "chromic acid used",
            consumed,
            MASS,
            words,
            "m = eta M(CrO3) Q / (6 F)",
            _FARADAY,
            runner.law_figure,
        )
    rate = runner.rate(run)
    figures["deposit.rate_um_per_h"] = result(
        "thickness rate at the end",
        rate,
        RATE,
        "growth at the last stage",
        "dh/dt",
        runner.law,
        runner.law_figure,
    )
    return Outcome(
        build_up=build_up,
        removed=removed,
        grown=build_up - removed,
        efficiency=efficiency,
        rate=rate,
        chromic_acid=consumed,
        figures=figures,
    )


def _consumed(job: Job, run: Run) -> Mass | None:
    """Chromium trioxide that the deposit takes, by the mean efficiency that the deposit shows; None for anodizing."""
    if job.process.name != "chrome-hard" or not run.forward or run.thickness is None:
        return None
    family = next(f for f in job.tables.chrome if f.name == job.bath.family)
    deposit = run.thickness * job.areas.carrying * family.deposit_density.value
    mean = deposit / (CHROMIUM_DEPOSIT.equivalent * run.forward)
    return chromic_acid_consumption(charge=run.forward, efficiency=mean)


def _figures(
    job: Job, build_up: Thickness, removed: Thickness, expected: Figure, *, chrome: bool
) -> dict[str, Figure]:
    row = job.process.build_up_share
    share = given("build-up share", 1.0 if chrome else row.value, RATIO, _ALL if chrome else row.origin)
    grown = result(
        "build-up per side",
        build_up,
        THICKNESS,
        "thickness x build-up share",
        "b = g h",
        _SUM,
        expected,
        share,
    )
    taken = given("metal removed by side steps", removed, THICKNESS, _STEPS)
    change = result(
        "change of size per side",
        build_up - removed,
        THICKNESS,
        "build-up less metal removed",
        "b - r",
        _SUM,
        grown,
        taken,
    )
    return {
        "dimensions.build_up_m": grown,
        "dimensions.removed_m": taken,
        "dimensions.per_side_m": change,
        "dimensions.on_diameter_m": result(
            "change of size on diameter",
            2.0 * (build_up - removed),
            THICKNESS,
            "twice the change per side",
            "2 (b - r)",
            _SUM,
            change,
        ),
    }
