"""Modelled welds."""

from __future__ import annotations

from typing import Any

import ifcopenshell.util.element as element_util
import numpy as np

from ..model.parts import WeldPart
from .bodies import BodyReader

SQRT_HALF = 0.5**0.5


def is_weld(element: Any) -> bool:
    """Whether a fastener is a weld, by its type or by its name."""
    texts = [getattr(element, name, None) for name in ("PredefinedType", "ObjectType", "Name", "Description")]
    return any("weld" in text.lower() for text in texts if text)


def read_weld(element: Any, bodies: BodyReader, length_unit: float) -> WeldPart | None:
    """Return a weld with a body; None without one. The throat is read, or leg / √2 of an equal-leg fillet."""
    pieces = bodies.pieces(element)
    if not pieces:
        return None
    points = np.vstack([piece.in_world().vertices for piece in pieces])
    properties = element_util.get_psets(element, psets_only=True).get("Pset_FastenerWeld", {})
    throat, leg = properties.get("NominalThroatThickness") or properties.get("a"), properties.get("Leg")
    size = float(throat) if throat else float(leg) * SQRT_HALF if leg else None
    return WeldPart(
        element.GlobalId,
        points.min(axis=0),
        points.max(axis=0),
        str(properties.get("Type") or properties.get("Type1") or element.ObjectType or "weld"),
        size * length_unit if size else None,
    )
