"""Splices by plates on flanges and web, and what must not be taken for one."""

from __future__ import annotations

import numpy as np
import pytest

from sample_models.making import Model, at, box, turned

from .scenes import IPE400, joints_of


def member(model, name, matrix, length=3000.0, size=IPE400):
    body = model.extruded(model.i_profile(*size, "IPE 400"), length)
    return model.product("IfcBeam", name, matrix, [body])


def splice(model, place, gap=10.0, flanges=True, web=True, d_web=20.0):
    """Two IPE 400 along x, meeting at x = 0; covers 12 thick on the flanges, 8 on both sides of the web."""
    member(model, "B1", place @ at(-3000 - gap / 2, axis=(1, 0, 0), ref=(0, 1, 0)))
    member(model, "B2", place @ at(gap / 2, axis=(1, 0, 0), ref=(0, 1, 0)))
    turn, shift = place[:3, :3], place[:3, 3]

    def bolt(point, way, d, length):
        model.bolt(turn @ np.array(point, float) + shift, turn @ np.array(way, float), d, length)

    def plate(matrix, b, h, t):
        model.product("IfcPlate", "cover", place @ matrix, [model.extruded(model.outline([box(b, h)]), t)])

    if flanges:
        for side in (1.0, -1.0):
            plate(at(0, 0, side * 200 - (12 if side < 0 else 0), (0, 0, 1), (1, 0, 0)), 500, 180, 12.0)
            for x in (-180, -100, 100, 180):
                for y in (-50, 50):
                    bolt((x, y, side * 212), (0, 0, -side), 20.0, 60.0)
    if web:
        for y in (4.3, -12.3):
            plate(at(0, y + 8, 0, (0, -1, 0), (1, 0, 0)), 300, 260, 8.0)
        for x in (-80, 80):
            for z in (-80, 0, 80):
                bolt((x, 12.3, z), (0, -1, 0), d_web, 60.0)


@pytest.mark.parametrize(
    "place", [np.eye(4), turned(90, (0, 1, 0), (0, 0, 4000)), turned(37, (0, 0, 1), (1e6, 2e6, 0))]
)
@pytest.mark.parametrize("d_web", [20.0, 16.0])
def test_flange_and_web_plates_are_one_joint(place, d_web):
    model = Model()
    splice(model, place, d_web=d_web)
    (joint,) = joints_of(model)
    assert joint.configuration == "cover_plate_splice"
    assert not joint.moment_joint
    assert "2 plates on their flanges and 2 plates on their webs" in joint.why
    assert (joint.supported.name, joint.supporting.name) == ("B1", "B2")
    assert (joint.supported.end, joint.supporting.end) == ("end", "start")
    assert sorted(plate.role for plate in joint.plates) == ["cover_plate", "cover_plate", "web_plate", "web_plate"]
    assert sorted(plate.thickness_mm for plate in joint.plates) == pytest.approx([8, 8, 12, 12])
    assert joint.bolts.count == 16 + 6
    assert joint.bolts.grip_mm is None
    assert joint.bolts.diameter_mm == (20.0 if d_web == 20.0 else None)
    assert not any(finding.code == "mixed-bolts" for finding in joint.findings)


@pytest.mark.parametrize(("flanges", "web"), [(True, False), (False, True)])
def test_flanges_only_and_web_only(flanges, web):
    model = Model()
    splice(model, np.eye(4), flanges=flanges, web=web)
    (joint,) = joints_of(model)
    assert joint.configuration == "cover_plate_splice"
    assert joint.bolts.count == (16 if flanges else 6)
    assert joint.bolts.grip_mm == pytest.approx(25.5 if flanges else 24.6)


def test_members_far_apart_on_one_plate_are_no_splice():
    """A long plate bolted to two beams in line that do not meet: two joints of their own."""
    model = Model()
    splice(model, np.eye(4), gap=10.0, flanges=False, web=False)
    model = Model()
    member(model, "B1", at(-3800, axis=(1, 0, 0), ref=(0, 1, 0)))
    member(model, "B2", at(800, axis=(1, 0, 0), ref=(0, 1, 0)))
    matrix = at(0, 12.3, 0, (0, -1, 0), (1, 0, 0))
    model.product("IfcPlate", "strap", matrix, [model.extruded(model.outline([box(2000, 200)]), 8.0)])
    for x in (-900, 900):
        model.bolt((x, 12.3, 50), (0, -1, 0), 20.0, 60.0)
        model.bolt((x, 12.3, -50), (0, -1, 0), 20.0, 60.0)
    joints = joints_of(model)
    assert [joint.configuration for joint in joints] == ["other", "other"]


def test_members_at_an_angle_on_one_gusset_are_no_splice():
    model = Model()
    member(model, "B1", at(-3005, axis=(1, 0, 0), ref=(0, 1, 0)))
    member(model, "B2", at(200, 0, 200, axis=(1, 0, 1), ref=(0, 1, 0)))
    matrix = at(0, 12.3, 0, (0, -1, 0), (1, 0, 0))
    model.product("IfcPlate", "gusset", matrix, [model.extruded(model.outline([box(1200, 1200)]), 8.0)])
    model.bolt((-100, 12.3, 0), (0, -1, 0), 20.0, 60.0)
    model.bolt((350, 12.3, 350), (0, -1, 0), 20.0, 60.0)
    assert {joint.configuration for joint in joints_of(model)} == {"other"}
