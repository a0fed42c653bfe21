"""What a bar resists, on each rating basis."""

from models.resistance.allowable import ALLOWABLE_STRESS
from models.resistance.eurocode import EUROCODE
from models.resistance.lrfr import LRFR
from models.resistance.protocol import Basis, DeadFactors, Level, Member, Resistance
from models.resistance.registry import BASES, NAMES, basis

__all__ = [
    "ALLOWABLE_STRESS",
    "BASES",
    "EUROCODE",
    "LRFR",
    "NAMES",
    "Basis",
    "DeadFactors",
    "Level",
    "Member",
    "Resistance",
    "basis",
]
