"""Holes: openings that void a part, and rings cut into a plate's outline."""

from __future__ import annotations

import numpy as np
import shapely

from ..model.geometry import Frame, Prism, unit
from ..model.parts import Hole
from ..model.units import Array
from .bodies import PlacedPiece
from .turned import as_turned


def holes_in_plate(plate: Prism) -> list[Hole]:
    """Return the holes of a plate's outline."""
    return [_from_ring(ring, plate.frame, plate.thickness) for ring in plate.holes]


def hole_from_opening(placed: PlacedPiece) -> Hole | None:
    """Return an opening's solid as a hole, or None for one that is no drilled hole or slot."""
    turned = as_turned(placed)
    if turned is not None:
        step = max(turned.steps, key=lambda step: step.length)
        centre = turned.point + turned.direction * (step.low + step.high) / 2
        return Hole(centre, turned.direction, 2 * step.radius)
    sweep = placed.piece.sweep
    if sweep is None:
        return None
    plane = placed.matrix @ sweep.plane
    frame = Frame(plane[:3, 3], plane[:3, :3].T)
    along = placed.matrix[:3, :3] @ sweep.along
    hole = _from_ring(sweep.profile.rings[0], frame, 0.0)
    return Hole(hole.centre + along / 2, unit(along), hole.diameter, hole.slot)


def _from_ring(ring: Array, frame: Frame, thickness: float) -> Hole:
    box = np.array(shapely.oriented_envelope(shapely.Polygon(ring)).exterior.coords)
    sides = np.sort(np.linalg.norm(np.diff(box[:3], axis=0), axis=1))
    middle = box[:4].mean(axis=0)
    centre = frame.to_world(np.array([*middle, thickness / 2]))
    radii = np.linalg.norm(ring - ring.mean(axis=0), axis=1)
    if np.ptp(radii) < 0.05 * radii.max():
        return Hole(centre, frame.axes[2], 2 * float(radii.max()))
    return Hole(centre, frame.axes[2], float(sides[0]), float(sides[1] - sides[0]))
