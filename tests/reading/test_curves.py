"""Closed curves against the areas that plane geometry gives them."""

from __future__ import annotations

import math

import numpy as np
import pytest

from ifcjoints.model.geometry import signed_area
from ifcjoints.reading.curves import ring, three_point_arc
from ifcjoints.reading.placements import Placements
from ifcjoints.reading.unreadable import Unreadable
from sample_models.making import INCH, Model

CHORDS = 0.012
"""A circle in chords of 15° lacks 1.14 % of its area."""


def read(model: Model, curve, angle_unit: float = 1.0) -> np.ndarray:
    return ring(curve, Placements(model.unit), angle_unit)


def half_circle(model: Model, x: float, turn: float, by: str, sense: bool = True):
    """A half circle of radius 11 about (x, 0): from −90° + turn, half a turn round."""
    basis = model.add("IfcCircle", Position=model.flat_axes(x, 0), Radius=11 / model.unit)
    low, high = math.radians(turn - 90), math.radians(turn + 90)
    ends = (low, high) if sense else (high, low)
    if by == "PARAMETER":
        trims = [[model.file.create_entity("IfcParameterValue", end)] for end in ends]
    else:
        trims = [[model.point(x + 11 * math.cos(end), 11 * math.sin(end))] for end in ends]
    return model.add(
        "IfcTrimmedCurve", BasisCurve=basis, Trim1=trims[0], Trim2=trims[1], SenseAgreement=sense,
        MasterRepresentation=by,
    )  # fmt: skip


def slot(model: Model, by: str, closed_by_lines: bool, sense: bool = True):
    right, left = half_circle(model, 20, 0, by, sense), half_circle(model, -20, 180, by, sense)
    segments = [(right, sense), (left, sense)]
    if closed_by_lines:
        top = model.add("IfcPolyline", Points=[model.point(20, 11), model.point(-20, 11)])
        bottom = model.add("IfcPolyline", Points=[model.point(20, -11), model.point(-20, -11)])
        segments = [(right, sense), (top, True), (left, sense), (bottom, False)]
    made = [
        model.add("IfcCompositeCurveSegment", Transition="CONTINUOUS", SameSense=same, ParentCurve=curve)
        for curve, same in segments
    ]
    return model.add("IfcCompositeCurve", Segments=made, SelfIntersect=False)


@pytest.mark.parametrize("by", ["PARAMETER", "CARTESIAN"])
@pytest.mark.parametrize("lines", [True, False])
@pytest.mark.parametrize("sense", [True, False])
@pytest.mark.parametrize("unit", [1.0, INCH])
def test_a_slot_of_two_half_circles(by, lines, sense, unit):
    model = Model(unit=unit)
    points = read(model, slot(model, by, lines, sense))
    assert abs(signed_area(points)) == pytest.approx(40 * 22 + math.pi * 11**2, rel=CHORDS)
    np.testing.assert_allclose([points.min(axis=0), points.max(axis=0)], [[-31, -11], [31, 11]], atol=0.1)


def test_angles_in_degrees():
    model = Model()
    curve = half_circle(model, 0, 0, "PARAMETER")
    for trim in (curve.Trim1, curve.Trim2):
        trim[0].wrappedValue = math.degrees(trim[0].wrappedValue)
    points = read(model, curve, math.radians(1.0))
    assert signed_area(points) == pytest.approx(math.pi * 11**2 / 2, rel=CHORDS)


def test_circle():
    model = Model(unit=10.0)
    points = read(model, model.add("IfcCircle", Position=model.flat_axes(5, 6, 30), Radius=2.0))
    np.testing.assert_allclose(np.hypot(*(points - [5, 6]).T), 20.0)
    assert signed_area(points) == pytest.approx(math.pi * 20**2, rel=CHORDS)


def test_indexed_curve_with_arcs():
    model = Model()
    s = 11 / math.sqrt(2)
    corners = [(-20, -11), (20, -11), (20 + s, -s), (20 + 11, 0), (20 + s, s), (20, 11), (-20, 11), (-31, 0)]
    points = model.add("IfcCartesianPointList2D", CoordList=[list(map(float, corner)) for corner in corners])
    segments = [
        model.file.create_entity("IfcLineIndex", [1, 2]),
        model.file.create_entity("IfcArcIndex", [2, 3, 4]),
        model.file.create_entity("IfcArcIndex", [4, 5, 6]),
        model.file.create_entity("IfcLineIndex", [6, 7]),
        model.file.create_entity("IfcArcIndex", [7, 8, 1]),
    ]
    read_points = read(model, model.add("IfcIndexedPolyCurve", Points=points, Segments=segments))
    assert signed_area(read_points) == pytest.approx(40 * 22 + math.pi * 11**2, rel=CHORDS)


def test_indexed_curve_of_lines_only_closed_by_its_first_point():
    model = Model()
    corners = [[0.0, 0.0], [30.0, 0.0], [30.0, 40.0], [0.0, 0.0]]
    points = model.add("IfcCartesianPointList2D", CoordList=corners)
    assert len(read(model, model.add("IfcIndexedPolyCurve", Points=points))) == 3


@pytest.mark.parametrize("by", ["PARAMETER", "CARTESIAN"])
def test_trimmed_lines(by):
    model = Model(unit=10.0)
    corners = [(0, 0), (30, 0), (30, 40)]
    segments = []
    for start, end in zip(corners, [*corners[1:], corners[0]], strict=True):
        run = (end[0] - start[0], end[1] - start[1])
        vector = model.add("IfcVector", Orientation=model.direction(*run), Magnitude=0.5)
        line = model.add("IfcLine", Pnt=model.point(*start), Dir=vector)
        trims = [[model.point(*start)], [model.point(*end)]]
        if by == "PARAMETER":
            lengths = (0.0, math.hypot(*run) / 10.0 / 0.5)
            trims = [[model.file.create_entity("IfcParameterValue", length)] for length in lengths]
        trimmed = model.add(
            "IfcTrimmedCurve", BasisCurve=line, Trim1=trims[0], Trim2=trims[1], SenseAgreement=True,
            MasterRepresentation=by,
        )  # fmt: skip
        segments.append(
            model.add("IfcCompositeCurveSegment", Transition="CONTINUOUS", SameSense=True, ParentCurve=trimmed)
        )
    points = read(model, model.add("IfcCompositeCurve", Segments=segments, SelfIntersect=False))
    assert signed_area(points) == pytest.approx(600.0)


def test_arc_through_three_points_turns_either_way():
    start, middle, end = np.array([1.0, 0.0]), np.array([0.0, 1.0]), np.array([-1.0, 0.0])
    for points in (three_point_arc(start, middle, end), three_point_arc(end, middle, start)):
        np.testing.assert_allclose(np.linalg.norm(points, axis=1), 1.0)
        assert max(point[1] for point in points) == pytest.approx(1.0)


def test_what_only_the_kernel_knows():
    model = Model()
    ellipse = model.add("IfcEllipse", Position=model.flat_axes(), SemiAxis1=2.0, SemiAxis2=1.0)
    with pytest.raises(Unreadable, match="IfcEllipse"):
        read(model, ellipse)


def test_too_few_corners():
    model = Model()
    line = model.add("IfcPolyline", Points=[model.point(0, 0), model.point(1, 0), model.point(0, 0)])
    with pytest.raises(Unreadable, match="fewer than three"):
        read(model, line)
