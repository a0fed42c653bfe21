"""Arguments that several commands share."""

from __future__ import annotations

from typing import Annotated

import typer

SiteFile = Annotated[str, typer.Argument(metavar="SITE", help="A site file (truss-footbridge/1).", show_default=False)]
