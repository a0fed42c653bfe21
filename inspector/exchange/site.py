"""Site files: reading one whole or not at all, writing it back as it was, and the hash that stands for it."""

from __future__ import annotations

import hashlib
from collections.abc import Mapping
from dataclasses import replace
from pathlib import Path

from inspector.exchange import json_text
from inspector.exchange.checks import check
from inspector.exchange.form import Json, readable
from inspector.exchange.identity import declared, identified
from inspector.exchange.json_text import canonical_json
from inspector.exchange.site_form import SITE, Site
from models.bridge import Footbridge, Truss
from models.errors import InputError, Problem
from models.journal import Journal, Visit

__all__ = ["Site", "canonical_json", "fingerprint", "read", "read_document", "read_file", "write"]


def read(data: bytes | str, source: str = "") -> Site:
    """Read a site file.

    Parameters
    ----------
    data : the file, UTF-8 with or without byte order mark; or its text.
    source : where it comes from, for the error.

    Raises
    ------
    InputError
        With every problem of the file, each with its full path. Nothing is returned of a file with one.
    """
    return read_document(json_text.parse(data, source), source)


def read_file(path: Path | str) -> Site:
    """Read a site file from disk; raises as `read` does, also where there is no such file."""
    try:
        with Path(path).open("rb") as stream:
            data = stream.read(json_text.LARGEST + 1)
    except OSError as error:
        problem = Problem("", f"the file cannot be read: {error.strerror or error}", "a site file")
        raise InputError([problem], str(path)) from error
    return read(data, str(path))


def read_document(document: Json, source: str = "") -> Site:
    """Read a site from a JSON document that `json_text.parse` or `write` gave; raises as `read` does."""
    problems: list[Problem] = []
    site = SITE.read(document, "", problems)
    if readable(site):
        problems += check(site)
    if problems:
        raise InputError(problems, source)
    bridge = site.bridge
    return identified(Site(replace(bridge, trusses=_copied(bridge.trusses)), site.journal))


def _copied(trusses: Mapping[str, Truss]) -> Mapping[str, Truss]:
    """Trusses in which each copy has the values of the truss that it copies."""
    return {
        name: truss if truss.same_as is None else replace(trusses[truss.same_as], name=name, same_as=truss.same_as)
        for name, truss in trusses.items()
    }


def write(bridge: Footbridge, journal: Journal, *, identities: bool = False) -> dict[str, Json]:
    """The document that a site was read from.

    Parameters
    ----------
    identities : also write every id, device and sequence that the file left to be made from the rest, as a
        site needs that travels from one device to another.

    Returns
    -------
    Without ``identities`` exactly what was read: texts and numbers as typed, absent keys absent.
    """
    site = Site(bridge, journal)
    document: dict[str, Json] = SITE.write(declared(site) if identities else site)
    return document


def fingerprint(bridge: Footbridge, journal: Journal) -> str:
    """The SHA-256, in hexadecimal, of the canonical JSON of a site with all its identities.

    Visits and observations are hashed in the order that they count in, so that the same records give the same
    fingerprint whether they come from a file, a store or the union of two tablets.
    """
    ordered = replace(
        journal, visits=tuple(sorted(map(_ordered, journal.visits), key=lambda visit: (visit.date, visit.id)))
    )
    return hashlib.sha256(canonical_json(write(bridge, ordered, identities=True))).hexdigest()


def _ordered(visit: Visit) -> Visit:
    entries = sorted(visit.entries, key=lambda entry: (entry.device, entry.sequence, entry.id))
    return replace(visit, entries=tuple(entries))
