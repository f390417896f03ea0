"""Haunches, stiffeners, packs and backing plates about an end plate."""

from __future__ import annotations

import math

import numpy as np
import pytest

from sample_models.making import Model, at, box

from .scenes import ACROSS, EndPlate, joints_of, rows_of

DROP, REACH = 360.0, 1800.0
"""The haunch hangs this far below the beam's underside at the plate and runs out over this length."""


class Haunched(EndPlate):
    """An IPE 400 with a haunch; x and z as in the world, y across. Rows count from the haunch's flange."""

    def __init__(self, kind: str, dialect: str = "swept", thickness: float = 13.5) -> None:
        super().__init__(plate=(200, 920, 25), rows=(803.0, 703.0, 403.0, 60.0), dialect=dialect)
        self.kind, self.thickness = kind, thickness

    @property
    def fall(self) -> float:
        return math.atan2(DROP, REACH)

    def bottom(self) -> float:
        """The haunch flange's centre line, carried on along the flange to the interface."""
        under = self.level - 200.0
        outer = under - DROP - math.tan(self.fall) * self.plate[2]
        return outer + self.thickness / 2 / math.cos(self.fall)

    @property
    def axis_height(self) -> float:
        return self.level

    def build_plate(self, model, place):
        b, h, t = self.plate
        middle = self.level - 180.0
        matrix = place @ at(0, 0, middle, (1, 0, 0), ACROSS)
        return model.product("IfcPlate", "EP1", matrix, self.flat(model, [box(b, h)], t), self.rep)

    def build_beam(self, model, place):
        beam = super().build_beam(model, place)
        build = {"plates": self.haunch_plates, "rolled": self.haunch_rolled}[self.kind]
        build(model, place)
        return beam

    def upright_plate(self, model, name, ring, thickness, y=0.0):
        """A plate in the plane of x and z, `thickness` about y."""
        matrix = at(0, y + thickness / 2, 0, (0, -1, 0), (1, 0, 0))
        return model.product("IfcPlate", name, matrix, self.flat(model, [ring], thickness), self.rep)

    def haunch_plates(self, model, _place):
        t, under, thick = self.plate[2], self.level - 200.0, self.thickness
        upright = thick / math.cos(self.fall)
        web = [(t, under), (t, under - DROP + upright), (t + REACH - upright / math.tan(self.fall), under)]
        self.upright_plate(model, "haunch web", web, 8.0)
        flange = [(t, under - DROP), (t + REACH, under), (t + REACH - upright / math.tan(self.fall), under),
                  (t, under - DROP + upright)]  # fmt: skip
        if self.dialect == "swept":
            run = np.array([math.cos(self.fall), 0, math.sin(self.fall)])
            normal = np.array([-math.sin(self.fall), 0, math.cos(self.fall)])
            matrix = at(t, 0, under - DROP, normal, run)
            ring = box(REACH / math.cos(self.fall), 180, REACH / math.cos(self.fall) / 2)
            model.product("IfcPlate", "haunch flange", matrix, self.flat(model, [ring], thick), self.rep)
        else:
            self.upright_plate(model, "haunch flange", flange, 180.0)

    def haunch_rolled(self, model, _place):
        """The lower half of an IPE 400, cut on the slope: an I-profile less all above the beam's underside."""
        t, under = self.plate[2], self.level - 200.0
        run = np.array([math.cos(self.fall), 0, math.sin(self.fall)])
        normal = np.array([-math.sin(self.fall), 0, math.cos(self.fall)])
        start = np.array([t, 0, under - DROP]) + 200.0 * normal
        frame = at(*(start - 400 * run), axis=run, ref=ACROSS)
        turn = frame[:3, :3]
        back = lambda point: turn.T @ (np.array(point) - frame[:3, 3])  # noqa: E731
        body = model.extruded(model.i_profile(400, 180, 8.6, 13.5, 21, "IPE 400"), 2600.0)
        for point, way in (((0, 0, under), (0, 0, 1)), ((t, 0, 0), (-1, 0, 0))):
            matrix = at(*back(point), axis=turn.T @ np.array(way, float))
            plane = model.add("IfcPlane", Position=model.axes(matrix))
            half = model.add("IfcHalfSpaceSolid", BaseSurface=plane, AgreementFlag=False)
            body = model.add("IfcBooleanClippingResult", Operator="DIFFERENCE", FirstOperand=body, SecondOperand=half)
        model.product("IfcBeam", "haunch", frame, [body], "Clipping")


@pytest.mark.parametrize("kind", ["plates", "rolled"])
@pytest.mark.parametrize("dialect", ["swept", "brep"])
def test_haunch(kind, dialect):
    model, scene = Model(), Haunched(kind, dialect)
    scene.build(model)
    (joint,) = joints_of(model)
    assert joint.moment_joint, joint.why
    assert rows_of(joint) == pytest.approx(list(scene.rows), abs=0.1)
    assert joint.interface.bottom.part == "haunch"
    assert joint.interface.top.part == "member"
    assert joint.interface.bottom.thickness_mm == pytest.approx(13.5, abs=0.05)
    assert joint.interface.bottom.inclination_deg == pytest.approx(math.degrees(scene.fall), abs=0.05)
    assert joint.supported.name == "B1"
    roles = {plate.role for plate in joint.plates}
    assert roles == (
        {"end_plate", "haunch_web", "haunch_flange"} if kind == "plates" else {"end_plate", "haunch_section"}
    )
    assert joint.interface.axis_y_mm == pytest.approx(scene.level - scene.bottom(), abs=0.1)


def stiffener(model, scene, z, side=1.0, angle=0.0, thickness=12.0):
    """A plate between the column's flanges on one side of its web, level or turned about y."""
    h, b, tw, tf, _ = scene.column
    length, width = (h - 2 * tf) / math.cos(math.radians(angle)), (b - tw) / 2 - 5
    angle = math.radians(angle)
    normal = (-math.sin(angle), 0, math.cos(angle))
    middle = at(-h / 2, side * (tw / 2 + width / 2), z, normal, (math.cos(angle), 0, math.sin(angle)))
    ring = [(x, y) for x, y in box(length - (30 if angle else 0), width)]
    return model.product("IfcPlate", "stiffener", middle, [model.extruded(model.outline([ring]), thickness)])


@pytest.mark.parametrize("angle", [0.0, 40.0, -45.0])
def test_stiffeners_level_and_diagonal(angle):
    model, scene = Model(), EndPlate()
    scene.build(model)
    stiffener(model, scene, 3000.0, 1.0, angle)
    stiffener(model, scene, 3000.0, -1.0, angle)
    stiffener(model, scene, 1500.0)
    (joint,) = joints_of(model)
    assert [plate.role for plate in joint.plates] == ["end_plate", "stiffener", "stiffener"]


def test_morris_stiffener():
    """A diagonal with a level plate at either end, each a plate of its own."""
    model, scene = Model(), EndPlate()
    scene.build(model)
    h, tf = scene.column[0], scene.column[3]
    for x, z, angle, length in ((-h + tf + 30, 2900, 0, 60), (-h / 2, 3000, 48, 150), (-tf - 30, 3100, 0, 60)):
        turn = math.radians(angle)
        matrix = at(x, 70, z, (-math.sin(turn), 0, math.cos(turn)), (math.cos(turn), 0, math.sin(turn)))
        model.product("IfcPlate", "stiffener", matrix, [model.extruded(model.outline([box(length, 120)]), 12.0)])
    (joint,) = joints_of(model)
    assert [plate.role for plate in joint.plates] == ["end_plate", "stiffener", "stiffener", "stiffener"]


def test_backing_plates_behind_the_column_flange():
    model, scene = Model(), EndPlate()
    scene.build(model)
    tf = scene.column[3]
    for y in (80.0, -80.0):
        for z in (2950.0, 3150.0):
            matrix = at(-tf - 15, y, z, (1, 0, 0), ACROSS)
            model.product("IfcPlate", "backing", matrix, [model.extruded(model.outline([box(90, 180)]), 15.0)])
    (joint,) = joints_of(model)
    assert joint.moment_joint
    assert [plate.role for plate in joint.plates].count("backing_plate") == 4


def test_a_pack_between_plate_and_column():
    """The interface is the face of the end plate that touches the pack; rows do not move."""
    model, scene = Model(), EndPlate()
    scene.build_column(model, at(x=-8))
    scene.build_plate(model, np.eye(4))
    scene.build_beam(model, np.eye(4))
    scene.build_bolts(model, np.eye(4))
    matrix = at(-8, 0, 3000, (1, 0, 0), ACROSS)
    model.product("IfcPlate", "shim", matrix, [model.extruded(model.outline([box(200, 540)]), 8.0)])
    (joint,) = joints_of(model)
    assert joint.moment_joint, joint.why
    assert joint.configuration == "beam_to_column_flange"
    assert [plate.role for plate in joint.plates] == ["end_plate", "pack"]
    assert rows_of(joint) == pytest.approx(list(scene.rows), abs=0.05)
    assert joint.bolts.grip_mm == pytest.approx(25 + 8 + 19, abs=0.05)


def test_a_supplementary_web_plate():
    model, scene = Model(), EndPlate()
    scene.build(model)
    h, _, tw, tf, r = scene.column
    ring = box(h - 2 * (tf + r), 700)
    matrix = at(-h / 2, -tw / 2, 3000, (0, -1, 0), (1, 0, 0))
    model.product("IfcPlate", "doubler", matrix, [model.extruded(model.outline([ring]), 10.0)])
    (joint,) = joints_of(model)
    assert [plate.role for plate in joint.plates] == ["end_plate", "web_plate"]
    assert joint.plates[1].thickness_mm == pytest.approx(10)
