"""An entry of a journal as people read it."""

from __future__ import annotations

from models.journal import CRACK_TAKEN_BACK, Entry, Reading
from models.words import percent, significant


def entry(said: Entry) -> str:
    """What an entry says, in the inspector's own figures."""
    parts = [said.seen or "", f"state {said.state}" if said.state else ""]
    parts += [_reading_as_typed(reading) for reading in said.readings or ()]
    if said.estimated_loss is not None:
        parts.append(
            f"estimated loss {percent(said.estimated_loss)}" + (f" over {said.extent.text}" if said.extent else "")
        )
    if said.bow is not None:
        parts.append(f"bow {said.bow.offset.text}")
    if said.crack is not None:
        parts.append("crack taken back" if said.crack == CRACK_TAKEN_BACK else "crack")
    flags = (("severed", said.severed), ("slack", said.slack))
    parts += [name if value else f"not {name}" for name, value in flags if value is not None]
    if said.replaced is not None:
        parts.append("replaced")
    if said.look_unchanged:
        parts.append("no change since the last visit")
    parts += ["prefers an entry" if said.chooses else "", "takes an entry back" if said.retracts else ""]
    parts += [f"reason: {said.reason}" if said.reason else "", f"note: {said.note}" if said.note else ""]
    return "; ".join(part for part in parts if part) or "nothing"


def _reading_as_typed(reading: Reading) -> str:
    thickness = " / ".join(one.text for one in reading.thickness)
    extent = f" over {reading.extent.text}" if reading.extent else ""
    return f"{reading.plate} {thickness} at {significant(reading.station, 2)}{extent}"
