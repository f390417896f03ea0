"""No part of a sample model reaches into another, and parts have the volumes that a hand reckons.

The bodies are the geometry kernel's, openings taken away.
"""

import math
from functools import cache
from itertools import combinations

import ifcopenshell
import ifcopenshell.geom
import numpy as np
import pytest

from ifcjoints.model.section_properties import area
from sample_models.make import HERE, MODELS
from sample_models.making import at, box
from sample_models.portal import Portal
from sample_models.steelwork import UP, Steelwork

DEEP = 0.3
"""mm under a part's own face: what touches another part only is then outside it."""

ASKEW = np.linalg.qr(np.array([[3.0, 1.0, 7.0], [-1.0, 5.0, 2.0], [2.0, 4.0, -11.0]]))[0]
"""Axes along no edge of any part; the third is the rays' way."""

NEAR_CORNERS = np.array([(1, 1, 1), (96, 2, 2), (2, 96, 2), (2, 2, 96)])


@cache
def bodies(path):
    """Return each element's name and triangles (n, 3, 3) in mm."""
    file = ifcopenshell.open(str(path))
    settings = ifcopenshell.geom.settings()
    settings.set("use-world-coords", True)
    settings.set("mesher-angular-deflection", 0.5)
    found = []
    for element in file.by_type("IfcElement"):
        if element.Representation and not element.is_a("IfcOpeningElement"):
            shape = ifcopenshell.geom.create_shape(settings, element).geometry
            corners = np.array(shape.verts).reshape(-1, 3) * 1000.0
            found.append((element.Name, corners[np.array(shape.faces).reshape(-1, 3)]))
    return found


def volume(triangles):
    """Six times the volume of the tetrahedra over a corner, by the divergence theorem."""
    a, b, c = (triangles - triangles[0, 0]).transpose(1, 0, 2)
    return float(np.einsum("ij,ij->", a, np.cross(b, c))) / 6.0


def just_inside(triangles):
    """Return points `DEEP` under a part's faces; near a sharp edge some come out on its other side."""
    a, b, c = triangles.transpose(1, 0, 2)
    normals = np.cross(b - a, c - a)
    size = np.linalg.norm(normals, axis=1)
    kept = size > 1.0
    weights = NEAR_CORNERS / NEAR_CORNERS.sum(axis=1, keepdims=True)
    on_faces = np.einsum("pk,tkx->tpx", weights, triangles[kept])
    return (on_faces - DEEP * (normals[kept] / size[kept, None])[:, None]).reshape(-1, 3)


def is_in(points, triangles):
    """Tell which points lie in a body: a ray from there leaves it once more than it enters."""
    flat, seen = points @ ASKEW[:, :2], triangles @ ASKEW[:, :2]
    low, high = seen.min(axis=1), seen.max(axis=1)
    near = np.all((low <= flat.max(axis=0)) & (high >= flat.min(axis=0)), axis=1)
    low, high, triangles = low[near], high[near], triangles[near]
    maybe = np.all((flat[:, None] >= low) & (flat[:, None] <= high), axis=2)
    p, t = np.nonzero(maybe)
    a, b, c = (triangles[t] - points[p, None]).transpose(1, 0, 2)
    ray = ASKEW[:, 2]
    sides = [np.cross(one, other) @ ray for one, other in ((a, b), (b, c), (c, a))]
    normals = np.cross(b - a, c - a)
    facing = normals @ ray
    ahead = np.einsum("ij,ij->i", normals, a) * facing > 0
    met = ahead & (np.all(np.array(sides) > 0, axis=0) | np.all(np.array(sides) < 0, axis=0))
    return np.bincount(p, weights=met * np.sign(facing), minlength=len(points)) > 0.5


def those_in(points, triangles):
    """Return the points that lie in a body."""
    return points[is_in(points, triangles)] if len(points) else points


def overlaps(found):
    """Return the pairs of parts of which one reaches into the other."""
    boxes = [(body.min(axis=(0, 1)), body.max(axis=(0, 1))) for _, body in found]
    inside = [just_inside(body) for _, body in found]
    pairs = []
    for i, j in combinations(range(len(found)), 2):
        low, high = np.maximum(boxes[i][0], boxes[j][0]), np.minimum(boxes[i][1], boxes[j][1])
        if np.any(high - low < DEEP):
            continue
        for one, other in ((i, j), (j, i)):
            points = inside[one][np.all((inside[one] > low) & (inside[one] < high), axis=1)]
            if those_in(those_in(points, found[other][1]), found[one][1]).size:
                pairs.append((found[i][0], found[j][0]))
                break
    return pairs


@pytest.mark.parametrize("name", MODELS)
def test_no_part_reaches_into_another(name):
    assert overlaps(bodies(HERE / f"{name}.ifc")) == []


@pytest.mark.parametrize(("gap", "told"), [(0.0, []), (-1.0, [("A", "B")]), (2.0, [])])
def test_an_overlap_would_be_told(gap, told, tmp_path):
    steel = Steelwork("Trial")
    steel.plate("A", box(200, 100), 10.0, at())
    steel.plate("B", box(60, 80), 12.0, at(z=10.0 + gap))
    steel.finish()
    steel.file.write(str(tmp_path / "trial.ifc"))
    assert overlaps(bodies(tmp_path / "trial.ifc")) == told


@pytest.fixture(scope="module")
def hall():
    return dict(bodies(HERE / "heron_yard_hall.ifc"))


def test_a_rafter_cut_upright_at_both_ends(hall):
    """Parallel cuts leave area × length of the axis between them, whatever the pitch."""
    frame = Portal()
    level = frame.span / 2 - frame.inner_face - frame.eaves_plate.thickness - frame.apex_plate.thickness
    reckoned = area(*frame.rafter) * level / math.cos(math.radians(frame.pitch))
    assert volume(hall["R1"]) == pytest.approx(reckoned, rel=2e-3)


def test_an_end_plate_has_its_eight_holes(hall):
    b, h, t = Portal.eaves_plate.plate
    assert volume(hall["EP1"]) == pytest.approx((b * h - 8 * math.pi / 4 * 26.0**2) * t, rel=2e-3)


def test_the_first_column_has_more_holes_than_the_second(hall):
    """Eight more in a flange of 19 mm, six in the web of 11 mm, all of 22 mm (drawn as polygons)."""
    holes = math.pi / 4 * 22.0**2 * (8 * 19.0 + 6 * 11.0)
    assert volume(hall["C2"]) - volume(hall["C1"]) == pytest.approx(holes, rel=0.08)


def test_columns_stand_upright(hall):
    assert np.ptp(hall["C2"], axis=(0, 1)) @ UP == pytest.approx(6450.0)
