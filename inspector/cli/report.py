"""`inspector report SITE -o FILE.pdf`: the PDF rating summary."""

from __future__ import annotations

from pathlib import Path
from typing import Annotated

import typer

from inspector import desk
from inspector.cli import shown
from inspector.cli.arguments import SiteFile


def register(commands: typer.Typer) -> None:
    """Add the command."""
    commands.command()(report)


def report(
    site: SiteFile,
    output: Annotated[Path, typer.Option("--output", "-o", metavar="FILE.pdf", help="Where to write it.")],
) -> None:
    """Write the PDF rating summary for a licensed engineer to review."""
    rated = desk.rate(desk.check(Path(site)))
    with shown.console(error=True).status("Writing the rating summary ..."):
        output.write_bytes(desk.report(rated))
    typer.echo(f"Rating summary written to {output}. It is preliminary until a licensed engineer has signed it.")
