"""Who is who: the ids that a file leaves out, made so that reading a file twice gives the same ones.

An id that is not given is a UUID version 5 (RFC 9562) in one namespace, of the canonical JSON of a list:

- a bridge: ``["bridge", name, reference]``;
- a visit: ``["visit", bridge id, date, inspector, ordinal]``;
- an entry: ``["entry", visit id, canonical JSON of the entry as written, ordinal]``.

What is not given is null. The ordinal counts from 1 among the visits, or the entries of a visit, that have no id
of their own and are equal in the rest.
"""

from __future__ import annotations

import uuid
from collections import Counter
from dataclasses import replace
from typing import Final

from inspector.exchange.form import Json
from inspector.exchange.json_text import canonical_json
from inspector.exchange.site_form import Site
from inspector.exchange.visit_form import ENTRY
from models.journal import Entry, Journal, Visit

NAMESPACE: Final = uuid.UUID("844099c2-57cf-4cec-bbf1-cc18d05cdbaa")
"""The namespace of all ids that this program makes of what a file says."""

NO_DEVICE: Final = "file"
"""The device of an entry where neither it nor its visit names one."""


def made_of(*parts: Json) -> str:
    """The id of something, made of what tells it from others."""
    return str(uuid.uuid5(NAMESPACE, canonical_json(list(parts)).decode()))


def identified(site: Site) -> Site:
    """The same site with every id, device and sequence filled in that the file left out."""
    bridge = site.bridge
    if "id" not in bridge.written:
        bridge = replace(bridge, id=made_of("bridge", bridge.name, bridge.reference))
    ordinals: Counter[bytes] = Counter()
    visits = tuple(_visit(visit, bridge.id, ordinals) for visit in site.journal.visits)
    return Site(bridge, replace(site.journal, visits=visits))


def _visit(visit: Visit, bridge: str, ordinals: Counter[bytes]) -> Visit:
    if "id" not in visit.written:
        names = ["visit", bridge, visit.date, visit.inspector]
        visit = replace(visit, id=made_of(*names, _next(names, ordinals)))
    inside: Counter[bytes] = Counter()
    entries = tuple(_entry(entry, place, visit, inside) for place, entry in enumerate(visit.entries, start=1))
    return replace(visit, entries=entries)


def _entry(entry: Entry, place: int, visit: Visit, ordinals: Counter[bytes]) -> Entry:
    fields: dict[str, str | int] = {}
    if "id" not in entry.written:
        names = ["entry", visit.id, canonical_json(ENTRY.write(entry)).decode()]
        fields["id"] = made_of(*names, _next(names, ordinals))
    if "device" not in entry.written:
        fields["device"] = visit.device or NO_DEVICE
    if "sequence" not in entry.written:
        fields["sequence"] = place
    return replace(entry, **fields)  # type: ignore[arg-type]  # text or number as the field has it


def _next(names: list[Json], ordinals: Counter[bytes]) -> int:
    key = canonical_json(names)
    ordinals[key] += 1
    return ordinals[key]


def declared(site: Site) -> Site:
    """The same site as one whose file gives every id, device and sequence, and a list of visits."""
    visits = tuple(
        replace(
            visit,
            written=frozenset({"id", "observations"}),
            entries=tuple(replace(entry, written=frozenset({"id", "device", "sequence"})) for entry in visit.entries),
        )
        for visit in site.journal.visits
    )
    bridge = replace(site.bridge, written=frozenset({"id"}))
    return Site(bridge, Journal(visits, present=True))
