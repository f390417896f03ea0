"""The bolts that bodies show. A shape is measured once, whether bolts share it or each has its own copy."""

from __future__ import annotations

import numpy as np

from ..model.units import Array
from .axial import BoltBody, are_loose_parts, bolts_of
from .bodies import Piece, PlacedPiece
from .turned import turned_bodies

COPY = 2
"""Decimals of a mm to which copies of a shape are alike."""

Measured = tuple[list[BoltBody], bool]
"""The bolts, and whether there is nothing but loose nuts and washers."""


class BoltShapes:
    """Measures bolts and remembers their shapes."""

    def __init__(self) -> None:
        self._shared: dict[tuple[tuple[Piece, bytes], ...], Measured] = {}
        self._copies: dict[tuple[bytes, ...], tuple[Measured, Array]] = {}

    def measured(self, pieces: list[PlacedPiece]) -> Measured:
        """Return the bolts of an element's pieces, in the axes the pieces are in."""
        key = tuple((placed.piece, placed.matrix.tobytes()) for placed in pieces)
        if key not in self._shared:
            self._shared[key] = self._from_copy(pieces) if pieces else ([], False)
        return self._shared[key]

    def _from_copy(self, pieces: list[PlacedPiece]) -> Measured:
        """Return the bolts of a shape that may have been measured at another place."""
        solids = [placed.in_world() for placed in pieces]
        origin = solids[0].vertices[0]
        # Adding zero turns −0 into 0, whose bytes are others.
        corners = [(np.round(solid.vertices - origin, COPY) + 0.0).tobytes() for solid in solids]
        faces = [solid.corners.tobytes() + solid.loop_start.tobytes() for solid in solids]
        key = (*corners, *faces, repr([_circle(placed) for placed in pieces]).encode())
        if key not in self._copies:
            bodies = turned_bodies(pieces)
            self._copies[key] = (bolts_of(bodies), are_loose_parts(bodies)), origin
        (bolts, loose), there = self._copies[key]
        shift = np.eye(4)
        shift[:3, 3] = origin - there
        return [bolt.moved(shift) for bolt in bolts], loose


def _circle(placed: PlacedPiece) -> float | None:
    """Return the radius of an extruded circle, which is exact where a polygon's is not."""
    sweep = placed.piece.sweep
    return sweep.profile.radius if sweep is not None else None
