"""What section is this outline? Measured with chords across it."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np
import shapely
from shapely import affinity

from ..model.sections import SectionDimensions
from ..model.units import Array, Mm

Span = tuple[Mm, Mm]


@dataclass(frozen=True, slots=True, eq=False)
class MeasuredSection:
    """Dimensions of an outline, the direction of its depth (2,) and the middle of its box (2,)."""

    dimensions: SectionDimensions
    depth: Array
    middle: Array


def measure_outline(outline: shapely.Polygon) -> MeasuredSection:
    """Measure a section's outline (mm); a shape that is none of the trade's comes back as "other"."""
    turn = _main_direction(outline)
    found = []
    for quarter in (0.0, 90.0, 180.0, 270.0):
        angle = turn + quarter
        upright = affinity.rotate(outline, -angle, origin=(0, 0))
        dimensions = _upright(upright)
        left, bottom, right, top = upright.bounds
        middle = _rotated(np.array([(left + right) / 2, (bottom + top) / 2]), angle)
        depth = _rotated(np.array([0.0, 1.0]), angle)
        found.append(MeasuredSection(dimensions, depth, middle))
        if dimensions.shape in ("I", "hollow_round", "round"):
            break
    return min(found, key=lambda each: (_RANK[each.dimensions.shape], -each.dimensions.h))


_RANK = {
    shape: rank
    for rank, shape in enumerate(
        ("I", "U", "T", "L", "hollow_rectangular", "hollow_round", "round", "rectangle", "other")
    )
}


def chord(outline: shapely.Polygon, along: int, at: Mm) -> list[Span]:
    """Return the spans that a straight line at x = `at` (along 1) or y = `at` (along 0) has inside."""
    low, high = outline.bounds[along] - 1.0, outline.bounds[along + 2] + 1.0
    ends = [(at, low), (at, high)] if along else [(low, at), (high, at)]
    cut = shapely.intersection(outline, shapely.LineString(ends))
    spans = [part.bounds[along::2] for part in shapely.get_parts(cut) if part.length > 0.01]
    return sorted((float(span[0]), float(span[1])) for span in spans)


def _main_direction(outline: shapely.Polygon) -> float:
    """Return the direction, modulo a right angle, in which most of the outline's length runs; degrees."""
    points = np.array(outline.exterior.coords)
    edges = np.diff(points, axis=0)
    lengths = np.hypot(*edges.T)
    angles = np.arctan2(edges[:, 1], edges[:, 0])
    return math.degrees(float(np.angle(np.sum(lengths**2 * np.exp(4j * angles)))) / 4.0)


def _rotated(vector: Array, degrees: float) -> Array:
    c, s = math.cos(math.radians(degrees)), math.sin(math.radians(degrees))
    return np.array([c * vector[0] - s * vector[1], s * vector[0] + c * vector[1]])


def _upright(outline: shapely.Polygon) -> SectionDimensions:
    left, bottom, right, top = outline.bounds
    b, h = right - left, top - bottom
    centre, half = (left + right) / 2, (bottom + top) / 2
    plain = SectionDimensions("other", h, b)
    round_one = _round(outline, b, h)
    if round_one:
        return round_one
    if outline.interiors:
        wall = chord(outline, 0, half)
        if len(wall) == 2:
            t = (wall[0][1] - wall[0][0] + wall[1][1] - wall[1][0]) / 2
            return SectionDimensions("hollow_rectangular", h, b, t, t)
        return plain
    if outline.area > 0.97 * b * h:
        return SectionDimensions("rectangle", h, b)
    across = chord(outline, 0, half)
    return _open_section(outline, across[0], (left, centre, right), h) if len(across) == 1 else plain


def _open_section(outline: shapely.Polygon, web: Span, width: tuple[Mm, Mm, Mm], h: Mm) -> SectionDimensions:
    """Tell I, U, T and L sections apart by where the web stands and which flanges go out from it."""
    left, centre, right = width
    b, tw = right - left, web[1] - web[0]
    bottom, top = outline.bounds[1], outline.bounds[3]
    plain = SectionDimensions("other", h, b)
    if tw > 0.6 * b or len(chord(outline, 1, (web[0] + web[1]) / 2)) != 1:
        return plain
    sides = [
        chord(outline, 1, (left + web[0]) / 2) if web[0] - left > 0.1 * b else [],
        chord(outline, 1, (right + web[1]) / 2) if right - web[1] > 0.1 * b else [],
    ]
    flanges = [[span[1] - span[0] for span in side] for side in sides]
    middle_web = abs((web[0] + web[1]) / 2 - centre) < 0.02 * b + 0.5
    thick = max((t for side in flanges for t in side), default=h) > 0.4 * h
    counts = () if thick else tuple(len(side) for side in sides)
    if counts == (2, 2) and middle_web:
        tf = (flanges[0][0] + flanges[0][1] + flanges[1][0] + flanges[1][1]) / 4
        return SectionDimensions("I", h, b, tw, tf, _root_radius(outline.area, h, b, (tw, tf), 4))
    if counts == (1, 1) and middle_web and sides[0][0][1] > top - 0.02 * h:
        tf = (flanges[0][0] + flanges[1][0]) / 2
        return SectionDimensions("T", h, b, tw, tf, _root_radius(outline.area, h, b, (tw, tf), 2))
    if counts == (0, 2):
        tf = (flanges[1][0] + flanges[1][1]) / 2
        return SectionDimensions("U", h, b, tw, tf, _root_radius(outline.area, h, b, (tw, tf), 2, 2))
    if counts == (0, 1) and sides[1][0][0] < bottom + 0.02 * h:
        return SectionDimensions("L", h, b, tw, flanges[1][0])
    return plain


def _root_radius(area: float, h: Mm, b: Mm, thickness: tuple[Mm, Mm], roots: int, flanges: int = 0) -> Mm | None:
    """Return the root radius that makes up the area the plates alone lack; each root adds (1 − π/4) r²."""
    tw, tf = thickness
    count = flanges or (2 if roots == 4 else 1)
    excess = area - (count * b * tf + (h - count * tf) * tw)
    radius = math.sqrt(max(excess, 0.0) / (roots * (1 - math.pi / 4)))
    return radius if radius > 1.0 else None


def _round(outline: shapely.Polygon, b: Mm, h: Mm) -> SectionDimensions | None:
    """Recognise a circle or a tube, faceted or not: every corner lies on one circle."""
    points = np.array(outline.exterior.coords)
    if abs(b - h) > 0.05 * h or len(points) < 13:
        return None
    middle = np.array(outline.exterior.centroid.coords)[0]
    radii = np.linalg.norm(points - middle, axis=1)
    if np.ptp(radii) > 0.02 * radii.max():
        return None
    d = 2 * float(radii.max())
    if not outline.interiors:
        return SectionDimensions("round", d, d)
    inner = np.linalg.norm(np.array(outline.interiors[0].coords) - middle, axis=1)
    t = d / 2 - float(inner.max())
    return SectionDimensions("hollow_round", d, d, t, t)
