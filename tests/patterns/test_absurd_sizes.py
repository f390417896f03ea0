"""Coordinates and sizes that no building has: the element is told of and left out, and its bolts still count."""

import time

import numpy as np
import pytest

from ifcjoints import audit
from sample_models.making import Model, at, box

from .scenes import EndPlate, joints_of, rows_of
from .test_bolts_advanced import cylinder

PLACE = at(0, 0, 3000)


def brep(model, size):
    body = model.brep_prism([box(100, 100)], 10.0)
    body.Outer.CfsFaces[0].Bounds[0].Bound.Polygon[0].Coordinates = [size, 0.0, 0.0]
    return model.product("IfcPlate", "bad", PLACE, [body], "Brep")


def face_set(model, size):
    corners = [[0.0, 0, 0], [size, 0, 0], [0, 100.0, 0], [0, 0, 100.0]]
    points = model.add("IfcCartesianPointList3D", CoordList=corners)
    faces = [[1, 3, 2], [1, 2, 4], [1, 4, 3], [2, 3, 4]]
    body = model.add("IfcTriangulatedFaceSet", Coordinates=points, CoordIndex=faces)
    return model.product("IfcPlate", "bad", PLACE, [body], "Tessellation")


def outline(model, size):
    ring = [(0, 0), (size, 0), (0, 100)]
    return model.product("IfcPlate", "bad", PLACE, [model.extruded(model.outline([ring]), 10.0)])


def section(model, size):
    return model.product("IfcBeam", "bad", PLACE, [model.extruded(model.i_profile(size, 100, 10, 10, 10), 1000.0)])


def depth(model, size):
    return model.product("IfcPlate", "bad", PLACE, [model.extruded(model.outline([box(100, 100)]), size)])


def placement(model, size):
    return model.product("IfcPlate", "bad", at(size), [model.extruded(model.outline([box(100, 100)]), 10.0)])


def scale(model, size):
    operator = model.add("IfcCartesianTransformationOperator3D", LocalOrigin=model.point(0, 0, 0), Scale=size)
    item = model.mapped([model.brep_prism([box(100, 100)], 10.0)], "Brep", operator)
    return model.product("IfcPlate", "bad", PLACE, [item], "MappedRepresentation")


def advanced(model, size):
    return model.product("IfcPlate", "bad", PLACE, [cylinder(model, size, 0.0, 80.0)], "AdvancedBrep")


def revolved(model, size):
    axis = model.add("IfcAxis1Placement", Location=model.point(0, 0, 0), Axis=model.direction(0, 1, 0))
    area = model.outline([[(0, 0), (size, 0), (size, 80), (0, 80)]])
    body = model.add("IfcRevolvedAreaSolid", SweptArea=area, Position=model.axes(at()), Axis=axis, Angle=2 * np.pi)
    return model.product("IfcPlate", "bad", PLACE, [body])


def disk(model, size):
    line = model.add("IfcPolyline", Points=[model.point(0, 0, 0), model.point(0, 0, 80.0)])
    return model.product(
        "IfcMechanicalFastener", "8.8", PLACE, [model.add("IfcSweptDiskSolid", Directrix=line, Radius=size)]
    )


def weld_path(model, size):
    line = model.add("IfcPolyline", Points=[model.point(0, 0, 0), model.point(0, 0, size)])
    return model.product("IfcFastener", "seam", PLACE, [line], "Curve3D", PredefinedType="WELD")


def bolt(model, size):
    return model.bolt((size, 0, 0), (1, 0, 0))


def shank(model, size):
    return model.bolt((0, 0, 0), (1, 0, 0), size, 80.0)


def bolt_line(model, size):
    line = model.add("IfcPolyline", Points=[model.point(0, 0, 0), model.point(0, 0, size)])
    return model.product("IfcMechanicalFastener", "M24x80 8.8", PLACE, [line], "Curve3D")


def bolt_without_a_body(model, size):
    return model.product("IfcMechanicalFastener", "M24x80 8.8", at(size))


BODIES = [brep, face_set, outline, section, depth, placement, scale, weld_path]
BOLTS = [bolt, shank, bolt_line, bolt_without_a_body]
CURVED = [advanced, revolved, disk]


def look(add, size):
    """Audit the plain joint with an element of an absurd size beside it: the joint is as it would be."""
    model, design = Model(), EndPlate()
    design.build(model)
    bad = add(model, size)
    result = audit(model.file)
    (joint,) = result.joints
    assert joint.moment_joint
    assert rows_of(joint) == pytest.approx(list(design.rows), abs=0.01)
    assert bad.GlobalId in {problem.element for problem in result.problems}
    assert result.coverage.bolts == result.coverage.bolts_in_joints + result.coverage.bolts_elsewhere
    return result, 2 * len(design.rows)


@pytest.mark.parametrize("size", [1e12, 1e154, 1e300, 1.7e308])
@pytest.mark.parametrize("add", BODIES)
def test_a_part_is_told_of_and_left_out(add, size):
    result, bolts = look(add, size)
    assert (result.coverage.bolts, result.coverage.parts) == (bolts, 3)
    assert "that no building has" in result.problems[0].message


@pytest.mark.parametrize("size", [1e12, 1e300])
@pytest.mark.parametrize("add", BOLTS)
def test_a_bolt_is_told_of_and_counts_elsewhere(add, size):
    result, bolts = look(add, size)
    assert result.coverage.bolts == bolts + 1
    (elsewhere,) = result.elsewhere
    assert elsewhere.count == 1
    assert "axis is unknown" in elsewhere.reason


@pytest.mark.parametrize("size", [1e7, 1e12, 1e300])
@pytest.mark.parametrize("add", CURVED)
def test_wide_curves_are_not_cut_into_millions_of_chords(add, size):
    """A radius of 10 km took the geometry kernel 19 s and half a gigabyte."""
    start = time.process_time()
    look(add, size)
    assert time.process_time() - start < 5.0


def test_a_model_that_is_all_absurd_is_an_honest_empty_one():
    model = Model()
    made = EndPlate().build(model)
    for each in model.file.by_type("IfcLocalPlacement"):
        each.RelativePlacement.Location.Coordinates = [1e300, 0.0, 0.0]
    result = audit(model.file)
    assert not result.joints
    assert result.coverage.bolts_elsewhere == len(made["bolts"])
    assert len(result.problems) == len(made["bolts"]) + 3


@pytest.mark.parametrize("dialect", ["swept", "brep"])
def test_eastings_with_the_number_of_their_zone_are_no_slip(dialect):
    """Gauss-Krüger and UTM grids put the zone before the easting: 32,500 km in zone 32 (common practice, no source)."""
    model, design = Model(unit=1000.0), EndPlate(dialect=dialect)
    design.build(model, at(32.5e9, 5.5e9, 0.0))
    (joint,) = joints_of(model)
    assert joint.moment_joint
    assert rows_of(joint) == pytest.approx(list(design.rows), abs=0.1)
