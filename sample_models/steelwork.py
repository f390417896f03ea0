"""Members, plates, bolts, holes and welds of a steel building, written as proper IFC."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any

import numpy as np
from ifcopenshell.util.placement import get_local_placement

from .making import Model, Ring, at, circle

Size = tuple[float, float, float, float, float]
"""h, b, tw, tf, r of an I-section in mm."""

IPE_300: Size = (300.0, 150.0, 7.1, 10.7, 15.0)
IPE_360: Size = (360.0, 170.0, 8.0, 12.7, 18.0)
IPE_400: Size = (400.0, 180.0, 8.6, 13.5, 21.0)
IPE_240: Size = (240.0, 120.0, 6.2, 9.8, 15.0)
HEB_200: Size = (200.0, 200.0, 9.0, 15.0, 18.0)
HEB_240: Size = (240.0, 240.0, 10.0, 17.0, 21.0)
HEB_300: Size = (300.0, 300.0, 11.0, 19.0, 27.0)

FASTENERS = {
    19.05: (31.75, 11.9, 18.7, 3.4),
    20.0: (30.0, 12.5, 18.0, 3.0),
    24.0: (36.0, 15.0, 21.5, 4.0),
}
"""Across flats, head, nut and washer: ISO 4014, ISO 4032, ISO 7089; from memory washers and 3/4 in. heavy hex."""

CREATED = 1767600000
"""5 January 2026, 08:00 UTC, in seconds since 1970: when every made model says it was made."""

UP, ACROSS, ALONG = np.array([0.0, 0.0, 1.0]), np.array([0.0, 1.0, 0.0]), np.array([1.0, 0.0, 0.0])


class Steelwork(Model):
    """A model of one building with one storey, to which steel parts are added."""

    def __init__(self, name: str, schema: str = "IFC4", unit: float = 1.0, world: np.ndarray | None = None) -> None:
        super().__init__(schema, unit, world)
        self.project.Name = "Heron Yard"
        site = self.rooted("IfcSite", Name="Heron Yard", CompositionType="ELEMENT")
        building = self.rooted("IfcBuilding", Name=name, CompositionType="ELEMENT")
        storey = self.rooted("IfcBuildingStorey", Name="Ground", CompositionType="ELEMENT")
        for whole, part in ((self.project, site), (site, building), (building, storey)):
            self.rooted("IfcRelAggregates", RelatingObject=whole, RelatedObjects=[part])
        self.contained = self.rooted(
            "IfcRelContainedInSpatialStructure", RelatedElements=[storey], RelatingStructure=storey
        )
        self.elements: list[Any] = []
        self._materials: dict[str, tuple[Any, Any]] = {}
        self._profile_sets: dict[str, tuple[Any, Any]] = {}
        self._bolt_types: dict[str, tuple[Any, Any]] = {}

    def rooted(self, kind: str, **attributes: Any) -> Any:
        """Create an entity with a GlobalId and, where the schema asks for one, the history all of them share."""
        if self.file.schema == "IFC2X3":
            attributes["OwnerHistory"] = self._history()
        return super().rooted(kind, **attributes)

    def _history(self) -> Any:
        if self.file.by_type("IfcOwnerHistory"):
            return self.file.by_type("IfcOwnerHistory")[0]
        yard = self.add("IfcOrganization", Name="Heron Yard")
        office = self.add("IfcPerson", FamilyName="Drawing office")
        user = self.add("IfcPersonAndOrganization", ThePerson=office, TheOrganization=yard)
        program = self.add(
            "IfcApplication", ApplicationDeveloper=yard, Version="1",
            ApplicationFullName="Sample models", ApplicationIdentifier="sample_models",
        )  # fmt: skip
        return self.add(
            "IfcOwnerHistory", OwningUser=user, OwningApplication=program, ChangeAction="ADDED", CreationDate=CREATED
        )

    def element(self, kind: str, name: str, matrix: np.ndarray, items: Sequence[Any], rep: str, **more: Any) -> Any:
        """Add an element to the storey."""
        made = self.product(kind, name, matrix, items, rep, Tag=name, **more)
        self.elements.append(made)
        return made

    def assemble(self, name: str, parts: Sequence[Any]) -> Any:
        """Put parts into an assembly, the main one first: it gives the place that all their places are told from."""
        places = [self._place(part) for part in parts]
        placement = self.placement(places[0])
        for part, place in zip(parts, places, strict=True):
            part.ObjectPlacement = self.placement(np.linalg.inv(places[0]) @ place, placement)
            self.elements.remove(part)
        assembly = self.rooted(
            "IfcElementAssembly", Name=name, Tag=name, ObjectPlacement=placement, AssemblyPlace="FACTORY"
        )
        self.rooted("IfcRelAggregates", RelatingObject=assembly, RelatedObjects=list(parts))
        self.elements.append(assembly)
        return assembly

    def _place(self, element: Any) -> np.ndarray:
        """Return where an element stands in the world, in mm."""
        matrix = get_local_placement(element.ObjectPlacement)
        matrix[:3, 3] *= self.unit
        return matrix

    def connect(self, carrier: Any, carried: Any, by: Sequence[Any]) -> None:
        """Say that one member is connected to another by plates and bolts."""
        self.rooted(
            "IfcRelConnectsWithRealizingElements",
            RelatingElement=carrier, RelatedElement=carried, RealizingElements=list(by), ConnectionType="bolted",
        )  # fmt: skip

    def finish(self) -> None:
        """Put all elements into the storey. Call once, last."""
        self.contained.RelatedElements = self.elements

    def give_material(self, element: Any, name: str) -> None:
        """Give an element a steel grade as its material."""
        if name not in self._materials:
            material = self.add("IfcMaterial", Name=name)
            relation = self.rooted("IfcRelAssociatesMaterial", RelatedObjects=[element], RelatingMaterial=material)
            self._materials[name] = material, relation
            return
        relation = self._materials[name][1]
        relation.RelatedObjects = [*relation.RelatedObjects, element]

    def member(
        self, kind: str, name: str, size: Size, label: str, matrix: np.ndarray, length: float, grade: str = "S355J2"
    ) -> Any:
        """Add an I-section along z of its placement, its depth along y, with a material profile set."""
        profile = self.i_profile(*size, label)
        element = self.element(kind, name, matrix, [self.extruded(profile, length)], "SweptSolid")
        self._give_profile(element, profile, label, grade)
        return element

    def cut_member(
        self, name: str, size: Size, label: str, matrix: np.ndarray, span: tuple[float, float], cuts: Sequence[Any]
    ) -> Any:
        """Add a rafter whose ends are cut by planes: extruded over `span` along z, then clipped.

        `cuts` are matrices (in the member's own axes) whose z points to the side that is cut away.
        """
        profile = self.i_profile(*size, label)
        body = self.extruded(profile, span[1] - span[0], at(z=span[0]))
        for cut in cuts:
            plane = self.add("IfcPlane", Position=self.axes(cut))
            half = self.add("IfcHalfSpaceSolid", BaseSurface=plane, AgreementFlag=False)
            body = self.add("IfcBooleanClippingResult", Operator="DIFFERENCE", FirstOperand=body, SecondOperand=half)
        element = self.element("IfcBeam", name, matrix, [body], "Clipping")
        self._give_profile(element, profile, label, "S355J2")
        return element

    def _give_profile(self, element: Any, profile: Any, label: str, grade: str) -> None:
        if self.file.schema == "IFC2X3":
            self.give_material(element, grade)
            return
        if label not in self._profile_sets:
            material = self.add("IfcMaterial", Name=grade, Category="steel")
            layer = self.add("IfcMaterialProfile", Name=label, Material=material, Profile=profile)
            usage = self.add(
                "IfcMaterialProfileSetUsage",
                ForProfileSet=self.add("IfcMaterialProfileSet", Name=label, MaterialProfiles=[layer]),
            )
            relation = self.rooted("IfcRelAssociatesMaterial", RelatedObjects=[element], RelatingMaterial=usage)
            self._profile_sets[label] = usage, relation
            return
        relation = self._profile_sets[label][1]
        relation.RelatedObjects = [*relation.RelatedObjects, element]

    def plate(
        self, name: str, ring: Ring, thickness: float, matrix: np.ndarray, grade: str = "S355J2", **more: Any
    ) -> Any:
        """Add a plate: an outline in x and y of its placement, thick along z."""
        body = self.extruded(self.outline([ring]), thickness)
        element = self.element("IfcPlate", name, matrix, [body], "SweptSolid", **more)
        self.give_material(element, grade)
        return element

    def drill(self, part: Any, points: Sequence[np.ndarray], direction: np.ndarray, hole: float, depth: float) -> None:
        """Drill holes through a part: an opening of this diameter for each point, its middle there."""
        for point in points:
            body = self.extruded(self.profile("IfcCircleProfileDef", Radius=hole / 2), depth, at(z=-depth / 2))
            self.opening(part, at(*point, axis=direction), [body])

    def bolt_group(
        self, label: str, d: float, length: float, grip: float, heads: Sequence[np.ndarray], direction: np.ndarray
    ) -> list[Any]:
        """Add bolts, each under its head at a point (3,), with washer and nut behind the grip, of one type."""
        source = self.mapped(self.bolt_bodies(d, length, grip)).MappingSource
        bolts = []
        for point in heads:
            bolts.append(
                self.element(
                    "IfcMechanicalFastener", label, at(*point, axis=direction), [self.map_again(source)],
                    "MappedRepresentation", NominalDiameter=d / self.unit, NominalLength=length / self.unit,
                    **self._bolt_kind("BOLT"),
                )
            )  # fmt: skip
        self._type_bolts(label, d, length, bolts)
        return bolts

    def bolt_bodies(self, d: float, length: float, grip: float) -> list[Any]:
        """Write shank, head, washer and nut along z from under the head."""
        across_flats, head, nut, washer = FASTENERS[round(d, 2)]
        hexagon = self.outline([circle(across_flats / 3**0.5, 6)])
        ring = self.outline([circle(across_flats * 0.62, 24), circle(d / 2 + 0.5, 24)])
        return [
            self.extruded(self.profile("IfcCircleProfileDef", Radius=d / 2), length),
            self.extruded(hexagon, head, at(z=-head)),
            self.extruded(ring, washer, at(z=grip)),
            self.extruded(hexagon, nut, at(z=grip + washer)),
        ]

    def anchors(self, label: str, d: float, length: float, heads: Sequence[np.ndarray]) -> None:
        """Add anchors that hang down from their nuts."""
        items = self.bolt_bodies(d, length, 40.0)
        for point in heads:
            self.element(
                "IfcMechanicalFastener", label, at(*point, axis=-UP, ref=ALONG), items, "SweptSolid",
                NominalDiameter=d / self.unit, NominalLength=length / self.unit, **self._bolt_kind("ANCHORBOLT"),
            )  # fmt: skip

    def _bolt_kind(self, kind: str) -> dict[str, Any]:
        return {"ObjectType": kind} if self.file.schema == "IFC2X3" else {"PredefinedType": kind}

    def _type_bolts(self, label: str, d: float, length: float, bolts: Sequence[Any]) -> None:
        if self.file.schema == "IFC2X3":
            return
        if label not in self._bolt_types:
            made = self.rooted(
                "IfcMechanicalFastenerType", Name=label, PredefinedType="BOLT",
                NominalDiameter=d / self.unit, NominalLength=length / self.unit,
            )  # fmt: skip
            self._bolt_types[label] = (
                made,
                self.rooted("IfcRelDefinesByType", RelatedObjects=list(bolts), RelatingType=made),
            )
            return
        relation = self._bolt_types[label][1]
        relation.RelatedObjects = [*relation.RelatedObjects, *bolts]

    def fillet_weld(self, name: str, throat: float, matrix: np.ndarray, length: float, rise: float = 0.0) -> Any:
        """Add a fillet weld along z: one leg along y, the other along x on a plate that rises by so much per length."""
        leg = throat * 2**0.5
        body = self.extruded(self.outline([[(0, 0), (leg, leg * rise), (0, leg)]]), length)
        kind = {"ObjectType": "WELD"} if self.file.schema == "IFC2X3" else {"PredefinedType": "WELD"}
        element = self.product("IfcFastener", name, matrix, [body], "SweptSolid", **kind)
        self.elements.append(element)
        self.properties(element, "Pset_FastenerWeld", Type1="fillet", a=throat)
        return element
