"""What the report screen shows."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class ReportState:
    """The whole screen.

    Parameters
    ----------
    lines : what the report will say first.
    message : what is going on, where the report is, or what went wrong.
    ready : whether there is a report to open.
    """

    title: str = ""
    act_now: tuple[str, ...] = ()
    lines: tuple[str, ...] = ()
    message: str = ""
    busy: bool = False
    ready: bool = False
