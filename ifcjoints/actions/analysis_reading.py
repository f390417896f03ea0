"""IFC → a structural analysis model as plain data.

Axes and places follow the documentation of the open schema (IFC4, structural analysis domain): a curve
member's local x runs along its edge from the start vertex, its local z lies in the plane of x and `Axis`, y makes
the frame right-handed; "global" axes are those of the object placement that all items of a model share.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from typing import Any, NamedTuple

import numpy as np

from ..errors import ActionsError, ModelError
from ..model.geometry import cross, unit
from ..model.units import Array, Mm
from ..reading.placements import Placements, is_rigid
from ..reading.units import read_factor, read_units
from .analysis_loads import resultant_of
from .analysis_model import SAME_PLACE, Case, Connection, Kind, Reaction, Sample, StructuralMember, StructuralModel


class ForceUnits(NamedTuple):
    """The mm, N, Nmm and N/m in one of a file's units of length, force, moment and force along a line.

    `assumed` is a word on what was taken to be SI.
    """

    length: float
    newton: float
    newton_mm: float
    newton_per_m: float | None
    assumed: str


class StructuralReader:
    """Reads one file's structural analysis models."""

    def __init__(self, file: Any, name: str) -> None:
        self.file, self.name = file, name
        self.units = _units(file, name)
        self.places = Placements(self.units.length)

    def read(self) -> StructuralModel:
        """Read members, connections and reactions."""
        model = StructuralModel()
        for member in self.file.by_type("IfcStructuralCurveMember"):
            model.members[member.id()] = self._member(member)
        joined = self._joined()
        loaded = {rel.RelatingElement.id() for rel in self._activities("IfcStructuralAction")}
        for connection in self.file.by_type("IfcStructuralPointConnection"):
            point, number = self._vertex(connection), connection.id()
            if point is not None:
                members = joined.get(number, set()) | _touching(point, model.members)
                name = connection.Name or f"#{number}"
                model.connections[number] = Connection(name, point, frozenset(members), number in loaded)
        for rel in self._activities("IfcStructuralReaction"):
            model.reactions += self._reactions(rel.RelatingElement, rel.RelatedStructuralActivity, model)
        for group in self.file.by_type("IfcStructuralResultGroup"):
            load = group.ResultForLoadGroup
            total = None if load is None else resultant_of(load, lambda action: self._resultant(action, model))
            if total is not None and load.Name:
                model.loads[load.Name] = total
        return model

    def _resultant(self, action: Any, model: StructuralModel) -> Array | None:
        """Return an action's resultant: of a single force, or of a constant one along a whole member."""
        items = [rel.RelatingElement for rel in action.AssignedToStructuralItem]
        load = action.AppliedLoad
        if len(items) != 1 or load is None:
            return None
        try:
            basis, doubt = self._basis(items[0], action, model)
        except ValueError:
            return None
        member = model.members.get(items[0].id())
        whole = getattr(action, "PredefinedType", None) == "CONST"
        if load.is_a("IfcStructuralLoadSingleForce") and action.is_a("IfcStructuralPointAction"):
            parts, factor = (load.ForceX, load.ForceY, load.ForceZ), self.units.newton
        elif (
            load.is_a("IfcStructuralLoadLinearForce")
            and member is not None
            and whole
            and action.ProjectedOrTrue != "PROJECTED_LENGTH"
            and self.units.newton_per_m is not None
        ):
            parts = (load.LinearForceX, load.LinearForceY, load.LinearForceZ)
            factor = self.units.newton_per_m * member.length / 1000.0
        else:
            return None
        resultant: Array = np.array([float(part or 0.0) for part in parts]) * factor @ basis
        return None if doubt else resultant

    def _joined(self) -> dict[int, set[int]]:
        """Return the members that each connection is related to, surface members too."""
        joined: dict[int, set[int]] = {}
        for rel in self.file.by_type("IfcRelConnectsStructuralMember"):
            joined.setdefault(rel.RelatedStructuralConnection.id(), set()).add(rel.RelatingStructuralMember.id())
        return joined

    def _activities(self, kind: str) -> Iterator[Any]:
        for rel in self.file.by_type("IfcRelConnectsStructuralActivity"):
            if rel.RelatedStructuralActivity is not None and rel.RelatedStructuralActivity.is_a(kind):
                yield rel

    def _member(self, member: Any) -> StructuralMember:
        name = f"{member.Name or 'member'} #{member.id()}"
        edge, doubt = _topology(member, "IfcEdge"), None
        try:
            doubt = _edge_doubt(edge)
            matrix = self.places.of_element(member.ObjectPlacement)
            while edge.is_a("IfcOrientedEdge"):
                edge = edge.EdgeElement
            start, end = (self._placed(matrix, vertex.VertexGeometry) for vertex in (edge.EdgeStart, edge.EdgeEnd))
        except (AttributeError, ValueError):
            nowhere = np.full(3, math.nan)
            return StructuralMember(name, nowhere, nowhere, None, doubt or "its axis cannot be read")
        if not np.linalg.norm(end - start) > SAME_PLACE:
            doubt = doubt or "its axis has no length"
        if not is_rigid(matrix):
            doubt = doubt or "its place is scaled or mirrored"
        return StructuralMember(name, start, end, None if doubt else _local_axes(member, matrix, end - start), doubt)

    def _placed(self, matrix: Array, point: Any) -> Array:
        placed: Array = matrix[:3, :3] @ self.places.point(point) + matrix[:3, 3]
        return placed

    def _vertex(self, product: Any, inherited: Any = None) -> Array | None:
        """Return where a product's vertex is; its placement may be that of the item it stands on."""
        vertex = _topology(product, "IfcVertexPoint")
        if vertex is None or not vertex.VertexGeometry.is_a("IfcCartesianPoint"):
            return None
        placement = product.ObjectPlacement if product.ObjectPlacement is not None else inherited
        try:
            return self._placed(self.places.of_element(placement), vertex.VertexGeometry)
        except ValueError:
            return None

    def _reactions(self, item: Any, activity: Any, model: StructuralModel) -> Iterator[Reaction]:
        """Yield a reaction once for each case that it belongs to."""
        if item.id() not in model.members and item.id() not in model.connections:
            return
        label = f"{self.name}, #{activity.id()} {activity.is_a()}{self.units.assumed}"
        try:
            basis, doubt = self._basis(item, activity, model)
        except ValueError as error:
            basis, doubt = np.eye(3), str(error)
        kind: Kind = "point" if activity.is_a("IfcStructuralPointReaction") else _distribution(activity)
        samples, unread = self._samples(item, activity, model)
        if samples is None:
            return
        for case in _cases(activity):
            named = case or Case("", "no case", False)
            unassigned = None if case else "it belongs to no group of results"
            yield Reaction(label, item.id(), named, kind, basis, samples, doubt or unread or unassigned)

    def _basis(self, item: Any, activity: Any, model: StructuralModel) -> tuple[Array, str | None]:
        """Return the world directions that a reaction's components refer to, and why they are in doubt."""
        shared = self.places.of_element(item.ObjectPlacement)[:3, :3].T
        own = activity.ObjectPlacement
        if own is not None and not np.allclose(self.places.of_element(own)[:3, :3].T, shared, atol=1e-6):
            return shared, "its placement is turned against that of the item it stands on"
        if self.file.schema == "IFC2X3" and (
            activity.GlobalOrLocal != "GLOBAL_COORDS" or not np.allclose(shared, np.eye(3), atol=1e-6)
        ):
            return shared, "IFC2X3 does not settle the axes of its components"
        if activity.GlobalOrLocal == "GLOBAL_COORDS":
            return shared, None
        if item.id() in model.members:
            local = model.members[item.id()].local
            return (shared, "the member's local axes cannot be told") if local is None else (local, None)
        turned = getattr(item, "ConditionCoordinateSystem", None)
        return self.places.axes(turned)[:3, :3].T @ shared, None

    def _samples(
        self, item: Any, activity: Any, model: StructuralModel
    ) -> tuple[tuple[Sample, ...] | None, str | None]:
        """Return a reaction's forces, or None if it tells of no forces; and why they are in doubt."""
        load = activity.AppliedLoad
        if load is None:
            return (), "its forces are missing"
        values = load.Values if load.is_a("IfcStructuralLoadConfiguration") else [load]
        if any("Displacement" in value.is_a() for value in values):
            return None, None
        if not all(value.is_a("IfcStructuralLoadSingleForce") for value in values):
            return (), "it is spread along the member and says nothing of single sections"
        if activity.is_a("IfcStructuralPointReaction") == (len(values) > 1) or (
            activity.is_a("IfcStructuralCurveReaction") and item.id() not in model.members
        ):
            return (), f"an {load.is_a()} does not suit it"
        if activity.is_a("IfcStructuralPointReaction"):
            point = self._vertex(activity, item.ObjectPlacement)
            return self._one_sample(item, values[0], point, model)
        locations = _locations(load, activity, model.members[item.id()].length / self.units.length)
        if locations is None or list(locations) != sorted(locations):
            return (), "the places of its samples along the member cannot be told"
        pairs = zip(locations, values, strict=True)
        return tuple(self._sample(at * self.units.length, value) for at, value in pairs), None

    def _one_sample(
        self, item: Any, value: Any, point: Array | None, model: StructuralModel
    ) -> tuple[tuple[Sample, ...], str | None]:
        member = model.members.get(item.id())
        if member is None:
            return (self._sample(0.0, value),), None
        if point is None:
            return (), "the file does not say at which end of the member it stands"
        end = member.end_at(point)
        at = {"start": 0.0, "end": member.length, None: math.nan}[end]
        return (self._sample(at, value),), None

    def _sample(self, at: Mm, value: Any) -> Sample:
        force = [_number(value.ForceX), _number(value.ForceY), _number(value.ForceZ)]
        moment = [_number(value.MomentX), _number(value.MomentY), _number(value.MomentZ)]
        return Sample(at, np.array(force) * self.units.newton, np.array(moment) * self.units.newton_mm)


def _units(file: Any, name: str) -> ForceUnits:
    """Read a file's units; ActionsError where the one of moments cannot be told."""
    try:
        length = read_units(file).length
        kinds = ("FORCEUNIT", "TORQUEUNIT", "LINEARFORCEUNIT")
        force, torque, spread = (read_factor(file, kind) for kind in kinds)
    except ModelError as error:
        raise ActionsError(f"{name}: {error}") from error
    if torque is None and (force not in (None, 1.0) or length != 1000.0):
        raise ActionsError(
            f"{name}: the unit of moments is not stated beside its other units; assign a TORQUEUNIT in the file."
        )
    missing = [word for word, factor in (("N", force), ("Nm", torque)) if factor is None]
    assumed = f" (unit not stated, {' and '.join(missing)} taken)" if missing else ""
    return ForceUnits(
        length, 1.0 if force is None else force, 1000.0 * (1.0 if torque is None else torque), spread, assumed
    )


def _touching(point: Array, members: dict[int, StructuralMember]) -> set[int]:
    """Return the members that a point lies on."""
    if not members:
        return set()
    start = np.array([member.start for member in members.values()])
    run = np.array([member.end for member in members.values()]) - start
    length = np.maximum(np.einsum("ij,ij->i", run, run), 1e-9)
    share = np.clip(np.einsum("ij,ij->i", point - start, run) / length, 0.0, 1.0)
    away = np.linalg.norm(start + share[:, None] * run - point, axis=1)
    return {number for number, distance in zip(members, away, strict=True) if distance <= SAME_PLACE}


def _number(value: Any) -> float:
    return math.nan if value is None else float(value)


def _topology(product: Any, kind: str) -> Any:
    """Return the edge or vertex that represents a product, None if there is none or more than one."""
    representations = product.Representation.Representations if product.Representation is not None else []
    found = [item for each in representations for item in each.Items if item.is_a(kind)]
    return found[0] if len(found) == 1 else None


def _edge_doubt(edge: Any) -> str | None:
    """Say why an edge does not tell a straight member's start and direction."""
    if edge is None:
        return "its axis is not given as one edge"
    if edge.is_a("IfcOrientedEdge"):
        return _edge_doubt(edge.EdgeElement) if edge.Orientation else "its edge is turned round and its start is open"
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


def _local_axes(member: Any, matrix: Array, run: Array) -> Array | None:
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


def _distribution(activity: Any) -> Kind:
    return "discrete" if activity.PredefinedType == "DISCRETE" else "section"


def _locations(load: Any, activity: Any, length: float) -> list[float] | None:
    """Return where a curve reaction's samples lie along the member, in the file's unit of length."""
    count = len(load.Values) if load.is_a("IfcStructuralLoadConfiguration") else 0
    if count < 2:
        return None
    if activity.PredefinedType == "EQUIDISTANT" and load.Locations is None:
        return [float(at) for at in np.linspace(0.0, length, count)]
    if activity.PredefinedType not in ("LINEAR", "POLYGONAL", "DISCRETE") or load.Locations is None:
        return None
    return [float(at[0]) for at in load.Locations] if len(load.Locations) == count else None


def _cases(activity: Any) -> Iterator[Case | None]:
    """Yield the cases whose groups of results hold a reaction; None if there is no such group."""
    groups = [
        rel.RelatingGroup
        for rel in activity.HasAssignments
        if rel.is_a("IfcRelAssignsToGroup") and rel.RelatingGroup.is_a("IfcStructuralResultGroup")
    ]
    if not groups:
        yield None
    for group in groups:
        loads = group.ResultForLoadGroup
        kind = "results" if loads is None else str(loads.PredefinedType).replace("_", " ").lower()
        name = (loads.Name if loads is not None else None) or group.Name or f"#{group.id()}"
        yield Case(name, kind, kind.startswith("load combination"))
