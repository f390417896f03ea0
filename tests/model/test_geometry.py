"""Laws of solids: volumes, cuts and piercings do not depend on where a body is or how it was turned."""

from __future__ import annotations

import math

import numpy as np
import pytest
import shapely
from hypothesis import given, settings
from hypothesis import strategies as st

from ifcjoints.model.geometry import Frame, Solid, signed_area, unit
from ifcjoints.reading.cuts import cut_area

OUTER = np.array([(0, 0), (200, 0), (200, 300), (120, 300), (120, 150), (0, 150)], float)
HOLE = np.array([(140 + 20 * math.cos(k * math.pi / 6), 60 + 20 * math.sin(k * math.pi / 6)) for k in range(12)])
AREA = 200 * 300 - 120 * 150 - 12 / 2 * 20**2 * math.sin(math.pi / 6)
THICK = 25.0

numbers = st.floats(-1.0, 1.0)
vectors = st.tuples(numbers, numbers, numbers).map(np.array).filter(lambda v: np.linalg.norm(v) > 0.1)


def plate(axis: np.ndarray, hint: np.ndarray, shift: np.ndarray) -> tuple[Solid, Frame]:
    frame = Frame.from_z(shift * 5000.0, axis, hint if np.linalg.norm(np.cross(axis, hint)) > 0.1 else None)
    matrix = np.eye(4)
    matrix[:3, :3], matrix[:3, 3] = frame.axes.T, frame.origin
    return Solid.extruded([OUTER, HOLE], matrix, np.array([0.0, 0.0, THICK])), frame


@given(vectors, vectors, vectors)
@settings(deadline=None, max_examples=50)
def test_volume_and_areas(axis, hint, shift):
    solid, _ = plate(axis, hint, shift)
    assert solid.volume == pytest.approx(AREA * THICK, rel=1e-9)
    np.testing.assert_allclose(solid.area_vectors.sum(axis=0), 0.0, atol=1e-5)
    assert solid.areas[:2] == pytest.approx(AREA)


@given(vectors, vectors, vectors, st.floats(0.1, THICK - 0.1))
@settings(deadline=None, max_examples=50)
def test_a_cut_across_is_the_outline(axis, hint, shift, height):
    solid, frame = plate(axis, hint, shift)
    area = cut_area(solid, Frame(frame.origin + height * frame.axes[2], frame.axes))
    true = shapely.Polygon(OUTER, [HOLE])
    assert area.symmetric_difference(true).area < 1e-3


@given(vectors, vectors, vectors, vectors)
@settings(deadline=None, max_examples=50)
def test_cuts_add_up_to_the_volume(axis, hint, shift, way):
    """Cavalieri: the areas of many parallel cuts, times their distance, make the volume."""
    solid, _ = plate(axis, hint, shift)
    frame = Frame.from_z(np.zeros(3), way)
    low, high = solid.extent(frame.axes[2])
    steps = 400
    heights = low + (high - low) * (np.arange(steps) + 0.5) / steps
    areas = [cut_area(solid, Frame(frame.axes[2] * height, frame.axes)).area for height in heights]
    assert sum(areas) * (high - low) / steps == pytest.approx(AREA * THICK, rel=0.02)


@given(vectors, vectors, vectors, st.floats(1, 199), st.floats(1, 299), st.floats(-50, 50))
@settings(deadline=None, max_examples=100)
def test_piercing_meets_both_faces_where_the_filled_outline_is(axis, hint, shift, x, y, above):
    if shapely.Point(x, y).distance(shapely.Polygon(OUTER).exterior) < 1e-3:
        return
    solid, frame = plate(axis, hint, shift)
    point = frame.to_world(np.array([x, y, above]))
    (along,) = solid.pierced_at(point[None], frame.axes[2])
    inside = shapely.Polygon(OUTER).contains(shapely.Point(x, y))
    np.testing.assert_allclose(along, [-above, THICK - above] if inside else [], atol=1e-6)


@given(vectors, vectors, vectors)
@settings(deadline=None, max_examples=50)
def test_moving_there_and_back(axis, hint, shift):
    solid, frame = plate(axis, hint, shift)
    np.testing.assert_allclose(frame.to_world(frame.to_local(solid.vertices)), solid.vertices, atol=1e-8)
    assert np.linalg.det(frame.axes) == pytest.approx(1.0)


def test_ring_sense():
    assert signed_area(OUTER) == pytest.approx(200 * 300 - 120 * 150)
    assert signed_area(OUTER[::-1]) == pytest.approx(-(200 * 300 - 120 * 150))
    assert np.linalg.norm(unit(np.array([3.0, 4.0, 12.0]))) == pytest.approx(1.0)
