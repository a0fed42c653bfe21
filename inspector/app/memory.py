"""What the app knows when it opens again: the bridge, the bar, the view, how large the text is.

A small file beside the store, put into place whole. It holds nothing that counts: a spoilt one is a new one.
"""

from __future__ import annotations

import json
import os
from dataclasses import asdict, dataclass, fields
from pathlib import Path
from typing import Any, Final

FILE: Final = "field-app.json"


@dataclass(frozen=True, slots=True)
class Memory:
    """Where the inspector was, and how the screen is set. ``text_size`` is in per cent."""

    bridge: str | None = None
    truss: str | None = None
    bar: str | None = None
    view: str = "rating factor"
    theme: str = "field"
    text_size: int = 100


def recall(path: Path) -> Memory:
    """Read the file; what is not there, or is not of its kind, is as at the first start."""
    try:
        found: Any = json.loads(path.read_text(encoding="utf-8"))
    except (OSError, ValueError, RecursionError):
        return Memory()
    if not isinstance(found, dict):
        return Memory()
    kept: dict[str, Any] = {}
    for field in fields(Memory):
        value = found.get(field.name)
        wanted = int if field.name == "text_size" else str
        if isinstance(value, wanted) and not isinstance(value, bool):
            kept[field.name] = value
    return Memory(**kept)


def keep(path: Path, memory: Memory) -> None:
    """Write the file so that a crash leaves the old one or the new one.

    Raises
    ------
    OSError
        If it cannot be written.
    """
    draft = path.with_name(f"{path.name}.new")
    with draft.open("w", encoding="utf-8") as stream:
        json.dump(asdict(memory), stream)
        stream.flush()
        os.fsync(stream.fileno())
    draft.replace(path)
