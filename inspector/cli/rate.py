"""`inspector rate SITE`: solve the forces and print a rating factor for every bar and the structure."""

from __future__ import annotations

import sys
from pathlib import Path
from typing import Annotated

import typer

from inspector import desk
from inspector.cli.arguments import SiteFile


def register(commands: typer.Typer) -> None:
    """Add the command."""
    commands.command()(rate)


def rate(
    site: SiteFile,
    json: Annotated[
        str | None, typer.Option("--json", metavar="FILE", help="Write the result as JSON to a file, or to - for here.")
    ] = None,
) -> None:
    """Solve the forces and print a rating factor for every bar and for the structure."""
    rated = desk.rate(desk.check(Path(site)))
    if json == "-":
        sys.stdout.write(desk.result_text(rated) + "\n")
        return
    # The table alone needs it; a result for another program should not wait for it.
    from inspector.cli import shown  # noqa: PLC0415

    shown.rating_of(shown.console(), rated)
    if json is not None:
        Path(json).write_text(desk.result_text(rated) + "\n", encoding="utf-8")
        typer.echo(f"Result written to {json}.", err=True)
