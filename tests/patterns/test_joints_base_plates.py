"""Column feet on base plates: bolted to a block of concrete, to a beam, or held by anchors."""

from __future__ import annotations

import numpy as np
import pytest

from ifcjoints.detection.find_joints import find_joints
from ifcjoints.reading.read_model import read_model
from ifcjoints.settings import Settings
from sample_models.making import Model, at, box

from .scenes import HEB300, IPE400, joints_of


def foot(model, below=None, name="M24x400 8.8", **bolt):
    """A column on a plate 30 mm thick whose underside lies at z = 0, four bolts through plate and what is below."""
    body = model.extruded(model.i_profile(*HEB300, "HEB 300"), 3000.0)
    model.product("IfcColumn", "C1", at(z=30), [body])
    model.product("IfcPlate", "BP1", np.eye(4), [model.extruded(model.outline([box(400, 500)]), 30.0)])
    if below is not None:
        below(model)
    for x in (-100, 100):
        for y in (-200, 200):
            model.bolt((x, y, 30.0), (0, 0, -1), 24.0, bolt.get("length", 400.0), name)


def concrete(kind):
    def build(model):
        block = model.extruded(model.outline([box(900, 900)]), 380.0)
        model.product(kind, "block", at(z=-380), [block])

    return build


@pytest.mark.parametrize("kind", ["IfcSlab", "IfcBuildingElementProxy", "IfcColumn"])
def test_bolts_into_a_block(kind):
    model = Model()
    foot(model, concrete(kind))
    (joint,) = joints_of(model)
    assert joint.configuration == "base_plate"
    assert joint.supported.name == "C1"
    assert joint.supported.end == "start"
    assert joint.plates[0].role == "end_plate"
    assert joint.bolts.count == 4
    assert not joint.moment_joint
    assert "base plate" in joint.why


def test_a_column_on_a_beam_is_no_base_plate():
    def beam(model):
        body = model.extruded(model.i_profile(400, 300, 13.5, 24, 27), 4000.0)
        model.product("IfcBeam", "B1", at(-2000, 0, -200, (1, 0, 0), (0, 1, 0)), [body])

    model = Model()
    foot(model, beam, length=100.0)
    for bolt in model.file.by_type("IfcMechanicalFastener"):
        point = bolt.ObjectPlacement.RelativePlacement.Location
        point.Coordinates = [point.Coordinates[0], np.sign(point.Coordinates[1]) * 100.0, 30.0]
    (joint,) = joints_of(model)
    assert joint.configuration == "other"
    assert joint.supporting.name == "B1"


def test_a_cap_plate_is_no_foot():
    """A plate on the column's head, bolted to a block above."""
    model = Model()
    body = model.extruded(model.i_profile(*IPE400), 3000.0)
    model.product("IfcColumn", "C1", at(z=-3000), [body])
    model.product("IfcPlate", "CP1", np.eye(4), [model.extruded(model.outline([box(300, 500)]), 20.0)])
    model.product("IfcSlab", "block", at(z=20), [model.extruded(model.outline([box(900, 900)]), 380.0)])
    for x in (-60, 60):
        for y in (-100, 100):
            model.bolt((x, y, 0.0), (0, 0, 1), 24.0, 300.0)
    (joint,) = joints_of(model)
    assert joint.configuration == "other"


def test_anchors_are_no_bolts_of_a_joint():
    model = Model()
    foot(model, concrete("IfcFooting"), name="anchor rod M24")
    settings = Settings()
    found = find_joints(read_model(model.file, settings.reading), settings)
    assert not found.joints
    assert found.coverage.bolts_elsewhere == 4
    assert "anchor" in found.elsewhere[0].reason
