"""Strengths of metals: what a missing one becomes, and that every default is told."""

from __future__ import annotations

import pytest

from models.bridge import Material
from models.errors import InputError
from models.material import faults, strengths
from models.quantity import parse

KSI = parse("1 ksi", "stress").si


def metal(kind: str = "structural steel", Fy: str | None = None, Fu: str | None = None) -> Material:
    """A metal with the strengths that are given."""
    return Material(
        name="m",
        kind=kind,
        E=parse("200 GPa", "stress"),
        density=parse("7850 kg/m^3", "density"),
        Fy=parse(Fy, "stress") if Fy else None,
        Fu=parse(Fu, "stress") if Fu else None,
    )


@pytest.mark.parametrize(
    ("year", "Fy", "Fu"),
    [
        (None, 26, 52), (1880, 26, 52), (1904, 26, 52), (1905, 26, 52), (1906, 30, 60), (1935, 30, 60), (1936, 30, 60),
        (1937, 33, 66), (1962, 33, 66), (1963, 33, 66), (1964, 36, 66), (2020, 36, 66),
    ],
)  # fmt: skip
def test_unknown_steel_takes_the_class_of_its_year(year: int | None, Fy: float, Fu: float) -> None:
    """Steel of unknown grade has the strengths of its time; a boundary year and no year take the lower class."""
    found = strengths(metal(), year)
    assert (found.Fy / KSI, found.Fu / KSI) == (pytest.approx(Fy), pytest.approx(Fu))
    assert len(found.assumptions) == 2


def test_wrought_iron_does_not_go_by_the_year() -> None:
    """Wrought iron of unknown grade has 26 and 48 ksi whenever the bridge was built."""
    for year in (None, 1890, 1970):
        found = strengths(metal("wrought iron"), year)
        assert (found.Fy / KSI, found.Fu / KSI) == (pytest.approx(26), pytest.approx(48))


def test_given_strengths_need_no_assumption() -> None:
    """Where the site gives both strengths they hold, and nothing is assumed."""
    found = strengths(metal(Fy="250 MPa", Fu="400 MPa"), 1990)
    assert (found.Fy, found.Fu, found.assumptions) == (250e6, 400e6, ())


def test_a_given_yield_strength_bounds_the_tensile_strength() -> None:
    """Without a tensile strength the lesser of the class's and 1.2 times the given yield strength counts."""
    low, high = strengths(metal(Fy="250 MPa"), 1990), strengths(metal(Fy="460 MPa"), 1990)
    assert low.Fu == pytest.approx(300e6)
    assert high.Fu == pytest.approx(66 * KSI)
    assert "1.2 times" in low.assumptions[0]
    assert len(low.assumptions) == len(high.assumptions) == 1


def test_a_given_tensile_strength_leaves_the_yield_strength_to_its_class() -> None:
    """Without a yield strength the class's counts, but never more than the tensile strength that is given."""
    assert strengths(metal(Fu="400 MPa"), 1950).Fy == pytest.approx(33 * KSI)
    assert strengths(metal(Fu="200 MPa"), 1950).Fy == 200e6


def test_an_assumption_names_material_value_and_source() -> None:
    """Each default is one sentence with the material, the value in both units and where it comes from."""
    said = strengths(metal(), 1920).assumptions
    assert said[0] == (
        "Material `m`: the site gives no yield strength; Fy 207 MPa (30 ksi) is assumed, that of steel made from 1905 "
        "to 1936 (AASHTO Manual for Bridge Evaluation, Table 6A.6.2.1-1, from memory)."
    )
    assert "Fu 414 MPa (60 ksi)" in said[1]


def test_stainless_steel_needs_both_strengths() -> None:
    """Nothing stands in for a missing strength of stainless steel; both missing ones are named with their path."""
    with pytest.raises(InputError) as caught:
        strengths(metal("stainless steel"), 2010)
    assert [problem.path for problem in caught.value.problems] == ["materials/m/Fy", "materials/m/Fu"]
    assert strengths(metal("stainless steel", "220 MPa", "520 MPa"), None).Fu == 520e6


def test_faults_of_a_metal_are_told_together() -> None:
    """An unknown kind and a strength of zero are two problems with their places."""
    assert [fault.path for fault in faults(metal("tin", Fy="0 MPa"))] == ["Fy", "kind"]
