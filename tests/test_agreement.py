"""The program against an independent force-method solution that is built from the site document alone."""

from __future__ import annotations

from collections import Counter
from collections.abc import Mapping
from typing import Any

import pytest
from hypothesis import HealthCheck, given, settings
from independent.compare import differences, left_out
from independent.rate import Truss, expanded, solve
from strategies.choices import Seeded
from strategies.sites import make, sites

from inspector.exchange import result, site
from models.condition import fold_all
from models.rating import Provenance, prepare, rate
from models.resistance.registry import basis

DOCUMENTS = 160
SEED = 7
PARTS = 20
OTHER_FIRST = 1000
OTHER_DOCUMENTS = 30
OTHER_PARTS = 5
"""Documents for each of the other bases, none of them among the ones for `lrfr`."""
TENTH = (
    "determinate",
    "redundant",
    "continuous",
    "overhanging deck",
    "crossed diagonals",
    "flat joint",
    "deck on top",
    "pratt",
    "howe",
    "warren",
    "parallel chords",
    "polygonal chord",
    "one truss",
    "two trusses, the same",
    "two trusses, different",
    "deck between trusses",
    "deck wider than trusses",
    "deck off centre",
    "half through",
    "readings",
    "read again",
    "reading of unknown extent",
    "estimated loss",
    "severed",
    "replaced",
    "never visited",
    "crowd",
    "crowd by rule",
    "vehicle",
    "vehicle by name",
    "SI units",
    "US units",
    "rectangular tube",
    "round tube",
    "round bar",
    "flat bar",
    "i section",
    "built up",
)


def document_of(number: int) -> tuple[dict[str, Any], frozenset[str]]:
    return make(Seeded(1_000_003 * SEED + number))


def rated(document: Mapping[str, Any]) -> dict[str, Any]:
    read = site.read_document(document)
    by = basis(read.bridge.rating.basis)
    return result.document(
        rate(prepare(read.bridge), fold_all(read.bridge, read.journal), by, Provenance("none", "test"))
    )


@pytest.mark.slow
@pytest.mark.parametrize("part", range(PARTS))
def test_program_agrees_with_the_force_method(part: int) -> None:
    """Every figure of every bar that leaves nothing out equals the independent solution's to 1e-6."""
    found = []
    for number in range(part, DOCUMENTS, PARTS):
        document, _ = document_of(number)
        theirs, ours = rated(document), solve(document)
        found += [f"document {number}: {what}" for what in differences(theirs, ours)]
    assert found == []


@pytest.mark.slow
@pytest.mark.parametrize("name", ["allowable stress", "eurocode"])
@pytest.mark.parametrize("part", range(OTHER_PARTS))
def test_program_agrees_on_other_bases(part: int, name: str) -> None:
    """Whole ratings by allowable stresses and by the Eurocodes agree too, resistances of every level among them."""
    found = []
    for number in range(part, OTHER_DOCUMENTS, OTHER_PARTS):
        document, _ = document_of(OTHER_FIRST + number)
        document["rating"]["basis"] = name
        theirs, ours = rated(document), solve(document)
        found += [f"document {number}: {what}" for what in differences(theirs, ours)]
    assert found == []


def test_every_class_of_bridge_has_its_share() -> None:
    """Each class of truss, deck, damage, load, unit and shape makes at least a tenth of the compared documents."""
    shares = Counter(label for number in range(DOCUMENTS) for label in document_of(number)[1])
    assert {label: shares[label] for label in TENTH if shares[label] < DOCUMENTS / 10} == {}


def test_flat_joints_of_a_millionth_are_among_them() -> None:
    """Some compared trusses have an equilibrium matrix with a condition number of about a million, and are rated."""
    conditions = []
    for number in range(DOCUMENTS):
        document, labels = document_of(number)
        if "flat joint" in labels:
            trusses = expanded(document).items()
            conditions += [Truss(document, name, one).frame.condition() for name, one in trusses]
    assert sum(3e5 < condition < 1e7 for condition in conditions) >= 5


def test_most_bars_are_compared() -> None:
    """Findings that something is left out excuse less than a fifth of the bars from the comparison."""
    bars = excused = 0
    for number in range(0, DOCUMENTS, 4):
        theirs = rated(document_of(number)[0])
        bars += len(theirs["bars"])
        excused += len(left_out(theirs))
    assert excused < 0.2 * bars


@pytest.mark.slow
@settings(max_examples=10, deadline=None, derandomize=True, suppress_health_check=list(HealthCheck))
@given(sites())
def test_program_agrees_on_drawn_sites(drawn: tuple[dict[str, Any], frozenset[str]]) -> None:
    """The same agreement on sites that hypothesis draws, so that a disagreement shrinks to a small bridge."""
    document, _ = drawn
    assert differences(rated(document), solve(document)) == []
