"""One bar gone: what the factorisation of the whole truss says against solving what is left."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given, settings
from plane.build import load_vector, response_of, truss
from plane.random_trusses import Sample, error_of, samples

from models.statics.loss import necessary, transfer
from models.statics.response import respond
from models.statics.stability import judge

CROSSED = truss({"a": (0, 0), "b": (4, 0), "c": (4, 3), "d": (0, 3)}, "ab bc cd da ac bd", {"a": "xy", "b": "y"})


def test_a_lost_diagonal_gives_its_force_to_the_other() -> None:
    """Losing a diagonal of a crossed panel changes the other bars by its state of self-stress."""
    gained = transfer(response_of(CROSSED, CROSSED.lengths))[4]
    np.testing.assert_allclose(gained, [0.8, 0.6, 0.8, 0.6, -1.0, -1.0], rtol=1e-13)


def test_every_bar_of_a_determinate_truss_is_necessary() -> None:
    """Nothing is transferred where nothing can be spared."""
    response = response_of(CROSSED.keeping([0, 1, 2, 3, 4]))
    assert necessary(response).all()
    assert not transfer(response).any()


def test_a_bar_that_nothing_replaces_is_necessary_in_a_redundant_truss() -> None:
    """A hanger outside the crossed panel is necessary, the panel's own bars are not."""
    joints = {"a": (0, 0), "b": (4, 0), "c": (4, 3), "d": (0, 3), "e": (6, 0)}
    geometry = truss(joints, "ab bc cd da ac bd be ce", {"a": "xy", "b": "y"})
    assert necessary(response_of(geometry, geometry.lengths)).tolist() == [False] * 6 + [True] * 2


@settings(max_examples=60, deadline=None)
@given(sample=samples(redundant=True, well=True))
def test_single_losses(sample: Sample) -> None:
    """A bar is necessary exactly where the rest is a mechanism; else `transfer` gives the forces of the rest."""
    geometry, response = sample.geometry, sample.response
    before = response.forces @ sample.loads
    gained, spared = transfer(response), ~necessary(response)
    bars = np.arange(len(geometry.bars))
    for bar in bars:
        rest = geometry.keeping(bars[bars != bar])
        found = judge(rest)
        assert found.carries == spared[bar]
        if not found.carries:
            continue
        after = before + gained[bar] * before[bar]
        left = respond(rest, found.condition, sample.flexibility[bars != bar])
        tolerance = 10 * error_of(left, sample.loads) + 1e-6
        assert after[bar] == pytest.approx(0.0, abs=tolerance)
        np.testing.assert_allclose(after[bars != bar], left.forces @ sample.loads, atol=tolerance)


def test_the_whole_load_case_after_a_loss() -> None:
    """Forces after a loss are in equilibrium with the same loads."""
    response = response_of(CROSSED, CROSSED.lengths)
    before = response.forces @ load_vector(CROSSED, {"c": (10, -20)})
    after = before + transfer(response)[5] * before[5]
    expected = response_of(CROSSED.keeping([0, 1, 2, 3, 4])).forces @ load_vector(CROSSED, {"c": (10, -20)})
    np.testing.assert_allclose(after[:5], expected, atol=1e-12)
