"""Heron Yard hall: a portal frame, a lean-to floor, and joints that are no moment joints."""

from __future__ import annotations

import numpy as np

from .end_plates import EndPlateDesign, Face, add_beam, add_bolts, add_end_plate
from .making import at, box
from .portal import Portal, add_portal
from .steelwork import ACROSS, ALONG, HEB_200, HEB_240, HEB_300, IPE_240, IPE_300, IPE_360, UP, Steelwork
from .truth import JointTruth, ModelTruth, rows_above

FLOOR = 3000.0
GALLERY = 4500.0
FLOOR_PLATE = EndPlateDesign((200.0, 560.0, 20.0), (230.0, 120.0, -120.0, -230.0), 110.0, 20.0, "M20x65 8.8", 65.0)
GALLERY_PLATE = EndPlateDesign((170.0, 340.0, 20.0), (95.0, 25.0, -95.0), 90.0, 20.0, "M20x60 8.8", 60.0)
SPLICE_PLATE = EndPlateDesign((170.0, 480.0, 20.0), (195.0, 95.0, -95.0, -195.0), 90.0, 20.0, "M20x70 8.8", 70.0)
SHEAR_PLATE = EndPlateDesign((150.0, 170.0, 10.0), (55.0, -15.0), 90.0, 20.0, "M20x55 8.8", 55.0, shift=20.0)


def build() -> tuple[Steelwork, ModelTruth]:
    """Return the model and what it holds."""
    steel = Steelwork("Heron Yard hall")
    columns, truth = add_portal(steel, Portal())
    floor_beam, floor_truth = _floor_beam(steel, columns[0])
    truth += [floor_truth, *_gallery(steel, columns[0])]
    _fin_plate(steel, floor_beam)
    _cleats(steel, floor_beam)
    _base(steel)
    steel.finish()
    bolts = sum(joint.bolts for joint in truth) + 3 + 2 + 4 + 4
    return steel, ModelTruth(tuple(truth), bolts, elsewhere=4)


def _floor_beam(steel: Steelwork, column: object) -> tuple[object, JointTruth]:
    """Add the lean-to's floor beam on the first column's outer flange, by an extended end plate."""
    h, tf = HEB_300[0], HEB_300[3]
    face = Face(np.array([-h / 2, 0.0, FLOOR]), -ALONG, tf, column)
    plate = add_end_plate(steel, face, FLOOR_PLATE, "EP3")
    beam = add_beam(steel, face, FLOOR_PLATE.thickness, "B1", (IPE_360, "IPE 360"), 4650.0)
    steel.assemble("A-B1", [beam, plate])
    steel.connect(column, beam, [plate, *add_bolts(steel, face, FLOOR_PLATE)])
    half = (IPE_360[0] - IPE_360[3]) / 2
    rows = rows_above(-half, FLOOR_PLATE.rows)
    return beam, JointTruth("B1", "C1", "beam_to_column_flange", True, 8, 20.0, "8.8", 20.0, rows, 2 * half)


def _gallery(steel: Steelwork, column: object) -> list[JointTruth]:
    """Add the gallery beam: from the column's web, spliced, to a post by an end plate on its web alone."""
    tw, half = HEB_300[2], (IPE_300[0] - IPE_300[3]) / 2
    web = Face(np.array([0.0, tw / 2, GALLERY]), ACROSS, tw, column, across=ALONG)
    add_end_plate(steel, web, GALLERY_PLATE, "EP4")
    add_beam(steel, web, GALLERY_PLATE.thickness, "B2", (IPE_300, "IPE 300"), 3980.0 - 25.5)
    add_bolts(steel, web, GALLERY_PLATE)
    middle = np.array([0.0, 4000.0, GALLERY])
    for out, name in ((-ACROSS, "EP5"), (ACROSS, "EP6")):
        add_end_plate(steel, Face(middle, out, 20.0, across=ALONG), SPLICE_PLATE, name)
    add_bolts(steel, Face(middle, ACROSS, 20.0, across=ALONG), SPLICE_PLATE)
    post_face = 8000.0 - HEB_240[0] / 2
    far = Face(middle, ACROSS, 20.0, across=ALONG)
    add_beam(steel, far, 20.0, "B3", (IPE_300, "IPE 300"), post_face - 10.0 - 4020.0)
    post = steel.member("IfcColumn", "C3", HEB_240, "HEB 240", at(0, 8000, 0, UP, ALONG), GALLERY + 400.0)
    end = Face(np.array([0.0, post_face, GALLERY]), -ACROSS, HEB_240[3], post, across=ALONG)
    add_end_plate(steel, end, SHEAR_PLATE, "EP7")
    add_bolts(steel, end, SHEAR_PLATE)
    return [
        JointTruth(
            "B2", "C1", "beam_to_column_web", True, 6, 20.0, "8.8", 20.0,
            rows_above(-half, GALLERY_PLATE.rows), 2 * half,
        ),
        JointTruth(
            "B2", "B3", "splice", True, 8, 20.0, "8.8", 20.0, rows_above(-half, SPLICE_PLATE.rows), 2 * half
        ),
        JointTruth(
            "B3", "C3", "beam_to_column_flange", False, 4, 20.0, "8.8", 10.0,
            rows_above(-half, SHEAR_PLATE.rows), 2 * half,
        ),
    ]  # fmt: skip


def _fin_plate(steel: Steelwork, beam: object) -> None:
    """Add the post at the floor beam's end and the fin plate on it: three bolts through the beam's web."""
    steel.member("IfcColumn", "C4", HEB_200, "HEB 200", at(-4940.0, 0, 0, UP, ACROSS), FLOOR + 300.0)
    web = IPE_360[2] / 2
    fin = steel.plate("FP1", box(110.0, 240.0, 55.0), 10.0, at(-4840.0, web + 10.0, FLOOR, -ACROSS, ALONG))
    points = [np.array([-4785.0, web + 10.0, FLOOR + level]) for level in (80.0, 0.0, -80.0)]
    steel.drill(fin, [point - ACROSS * 5 for point in points], ACROSS, 22.0, 20.0)
    steel.drill(beam, [point - ACROSS * 14 for point in points], ACROSS, 22.0, 16.0)
    steel.bolt_group("M20x45 8.8", 20.0, 45.0, 10.0 + IPE_360[2], points, -ACROSS)


def _cleats(steel: Steelwork, beam: object) -> None:
    """Add a secondary beam on the floor beam's web by two angle cleats."""
    web, level = IPE_360[2] / 2, FLOOR
    start = np.array([-2500.0, web + 10.0, level])
    secondary = steel.member("IfcBeam", "B4", IPE_240, "IPE 240", at(*start, axis=ACROSS, ref=ALONG), 3000.0)
    half = IPE_240[2] / 2
    cleats = []
    for side, name in ((1, "CL1"), (-1, "CL2")):
        profile = steel.profile(
            "IfcLShapeProfileDef", "L100x10", steel.flat_axes(50.0, 50.0), Depth=100.0, Width=100.0, Thickness=10.0
        )
        corner = np.array([-2500.0 + side * half, web, level - 75.0])
        ref = ALONG if side > 0 else ACROSS
        place = at(*corner, axis=UP, ref=ref)
        cleat = steel.element("IfcMember", name, place, [steel.extruded(profile, 150.0)], "SweptSolid")
        steel.give_material(cleat, "S275JR")
        cleats.append(cleat)
    through = [np.array([-2500.0 + half + 10.0, web + 60.0, level + step]) for step in (35.0, -35.0)]
    for part in (*cleats, secondary):
        steel.drill(part, [point - ALONG * (half + 10.0) for point in through], ALONG, 22.0, 60.0)
    steel.bolt_group("M20x55 8.8", 20.0, 55.0, 20.0 + IPE_240[2], through, -ALONG)
    for side, cleat in zip((1, -1), cleats, strict=True):
        onto = [np.array([-2500.0 + side * (half + 60.0), web + 10.0, level + step]) for step in (35.0, -35.0)]
        steel.drill(cleat, [point - ACROSS * 5 for point in onto], ACROSS, 22.0, 20.0)
        steel.drill(beam, [point - ACROSS * (10.0 + web) for point in onto], ACROSS, 22.0, 16.0)
        steel.bolt_group("M20x45 8.8", 20.0, 45.0, 10.0 + IPE_360[2], onto, -ACROSS)


def _base(steel: Steelwork) -> None:
    """Add the first column's base plate and four anchors."""
    plate = steel.plate("BP1", box(450.0, 400.0), 30.0, at(0, 0, -30.0, UP, ALONG))
    points = [np.array([x, y, -15.0]) for x in (-180.0, 180.0) for y in (-140.0, 140.0)]
    steel.drill(plate, points, UP, 30.0, 60.0)
    steel.anchors("M24 anchor 8.8", 24.0, 500.0, [point + UP * 15 for point in points])
