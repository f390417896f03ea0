"""What the general-purpose geometry kernel makes of an element: volume and box, in mm."""

from __future__ import annotations

from typing import Any

import ifcopenshell.geom
import ifcopenshell.util.shape
import numpy as np


def kernel_volume_and_box(element: Any) -> tuple[float, np.ndarray]:
    """Return the volume (mm³) and the box (2, 3) of an element's body in the world, by the geometry kernel."""
    settings = ifcopenshell.geom.settings()
    settings.set("use-world-coords", True)
    settings.set("disable-opening-subtractions", True)
    settings.set("mesher-angular-deflection", 0.05)
    geometry = ifcopenshell.geom.create_shape(settings, element).geometry
    points = np.array(geometry.verts).reshape(-1, 3) * 1000.0
    return ifcopenshell.util.shape.get_volume(geometry) * 1e9, np.array([points.min(axis=0), points.max(axis=0)])
