"""Holes that are cut into the bodies of plates and members, in every way that bodies are written."""

from itertools import pairwise

import numpy as np
import pytest
import shapely

from sample_models.making import Model, at, box, circle, i_ring, prism_faces

from .scenes import EndPlate, joints_of, rows_of

DESIGN = EndPlate()
HOLE = 26.0


def check(model):
    (joint,) = joints_of(model)
    assert joint.moment_joint
    assert rows_of(joint) == pytest.approx(DESIGN.rows, abs=0.1)
    assert joint.bolts.hole_diameter_mm == pytest.approx(HOLE, abs=0.05)
    assert joint.provenance["bolts.hole_diameter"].source == "measured"


def scene(model, column=True, plate=None):
    """Write the joint with a plate of its own making, or one without holes, and its own column or none."""
    design = EndPlate()
    if column:
        design.build_column(model, np.eye(4))
    design.build_beam(model, np.eye(4))
    design.build_bolts(model, np.eye(4))
    b, h, t = design.plate
    body = plate or [model.extruded(model.outline([box(b, h)]), t)]
    model.product("IfcPlate", "EP1", at(0, 0, design.level, (1, 0, 0), (0, 1, 0)), body)
    return design


def holes(design=DESIGN):
    return [circle(HOLE / 2, 16, x, z - design.level) for x, z in design.places()]


def with_slits(ring, inner):
    """Join holes to an outline by slits from its last corner."""
    joined = list(ring)
    for hole in inner:
        nearest = min(range(len(hole)), key=lambda k: np.hypot(*np.subtract(hole[k], ring[-1])))
        turned = [*hole[nearest:], *hole[:nearest]][::-1]
        joined += [turned[-1], *turned, ring[-1]]
    return joined


def strips(rings):
    """Cut a plate with holes along the bolts' lines, so that no face has a hole in it."""
    area = shapely.Polygon(rings[0], rings[1:])
    xs = sorted({-100.0, 100.0, *(x for x, _ in DESIGN.places())})
    return [
        np.array(shapely.geometry.polygon.orient(each).exterior.coords)[:-1]
        for a, b in pairwise(xs)
        for each in shapely.get_parts(area.intersection(shapely.box(a, -300, b, 300)))
    ]


@pytest.mark.parametrize("how", ["voids of the profile", "inner bounds", "slits", "faces between the holes"])
def test_holes_of_the_end_plate(how):
    model = Model()
    b, h, t = DESIGN.plate
    rings = [box(b, h), *holes()]
    if how == "voids of the profile":
        body = [model.extruded(model.outline(rings), t)]
    elif how == "inner bounds":
        body = [model.brep_prism(rings, t)]
    elif how == "slits":
        (outside, *inner) = rings
        body = [model.extruded(model.outline([with_slits(outside, inner[:1])]), t)]
    else:
        vertices, faces = prism_faces(rings, t)
        faces = faces[2:]
        for ring in strips(rings):
            for z, order in ((0.0, -1), (t, 1)):
                faces.append([list(range(len(vertices), len(vertices) + len(ring)))[::order]])
                vertices += [(x, y, z) for x, y in ring]
        body = [model.brep(vertices, faces)]
    scene(model, plate=body)
    check(model)


def drilled_column(model):
    """Write a column whose near flange is drilled, its web and flanges as one closed shell."""
    h, b, tw, tf, _ = DESIGN.column
    length = 2 * DESIGN.level
    vertices, faces = prism_faces([i_ring(h, b, tw, tf)], length)
    outside = next(k for k, face in enumerate(faces) if all(abs(vertices[c][1] - h / 2) < 1e-9 for c in face[0]))
    inside = [
        k
        for k, face in enumerate(faces)
        if all(abs(vertices[c][1] - h / 2 + tf) < 1e-9 for c in face[0]) and k != outside
    ]
    for x, z in DESIGN.places():
        ring = circle(HOLE / 2, 16, -x, z)
        first = len(vertices)
        vertices += [(px, h / 2, pz) for px, pz in ring] + [(px, h / 2 - tf, pz) for px, pz in ring]
        rim, other = list(range(first, first + 16)), list(range(first + 16, first + 32))
        faces[outside].append(rim)
        (face,) = [k for k in inside if vertices[faces[k][0][0]][0] * -x >= 0 and vertices[faces[k][0][1]][0] * -x >= 0]
        faces[face].append(other[::-1])
        faces += [[[a, b_, b_ + 16, a + 16]] for a, b_ in zip(rim, [*rim[1:], rim[0]], strict=True)]
    matrix = at(-h / 2, 0, 0, (0, 0, 1), (0, 1, 0))
    matrix[:3, 0], matrix[:3, 1] = (0, -1, 0), (1, 0, 0)
    model.product("IfcColumn", "C1", matrix, [model.brep(vertices, faces)], "Brep")


def test_holes_in_the_flange_of_a_column_count_where_the_plate_has_none():
    model = Model()
    drilled_column(model)
    scene(model, column=False)
    check(model)
