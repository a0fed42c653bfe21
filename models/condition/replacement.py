"""A bar that was replaced: nothing recorded about it before counts any more."""

from __future__ import annotations

from dataclasses import dataclass

from models.bridge import Bar
from models.condition.answers import Answer, without_rivals
from models.condition.as_built import AsBuilt, Catalogue
from models.finding import Finding
from models.journal import Replaced
from models.journal_order import BarRecord, Placed, precedes
from models.words import condition as sentences


@dataclass(frozen=True, eq=False)
class Present:
    """What a bar is made of today, and the entries that speak of it as it is today.

    Parameters
    ----------
    section, material : names.
    """

    section: str
    material: str
    built: AsBuilt
    entries: tuple[Placed, ...]
    findings: tuple[Finding, ...]


def present(bar: Bar, record: BarRecord, catalogue: Catalogue) -> Present:
    """Apply the last replacement, if there is one.

    Entries that another device wrote in the same visit have no order to it: they stay, whichever bar
    they meant. Of two devices' different replacements the one with less steel counts.
    """
    findings: list[Finding] = []
    given = [Answer(one, one.entry.replaced) for one in record.entries if one.entry.replaced is not None]
    usable = [one for one in given if _known(one, catalogue, findings)]
    settled = without_rivals(usable, record.choices, lambda _one, _other: True)
    last = [one for one in settled if not any(precedes(one.placed, later.placed) for later in settled)]
    if not last:
        built = catalogue.as_built(bar.section, bar.turned)
        return Present(bar.section, bar.material, built, record.entries, tuple(findings))
    found = {_made_of(bar, one.value): one for one in last}
    if len(found) > 1:
        texts = [f"{section}, {material}" for section, material in found]
        text = sentences.two_answers("what the bar was replaced by", texts, last[0].placed.date)
        findings.append(Finding("doubtful", text))
    section, material = min(found, key=lambda made_of: _least(bar, made_of, catalogue))
    entries = tuple(one for one in record.entries if not any(precedes(one, each.placed) for each in last))
    return Present(section, material, catalogue.as_built(section, bar.turned), entries, tuple(findings))


def _known(answer: Answer[Replaced], catalogue: Catalogue, findings: list[Finding]) -> bool:
    """Whether the bridge has the new section and material; a finding where it has not."""
    bridge, new = catalogue.bridge, answer.value
    missing = [("section", new.section)] if new.section is not None and new.section not in bridge.sections else []
    if new.material is not None and new.material not in bridge.materials:
        missing.append(("material", new.material))
    for what, name in missing:
        findings.append(Finding("doubtful", sentences.replacement_not_there(what, name, answer.placed.date)))
    return not missing


def _made_of(bar: Bar, new: Replaced) -> tuple[str, str]:
    return new.section or bar.section, new.material or bar.material


def _least(bar: Bar, made_of: tuple[str, str], catalogue: Catalogue) -> tuple[float, float, tuple[str, str]]:
    """Sorts the weaker replacement first: by area, then by yield strength, one not given before all others."""
    section, material = made_of
    strength = catalogue.bridge.materials[material].Fy
    return catalogue.as_built(section, bar.turned).area, 0.0 if strength is None else strength.si, made_of
