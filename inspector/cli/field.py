"""`inspector app [SITE]`: the field app, for a tablet on the bridge or a desktop."""

from __future__ import annotations

from pathlib import Path
from typing import Annotated

import typer

from inspector import desk, device


def register(commands: typer.Typer) -> None:
    """Add the command."""
    commands.command("app")(field)


def field(
    site: Annotated[
        str | None,
        typer.Argument(metavar="SITE", help="A site file; it is saved into the store and opened.", show_default=False),
    ] = None,
    store: Annotated[
        Path | None, typer.Option(metavar="FILE", help="The store; else the one in the user's folder.")
    ] = None,
) -> None:
    """Open the field app: tap a bar, log what you see, and see the rating factors change."""
    # Only this command needs the app, and the store at the same time.
    from inspector.app import bootstrap, memory  # noqa: PLC0415
    from inspector.store import open_store  # noqa: PLC0415

    bootstrap.require_window()
    path = device.store_path(store).absolute()
    bridge = None
    if site is not None:
        found = desk.check(Path(site))
        with open_store(path) as opened:
            opened.save_bridge(found.bridge, found.journal)
        bridge = found.bridge.id
    bootstrap.start(path, path.parent / memory.FILE, device.device_id(path.parent), bridge)
