"""What stands at the top of a bridge: its lowest rating factor, what to act on, and what to know about the day."""

from __future__ import annotations

from typing import Final

from inspector.app.bridge.sheet import governs_text
from inspector.app.shelf import Today
from inspector.desk import Rated
from models import words
from models.rating.result import Rating

_SHOWN_FINDINGS: Final = 2


def structure_text(rating: Rating) -> str:
    """The structure's lowest rating factor with what governs."""
    found = rating.structure
    level = rating.upper_level
    value = found.rating_factor[level]
    if found.bar is None:
        return "0: a truss does not stand" if value == 0 else "no rating factor"
    below = " below 1" if value is not None and value < 1 else ""
    return f"{words.factor(value)}{below} ({found.truss} {found.bar}, {governs_text(found.check, found.load)})"


def act_now_lines(rated: Rated) -> tuple[str, ...]:
    """What to do and why, where a finding calls for it; empty where none does."""
    found = [one.text for one in rated.rating.findings if one.level == "act now"]
    if not found:
        return ()
    owner = rated.bridge.owner
    calls = [" ".join(filter(None, (one.who, one.phone))) for one in (owner.call or () if owner else ())]
    numbers = [f"Call: {words.listed(calls)}."] if calls else []
    more = [f"{len(found) - _SHOWN_FINDINGS} more are in the report."] if len(found) > _SHOWN_FINDINGS else []
    return (" ".join(words.ACT_NOW_STEPS), *numbers, " ".join([*found[:_SHOWN_FINDINGS], *more]))


def remark_on(day: Today) -> str:
    """What to know about the visit's date; empty where there is nothing."""
    if not day.shifted:
        return ""
    return (
        f"This tablet's date lies before the last visit on record. Entries are dated {day.dated}, so that they count "
        "last: put the tablet's date right."
    )
