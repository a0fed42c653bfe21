"""Site documents rated, as values."""

from __future__ import annotations

from typing import Any

from inspector.exchange import site
from models.condition import Condition, fold_all
from models.rating import Provenance, Rating, outcomes_of, prepare, rating_of
from models.rating.outcome import Outcome
from models.resistance.lrfr import LRFR

JSON = dict[str, Any]


def solved(document: JSON) -> tuple[Condition, tuple[Outcome, ...]]:
    """Return the bars' condition, and every truss solved in it."""
    found = site.read_document(document)
    condition = fold_all(found.bridge, found.journal)
    return condition, outcomes_of(prepare(found.bridge), condition, LRFR)


def rated(document: JSON) -> Rating:
    """Return the rating by `lrfr`."""
    condition, outcomes = solved(document)
    return rating_of(condition, outcomes, LRFR, Provenance("0" * 64, "under test"))
