"""Everything that touches the world: files, the store, the command line, the report, the screen."""

from __future__ import annotations

from typing import Final

PROGRAM: Final = "truss footbridge inspector"
VERSION: Final = "0.1.0"
