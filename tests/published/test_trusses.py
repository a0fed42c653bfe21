"""Bar forces, reactions and displacements against trusses that others have solved and printed."""

from __future__ import annotations

import numpy as np
import pytest
from plane.build import load_vector, response_of, truss
from published import determinate_trusses, redundant_trusses
from published.example import Example, within

from models.calculation import Array
from models.statics.geometry import Geometry
from models.statics.imposed import imposed_forces
from models.statics.response import Response
from models.statics.stability import judge

EXAMPLES = determinate_trusses.EXAMPLES + redundant_trusses.EXAMPLES
WITH_DISPLACEMENTS = [example for example in EXAMPLES if example.displacements]
WITH_REACTIONS = [example for example in EXAMPLES if example.reactions]


def solve(example: Example) -> tuple[Geometry, Response, Array, Array]:
    """The truss of an example, its response, the bar forces, and each bar's whole elongation."""
    geometry = truss(example.joints, example.bars, example.held)
    area = np.array(
        [example.area if isinstance(example.area, float) else example.area[bar] for bar in geometry.bars], float
    )
    flexibility = geometry.lengths / (example.modulus * area)
    response = response_of(geometry, flexibility)
    imposed = np.array([example.imposed.get(bar, 0.0) for bar in geometry.bars])
    (locked,) = imposed_forces(response, flexibility, imposed[None])
    forces = response.forces @ load_vector(geometry, example.loads) + locked
    return geometry, response, forces, flexibility * forces + imposed


@pytest.mark.parametrize("example", EXAMPLES, ids=str)
def test_bar_forces(example: Example) -> None:
    """Every bar force agrees with the printed one to its printed digits, and every bar has one."""
    geometry, _, forces, _ = solve(example)
    expected = example.expected_forces()
    assert set(expected) == set(geometry.bars)
    found = dict(zip(geometry.bars, forces, strict=True))
    wrong = {bar: (found[bar], text) for bar, text in expected.items() if not within(found[bar], text, example.units)}
    assert not wrong, f"{example.source}: {wrong}"


@pytest.mark.parametrize("example", WITH_REACTIONS, ids=str)
def test_reactions(example: Example) -> None:
    """Every reaction agrees with the printed one to its printed digits."""
    geometry, response, _, _ = solve(example)
    found = (response.reactions @ load_vector(geometry, example.loads)).reshape(-1, 2)
    for joint, printed in example.reactions.items():
        for value, text in zip(found[geometry.joints.index(joint)], printed, strict=True):
            assert text is None or within(value, text, example.units), f"{example.source}: {joint} {value} {text}"


@pytest.mark.parametrize("example", WITH_DISPLACEMENTS, ids=str)
def test_displacements(example: Example) -> None:
    """Displacements by virtual work, the response to a unit force times the elongations, are those printed."""
    geometry, response, _, elongations = solve(example)
    found = (response.forces.T @ elongations).reshape(-1, 2) / example.displacement_unit
    for joint, printed in example.displacements.items():
        for value, text in zip(found[geometry.joints.index(joint)], printed, strict=True):
            assert text is None or within(value, text), f"{example.source}: {joint} {value} {text}"


@pytest.mark.parametrize("example", EXAMPLES, ids=str)
def test_verdict(example: Example) -> None:
    """Published trusses stand, and are redundant exactly where they are published as such."""
    expected = "determinate" if example in determinate_trusses.EXAMPLES else "redundant"
    assert judge(truss(example.joints, example.bars, example.held)).verdict == expected


def test_redundancy_of_a_crossed_panel() -> None:
    """A bar's redundancy is its own flexibility over that of the loop it closes.

    Hibbeler (Structural Analysis, 8th ed., example 10.7, from memory) prints 34.56/AE for the gap that a unit force
    in AC closes; AC itself is 10 ft long.
    """
    example = next(example for example in EXAMPLES if example.name == "crossed panel")
    geometry, response, _, _ = solve(example)
    assert within(10 / response.redundancy[geometry.bars.index("AC")], "34.56")
