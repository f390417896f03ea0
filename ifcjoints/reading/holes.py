"""Holes: openings that void a part, and holes already cut into its body."""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np
import numpy.typing as npt
import shapely

from ..model.geometry import Frame, Indices, Solid, unit
from ..model.parts import Hole
from ..model.units import Array, Mm
from .bodies import PlacedPiece
from .turned import as_turned

WIDEST_HOLE: Mm = 60.0
"""What is wider is no bolt hole but a cope or a cut-out (M42 in its hole is 45 mm)."""

ROUNDNESS = 0.05
"""The distances of a round hole's corners from its centre differ by less than this share."""

SLOT_AREA = 0.15
"""A slot's area may differ by this share of its width squared from that of a slot with round ends (facets)."""

IN_LINE: Mm = 0.5
"""The two rims of one hole lie this near to one axis, and their sizes within it."""

FLAT = 1e-5
"""Triangles whose normals' product falls short of one by less than this lie in one plane."""


def holes_in_solid(solid: Solid) -> list[Hole]:
    """Return the holes cut into a body's plane faces: a plate's, a flange's, a web's. Two rims are one hole."""
    rims = []
    for polygon, frame in _faces_with_holes(solid):
        rings = [np.array(ring.coords)[:-1] for ring in polygon.interiors]
        rims += [hole for ring in rings if (hole := _drilled(ring, frame)) is not None]
    return _through(rims)


def hole_from_opening(placed: PlacedPiece) -> Hole | None:
    """Return an opening's solid as a hole, or None for one that is no drilled hole or slot."""
    turned = as_turned(placed)
    if turned is not None:
        step = min(turned.steps, key=lambda step: step.radius)
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
    outline = shapely.Polygon(ring)
    circle = shapely.minimum_bounding_circle(outline).centroid
    middle = np.array([circle.x, circle.y])
    radii = np.linalg.norm(ring - middle, axis=1)
    if len(ring) >= 5 and np.ptp(radii) < ROUNDNESS * radii.max():
        return _no_wider(Hole(frame.to_world(middle), frame.axes[2], 2 * float(radii.max())))
    box = np.array(shapely.oriented_envelope(outline).exterior.coords)
    width, length = np.sort(np.linalg.norm(np.diff(box[:3], axis=0), axis=1)).tolist()
    slot_area = width * (length - width) + np.pi / 4 * width**2
    if abs(outline.area - slot_area) > SLOT_AREA * width**2:
        return None
    return _no_wider(Hole(frame.to_world(box[:4].mean(axis=0)), frame.axes[2], width, length - width))


def _no_wider(hole: Hole) -> Hole | None:
    return hole if hole.diameter <= WIDEST_HOLE else None


def _through(rims: list[Hole]) -> list[Hole]:
    """Join the two rims of each hole: those on one axis that are nearest to one another."""
    holes = []
    left = list(rims)
    while left:
        rim = left.pop(0)
        other = min((each for each in left if _in_line(rim, each)), key=lambda each: _apart(rim, each), default=None)
        if other is not None:
            left = [each for each in left if each is not other]
            rim = Hole((rim.centre + other.centre) / 2, rim.direction, rim.diameter, rim.slot)
        holes.append(rim)
    return holes


def _in_line(rim: Hole, other: Hole) -> bool:
    away = other.centre - rim.centre
    off = np.linalg.norm(away - (away @ rim.direction) * rim.direction)
    sizes = max(abs(rim.diameter - other.diameter), abs(rim.slot - other.slot))
    return bool(abs(rim.direction @ other.direction) > 0.999 and off < IN_LINE and sizes < IN_LINE)


def _apart(rim: Hole, other: Hole) -> Mm:
    return float(np.linalg.norm(other.centre - rim.centre))


def _faces_with_holes(solid: Solid) -> Iterator[tuple[shapely.Polygon, Frame]]:
    """Yield the plane faces that have holes, each in its own frame; faces that make up one plane are joined."""
    label = _in_one_plane(solid)
    faces = np.bincount(label, minlength=len(label))
    loops = np.bincount(solid.loop_face)
    slit = solid.loop_face[_twice_through_a_corner(solid)]
    worth = np.unique(label[np.concatenate([np.flatnonzero((faces[label] > 1) | (loops > 1)), slit])])
    for name in worth:
        whole, frame = _joined(solid, np.flatnonzero(label == name))
        yield from ((polygon, frame) for polygon in shapely.get_parts(whole) if len(polygon.interiors))


def _ends(solid: Solid) -> Iterator[Hole]:
    """Yield the ends of an opening's body that are outlines of holes."""
    label = _in_one_plane(solid)
    for name in np.unique(label):
        whole, frame = _joined(solid, np.flatnonzero(label == name))
        if isinstance(whole, shapely.Polygon) and len(whole.exterior.coords) > 6:
            hole = _drilled(np.array(whole.exterior.coords)[:-1], frame)
            yield from [hole] if hole else []


def _joined(solid: Solid, faces: Indices) -> tuple[shapely.Geometry, Frame]:
    """Return faces of one plane as one area, and the plane's frame. A slit that leads to a hole is closed."""
    ends = np.append(solid.loop_start[1:], len(solid.corners))
    frame = Frame.from_z(
        solid.vertices[solid.corners[solid.loop_start[solid.loop_face == faces[0]][0]]], solid.normals[faces[0]]
    )
    flat = frame.to_local(solid.vertices)[:, :2]
    rings = [
        [flat[solid.corners[solid.loop_start[k] : ends[k]]] for k in np.flatnonzero(solid.loop_face == face)]
        for face in faces
    ]
    return shapely.union_all([shapely.Polygon(each[0], each[1:]).buffer(0) for each in rings]), frame


def _twice_through_a_corner(solid: Solid) -> npt.NDArray[np.bool_]:
    """Return which loops pass a corner twice, as those do that reach their holes through a slit."""
    passed = np.unique(np.column_stack([solid.corner_loop, solid.corners]), axis=0)[:, 0]
    count = len(solid.loop_start)
    twice: npt.NDArray[np.bool_] = np.bincount(solid.corner_loop, minlength=count) > np.bincount(
        passed, minlength=count
    )
    return twice


def _in_one_plane(solid: Solid) -> Indices:
    """Label faces, so that those joined by an edge within one plane have one label."""
    welded = np.unique(np.round(solid.vertices, 3), axis=0, return_inverse=True)[1].reshape(-1)
    edges = np.sort(np.column_stack([welded[solid.corners], welded[solid.next_corner]]), axis=1)
    order = np.lexsort(edges.T)
    same = (np.diff(edges[order], axis=0) == 0).all(axis=1)
    a, b = solid.corner_face[order[:-1][same]], solid.corner_face[order[1:][same]]
    flat = np.abs(np.einsum("ij,ij->i", solid.normals[a], solid.normals[b])) > 1 - FLAT
    a, b = a[flat], b[flat]
    label = np.arange(len(solid.areas))
    before = np.full_like(label, -1)
    while not np.array_equal(label, before):
        before = label.copy()
        lowest = np.minimum(label[a], label[b])
        np.minimum.at(label, a, lowest)
        np.minimum.at(label, b, lowest)
        label = label[label]
    return label
