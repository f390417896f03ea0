"""Places and axes of structural items, from their topology.

They follow the documentation of the open schema (IFC4, structural analysis domain): a curve member's local x runs
along its edge from the start vertex, its local z lies in the plane of x and `Axis`, y makes the frame right-handed.
"""

from __future__ import annotations

from typing import Any

import numpy as np

from ..model.geometry import cross, unit
from ..model.units import Array
from .analysis_model import SAME_PLACE, StructuralMember


def topology(product: Any, kind: str) -> Any:
    """Return the edge or vertex that represents a product, None if there is none or more than one."""
    representations = product.Representation.Representations if product.Representation is not None else []
    found = [item for each in representations for item in each.Items if item.is_a(kind)]
    return found[0] if len(found) == 1 else None


def edge_doubt(edge: Any) -> str | None:
    """Say why an edge does not tell a straight member's start and direction."""
    if edge is None:
        return "its axis is not given as one edge"
    if edge.is_a("IfcOrientedEdge"):
        return edge_doubt(edge.EdgeElement) if edge.Orientation else "its edge is turned round and its start is open"
    if not edge.is_a("IfcEdgeCurve"):
        return None
    curve = edge.EdgeGeometry
    if not edge.SameSense:
        return "its edge runs against its curve and its start is open"
    first = curve.Pnt if curve.is_a("IfcLine") else None
    if curve.is_a("IfcPolyline") and len(curve.Points) == 2:
        first = curve.Points[0]
    start = edge.EdgeStart.VertexGeometry
    if first is None or not np.allclose(first.Coordinates, start.Coordinates, atol=1e-6):
        return "its axis is curved, or measured from elsewhere than its start"
    return None


def local_axes(member: Any, matrix: Array, run: Array) -> Array | None:
    """Return a curve member's local x, y and z as rows; None without `Axis` (IFC2X3) or along it."""
    axis = getattr(member, "Axis", None)
    if axis is None:
        return None
    x, hint = unit(run), matrix[:3, :3] @ np.array([*axis.DirectionRatios, 0.0][:3], float)
    z = hint - (hint @ x) * x
    if np.linalg.norm(z) < 1e-6 * np.linalg.norm(hint) or not hint.any():
        return None
    z = unit(z)
    return np.array([x, cross(z, x), z])


def touching(point: Array, members: dict[int, StructuralMember]) -> set[int]:
    """Return the members that a point lies on."""
    if not members:
        return set()
    start = np.array([member.start for member in members.values()])
    run = np.array([member.end for member in members.values()]) - start
    length = np.maximum(np.einsum("ij,ij->i", run, run), 1e-9)
    share = np.clip(np.einsum("ij,ij->i", point - start, run) / length, 0.0, 1.0)
    away = np.linalg.norm(start + share[:, None] * run - point, axis=1)
    return {number for number, distance in zip(members, away, strict=True) if distance <= SAME_PLACE}
