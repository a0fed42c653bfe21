"""The one door for everything that is made from a bridge and its journal: check, rate, explain, report."""

from __future__ import annotations

from dataclasses import dataclass
from pathlib import Path

from inspector import PROGRAM, VERSION
from inspector.exchange import result, site
from inspector.exchange.site import Site
from models.bridge import Footbridge
from models.condition import Condition, fold_all
from models.errors import InputError, Problem
from models.journal import Journal
from models.rating import BarCheck, Prepared, Provenance, Rating, hand_check, outcomes_of, prepare, rating_of
from models.rating.outcome import Outcome
from models.resistance import basis as basis_named


@dataclass(frozen=True, eq=False)
class Rated:
    """A bridge rated in the condition that its journal tells, with all that the rating was made from.

    Parameters
    ----------
    prepared : what does not depend on a reading; handed on to the next rating of the same bridge.
    """

    bridge: Footbridge
    journal: Journal
    prepared: Prepared
    condition: Condition
    outcomes: tuple[Outcome, ...]
    rating: Rating

    def hand_check(self, truss: str, bar: str) -> BarCheck:
        """One bar's calculation, line by line."""
        return hand_check(self.outcomes, truss, bar)


def check(path: Path) -> Site:
    """Read a site file and prepare it for rating, on whatever basis it names.

    Raises
    ------
    InputError
        With everything that is wrong in the file.
    """
    return site.read_file(path)


def rate(found: Site, before: Rated | None = None) -> Rated:
    """Rate a bridge.

    Parameters
    ----------
    before : the last rating of the same bridge, whose preparation and unchanged bars are used again.

    Raises
    ------
    BasisNotAvailable
        If the site names a basis that this program does not have yet.
    """
    bridge, journal = found.bridge, found.journal
    basis = basis_named(bridge.rating.basis)
    again = before is not None and before.bridge is bridge
    prepared = before.prepared if before is not None and again else prepare(bridge)
    condition = fold_all(bridge, journal, before.condition if before is not None and again else None)
    outcomes = outcomes_of(prepared, condition, basis)
    provenance = Provenance(site.fingerprint(bridge, journal), f"{PROGRAM} {VERSION}")
    return Rated(bridge, journal, prepared, condition, outcomes, rating_of(condition, outcomes, basis, provenance))


def result_text(rated: Rated) -> str:
    """The rating as the text of a result file."""
    return result.text(rated.rating)


def find_bar(bridge: Footbridge, place: str) -> tuple[str, str]:
    """Truss and bar of a place written as ``TRUSS/BAR``.

    Raises
    ------
    InputError
        If there is no such truss or bar; names those that there are.
    """
    for truss in bridge.trusses.values():
        if place.startswith(f"{truss.name}/"):
            bar = place.removeprefix(f"{truss.name}/")
            if bar in truss.bar:
                return truss.name, bar
            bars = ", ".join(f"{truss.name}/{each}" for each in list(truss.bar)[:6])
            raise InputError([Problem(place, f"truss `{truss.name}` has no bar `{bar}`", f"one of {bars} ...")])
    trusses = ", ".join(bridge.trusses)
    raise InputError([Problem(place, "no such truss", f"TRUSS/BAR with one of the trusses {trusses}")])


def report(rated: Rated) -> bytes:
    """The PDF rating summary.

    Imported here, so that rating alone does not load the PDF library.
    """
    from inspector.report import lowest_bars, make_report  # noqa: PLC0415 (see above)

    checks = [rated.hand_check(bar.truss, bar.bar) for bar in lowest_bars(rated.rating)]
    return make_report(rated.rating, rated.bridge, rated.journal, rated.condition.bars, checks)
