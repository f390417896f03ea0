"""Heron Yard boathouse: an IFC2X3 model in inches, bodies as B-reps, each joint's bolts one element.

The sections are two American wide-flange shapes, the bolts 3/4 in. of ASTM A325, threads in the shear plane.
"""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any

import numpy as np

from .end_plates import EndPlateDesign, Face, bolt_points, drill_behind
from .making import INCH, at, box, circle, i_ring
from .steelwork import ACROSS, ALONG, UP, Size, Steelwork
from .truth import JointTruth, ModelTruth, rows_above

COLUMN: Size = (12.06 * INCH, 9.995 * INCH, 0.345 * INCH, 0.575 * INCH, 0.60 * INCH)
BEAM: Size = (15.86 * INCH, 6.985 * INCH, 0.295 * INCH, 0.43 * INCH, 0.40 * INCH)
LEVEL = 132.0 * INCH
LABEL = "3/4 in. A325N"
HOLE = 13 / 16 * INCH
PLATE = EndPlateDesign(
    (8.0 * INCH, 22.0 * INCH, 0.75 * INCH),
    (9.5 * INCH, 6.0 * INCH, -6.0 * INCH, -9.5 * INCH),
    5.0 * INCH, 0.75 * INCH, LABEL, 2.5 * INCH,
)  # fmt: skip


def build() -> tuple[Steelwork, ModelTruth]:
    """Return the model and what it holds."""
    steel = Steelwork("Heron Yard boathouse", schema="IFC2X3", unit=INCH)
    steel.file.by_type("IfcConversionBasedUnit")[0].Name = "INCH"
    column = _member(steel, "IfcColumn", "K1", "W12X53", COLUMN, at(0, 0, 0, UP, ACROSS), 168.0 * INCH)
    truth = []
    for name, out in (("L1", ALONG), ("L2", -ALONG)):
        face = Face(np.array([0.0, 0.0, LEVEL]) + out * COLUMN[0] / 2, out, COLUMN[3], column)
        _end_plate(steel, face, f"E{name}")
        drill_behind(steel, face, PLATE, HOLE - PLATE.d)
        _beam(steel, face, name)
        _bolts_as_mapped_items(steel, face)
        truth.append(_truth(name, "K1", "beam_to_column_flange"))
    middle = np.array([COLUMN[0] / 2 + 2 * PLATE.thickness + 100.0 * INCH, 0.0, LEVEL])
    for out, name in ((-ALONG, "EL3"), (ALONG, "EL4")):
        _end_plate(steel, Face(middle, out, PLATE.thickness), name)
    far = Face(middle, ALONG, PLATE.thickness)
    _beam(steel, far, "L3")
    _bolts_as_solids(steel, far)
    truth.append(_truth("L1", "L3", "splice"))
    steel.finish()
    return steel, ModelTruth(tuple(truth), 24, elsewhere=0)


def _truth(beam: str, other: str, configuration: str) -> JointTruth:
    half = (BEAM[0] - BEAM[3]) / 2
    return JointTruth(
        beam, other, configuration, True, 8, 0.75 * INCH, "A325N", 0.75 * INCH, rows_above(-half, PLATE.rows), 2 * half
    )


def _member(steel: Steelwork, kind: str, name: str, label: str, size: Size, place: np.ndarray, length: float) -> Any:
    body = steel.brep_prism([i_ring(*size, facets=4)], length)
    element = steel.element(
        kind, name, place, [steel.mapped([body], "Brep")], "MappedRepresentation", Description=label
    )
    steel.give_material(element, "A992")
    return element


def _beam(steel: Steelwork, face: Face, name: str) -> None:
    start = face.origin + face.out * PLATE.thickness
    _member(steel, "IfcBeam", name, "W16X36", BEAM, at(*start, axis=face.out, ref=face.across), 100.0 * INCH)


def _end_plate(steel: Steelwork, face: Face, name: str) -> None:
    """Add an end plate as a B-rep with its holes as inner bounds."""
    place = at(*face.origin, axis=face.out, ref=face.across)
    local = [place[:3, :3].T @ (point - face.origin) for point in bolt_points(face, PLATE)]
    holes = [circle(HOLE / 2, 16, x, y) for x, y, _ in local]
    body = steel.brep_prism([box(*PLATE.plate[:2]), *holes], PLATE.thickness)
    element = steel.element("IfcPlate", name, place, [body], "Brep")
    steel.give_material(element, "A36")


def _bolts_as_mapped_items(steel: Steelwork, face: Face) -> None:
    """Add the joint's eight bolts as one element: eight mapped items of one bolt."""
    origin, items = _heads(face)
    source = steel.mapped(steel.bolt_bodies(PLATE.d, PLATE.length, PLATE.thickness + face.behind)).MappingSource
    mapped = []
    for x, y, z in items:
        operator = steel.add("IfcCartesianTransformationOperator3D", LocalOrigin=steel.point(x, y, z))
        mapped.append(steel.map_again(source, operator))
    _group(steel, origin, mapped, "MappedRepresentation")


def _bolts_as_solids(steel: Steelwork, face: Face) -> None:
    """Add the joint's eight bolts as one element: all shanks, heads and nuts in one representation of B-reps."""
    origin, items = _heads(face)
    solids: list[Any] = []
    for x, y, z in items:
        shank, hexagon = circle(PLATE.d / 2, 16), circle(18.3, 6)
        grip = PLATE.thickness + face.behind
        solids += [
            steel.brep_prism([shank], PLATE.length, at(x, y, z)),
            steel.brep_prism([hexagon], 11.9, at(x, y, z - 11.9)),
            steel.brep_prism([hexagon], 18.7, at(x, y, z + grip)),
        ]
    _group(steel, origin, solids, "Brep")


def _heads(face: Face) -> tuple[np.ndarray, list[np.ndarray]]:
    """Return the group's placement and each bolt's head in it."""
    place = at(*(face.origin + face.out * PLATE.thickness), axis=-face.out, ref=face.across)
    heads = [point + face.out * PLATE.thickness for point in bolt_points(face, PLATE)]
    return place, [place[:3, :3].T @ (head - place[:3, 3]) for head in heads]


def _group(steel: Steelwork, place: np.ndarray, items: Sequence[Any], rep: str) -> None:
    steel.element(
        "IfcMechanicalFastener", LABEL, place, items, rep,
        ObjectType="BOLT", NominalDiameter=PLATE.d / steel.unit, NominalLength=PLATE.length / steel.unit,
    )  # fmt: skip
