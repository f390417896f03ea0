"""What section is this outline? Measured with chords across it."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np
import shapely
from shapely import affinity

from ..model.joints import SectionShape
from ..model.sections import SectionDimensions
from ..model.units import Array, Mm

Span = tuple[Mm, Mm]

ALIKE: Mm = 0.3
"""Thicknesses and radii that differ by less are one figure."""

THICKNESS_AT_I, THICKNESS_AT_U = 0.25, 0.5
"""Where tapered flanges have their nominal thickness, as a share of the width from the tip (from memory)."""

TAPER = 0.002
"""Flanges are parallel if their thickness grows by less than this share of the width over a twentieth of it."""

ON_FACE: Mm = 0.02
"""A corner this near to the web's face lies on it; the next corner of a finely faceted fillet does not."""


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
    middle_web = abs((web[0] + web[1]) / 2 - centre) < 0.02 * b + 0.5
    from_tip = b * (THICKNESS_AT_I if middle_web else THICKNESS_AT_U)
    sides = _flanges_at(outline, web, from_tip)
    thick = max((span[1] - span[0] for side in sides for span in side), default=h) > 0.4 * h
    counts = () if thick else tuple(len(side) for side in sides)
    if counts == (2, 2) and middle_web:
        return _with_flanges("I", outline, web, from_tip)
    if counts == (1, 1) and middle_web and sides[0][0][1] > top - 0.02 * h:
        return _with_flanges("T", outline, web, from_tip)
    if counts == (0, 2):
        return _with_flanges("U", outline, web, from_tip)
    if counts == (0, 1) and sides[1][0][0] < bottom + 0.02 * h:
        return _with_flanges("L", outline, web, from_tip)
    return plain


def _with_flanges(shape: SectionShape, outline: shapely.Polygon, web: Span, from_tip: Mm) -> SectionDimensions:
    """Return the dimensions; flanges of two thicknesses leave `tf` unknown, tapered ones and unlike fillets `r`."""
    left, bottom, right, top = outline.bounds
    b = right - left
    here, inwards = (_flanges_at(outline, web, from_tip + shift) for shift in (0.0, 0.05 * b))
    thicknesses, deeper = (np.array([top - low for side in sides for low, top in side]) for sides in (here, inwards))
    parallel = len(deeper) == len(thicknesses) and float(np.abs(deeper - thicknesses).max()) < TAPER * b
    tf = float(np.mean(thicknesses)) if np.ptp(thicknesses) < ALIKE else None
    r = _root_radius(outline, web, here) if parallel else None
    return SectionDimensions(shape, top - bottom, b, web[1] - web[0], tf, r)


def _flanges_at(outline: shapely.Polygon, web: Span, from_tip: Mm) -> list[list[Span]]:
    """Return the flanges' spans left and right of the web, cut at a distance from their tips."""
    left, _, right, _ = outline.bounds
    stands_out = 0.1 * (right - left)
    return [
        chord(outline, 1, left + from_tip) if web[0] - left > stands_out else [],
        chord(outline, 1, right - from_tip) if right - web[1] > stands_out else [],
    ]


def _root_radius(outline: shapely.Polygon, web: Span, sides: list[list[Span]]) -> Mm | None:
    """Return the root fillets' radius: from where the web's flat face ends to the flange, the same at every root.

    The corners of a faceted fillet lie on the true arc, and its tangent point is one of them; the area of a
    faceted fillet is larger than the true one, so that the radius cannot be had from the area.
    """
    points = np.array(outline.exterior.coords)
    middle = (outline.bounds[1] + outline.bounds[3]) / 2
    found = []
    for face, side in zip(web, sides, strict=True):
        flat = points[np.abs(points[:, 0] - face) < ON_FACE, 1]
        for low, high in side:
            upper = low > middle
            inner = low if upper else high
            reach = flat[flat < inner + ON_FACE] if upper else flat[flat > inner - ON_FACE]
            found.append(abs(inner - (reach.max() if upper else reach.min())) if len(reach) else 0.0)
    radius = float(np.mean(found))
    return radius if radius > 1.0 and np.ptp(found) < ALIKE else None


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
