"""Profiles as rings in mm, with the section's own dimensions where the profile states them."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import Any

import numpy as np

from ..model.sections import SectionDimensions
from ..model.units import Array, Mm
from .curves import arc, ring
from .placements import Placements
from .unreadable import Unreadable

Corner = tuple[float, float, float]
"""A corner's x and y, and the radius that rounds it."""


@dataclass(frozen=True, slots=True)
class Profile:
    """Rings (k, 2) of a profile in mm, the outside first.

    `dimensions` are stated by a parametric profile; its depth then runs along the profile's own y axis
    turned by `placed` (4, 4). `radius` is set for a full circle.
    """

    rings: tuple[Array, ...]
    name: str | None = None
    dimensions: SectionDimensions | None = None
    placed: Array | None = None
    radius: Mm | None = None


def read_profile(profile: Any, placements: Placements, angle_unit: float) -> Profile:
    """Read a profile definition; Unreadable for kinds that only the geometry kernel knows."""
    if profile.is_a("IfcDerivedProfileDef"):
        return _derived(profile, placements, angle_unit)
    if profile.is_a("IfcArbitraryClosedProfileDef"):
        curves = [profile.OuterCurve, *(getattr(profile, "InnerCurves", None) or ())]
        rings = tuple(ring(curve, placements, angle_unit) for curve in curves)
        circle = profile.OuterCurve if profile.OuterCurve.is_a("IfcCircle") and len(curves) == 1 else None
        radius = circle.Radius * placements.length if circle else None
        return Profile(rings, profile.ProfileName, radius=radius)
    if profile.is_a("IfcParameterizedProfileDef"):
        return _parameterized(profile, placements)
    raise Unreadable(f"its profile is an {profile.is_a()}")


def circle_profile(radius: Mm) -> Profile:
    """Return a circle about the origin."""
    rings, dimensions, _ = _circle(lambda _name: radius)
    return Profile(tuple(rings), dimensions=dimensions, placed=np.eye(4), radius=radius)


def _derived(profile: Any, placements: Placements, angle_unit: float) -> Profile:
    parent = read_profile(profile.ParentProfile, placements, angle_unit)
    if profile.is_a("IfcMirroredProfileDef"):
        matrix = np.diag([-1.0, 1.0, 1.0, 1.0])
    else:
        matrix = placements.operator(profile.Operator)
    moved = _moved(parent, matrix)
    scale = abs(float(np.linalg.det(matrix[:2, :2])))
    if abs(scale - 1.0) > 1e-9:
        return replace(moved, dimensions=None, radius=None, name=profile.ProfileName or parent.name)
    return replace(moved, name=profile.ProfileName or parent.name)


def _moved(profile: Profile, matrix: Array) -> Profile:
    rings = tuple(points @ matrix[:2, :2].T + matrix[:2, 3] for points in profile.rings)
    if np.linalg.det(matrix[:2, :2]) < 0:
        rings = tuple(points[::-1] for points in rings)
    return replace(profile, rings=rings, placed=matrix @ (np.eye(4) if profile.placed is None else profile.placed))


def _parameterized(profile: Any, placements: Placements) -> Profile:
    unit = placements.length

    def size(*names: str) -> float:
        for name in names:
            value = getattr(profile, name, None)
            if value is not None:
                return float(value) * unit
        return 0.0

    kind = profile.is_a()
    if kind not in _SHAPES:
        raise Unreadable(f"its profile is an {kind}")
    rings, dimensions, radius = _SHAPES[kind](size)
    plain = Profile(tuple(rings), profile.ProfileName, dimensions, radius=radius)
    return _moved(plain, placements.axes(profile.Position))


def rounded(corners: list[Corner]) -> Array:
    """Return a ring whose corners are rounded, convex and re-entrant alike."""
    points: list[Array] = []
    spots = np.array([corner[:2] for corner in corners])
    for index, (_, _, radius) in enumerate(corners):
        here, before, after = spots[index], spots[index - 1], spots[(index + 1) % len(spots)]
        if radius <= 0:
            points.append(here)
            continue
        u, v = (before - here) / np.linalg.norm(before - here), (after - here) / np.linalg.norm(after - here)
        half = np.arccos(np.clip(u @ v, -1.0, 1.0)) / 2.0
        bisector = (u + v) / np.linalg.norm(u + v)
        centre = here + bisector * radius / np.sin(half)
        start = here + u * radius / np.tan(half) - centre
        end = here + v * radius / np.tan(half) - centre
        sweep = np.arctan2(start[0] * end[1] - start[1] * end[0], start @ end)
        points += arc(centre, radius, float(np.arctan2(start[1], start[0])), float(sweep))
    return np.array(points)


def _i_shape(size: Any) -> tuple[list[Array], SectionDimensions, None]:
    h, b, tw, tf = size("OverallDepth"), size("OverallWidth"), size("WebThickness"), size("FlangeThickness")
    r, e = size("FilletRadius"), size("FlangeEdgeRadius")
    return (
        _i_outline(h, (b, tf, r, e), (b, tf, r, e), tw),
        SectionDimensions("I", h, b, tw, tf, r or None),
        None,
    )


def _asymmetric_i(size: Any) -> tuple[list[Array], SectionDimensions, None]:
    h, tw = size("OverallDepth"), size("WebThickness")
    bottom = (
        size("BottomFlangeWidth", "OverallWidth"),
        size("BottomFlangeThickness", "FlangeThickness"),
        size("BottomFlangeFilletRadius", "FilletRadius"),
        0.0,
    )
    top = (
        size("TopFlangeWidth"),
        size("TopFlangeThickness") or bottom[1],
        size("TopFlangeFilletRadius"),
        0.0,
    )
    widest = max(bottom[0], top[0])
    # Flanges of two thicknesses have no single one to tell; each is measured where it is needed.
    tf, r = (a if abs(a - b) < 0.01 else None for a, b in zip(bottom[1:3], top[1:3], strict=True))
    return (
        _i_outline(h, bottom, top, tw),
        SectionDimensions("I", h, widest, tw, tf, r or None),
        None,
    )


def _i_outline(h: Mm, bottom: tuple[Mm, ...], top: tuple[Mm, ...], tw: Mm) -> list[Array]:
    (b1, t1, r1, e1), (b2, t2, r2, e2), w = bottom, top, tw / 2
    half: list[Corner] = [
        (b1 / 2, -h / 2, 0), (b1 / 2, -h / 2 + t1, e1), (w, -h / 2 + t1, r1),
        (w, h / 2 - t2, r2), (b2 / 2, h / 2 - t2, e2), (b2 / 2, h / 2, 0),
    ]  # fmt: skip
    return [rounded(half + [(-x, y, r) for x, y, r in reversed(half)])]


def _u_shape(size: Any) -> tuple[list[Array], SectionDimensions, None]:
    h, b, tw, tf, r = (size(n) for n in ("Depth", "FlangeWidth", "WebThickness", "FlangeThickness", "FilletRadius"))
    x = -b / 2
    corners: list[Corner] = [
        (x, -h / 2, 0), (-x, -h / 2, 0), (-x, -h / 2 + tf, 0), (x + tw, -h / 2 + tf, r),
        (x + tw, h / 2 - tf, r), (-x, h / 2 - tf, 0), (-x, h / 2, 0), (x, h / 2, 0),
    ]  # fmt: skip
    return [rounded(corners)], SectionDimensions("U", h, b, tw, tf, r or None), None


def _l_shape(size: Any) -> tuple[list[Array], SectionDimensions, None]:
    h, t, r = size("Depth"), size("Thickness"), size("FilletRadius")
    b = size("Width") or h
    x, y = -b / 2, -h / 2
    corners: list[Corner] = [
        (x, y, 0),
        (-x, y, 0),
        (-x, y + t, 0),
        (x + t, y + t, r),
        (x + t, -y, 0),
        (x, -y, 0),
    ]
    return [rounded(corners)], SectionDimensions("L", h, b, t, t, r or None), None


def _t_shape(size: Any) -> tuple[list[Array], SectionDimensions, None]:
    h, b, tw, tf, r = (size(n) for n in ("Depth", "FlangeWidth", "WebThickness", "FlangeThickness", "FilletRadius"))
    half: list[Corner] = [
        (tw / 2, -h / 2, 0),
        (tw / 2, h / 2 - tf, r),
        (b / 2, h / 2 - tf, 0),
        (b / 2, h / 2, 0),
    ]
    corners = half + [(-x, y, radius) for x, y, radius in reversed(half)]
    return [rounded(corners)], SectionDimensions("T", h, b, tw, tf, r or None), None


def _rectangle(size: Any) -> tuple[list[Array], SectionDimensions, None]:
    b, h, r = size("XDim"), size("YDim"), size("RoundingRadius")
    return [_box(b, h, r)], SectionDimensions("rectangle", h, b, None, None, r or None), None


def _hollow_rectangle(size: Any) -> tuple[list[Array], SectionDimensions, None]:
    b, h, t = size("XDim"), size("YDim"), size("WallThickness")
    rings = [_box(b, h, size("OuterFilletRadius")), _box(b - 2 * t, h - 2 * t, size("InnerFilletRadius"))]
    return rings, SectionDimensions("hollow_rectangular", h, b, t, t, size("OuterFilletRadius") or None), None


def _box(b: Mm, h: Mm, r: Mm) -> Array:
    return rounded([(b / 2, -h / 2, r), (b / 2, h / 2, r), (-b / 2, h / 2, r), (-b / 2, -h / 2, r)])


def _circle(size: Any) -> tuple[list[Array], SectionDimensions, Mm]:
    radius = size("Radius")
    return [_circle_ring(radius)], SectionDimensions("round", 2 * radius, 2 * radius), radius


def _hollow_circle(size: Any) -> tuple[list[Array], SectionDimensions, None]:
    radius, t = size("Radius"), size("WallThickness")
    rings = [_circle_ring(radius), _circle_ring(radius - t)]
    return rings, SectionDimensions("hollow_round", 2 * radius, 2 * radius, t, t), None


def _circle_ring(radius: Mm) -> Array:
    return np.array(arc(np.zeros(2), radius, 0.0, 2 * np.pi)[:-1])


_SHAPES: dict[str, Any] = {
    "IfcIShapeProfileDef": _i_shape,
    "IfcAsymmetricIShapeProfileDef": _asymmetric_i,
    "IfcUShapeProfileDef": _u_shape,
    "IfcLShapeProfileDef": _l_shape,
    "IfcTShapeProfileDef": _t_shape,
    "IfcRectangleProfileDef": _rectangle,
    "IfcRoundedRectangleProfileDef": _rectangle,
    "IfcRectangleHollowProfileDef": _hollow_rectangle,
    "IfcCircleProfileDef": _circle,
    "IfcCircleHollowProfileDef": _hollow_circle,
}
