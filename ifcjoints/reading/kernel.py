"""The geometry kernel, for bodies that cannot be read straight from their entities."""

from __future__ import annotations

from typing import Any

import ifcopenshell.geom
import ifcopenshell.ifcopenshell_wrapper as wrapper
import numpy as np

from ..model.geometry import Solid
from .unreadable import Unreadable

LIBRARY = "hybrid-cgal-simple-opencascade"
"""About five times as fast as the default on bodies of plane faces."""


def solid_from_kernel(element: Any) -> Solid:
    """Return an element's body in the world with its openings filled; Unreadable where the kernel fails too."""
    settings = _settings()
    settings.set("use-world-coords", True)
    settings.set("disable-opening-subtractions", True)
    return _solid(settings, element)


def solid_of_item(item: Any) -> Solid:
    """Return one representation item's body in its own axes; Unreadable where the kernel fails too."""
    return _solid(_settings(), item)


def _settings() -> Any:
    settings = ifcopenshell.geom.settings()
    settings.set("triangulation-type", wrapper.POLYHEDRON_WITH_HOLES)
    return settings


def _solid(settings: Any, shape: Any) -> Solid:
    try:
        made = ifcopenshell.geom.create_shape(settings, shape, geometry_library=LIBRARY)
    except Exception as error:
        raise Unreadable(f"the geometry kernel cannot build its body ({error})") from error
    geometry = getattr(made, "geometry", made)
    vertices = np.array(geometry.verts, float).reshape(-1, 3) * 1000.0
    faces: Any = geometry.polyhedral_faces_with_holes
    if not faces:
        faces = [[triangle] for triangle in np.array(geometry.faces, int).reshape(-1, 3).tolist()]
    if len(faces) < 4:
        raise Unreadable("the geometry kernel finds no solid in its body")
    return Solid.from_faces(vertices, faces)
