"""The IFC4 steel fabrication exchange (AISC EM.11): bolts as lines, their data in its property sets, no relations."""

import pytest

from ifcjoints import audit
from sample_models.making import Model, at

from .scenes import EndPlate, joints_of, rows_of

SET = "AISC_EM11_Pset_"


def exchange(grade="A325", field=True):
    """Make a model in that dialect: drilled by openings, bolts as two-point lines without a relation."""
    model = Model(unit=25.4)
    design = EndPlate(d=25.4 * 0.75)
    design.build_column(model, at())
    plate = design.build_plate(model, at())
    beam = design.build_beam(model, at())
    for x, z in design.places():
        bolt = model.product("IfcMechanicalFastener", "Bolt", at(design.plate[2], x, z, (-1, 0, 0), (0, 1, 0)))
        line = model.add("IfcPolyline", Points=[model.point(0, 0, 0), model.point(0, 0, 70.0)])
        shape = model.add(
            "IfcShapeRepresentation",
            ContextOfItems=model.context, RepresentationIdentifier="Body", RepresentationType="Curve3D", Items=[line],
        )  # fmt: skip
        bolt.Representation = model.add("IfcProductDefinitionShape", Representations=[shape])
        model.properties(bolt, SET + "Bolt", BoltGrade=grade, BoltDiameter=19.05, BoltLength=70.0, BoltType="Hex")
        hole = model.extruded(model.profile("IfcCircleProfileDef", Radius=10.3), 60.0)
        opening = model.opening(plate, at(-10, x, z, (1, 0, 0)), [hole])
        opening.ObjectType = "BoltHole"
    model.properties(beam, SET + "Material", MaterialGrade="A992")
    model.properties(beam, SET + "PieceIdentification", PieceMark="B-17")
    return model, design


def test_the_joint_is_the_plain_one():
    model, design = exchange()
    (joint,) = joints_of(model)
    assert joint.moment_joint
    assert rows_of(joint) == pytest.approx(design.rows, abs=0.01)
    assert joint.bolts.diameter_mm == pytest.approx(19.05)
    assert joint.bolts.length_mm == pytest.approx(70.0)
    assert joint.bolts.grade == "A325"
    assert joint.supported.grade == "A992"
    assert {joint.provenance[f"bolts.{key}"].source for key in ("diameter", "length", "grade")} == {"read"}


def test_the_audit_tells_which_properties_were_used():
    model, design = exchange()
    used = audit(model.file).properties_used
    assert used[SET + "Bolt.BoltDiameter"] == 2 * len(design.rows)
    assert used[SET + "Bolt.BoltGrade"] == 2 * len(design.rows)
    assert used[SET + "Material.MaterialGrade"] >= 1
    assert SET + "Bolt.BoltType" not in used


def test_actions_find_the_member_by_its_piece_mark(tmp_path):
    model, _ = exchange()
    table = tmp_path / "actions.csv"
    table.write_text("member,end,case,N_kN,V_kN,M_kNm\nB-17,start,LC1,0,10,20\n", encoding="utf-8")
    (joint,) = audit(model.file, actions=table).joints
    assert {result.case for result in joint.checks} == {"LC1", None}
