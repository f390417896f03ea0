"""Plates by their shape: outline, holes and thickness, whatever the body and the place; and what is no plate."""

from __future__ import annotations

import numpy as np
import pytest
import shapely
from hypothesis import given, settings
from hypothesis import strategies as st

from ifcjoints.model.geometry import Solid
from ifcjoints.reading.bodies import Piece
from ifcjoints.reading.members import as_member
from ifcjoints.reading.plates import as_plate
from sample_models.making import box, circle, i_ring, prism_faces, turned

OUTLINES = {
    "end plate": [box(200, 540), circle(13, 16, 55, 200), circle(13, 16, -55, 200), circle(13, 12, 55, -200)],
    "triangular rib": [[(0, 0), (100, 0), (0, 150)]],
    "snipped stiffener": [[(0, 20), (20, 0), (240, 0), (262, 20), (262, 125), (0, 125)]],
    "strip": [box(40, 3000)],
    "slotted": [box(120, 300), [(-11, -40), (11, -40), (11, 40), (-11, 40)]],
    "bracket": [[(0, 0), (400, 0), (400, 60), (60, 60), (60, 500), (0, 500)]],
}


def made(rings, thickness, matrix=None) -> Solid:
    vertices, faces = prism_faces(rings, thickness)
    solid = Solid.from_faces(np.array(vertices), faces)
    return solid if matrix is None else solid.moved(matrix)


@pytest.mark.parametrize("name", OUTLINES)
@pytest.mark.parametrize("thickness", [6.0, 20.0])
@given(st.floats(-180, 180), st.tuples(*[st.floats(-1, 1)] * 3).filter(lambda v: np.linalg.norm(v) > 0.1))
@settings(deadline=None, max_examples=10)
def test_outline_thickness_and_holes(name, thickness, degrees, about):
    rings = OUTLINES[name]
    plate = as_plate(made(rings, thickness, turned(degrees, about, (1e6, -2e5, 3e4))))
    assert plate is not None
    assert plate.thickness == pytest.approx(thickness, abs=1e-6)
    true = shapely.Polygon(rings[0], rings[1:])
    found = shapely.Polygon(plate.outline, plate.holes)
    assert found.area == pytest.approx(true.area, rel=1e-9)
    assert found.length == pytest.approx(true.length, rel=1e-9)
    assert plate.as_solid().volume == pytest.approx(true.area * thickness, rel=1e-9)


def test_a_triangulated_plate():
    """Caps in triangles, as tessellations have them, join to one outline."""
    vertices, faces = prism_faces([box(200, 300)], 20.0)
    triangles = [[[loop[0], loop[k], loop[k + 1]]] for (loop,) in faces for k in range(1, len(loop) - 1)]
    plate = as_plate(Solid.from_faces(np.array(vertices), triangles))
    assert plate.thickness == pytest.approx(20)
    assert shapely.Polygon(plate.outline).area == pytest.approx(200 * 300)


def test_a_bevelled_edge_takes_nothing_from_the_thickness():
    """One long edge prepared for welding at 45° over half the thickness."""
    profile = [(0, 0), (200, 0), (200, 20), (10, 20), (0, 10)]
    plate = as_plate(made([profile], 300.0, turned(90, (1, 0, 0))))
    assert plate.thickness == pytest.approx(20)


@pytest.mark.parametrize(
    "ring",
    [i_ring(400, 180, 8.6, 13.5, 21), [(0, 0), (100, 0), (100, 10), (10, 10), (10, 100), (0, 100)],
     i_ring(100, 100, 6, 10, 12)],
)  # fmt: skip
@pytest.mark.parametrize("length", [120.0, 400.0, 6000.0])
def test_rolled_sections_are_no_plates(ring, length):
    solid = made([ring], length)
    assert as_plate(solid) is None
    assert as_member(Piece(solid)) is not None


def test_blocks_and_bars_are_neither():
    for rings, length in (([box(400, 400)], 400.0), ([box(50, 50)], 1000.0)):
        solid = made(rings, length)
        assert as_plate(solid) is None
        assert as_member(Piece(solid)) is None
