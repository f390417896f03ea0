"""Is this body a member? Its axis is where most of its edges run; its section is cut across that."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace

import numpy as np
import shapely

from ..model.geometry import Frame, Solid, unit
from ..model.parts import MemberShape
from ..model.units import Array, Mm
from .bodies import Piece, Sweep
from .cuts import Area, cut_area
from .section_outlines import MeasuredSection, measure_outline

STATIONS = (0.5, 0.25, 0.75, 0.1, 0.9)
"""Where along a body its section is looked for; copes and holes take from some of them."""

BUILT_UP = ("I", "U", "T", "hollow_rectangular")

SEAM: Mm = 0.05
"""Plates of a built-up section that are nearer than twice this touch."""

TIE: Mm = 1.0
"""Two ends this equally far from the origin are told apart by the axis's direction instead."""

SLENDER = 0.5
"""A member is at least this many times as long as the lesser side of its section."""


def as_member(piece: Piece) -> MemberShape | None:
    """Return the piece as a member in its own axes, or None."""
    sweep = piece.sweep or piece.cut_from
    if sweep is not None and sweep.profile.dimensions is not None:
        return _stated(piece.solid, sweep)
    axis = _long_axis(piece.solid)
    return _measured([piece.solid], axis) if axis is not None else None


def as_built_up(solids: Sequence[Solid]) -> MemberShape | None:
    """Return web and flanges, given as solids of their own, as one member; None if they make no section."""
    axis = _long_axis(max(solids, key=lambda solid: solid.volume))
    member = _measured(solids, axis) if axis is not None else None
    return member if member is not None and member.section.shape in BUILT_UP else None


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


def _measured(solids: Sequence[Solid], axis: Array) -> MemberShape | None:
    """Measure a member; a tapered one a second time, square to the axis that the first time found."""
    member = _measured_along(solids, axis)
    if member is not None and member.axis @ axis < 1 - 1e-9:
        member = _measured_along(solids, member.axis)
    return member and _headed(member)


def _headed(member: MemberShape) -> MemberShape:
    """Let a measured member start at the end nearer to its element's own origin, its depth along its own axes.

    A body without a stated axis would else start at either end, as the last digit of an area decides.
    """
    end = member.start + member.axis * member.length
    nearer = float(np.linalg.norm(member.start) - np.linalg.norm(end))
    turned = nearer > TIE if abs(nearer) > TIE else not _points_up(member.axis)
    start, axis = (end, -member.axis) if turned else (member.start, member.axis)
    depth = member.depth if _points_up(member.depth) else -member.depth
    return replace(member, start=start, axis=axis, depth=depth)


def _points_up(vector: Array) -> bool:
    """Whether a vector's greatest component is positive."""
    return bool(vector[int(np.argmax(np.round(np.abs(vector), 6)))] > 0)


def _measured_along(solids: Sequence[Solid], axis: Array) -> MemberShape | None:
    extents = [solid.extent(axis) for solid in solids]
    low, high = min(extent[0] for extent in extents), max(extent[1] for extent in extents)
    frame = Frame.from_z(np.zeros(3), axis)
    cuts = {share: _cut(solids, frame, low + (high - low) * (share + 1e-4)) for share in STATIONS}
    whole = {share: area for share, area in cuts.items() if isinstance(area, shapely.Polygon) and not area.is_empty}
    if not whole:
        return None
    outline = _fullest(whole)
    measured = measure_outline(outline)
    section = measured.dimensions
    if section.shape == "rectangle" or high - low < SLENDER * min(section.h, section.b):
        return None
    if sum(solid.volume for solid in solids) < 0.4 * outline.area * (high - low):
        return None
    middle, run = _middle_line(whole, measured, frame, high - low)
    depth = measured.depth @ frame.axes[:2]
    start = frame.to_world(middle) + (low - frame.to_world(middle) @ axis) * axis
    if run is None:
        return MemberShape(start, axis, depth, high - low, section, stated=False)
    upright = unit(depth - (depth @ run) * run)
    return MemberShape(start, run, upright, (high - low) / float(run @ axis), section, stated=False)


def _cut(solids: Sequence[Solid], frame: Frame, height: Mm) -> Area:
    there = Frame(frame.axes[2] * height, frame.axes)
    areas = [cut_area(solid, there) for solid in solids]
    return areas[0] if len(areas) == 1 else shapely.union_all([area.buffer(SEAM) for area in areas]).buffer(-SEAM)


def _fullest(cuts: dict[float, shapely.Polygon]) -> shapely.Polygon:
    """Return the cut with the greatest area; of nearly equal ones the first."""
    best = next(iter(cuts.values()))
    for area in cuts.values():
        if area.area > best.area * 1.001:
            best = area
    return best


def _middle_line(
    cuts: dict[float, shapely.Polygon], measured: MeasuredSection, frame: Frame, length: Mm
) -> tuple[Array, Array | None]:
    """Return where the member's axis begins (in the cutting plane), and its way if the member is tapered.

    A tapered member's axis runs through the middles of its sections, on a slope to its edges.
    """
    ends = [cuts[share] for share in (min(STATIONS), max(STATIONS)) if share in cuts]
    if measured.dimensions.shape != "I" or len(ends) < 2 or abs(ends[0].area - ends[1].area) < 1e-3 * ends[0].area:
        return measured.middle, None
    one, other = (measure_outline(end) for end in ends)
    told = [(each.dimensions.shape, each.dimensions.tw, each.dimensions.b) for each in (one, other)]
    if told[0][0] != told[1][0] or not np.allclose(told[0][1:], told[1][1:], atol=0.5):  # type: ignore[arg-type]
        return measured.middle, None
    slope = (other.middle - one.middle) / ((max(STATIONS) - min(STATIONS)) * length)
    middle: Array = one.middle - slope * min(STATIONS) * length
    return middle, unit(frame.axes[2] + slope @ frame.axes[:2])
