"""The worst that a live load does to bars of a truss some of whose bars go slack.

Inside one slack set forces are linear, so the worst arrangement is that of the set's own influence line. It counts
where the set is right under it. Where it is not, fewer loads leave the set right: the worst among them is at most

    max over arrangements of (force + sum y_k h_k),  y_k >= 0,

with h_k >= 0 what says that the set is right (the force of a taut bar, the gap of a slack one). For any y that is an
upper bound of the force, and again an influence line; the y that make it least are looked for, one at a time, and the
bound is then the force itself where some mixture of arrangements brings it about (Lagrange multipliers). So a figure
never rests on a set that is wrong, and never on a force that is too small for the sets that were met.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

import numpy as np
from numpy.typing import NDArray

from models.calculation import Array
from models.loading.arrangement import worst_arrangement
from models.loading.live import Pattern
from models.rating.slack_family import Family, Lines
from models.rating.slack_items import Items, Question, best_known, is_right, lies_below
from models.rating.slack_refine import refine

_SIGNS: Final = np.array([1.0, -1.0])
_MOST_CLOSINGS: Final = 6


@dataclass(frozen=True, eq=False)
class Worst:
    """What was found for each direction and bar, (2, m) each.

    Parameters
    ----------
    merit : as `Question.merit`. at_set : number of the set in the family. case : which dead load.
    dead, live : the linear parts of the force: the merit is their question's answer.
    arrangement : (2, m, d) forces on the deck joints, N. attained : whether the arrangement is known to bring it about.
    """

    merit: Array
    at_set: NDArray[np.int64]
    case: NDArray[np.int64]
    dead: Array
    live: Array
    arrangement: Array
    attained: NDArray[np.bool_]


def worst(family: Family, pattern: Pattern, question: Question, enough: Array) -> Worst:
    """Look for the worst of one live load, meeting new sets on the way.

    Parameters
    ----------
    enough : (2, m) merit that is known from elsewhere; what is not below it need not be known well.
    """
    items = _first(family.lines, pattern, question, 0)
    for _ in range(_MOST_CLOSINGS):
        before = len(family)
        if not _meet(family, items, _doubtful(items, question, enough)):
            break
        items = _joined(items, _first(family.lines, pattern, question, before))
    chosen = _doubtful(items, question, enough)
    refined = refine(family.lines, pattern, question, _take(items, chosen), best_known(items, question, enough))
    return _least(items, chosen, refined, enough.shape[1])


@dataclass(frozen=True, eq=False)
class Roughly:
    """What a live load does, without looking further: (2, m) each.

    Parameters
    ----------
    surely : the largest force that some arrangement is known to bring about. at_most : the largest that any may.
    """

    surely: Array
    at_most: Array


def roughly(family: Family, pattern: Pattern, multiple: float) -> Roughly:
    """Forces at a multiple of a live load, from the sets that were met and their own arrangements."""
    items = _first(family.lines, pattern, Question(None, multiple), 0)
    surely, at_most = np.full((2, 2, family.lines.bars.shape[1]), np.inf)
    right = items.right
    np.minimum.at(surely, (items.direction[right], items.bar[right]), items.merit[right])
    np.minimum.at(at_most, (items.direction, items.bar), items.merit)
    return Roughly(-surely, -at_most)


def _first(every: Lines, pattern: Pattern, question: Question, since: int) -> Items:
    """Every combination with the arrangement of its own set, for the sets from a number on."""
    lines = every.since(since)
    sets, bars, _ = lines.bars.shape
    shape = (2, sets, lines.dead.shape[1], bars)
    direction, at_set, case, bar = (part.ravel() for part in np.indices(shape))
    both = _SIGNS[:, None, None, None] * lines.bars
    place = worst_arrangement(pattern, both)
    extreme = (place * both).sum(axis=-1)
    gained = place @ lines.taut.transpose(0, 2, 1)
    dead = _SIGNS[direction] * lines.dead[at_set, case, bar]
    live = extreme[direction, at_set, bar]
    merit = question.merit(question.room(direction, bar, dead), live)
    multiple = question.multiples(merit)
    taut = lines.taut_dead[at_set, case] + multiple[:, None] * gained[direction, at_set, bar]
    arrangement = place[direction, at_set, bar]
    right = is_right(every, case, multiple, arrangement, taut)
    line = both[direction, at_set, bar]
    return Items(direction, at_set + since, case, bar, line, dead, live, arrangement, merit, taut, right)


def _joined(one: Items, other: Items) -> Items:
    names = Items.__dataclass_fields__
    return Items(*(np.concatenate([getattr(one, name), getattr(other, name)]) for name in names))


def _doubtful(items: Items, question: Question, enough: Array) -> NDArray[np.int64]:
    """Combinations that would govern, but whose set is wrong under their arrangement."""
    best = best_known(items, question, enough)
    return np.flatnonzero(~items.right & lies_below(items.merit, best[items.direction, items.bar]))


def _meet(family: Family, items: Items, doubtful: NDArray[np.int64]) -> bool:
    """Take in the sets to which arrangements lead whose own set is wrong; whether any was new."""
    if not len(doubtful):
        return False
    lines = family.lines
    masks = lines.slack[items.at_set[doubtful]] ^ (items.taut[doubtful] < 0.0)
    new = [mask for mask in np.unique(masks, axis=0) if not family.known(mask)]
    return family.add(new)


def _take(items: Items, numbers: NDArray[np.int64]) -> Items:
    return Items(*(getattr(items, name)[numbers] for name in Items.__dataclass_fields__))


def _least(items: Items, chosen: NDArray[np.int64], refined: Items, bars: int) -> Worst:
    """Of everything that counts, the least merit for each direction and bar; attained before not attained."""
    merit = items.merit.copy()
    dead, live, arrangement, attained = items.dead.copy(), items.live.copy(), items.arrangement, items.right.copy()
    arrangement = arrangement.copy()
    merit[chosen], dead[chosen], live[chosen] = refined.merit, refined.dead, refined.live
    arrangement[chosen], attained[chosen] = refined.arrangement, refined.right
    # What is neither right nor was doubtful lies above something that is right, or above what is known from elsewhere.
    place = items.direction * bars + items.bar
    lowest = np.full(2 * bars, np.inf)
    np.minimum.at(lowest, place, merit)
    order = np.lexsort((merit, ~attained, lies_below(lowest[place], merit), place))
    first = order[np.searchsorted(place[order], np.arange(2 * bars))]
    shape = (2, bars)
    return Worst(
        merit[first].reshape(shape),
        items.at_set[first].reshape(shape),
        items.case[first].reshape(shape),
        dead[first].reshape(shape),
        live[first].reshape(shape),
        arrangement[first].reshape(*shape, -1),
        attained[first].reshape(shape),
    )
