"""Deflection under people and vertical frequency beside the rating factors."""

from __future__ import annotations

import math
from typing import Any

import numpy as np
import pytest
from plane.footbridge import pratt
from rewriting.rated import rated, solved
from small.footbridge import bar_of, reading, record, short, truss_of

from inspector.exchange import result
from models.bridge import Truss
from models.quantity import parse
from models.rating.result import Rating
from models.rating.service import deflection_limits, frequency_by_weight
from models.statics.geometry import geometry_of
from models.statics.vibration import joint_flexibility, lowest_frequency

JSON = dict[str, Any]
GUIDE = "AASHTO pedestrian guide 2009"


def advice(rating: Rating) -> list[str]:
    """The notes about deflection and frequency."""
    return [finding.text for finding in rating.findings if finding.level == "note" and GUIDE in finding.text]


def on_supports(panels: int, *supports: str) -> Truss:
    """A Pratt truss of 3 m panels, held where told."""
    plain = pratt(panels, "3 m", "3 m")
    held = {joint: "pin" if joint == supports[0] else "roller" for joint in supports}
    return Truss("pratt", "at deck", plain.joints, held, plain.bars, plain.deck_joints)


def test_limits_of_spans_and_arms() -> None:
    """Each deck joint has 1/360 of its own span, 1/220 of its arm; over supports there is no limit."""
    found = deflection_limits(geometry_of(on_supports(10, "L2", "L6", "L8")))
    span, short_span, arm = 12 / 360, 6 / 360, 6 / 220
    expected = [arm, arm, math.inf, span, span, span, math.inf, short_span, math.inf, arm, arm]
    np.testing.assert_allclose(found, expected, rtol=1e-12)


def test_no_limit_without_a_span() -> None:
    """Where there are not two supports apart there is no span."""
    assert np.isinf(deflection_limits(geometry_of(on_supports(4, "L2")))).all()


def test_limit_of_the_design_example() -> None:
    """72 ft over 360 are 2.40 in (NCHRP 20-07, task 244; data read, limit from memory)."""
    truss = pratt(12, "6 ft", "5 ft")
    limits = deflection_limits(geometry_of(truss))
    assert limits[6] == pytest.approx(parse("2.40 in", "length").si, rel=1e-12)


@pytest.mark.parametrize(
    ("weight", "hertz"),
    [("20 kip", 6.284), ("40 kip", 4.302), ("50 kip", 3.664), ("63 kip", 3.003), ("100 kip", 1.681)],
)
def test_frequency_by_weight(weight: str, hertz: float) -> None:
    """2.86 ln(180 kip/W) (AASHTO pedestrian guide 2009, 6; from memory, computed)."""
    assert frequency_by_weight(parse(weight, "force").si) == pytest.approx(hertz, abs=6e-4)


def test_figures_of_a_plain_truss() -> None:
    """The crowd on the whole deck gives the deflection, the dead load's mass the frequency."""
    _, (outcome,) = solved(short())
    assert outcome.solved is not None
    (answer,) = outcome.solved.answers
    assert answer.flexibility is not None
    truss = rated(short()).trusses["only"]
    down = -answer.response.forces[:, 1::2]
    on_deck = 4000.0 * 2.0 * np.array([1.5, 3.0, 3.0, 3.0, 1.5])
    sag = joint_flexibility(down[:, outcome.prepared.geometry.deck], answer.flexibility) @ on_deck
    assert truss.deflection is not None
    assert truss.deflection.joint == "L2"
    assert truss.deflection.load == "crowd"
    assert truss.deflection.size == pytest.approx(sag.max(), rel=1e-12)
    assert truss.deflection.limit == pytest.approx(12 / 360)
    assert truss.frequency is not None
    weight = sum(truss.dead_total)
    heavy = lowest_frequency(down, answer.flexibility, np.full(down.shape[1], weight / 9.80665))
    assert truss.frequency > heavy
    assert advice(rated(short())) == []


def test_people_stand_where_the_deck_sags_most() -> None:
    """Over a middle support people on one span alone bend it further than people everywhere."""
    document = short()
    truss_of(document)["supports"]["L2"] = "roller"
    found = rated(document).trusses["only"].deflection
    document["rating"]["live"] = [{"name": "crowd", "kind": "crowd", "pressure": "4 kPa"}]
    _, (outcome,) = solved(document)
    assert outcome.solved is not None
    answer = outcome.solved.answers[0]
    assert answer.flexibility is not None
    deck = outcome.prepared.geometry.deck
    lines = joint_flexibility(-answer.response.forces[:, 2 * deck + 1], answer.flexibility)
    everywhere = np.abs(lines @ (4000.0 * 2.0 * np.array([1.5, 3.0, 3.0, 3.0, 1.5]))).max()
    assert found is not None
    assert found.limit == pytest.approx(6 / 360)
    assert found.size > 1.01 * everywhere


def test_the_softer_truss_counts() -> None:
    """A loss of unknown extent is taken over the whole bar, although no force of the truss depends on it."""
    known, unknown = (
        rated(record(short(), reading("L1-L2", 4.0, extent=extent))).trusses["only"] for extent in ("0.1 m", None)
    )
    assert known.deflection is not None
    assert unknown.deflection is not None
    assert known.frequency is not None
    assert unknown.frequency is not None
    assert unknown.deflection.size > known.deflection.size * 1.01
    assert unknown.frequency < known.frequency


def test_a_soft_bridge_is_told() -> None:
    """Past the limits a note names the size, the joint, the load, the limit and the guide; no factor changes."""
    document = short()
    document["materials"]["steel"]["E"] = "2 GPa"
    rating = rated(document)
    sagging, swinging = advice(rating)
    assert "Under crowd joint L2 goes" in sagging
    assert "more than the 33.3 mm" in sagging
    assert "below 3 Hz, and below the 8.12 Hz" in swinging
    assert rating.trusses["only"].frequency == pytest.approx(
        (rated(short()).trusses["only"].frequency or 0.0) / math.sqrt(100), rel=1e-9
    )


def test_a_heavy_bridge_may_swing_slower() -> None:
    """A bridge that weighs enough meets the second limit below 3 Hz, and the note says so."""
    document = short()
    document["deck"]["dead"] = "40 kPa"
    document["materials"]["steel"]["E"] = "20 GPa"
    (swinging,) = (text for text in advice(rated(document)) if "frequency" in text)
    assert "below 3 Hz, and not below what" in swinging


def test_no_people_no_deflection() -> None:
    """Without a crowd there is a frequency and no deflection; loads beside a crowd do not count in it."""
    document = short()
    cart = {"name": "cart", "kind": "concentrated", "force": "30 kN"}
    document["rating"]["live"] = [cart]
    alone = rated(document).trusses["only"]
    assert (alone.deflection, alone.frequency) == (None, rated(short()).trusses["only"].frequency)
    crowd = {"name": "crowd", "kind": "crowd", "pressure": "4 kPa", "with": [{"load": "cart", "factor": 1.0}]}
    document["rating"]["live"] = [cart, crowd]
    assert rated(document).trusses["only"].deflection == rated(short()).trusses["only"].deflection


def test_a_mechanism_has_neither() -> None:
    """Without forces there is nothing to say."""
    truss = rated(record(short(), {"bar": "L1-L2", "severed": True})).trusses["only"]
    assert (truss.deflection, truss.frequency) == (None, None)


def test_rods_that_cannot_push_leave_it_open() -> None:
    """A redundant truss some of whose bars cannot push is softer than superposition says: no figure."""
    document = short(crossed=True)
    bar_of(document, "L0-L1")["tension only"] = True
    truss = rated(document).trusses["only"]
    assert (truss.deflection, truss.frequency) == (None, None)


def test_in_the_result_file() -> None:
    """Both stand with the truss, and only where there are figures."""
    made = result.document(rated(short()))["trusses"]["only"]
    assert set(made["deflection"]) == {"joint", "size", "limit", "load"}
    assert made["frequency"] == rated(short()).trusses["only"].frequency
    moving = result.document(rated(record(short(), {"bar": "L1-L2", "severed": True})))["trusses"]["only"]
    assert not {"deflection", "frequency"} & set(moving)
