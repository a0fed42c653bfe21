"""From a rating to the sheet of one bar: what is known, what was recorded, now and before."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Sequence
from typing import Final, TypeVar

from inspector.app.bridge.state import Choice, PlateRow, Sheet
from inspector.desk import Rated
from models import words
from models.condition import BarCondition
from models.condition.answers import STATES
from models.finding import Finding
from models.journal import Entry
from models.journal_order import NOTHING_RECORDED, Placed
from models.picture.section import section_picture
from models.picture.views import GONE
from models.rating import bar_of
from models.rating.result import BarRating
from models.section import Built, built
from models.words import Figures, entries

HANDS_ON: Final = "hands on"
AT_A_DISTANCE: Final = "at a distance"
NOT_SEEN: Final = "not seen"
SEEN: Final = (HANDS_ON, AT_A_DISTANCE, NOT_SEEN)

REASONS: Final = ("under water", "covered by debris", "behind cladding", "out of reach", "not looked for")
"""Why a bar was not seen, a tap each; any other reason can be written."""

_ASKING: Final = ("act now", "doubtful")
_THINNER: Final = 0.999
"""A plate with less than this part of its thickness as built is shaded as thinned."""

Value = TypeVar("Value")


def sheet_of(rated: Rated, place: tuple[str, str], visit_id: str | None, before: Rated | None) -> Sheet:
    """The sheet of one bar.

    Parameters
    ----------
    visit_id : the visit of today; None until its first entry.
    before : the rating before the last entry, where that entry is about this bar.
    """
    condition = rated.condition.bars[place]
    bar = bar_of(rated.rating, *place)
    said = _Said(rated, place, visit_id)
    seen, loss = said.now(lambda entry: entry.seen), said.now(lambda entry: entry.estimated_loss)
    state = said.now(lambda entry: entry.state)
    cut = built(rated.bridge.sections[condition.section], rated.bridge.trusses[place[0]].bar[place[1]].turned or 0)
    rows = _plates(condition, cut, rated)
    figure = factor_text(bar, rated.rating.upper_level)
    then = None if before is None else factor_text(bar_of(before.rating, *place), before.rating.upper_level)
    changed = then is not None and then != figure
    return Sheet(
        title=place[1],
        about=_about(bar, place, rated),
        figure=f"{then} → {figure}" if changed else figure,
        changed=changed,
        governs=governs_text(bar.check, bar.load),
        seen=tuple(Choice(one, one.capitalize(), chosen=one == seen) for one in SEEN),
        seen_before=said.before(lambda entry: entry.seen, str),
        states=tuple(Choice(one, one.capitalize(), chosen=one == state) for one in STATES),
        state_before=said.before(lambda entry: entry.state, str),
        unchanged=_unchanged(said, seen),
        severed=condition.severed,
        severed_before=said.before(lambda entry: entry.severed, lambda value: "severed" if value else "not severed"),
        loss=None if loss is None else round(100 * loss),
        loss_before=said.before(lambda entry: entry.estimated_loss, words.percent),
        section=section_picture(cut, [row.name for row in rows if row.thinned]),
        plates=rows,
        notes=tuple(entries.entry(placed.entry) for placed in said.today),
        earlier=tuple(f"{placed.date}: {entries.entry(placed.entry)}" for placed in reversed(said.earlier)),
        doubts=tuple(dict.fromkeys(one.text for one in _about_bar(rated, place) if one.level in _ASKING)),
    )


def _about_bar(rated: Rated, place: tuple[str, str]) -> Iterable[Finding]:
    return (finding for finding in rated.rating.findings if (finding.truss, finding.bar) == place)


def factor_text(bar: BarRating, level: str) -> str:
    """A bar's rating factor as people read it; whether it is below 1 is said in words."""
    if bar.check in GONE:
        return str(bar.check)
    value = bar.rating_factor.get(level)
    if value is None:
        return "no rating factor"
    return words.factor(value) + (" below 1" if value < 1 else "")


def governs_text(check: str | None, load: str | None) -> str:
    """What governs, in a line."""
    if check is None:
        return "nothing governs"
    if check in GONE:
        return "no credit is given to it"
    return f"{check}, {load or 'dead load alone'}"


def _about(bar: BarRating, place: tuple[str, str], rated: Rated) -> str:
    figures = Figures(rated.bridge.units or "SI")
    return f"{bar.role}, truss {place[0]}, {figures.text(bar.length, 'length')}, section {bar.section}, {bar.known}"


def _unchanged(said: _Said, seen: str | None) -> Choice | None:
    if not said.earlier:
        return None
    date = said.earlier[-1].date
    looked = seen in (HANDS_ON, AT_A_DISTANCE)
    chosen = said.now(lambda entry: entry.look_unchanged) is True
    return Choice("unchanged", f"No change since {date}", chosen=chosen, enabled=looked)


def _plates(condition: BarCondition, cut: Built, rated: Rated) -> tuple[PlateRow, ...]:
    figures = Figures(rated.bridge.units or "SI")
    least = condition.strength.thickness.min(axis=0)
    last = {one.plate: one for one in condition.readings if not one.replaced}
    rows = []
    for number, (name, nominal, left) in enumerate(zip(cut.plates, cut.thickness, least, strict=True), 1):
        known = f"{figures.number(float(nominal), 'size')} as built"
        if left < nominal * _THINNER:
            known += f", least {figures.number(float(left), 'size')}"
        read = last.get(name)
        if read is not None:
            known += f"; read {figures.number(read.mean, 'size')} on {read.date}"
        rows.append(PlateRow(name, number, f"{known} ({figures.unit('size')})", bool(left < nominal * _THINNER)))
    return tuple(rows)


class _Said:
    """What stands about one bar: entries of today's visit, and of those before."""

    def __init__(self, rated: Rated, place: tuple[str, str], visit_id: str | None) -> None:
        record = rated.condition.records.get(place, NOTHING_RECORDED)
        visits = rated.condition.visits
        index = next((number for number, visit in enumerate(visits) if visit.id == visit_id), len(visits))
        self.today: Sequence[Placed] = [one for one in record.entries if one.visit == index and _says(one.entry)]
        self.earlier: Sequence[Placed] = [one for one in record.entries if one.visit < index and _says(one.entry)]

    def now(self, ask: Callable[[Entry], Value | None]) -> Value | None:
        """The last answer of today's visit."""
        return _last(self.today, ask)[0]

    def before(self, ask: Callable[[Entry], Value | None], shown: Callable[[Value], str]) -> str:
        """The last answer of the visits before, with its date; empty where there is none."""
        value, date = _last(self.earlier, ask)
        return "" if value is None else f"{date}: {shown(value)}"


def _says(entry: Entry) -> bool:
    return entry.retracts is None and entry.chooses is None


def _last(entries: Sequence[Placed], ask: Callable[[Entry], Value | None]) -> tuple[Value | None, str]:
    for one in reversed(entries):
        value = ask(one.entry)
        if value is not None:
            return value, one.date
    return None, ""
