"""Modelled welds."""

from __future__ import annotations

from typing import Any

import numpy as np

from ..model.parts import WeldPart
from .bodies import BodyReader
from .properties import PropertyTable

SQRT_HALF = 0.5**0.5


def is_weld(element: Any) -> bool:
    """Whether a fastener is a weld, by its type or by its name."""
    texts = [getattr(element, name, None) for name in ("PredefinedType", "ObjectType", "Name", "Description")]
    return any("weld" in text.lower() for text in texts if text)


def read_weld(element: Any, bodies: BodyReader, properties: PropertyTable) -> WeldPart | None:
    """Return a weld with a body; None without one. The throat is read, or leg / √2 of an equal-leg fillet."""
    pieces = bodies.pieces(element)
    if not pieces:
        return None
    points = np.vstack([piece.in_world().vertices for piece in pieces])
    throat, leg = properties.length(element, "weld_throat"), properties.length(element, "weld_leg")
    size = throat[0] if throat else leg[0] * SQRT_HALF if leg else None
    return WeldPart(
        element.GlobalId,
        points.min(axis=0),
        points.max(axis=0),
        properties.text(element, "weld_type") or element.ObjectType or "weld",
        size,
    )
