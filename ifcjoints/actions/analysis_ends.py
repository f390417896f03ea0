"""What a structural analysis gives for one end of one of its members, in one case."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from ..model.joints import MemberEnd
from ..model.units import Array

LEAST_SHARE = 1e-3
"""A component that is not stated is not missed along a direction that it has less of than this."""


@dataclass(frozen=True, slots=True, eq=False)
class EndForces:
    """The forces that the rest of the structure puts on a member's end, in one load case or combination.

    `point` (3,) is the end of the member's axis and `axis` (3,) the unit direction from there into the member,
    in the world, mm; NaN where the file does not place the member. The components of `force` (N) and `moment`
    (Nmm, right-handed, about `point`) refer to the rows of `basis` (3, 3), unit vectors in the world; a
    component that is not known is NaN, and `gap` says why. `doubt` says why the forces cannot be used at all.
    """

    member: str
    end: MemberEnd
    case: str
    is_combination: bool
    point: Array
    axis: Array
    basis: Array
    force: Array
    moment: Array
    source: str
    gap: str = "not all of the forces are stated"
    doubt: str | None = None

    @property
    def place(self) -> tuple[str, MemberEnd]:
        """The member and its end."""
        return self.member, self.end

    def force_along(self, direction: Array) -> float:
        """Return the force along a unit direction in N; NaN where it is not known."""
        return along(self.basis, self.force, direction)

    def moment_about(self, direction: Array) -> float:
        """Return the moment about a unit direction in Nmm; NaN where it is not known."""
        return along(self.basis, self.moment, direction)


def along(basis: Array, components: Array, direction: Array) -> float:
    """Return a vector's component along a unit direction; NaN if a component that it depends on is NaN."""
    shares = basis @ direction
    felt = ~np.isnan(components) | (np.abs(shares) > LEAST_SHARE)
    return float(shares[felt] @ components[felt])


def turned(basis: Array, components: Array, into: Array) -> Array:
    """Return a vector's components (3,) along the rows of another basis."""
    return components if basis is into else np.array([along(basis, components, direction) for direction in into])
