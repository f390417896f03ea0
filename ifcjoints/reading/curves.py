"""Closed plane curves as rings of points in mm; arcs become chords."""

from __future__ import annotations

import math
from typing import Any

import numpy as np

from ..model.units import Array
from .placements import Placements
from .unreadable import Unreadable

ARC_STEP = math.radians(15.0)
"""The angle that one chord of an arc spans."""


def ring(curve: Any, placements: Placements, angle_unit: float) -> Array:
    """Return a closed curve's points (k, 2) in mm, the first not repeated at the end."""
    points = _points(curve, placements, angle_unit)
    kept = [point for point, before in zip(points, [points[-1], *points], strict=False) if _apart(point, before)]
    if len(kept) < 3:
        raise Unreadable("a profile's outline has fewer than three corners")
    return np.array(kept)


def arc(centre: Array, radius: float, start: float, sweep: float) -> list[Array]:
    """Return points on an arc, both ends included."""
    steps = max(1, math.ceil(abs(sweep) / ARC_STEP))
    angles = start + np.linspace(0.0, sweep, steps + 1)
    return list(centre + radius * np.column_stack([np.cos(angles), np.sin(angles)]))


def _apart(a: Array, b: Array) -> bool:
    return bool(np.abs(a - b).max() > 1e-6)


def _points(curve: Any, placements: Placements, angle_unit: float) -> list[Array]:
    if curve.is_a("IfcPolyline"):
        return [placements.point(point)[:2] for point in curve.Points]
    if curve.is_a("IfcIndexedPolyCurve"):
        return _indexed(curve, placements)
    if curve.is_a("IfcCompositeCurve"):
        points: list[Array] = []
        for segment in curve.Segments:
            part = _points(segment.ParentCurve, placements, angle_unit)
            points += part if segment.SameSense else part[::-1]
        return points
    if curve.is_a("IfcTrimmedCurve"):
        return _trimmed(curve, placements, angle_unit)
    if curve.is_a("IfcCircle"):
        matrix = placements.axes(curve.Position)
        radius = curve.Radius * placements.length
        return _placed(arc(np.zeros(2), radius, 0.0, math.tau)[:-1], matrix)
    raise Unreadable(f"a profile's outline is an {curve.is_a()}")


def _placed(points: list[Array], matrix: Array) -> list[Array]:
    return [matrix[:2, :2] @ point + matrix[:2, 3] for point in points]


def _indexed(curve: Any, placements: Placements) -> list[Array]:
    all_points = np.array(curve.Points.CoordList, float)[:, :2] * placements.length
    if not curve.Segments:
        return list(all_points)
    points: list[Array] = []
    for segment in curve.Segments:
        numbers = [number - 1 for number in segment.wrappedValue]
        corners = [all_points[number] for number in numbers]
        points += three_point_arc(*corners) if segment.is_a("IfcArcIndex") else corners
    return points


def three_point_arc(start: Array, middle: Array, end: Array) -> list[Array]:
    """Return points on the arc through three points."""
    a, b = middle - start, end - start
    double = 2.0 * (a[0] * b[1] - a[1] * b[0])
    if abs(double) < 1e-9:
        return [start, middle, end]
    aa, bb = a @ a, b @ b
    centre = start + np.array([b[1] * aa - a[1] * bb, a[0] * bb - b[0] * aa]) / double
    angles = [math.atan2(*(point - centre)[::-1]) for point in (start, middle, end)]
    turn = 1.0 if double > 0 else -1.0
    sweep = turn * ((turn * (angles[2] - angles[0])) % math.tau)
    return arc(centre, float(np.linalg.norm(start - centre)), angles[0], sweep)


def _trimmed(curve: Any, placements: Placements, angle_unit: float) -> list[Array]:
    basis = curve.BasisCurve
    ends = [_trim_point(trim, placements) for trim in (curve.Trim1, curve.Trim2)]
    if basis.is_a("IfcLine"):
        trims = zip((curve.Trim1, curve.Trim2), ends, strict=True)
        return [_along(basis, trim, placements) if point is None else point for trim, point in trims]
    if not basis.is_a("IfcCircle"):
        raise Unreadable(f"a profile's outline holds an {basis.is_a()}")
    matrix, radius = placements.axes(basis.Position), basis.Radius * placements.length
    angles = []
    for trim, point in zip((curve.Trim1, curve.Trim2), ends, strict=True):
        if point is not None:
            local = matrix[:2, :2].T @ (point - matrix[:2, 3])
            angles.append(math.atan2(local[1], local[0]))
        else:
            angles.append(_trim_parameter(trim) * angle_unit)
    turn = 1.0 if curve.SenseAgreement else -1.0
    sweep = turn * (((turn * (angles[1] - angles[0])) % math.tau) or math.tau)
    return _placed(arc(np.zeros(2), radius, angles[0], sweep), matrix)


def _along(line: Any, trim: Any, placements: Placements) -> Array:
    """Return the point of a line at a parameter, which counts the line's own vector."""
    ratios = np.array(line.Dir.Orientation.DirectionRatios[:2], float)
    vector = ratios / np.linalg.norm(ratios) * line.Dir.Magnitude * placements.length
    point: Array = placements.point(line.Pnt)[:2] + _trim_parameter(trim) * vector
    return point


def _trim_point(trim: Any, placements: Placements) -> Array | None:
    for value in trim:
        if value.is_a("IfcCartesianPoint"):
            return placements.point(value)[:2]
    return None


def _trim_parameter(trim: Any) -> float:
    return float(trim[0].wrappedValue)
