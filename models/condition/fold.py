"""The fold of what was recorded about a bar to its condition and its plates along the bar.

condition = fold_all(bridge, journal)
condition = fold_all(bridge, longer_journal, condition)    # only bars with something new are folded again
"""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass, replace
from typing import Literal

from models import words
from models.bridge import Bar, Footbridge, Truss
from models.condition.answers import answers, speaks_of_bar
from models.condition.as_built import Catalogue
from models.condition.measured import Place, measured
from models.condition.profile import Measurement, Profile
from models.condition.replacement import Present, present
from models.condition.thickness import thickness_along
from models.finding import Finding
from models.journal import Bow, Crack, Journal, Visit
from models.journal_order import NOTHING_RECORDED, BarRecord, standing
from models.words import condition as sentences


@dataclass(frozen=True, eq=False)
class BarCondition:
    """All that is known about one bar on the day of the last visit.

    Parameters
    ----------
    section, material : names, after any replacement.
    state : last state on record, ``good`` to ``severe``, or None; ``state_visit`` its visit's index.
    seen : whether any entry of the last visit counts as seen.
    strength : the profile that decides resistance: a reading without extent holds over one section
        depth to each side.
    stiff, soft : the profiles that decide flexibility: a reading without extent covers no length in
        ``stiff`` and the whole bar in ``soft``; the same object where there is no such reading.
    findings : with truss and bar filled in.
    readings : what was measured, for a table; replaced and doubtful ones too.
    """

    truss: str
    bar: str
    section: str
    material: str
    state: str | None
    state_visit: int
    seen: bool
    severed: bool
    slack: bool
    crack: Crack | None
    bow: Bow | None
    strength: Profile
    stiff: Profile
    soft: Profile
    has_reading: bool
    has_estimate: bool
    findings: tuple[Finding, ...] = ()
    readings: tuple[Measurement, ...] = ()

    @property
    def known(self) -> Literal["not seen", "partly measured", "estimated", "assumed"]:
        """How the bar is known as a whole; `rating` raises it to ``measured`` where that holds."""
        if not self.seen:
            return "not seen"
        if self.has_reading:
            return "partly measured"
        return "estimated" if self.has_estimate else "assumed"


@dataclass(frozen=True, eq=False)
class Condition:
    """All bars of a bridge on the day of the last visit.

    Parameters
    ----------
    bars : (truss, bar) -> its condition, trusses and bars in the order of the bridge.
    visits : in date order; the visit indices of a `BarCondition` count in it.
    findings : about the journal and the bridge as a whole; those of bars stand in `bars`.
    records : (truss, bar) -> what each condition was folded from.
    catalogue : sections as built, kept for the next fold.
    """

    bridge: Footbridge
    bars: Mapping[tuple[str, str], BarCondition]
    visits: tuple[Visit, ...]
    findings: tuple[Finding, ...]
    records: Mapping[tuple[str, str], BarRecord]
    catalogue: Catalogue

    @property
    def last_visit(self) -> Visit | None:
        """The visit that is rated; None where there is none."""
        return self.visits[-1] if self.visits else None

    @property
    def not_seen(self) -> int:
        """How many bars the last visit did not see."""
        return sum(not bar.seen for bar in self.bars.values())

    def of_truss(self, truss: str) -> tuple[BarCondition, ...]:
        """The bars of one truss in the order of the bridge."""
        return tuple(self.bars[truss, bar.id] for bar in self.bridge.trusses[truss].bars)


def fold_all(bridge: Footbridge, journal: Journal, previous: Condition | None = None) -> Condition:
    """Fold a whole journal.

    Parameters
    ----------
    previous : an earlier result for the same bridge; bars about which nothing changed are taken from it.

    Raises
    ------
    InputError
        If a section's dimensions do not fit together.
    """
    now = standing(journal)
    earlier = previous if previous is not None and previous.bridge is bridge else None
    catalogue = Catalogue(bridge) if earlier is None else earlier.catalogue
    same_visit = earlier is not None and _last_of(earlier.visits) == _last_of(now.visits)
    bars: dict[tuple[str, str], BarCondition] = {}
    for name, truss in bridge.trusses.items():
        for bar in truss.bars:
            place = name, bar.id
            record = now.records.get(place, NOTHING_RECORDED)
            if earlier is not None and same_visit and earlier.records.get(place, NOTHING_RECORDED) == record:
                bars[place] = earlier.bars[place]
            else:
                bars[place] = fold(truss, bar, bar_length(truss, bar), record, now.visits, catalogue)
    findings = list(now.findings)
    if not now.visits:
        findings.append(Finding("assumed", sentences.never_visited(catalogue.unseen_loss)))
    findings += [Finding("note", sentences.bar_not_there(*place)) for place in now.records if place not in bars]
    return Condition(bridge, bars, now.visits, tuple(findings), now.records, catalogue)


def _last_of(visits: Sequence[Visit]) -> tuple[int, str]:
    return len(visits), visits[-1].date if visits else ""


def bar_length(truss: Truss, bar: Bar) -> float:
    """Distance between a bar's joints, m."""
    (x0, y0), (x1, y1) = truss.joints[bar.start], truss.joints[bar.end]
    return math.hypot(x1.si - x0.si, y1.si - y0.si)


def fold(
    truss: Truss, bar: Bar, length: float, record: BarRecord, visits: Sequence[Visit], catalogue: Catalogue
) -> BarCondition:
    """Fold what stands about one bar to its condition on the day of the last visit.

    Parameters
    ----------
    length : of the bar, m.
    record : what stands about it in the journal.
    visits : the journal's, in date order.
    catalogue : the bridge's sections as built.

    Raises
    ------
    InputError
        If the section's dimensions do not fit together.
    """
    if not record.entries:
        return _never_recorded(truss, bar, visits, catalogue)
    today = present(bar, record, catalogue)
    bridge = catalogue.bridge
    figures = words.Figures(bridge.units or "SI")
    last = len(visits) - 1
    said = answers(today.entries, record.choices, last, length, figures)
    place = Place(length, today.built, bridge.instruments or {}, figures)
    found = measured(today.entries, record.choices, place)
    along = thickness_along(found, place)
    findings = [*today.findings, *said.findings, *found.findings]
    if not said.seen:
        along = along.at_most(today.built.unseen)
        findings.append(_not_seen(visits[-1].date, said.reason, _known_from(today), catalogue))
    return BarCondition(
        truss=truss.name,
        bar=bar.id,
        section=today.section,
        material=today.material,
        state=said.state,
        state_visit=said.state_visit,
        seen=said.seen,
        severed=said.severed,
        slack=said.slack,
        crack=said.crack,
        bow=said.bow,
        strength=along.strength,
        stiff=along.stiff,
        soft=along.soft,
        has_reading=any(spot.sound for spot in found.spots),
        has_estimate=any(estimate.loss is not None for estimate in found.estimates),
        findings=tuple(replace(finding, truss=truss.name, bar=bar.id) for finding in findings),
        readings=found.values(),
    )


def _never_recorded(truss: Truss, bar: Bar, visits: Sequence[Visit], catalogue: Catalogue) -> BarCondition:
    """A bar about which the journal says nothing; its profile is shared."""
    profile = catalogue.as_built(bar.section, bar.turned).unseen
    findings: tuple[Finding, ...] = ()
    if visits:
        finding = _not_seen(visits[-1].date, None, None, catalogue)
        findings = (replace(finding, truss=truss.name, bar=bar.id),)
    return BarCondition(
        truss=truss.name,
        bar=bar.id,
        section=bar.section,
        material=bar.material,
        state=None,
        state_visit=-1,
        seen=False,
        severed=False,
        slack=False,
        crack=None,
        bow=None,
        strength=profile,
        stiff=profile,
        soft=profile,
        has_reading=False,
        has_estimate=False,
        findings=findings,
    )


def _not_seen(date: str, reason: str | None, known_from: str | None, catalogue: Catalogue) -> Finding:
    return Finding("assumed", sentences.not_seen(date, reason, known_from, catalogue.unseen_loss))


def _known_from(today: Present) -> str | None:
    """Date of the last entry that says anything about the bar; None where it is taken as built."""
    return next((one.date for one in reversed(today.entries) if speaks_of_bar(one.entry)), None)
