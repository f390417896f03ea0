"""Clipped extrusions against the geometry kernel, and the section they keep."""

from __future__ import annotations

import numpy as np
import pytest

from ifcjoints.reading.bodies import BodyReader
from ifcjoints.reading.members import as_member
from ifcjoints.reading.placements import Placements
from ifcjoints.reading.units import read_units
from sample_models.making import INCH, Model, at, box, turned
from tests.patterns.oracle import kernel_volume_and_box

PLACE = turned(37.0, (1, 2, 3), (1200.0, -300.0, 4500.0))
SIZE = (400, 180, 8.6, 13.5, 21)


def read(model, element):
    units = read_units(model.file)
    (placed,) = BodyReader(units, Placements(units.length)).pieces(element)
    return placed


def beam(model):
    return model.extruded(model.i_profile(*SIZE, "IPE 400"), 1500.0)


def half(model, matrix, agreement=True, bounds=None, bounded_at=None):
    plane = model.add("IfcPlane", Position=model.axes(matrix))
    if bounds is None:
        return model.add("IfcHalfSpaceSolid", BaseSurface=plane, AgreementFlag=agreement)
    return model.add(
        "IfcPolygonalBoundedHalfSpace",
        BaseSurface=plane, AgreementFlag=agreement,
        Position=model.axes(np.eye(4) if bounded_at is None else bounded_at), PolygonalBoundary=model.polyline(bounds),
    )  # fmt: skip


def less(model, first, second, kind="IfcBooleanClippingResult"):
    return model.add(kind, Operator="DIFFERENCE", FirstOperand=first, SecondOperand=second)


def agree(model, item, straight: bool):
    element = model.product("IfcBeam", "b", PLACE, [item], "Clipping")
    placed = read(model, element)
    volume, bounds = kernel_volume_and_box(element)
    solid = placed.in_world()
    assert solid.volume == pytest.approx(volume, rel=2e-3)
    np.testing.assert_allclose(solid.bounds, bounds, atol=0.2)
    assert (len(solid.vertices) == 2 * len(placed.piece.cut_from.profile.rings[0])) == straight
    member = as_member(placed.piece)
    assert member.stated
    assert [member.section.h, member.section.b, member.section.tf] == [400, 180, 13.5]
    assert abs(member.axis[2]) == pytest.approx(1.0)
    return member


@pytest.mark.parametrize("unit", [1.0, 1000.0, INCH])
@pytest.mark.parametrize("agreement", [True, False])
@pytest.mark.parametrize("tilt", [0.0, 12.0, -35.0])
def test_both_ends_on_a_slope(unit, agreement, tilt):
    model = Model(unit=unit)
    sign = 1.0 if agreement else -1.0
    start = at(z=200) @ turned(tilt, (1, 0, 0)) @ turned(0 if agreement else 180, (0, 1, 0))
    end = at(z=1300) @ turned(-tilt, (1, 0, 0)) @ turned(180 if agreement else 0, (0, 1, 0))
    assert start[2, 2] * sign > 0
    member = agree(
        model, less(model, less(model, beam(model), half(model, start, agreement)), half(model, end, agreement)), True
    )
    assert member.length == pytest.approx(1100 + 400 * abs(np.tan(np.radians(tilt))))


def test_a_bounded_half_space_that_takes_the_whole_end():
    model = Model()
    item = less(model, beam(model), half(model, at(z=200), True, box(500, 500)))
    assert agree(model, item, True).length == pytest.approx(1300)


def test_a_bounded_half_space_that_copes_the_top_flange():
    """A corner taken off the end: the kernel cuts it, the section and the length stand."""
    model = Model()
    item = less(model, beam(model), half(model, at(z=200), True, box(500, 100, 0, 190)))
    assert agree(model, item, False).length == pytest.approx(1500)


def test_a_mitre_that_crosses_the_end():
    model = Model()
    agree(model, less(model, beam(model), half(model, at(y=150) @ turned(50, (1, 0, 0)))), False)


@pytest.mark.parametrize("kind", ["IfcBooleanClippingResult", "IfcBooleanResult"])
def test_a_solid_notch(kind):
    model = Model()
    notch = model.extruded(model.outline([box(400, 80, 0, 190)]), 120.0)
    agree(model, less(model, beam(model), notch, kind), False)


def test_a_notch_then_a_slope():
    model = Model()
    notch = model.extruded(model.outline([box(400, 80, 0, 190)]), 120.0)
    end = half(model, at(z=1300) @ turned(170, (1, 0, 0)))
    agree(model, less(model, less(model, beam(model), notch), end), False)


def test_nothing_taken():
    model = Model()
    assert agree(model, less(model, beam(model), half(model, at(z=-50))), True).length == pytest.approx(1500)
