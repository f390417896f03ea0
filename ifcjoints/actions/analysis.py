"""Design actions from a structural analysis model with results in IFC.

Two kinds of results on an ``IfcStructuralCurveMember`` are read, each for the load case or combination of its result
group:

- ``IfcStructuralCurveReaction`` with a load configuration: stress resultants along the member, as the components that
  act on the face whose outward normal points from the member's start to its end (so that Fx > 0 is tension);
- ``IfcStructuralPointReaction`` at one of its ends: what the support or joint exerts on the member there.

Local components are along the member's x (start to end), z as the member's Axis says, y = z × x. What cannot be told
for certain is left out and listed. The convention of the first kind is from memory of the schema's documentation;
a note of every run says which was read.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path
from typing import Any

import ifcopenshell.util.unit as unit_util
import numpy as np

from ..model.geometry import cross, unit
from ..model.units import Array, Mm
from ..reading.placements import Placements
from ..reading.units import read_units

AT_END = 0.01
"""A result this near to an end, as a share of the member's length, is the end's."""

FORCES, MOMENTS = ("ForceX", "ForceY", "ForceZ"), ("MomentX", "MomentY", "MomentZ")


@dataclass(frozen=True, slots=True, eq=False)
class EndForces:
    """What a joint exerts on a member's end: force in N, moment in Nmm, both in world axes.

    `point` is the end in mm, `inwards` the way from it into the member, `source` the entity it was read from.
    """

    point: Array
    inwards: Array
    case: str
    force: Array
    moment: Array
    source: str


@dataclass(frozen=True, slots=True)
class AnalysisResults:
    """The member-end forces of an analysis model, and notes on what was left out."""

    ends: tuple[EndForces, ...]
    notes: tuple[str, ...]


def read_analysis(file: Any, path: Path) -> AnalysisResults:
    """Read the member-end forces of every result group of an open IFC file."""
    return _Analysis(file, path).results()


@dataclass(frozen=True, slots=True, eq=False)
class _Line:
    """A curve member: its ends in mm and its local axes as rows; None where its z axis is not told."""

    start: Array
    end: Array
    axes: Array | None

    @property
    def length(self) -> Mm:
        return float(np.linalg.norm(self.end - self.start))


class _Analysis:
    """One pass over the results of one file."""

    def __init__(self, file: Any, path: Path) -> None:
        self.file, self.name = file, path.name
        self.length = read_units(file).length
        self.placements = Placements(self.length)
        self.force = unit_util.calculate_unit_scale(file, "FORCEUNIT")
        self.moment = 1000.0 * unit_util.calculate_unit_scale(file, "TORQUEUNIT")
        self.left_out: dict[str, int] = defaultdict(int)
        self.lines: dict[int, _Line | None] = {}

    def results(self) -> AnalysisResults:
        ends = tuple(self._ends())
        notes = [f"{self.name}: {count} result(s) not used: {why}" for why, count in self.left_out.items()]
        if not ends:
            notes.append(f"{self.name}: no member-end forces were found in it")
        elif any("IfcStructuralCurveReaction" in end.source for end in ends):
            notes.append(
                f"{self.name}: results along members were read as stress resultants on the face that looks from the "
                "member's start to its end, Fx > 0 in tension; check the sign of one joint by hand"
            )
        return AnalysisResults(ends, tuple(notes))

    def _ends(self) -> Iterator[EndForces]:
        for group in self.file.by_type("IfcStructuralResultGroup"):
            case = self._case(group)
            for relation in group.IsGroupedBy:
                for activity in relation.RelatedObjects:
                    if activity.is_a("IfcStructuralReaction"):
                        yield from self._of_activity(activity, case)

    def _case(self, group: Any) -> str:
        load = group.ResultForLoadGroup
        return str((load.Name if load is not None else None) or group.Name or f"#{group.id()}")

    def _of_activity(self, activity: Any, case: str) -> Iterator[EndForces]:
        member = _member_of(activity)
        line = self._line(member) if member is not None else None
        if line is None:
            self.left_out["it stands on no straight member"] += 1
        elif activity.GlobalOrLocal == "LOCAL_COORDS" and line.axes is None:
            self.left_out["it is in local axes, and its member does not say where its z axis points"] += 1
        elif activity.is_a("IfcStructuralCurveReaction"):
            yield from self._along(activity, member, line, case)
        elif activity.is_a("IfcStructuralPointReaction"):
            yield from self._at_point(activity, member, line, case)

    def _along(self, activity: Any, member: Any, line: _Line, case: str) -> Iterator[EndForces]:
        """Read the resultants at both ends: the joint acts on the start with their opposites, on the end with them."""
        load = activity.AppliedLoad
        if not load.is_a("IfcStructuralLoadConfiguration") or not load.Locations:
            self.left_out["it gives no values at places along its member"] += 1
            return
        for value, place in zip(load.Values, load.Locations, strict=False):
            at = float(place[0]) * self.length / line.length
            if not value.is_a("IfcStructuralLoadSingleForce"):
                self.left_out[f"its values are {value.is_a()}"] += 1
            elif abs(at) < AT_END:
                yield self._end(activity, member, line, case, (True, -1.0), value)
            elif abs(at - 1.0) < AT_END:
                yield self._end(activity, member, line, case, (False, 1.0), value)

    def _at_point(self, activity: Any, member: Any, line: _Line, case: str) -> Iterator[EndForces]:
        point = self._point(activity)
        load = activity.AppliedLoad
        if point is None or not load.is_a("IfcStructuralLoadSingleForce"):
            self.left_out["a reaction does not say where it acts, or is no single force"] += 1
            return
        away = [float(np.linalg.norm(point - end)) for end in (line.start, line.end)]
        if min(away) > AT_END * line.length:
            self.left_out["a reaction acts between its member's ends"] += 1
            return
        yield self._end(activity, member, line, case, (away[0] < away[1], 1.0), load)

    def _end(
        self, activity: Any, member: Any, line: _Line, case: str, which: tuple[bool, float], load: Any
    ) -> EndForces:
        at_start, sign = which
        turn = line.axes if activity.GlobalOrLocal == "LOCAL_COORDS" and line.axes is not None else np.eye(3)
        force = np.array([getattr(load, name) or 0.0 for name in FORCES]) * self.force * sign
        moment = np.array([getattr(load, name) or 0.0 for name in MOMENTS]) * self.moment * sign
        ends = (line.start, line.end) if at_start else (line.end, line.start)
        source = f"{self.name}, {activity.is_a()} #{activity.id()} on {member.Name or f'#{member.id()}'}"
        return EndForces(ends[0], unit(ends[1] - ends[0]), case, force @ turn, moment @ turn, source)

    def _line(self, member: Any) -> _Line | None:
        if member.id() not in self.lines:
            self.lines[member.id()] = self._read_line(member)
        return self.lines[member.id()]

    def _read_line(self, member: Any) -> _Line | None:
        edges = [item for item in _items(member) if item.is_a("IfcEdge")]
        if len(edges) != 1:
            return None
        world = self.placements.of_element(member.ObjectPlacement)
        ends = []
        for vertex in (edges[0].EdgeStart, edges[0].EdgeEnd):
            if not vertex.is_a("IfcVertexPoint"):
                return None
            ends.append(world[:3, :3] @ self.placements.point(vertex.VertexGeometry) + world[:3, 3])
        if np.linalg.norm(ends[1] - ends[0]) < 1.0:
            return None
        return _Line(ends[0], ends[1], _axes(unit(ends[1] - ends[0]), getattr(member, "Axis", None), world))

    def _point(self, activity: Any) -> Array | None:
        for item in _items(activity):
            if item.is_a("IfcVertexPoint"):
                world = self.placements.of_element(activity.ObjectPlacement)
                point: Array = world[:3, :3] @ self.placements.point(item.VertexGeometry) + world[:3, 3]
                return point
        return None


def _member_of(activity: Any) -> Any | None:
    for relation in activity.AssignedToStructuralItem:
        if relation.RelatingElement.is_a("IfcStructuralCurveMember"):
            return relation.RelatingElement
    return None


def _items(product: Any) -> list[Any]:
    shape = product.Representation
    return [] if shape is None else [item for each in shape.Representations for item in each.Items]


def _axes(x: Array, axis: Any, world: Array) -> Array | None:
    """Return a member's local axes as rows; None where its z axis is not told or lies along it."""
    if axis is None:
        return None
    told = world[:3, :3] @ np.array(axis.DirectionRatios, float)
    across = told - (told @ x) * x
    if np.linalg.norm(across) < 1e-6 * np.linalg.norm(told):
        return None
    z = unit(across)
    return np.array([x, cross(z, x), z])
