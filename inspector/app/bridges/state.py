"""What the list of bridges shows."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class BridgeRow:
    """A bridge in the list; or an invented one that can be added, where ``sample`` names it.

    Parameters
    ----------
    figure : its lowest rating factor; what goes on where there is none yet.
    """

    key: str
    name: str
    about: str
    figure: str
    sample: bool = False


@dataclass(frozen=True, slots=True)
class BridgesState:
    """The whole screen. ``message`` says what is going on, or what went wrong."""

    rows: tuple[BridgeRow, ...] = ()
    samples: tuple[BridgeRow, ...] = ()
    message: str = ""
