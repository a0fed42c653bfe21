"""What reading and writing files must not drag in."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

HEAVY = ("kivy", "sqlalchemy", "reportlab", "alembic")


def test_exchange_is_light() -> None:
    """A fresh process that reads and writes files loads no screen, no database and no PDF library."""
    lines = [
        "import sys",
        "import inspector.exchange.site, inspector.exchange.result, inspector.exchange.schema",
        f"print(sorted(set({HEAVY!r}) & set(sys.modules)))",
    ]
    root = Path(__file__).parents[2]
    done = subprocess.run(
        [sys.executable, "-c", "\n".join(lines)], cwd=root, capture_output=True, text=True, check=True
    )
    assert done.stdout.strip() == "[]"
