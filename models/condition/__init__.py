"""The fold of what was recorded about a bar to its condition and its plates along the bar."""

from models.condition.fold import BarCondition, Condition, bar_length, fold, fold_all
from models.condition.profile import DOUBTFUL, ESTIMATE, NOMINAL, READING, Measurement, Profile

__all__ = [
    "DOUBTFUL",
    "ESTIMATE",
    "NOMINAL",
    "READING",
    "BarCondition",
    "Condition",
    "Measurement",
    "Profile",
    "bar_length",
    "fold",
    "fold_all",
]
