"""The headless commands: parse, call, print. stdout is data, stderr is narration.

commands.py  the commands with their options      output.py  what a command hands back, and how it is printed
opened.py    the site, units and letters in use   fault.py   an internal fault, kept in a log
"""

import sys

DONE, STOPPED, UNUSABLE, FAULT, INTERRUPTED = 0, 1, 2, 3, 130


def main(arguments: list[str]) -> int:
    """Run one command; the return value is the exit code. A broken pipe is the caller's to end quietly."""
    import click

    from lineplanner.cli.commands import lineplanner
    from lineplanner.cli.output import Output, told, write
    from lineplanner.errors import PlannerError

    try:
        result = lineplanner.main(args=arguments, prog_name="lineplanner", standalone_mode=False)
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
    except Exception:  # noqa: BLE001 - the last net: no traceback reaches a user
        from lineplanner.cli.fault import kept

        return told(kept(arguments, sys.exc_info()), FAULT)
    return result.code


def usage_text(error: "click.ClickException") -> str:  # type: ignore[name-defined]  # noqa: F821
    """What is wrong with the command line, and where its help is."""
    import click

    text = error.format_message()
    if isinstance(error, click.BadParameter) and not isinstance(error, click.MissingParameter):
        hint = error.param.opts[0] if error.param is not None else ""
        text = f"{hint}: {error.message}" if hint else error.message
    context = error.ctx if isinstance(error, click.UsageError) else None
    return f"{text.rstrip('.')}. See `{context.command_path if context else 'lineplanner'} --help`"
