"""IFC → a structural analysis model as plain data.

Components follow the documentation of the open schema (IFC4, structural analysis domain): "local" ones refer to
the axes of their item, "global" ones to those of the object placement that all items of a model share.
"""

from __future__ import annotations

import math
from collections.abc import Iterator
from typing import Any

import numpy as np

from ..model.units import Array, Mm
from ..reading.placements import Placements, is_rigid
from .analysis_axes import edge_doubt, local_axes, topology, touching
from .analysis_loads import resultant_of
from .analysis_model import SAME_PLACE, Case, Connection, Kind, Reaction, Sample, StructuralMember, StructuralModel
from .analysis_units import read_force_units


class StructuralReader:
    """Reads one file's structural analysis models."""

    def __init__(self, file: Any, name: str) -> None:
        self.file, self.name = file, name
        self.units = read_force_units(file, name)
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
                members = joined.get(number, set()) | touching(point, model.members)
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
        edge, doubt = topology(member, "IfcEdge"), None
        try:
            doubt = edge_doubt(edge)
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
        return StructuralMember(name, start, end, None if doubt else local_axes(member, matrix, end - start), doubt)

    def _placed(self, matrix: Array, point: Any) -> Array:
        placed: Array = matrix[:3, :3] @ self.places.point(point) + matrix[:3, 3]
        return placed

    def _vertex(self, product: Any, inherited: Any = None) -> Array | None:
        """Return where a product's vertex is; its placement may be that of the item it stands on."""
        vertex = topology(product, "IfcVertexPoint")
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


def _number(value: Any) -> float:
    return math.nan if value is None else float(value)


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
