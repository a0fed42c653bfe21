"""Bars as the drawing has them: plates, nominal thickness, depth, and the profile that bars share."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field

import numpy as np
from numpy.typing import NDArray

from models.bridge import Footbridge
from models.condition.profile import ESTIMATE, NOMINAL, Profile
from models.section import built
from models.section.plate import DISC


@dataclass(frozen=True, eq=False)
class AsBuilt:
    """A bar's section as the drawing has it.

    Parameters
    ----------
    section : its name.
    plates : plate -> its column in the arrays.
    thickness : (plates,) nominal, m; the diameter of a round bar.
    power : (plates,) see `remaining`.
    depth : in the plane of the truss, or the diameter, m.
    area : nominal, m^2.
    profile : of the bar as built.
    unseen : of a bar never seen, as the owner takes it; the same object where the owner takes the last
        known condition.
    """

    section: str
    plates: Mapping[str, int]
    thickness: NDArray[np.float64]
    power: NDArray[np.float64]
    depth: float
    area: float
    profile: Profile
    unseen: Profile

    def remaining(self, loss: float) -> NDArray[np.float64]:
        """Thickness (plates,) that a loss of area leaves, m: of a round bar's diameter its square root."""
        return _remaining(self.thickness, self.power, loss)


def _remaining(thickness: NDArray[np.float64], power: NDArray[np.float64], loss: float) -> NDArray[np.float64]:
    return thickness * (1.0 - loss) ** power


@dataclass(frozen=True, eq=False)
class Catalogue:
    """The sections of a bridge as built, each worked out when it is first asked for, and shared."""

    bridge: Footbridge
    _known: dict[tuple[str, int], AsBuilt] = field(default_factory=dict)

    @property
    def unseen_loss(self) -> float | None:
        """Loss of area that the owner takes for a bar not seen; None where the last known condition counts."""
        rule = self.bridge.rating.unseen
        return None if rule is None or isinstance(rule, str) else min(max(float(rule), 0.0), 1.0)

    def as_built(self, section: str, turned: int | None) -> AsBuilt:
        """A section as it lies in the truss, turned by so many degrees.

        Raises
        ------
        InputError
            If its dimensions do not fit together.
        """
        key = section, turned or 0
        found = self._known.get(key)
        if found is None:
            found = self._known[key] = self._made(*key)
        return found

    def _made(self, section: str, turned: int) -> AsBuilt:
        cut = built(self.bridge.sections[section], turned)
        power = np.array([0.5 if piece.form is DISC else 1.0 for piece in cut.pieces])
        profile = even(cut.thickness, NOMINAL)
        loss = self.unseen_loss
        return AsBuilt(
            section=section,
            plates={name: column for column, name in enumerate(cut.plates)},
            thickness=cut.thickness,
            power=power,
            depth=cut.depth,
            area=float(cut.nominal.area),
            profile=profile,
            unseen=even(_remaining(cut.thickness, power, loss), ESTIMATE) if loss else profile,
        )


def even(thickness: NDArray[np.float64], rests_on: int) -> Profile:
    """A bar of one section from end to end, that no visit measured; thickness (plates,), m."""
    shape = (1, len(thickness))
    return Profile(
        stations=np.array([0.0, 1.0]),
        thickness=thickness.reshape(shape),
        rests_on=np.full(shape, rests_on, np.int8),
        cleaned=np.zeros(shape, bool),
        visit=np.full(shape, -1, np.int64),
    )
