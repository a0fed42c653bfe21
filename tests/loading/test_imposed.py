"""What a site imposes on a truss, as bars that no longer fit."""

from __future__ import annotations

import numpy as np
from plane.footbridge import pratt, quantity

from models.bridge import Imposed, RatingRules
from models.calculation import Array
from models.loading.imposed import ASSUMED_EXPANSION, misfits
from models.statics.geometry import geometry_of

GEOMETRY = geometry_of(pratt(4, "3 m", "4 m"))


def row(imposed: Imposed) -> Array:
    """The only row that one change makes."""
    found = misfits(RatingRules("lrfr", (), imposed=(imposed,)), "pratt", GEOMETRY)
    assert found.shape == (1, len(GEOMETRY.bars))
    return np.asarray(found[0])


def test_temperature() -> None:
    """Every bar grows by its length times the change times the expansion, given or assumed."""
    np.testing.assert_allclose(row(Imposed("temperature", change=-30.0)), -30 * ASSUMED_EXPANSION * GEOMETRY.lengths)
    given = Imposed("temperature", truss="pratt", change=20.0, expansion=1e-5)
    np.testing.assert_allclose(row(given), 2e-4 * GEOMETRY.lengths)


def test_bar_made_short() -> None:
    """Only that bar is too short."""
    found = row(Imposed("length", truss="pratt", bar="U1-L2", short=quantity("5 mm", "length")))
    assert found[GEOMETRY.bars.index("U1-L2")] == -0.005
    assert np.count_nonzero(found) == 1


def test_settlement() -> None:
    """Bars at a support that went down are too short if they come from above, and those that lie level still fit."""
    found = row(Imposed("settlement", truss="pratt", joint="L4", down=quantity("10 mm", "length")))
    assert found[GEOMETRY.bars.index("U3-L4")] == -0.008
    assert np.count_nonzero(found) == 1


def test_what_is_no_support_does_not_settle() -> None:
    """A joint that nothing holds goes where the bars let it."""
    assert not row(Imposed("settlement", truss="pratt", joint="L2", down=quantity("10 mm", "length"))).any()


def test_other_trusses() -> None:
    """Changes of another truss make no row; those of no truss by name are of every truss."""
    changes = (
        Imposed("length", truss="other", bar="U1-L2", short=quantity("5 mm", "length")),
        Imposed("temperature", change=10.0),
    )
    rules = RatingRules("lrfr", (), imposed=changes)
    assert len(misfits(rules, "pratt", GEOMETRY)) == 1
    assert misfits(RatingRules("lrfr", ()), "pratt", GEOMETRY).shape == (0, len(GEOMETRY.bars))
