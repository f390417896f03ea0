"""Bolts as exporting programs write them: whatever the body, the same joint comes out."""

import math

import numpy as np
import pytest

from sample_models.making import Model, at, circle, prism_faces

from .scenes import EndPlate, joints_of, rows_of

D, LENGTH = 24.0, 80.0
GRIP = 44.0
DESIGN = EndPlate()
HEX, NUT = 0.9 * D, 19.0


def plain_bolts(model):
    """Return the joint without bolts, and each bolt's placement: under its head, z to its tip."""
    design = EndPlate()
    design.build_column(model, np.eye(4))
    design.build_plate(model, np.eye(4))
    design.build_beam(model, np.eye(4))
    return [at(design.plate[2], x, z, (-1, 0, 0), (0, 1, 0)) for x, z in design.places()]


def check(model, diameter=D, length=LENGTH, tolerance=0.05):
    """Find the one joint again, its bolts measured as they were made."""
    (joint,) = joints_of(model)
    assert joint.moment_joint
    assert rows_of(joint) == pytest.approx(DESIGN.rows, abs=0.1)
    assert joint.bolts.count == 2 * len(DESIGN.rows)
    assert joint.bolts.diameter_mm == pytest.approx(diameter, abs=tolerance)
    assert joint.bolts.length_mm == pytest.approx(length, abs=0.5)
    return joint


def moved(vertices, matrix):
    return [tuple(matrix[:3, :3] @ np.array(vertex) + matrix[:3, 3]) for vertex in vertices]


def joined(*prisms):
    """Return several prisms' corners and faces as one list: one shell that holds several bodies."""
    vertices, faces = [], []
    for rings, depth, matrix in prisms:
        own, loops = prism_faces(rings, depth)
        faces += [[[k + len(vertices) for k in loop] for loop in face] for face in loops]
        vertices += moved(own, matrix)
    return vertices, faces


def bolt_prisms(matrix=None, corners=16, nut=True):
    base = np.eye(4) if matrix is None else matrix
    parts = [([circle(D / 2, corners)], LENGTH, base), ([circle(HEX, 6)], 15.0, base @ at(z=-15.0))]
    return parts + ([([circle(HEX, 6)], NUT, base @ at(z=GRIP + 3))] if nut else [])


@pytest.mark.parametrize("corners", [6, 8, 12, 24])
def test_faceted_shanks(corners):
    model = Model()
    for place in plain_bolts(model):
        items = [model.brep_prism(*part) for part in bolt_prisms(corners=corners)]
        model.product("IfcMechanicalFastener", "M24x80 8.8", place, items, "Brep")
    check(model)


@pytest.mark.parametrize("nut", [True, False], ids=["nut", "no nut"])
@pytest.mark.parametrize("kind", ["IfcFacetedBrep", "IfcPolygonalFaceSet", "IfcTriangulatedFaceSet"])
def test_one_shell_that_holds_shank_head_and_nut(kind, nut):
    model = Model()
    vertices, faces = joined(*bolt_prisms(nut=nut))
    for place in plain_bolts(model):
        model.product("IfcMechanicalFastener", "8.8", place, [face_set(model, kind, vertices, faces)], "Brep")
    check(model)


def face_set(model, kind, vertices, faces):
    if kind == "IfcFacetedBrep":
        return model.brep(vertices, faces)
    points = model.add("IfcCartesianPointList3D", CoordList=[[float(v) for v in vertex] for vertex in vertices])
    if kind == "IfcPolygonalFaceSet":
        made = [model.add("IfcIndexedPolygonalFace", CoordIndex=[k + 1 for k in face[0]]) for face in faces]
        return model.add(kind, Coordinates=points, Faces=made)
    fans = [(face[0][0], a, b) for face in faces for a, b in zip(face[0][1:], face[0][2:], strict=False)]
    return model.add(kind, Coordinates=points, CoordIndex=[[k + 1 for k in fan] for fan in fans])


@pytest.mark.parametrize("kind", ["IfcFacetedBrep", "IfcPolygonalFaceSet"])
def test_one_shell_that_holds_all_bolts_of_the_joint(kind):
    model = Model()
    prisms = [part for place in plain_bolts(model) for part in bolt_prisms(place)]
    vertices, faces = joined(*prisms)
    model.product("IfcMechanicalFastener", "8.8", np.eye(4), [face_set(model, kind, vertices, faces)], "Brep")
    check(model)


@pytest.mark.parametrize("shells", [1, 2])
def test_groups_as_several_solids_of_one_element(shells):
    model = Model()
    prisms = [part for place in plain_bolts(model) for part in bolt_prisms(place)]
    items = [model.brep_prism(*part) for part in prisms]
    half = len(items) // shells
    for number in range(shells):
        body = items[number * half : (number + 1) * half]
        model.product("IfcMechanicalFastener", f"group {number}", np.eye(4), body, "Brep")
    check(model)


def test_a_revolved_bolt():
    model = Model()
    ring = [(0, -15), (HEX, -15), (HEX, 0), (D / 2, 0), (D / 2, LENGTH), (0, LENGTH)]
    for place in plain_bolts(model):
        axis = model.add("IfcAxis1Placement", Location=model.point(0, 0, 0), Axis=model.direction(0, 1, 0))
        solid = model.add(
            "IfcRevolvedAreaSolid",
            SweptArea=model.outline([ring]), Position=model.axes(at()), Axis=axis, Angle=2 * math.pi,
        )  # fmt: skip
        model.product("IfcMechanicalFastener", "8.8", place @ at(axis=(0, -1, 0), ref=(1, 0, 0)), [solid])
    check(model, tolerance=0.01)


def test_a_swept_disk():
    model = Model()
    for place in plain_bolts(model):
        line = model.add("IfcPolyline", Points=[model.point(0, 0, 0), model.point(0, 0, LENGTH)])
        solid = model.add("IfcSweptDiskSolid", Directrix=line, Radius=D / 2)
        head = model.extruded(model.outline([circle(HEX, 6)]), 15.0, at(z=-15.0))
        model.product("IfcMechanicalFastener", "8.8", place, [solid, head], "AdvancedSweptSolid")
    check(model, tolerance=0.01)


def test_a_csg_bolt():
    model = Model()
    for place in plain_bolts(model):
        shank = model.add("IfcRightCircularCylinder", Position=model.axes(at()), Height=LENGTH, Radius=D / 2)
        head = model.add("IfcRightCircularCylinder", Position=model.axes(at(z=-15.0)), Height=15.0, Radius=HEX)
        union = model.add("IfcBooleanResult", Operator="UNION", FirstOperand=shank, SecondOperand=head)
        solid = model.add("IfcCsgSolid", TreeRootExpression=union)
        model.product("IfcMechanicalFastener", "8.8", place, [solid], "CSG")
    check(model, tolerance=0.01)


@pytest.mark.parametrize(
    "kind", ["IfcMechanicalFastener", "IfcBeam", "IfcDiscreteAccessory", "IfcBuildingElementProxy"]
)
def test_loose_nuts_and_washers_are_neither_plies_nor_bolts(kind):
    model = Model()
    for place in plain_bolts(model):
        items = [model.brep_prism(*part) for part in bolt_prisms(nut=False)]
        model.product("IfcMechanicalFastener", "M24x80 8.8", place, items, "Brep")
        washer = model.brep_prism([circle(D, 24), circle(D / 2 + 0.5, 24)], 4.0)
        model.product(kind, "Washer 24", place @ at(z=GRIP), [washer], "Brep")
        nut = model.brep_prism([circle(HEX, 6), circle(D / 2, 16)], NUT)
        model.product(kind, "Nut M24", place @ at(z=GRIP + 4), [nut], "Brep")
    joint = check(model)
    assert joint.bolts.grip_mm == pytest.approx(GRIP, abs=0.01)


def test_nominal_sizes_without_a_body():
    model = Model(unit=1000.0)
    for place in plain_bolts(model):
        model.product("IfcMechanicalFastener", "8.8", place, NominalDiameter=D / 1000, NominalLength=LENGTH / 1000)
    check(model)


@pytest.mark.parametrize(
    ("unit", "stated"),
    [
        (1000.0, (D, LENGTH)),
        (304.8, (D / 25.4, LENGTH / 25.4)),
        (1000.0, (D / 25.4, LENGTH / 25.4)),
        (304.8, (D, LENGTH)),
    ],
    ids=["mm in a model of metres", "inches in feet", "inches in metres", "mm in feet"],
)
def test_nominal_sizes_in_another_unit_than_the_model_s(unit, stated):
    model = Model(unit=unit)
    for place in plain_bolts(model):
        items = model.bolt_items(D, LENGTH)
        model.product("IfcMechanicalFastener", "8.8", place, items, NominalDiameter=stated[0], NominalLength=stated[1])
    joint = check(model)
    assert joint.provenance["bolts.diameter"].source == "read"


@pytest.mark.parametrize(("stated", "source"), [(16.0, "read"), (22.0, "read"), (27.0, "measured")])
def test_a_real_conflict_of_sizes_is_a_problem_that_names_both_and_the_smaller_is_used(stated, source):
    from ifcjoints import audit  # noqa: PLC0415

    model = Model()
    for place in plain_bolts(model):
        items = model.bolt_items(D, LENGTH)
        model.product("IfcMechanicalFastener", "8.8", place, items, NominalDiameter=stated, NominalLength=LENGTH)
    result = audit(model.file)
    problems = [problem for problem in result.problems if "diameter" in problem.message]
    assert len(problems) == 2 * len(DESIGN.rows)
    assert f"{stated:.1f} mm" in problems[0].message
    assert "24.0 mm" in problems[0].message
    assert result.joints[0].bolts.diameter_mm == pytest.approx(min(D, stated))
    assert result.joints[0].provenance["bolts.diameter"].source == source


@pytest.mark.parametrize(
    ("texts", "reason"),
    [
        ({"PredefinedType": "ANCHORBOLT"}, "an anchor"),
        ({"PredefinedType": "STUDSHEARCONNECTOR"}, "a stud"),
        ({"PredefinedType": "DOWEL"}, "no bolt"),
        ({"ObjectType": "Shear stud"}, "a stud"),
        ({"Description": "self-drilling screw"}, "no bolt"),
        ({"Description": "holding down bolt"}, "an anchor"),
    ],
)
def test_what_is_no_structural_bolt_stands_elsewhere_with_its_reason(texts, reason):
    from ifcjoints import audit  # noqa: PLC0415

    model = Model()
    for place in plain_bolts(model):
        model.product("IfcMechanicalFastener", "x", place, model.bolt_items(D, LENGTH), **texts)
    result = audit(model.file)
    assert not result.joints
    (elsewhere,) = result.elsewhere
    assert elsewhere.count == 2 * len(DESIGN.rows)
    assert reason in elsewhere.reason


def test_a_bolt_as_a_line_from_head_to_thread():
    """A steel-fabrication exchange may give a bolt as an axis of two points, with no solid and no relation."""
    model = Model()
    for place in plain_bolts(model):
        line = model.add("IfcPolyline", Points=[model.point(0, 0, 0), model.point(0, 0, LENGTH)])
        shape = model.add(
            "IfcShapeRepresentation",
            ContextOfItems=model.context, RepresentationIdentifier="Axis", RepresentationType="Curve3D", Items=[line],
        )  # fmt: skip
        bolt = model.product("IfcMechanicalFastener", "8.8", place, NominalDiameter=D)
        bolt.Representation = model.add("IfcProductDefinitionShape", Representations=[shape])
    joint = check(model)
    assert joint.provenance["bolts.length"].source == "measured"
