"""JSON Schemas of the site file and of the result file, built from the forms that read and write them."""

from __future__ import annotations

from typing import Final

from inspector.exchange import result, site_form
from inspector.exchange.form import Json, definitions
from inspector.exchange.identity import NAMESPACE

_DIALECT: Final = "https://json-schema.org/draft/2020-12/schema"

_SITE: Final = f"""\
One truss footbridge as built, how it is to be rated, and its visits. \
A dimension is a text with its unit, as "3.2 m" or "12 ft 6 1/2 in"; a bare number has no dimension. \
The schema cannot say that names must exist elsewhere in the file, that a key stands once, that joints lie apart: \
the program checks that when it reads a file. \
An id that is left out is a UUID of version 5 in the namespace {NAMESPACE}, of the canonical JSON of a list: \
["bridge", name, reference]; ["visit", bridge id, date, inspector, ordinal]; \
["entry", visit id, canonical JSON of the observation as written, ordinal]. \
What is not given is null; the ordinal counts from 1 among equals that have no id of their own. \
Canonical JSON: UTF-8, keys sorted, no spaces, numbers as the shortest text that reads back the same."""

_RESULT: Final = """\
The rating of one truss footbridge. SI base units (N, m, m^2, Pa), tension positive; a value that does not \
exist is null. Further keys may be added, these stay."""


def site_schema() -> dict[str, Json]:
    """The schema of `truss-footbridge/1`, JSON Schema 2020-12."""
    return _whole("Truss footbridge site file", site_form.FORMAT, _SITE, site_form.SITE.schema())


def result_schema() -> dict[str, Json]:
    """The schema of `truss-footbridge-rating/1`, JSON Schema 2020-12."""
    return _whole("Truss footbridge rating", result.FORMAT, _RESULT, result.RESULT.schema())


def _whole(title: str, name: str, description: str, schema: dict[str, Json]) -> dict[str, Json]:
    head = {"$schema": _DIALECT, "$id": f"urn:{name.replace('/', ':')}", "title": title, "description": description}
    return head | schema | {"$defs": definitions()}
