"""How far from its origin and how wide a model's steelwork can be: what goes beyond is a slip in the file."""

from __future__ import annotations

from typing import Any

import numpy as np

from ..model.units import Array, Mm

FARTHEST: Mm = 1e11
"""No coordinate is larger: eastings of grids that put the zone's number in front reach 61,000 km."""

WIDEST_CURVE: Mm = 1e6
"""A curved body is no wider (1 km): the kernel would cut it into millions of chords."""

CURVED = {
    "IfcAdvancedBrep": ("Outer",), "IfcRevolvedAreaSolid": ("SweptArea", "Axis"), "IfcSweptDiskSolid": ("Directrix",),
}  # fmt: skip
"""Bodies with curved faces, and which of their attributes lie in one frame."""

RADII = ("Radius", "MajorRadius", "MinorRadius", "BottomRadius", "SemiAxis1", "SemiAxis2")


class OutOfReach(ValueError):  # noqa: N818 - what it is, not what went wrong with us
    """A coordinate or a size that no building has."""


def within_reach(points: Array) -> Array:
    """Return points (…, 3) in mm; OutOfReach where one is no finite coordinate of a building."""
    if not (np.abs(points) < FARTHEST).all():
        raise OutOfReach("it has coordinates that no building has (beyond 100,000 km)")
    return points


def points_in_mm(points: Any, length_unit: Mm) -> Array:
    """Return points as the model writes them in mm; OutOfReach as above."""
    with np.errstate(over="ignore"):
        return within_reach(np.array(points, float) * length_unit)


def refuse_wide_curves(item: Any, length_unit: Mm) -> None:
    """Raise OutOfReach for a representation item whose curved faces are wider than any part's."""
    widest = 0.0
    for each in item.file.traverse(item):
        widest = max([widest, *(getattr(each, name, None) or 0.0 for name in RADII)])
        if each.is_a() in CURVED:
            widest = max(widest, _spread([getattr(each, name) for name in CURVED[each.is_a()]]))
    if not widest * length_unit < WIDEST_CURVE:
        raise OutOfReach("its curved faces are wider than those of any part (1 km)")


def _spread(entities: list[Any]) -> float:
    """Return the longest side of the box around all points of entities, in the model's unit."""
    within = [each for entity in entities for each in entity.file.traverse(entity)]
    points = [(*each.Coordinates, 0.0)[:3] for each in within if each.is_a("IfcCartesianPoint")]
    return float(np.ptp(points, axis=0).max()) if points else 0.0
