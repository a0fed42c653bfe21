"""What one part of a site file says about another: names that must exist, things that must fit together.

The checks look at a site of which parts could not be read, so that a file's problems come all at once; they pass
over what was not read, which has its problem already.
"""

from __future__ import annotations

from collections.abc import Callable
from typing import Final

from inspector.exchange import bridge_checks, visit_checks
from inspector.exchange.references import Directory, Problems
from inspector.exchange.site_form import Site
from models.errors import Problem

CHECKS: Final[tuple[Callable[[Directory], Problems], ...]] = (
    bridge_checks.sections,
    bridge_checks.trusses,
    bridge_checks.decks_match,
    bridge_checks.deck,
    bridge_checks.half_through,
    bridge_checks.live,
    bridge_checks.imposed,
    bridge_checks.overrides,
    visit_checks.identities,
    visit_checks.observations,
)


def check(site: Site) -> list[Problem]:
    """All that does not fit together in a site."""
    there = Directory(site)
    return [problem for one in CHECKS for problem in one(there)]
