"""Several members at one place: each joint comes out on its own."""

from __future__ import annotations

import numpy as np
import pytest

from sample_models.making import Model, at, box, turned

from .scenes import HEB300, EndPlate, joints_of, rows_of

IPE300 = (300.0, 150.0, 7.1, 10.7, 15.0)


class OnWeb(EndPlate):
    """A beam's end plate on a column's web; with `twin` a second one back to back through the same bolts."""

    def __init__(self, **more):
        super().__init__(
            beam=IPE300, plate=(180, 440, 20), rows=(339.0, 239.0, 50.0), gauge=90.0, d=20.0, **more
        )  # fmt: skip

    def build_column(self, model, place):
        # The column's web stands square to x; its face on the beam's side lies at x = 0.
        matrix = place @ at(-self.column[2] / 2, 0, 0, (0, 0, 1), (1, 0, 0))
        body = self.section(model, self.column, 2 * self.level, np.eye(4), "C")
        return model.product(self.column_class, "C1", matrix, body, self.rep)

    def build_bolts(self, model, place):
        t, tw = self.plate[2], self.column[2]
        turn = place[:3, :3]
        return [
            model.bolt(turn @ np.array([t, x, z]) + place[:3, 3], turn @ np.array([-1.0, 0, 0]), 20.0, 2 * t + tw + 30)
            for x, z in self.places()
        ]


def test_beams_on_both_sides_of_a_column():
    model, one, other = Model(), EndPlate(), EndPlate(beam_name="B2", rows=(443.25, 300.0, 100.0, -50.0))
    one.build(model)
    there = turned(180, (0, 0, 1), (-HEB300[0], 0, 0))
    other.build_plate(model, there)
    other.build_beam(model, there)
    other.build_bolts(model, there)
    joints = {joint.supported.name: joint for joint in joints_of(model)}
    assert set(joints) == {"B1", "B2"}
    assert rows_of(joints["B1"]) == pytest.approx(list(one.rows), abs=0.05)
    assert rows_of(joints["B2"]) == pytest.approx(list(other.rows), abs=0.05)
    assert all(joint.moment_joint and joint.supporting.name == "C1" for joint in joints.values())


@pytest.mark.parametrize("dialect", ["swept", "brep"])
def test_back_to_back_through_one_web(dialect):
    """Two end plates share every bolt: two joints, each with its own beam, both on the column's web."""
    model, one, other = Model(), OnWeb(dialect=dialect), OnWeb(beam_name="B2", dialect=dialect)
    one.build(model)
    there = turned(180, (0, 0, 1), (-HEB300[2], 0, 0))
    other.build_plate(model, there)
    other.build_beam(model, there)
    joints = {joint.supported.name: joint for joint in joints_of(model)}
    assert set(joints) == {"B1", "B2"}
    for joint in joints.values():
        assert joint.moment_joint, joint.why
        assert joint.configuration == "beam_to_column_web"
        assert joint.supporting.name == "C1"
        assert rows_of(joint) == pytest.approx(list(one.rows), abs=0.05)
        assert joint.bolts.count == 6
        assert joint.bolts.grip_mm == pytest.approx(20 + 20 + HEB300[2], abs=0.05)
    assert joints["B1"].id != joints["B2"].id


def test_a_four_way_cross():
    model = Model()
    flange_one, flange_other = EndPlate(), EndPlate(beam_name="B2")
    web_one, web_other = OnWeb(beam_name="B3"), OnWeb(beam_name="B4")
    half = HEB300[0] / 2
    flange_one.build(model, at(x=half))
    for scene, place in (
        (flange_other, turned(180, (0, 0, 1), (-half, 0, 0))),
        (web_one, turned(90, (0, 0, 1), (0, HEB300[2] / 2, 0))),
        (web_other, turned(-90, (0, 0, 1), (0, -HEB300[2] / 2, 0))),
    ):
        scene.build_plate(model, place)
        scene.build_beam(model, place)
        if scene is not web_other:
            scene.build_bolts(model, place)
    joints = {joint.supported.name: joint for joint in joints_of(model)}
    assert {name: joint.configuration for name, joint in joints.items()} == {
        "B1": "beam_to_column_flange", "B2": "beam_to_column_flange",
        "B3": "beam_to_column_web", "B4": "beam_to_column_web",
    }  # fmt: skip
    assert all(joint.moment_joint for joint in joints.values())


def test_two_beams_on_one_plate():
    """One long plate carries a beam above another: two joints, each with the bolts about its own beam."""
    model = Model()
    low, high = EndPlate(level=3000.0), EndPlate(level=3700.0, beam_name="B2", rows=(443.25, 320.0, 50.0))
    low.build_column(model, np.eye(4))
    matrix = at(0, 0, 3350.0, (1, 0, 0), (0, 1, 0))
    model.product("IfcPlate", "EP", matrix, [model.extruded(model.outline([box(200, 1300)]), 25.0)])
    for scene in (low, high):
        scene.build_beam(model, np.eye(4))
        scene.build_bolts(model, np.eye(4))
    joints = {joint.supported.name: joint for joint in joints_of(model)}
    assert set(joints) == {"B1", "B2"}
    assert rows_of(joints["B1"]) == pytest.approx(list(low.rows), abs=0.05)
    assert rows_of(joints["B2"]) == pytest.approx(list(high.rows), abs=0.05)


def splice(model, place, members=("B1", "B2"), dialect="swept"):
    """Two beams in line, end plates face to face at x = 0."""
    one = EndPlate(beam=IPE300, plate=(160, 440, 20), rows=(330.0, 240.0, 50.0), gauge=80.0, d=20.0, dialect=dialect,
                   beam_name=members[0], column=(300, 300, 11, 20, 27))  # fmt: skip
    other = EndPlate(**{**vars(one), "beam_name": members[1], "made": {}})
    one.build_plate(model, place)
    one.build_beam(model, place)
    one.build_bolts(model, place)
    there = place @ turned(180, (0, 0, 1))
    other.build_plate(model, there)
    other.build_beam(model, there)
    return one


@pytest.mark.parametrize("dialect", ["swept", "brep"])
def test_splice_with_end_plates_on_both_sides(dialect):
    model = Model()
    scene = splice(model, at(z=0) @ turned(33, (0, 0, 1)), dialect=dialect)
    (joint,) = joints_of(model)
    assert joint.configuration == "splice"
    assert joint.moment_joint, joint.why
    assert [plate.role for plate in joint.plates] == ["end_plate", "end_plate"]
    assert rows_of(joint) == pytest.approx(list(scene.rows), abs=0.05)
    assert (joint.supported.name, joint.supporting.name) == ("B1", "B2")


@pytest.mark.parametrize("upright", [0.0, 90.0])
def test_a_column_splice_is_upright(upright):
    """A vertical member: the top flange is the one on the +depth side of its own axes."""
    model = Model()
    scene = splice(model, turned(-upright, (0, 1, 0), (0, 0, 8000)) @ at(z=-3000))
    (joint,) = joints_of(model)
    assert joint.configuration == "splice"
    assert sorted(rows_of(joint)) == pytest.approx(sorted(scene.rows), abs=0.05)


def test_relations_are_not_needed():
    """The same joints with and without assemblies, connections and aggregates."""
    model, scene = Model(), EndPlate()
    made = scene.build(model)
    assembly = model.rooted("IfcElementAssembly", Name="A1")
    model.rooted("IfcRelAggregates", RelatingObject=assembly, RelatedObjects=[made["beam"], made["plate"]])
    model.rooted(
        "IfcRelConnectsWithRealizingElements",
        RelatingElement=made["column"], RelatedElement=made["beam"], RealizingElements=made["bolts"],
    )  # fmt: skip
    with_them = joints_of(model)
    for relation in model.file.by_type("IfcRelationship"):
        model.file.remove(relation)
    without = joints_of(model)
    assert [joint.model_dump() for joint in with_them] == [joint.model_dump() for joint in without]
