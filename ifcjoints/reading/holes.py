"""Holes: openings that void a part, and holes already cut into its body."""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np
import shapely

from ..model.geometry import Frame, Solid, unit
from ..model.parts import Hole
from ..model.units import Array, Mm
from .bodies import Piece, PlacedPiece
from .faces import face_frame, face_rings, plane_areas, with_inner_loops
from .turned import as_turned

WIDEST_HOLE: Mm = 60.0
"""What is wider is no bolt hole but a cope or a cut-out (M42 in its hole is 45 mm)."""

ROUNDNESS = 0.05
"""The distances of a round hole's corners from its centre differ by less than this share."""

EVEN = 0.002
"""About their mean the corners of a regular polygon differ by no more than this (rounding in the file)."""

PENTAGON = 0.8
"""A round hole's sides lie at least this share of its radius out (a pentagon's at 0.809, a square's at 0.707)."""

SLOT_AREA = 0.15
"""A slot's area may differ by this share of its width squared from that of a slot with round ends (facets)."""

IN_LINE: Mm = 0.5
"""The two rims of one hole lie this near to one axis, and their sizes within it."""


def with_holes_seen(piece: Piece) -> Piece:
    """Return a piece whose holes are inner loops of its faces. Most are so already, all plain extrusions are."""
    if piece.sweep is not None:
        ring = np.round(piece.sweep.profile.rings[0], 3)
        if len(np.unique(ring, axis=0)) == len(ring):
            return piece
    whole = with_inner_loops(piece.solid)
    return piece if whole is piece.solid else Piece(whole, piece.sweep, piece.cut_from)


def holes_in_solid(solid: Solid) -> list[Hole]:
    """Return the holes cut into a body's plane faces: a plate's, a flange's, a web's. Two rims are one hole."""
    rims = []
    for face in np.unique(solid.loop_face[~solid.is_outer]):
        frame = face_frame(solid, int(face))
        rings = face_rings(solid, frame.to_local(solid.vertices)[:, :2], int(face))
        rims += [hole for ring in rings[1:] if (hole := _drilled(ring, frame)) is not None]
    return _through(rims)


def hole_from_opening(placed: PlacedPiece) -> Hole | None:
    """Return an opening's solid as a hole, or None for one that is no drilled hole or slot."""
    turned = as_turned(placed)
    step = min(turned.steps, key=lambda step: step.radius) if turned is not None else None
    if turned is not None and step is not None and step.flat > PENTAGON * step.radius:
        centre = turned.point + turned.direction * (turned.steps[0].low + turned.steps[-1].high) / 2
        return Hole(centre, turned.direction, 2 * step.radius) if 2 * step.radius <= WIDEST_HOLE else None
    sweep = placed.piece.sweep
    if sweep is None:
        return next(iter(_through([hole for hole in _ends(placed.in_world()) if hole.slot])), None)
    plane = placed.matrix @ sweep.plane
    along = placed.matrix[:3, :3] @ sweep.along
    hole = _drilled(sweep.profile.rings[0], Frame(plane[:3, 3], plane[:3, :3].T))
    return hole and Hole(hole.centre + along / 2, unit(along), hole.diameter, hole.slot)


def _drilled(ring: Array, frame: Frame) -> Hole | None:
    """Return a ring (k, 2) of a plane as a round hole or a slot; None for a cut-out of any other form."""
    circle = _round(ring, ring.mean(axis=0), frame, EVEN)
    if circle is not None:
        return circle
    ring = _corners(ring)
    outline = shapely.Polygon(ring)
    centre = shapely.minimum_bounding_circle(outline).centroid
    circle = _round(ring, np.array([centre.x, centre.y]), frame, ROUNDNESS)
    if circle is not None:
        return circle
    box = np.array(shapely.oriented_envelope(outline).exterior.coords)
    width, length = np.sort(np.linalg.norm(np.diff(box[:3], axis=0), axis=1)).tolist()
    slot_area = width * (length - width) + np.pi / 4 * width**2
    if abs(outline.area - slot_area) > SLOT_AREA * width**2:
        return None
    return _no_wider(Hole(frame.to_world(box[:4].mean(axis=0)), frame.axes[2], width, length - width))


def _round(ring: Array, middle: Array, frame: Frame, share: float) -> Hole | None:
    """Return a ring as a round hole about a middle, or None if its corners do not lie alike about it."""
    radii = np.hypot(*(ring - middle).T)
    widest = float(radii.max())
    if len(ring) < 5 or widest - radii.min() > share * widest:
        return None
    return _no_wider(Hole(frame.to_world(middle), frame.axes[2], 2 * widest))


def _corners(ring: Array) -> Array:
    """Leave out the points of a ring that lie on its straight sides."""
    before, after = ring - np.roll(ring, 1, axis=0), np.roll(ring, -1, axis=0) - ring
    bend = np.abs(before[:, 0] * after[:, 1] - before[:, 1] * after[:, 0])
    corners: Array = ring[bend > 1e-3 * np.linalg.norm(before, axis=1) * np.linalg.norm(after, axis=1)]
    return corners if len(corners) >= 3 else ring


def _no_wider(hole: Hole) -> Hole | None:
    return hole if hole.diameter <= WIDEST_HOLE else None


def _through(rims: list[Hole]) -> list[Hole]:
    """Join the two rims of each hole: those on one axis that are nearest to one another."""
    if not rims:
        return []
    centres, directions = np.array([rim.centre for rim in rims]), np.array([rim.direction for rim in rims])
    sizes = np.array([(rim.diameter, rim.slot) for rim in rims])
    free = np.ones(len(rims), bool)
    holes = []
    for number, rim in enumerate(rims):
        if not free[number]:
            continue
        free[number] = False
        away = centres - rim.centre
        along = away @ rim.direction
        off = (away * away).sum(axis=1) - along * along
        other = free & (off < IN_LINE**2) & (np.abs(directions @ rim.direction) > 0.999)
        other &= np.abs(sizes - sizes[number]).max(axis=1) < IN_LINE
        centre = rim.centre
        if other.any():
            nearest = int(np.argmin(np.where(other, np.abs(along), np.inf)))
            free[nearest] = False
            centre = (centre + centres[nearest]) / 2
        holes.append(Hole(centre, rim.direction, rim.diameter, rim.slot))
    return holes


def _ends(solid: Solid) -> Iterator[Hole]:
    """Yield the ends of an opening's body that are outlines of holes."""
    for area, frame in plane_areas(solid):
        if isinstance(area, shapely.Polygon) and len(area.exterior.coords) > 6:
            hole = _drilled(np.array(area.exterior.coords)[:-1], frame)
            yield from [hole] if hole else []
