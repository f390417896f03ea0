"""Holes against the figures they were drilled to, wherever they lie and however the faces are written."""

import math
from itertools import pairwise

import numpy as np
import pytest
import shapely

from ifcjoints.model.geometry import Solid
from ifcjoints.reading.bodies import Piece
from ifcjoints.reading.holes import hole_from_opening, holes_in_solid, with_holes_seen
from sample_models.making import box, circle

from .turning import anywhere, lathed, placed

PLACES = [(-60.0, -100.0), (60.0, -100.0), (-60.0, 90.0), (60.0, 90.0)]


def slot(width, length, x=0.0, y=0.0, degrees=0.0, facets=8):
    """Return a slot's outline: so many chords round each end, corners on the true arcs."""
    reach, r = (length - width) / 2, width / 2
    ends = [(reach, -math.pi / 2), (-reach, math.pi / 2)]
    angles = np.linspace(0, math.pi, facets + 1)
    ring = np.array([(at + r * math.cos(a + start), r * math.sin(a + start)) for at, start in ends for a in angles])
    turn = math.radians(degrees)
    return ring @ [[math.cos(turn), math.sin(turn)], [-math.sin(turn), math.cos(turn)]] + (x, y)


def prism(rings, depth, world, cutting="rings"):
    """Extrude rings, their two caps written as faces with holes, as triangles, as halves, or through slits."""
    solid = Solid.extruded([np.array(ring, float) for ring in rings], world, np.array([0, 0, depth]))
    if cutting == "rings":
        return solid
    area = shapely.Polygon(rings[0], rings[1:])
    if cutting == "triangles":
        meshed = shapely.get_parts(shapely.delaunay_triangles(area))
        pieces = [each for each in meshed if area.contains(each.representative_point())]
        assert sum(each.area for each in pieces) == pytest.approx(area.area)
    else:
        low, high = np.array(rings[0]).min(axis=0), np.array(rings[0]).max(axis=0)
        xs = sorted({low[0], high[0], *(x for x, _ in PLACES)})
        strips = [shapely.box(a, low[1], b, high[1]) for a, b in pairwise(xs)]
        pieces = [each for strip in strips for each in shapely.get_parts(area.intersection(strip))]
    return _with_caps(solid, [np.array(each.exterior.coords)[:-1] for each in pieces], depth, world)


def _with_caps(solid, pieces, depth, world):
    """Put other faces in the place of a prism's two caps."""
    vertices, faces = [*solid.vertices], []
    for face in range(2, len(solid.areas)):
        (k,) = np.flatnonzero(solid.loop_face == face)
        start = solid.loop_start[k]
        faces.append([solid.corners[start : start + 4].tolist()])
    for ring in pieces:
        for z, order in ((0.0, 1), (depth, -1)):
            first = len(vertices)
            vertices += [world[:3, :3] @ (x, y, z) + world[:3, 3] for x, y in ring]
            faces.append([list(range(first, first + len(ring)))[::order]])
    return Solid.from_faces(np.array(vertices), faces)


def holes_of(solid):
    return holes_in_solid(with_holes_seen(Piece(solid)).solid)


@pytest.mark.parametrize("cutting", ["rings", "triangles", "strips"])
@pytest.mark.parametrize("corners", [8, 16, 24])
def test_round_holes_of_a_plate(corners, cutting):
    world = anywhere(corners)
    rings = [box(220, 320), *[circle(13, corners, x, y, 0.2) for x, y in PLACES]]
    holes = holes_of(prism(rings, 20.0, world, cutting))
    assert len(holes) == len(PLACES)
    inverse = np.linalg.inv(world)
    centres = np.array([inverse[:3, :3] @ hole.centre + inverse[:3, 3] for hole in holes])
    assert sorted(map(tuple, np.round(centres, 3).tolist())) == sorted((x, y, 10.0) for x, y in PLACES)
    for hole in holes:
        assert hole.diameter == pytest.approx(26.0, abs=0.01)
        assert hole.slot == pytest.approx(0.0)
        assert abs(hole.direction @ world[:3, 2]) == pytest.approx(1.0)


@pytest.mark.parametrize("cutting", ["rings", "triangles"])
@pytest.mark.parametrize("facets", [3, 6, 12])
def test_slots_have_width_and_length(facets, cutting):
    rings = [box(220, 320), *[slot(26, 56, x, y, 30.0, facets) for x, y in PLACES]]
    holes = holes_of(prism(rings, 20.0, anywhere(2), cutting))
    assert len(holes) == len(PLACES)
    for hole in holes:
        assert hole.diameter == pytest.approx(26.0, abs=0.01)
        assert hole.slot == pytest.approx(30.0, abs=0.01 if facets % 2 == 0 else 4.0)


def test_a_slit_that_leads_to_a_hole_is_seen_through():
    hole = circle(13, 16)[::-1]
    outside = box(220, 320)
    ring = [*outside[:3], *hole, hole[0], *outside[2:]]
    (found,) = holes_of(prism([ring], 20.0, anywhere(4)))
    assert found.diameter == pytest.approx(26.0)


def test_cut_outs_are_no_drilled_holes():
    rings = [box(400, 400), box(40, 40), circle(50, 24, 120, 0), box(26, 56, -120, 0)]
    assert holes_of(prism(rings, 20.0, anywhere(5))) == []


@pytest.mark.parametrize("triangles", [True, False])
def test_openings_of_any_make(triangles):
    world = anywhere(8)
    hole = hole_from_opening(placed(lathed([(13, 0), (13, 60)], 16, triangles=triangles), world))
    assert hole.diameter == pytest.approx(26.0)
    assert hole.centre == pytest.approx(world[:3, :3] @ (0, 0, 30) + world[:3, 3], abs=1e-5)
    slotted = prism([slot(26, 56)], 60.0, world, "triangles" if triangles else "rings")
    hole = hole_from_opening(placed(slotted))
    assert (hole.diameter, hole.slot) == (pytest.approx(26.0), pytest.approx(30.0))
    assert hole.centre == pytest.approx(world[:3, :3] @ (0, 0, 30) + world[:3, 3], abs=1e-5)


def test_a_stepped_opening_has_the_narrow_part_s_diameter():
    hole = hole_from_opening(placed(lathed([(30, 0), (30, 10), (13, 10), (13, 40)], 24), anywhere(9)))
    assert hole.diameter == pytest.approx(26.0)


@pytest.mark.parametrize("sides", [(300.0, 200.0), (80.0, 80.0), (40.0, 40.0)])
def test_copes_and_windows_are_no_holes(sides):
    assert hole_from_opening(placed(prism([box(*sides)], 60.0, anywhere(3)))) is None
