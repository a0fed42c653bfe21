"""What was recorded: every visit, every reading with its place and circumstances, every other entry."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import replace

from reportlab.platypus import Flowable

from inspector.report.findings import Told, marks_by_bar
from inspector.report.style import BODY, NOTE, caption, heading, part, table, text
from models import words
from models.journal import Bow, Crack, Entry, Journal, Reading, Visit
from models.journal_order import by_date, standing
from models.words import Figures

Marks = Mapping[str, str]
"""Entry id -> what has to be said beside it."""


def readings(journal: Journal, findings: Sequence[Told], figures: Figures, width: float) -> list[Flowable]:
    """All visits, the oldest first."""
    story = part("What was recorded")
    if not journal.visits:
        return [*story, text("No visit is on record: every bar is rated as on the drawings.", BODY)]
    marks = _marks(journal, findings)
    for visit in by_date(journal.visits):
        story += heading(f"Visit of {visit.date}", 80)
        story.append(text(_about(visit), BODY))
        story += _readings(visit, marks, figures, width)
        story += _looks(visit, marks, width)
        story += _entries(visit, marks, width)
        story += _calls(visit, width)
    story.append(text(_NOTES, NOTE))
    return story


_NOTES = (
    "A reading is what was left, never what was lost. Stations run from 0 at the bar's start to 1 at its end. Marks: "
    "retracted, taken back by a later entry and not used; doubt with the numbers of findings, something recorded about "
    "this bar is doubtful, is kept, and raises no rating factor."
)


def _about(visit: Visit) -> str:
    said = [
        f"Inspector: {visit.inspector or 'not recorded'}",
        f"weather: {visit.weather or 'not recorded'}",
        words.count(len(visit.entries), "entry", "entries"),
    ]
    return "; ".join(said) + "."


def _marks(journal: Journal, findings: Sequence[Told]) -> Marks:
    doubts = marks_by_bar(findings, "doubtful")
    stands = {placed.entry.id for record in standing(journal).records.values() for placed in record.entries}
    marks = {}
    for visit in journal.visits:
        for entry in visit.entries:
            doubted = doubts.get((entry.truss, entry.bar))
            said = f"doubt {doubted}" if doubted and not _only_looked(entry) else ""
            marks[entry.id] = said if entry.id in stands else "retracted"
    return marks


def _readings(visit: Visit, marks: Marks, figures: Figures, width: float) -> list[Flowable]:
    unit = figures.unit("size")
    head = ("truss", "bar", "station", "plate", "face", "values as read", f"mean {unit}", f"least {unit}", "extent",
            "instrument", "cleaned", "who", "when", "mark")  # fmt: skip
    rows = [
        (
            entry.truss, entry.bar, f"{reading.station:.3g}", reading.plate, reading.face or "not recorded",
            "; ".join(value.text for value in reading.thickness), *_mean_and_least(reading, figures),
            reading.extent.text if reading.extent else "not recorded", reading.instrument or "not recorded",
            _cleaned(reading), visit.inspector or "not recorded", entry.at or visit.date,
            marks[entry.id],
        )
        for entry in visit.entries
        for reading in entry.readings or ()
    ]  # fmt: skip
    if not rows:
        return [text("No thickness was measured.", BODY)]
    shares = (4, 4, 2.8, 5, 4.6, 6.5, 3, 3, 4, 5, 4, 5, 6, 4)
    return [table(head, rows, shares, width, "llrlllrr")]


def _mean_and_least(reading: Reading, figures: Figures) -> tuple[str, str]:
    values = [value.si for value in reading.thickness]
    if not values:
        return "none", "none"
    return figures.number(sum(values) / len(values), "size"), figures.number(min(values), "size")


def _cleaned(reading: Reading) -> str:
    return {True: "yes", False: "no", None: "not recorded"}[reading.cleaned]


def _only_looked(entry: Entry) -> bool:
    """Whether an entry says nothing but how the bar was seen, and in which state."""
    plain = replace(entry, seen=None, state=None, look_unchanged=None)
    return not (_facts(plain) or plain.readings or plain.reason or plain.note or plain.photos)


def _looks(visit: Visit, marks: Marks, width: float) -> list[Flowable]:
    """Bars that were only looked at, together where they were found alike."""
    alike: dict[tuple[str, str, str, str], dict[str, None]] = {}
    for entry in visit.entries:
        if _only_looked(entry):
            change = "no change since the visit before" if entry.look_unchanged else ""
            key = (entry.truss, entry.seen or "", entry.state or "", "; ".join(filter(None, (change, marks[entry.id]))))
            alike.setdefault(key, {})[entry.bar] = None
    if not alike:
        return []
    rows = [(truss, seen, state, change, ", ".join(bars)) for (truss, seen, state, change), bars in alike.items()]
    head = ("truss", "seen", "state", "remark", "bars")
    return [*caption("Bars looked at"), table(head, rows, (4, 4, 2.5, 6, 30), width)]


def _entries(visit: Visit, marks: Marks, width: float) -> list[Flowable]:
    """Everything else but thickness."""
    head = ("truss", "bar", "seen", "state", "recorded", "note", "photographs", "when", "mark")
    rows = [
        (
            entry.truss, entry.bar, _seen(entry), entry.state or "", "; ".join(_facts(entry)), entry.note or "",
            ", ".join(photo.file for photo in entry.photos or ()), entry.at or visit.date, marks[entry.id],
        )
        for entry in visit.entries
        if not _only_looked(entry) and not _only_read(entry)
    ]  # fmt: skip
    if not rows:
        return []
    return [*caption("Other entries"), table(head, rows, (4, 4, 6, 2.6, 8, 8, 5, 6, 3.4), width)]


def _only_read(entry: Entry) -> bool:
    """Whether an entry holds readings alone."""
    return bool(entry.readings) and _only_looked(replace(entry, readings=None)) and not (entry.seen or entry.state)


def _seen(entry: Entry) -> str:
    if entry.seen is None:
        return ""
    return f"{entry.seen}: {entry.reason}" if entry.reason else entry.seen


def _facts(entry: Entry) -> Sequence[str]:
    """What an entry says beside its readings, in words."""
    found = []
    if entry.estimated_loss is not None:
        found.append("estimated loss " + words.percent(entry.estimated_loss) + _over(entry))
    if entry.bow:
        found.append(_bow(entry.bow))
    if entry.crack:
        found.append(_crack(entry.crack))
    if entry.severed is not None:
        found.append("severed" if entry.severed else "severed bar put right")
    if entry.slack is not None:
        found.append("slack" if entry.slack else "slack bar put right")
    if entry.replaced:
        new = [name for name in (entry.replaced.section, entry.replaced.material) if name]
        found.append("replaced" + (" by " + ", ".join(new) if new else ""))
    if entry.look_unchanged:
        found.append("no change since the visit before")
    if entry.chooses:
        found.append(f"prefers entry {entry.chooses}")
    if entry.retracts:
        found.append(f"takes back entry {entry.retracts}")
    return found


def _over(entry: Entry) -> str:
    if not entry.extent:
        return " over the whole bar"
    return f" over {entry.extent.text} at station {entry.station if entry.station is not None else 0.5:.3g}"


def _bow(bow: Bow) -> str:
    over = f" over {bow.over.text}" if bow.over else ""
    way = f", {bow.direction}" if bow.direction else ""
    return f"bow {bow.offset.text}{over}{way}"


def _crack(crack: Crack | str) -> str:
    if isinstance(crack, str):
        return "crack taken back"
    said = [crack.length.text if crack.length else "", crack.note or ""]
    return "crack " + ", ".join(part for part in said if part)


def _calls(visit: Visit, width: float) -> list[Flowable]:
    if not visit.calls:
        return []
    rows = [(call.who or "", call.when or "", call.said or "", call.left or "") for call in visit.calls]
    return [*caption("Who was told"), table(("who", "when", "said", "left"), rows, (4, 3, 8, 4), width)]
