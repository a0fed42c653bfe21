"""`inspector explain SITE TRUSS/BAR`: the hand check of one bar."""

from __future__ import annotations

from pathlib import Path
from typing import Annotated

import typer
from rich.text import Text

from inspector import desk
from inspector.cli import shown
from inspector.cli.arguments import SiteFile
from models.rating import bar_of


def register(commands: typer.Typer) -> None:
    """Add the command."""
    commands.command()(explain)


def explain(
    site: SiteFile,
    place: Annotated[str, typer.Argument(metavar="TRUSS/BAR", help="The bar, with its truss.", show_default=False)],
) -> None:
    """Print the hand check of one bar: each formula with its numbers, units and clause."""
    found = desk.check(Path(site))
    truss, bar = desk.find_bar(found.bridge, place)
    rated = desk.rate(found)
    out = shown.console()
    shown.hand_check_of(out, rated, rated.hand_check(truss, bar))
    row = bar_of(rated.rating, truss, bar)
    if row.findings:
        out.print()
    for finding in row.findings:
        out.print(Text(f"{finding.level}: {finding.text}"))
