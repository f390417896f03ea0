"""Placements and mapping operators as 4 × 4 matrices in mm."""

from __future__ import annotations

from typing import Any

import numpy as np

from ..model.geometry import cross, unit
from ..model.units import Array
from .reach import within_reach


class Placements:
    """Reads placements; each object placement is worked out once."""

    def __init__(self, length_unit: float) -> None:
        self.length = length_unit
        self._known: dict[int, Array] = {}

    def point(self, point: Any) -> Array:
        """Return a cartesian point (3,) in mm; OutOfReach for one that no building has."""
        coordinates = [float(value) * self.length for value in point.Coordinates]
        return within_reach(np.array([*coordinates, 0.0, 0.0][:3]))

    def of_element(self, placement: Any) -> Array:
        """Return an object placement in the world; the identity where there is none."""
        if placement is None:
            return np.eye(4)
        number = placement.id()
        if number not in self._known:
            self._known[number] = self._work_out(placement)
        return self._known[number]

    def _work_out(self, placement: Any) -> Array:
        chain: list[Any] = []
        while placement is not None and placement.id() not in self._known:
            if len(chain) > 200:
                raise ValueError("its placement leads back to itself")
            chain.append(placement)
            placement = getattr(placement, "PlacementRelTo", None)
        matrix = self._known[placement.id()] if placement is not None else np.eye(4)
        for link in reversed(chain):
            if not link.is_a("IfcLocalPlacement"):
                raise ValueError(f"its place is given by an {link.is_a()}, which is not read")
            matrix = matrix @ self.axes(link.RelativePlacement)
            self._known[link.id()] = matrix
        return matrix

    def axes(self, placement: Any) -> Array:
        """Return an IfcAxis2Placement (2D or 3D); the identity where there is none."""
        if placement is None:
            return np.eye(4)
        if placement.is_a("IfcAxis2Placement2D"):
            z = np.array([0.0, 0.0, 1.0])
        else:
            z = _direction(placement.Axis, (0.0, 0.0, 1.0))
        return _matrix(_direction(placement.RefDirection, (1.0, 0.0, 0.0)), z, self.point(placement.Location))

    def operator(self, operator: Any) -> Array:
        """Return a cartesian transformation operator (2D or 3D), scale and mirroring included."""
        x = _direction(operator.Axis1, (1.0, 0.0, 0.0))
        flat = operator.is_a("IfcCartesianTransformationOperator2D")
        z = np.array([0.0, 0.0, 1.0]) if flat else _direction(operator.Axis3, (0.0, 0.0, 1.0))
        matrix = _matrix(x, z, self.point(operator.LocalOrigin))
        if operator.Axis2 is not None and matrix[:3, 1] @ _direction(operator.Axis2, (0.0, 1.0, 0.0)) < 0:
            matrix[:3, 1] *= -1.0
        scale = operator.Scale if operator.Scale is not None else 1.0
        second = getattr(operator, "Scale2", None)
        third = getattr(operator, "Scale3", None)
        scales = [scale, scale if second is None else second, scale if third is None else third]
        matrix[:3, :3] *= scales
        return matrix


def is_rigid(matrix: Array) -> bool:
    """Whether a transformation only moves and turns."""
    turn = matrix[:3, :3]
    return bool(np.allclose(turn @ turn.T, np.eye(3), atol=1e-9) and np.linalg.det(turn) > 0)


def _direction(direction: Any, default: tuple[float, float, float]) -> Array:
    if direction is None:
        return np.array(default)
    ratios = np.array([*direction.DirectionRatios, 0.0][:3], float)
    largest = np.abs(ratios).max()
    # Made small first, as the squares of absurd ratios are not finite.
    return unit(ratios / largest) if 1e-12 < largest < np.inf else np.array(default)


def _matrix(x: Array, z: Array, origin: Array) -> Array:
    """Build a matrix from a z axis and an x axis that need not be square to it."""
    along = x - (x @ z) * z
    if np.linalg.norm(along) < 1e-9:
        along = np.eye(3)[int(np.argmin(np.abs(z)))]
        along = along - (along @ z) * z
    x = unit(along)
    matrix = np.eye(4)
    matrix[:3, 0], matrix[:3, 1], matrix[:3, 2], matrix[:3, 3] = x, cross(z, x), z, origin
    return matrix
