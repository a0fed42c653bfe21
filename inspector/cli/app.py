"""The commands put together, and what every one of them does with an error.

Exit codes: 0 done; 2 the input is wrong; 1 anything else. No traceback reaches anyone.
"""

from __future__ import annotations

import os
import sys
from collections.abc import Sequence

import typer

from inspector import PROGRAM, VERSION
from inspector.cli import check, demo, explain, field, rate, report
from inspector.cli.faults import keep_fault
from models.errors import BasisNotAvailable, InputError, InspectorError
from models.words import CAUTION, count

commands = typer.Typer(
    name="inspector",
    help=f"Rate planar truss footbridges in the condition that inspectors recorded. {CAUTION}",
    no_args_is_help=True,
    add_completion=False,
    pretty_exceptions_enable=False,
    rich_markup_mode=None,
)
for module in (demo, check, rate, explain, report, field):
    module.register(commands)


@commands.callback(invoke_without_command=True)
def _program(
    *, version: bool = typer.Option(False, "--version", help="Say which program and version this is, and stop.")
) -> None:
    if version:
        typer.echo(f"{PROGRAM} {VERSION}")
        raise typer.Exit


def run(arguments: Sequence[str]) -> int:
    """Run one command.

    Parameters
    ----------
    arguments : as typed after the program's name.

    Returns
    -------
    The exit code.
    """
    try:
        commands(list(arguments))
    except SystemExit as end:
        return end.code if isinstance(end.code, int) else int(end.code is not None)
    except (InputError, BasisNotAvailable) as error:
        _say(_input_error(error) if isinstance(error, InputError) else str(error))
        return 2
    except BrokenPipeError:
        # Whoever read our output has closed it: nothing is left to say, not even at exit.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
    except InspectorError as error:
        _say(str(error))
    except OSError as error:
        _say(f"{error.strerror or error}: {error.filename or 'no file name is known'}. Check the path and try again.")
    except Exception as error:  # noqa: BLE001 (the outermost edge: a fault of ours must not end in a traceback)
        _say(keep_fault(error))
    return 1


def _say(text: str) -> None:
    typer.echo(text, err=True)


def _input_error(error: InputError) -> str:
    """Every problem on a line of its own, under how many there are."""
    where = f"{error.source}: " if error.source else ""
    head = f"{where}{count(len(error.problems), 'problem')}; nothing was stored."
    return "\n".join([head, *(f"  {problem}" for problem in error.problems)])
