"""What was said about a bar as a whole: replaced, seen, state, severed, slack, crack, bow.

The last answer counts. Where two devices answered in one visit, the worse one counts until an entry
chooses; doubt never raises a rating.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Callable, Iterable, Sequence
from dataclasses import dataclass
from typing import Final, Generic, Literal, Protocol, TypeVar

from models import words
from models.finding import Finding
from models.journal import Bow, Crack, Entry
from models.journal_order import Choice, Placed, precedes
from models.words import condition as sentences

STATES: Final = ("good", "fair", "poor", "severe")
"""From the best to the worst."""

Cracked = Crack | Literal["no crack"]

Answered = TypeVar("Answered")


class Statement(Protocol):
    """One thing that an entry says."""

    @property
    def placed(self) -> Placed:
        """The entry that says it."""
        ...


Said = TypeVar("Said", bound=Statement)


@dataclass(frozen=True, slots=True)
class Answer(Generic[Answered]):
    """The answer of one entry to one question."""

    placed: Placed
    value: Answered


def without_rivals(said: Sequence[Said], choices: Sequence[Choice], same: Callable[[Said, Said], bool]) -> list[Said]:
    """What is left when each chosen entry has put out its rivals.

    Parameters
    ----------
    same : whether a first (chosen) statement is about the same thing as a second one.
    """
    if not choices:
        return list(said)
    choosing: dict[str, list[Placed]] = defaultdict(list)
    for choice in choices:
        choosing[choice.chosen].append(choice.by)
    return [
        rival
        for rival in said
        if not any(
            are_rivals(one.placed, rival.placed)
            and _preferred(choosing[one.placed.entry.id], choosing[rival.placed.entry.id])
            and same(one, rival)
            for one in said
        )
    ]


def are_rivals(one: Placed, other: Placed) -> bool:
    """Whether two entries were written by two devices in one visit."""
    return one.visit == other.visit and one.entry.device != other.entry.device


def _preferred(choosing_one: Iterable[Placed], choosing_rival: Sequence[Placed]) -> bool:
    """Whether the choice of the one replaces every choice of its rival."""
    return any(all(precedes(other, mine) for other in choosing_rival) for mine in choosing_one)


@dataclass(frozen=True, slots=True)
class Answers:
    """What is known about a bar as a whole; fields as in `models.condition.BarCondition`.

    Parameters
    ----------
    reason : why the bar was not seen in the last visit, where somebody said so.
    """

    state: str | None
    state_visit: int
    seen: bool
    reason: str | None
    severed: bool
    slack: bool
    crack: Crack | None
    bow: Bow | None
    findings: tuple[Finding, ...]


def answers(
    entries: Sequence[Placed], choices: Sequence[Choice], last_visit: int, length: float, figures: words.Figures
) -> Answers:
    """Read the answers out of the entries of one bar.

    Parameters
    ----------
    entries : those that count, in order.
    last_visit : index of the journal's last visit.
    length : of the bar, m.
    """
    found = _Reader(entries, choices, figures, [])
    state = found.worst("the state", lambda entry: entry.state, _state_rank, str)
    severed = found.worst("whether it is severed", lambda entry: entry.severed, bool, _yes_or_no)
    slack = found.worst("whether it is slack", lambda entry: entry.slack, bool, _yes_or_no)
    crack: Answer[Cracked] | None = found.worst("a crack", _crack, _crack_rank, found.crack_in_words)
    bow = found.bow(length)
    seen, reason = _seen(entries, last_visit)
    return Answers(
        state=None if state is None else state.value,
        state_visit=-1 if state is None else state.placed.visit,
        seen=seen,
        reason=reason,
        severed=severed is not None and severed.value,
        slack=slack is not None and slack.value,
        crack=crack.value if crack is not None and isinstance(crack.value, Crack) else None,
        bow=bow,
        findings=tuple(found.findings),
    )


@dataclass(frozen=True, slots=True)
class _Reader:
    entries: Sequence[Placed]
    choices: Sequence[Choice]
    figures: words.Figures
    findings: list[Finding]

    def last(
        self, ask: Callable[[Entry], Answered | None], same: Callable[[Answered, Answered], bool] = lambda _a, _b: True
    ) -> list[Answer[Answered]]:
        """The answers that no later one replaces, rivals of a chosen one put out."""
        given = [Answer(placed, value) for placed in self.entries if (value := ask(placed.entry)) is not None]
        left = without_rivals(given, self.choices, lambda one, other: same(one.value, other.value))
        return [
            one
            for one in left
            if not any(precedes(one.placed, later.placed) and same(one.value, later.value) for later in left)
        ]

    def worst(
        self,
        about: str,
        ask: Callable[[Entry], Answered | None],
        rank: Callable[[Answered], float],
        shown: Callable[[Answered], str],
    ) -> Answer[Answered] | None:
        """The worst of the last answers; a finding where they differ."""
        left = self.last(ask)
        self.disagreement(about, [(one.placed.date, shown(one.value)) for one in left])
        return max(left, key=lambda one: rank(one.value), default=None)

    def disagreement(self, about: str, given: Sequence[tuple[str, str]]) -> None:
        """Note that answers of one visit differ, if they do."""
        different = list(dict.fromkeys(text for _, text in given))
        if len(different) > 1:
            self.findings.append(Finding("doubtful", sentences.two_answers(about, different, given[0][0])))

    def crack_in_words(self, crack: Cracked) -> str:
        """A crack, by its length where that was recorded."""
        if not isinstance(crack, Crack):
            return crack
        return "a crack" if crack.length is None else f"a crack of {self.figures.text(crack.length.si, 'size')}"

    def bow(self, length: float) -> Bow | None:
        """The largest of the last bows in any direction; None where it was put right."""
        left = self.last(lambda entry: entry.bow, _same_direction)
        for one in left:
            rivals = [other for other in left if other is one or _rival_bows(one, other)]
            if rivals[0] is one:
                self.disagreement("the bow", [(each.placed.date, self._offset(each.value)) for each in rivals])
        largest = max(left, key=lambda one: abs(one.value.offset.si), default=None)
        if largest is None or largest.value.offset.si == 0:
            return None
        bow = largest.value
        offset = abs(bow.offset.si)
        if any(one.value.offset.si and not _same_direction(one.value, bow) for one in left):
            self.findings.append(Finding("doubtful", sentences.bow_both_ways(self.figures, offset)))
        over = bow.over.si if bow.over is not None and bow.over.si > 0 else length
        if offset > over / 50:
            self.findings.append(Finding("doubtful", sentences.bow_very_large(self.figures, offset, over)))
        return bow

    def _offset(self, bow: Bow) -> str:
        return self.figures.text(abs(bow.offset.si), "size")


def _same_direction(one: Bow, other: Bow) -> bool:
    return one.direction is None or other.direction is None or one.direction == other.direction


def _rival_bows(one: Answer[Bow], other: Answer[Bow]) -> bool:
    return are_rivals(one.placed, other.placed) and _same_direction(one.value, other.value)


def _state_rank(state: str) -> int:
    return STATES.index(state)


def _crack(entry: Entry) -> Cracked | None:
    return entry.crack


def _crack_rank(crack: Cracked) -> float:
    if not isinstance(crack, Crack):
        return -1.0
    return 0.0 if crack.length is None else max(crack.length.si, 0.0)


def _yes_or_no(value: bool) -> str:
    return "yes" if value else "no"


def _seen(entries: Iterable[Placed], last_visit: int) -> tuple[bool, str | None]:
    """Whether anything in the last visit counts as having seen the bar; else the last reason why not."""
    now = [placed.entry for placed in entries if placed.visit == last_visit]
    said = {entry.device: entry for entry in now if entry.seen is not None}
    for entry in now:
        if entry.seen == "not seen":
            continue
        # A look that the same device took back by a later "not seen" is no look.
        answered = entry.seen is not None and said[entry.device].seen != "not seen"
        if answered or speaks_of_bar(entry):
            return True, None
    reasons = [entry.reason for entry in now if entry.seen == "not seen" and entry.reason]
    return False, reasons[-1] if reasons else None


def speaks_of_bar(entry: Entry) -> bool:
    """Whether an entry says more about its bar than that somebody looked, or could not."""
    found = (
        entry.state, entry.readings, entry.estimated_loss, entry.bow, entry.crack, entry.severed, entry.slack,
        entry.replaced, entry.look_unchanged,
    )  # fmt: skip
    if any(one is not None for one in found):
        return True
    # A remark on a choice or a retraction is about the entry that it names.
    remark = entry.note is not None or entry.photos is not None
    return entry.seen is None and entry.chooses is None and entry.retracts is None and remark
