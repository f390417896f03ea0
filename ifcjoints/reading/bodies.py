"""An element's body as solids, read straight from its entities.

Swept solids, their ends clipped or not, mapped items, planar B-reps and face sets are read here; any other item
is left to the geometry kernel. Every shape that many elements share is read once.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Any

import ifcopenshell
import numpy as np

from ..model.geometry import Frame, Solid
from ..model.units import Array, Mm
from .clippings import end_clipped, first_operand, half_space
from .kernel import solid_of_item
from .placements import Placements, is_rigid
from .profiles import Profile, circle_profile, read_profile
from .reach import refuse_wide_curves, within_reach
from .units import Units
from .unreadable import Unreadable


@dataclass(frozen=True, slots=True, eq=False)
class Sweep:
    """How a solid was extruded: the profile's plane (4, 4) in the piece's own axes, and the way along."""

    profile: Profile
    plane: Array
    along: Array

    @property
    def length(self) -> Mm:
        """The extrusion's length."""
        return float(np.linalg.norm(self.along))


@dataclass(frozen=True, slots=True, eq=False)
class Piece:
    """One solid in the axes it was written in, and its sweep if it was extruded.

    `cut_from` is the extrusion that clippings made the solid from: its section stands, its ends do not.
    """

    solid: Solid
    sweep: Sweep | None = None
    cut_from: Sweep | None = None


@dataclass(frozen=True, slots=True, eq=False)
class PlacedPiece:
    """A piece and the rigid transformation (4, 4) that brings it into the world."""

    piece: Piece
    matrix: Array

    def in_world(self) -> Solid:
        """Return the solid in world axes."""
        return self.piece.solid.moved(self.matrix)


_argument: Callable[[Any, int], Any] = getattr(
    ifcopenshell.entity_instance, "get_argument", ifcopenshell.entity_instance.__getitem__
)
"""An entity's attribute by number, past the check of the number. Only for what is surely an entity: it does not
look whether there is one, and a reference that dangles would end the process."""


UP = np.array([0.0, 0.0, 1.0])


class BodyReader:
    """Reads the solids of representation items; each item is read once."""

    def __init__(self, units: Units, placements: Placements) -> None:
        self._angle = units.angle
        self._placements = placements
        self._known: dict[int, list[PlacedPiece]] = {}
        self._mappings: dict[tuple[int, int], list[PlacedPiece]] = {}
        self._kinds: dict[str, Callable[[Any], list[PlacedPiece]]] = {
            "IfcExtrudedAreaSolid": self._extruded,
            "IfcFacetedBrep": lambda item: self._shells([item.Outer]),
            "IfcFacetedBrepWithVoids": lambda item: self._shells([item.Outer]),
            "IfcShellBasedSurfaceModel": lambda item: self._shells(item.SbsmBoundary),
            "IfcFaceBasedSurfaceModel": lambda item: self._shells(item.FbsmFaces),
            "IfcPolygonalFaceSet": self._polygonal,
            "IfcTriangulatedFaceSet": self._triangulated,
            "IfcMappedItem": self._mapped,
            "IfcBooleanClippingResult": self._clipped,
            "IfcBooleanResult": self._combined,
            "IfcCsgSolid": lambda item: self.item(item.TreeRootExpression),
            "IfcRightCircularCylinder": self._cylinder,
        }

    def pieces(self, element: Any) -> list[PlacedPiece]:
        """Return an element's solids in the world, none without a body; Unreadable: ask the kernel."""
        return _moved(self.own_pieces(element), self.world_of(element))

    def own_pieces(self, element: Any) -> list[PlacedPiece]:
        """Return an element's solids in its own axes. Elements that share a shape share its pieces."""
        representation = body_of(element)
        if representation is None:
            return []
        return [placed for item in representation.Items for placed in self.item(item)]

    @property
    def length_unit(self) -> Mm:
        """The mm in one unit of length of the model."""
        return self._placements.length

    def world_of(self, element: Any) -> Array:
        """Return an element's placement in the world."""
        return self._placements.of_element(element.ObjectPlacement)

    def item(self, item: Any) -> list[PlacedPiece]:
        """Return one representation item's solids in its own axes; OutOfReach for sizes that no building has."""
        number = item.id()
        if number not in self._known:
            # What overflows here is found out below, in the corners that come of it.
            with np.errstate(over="ignore", invalid="ignore"):
                pieces = self._read(item)
            for placed in pieces:
                within_reach(placed.piece.solid.vertices)
            self._known[number] = pieces
        return self._known[number]

    def _read(self, item: Any) -> list[PlacedPiece]:
        reader = self._kinds.get(item.is_a(), self._from_kernel)
        try:
            return reader(item)
        except Unreadable:
            return self._from_kernel(item)

    def _from_kernel(self, item: Any) -> list[PlacedPiece]:
        refuse_wide_curves(item, self._placements.length)
        base = first_operand(item)
        cut_from = None
        if base is not None and base.is_a() == "IfcExtrudedAreaSolid":
            (placed,) = self.item(base)
            cut_from = placed.piece.sweep
        return [PlacedPiece(Piece(solid_of_item(item), cut_from=cut_from), np.eye(4))]

    def _combined(self, item: Any) -> list[PlacedPiece]:
        """Read a union as its two bodies side by side, a difference as a clipping."""
        if item.Operator == "UNION":
            return [*self.item(item.FirstOperand), *self.item(item.SecondOperand)]
        return self._clipped(item)

    def _cylinder(self, item: Any) -> list[PlacedPiece]:
        """Read a cylinder as the extrusion of its circle."""
        profile = circle_profile(item.Radius * self._placements.length)
        return self._swept(profile, self._placements.axes(item.Position), item.Height * self._placements.length * UP)

    def _clipped(self, item: Any) -> list[PlacedPiece]:
        """Read an extrusion whose ends half-spaces have cut; Unreadable for cuts of any other kind."""
        base = self.item(item.FirstOperand)
        half = half_space(item.SecondOperand, self._placements) if item.Operator == "DIFFERENCE" else None
        sweep = (base[0].piece.sweep or base[0].piece.cut_from) if len(base) == 1 else None
        if half is None or sweep is None:
            raise Unreadable(f"its body is an {item.is_a()}")
        solid = end_clipped(base[0].piece.solid, sweep.along, half)
        return [PlacedPiece(Piece(solid, cut_from=sweep), np.eye(4))]

    def _extruded(self, item: Any) -> list[PlacedPiece]:
        profile = read_profile(item.SweptArea, self._placements, self._angle)
        plane = self._placements.axes(item.Position)
        direction = np.array(item.ExtrudedDirection.DirectionRatios, float)
        along = direction / np.linalg.norm(direction) * item.Depth * self._placements.length
        return self._swept(profile, plane, along)

    def _swept(self, profile: Profile, plane: Array, along: Array) -> list[PlacedPiece]:
        if not np.linalg.norm(along) > 1e-6:
            raise Unreadable("its extrusion has no depth")
        solid = Solid.extruded(profile.rings, plane, along)
        return [PlacedPiece(Piece(solid, Sweep(profile, plane, plane[:3, :3] @ along)), np.eye(4))]

    def _shells(self, shells: Any) -> list[PlacedPiece]:
        return [PlacedPiece(Piece(self._shell(shell)), np.eye(4)) for shell in shells]

    def _shell(self, shell: Any) -> Solid:
        """Read a shell. Attributes are taken by number: names cost half of reading a model of B-reps."""
        if shell is None:
            raise Unreadable("a shell that its body refers to is not in the file")
        numbers: dict[int, int] = {}
        points: list[tuple[float, ...]] = []
        faces = []
        for face in shell[0]:
            bounds = face[0]
            if len(bounds) > 1:
                bounds = sorted(bounds, key=lambda bound: not bound.is_a("IfcFaceOuterBound"))
            loops = []
            for bound in bounds:
                loop = []
                for point in _polygon(bound[0]):
                    key = point.id()
                    number = numbers.get(key)
                    if number is None:
                        number = numbers[key] = len(points)
                        points.append(_argument(point, 0))
                    loop.append(number)
                if len(loop) >= 3:
                    loops.append(loop if bound[1] else loop[::-1])
            if loops:
                faces.append(loops)
        if len(faces) < 4:
            raise Unreadable("its shell has fewer than four faces")
        return Solid.from_faces(np.array(points, float) * self._placements.length, faces)

    def _polygonal(self, item: Any) -> list[PlacedPiece]:
        renumber = item.PnIndex
        faces = []
        for face in item.Faces:
            loops = [face.CoordIndex, *(getattr(face, "InnerCoordIndices", None) or ())]
            faces.append([[(renumber[i - 1] if renumber else i) - 1 for i in loop] for loop in loops])
        vertices = np.array(item.Coordinates.CoordList, float) * self._placements.length
        return [PlacedPiece(Piece(Solid.from_faces(vertices, faces)), np.eye(4))]

    def _triangulated(self, item: Any) -> list[PlacedPiece]:
        renumber = item.PnIndex
        triangles = [[[(renumber[i - 1] if renumber else i) - 1 for i in triple]] for triple in item.CoordIndex]
        vertices = np.array(item.Coordinates.CoordList, float) * self._placements.length
        return [PlacedPiece(Piece(Solid.from_faces(vertices, triangles)), np.eye(4))]

    def _mapped(self, item: Any) -> list[PlacedPiece]:
        source, target = item.MappingSource, item.MappingTarget
        key = source.id(), target.id()
        if key not in self._mappings:
            matrix = self._placements.operator(target) @ self._placements.axes(source.MappingOrigin)
            inner = [piece for part in source.MappedRepresentation.Items for piece in self.item(part)]
            self._mappings[key] = _moved(inner, matrix)
        return self._mappings[key]


def _polygon(loop: Any) -> Any:
    if loop.is_a() != "IfcPolyLoop":
        raise Unreadable("its faces have curved edges")
    return _argument(loop, 0)


def body_of(element: Any) -> Any | None:
    """Return the representation that holds an element's body, or None."""
    shape = element.Representation
    if shape is None:
        return None
    solid = [each for each in shape.Representations if each.RepresentationIdentifier in (None, "Body", "Facetation")]
    solid = [each for each in solid if each.RepresentationType not in ("Curve2D", "Curve3D", "BoundingBox")]
    return solid[0] if solid else None


def _moved(pieces: list[PlacedPiece], matrix: Array) -> list[PlacedPiece]:
    """Move pieces; what is scaled or mirrored is worked into the solid itself, so matrices stay rigid."""
    if is_rigid(matrix):
        return [PlacedPiece(placed.piece, matrix @ placed.matrix) for placed in pieces]
    return [PlacedPiece(Piece(placed.piece.solid.moved(matrix @ placed.matrix)), np.eye(4)) for placed in pieces]


def frame_of(matrix: Array) -> Frame:
    """Return a rigid transformation as a frame."""
    return Frame(matrix[:3, 3], matrix[:3, :3].T)
