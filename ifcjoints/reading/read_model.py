"""A whole model, from an open IFC file to parts, bolts and welds."""

from __future__ import annotations

from collections.abc import Callable
from functools import partial
from pathlib import Path
from typing import Any

import numpy as np
import shapely

from ..model.audit import ModelFile
from ..model.contents import Contents
from ..model.findings import Problem
from ..model.geometry import Frame, Prism, Solid
from ..model.parts import Bolt, Hole, MemberName, MemberShape, Part, WeldPart
from ..model.units import Array, Mm
from ..settings import ReadingSettings
from .axial import is_nut_or_washer
from .bodies import BodyReader, Piece, PlacedPiece
from .built_up import join_built_up
from .designations import read_designation
from .fastener_kinds import is_named_bolt
from .fasteners import FastenerReader, unknown_bolt
from .faults import body_faults, doubled_ids
from .holes import hole_from_opening, holes_in_solid, with_holes_seen
from .kernel import solid_from_kernel
from .materials import read_grade
from .members import as_built_up, as_member
from .open_model import originating_system, sha256
from .placements import Placements
from .plates import as_plate
from .properties import PropertyTable
from .units import read_units
from .unreadable import Unreadable
from .welds import is_weld, read_weld

NOT_STEELWORK = (
    "IfcFeatureElement", "IfcFastener", "IfcMechanicalFastener", "IfcDistributionElement", "IfcFurnishingElement",
    "IfcTransportElement", "IfcVirtualElement", "IfcReinforcingElement", "IfcWall", "IfcDoor", "IfcWindow",
    "IfcCovering", "IfcCurtainWall", "IfcFooting", "IfcPile",
)  # fmt: skip

NEAR: Mm = 1000.0
"""A part whose box lies farther than this from every bolt belongs to no joint: end plates are smaller."""

CORNERS = np.array([[bool(number >> axis & 1) for axis in range(3)] for number in range(8)])

Progress = Callable[[str, float], None]


def read_model(
    file: Any, settings: ReadingSettings, path: Path | None = None, progress: Progress | None = None
) -> Contents:
    """Read an open IFC file. What is wrong with single elements is listed in `problems`, not raised."""
    return _Reading(file, settings).contents(path, progress or (lambda _text, _share: None))


class _Reading:
    """One pass over one file."""

    def __init__(self, file: Any, settings: ReadingSettings) -> None:
        self.file = file
        self.units = read_units(file)
        self.bodies = BodyReader(self.units, Placements(self.units.length))
        self.properties = PropertyTable(settings, self.units.length)
        self.fasteners = FastenerReader(self.bodies, self.units.length, self.properties)
        self.problems: list[Problem] = []
        self.shapes: dict[Piece, tuple[Prism | None, MemberShape | None]] = {}
        self.built_up: dict[tuple[Piece, ...], MemberShape | None] = {}
        self.whole: dict[Piece, Piece] = {}
        self.drilled: dict[Piece, list[Hole]] = {}
        self.openings = self._openings()

    def contents(self, path: Path | None, progress: Progress) -> Contents:
        bolts: list[Bolt] = []
        welds: list[WeldPart] = []
        self.problems += doubled_ids(self._sorted("IfcElement"))
        for element in self._sorted("IfcFastener", "IfcMechanicalFastener"):
            if element.is_a("IfcMechanicalFastener"):
                bolts += self._guarded(element, self.fasteners.read) or [unknown_bolt(element)]
            elif is_weld(element):
                weld = self._guarded(element, lambda each: read_weld(each, self.bodies, self.properties))
                welds += [weld] if weld else []
            else:
                bolts += self._guarded(element, self.fasteners.read_by_shape) or []
        progress("bolts read", 0.2)
        elements = [each for each in self._sorted("IfcElement") if not any(map(each.is_a, NOT_STEELWORK))]
        for element in filter(is_named_bolt, elements):
            bolts += self._guarded(element, self.fasteners.read_by_shape) or []
        found = {bolt.step_id for bolt in bolts}
        elements = [each for each in elements if each.id() not in found]
        bodies: list[tuple[Any, list[PlacedPiece]]] = []
        for number, element in enumerate(elements):
            pieces = self._guarded(element, self._pieces) if element.Representation is not None else None
            bodies += [(element, pieces)] if pieces else []
            if number % 200 == 0:
                progress("bodies read", 0.2 + 0.6 * number / len(elements))
        near = near_bolts([pieces for _, pieces in bodies], bolts)
        opened = [body for body, is_near in zip(bodies, near, strict=True) if is_near and not _is_loose(*body)]
        parts = [part for each in opened if (part := self._guarded(each[0], partial(self._part, pieces=each[1])))]
        parts = join_built_up(parts, self._owners())
        progress("parts read", 1.0)
        names = tuple(self._names(each) for each in elements)
        self.problems += [Problem(element=who, message=what) for who, what in self.fasteners.problems()]
        problems = tuple(self.problems)
        model = self._model_file(path)
        used = dict(sorted(self.properties.used.items()))
        return Contents(model, tuple(parts), len(bodies), tuple(bolts), tuple(welds), names, problems, used)

    def _sorted(self, *classes: str) -> list[Any]:
        """Return elements in the file's order, each once."""
        found: dict[int, Any] = {}
        for name in classes:
            found.update((each.id(), each) for each in self.file.by_type(name))
        return [found[number] for number in sorted(found)]

    def _guarded(self, element: Any, read: Callable[[Any], Any]) -> Any:
        """Read one element; one that is broken is told of and left out, and the run goes on."""
        try:
            return read(element)
        except Exception as error:
            self._problem(element, f"{element.is_a()} left out: {' '.join(str(error).split())}")
            return None

    def _problem(self, element: Any, message: str) -> None:
        self.problems.append(Problem(element=element.GlobalId or f"#{element.id()}", message=message))

    def _pieces(self, element: Any) -> list[PlacedPiece]:
        if element.ObjectPlacement is None:
            self._problem(element, f"{element.is_a()} has no placement; it is taken at the model's origin")
        try:
            return self.bodies.pieces(element)
        except Unreadable:
            return [PlacedPiece(Piece(solid_from_kernel(element)), np.eye(4))]

    def _part(self, element: Any, pieces: list[PlacedPiece]) -> Part:
        for fault in body_faults(pieces):
            self._problem(element, fault)
        pieces = [self._with_holes_seen(placed) for placed in pieces]
        plate, member = self._shape(pieces)
        grade, origin = read_grade(element, self.properties)
        designation = read_designation(element, pieces, self.properties) if member else None
        drilled, notches = self._holes(element)
        # A plate whose shell is open is known by what is left of it, and stands closed from here on.
        mended = plate if plate is not None and len(pieces) == 1 and pieces[0].piece.solid.is_open else None
        return Part(
            element.GlobalId,
            element.id(),
            element.is_a(),
            element.Name or getattr(element, "Tag", None) or element.is_a(),
            designation,
            grade,
            origin,
            tuple(placed.in_world() for placed in pieces) if not mended else (mended.as_solid(),),
            plate,
            member,
            (*self._cut_holes(pieces), *drilled),
            notches,
        )

    def _shape(self, pieces: list[PlacedPiece]) -> tuple[Prism | None, MemberShape | None]:
        """Tell plate from member by the largest solid; shapes that many elements share are judged once."""
        main = max(pieces, key=lambda placed: placed.piece.solid.volume)
        if main.piece not in self.shapes:
            plate = as_plate(main.piece.solid)
            self.shapes[main.piece] = plate, None if plate else as_member(main.piece)
        plate, member = self.shapes[main.piece]
        built_up = self._built_up(pieces) if plate is not None and len(pieces) > 1 else None
        if built_up is not None:
            return None, built_up
        return plate and _plate_moved(plate, main.matrix), member and _member_moved(member, main.matrix)

    def _built_up(self, pieces: list[PlacedPiece]) -> MemberShape | None:
        """Judge web and flanges written as solids of one element, once for all elements that share them."""
        place = pieces[0].matrix
        if not all(np.array_equal(each.matrix, place) for each in pieces):
            return as_built_up([placed.in_world() for placed in pieces])
        together = tuple(each.piece for each in pieces)
        if together not in self.built_up:
            self.built_up[together] = as_built_up([piece.solid for piece in together])
        member = self.built_up[together]
        return member and _member_moved(member, place)

    def _holes(self, element: Any) -> tuple[list[Hole], tuple[Solid, ...]]:
        """Return an element's openings: drilled holes, and what is cut out of it besides."""
        drilled: list[Hole] = []
        notches: list[Solid] = []
        for opening in self.openings.get(element.id(), ()):
            for placed in self._guarded(opening, self.bodies.pieces) or []:
                hole = hole_from_opening(placed)
                if hole is None:
                    notches.append(placed.in_world())
                else:
                    drilled.append(hole)
        return drilled, tuple(notches)

    def _with_holes_seen(self, placed: PlacedPiece) -> PlacedPiece:
        if placed.piece not in self.whole:
            self.whole[placed.piece] = with_holes_seen(placed.piece)
        return PlacedPiece(self.whole[placed.piece], placed.matrix)

    def _cut_holes(self, pieces: list[PlacedPiece]) -> list[Hole]:
        """Return the holes that are cut into an element's bodies; shared shapes are searched once."""
        found = []
        for placed in pieces:
            if placed.piece not in self.drilled:
                self.drilled[placed.piece] = holes_in_solid(placed.piece.solid)
            found += [_hole_moved(hole, placed.matrix) for hole in self.drilled[placed.piece]]
        return found

    def _openings(self) -> dict[int, list[Any]]:
        found: dict[int, list[Any]] = {}
        for relation in self.file.by_type("IfcRelVoidsElement"):
            if relation.RelatingBuildingElement is not None and relation.RelatedOpeningElement is not None:
                found.setdefault(relation.RelatingBuildingElement.id(), []).append(relation.RelatedOpeningElement)
        return found

    def _owners(self) -> dict[int, Any]:
        """Return the element that aggregates another, by the other's step id."""
        owners: dict[int, Any] = {}
        for relation in self.file.by_type("IfcRelAggregates"):
            if relation.RelatingObject is not None and relation.RelatingObject.is_a("IfcElement"):
                owners.update((part.id(), relation.RelatingObject) for part in relation.RelatedObjects or ())
        return owners

    def _names(self, element: Any) -> MemberName:
        texts = [element.Name, getattr(element, "Tag", None)]
        texts += [str(stated.value) for stated in self.properties.stated(element, "mark")]
        return MemberName(element.GlobalId, tuple(dict.fromkeys(text for text in texts if text)))

    def _model_file(self, path: Path | None) -> ModelFile:
        return ModelFile(
            path=str(path) if path else None,
            sha256=sha256(path) if path else None,
            schema_name=self.file.schema,
            length_unit_mm=self.units.length,
            originating_system=originating_system(self.file),
        )


def _is_loose(element: Any, pieces: list[PlacedPiece]) -> bool:
    return is_nut_or_washer(pieces, element.Name or "")


def near_bolts(bodies: list[list[PlacedPiece]], bolts: list[Bolt]) -> Array:
    """Return which bodies come near any bolt, by their boxes. Bodies far from all bolts are never opened."""
    points = np.array([bolt.point for bolt in bolts if bolt.point is not None]).reshape(-1, 3)
    boxes = np.array([_box(pieces) for pieces in bodies]).reshape(-1, 6)
    near = np.zeros(len(boxes), bool)
    tree = shapely.STRtree(shapely.points(points[:, :2]))
    low, high = boxes[:, :3] - NEAR, boxes[:, 3:] + NEAR
    body, bolt = tree.query(shapely.box(low[:, 0], low[:, 1], high[:, 0], high[:, 1]))
    height = points[bolt, 2]
    near[body[(height >= low[body, 2]) & (height <= high[body, 2])]] = True
    return near


def _box(pieces: list[PlacedPiece]) -> Array:
    """Return a box that surely holds the pieces: from the corners of their own boxes."""
    corners = []
    for placed in pieces:
        low, high = placed.piece.solid.bounds
        own = np.where(CORNERS, high, low)
        corners.append(own @ placed.matrix[:3, :3].T + placed.matrix[:3, 3])
    every = np.vstack(corners)
    return np.concatenate([every.min(axis=0), every.max(axis=0)])


def _plate_moved(plate: Prism, matrix: Array) -> Prism:
    return Prism(_frame_moved(plate.frame, matrix), plate.outline, plate.holes, plate.thickness)


def _hole_moved(hole: Hole, matrix: Array) -> Hole:
    turn = matrix[:3, :3]
    return Hole(turn @ hole.centre + matrix[:3, 3], turn @ hole.direction, hole.diameter, hole.slot)


def _frame_moved(frame: Frame, matrix: Array) -> Frame:
    turn = matrix[:3, :3]
    return Frame(turn @ frame.origin + matrix[:3, 3], frame.axes @ turn.T)


def _member_moved(member: MemberShape, matrix: Array) -> MemberShape:
    turn = matrix[:3, :3]
    return MemberShape(
        turn @ member.start + matrix[:3, 3],
        turn @ member.axis,
        turn @ member.depth,
        member.length,
        member.section,
        member.stated,
    )
