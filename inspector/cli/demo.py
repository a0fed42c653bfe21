"""`inspector demo`: the whole job on a sample, from an empty store to the PDF."""

from __future__ import annotations

from dataclasses import replace
from pathlib import Path
from typing import Annotated

import typer
from rich.box import SIMPLE_HEAD
from rich.table import Table
from rich.text import Text

from inspector import desk, samples
from inspector.cli import shown
from inspector.desk import Rated
from inspector.exchange.site import Site
from models import words
from models.journal import Entry, Journal
from models.journal_order import by_date, ordered
from models.rating import bar_of
from models.words import entries

_STORE = "demo.sqlite"


def register(commands: typer.Typer) -> None:
    """Add the command."""
    commands.command()(demo)


def demo(
    sample: Annotated[str, typer.Option(help="Which invented footbridge.")] = "pratt-half-through",
    folder: Annotated[Path, typer.Option(help="Where the store, the result and the report go.")] = Path("demo-output"),
) -> None:
    """Go through the whole job on an invented footbridge.

    The bridge goes into a store of its own, the last visit is logged entry by entry with the rating factors before
    and after, and the table, the result file and the PDF rating summary come out.
    """
    found = samples.sample(sample)
    folder.mkdir(parents=True, exist_ok=True)
    out = shown.console()
    out.print(Text(words.CAUTION, style="bold"))
    out.print()
    if found.bridge.notes:
        out.print(Text(found.bridge.notes))
        out.print()
    with shown.console(error=True).status("Logging the last visit, rating after every entry ..."):
        table, rated = _log_last_visit(found, folder / _STORE)
    out.print(table)
    shown.rating_of(out, rated)
    result, report = folder / f"{sample}-rating.json", folder / f"{sample}-rating.pdf"
    result.write_text(desk.result_text(rated) + "\n", encoding="utf-8")
    with shown.console(error=True).status("Writing the rating summary ..."):
        report.write_bytes(desk.report(rated))
    out.print()
    for what, path in (("Store", folder / _STORE), ("Result", result), ("Report", report)):
        out.print(f"{what + ':':8}{path}", soft_wrap=True)


def _log_last_visit(found: Site, path: Path) -> tuple[Table, Rated]:
    """Save the bridge as it was before its last visit, then log that visit.

    Returns
    -------
    A line an entry with the figures before and after it, and the rating after the last one.
    """
    # The store is imported by those commands alone that need it.
    from inspector.store import open_store  # noqa: PLC0415

    for old in path.parent.glob(f"{path.name}*"):
        old.unlink()
    visits = by_date(found.journal.visits)
    entries = [entry for _, visit, entry in ordered(found.journal) if visit.id == visits[-1].id]
    table = _entries_table(f"The visit of {visits[-1].date}, entry by entry")
    with open_store(path) as store:
        store.save_bridge(found.bridge, Journal(visits[:-1]))
        bridge, journal = store.load(found.bridge.id)
        before = desk.rate(Site(bridge, journal))
        store.open_visit(bridge.id, replace(visits[-1], entries=()))
        for entry in entries:
            stored = store.append(bridge.id, visits[-1].id, entry)
            after = desk.rate(Site(bridge, store.journal(bridge.id)), before)
            table.add_row(*_entry_cells(stored, before, after))
            before = after
    return table, before


def _entries_table(title: str) -> Table:
    table = Table(title=title, title_justify="left", box=SIMPLE_HEAD, padding=(0, 1), pad_edge=False)
    table.add_column("stored", justify="right")
    table.add_column("bar", overflow="fold")
    table.add_column("what", overflow="fold", max_width=44)
    table.add_column("bar's factor", justify="right")
    table.add_column("lowest factor", justify="right")
    return table


def _entry_cells(entry: Entry, before: Rated, after: Rated) -> list[Text]:
    level = after.rating.upper_level
    bars = (bar_of(rated.rating, entry.truss, entry.bar).rating_factor[level] for rated in (before, after))
    lowest = (rated.rating.structure.rating_factor[level] for rated in (before, after))
    cells = [str(entry.sequence), f"{entry.truss}/{entry.bar}", entries.entry(entry), _change(*bars), _change(*lowest)]
    return [Text(cell) for cell in cells]


def _change(before: float | None, after: float | None) -> str:
    then, now = (words.factor(value) if value is not None else "none" for value in (before, after))
    return then if then == now else f"{then} > {now}"
