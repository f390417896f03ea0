"""Is this solid a plate? Its shape decides: two parallel faces with the whole body between them."""

from __future__ import annotations

import numpy as np
import shapely

from ..model.geometry import Frame, Indices, Prism, Solid
from ..model.units import Array, Mm

PARALLEL = 0.9999
SQUARE = 0.02
"""A plate's edge is square to its faces within this cosine."""

FULLNESS = 0.85
"""The least share of outline × thickness that the body fills (bevelled edges take some away)."""

SLENDERNESS = 0.7
"""The most that a plate's thickness may be of its lesser side."""

SOLIDITY = 0.42
"""What fills this share of its bounding rectangle is a plate; what fills less may be a piece of a rolled section."""

THIN: Mm = 12.0
"""Thinner than this, a plate may have any outline."""


def as_plate(solid: Solid) -> Prism | None:
    """Return the solid as a plate, or None. The broadest faces that fit bound the least thickness."""
    for normal in _broad_normals(solid):
        prism = _between_faces(solid, normal)
        if prism is not None and _looks_like_plate(prism):
            return prism
    return None


def _broad_normals(solid: Solid) -> list[Array]:
    """Return the normals of the three directions with the most face area."""
    left = solid.areas.copy()
    normals: list[Array] = []
    while len(normals) < 3 and left.max() > 1e-6:
        normal = solid.normals[int(np.argmax(left))]
        normals.append(normal)
        left[np.abs(solid.normals @ normal) > PARALLEL] = 0.0
    return normals


def _between_faces(solid: Solid, normal: Array) -> Prism | None:
    low, high = solid.extent(normal)
    thickness = high - low
    if thickness < 1.0:
        return None
    level = max(0.05, 0.005 * thickness)
    facing = np.abs(solid.normals @ normal) > PARALLEL
    height = np.where(solid.normals @ normal > 0, solid.offsets, -solid.offsets)
    caps = [np.flatnonzero(facing & (np.abs(height - end) < level)) for end in (low, high)]
    areas = [float(solid.areas[cap].sum()) for cap in caps]
    if solid.is_open:
        full = max(areas) > 0 and _stands_between(solid, normal, (low, high), level)
    else:
        full = min(areas) > 0 and solid.volume >= FULLNESS * max(areas) * thickness
    if not full:
        return None
    cap = caps[int(areas[1] > areas[0])]
    frame = Frame.from_z(low * normal, normal)
    rings = _outline(solid, cap, frame)
    return Prism(frame, rings[0], tuple(rings[1:]), thickness) if rings else None


def _stands_between(solid: Solid, normal: Array, ends: tuple[Mm, Mm], level: Mm) -> bool:
    """Whether an open shell is what is left of a plate: all corners on the two ends, the faces square."""
    heights = solid.vertices @ normal
    on_end = np.minimum(np.abs(heights - ends[0]), np.abs(heights - ends[1])) < level
    facing = np.abs(solid.normals @ normal)
    square = (facing > PARALLEL) | (facing < SQUARE) | (solid.areas < 1e-6)
    return bool(on_end.all() and square.all())


def _outline(solid: Solid, faces: Indices, frame: Frame) -> list[Array]:
    """Return the rings of a cap, the outside first; a cap in several faces is joined."""
    flat = frame.to_local(solid.vertices)[:, :2]
    loops = [_face_loops(solid, flat, int(face)) for face in faces]
    if len(loops) == 1:
        return loops[0]
    whole = shapely.union_all([shapely.Polygon(rings[0], rings[1:]).buffer(0) for rings in loops])
    if not isinstance(whole, shapely.Polygon) or whole.is_empty:
        return []
    return [np.array(ring.coords)[:-1] for ring in (whole.exterior, *whole.interiors)]


def _face_loops(solid: Solid, flat: Array, face: int) -> list[Array]:
    ends = np.append(solid.loop_start[1:], len(solid.corners))
    chosen = np.flatnonzero(solid.loop_face == face)
    return [flat[solid.corners[solid.loop_start[loop] : ends[loop]]] for loop in chosen]


def _looks_like_plate(prism: Prism) -> bool:
    outline = shapely.Polygon(prism.outline)
    box = np.array(shapely.oriented_envelope(outline).exterior.coords)
    sides = np.linalg.norm(np.diff(box[:3], axis=0), axis=1)
    if prism.thickness > SLENDERNESS * sides.min():
        return False
    if prism.thickness <= THIN or outline.area > SOLIDITY * sides[0] * sides[1]:
        return True
    # An angle or a frame cut from thick plate is still wider than thick; a short piece of a rolled section is not.
    return not outline.buffer(-0.5 * prism.thickness).is_empty
