"""Small structural analysis models made by code: members, nodes, results; kN and kNm unless said."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any

import numpy as np

from sample_models.making import Model

COMPONENTS = ("ForceX", "ForceY", "ForceZ", "MomentX", "MomentY", "MomentZ")
Six = Sequence[float | None]


class Analysis(Model):
    """An analysis model being made. `torque` False leaves the unit of moments out."""

    def __init__(
        self, unit: float = 1000.0, world: np.ndarray | None = None, kilo: bool = True, torque: bool = True,
        schema: str = "IFC4",
    ) -> None:  # fmt: skip
        super().__init__(schema=schema, unit=unit, world=world)
        self.use_kilo(kilo, torque)
        self.shared = self.placement(self.world)
        self.groups: dict[str, Any] = {}

    def use_kilo(self, kilo: bool, torque: bool) -> None:
        newton = self.add("IfcSIUnit", UnitType="FORCEUNIT", Prefix="KILO" if kilo else None, Name="NEWTON")
        metre = self.add("IfcSIUnit", UnitType="LENGTHUNIT", Name="METRE")
        parts = [self.add("IfcDerivedUnitElement", Unit=each, Exponent=1) for each in (newton, metre)]
        moment = self.add("IfcDerivedUnit", Elements=parts, UnitType="TORQUEUNIT")
        powers = ((newton, 1), (metre, -1))
        parts = [self.add("IfcDerivedUnitElement", Unit=each, Exponent=power) for each, power in powers]
        spread = self.add("IfcDerivedUnit", Elements=parts, UnitType="LINEARFORCEUNIT")
        more = [newton, moment, spread] if torque else [newton]
        self.project.UnitsInContext.Units = [*self.project.UnitsInContext.Units, *more]
        self.scale = 1.0 if kilo else 1000.0

    def vertex(self, point: Sequence[float]) -> Any:
        return self.add("IfcVertexPoint", VertexGeometry=self.point(*point))

    def topology(self, kind: str, item: Any) -> Any:
        shape = self.add(
            "IfcTopologyRepresentation",
            ContextOfItems=self.context, RepresentationIdentifier="Reference", RepresentationType=kind, Items=[item],
        )  # fmt: skip
        return self.add("IfcProductDefinitionShape", Representations=[shape])

    def member(
        self, start: Sequence[float], end: Sequence[float], z: Sequence[float] | None = (0, 0, 1), name: str = "M1"
    ) -> Any:
        """Add a curve member between two points in mm; its `Axis` told, or left out."""
        edge = self.add("IfcEdge", EdgeStart=self.vertex(start), EdgeEnd=self.vertex(end))
        more: dict[str, Any] = {"Axis": self.direction(*(z or (0, 0, 1)))} if self.file.schema != "IFC2X3" else {}
        made = self.rooted(
            "IfcStructuralCurveMember", Name=name, ObjectPlacement=self.shared,
            Representation=self.topology("Edge", edge), PredefinedType="RIGID_JOINED_MEMBER", **more,
        )  # fmt: skip
        if z is None:
            made.Axis = None
        return made

    def node(self, point: Sequence[float], turned: np.ndarray | None = None) -> Any:
        """Add a point connection, its own axes turned or not."""
        more = {} if turned is None else {"ConditionCoordinateSystem": self.axes(turned)}
        shape = self.topology("Vertex", self.vertex(point))
        return self.rooted(
            "IfcStructuralPointConnection", Name="node", ObjectPlacement=self.shared, Representation=shape, **more
        )

    def single(self, six: Six) -> Any:
        """Add a single force from six components in kN and kNm; None is left out."""
        values = [None if value is None else float(value) * self.scale for value in six]
        return self.add("IfcStructuralLoadSingleForce", **dict(zip(COMPONENTS, values, strict=True)))

    def along(
        self, member: Any, samples: Sequence[tuple[float | None, Six]], kind: str = "POLYGONAL",
        axes: str = "LOCAL_COORDS",
    ) -> Any:  # fmt: skip
        """Add a curve reaction from samples at places in mm along the member (None: not written)."""
        values = [self.single(six) for _, six in samples]
        places = [[at / self.unit] for at, _ in samples if at is not None] or None
        load = self.add("IfcStructuralLoadConfiguration", Values=values, Locations=places)
        return self.act("IfcStructuralCurveReaction", member, load, axes, PredefinedType=kind)

    def at_point(self, member: Any, point: Sequence[float], six: Six, axes: str = "GLOBAL_COORDS") -> Any:
        """Add a point reaction on a member."""
        shape = self.topology("Vertex", self.vertex(point))
        return self.act(
            "IfcStructuralPointReaction", member, self.single(six), axes, Representation=shape,
            ObjectPlacement=self.shared,
        )  # fmt: skip

    def support(self, node: Any, six: Six, axes: str = "GLOBAL_COORDS") -> Any:
        """Add a reaction of a node."""
        return self.act("IfcStructuralPointReaction", node, self.single(six), axes)

    def load(self, node: Any, six: Six) -> Any:
        """Add an action on a node."""
        return self.act("IfcStructuralPointAction", node, self.single(six), "GLOBAL_COORDS")

    def spread(self, member: Any, z: float) -> Any:
        """Add a constant load along a whole member, kN/m in the model's z."""
        load = self.add("IfcStructuralLoadLinearForce", LinearForceZ=z * self.scale)
        return self.act("IfcStructuralCurveAction", member, load, "GLOBAL_COORDS", PredefinedType="CONST")

    def act(self, kind: str, item: Any, load: Any, axes: str, **more: Any) -> Any:
        made = self.rooted(kind, AppliedLoad=load, GlobalOrLocal=axes, **more)
        self.rooted("IfcRelConnectsStructuralActivity", RelatingElement=item, RelatedStructuralActivity=made)
        return made

    def results(self, case: str, *activities: Any, kind: str = "LOAD_COMBINATION", loads: Sequence[Any] = ()) -> None:
        """Group results for a load combination or case, which may hold loads."""
        group = self.rooted(
            "IfcStructuralLoadGroup", Name=case, PredefinedType=kind, ActionType="NOTDEFINED",
            ActionSource="NOTDEFINED",
        )  # fmt: skip
        if loads:
            self.rooted("IfcRelAssignsToGroup", RelatedObjects=list(loads), RelatingGroup=group)
        found = self.rooted(
            "IfcStructuralResultGroup", TheoryType="FIRST_ORDER_THEORY", ResultForLoadGroup=group, IsLinear=True
        )
        self.rooted("IfcRelAssignsToGroup", RelatedObjects=list(activities), RelatingGroup=found)


class Bar:
    """A member in equilibrium, kN and m: what acts on its start (world axes), and a load along it (kN/m)."""

    def __init__(
        self, start: Sequence[float], end: Sequence[float], force: Sequence[float], moment: Sequence[float],
        load: Sequence[float] = (0, 0, 0), z: Sequence[float] = (0, 0, 1),
    ) -> None:  # fmt: skip
        self.start, self.end = np.array(start, float), np.array(end, float)
        self.force, self.moment, self.load = (np.array(each, float) for each in (force, moment, load))
        self.z = tuple(z)

    @property
    def run(self) -> np.ndarray:
        return self.end - self.start

    @property
    def length(self) -> float:
        return float(np.linalg.norm(self.run))

    def section(self, x: float) -> np.ndarray:
        """What the part beyond a section puts on the part before it, by the balance of the part before it."""
        here = self.start + self.run * x / self.length
        middle = (self.start + here) / 2
        force = self.force + self.load * x
        moment = self.moment + np.cross(self.start - here, self.force) + np.cross(middle - here, self.load * x)
        return -np.concatenate([force, moment])

    def backwards(self) -> Bar:
        """The same bar, modelled from its other end."""
        other = self.section(self.length)
        return Bar(self.end, self.start, other[:3], other[3:], self.load, self.z)

    def local(self) -> np.ndarray:
        """The member's local axes as rows, as the schema's documentation lays them out."""
        x = self.run / self.length
        z = np.array(self.z, float) - (np.array(self.z) @ x) * x
        z /= np.linalg.norm(z)
        return np.array([x, np.cross(z, x), z])

    def in_local(self, six: np.ndarray) -> np.ndarray:
        """Six components along the local axes."""
        return np.concatenate([self.local() @ six[:3], self.local() @ six[3:]])
