"""The rating bases that this program has. A new basis is one more module and one more row here."""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType
from typing import Final

from models.errors import BasisNotAvailable
from models.resistance.allowable import ALLOWABLE_STRESS
from models.resistance.eurocode import EUROCODE
from models.resistance.lrfr import LRFR
from models.resistance.protocol import Basis

NAMES: Final = ("lrfr", "allowable stress", "eurocode")
"""The bases that a site file may name, built or not."""

BASES: Final[Mapping[str, Basis]] = MappingProxyType(
    {basis.name: basis for basis in (LRFR, ALLOWABLE_STRESS, EUROCODE)}
)


def basis(name: str) -> Basis:
    """A basis by its name in a site file.

    Raises
    ------
    BasisNotAvailable
        If this program has no such basis.
    """
    found = BASES.get(name)
    if found is None:
        raise BasisNotAvailable(name, BASES)
    return found
