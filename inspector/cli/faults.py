"""A fault of the program's own: kept in a file for whoever mends it, said in a sentence to whoever met it."""

from __future__ import annotations

import tempfile
import traceback
from pathlib import Path

from inspector import PROGRAM, VERSION


def keep_fault(error: Exception) -> str:
    """Write down where the program went wrong.

    Returns
    -------
    What to tell the user.
    """
    text = "".join(traceback.format_exception(error))
    with tempfile.NamedTemporaryFile(
        "w", prefix="inspector-fault-", suffix=".txt", delete=False, encoding="utf-8"
    ) as stream:
        stream.write(f"{PROGRAM} {VERSION}\n{text}")
    return (
        f"The program met a fault of its own ({type(error).__name__}: {error}). What was stored stays stored. "
        f"Please send {Path(stream.name)} and the input to whoever looks after this program."
    )
