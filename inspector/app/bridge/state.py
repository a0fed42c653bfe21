"""What the bridge screen shows, ready to be shown: texts, choices, pictures."""

from __future__ import annotations

from dataclasses import dataclass

from models.picture import Picture

OTHER = "truss "
"""Stands before a truss's name where it is the key of a choice beside others."""


@dataclass(frozen=True, slots=True)
class Choice:
    """One button of a group."""

    key: str
    text: str
    chosen: bool = False
    enabled: bool = True


@dataclass(frozen=True, slots=True)
class PlateRow:
    """A plate that can be tapped: its name, its number on the drawing of the section, what is known of it."""

    name: str
    number: int
    known: str
    thinned: bool


@dataclass(frozen=True, slots=True)
class Sheet:
    """One bar.

    Parameters
    ----------
    figure : its rating factor, before and after the last entry where that changed it.
    changed : whether the last entry changed it.
    governs : what governs it.
    ..._before : what earlier visits recorded, with the date.
    unchanged : None where there is no earlier visit to compare with.
    loss : of this visit, in per cent; None where nothing was estimated.
    notes : this visit's entries; ``earlier`` those of visits before, newest first.
    doubts : findings about the bar that somebody on the bridge can act on.
    """

    title: str
    about: str
    figure: str
    changed: bool
    governs: str
    seen: tuple[Choice, ...]
    seen_before: str
    states: tuple[Choice, ...]
    state_before: str
    unchanged: Choice | None
    severed: bool
    severed_before: str
    loss: int | None
    loss_before: str
    section: Picture
    plates: tuple[PlateRow, ...]
    notes: tuple[str, ...]
    earlier: tuple[str, ...]
    doubts: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class Walk:
    """Where the inspector is along the bars.

    Parameters
    ----------
    text : which bar of how many, and how many are done.
    done : a flag a bar, in walking order; ``here`` the place of the chosen one.
    """

    text: str = ""
    done: tuple[bool, ...] = ()
    here: int = 0


@dataclass(frozen=True, slots=True)
class BridgeState:
    """The whole screen.

    Parameters
    ----------
    structure : the lowest rating factor of the structure with what governs.
    act_now : what calls for somebody to act now; empty where nothing does.
    picture : the chosen truss in the chosen view; None until it is drawn.
    stored : what became of the last entry.
    trouble : whether ``stored`` says that something was not stored.
    remark : what to know about this visit's date.
    """

    title: str = ""
    structure: str = ""
    structure_changed: bool = False
    act_now: tuple[str, ...] = ()
    other_trusses: tuple[Choice, ...] = ()
    views: tuple[Choice, ...] = ()
    truss: str = ""
    bar: str = ""
    picture: Picture | None = None
    sheet: Sheet | None = None
    walk: Walk = Walk()
    stored: str = ""
    trouble: bool = False
    can_undo: bool = False
    remark: str = ""
