"""A small kit that writes the patterns of real exports: entities in any schema and unit, lengths given in mm."""

from __future__ import annotations

import math
import uuid
from collections.abc import Sequence
from typing import Any

import ifcopenshell
import ifcopenshell.guid
import numpy as np

Ring = Sequence[Sequence[float]]

INCH, FOOT = 25.4, 304.8
SI = {1.0: "MILLI", 10.0: "CENTI", 1000.0: None}


def at(x: float = 0.0, y: float = 0.0, z: float = 0.0, axis: Any = (0, 0, 1), ref: Any = None) -> np.ndarray:
    """Return a placement matrix: origin, z along `axis`, x as near to `ref` as may be."""
    axis = np.array(axis, float) / np.linalg.norm(axis)
    hint = np.array(ref, float) if ref is not None else np.eye(3)[int(np.argmin(np.abs(axis)))]
    along = hint - (hint @ axis) * axis
    along /= np.linalg.norm(along)
    matrix = np.eye(4)
    matrix[:3, 0], matrix[:3, 1], matrix[:3, 2] = along, np.cross(axis, along), axis
    matrix[:3, 3] = x, y, z
    return matrix


def turned(degrees: float, about: Any = (0, 0, 1), shift: Any = (0, 0, 0)) -> np.ndarray:
    """Return a rotation about an axis through the origin, then a shift."""
    k = np.array(about, float) / np.linalg.norm(about)
    skew = np.array([[0, -k[2], k[1]], [k[2], 0, -k[0]], [-k[1], k[0], 0]])
    angle = math.radians(degrees)
    matrix = np.eye(4)
    matrix[:3, :3] = np.eye(3) + math.sin(angle) * skew + (1 - math.cos(angle)) * skew @ skew
    matrix[:3, 3] = shift
    return matrix


def circle(radius: float, corners: int = 16, x: float = 0.0, y: float = 0.0, start: float = 0.0) -> Ring:
    """Return a regular polygon inscribed in a circle."""
    angles = [start + 2 * math.pi * k / corners for k in range(corners)]
    return [(x + radius * math.cos(a), y + radius * math.sin(a)) for a in angles]


def box(b: float, h: float, x: float = 0.0, y: float = 0.0) -> Ring:
    """Return a rectangle's corners about (x, y)."""
    return [(x - b / 2, y - h / 2), (x + b / 2, y - h / 2), (x + b / 2, y + h / 2), (x - b / 2, y + h / 2)]


def i_ring(h: float, b: float, tw: float, tf: float, r: float = 0.0, facets: int = 3) -> Ring:
    """Return an I-section's outline with its root fillets in so many chords, corners on the true arc."""
    quarter = [(b / 2, h / 2), (b / 2, h / 2 - tf)]
    if r:
        centre = tw / 2 + r, h / 2 - tf - r
        for k in range(facets + 1):
            angle = math.pi / 2 + k * math.pi / 2 / facets
            quarter.append((centre[0] + r * math.cos(angle), centre[1] + r * math.sin(angle)))
    else:
        quarter.append((tw / 2, h / 2 - tf))
    right = quarter + [(x, -y) for x, y in reversed(quarter)]
    return [*right, *[(-x, y) for x, y in reversed(right)]]


def prism_faces(rings: Sequence[Ring], depth: float) -> tuple[list[tuple[float, ...]], list[list[list[int]]]]:
    """Return the corners and faces of a prism along z, the outside ring first; rings may turn either way."""
    vertices: list[tuple[float, ...]] = []
    bottom, top, sides = [], [], []
    for number, ring in enumerate(rings):
        area = sum(a[0] * b[1] - b[0] * a[1] for a, b in zip(ring, [*ring[1:], ring[0]], strict=True))
        points = list(ring) if (area > 0) == (number == 0) else list(reversed(ring))
        first, count = len(vertices), len(points)
        vertices += [(x, y, 0.0) for x, y in points] + [(x, y, depth) for x, y in points]
        low = list(range(first, first + count))
        bottom.append(low[::-1])
        top.append([k + count for k in low])
        sides += [[[a, b, b + count, a + count]] for a, b in zip(low, [*low[1:], low[0]], strict=True)]
    return vertices, [bottom, top, *sides]


class Model:
    """An IFC file being made. `unit` is the mm in its unit of length; `world` moves every product."""

    def __init__(self, schema: str = "IFC4", unit: float = 1.0, world: np.ndarray | None = None) -> None:
        self.file = ifcopenshell.file(schema=schema)
        self.unit = unit
        self.world = np.eye(4) if world is None else world
        self._count = 0
        self.at_origin = self.axes(np.eye(4))
        self.context = self.add(
            "IfcGeometricRepresentationContext",
            ContextType="Model", CoordinateSpaceDimension=3, Precision=1e-5, WorldCoordinateSystem=self.at_origin,
        )  # fmt: skip
        assignment = self.add("IfcUnitAssignment", Units=[self._length_unit(), self._angle_unit()])
        self.project = self.rooted(
            "IfcProject", Name="Made", UnitsInContext=assignment, RepresentationContexts=[self.context]
        )

    def add(self, kind: str, **attributes: Any) -> Any:
        """Create an entity."""
        return self.file.create_entity(kind, **attributes)

    def rooted(self, kind: str, **attributes: Any) -> Any:
        """Create an entity with a GlobalId that is the same each time."""
        self._count += 1
        guid = ifcopenshell.guid.compress(uuid.uuid5(uuid.NAMESPACE_OID, f"made {self._count}").hex)
        return self.add(kind, GlobalId=guid, **attributes)

    def _length_unit(self) -> Any:
        if self.unit in SI:
            return self.add("IfcSIUnit", UnitType="LENGTHUNIT", Prefix=SI[self.unit], Name="METRE")
        metre = self.add("IfcSIUnit", UnitType="LENGTHUNIT", Name="METRE")
        value = self.file.create_entity("IfcLengthMeasure", self.unit / 1000.0)
        factor = self.add("IfcMeasureWithUnit", ValueComponent=value, UnitComponent=metre)
        dimensions = self.file.create_entity("IfcDimensionalExponents", 1, 0, 0, 0, 0, 0, 0)
        return self.add(
            "IfcConversionBasedUnit", Dimensions=dimensions, UnitType="LENGTHUNIT", Name="OWN", ConversionFactor=factor
        )

    def _angle_unit(self) -> Any:
        return self.add("IfcSIUnit", UnitType="PLANEANGLEUNIT", Name="RADIAN")

    def point(self, *mm: float) -> Any:
        """Create a point given in mm."""
        return self.add("IfcCartesianPoint", Coordinates=[float(value) / self.unit for value in mm])

    def direction(self, *ratios: float) -> Any:
        """Create a direction."""
        return self.add("IfcDirection", DirectionRatios=[float(value) for value in ratios])

    def axes(self, matrix: np.ndarray) -> Any:
        """Create an axis placement from a matrix in mm."""
        x, z = self.direction(*matrix[:3, 0]), self.direction(*matrix[:3, 2])
        return self.add("IfcAxis2Placement3D", Location=self.point(*matrix[:3, 3]), Axis=z, RefDirection=x)

    def flat_axes(self, x: float = 0.0, y: float = 0.0, degrees: float = 0.0) -> Any:
        """Create an axis placement in a plane."""
        angle = math.radians(degrees)
        along = self.direction(math.cos(angle), math.sin(angle))
        return self.add("IfcAxis2Placement2D", Location=self.point(x, y), RefDirection=along)

    def placement(self, matrix: np.ndarray, relative_to: Any = None) -> Any:
        """Create an object placement."""
        return self.add("IfcLocalPlacement", PlacementRelTo=relative_to, RelativePlacement=self.axes(matrix))

    def profile(self, kind: str, name: str | None = None, position: Any = None, **mm: Any) -> Any:
        """Create a parametric profile; sizes in mm."""
        sizes = {key: value / self.unit for key, value in mm.items()}
        position = position or self.flat_axes()
        return self.add(kind, ProfileType="AREA", ProfileName=name, Position=position, **sizes)

    def i_profile(self, h: float, b: float, tw: float, tf: float, r: float | None, name: str | None = None) -> Any:
        """Create an I-section's parametric profile."""
        sizes = {"OverallDepth": h, "OverallWidth": b, "WebThickness": tw, "FlangeThickness": tf}
        return self.profile("IfcIShapeProfileDef", name, **sizes, **({"FilletRadius": r} if r else {}))

    def polyline(self, ring: Ring) -> Any:
        """Create a closed polyline."""
        points = [self.point(*corner) for corner in ring]
        return self.add("IfcPolyline", Points=[*points, points[0]])

    def outline(self, rings: Sequence[Ring], name: str | None = None) -> Any:
        """Create an arbitrary closed profile, with voids where there is more than one ring."""
        curves = [self.polyline(ring) for ring in rings]
        if len(curves) == 1:
            return self.add("IfcArbitraryClosedProfileDef", ProfileType="AREA", ProfileName=name, OuterCurve=curves[0])
        return self.add(
            "IfcArbitraryProfileDefWithVoids",
            ProfileType="AREA", ProfileName=name, OuterCurve=curves[0], InnerCurves=curves[1:],
        )  # fmt: skip

    def extruded(self, profile: Any, depth: float, matrix: np.ndarray | None = None, along: Any = (0, 0, 1)) -> Any:
        """Create an extrusion."""
        return self.add(
            "IfcExtrudedAreaSolid",
            SweptArea=profile, Position=self.axes(np.eye(4) if matrix is None else matrix),
            ExtrudedDirection=self.direction(*along), Depth=depth / self.unit,
        )  # fmt: skip

    def brep(self, vertices: Sequence[Sequence[float]], faces: Sequence[Sequence[Sequence[int]]]) -> Any:
        """Create a faceted B-rep; of a face's loops the outside comes first."""
        return self.add("IfcFacetedBrep", Outer=self.add("IfcClosedShell", CfsFaces=self.faces(vertices, faces)))

    def faces(self, vertices: Sequence[Sequence[float]], faces: Sequence[Sequence[Sequence[int]]]) -> list[Any]:
        """Create plane faces."""
        points = [self.point(*vertex) for vertex in vertices]
        made = []
        for loops in faces:
            bounds = []
            for number, loop in enumerate(loops):
                polygon = self.add("IfcPolyLoop", Polygon=[points[k] for k in loop])
                kind = "IfcFaceBound" if number else "IfcFaceOuterBound"
                bounds.append(self.add(kind, Bound=polygon, Orientation=True))
            made.append(self.add("IfcFace", Bounds=bounds))
        return made

    def brep_prism(self, rings: Sequence[Ring], depth: float, matrix: np.ndarray | None = None) -> Any:
        """Create a prism as a faceted B-rep."""
        vertices, faces = prism_faces(rings, depth)
        if matrix is not None:
            vertices = [tuple(matrix[:3, :3] @ vertex + matrix[:3, 3]) for vertex in np.array(vertices)]
        return self.brep(vertices, faces)

    def mapped(self, items: Sequence[Any], kind: str = "SweptSolid", operator: Any = None) -> Any:
        """Create a mapped item of a new representation map."""
        source = self.add(
            "IfcRepresentationMap", MappingOrigin=self.at_origin, MappedRepresentation=self.representation(items, kind)
        )
        return self.map_again(source, operator)

    def map_again(self, source: Any, operator: Any = None) -> Any:
        """Create a mapped item of a representation map that stands."""
        operator = operator or self.add("IfcCartesianTransformationOperator3D", LocalOrigin=self.point(0, 0, 0))
        return self.add("IfcMappedItem", MappingSource=source, MappingTarget=operator)

    def representation(self, items: Sequence[Any], kind: str = "SweptSolid") -> Any:
        """Create a body representation."""
        return self.add(
            "IfcShapeRepresentation",
            ContextOfItems=self.context, RepresentationIdentifier="Body", RepresentationType=kind, Items=list(items),
        )  # fmt: skip

    def product(
        self, kind: str, name: str, matrix: np.ndarray, items: Sequence[Any] = (), rep: str = "SweptSolid", **more: Any
    ) -> Any:
        """Create an element with a body (or none) at a place in the world."""
        shape = None
        if items:
            shape = self.add("IfcProductDefinitionShape", Representations=[self.representation(items, rep)])
        return self.rooted(
            kind, Name=name, ObjectPlacement=self.placement(self.world @ matrix), Representation=shape, **more
        )

    def opening(self, part: Any, matrix: np.ndarray, items: Sequence[Any], rep: str = "SweptSolid") -> Any:
        """Create an opening in an element."""
        made = self.product("IfcOpeningElement", "opening", matrix, items, rep)
        self.rooted("IfcRelVoidsElement", RelatingBuildingElement=part, RelatedOpeningElement=made)
        return made

    def properties(self, element: Any, set_name: str, **values: Any) -> Any:
        """Give an element a property set of texts (str) and lengths (float, mm)."""
        made = []
        for name, value in values.items():
            if isinstance(value, str):
                wrapped = self.file.create_entity("IfcLabel", value)
            else:
                wrapped = self.file.create_entity("IfcLengthMeasure", value / self.unit)
            made.append(self.add("IfcPropertySingleValue", Name=name, NominalValue=wrapped))
        owned = self.rooted("IfcPropertySet", Name=set_name, HasProperties=made)
        self.rooted("IfcRelDefinesByProperties", RelatedObjects=[element], RelatingPropertyDefinition=owned)
        return owned

    def material(self, element: Any, name: str) -> Any:
        """Give an element a plain material."""
        made = self.add("IfcMaterial", Name=name)
        self.rooted("IfcRelAssociatesMaterial", RelatedObjects=[element], RelatingMaterial=made)
        return made

    def bolt(
        self, point: Any, direction: Any, d: float = 24.0, length: float = 80.0, name: str | None = None, **more: Any
    ) -> Any:
        """Create a bolt of class 8.8: shank from under the head at `point` along `direction`, hexagon head and nut."""
        items = self.bolt_items(d, length)
        name = name or f"M{d:g}x{length:g} 8.8"
        return self.product("IfcMechanicalFastener", name, at(*point, axis=direction), items, **more)

    def bolt_items(self, d: float, length: float, matrix: np.ndarray | None = None) -> list[Any]:
        """Create the three solids of a bolt along z from under its head."""
        base = np.eye(4) if matrix is None else matrix
        shank = self.profile("IfcCircleProfileDef", Radius=d / 2)
        hexagon = self.outline([circle(0.9 * d, 6)])
        return [
            self.extruded(shank, length, base),
            self.extruded(hexagon, 0.6 * d, base @ at(z=-0.6 * d)),
            self.extruded(hexagon, 0.8 * d, base @ at(z=length - 1.1 * d)),
        ]
