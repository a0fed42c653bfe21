"""The pages about the file formats speak of every key, and their example is a file that can be read."""

from __future__ import annotations

import re
from pathlib import Path
from typing import Any

import pytest

from inspector.exchange import site
from inspector.exchange.identity import NAMESPACE
from inspector.exchange.schema import result_schema, site_schema
from models.loading.live import VEHICLES
from models.loading.rules import RULES
from models.quantity import UNITS
from models.section.registry import SHAPES

DOCS = Path(__file__).parents[2] / "docs"
SITE_PAGE = (DOCS / "site-format.md").read_text(encoding="utf-8")
RESULT_PAGE = (DOCS / "result-format.md").read_text(encoding="utf-8")


def named(schema: Any) -> set[str]:
    """All keys and all words of choices that a schema names."""
    if isinstance(schema, list):
        return set().union(*map(named, schema))
    if not isinstance(schema, dict):
        return set()
    own = set(schema.get("properties", {})) | {str(option) for option in schema.get("enum", [])}
    return own.union(*map(named, schema.values()))


@pytest.mark.parametrize(("page", "schema"), [(SITE_PAGE, site_schema()), (RESULT_PAGE, result_schema())])
def test_every_key_is_explained(page: str, schema: dict[str, Any]) -> None:
    """A key or a word that the format has stands in its page."""
    code = set(re.findall(r"`([^`]+)`", re.sub(r"```.*?```", "", page, flags=re.DOTALL)))
    assert named(schema) - code == set()


def test_example_reads() -> None:
    """The example of the page is the short site of these tests without its visit."""
    match = re.search(r"```json\n(.*?)```", SITE_PAGE, re.DOTALL)
    assert match is not None
    found = site.read(match[1])
    assert list(found.bridge.trusses) == ["left", "right"]
    assert not found.journal.present


def test_tables_of_the_page() -> None:
    """Units, shapes with their sizes and plates, rules and vehicles of the page are those of the program."""
    for units in UNITS.values():
        assert all(f"`{unit}`" in SITE_PAGE for unit in units)
    rows = {row.split("`")[1]: row for row in SITE_PAGE.splitlines() if row.startswith("| `")}
    for name, shape in SHAPES.items():
        own = rows[name] if "the same" not in rows[name] else rows[name] + rows["channel"]
        assert all(f"`{key.name}`" in own for key in shape.keys)
        assert all(f"`{plate}`" in own for plate in shape.plates)
    assert all(f"`{word}`" in SITE_PAGE for word in (*RULES, *VEHICLES))
    assert str(NAMESPACE) in SITE_PAGE
