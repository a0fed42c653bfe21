"""What can be wrong, said in a way that tells the reader what to do next."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass


class InspectorError(Exception):
    """Base of every error that this program raises on purpose."""


@dataclass(frozen=True, slots=True)
class Problem:
    """One thing that is wrong with an input.

    Parameters
    ----------
    path : where it stands, from the top of the document, as ``trusses/upstream/bars/3/from``.
    what : what is wrong, naming the value.
    expected : what would be right there.
    """

    path: str
    what: str
    expected: str = ""

    def __str__(self) -> str:
        tail = f"; expected {self.expected}" if self.expected else ""
        return f"{self.path or '(the whole document)'}: {self.what}{tail}"


class InputError(InspectorError):
    """An input cannot be used. Carries all its problems at once, never only the first."""

    def __init__(self, problems: Iterable[Problem], source: str = "") -> None:
        self.problems = tuple(problems)
        self.source = source
        super().__init__("\n".join(str(problem) for problem in self.problems))


class QuantityError(InspectorError, ValueError):
    """A text is not a quantity of the dimension that is due."""

    def __init__(self, what: str, expected: str) -> None:
        self.what = what
        self.expected = expected
        super().__init__(f"{what}; expected {expected}")


class BasisNotAvailable(InspectorError):
    """The rating basis that the site names is not built into this program yet."""

    def __init__(self, asked: str, available: Iterable[str]) -> None:
        self.asked = asked
        self.available = tuple(available)
        names = ", ".join(f"`{name}`" for name in self.available)
        super().__init__(
            f"rating/basis: this program cannot rate by `{asked}` yet; it has {names}. "
            "Change the basis in the site file, or rate this bridge by hand."
        )
