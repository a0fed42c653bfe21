"""`inspector check SITE`: read a site file and say everything that is wrong with it."""

from __future__ import annotations

from pathlib import Path

import typer

from inspector import desk
from inspector.cli.arguments import SiteFile
from models.words import count


def register(commands: typer.Typer) -> None:
    """Add the command."""
    commands.command()(check)


def check(site: SiteFile) -> None:
    """Read a site file and name everything that is wrong with it, with its path."""
    found = desk.check(Path(site))
    bridge, visits = found.bridge, found.journal.visits
    bars = sum(len(truss.bars) for truss in bridge.trusses.values())
    entries = sum(len(visit.entries) for visit in visits)
    typer.echo(
        f"{bridge.name}: {count(len(bridge.trusses), 'truss', 'trusses')}, {count(bars, 'bar')}, "
        f"{count(len(visits), 'visit')}, {count(entries, 'entry', 'entries')}. The file can be read; that says nothing "
        "about the bridge."
    )
