"""Laws that the whole main job obeys, on generated footbridges: what must not change a rating does not."""

from __future__ import annotations

import random
from typing import Any

from hypothesis import given, settings
from hypothesis import strategies as st
from rewriting import same_bridge
from rewriting.differences import differences
from rewriting.quantities import in_other_units
from rewriting.rated import rated
from strategies.sites import sites

Labelled = tuple[dict[str, Any], frozenset[str]]

EXAMPLES = 12
ROUNDING = 1e-9
ROUNDING_AT_A_FLAT_JOINT = 1e-5
"""A joint that rises by a millionth of a metre puts forces a million times its load into the truss: what is left of
them in the other bars is the difference of very large numbers."""

few = settings(max_examples=EXAMPLES)
given_pressures = sites().filter(lambda drawn: "crowd by rule" not in drawn[1])
"""A standard's pressure goes by metres and feet: it does not grow with the bridge."""


def rounding(labels: frozenset[str]) -> float:
    return ROUNDING_AT_A_FLAT_JOINT if "flat joint" in labels else ROUNDING


@st.composite
def from_both_banks(draw: st.DrawFn) -> tuple[dict[str, Any], dict[str, Any], frozenset[str]]:
    """Draw a site, and the same looked at from the other bank with some bars named from their other end."""
    document, labels = draw(sites())
    bars = [(name, bar["id"]) for name, truss in document["trusses"].items() for bar in truss.get("bars", [])]
    swapped = frozenset(draw(st.sets(st.sampled_from(bars))))
    return document, same_bridge.from_the_other_bank(document, swapped), labels


@few
@given(from_both_banks())
def test_a_bridge_rates_the_same_from_the_other_bank(
    drawn: tuple[dict[str, Any], dict[str, Any], frozenset[str]],
) -> None:
    """Which bank is called the start, and which end of a bar, changes no figure."""
    document, mirrored, labels = drawn
    assert differences(rated(document), rated(mirrored), rounding(labels)) == []


@few
@given(given_pressures, st.sampled_from((0.125, 0.3, 7.0, 1000.0)))
def test_strength_and_load_scale_together(drawn: Labelled, factor: float) -> None:
    """A metal as many times stronger, stiffer and heavier under loads as many times greater rates the same."""
    document, labels = drawn
    document = same_bridge.written_out(document)
    scaled = same_bridge.stronger_and_heavier(document, factor)
    assert differences(rated(document), rated(scaled), rounding(labels), force=factor) == []


@few
@given(given_pressures, st.sampled_from((0.5, 1.7, 3.0, 10.0)))
def test_similar_bridges_rate_the_same(drawn: Labelled, factor: float) -> None:
    """A bridge of other size rates the same under the same pressures if its own weight grows as its strength does."""
    document, labels = drawn
    document = same_bridge.written_out(document)
    similar = same_bridge.larger(document, factor)
    found = differences(rated(document), rated(similar), rounding(labels), force=factor**2, area=factor**2)
    assert found == []


@few
@given(sites(), st.data())
def test_units_change_no_figure(drawn: Labelled, data: st.DataObject) -> None:
    """The same lengths, stresses and loads in any other units that the site format knows rate the same."""
    document, labels = drawn
    again = in_other_units(document, lambda units: data.draw(st.sampled_from(units)))
    assert differences(rated(document), rated(again), rounding(labels)) == []


@few
@given(sites(), st.randoms(use_true_random=False))
def test_the_order_in_the_file_changes_no_figure(drawn: Labelled, shuffle: random.Random) -> None:
    """Joints, bars, trusses, loads, visits and entries in another order give the same figures and the same bar."""
    document, labels = drawn
    again = same_bridge.in_another_order(document, shuffle)
    assert differences(rated(document), rated(again), rounding(labels)) == []
