"""Placements and operators against the general-purpose placement tools of ifcopenshell."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from ifcopenshell.util.placement import get_local_placement

from ifcjoints.reading.placements import Placements, is_rigid
from sample_models.making import FOOT, INCH, Model, at, turned

vectors = st.tuples(*[st.floats(-1, 1)] * 3).filter(lambda v: np.linalg.norm(v) > 0.1)


@given(st.lists(st.tuples(vectors, st.floats(-180, 180), vectors), min_size=1, max_size=4),
       st.sampled_from([1.0, 10.0, 1000.0, INCH, FOOT]))  # fmt: skip
@settings(deadline=None, max_examples=50)
def test_chains(links, unit):
    model, placement = Model(unit=unit), None
    for about, degrees, shift in links:
        placement = model.placement(turned(degrees, about, np.array(shift) * 1e5), placement)
    found = Placements(unit).of_element(placement)
    expected = get_local_placement(placement)
    expected[:3, 3] *= unit
    np.testing.assert_allclose(found, expected, atol=1e-6, rtol=1e-9)
    assert is_rigid(found)


def test_axes_left_out():
    model = Model()
    plain = model.add("IfcAxis2Placement3D", Location=model.point(1, 2, 3))
    np.testing.assert_allclose(Placements(1.0).axes(plain), at(1, 2, 3))
    assert np.array_equal(Placements(1.0).of_element(None), np.eye(4))


def test_an_x_axis_not_square_to_z_is_made_so():
    """ISO 16739, IfcAxis2Placement3D: x is the part of RefDirection square to Axis."""
    model = Model()
    placed = model.add(
        "IfcAxis2Placement3D",
        Location=model.point(0, 0, 0), Axis=model.direction(0, 0, 2), RefDirection=model.direction(1, 0, 5),
    )  # fmt: skip
    np.testing.assert_allclose(Placements(1.0).axes(placed), np.eye(4), atol=1e-12)


@pytest.mark.parametrize("axis", [(0, 0, 1), (1, 0, 0), (0, 0, 0)])
def test_an_x_axis_along_z_or_without_length(axis):
    model = Model()
    placed = model.add(
        "IfcAxis2Placement3D",
        Location=model.point(0, 0, 0), Axis=model.direction(0, 0, 1), RefDirection=model.direction(*axis),
    )  # fmt: skip
    found = Placements(1.0).axes(placed)
    assert is_rigid(found)
    np.testing.assert_allclose(found[:3, 2], [0, 0, 1])


def test_a_circle_of_placements_is_an_error():
    model = Model()
    one = model.placement(np.eye(4))
    one.PlacementRelTo = model.placement(np.eye(4), one)
    with pytest.raises(ValueError, match="back to itself"):
        Placements(1.0).of_element(one)


def test_grid_and_linear_placements_keep_their_place_in_the_chain():
    """Nothing but local placements is worked out; a link of another kind must not be silently the identity."""
    model = Model("IFC4")
    grid = model.add(
        "IfcGridPlacement", PlacementLocation=model.add("IfcVirtualGridIntersection", OffsetDistances=[0.0, 0.0])
    )
    with pytest.raises(ValueError, match="IfcGridPlacement"):
        Placements(1.0).of_element(grid)


@given(vectors, st.floats(-180, 180), st.floats(0.1, 3.0))
@settings(deadline=None, max_examples=30)
def test_operators_scale_and_turn(about, degrees, scale):
    model, turn = Model(), turned(degrees, about, (10, 20, 30))
    axes = {f"Axis{k + 1}": model.direction(*turn[:3, k]) for k in range(3)}
    operator = model.add(
        "IfcCartesianTransformationOperator3D", LocalOrigin=model.point(10, 20, 30), Scale=scale, **axes
    )
    expected = turn.copy()
    expected[:3, :3] *= scale
    np.testing.assert_allclose(Placements(1.0).operator(operator), expected, atol=1e-9)
    assert is_rigid(Placements(1.0).operator(operator)) == (abs(scale - 1) < 1e-9)
