"""What comes with an installed program beside its code."""

from __future__ import annotations

import json
from importlib.resources import files

import pytest

from inspector import samples
from inspector.exchange.schema import result_schema, site_schema


@pytest.mark.parametrize(
    ("name", "built"),
    [("truss-footbridge-1", site_schema), ("truss-footbridge-rating-1", result_schema)],
)
def test_the_schemas_are_installed_as_data(name: str, built: object) -> None:
    """Both schemas are found through the package, the same as the program builds them."""
    found = json.loads(files("inspector.schemas").joinpath(f"{name}.schema.json").read_text(encoding="utf-8"))
    assert callable(built)
    assert found == built()


def test_the_samples_are_installed_as_data() -> None:
    """At least four invented bridges are found through the package, and every one can be read."""
    assert len(samples.names()) >= 4
    for name in samples.names():
        assert samples.sample(name).bridge.name
