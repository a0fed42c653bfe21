"""Where a generator takes its choices from: a seeded `random.Random`, or a hypothesis draw that can shrink."""

from __future__ import annotations

import random
from collections.abc import Callable, Sequence
from typing import Any, Protocol, TypeVar

from hypothesis import strategies as st

T = TypeVar("T")


class Choices(Protocol):
    """The four questions that a generator asks. The first or least answer is the simplest one."""

    def whole(self, low: int, high: int) -> int:
        """Return a whole number, both ends included."""

    def pick(self, options: Sequence[T]) -> T:
        """Return one of the options."""

    def chance(self, share: float) -> bool:
        """Return True in about this share of the cases."""


class Seeded:
    """Choices of a seeded generator: plain, fast and countable."""

    def __init__(self, seed: int) -> None:
        self._random = random.Random(seed)  # noqa: S311 -- test documents, not secrets

    def whole(self, low: int, high: int) -> int:
        """Return a whole number, both ends included."""
        return self._random.randint(low, high)

    def pick(self, options: Sequence[T]) -> T:
        """Return one of the options."""
        return options[self._random.randrange(len(options))]

    def chance(self, share: float) -> bool:
        """Return True in about this share of the cases."""
        return self._random.random() < share


class Drawn:
    """Choices that hypothesis draws: it shrinks to few panels, first options and nothing optional."""

    def __init__(self, draw: Callable[..., Any]) -> None:
        self._draw = draw

    def whole(self, low: int, high: int) -> int:
        """Return a whole number, both ends included."""
        return self._draw(st.integers(low, high))

    def pick(self, options: Sequence[T]) -> T:
        """Return one of the options."""
        return self._draw(st.sampled_from(list(options)))

    def chance(self, share: float) -> bool:
        """Return True in some of the cases; hypothesis decides how many, and tries without first."""
        return self._draw(st.booleans()) if 0 < share < 1 else share >= 1
