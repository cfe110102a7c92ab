"""Settings and aim of a recipe as figures."""

from lineplanner.program.job import Job
from lineplanner.quantities import (
    THICKNESS,
    Kind,
    Thickness,
)
from lineplanner.sources import Source, Status
from lineplanner.trace import Figure, given, result

_ARITHMETIC = Source("arithmetic", Status.DERIVED)
_GUM = Source(
    "JCGM 100:2008 (GUM), clause 5.1: combined by partial derivatives at the solution", Status.MEMORY
)
_FILM_VOLTS = Source("film voltage model of this program: an estimate", Status.ASSUMPTION)
_CELL_VOLTS = Source("cell voltage model of this program: an estimate", Status.ASSUMPTION)


def setting_figure(job: Job, label: str, value: float, kind: Kind, *, changed: bool) -> Figure:
    """A setting of the recipe, or what the load changed it to."""
    recipe = job.recipe
    where = (
        f"load {job.case.name}, change of the recipe"
        if changed
        else f"recipe {recipe.name} rev {recipe.revision}"
    )
    return given(label, value, kind, Source(where, Status.ENTERED))


def aim_figure(job: Job) -> Figure:
    """The aim as total coating per side."""
    change = job.case.load.change
    changed = change is not None and change.aim is not None
    inputs = [setting_figure(job, "aim as the recipe gives it", _asked(job), THICKNESS, changed=changed)]
    if job.recipe.stock > 0.0:
        inputs.append(
            setting_figure(job, "grinding stock per side", job.recipe.stock, THICKNESS, changed=False)
        )
    words = "aim as total coating per side, stock included"
    return result("aim", job.aims.aim, THICKNESS, words, "h = aim + stock", _ARITHMETIC, *inputs)


def _asked(job: Job) -> Thickness:
    return job.recipe.aim.value if job.recipe.aim is not None else job.aims.aim - job.recipe.stock
