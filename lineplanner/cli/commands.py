"""The commands: what each takes and what it calls. Everything heavy is imported when a command runs."""

from __future__ import annotations

import json
from collections.abc import Callable
from difflib import get_close_matches
from pathlib import Path
from typing import Any

import click

from lineplanner import __version__
from lineplanner.cli.opened import Opened, Options, opened, plain_letters
from lineplanner.cli.output import Output

STOPPED, UNUSABLE = 1, 2
_COMMON = (
    click.option("--units", type=click.Choice(["metric", "us"]), help="Unit system; else the site's."),
    click.option("--site", metavar="DIR", help="Folder with configs and rack_library; else the nearest one."),
    click.option("--ascii", "ascii_only", is_flag=True, help="Plain letters only."),
)


def common(command: Callable[..., Any]) -> Callable[..., Any]:
    """The options that every command takes."""
    for option in reversed(_COMMON):
        command = option(command)
    return command


class Commands(click.Group):
    """Commands that answer a misspelt name with the nearest one."""

    def resolve_command(
        self, ctx: click.Context, args: list[str]
    ) -> tuple[str | None, click.Command | None, list[str]]:
        name = args[0] if args else ""
        if not name.startswith("-") and name not in self.commands:
            near = get_close_matches(name, self.commands, 1)
            hint = f"The nearest is `{near[0]}`" if near else f"Commands: {', '.join(sorted(self.commands))}"
            ctx.fail(f"`{name}` is not a command. {hint}")
        return super().resolve_command(ctx, args)


@click.group(cls=Commands, invoke_without_command=True)
@click.version_option(__version__, message="lineplanner %(version)s")
@common
@click.pass_context
def lineplanner(ctx: click.Context, units: Any, site: str | None, *, ascii_only: bool) -> Output | int | None:
    """Plans anodizing and hard-chrome loads: amperes, ramp, minutes.

    Without a command it opens the screens; with no terminal it prints the run card of the site's first load.
    """
    screens: Callable[[Options], int] | None = ctx.obj
    ctx.obj = Options(units, site, ascii_only)
    if ctx.invoked_subcommand:
        return None
    return screens(ctx.obj) if screens else _first_card(opened(ctx.obj))


def _options(units: Any, site: str | None, ascii_only: bool) -> Options:  # noqa: FBT001 - as click hands it over
    """The options of a command, completed by those typed before its name."""
    before: Options = click.get_current_context().obj or Options()
    return Options(units or before.units, site or before.site, ascii_only or before.ascii)


def _first_card(site: Opened) -> Output:
    from lineplanner.errors import InputError
    from lineplanner.plan import plan
    from lineplanner.report.card import card_text

    first = site.library.site().first_load or next(iter(site.library.stems("load")), None)
    if first is None:
        raise InputError("site.no_loads")
    text = card_text(plan(site.library.case(first)), site.style)
    said = f"lineplanner: no screen here; this is the run card of {first}. Commands: lineplanner --help"
    return site.output(text, said=said)


@lineplanner.command("plan")
@click.argument("load")
@click.option("--json", "as_json", is_flag=True, help="Stable keys, SI units.")
@click.option(
    "--explain", "figures", multiple=True, metavar="FIGURE", help="Why: a JSON key path, check:NAME or all."
)
@common
def plan_command(load: str, figures: tuple[str, ...], *, as_json: bool, **rest: Any) -> Output:
    """The whole plan of one load: what to set first, then program, checks, cautions."""
    from lineplanner.plan import plan

    site = opened(_options(**rest))
    made = plan(site.library.case(load))
    code = STOPPED if made.stopped else 0
    if as_json:
        from lineplanner.report.plan_json import plan_record

        record = plan_record(made, site.plain)
        if figures:
            from lineplanner.report.explain import why_record

            record["why"] = why_record(made, figures)
        return Output(json.dumps(record, indent=2, allow_nan=False), code)
    if figures:
        from lineplanner.report.explain import explanation

        return site.output("\n".join(explanation(made, figures, site.style)), code)
    from lineplanner.report.plan_text import plan_text

    return site.output(plan_text(made, site.style), code)


@lineplanner.command("card")
@click.argument("load")
@common
def card_command(load: str, **rest: Any) -> Output:
    """The run card of one load, to clip on the flight bar."""
    from lineplanner.plan import plan
    from lineplanner.report.card import card_text

    site = opened(_options(**rest))
    made = plan(site.library.case(load))
    return site.output(card_text(made, site.style), STOPPED if made.stopped else 0)


@lineplanner.command("fill")
@click.argument("load")
@click.option("--part", required=True, metavar="PART", help="The part to hang more of.")
@click.option("--json", "as_json", is_flag=True, help="Stable keys, SI units.")
@common
def fill_command(load: str, part: str, *, as_json: bool, **rest: Any) -> Output:
    """How many more of a part fit on the rack, how many the line carries, and what stops one more."""
    from lineplanner.advice import how_many_more
    from lineplanner.racking import with_first
    from lineplanner.report.more_text import more_json, more_text

    site = opened(_options(**rest))
    case = site.library.case(load)
    entry = next((n for n, hang in enumerate(case.load.hangs) if hang.part == part), None)
    key = (entry or 0, 0)
    if entry is None:
        record = site.library.record("part", part)
        case, key = with_first(case, part, record, site.library.record("material", record.material))
    more = how_many_more(case, key, begun=entry is None)
    if as_json:
        return Output(more_json(more, site.plain), STOPPED if more.made.stopped else 0)
    return site.output(more_text(more, site.style), STOPPED if more.made.stopped else 0)


@lineplanner.command("area")
@click.argument("file")
@click.option("--json", "as_json", is_flag=True, help="Stable keys, SI units.")
@common
def area_command(file: str, *, as_json: bool, **rest: Any) -> Output:
    """The areas of a part, a rack or a load, face by face, and why. FILE is a file or a name."""
    from lineplanner.report.area_ledger import areas_of

    site = opened(_options(**rest))
    areas = areas_of(site.library, file)
    if as_json:
        from lineplanner.report.area_json import area_record

        return Output(json.dumps(area_record(areas, site.plain), indent=2, allow_nan=False))
    from lineplanner.report.area_text import area_text

    return site.output(area_text(areas, site.style))


@lineplanner.command("check")
@click.argument("files", nargs=-1, metavar="FILE...")
@click.option("--schema", "kind", metavar="KIND", help="Print the JSON schema of a kind of file.")
@common
def check_command(files: tuple[str, ...], kind: str | None, **rest: Any) -> Output:
    """Read files and report every problem; exits 2 if there are any."""
    from lineplanner.cli.checked import problems_of, schema_text
    from lineplanner.errors import InputError
    from lineplanner.files.problems import word

    options = _options(**rest)
    if kind is not None:
        return Output(schema_text(kind))
    if not files:
        raise InputError("check.nothing")
    count, problems, changed = problems_of([Path(file) for file in files], options)
    told = [f"lineplanner: {line}" for line in changed]
    said = "\n".join([*told, f"lineplanner: {count} file(s) read, {len(problems)} problem(s)"])
    text = "\n".join(word(one, options.units or "metric") for one in problems)
    return Output(text, UNUSABLE if problems else 0, said, ascii=plain_letters(options))


@lineplanner.command("sources")
@click.option("--json", "as_json", is_flag=True, help="As JSON.")
@common
def sources_command(*, as_json: bool, **rest: Any) -> Output:
    """Every constant and table value with status, source and file."""
    from lineplanner.report.sources import source_records, sources_text

    site = opened(_options(**rest))
    if as_json:
        return Output(json.dumps(source_records(site.library), indent=2, allow_nan=False))
    return site.output(sources_text(site.library, site.style))


@lineplanner.command("start")
@click.argument("folder", metavar="DIR")
@common
def start_command(folder: str, **rest: Any) -> Output:
    """Write a site to begin with: the demo shop's configs and rack_library."""
    from lineplanner.errors import InputError
    from lineplanner.files.starter import start
    from lineplanner.report.layout import typed

    options = _options(**rest)
    if not folder.strip():
        raise InputError("start.nowhere")
    written = start(folder)
    text = f"{folder}: {len(written)} files written. Begin with `lineplanner --site {typed(folder)}`"
    return Output(text, ascii=plain_letters(options))


@lineplanner.command("approve")
@click.argument("recipe")
@click.option("--by", required=True, metavar="NAME", help="Who approves it.")
@common
def approve_command(recipe: str, by: str, **rest: Any) -> Output:
    """Approve a recipe as it stands, from today on. RECIPE is a file or a name."""
    from lineplanner.cli.approving import approve

    site = opened(_options(**rest))
    return site.output(approve(site.library, recipe, by=by))
