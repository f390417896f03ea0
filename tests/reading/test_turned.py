"""Turned bodies against the figures they were turned to, wherever they lie and however they are written."""

import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from ifcjoints.model.geometry import Solid
from ifcjoints.reading.turned import turned_bodies, turned_of

from .turning import anywhere, lathed, placed


@settings(deadline=None, max_examples=80)
@given(
    corners=st.integers(5, 32),
    radius=st.floats(3.0, 40.0),
    slender=st.one_of(st.floats(0.2, 20.0), st.sampled_from([2.0, math.sqrt(2), math.sqrt(3), 4.0])),
    triangles=st.booleans(),
    seed=st.integers(0, 10_000),
)
def test_a_cylinder_of_any_facets_is_measured_over_corners_and_flats(corners, radius, slender, triangles, seed):
    length = slender * radius
    world = anywhere(seed)
    body = turned_of(lathed([(radius, 0.0), (radius, length)], corners, 0.3, triangles=triangles).moved(world))
    assert body is not None
    (step,) = body.steps
    assert step.length == pytest.approx(length, abs=1e-6)
    assert step.radius == pytest.approx(radius, abs=1e-6)
    assert step.flat == pytest.approx(radius * math.cos(math.pi / corners), abs=1e-6)
    assert not step.hollow
    assert abs(body.direction @ world[:3, 2]) == pytest.approx(1.0, abs=1e-9)
    off = np.cross(body.point - world[:3, 3], world[:3, 2])
    assert np.linalg.norm(off) < 1e-6


@pytest.mark.parametrize("bore", [0.4, 0.6, 0.75, 0.95])
@pytest.mark.parametrize("triangles", [True, False])
def test_rings_are_hollow(bore, triangles):
    body = turned_of(lathed([(20, 0), (20, 18)], 24, bore=20 * bore, triangles=triangles).moved(anywhere(3)))
    (step,) = body.steps
    assert step.hollow
    assert step.radius == pytest.approx(20)


def test_steps_follow_the_profile_from_end_to_end():
    profile = [(21, 0), (21, 15), (12, 15), (12, 93), (10, 95)]
    world = anywhere(7)
    body = turned_of(lathed(profile, 16).moved(world))
    steps = body.steps if body.direction @ world[:3, 2] > 0 else body.steps[::-1]
    assert [step.length for step in steps] == pytest.approx([15, 78, 2])
    assert [step.radius for step in steps] == pytest.approx([21, 12, 11])


@pytest.mark.parametrize(
    "sides", [(200.0, 100.0, 10.0), (60.0, 40.0, 4000.0), (12.0, 100.0, 100.0 * math.sqrt(2))], ids=str
)
def test_flats_and_bars_are_no_turned_bodies(sides):
    b, h, t = sides
    box = Solid.extruded([np.array([(0, 0), (b, 0), (b, h), (0, h)], float)], anywhere(5), np.array([0, 0, t]))
    assert turned_of(box) is None


def test_a_shell_of_many_bodies_is_taken_apart():
    parts = [lathed([(12, 0), (12, 80)], 16).moved(anywhere(seed, 500.0)) for seed in range(6)]
    vertices = np.vstack([part.vertices for part in parts])
    faces, first = [], 0
    for part in parts:
        loops = np.split(part.corners, part.loop_start[1:])
        faces += [[(loop + first).tolist()] for loop in loops]
        first += len(part.vertices)
    found = turned_bodies([placed(Solid.from_faces(vertices, faces))])
    assert len(found) == len(parts)
    assert all(body.steps[0].length == pytest.approx(80) for body in found)
