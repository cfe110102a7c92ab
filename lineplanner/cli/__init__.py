"""The headless commands: parse, call, print. stdout is data, stderr is narration.

commands.py  the commands with their options      output.py  what a command hands back, and how it is printed
opened.py    the site, units and letters in use   fault.py   an internal fault, kept in a log
checked.py   files read for their problems        approving.py  a recipe approved
"""

import sys
from collections.abc import Callable
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from lineplanner.cli.opened import Options

DONE, STOPPED, UNUSABLE, FAULT, INTERRUPTED = 0, 1, 2, 3, 130


def main(arguments: list[str], screens: "Callable[[Options], int] | None" = None) -> int:
    """Run one command; the return value is the exit code. A broken pipe is the caller's to end quietly.

    screens opens the screens where there is no command; without it the first load's card is printed.
    """
    import click

    from lineplanner.cli.commands import lineplanner
    from lineplanner.cli.output import Output, told, write
    from lineplanner.errors import PlannerError

    try:
        result = lineplanner.main(args=arguments, prog_name="lineplanner", standalone_mode=False, obj=screens)
        if not isinstance(result, Output):  # --help and --version print by themselves
            return result if isinstance(result, int) else DONE
        write(result)
    except click.Abort:
        return INTERRUPTED
    except click.ClickException as error:
        return told(usage_text(error), UNUSABLE)
    except PlannerError as error:
        from lineplanner.cli.opened import error_style
        from lineplanner.report.words import error_text

        return told(error_text(error, error_style(arguments)), UNUSABLE)
    except BrokenPipeError:
        raise
    except OSError as error:
        from lineplanner.cli.output import unwritable

        if unwritable(error):
            why = error.strerror or type(error).__name__
            return told(f"the output cannot be written: {why}. What was printed is not whole", UNUSABLE)
        return _fault(arguments)
    except Exception:  # noqa: BLE001 - the last net: no traceback reaches a user
        return _fault(arguments)
    return result.code


def _fault(arguments: list[str]) -> int:
    """Keep the log of what was raised, and say so."""
    from lineplanner.cli.fault import kept
    from lineplanner.cli.output import told

    return told(kept(arguments, sys.exc_info()), FAULT)


def usage_text(error: "click.ClickException") -> str:  # type: ignore[name-defined]  # noqa: F821
    """What is wrong with the command line, and where its help is."""
    import click

    text = error.format_message()
    if isinstance(error, click.BadParameter) and not isinstance(error, click.MissingParameter):
        hint = error.param.opts[0] if error.param is not None else ""
        text = f"{hint}: {error.message}" if hint else error.message
    context = error.ctx if isinstance(error, click.UsageError) else None
    return f"{text.rstrip('.')}. See `{context.command_path if context else 'lineplanner'} --help`"
