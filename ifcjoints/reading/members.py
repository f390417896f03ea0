"""Is this solid a member? Its axis is where most of its edges run; its section is cut across that."""

from __future__ import annotations

import numpy as np
import shapely

from ..model.geometry import Frame, Solid, unit
from ..model.parts import MemberShape
from ..model.units import Array
from .bodies import Piece, Sweep
from .cuts import cut_area
from .section_outlines import measure_outline

STATIONS = (0.5, 0.25, 0.75, 0.1, 0.9)
"""Where along a body its section is looked for; copes and holes take from some of them."""

SLENDER = 0.5
"""A member is at least this many times as long as the lesser side of its section."""


def as_member(piece: Piece) -> MemberShape | None:
    """Return the piece as a member in its own axes, or None."""
    sweep = piece.sweep or piece.cut_from
    if sweep is not None and sweep.profile.dimensions is not None:
        return _stated(piece.solid, sweep)
    axis = _long_axis(piece.solid)
    return _measured(piece.solid, axis) if axis is not None else None


def _stated(solid: Solid, sweep: Sweep) -> MemberShape | None:
    """Read a member from an extruded parametric profile; clippings may have moved its ends."""
    section = sweep.profile.dimensions
    own = sweep.plane if sweep.profile.placed is None else sweep.plane @ sweep.profile.placed
    axis = unit(sweep.along)
    low, high = solid.extent(axis)
    if section is None or section.shape == "rectangle" or high - low < SLENDER * min(section.h, section.b):
        return None
    start = own[:3, 3] + (low - own[:3, 3] @ axis) * axis
    return MemberShape(start, axis, unit(own[:3, 1]), high - low, section, stated=True)


def _long_axis(solid: Solid) -> Array | None:
    """Return, of the directions that most edges run in, the one that the fewest faces stand across."""
    edges = solid.vertices[solid.next_corner] - solid.vertices[solid.corners]
    lengths = np.linalg.norm(edges, axis=1)
    longest = np.argsort(-lengths)[:64]
    directions = edges[longest] / np.maximum(lengths[longest], 1e-9)[:, None]
    alike = np.abs(directions @ directions.T) > 0.9999
    weights = alike @ lengths[longest]
    candidates: list[Array] = []
    while len(candidates) < 3 and weights.max(initial=0.0) > 0:
        best = int(np.argmax(weights))
        candidates.append(directions[best])
        weights[alike[best]] = 0.0
    across = [float(np.abs(solid.area_vectors @ direction).sum()) for direction in candidates]
    return candidates[int(np.argmin(across))] if candidates else None


def _measured(solid: Solid, axis: Array) -> MemberShape | None:
    low, high = solid.extent(axis)
    outline, frame = _fullest_cut(solid, axis, low, high)
    if outline is None:
        return None
    measured = measure_outline(outline)
    section = measured.dimensions
    if section.shape == "rectangle" or high - low < SLENDER * min(section.h, section.b):
        return None
    if solid.volume < 0.4 * outline.area * (high - low):
        return None
    start = frame.to_world(measured.middle)
    start = start + (low - start @ axis) * axis
    depth = measured.depth @ frame.axes[:2]
    return MemberShape(start, axis, depth, high - low, section, stated=False)


def _fullest_cut(solid: Solid, axis: Array, low: float, high: float) -> tuple[shapely.Polygon | None, Frame]:
    """Cut at several stations; return the cut with the greatest area that is one piece."""
    best: shapely.Polygon | None = None
    frame = Frame.from_z(np.zeros(3), axis)
    chosen = frame
    for share in STATIONS:
        there = Frame(axis * (low + (high - low) * (share + 1e-4)), frame.axes)
        area = cut_area(solid, there)
        if isinstance(area, shapely.Polygon) and not area.is_empty and (best is None or area.area > best.area * 1.001):
            best, chosen = area, there
    return best, chosen
