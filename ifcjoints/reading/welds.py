"""Modelled welds."""

from __future__ import annotations

import re
from typing import Any

import ifcopenshell.util.element as element_util
import numpy as np

from ..model.parts import WeldPart
from ..model.units import Array
from .bodies import BodyReader
from .bolt_lines import lines_of
from .fastener_kinds import texts_of
from .properties import PropertyTable
from .reach import points_in_mm

SQRT_HALF = 0.5**0.5


NO_FILLET = re.compile(r"groove|butt|plug|slot|spot|seam|edge|surfac|backing|^[HIJKUVXY]$", re.IGNORECASE)
"""Words and ISO 2553 letters of welds whose leg says nothing about their throat."""


def is_weld(element: Any) -> bool:
    """Whether a fastener is a weld, by its own or its type's kind or name."""
    owner = element_util.get_type(element)
    kinds = [str(getattr(each, "PredefinedType", None)) for each in (element, owner)]
    return any("weld" in text.lower() for text in (*kinds, *(text for text, _ in texts_of(element, owner))))


def read_weld(element: Any, bodies: BodyReader, properties: PropertyTable) -> WeldPart | None:
    """Return a weld with a body or a path, or None. The throat is read, or leg / √2 of an equal-leg fillet."""
    points = _points(element, bodies)
    if points is None:
        return None
    kind = properties.text(element, "weld_type") or element.ObjectType or "weld"
    throat = properties.length(element, "weld_throat")
    leg = properties.length(element, "weld_leg") if throat is None and not NO_FILLET.search(kind.strip()) else None
    size = throat[0] if throat else leg[0] * SQRT_HALF if leg else None
    return WeldPart(element.GlobalId, points.min(axis=0), points.max(axis=0), kind, size)


def _points(element: Any, bodies: BodyReader) -> Array | None:
    """Return the corners of a weld's body, or else the points of the path it is drawn as, in the world."""
    pieces = bodies.pieces(element)
    if pieces:
        return np.vstack([piece.in_world().vertices for piece in pieces])
    path = [point for line in lines_of(element) for point in line if len(point) == 3]
    if not path:
        return None
    world = bodies.world_of(element)
    points: Array = points_in_mm(path, bodies.length_unit) @ world[:3, :3].T + world[:3, 3]
    return points
