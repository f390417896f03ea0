"""Bolts as advanced B-reps, whose faces lie on cylinders and planes and have circles for edges."""

import pytest

from sample_models.making import Model, at, circle

from .test_bolts_bodies import HEX, LENGTH, D, check, plain_bolts


def cylinder(model, radius, low, high):
    """Write a cylinder about z with a seam, as an advanced B-rep."""

    def placed(z):
        return model.axes(at(z=z))

    def edge(start, end, curve):
        return model.add("IfcEdgeCurve", EdgeStart=start, EdgeEnd=end, EdgeGeometry=curve, SameSense=True)

    def face(surface, same, *edges):
        oriented = [model.add("IfcOrientedEdge", EdgeElement=each, Orientation=sense) for each, sense in edges]
        loop = model.add("IfcEdgeLoop", EdgeList=oriented)
        bound = model.add("IfcFaceOuterBound", Bound=loop, Orientation=True)
        return model.add("IfcAdvancedFace", Bounds=[bound], FaceSurface=surface, SameSense=same)

    bottom, top = (model.add("IfcVertexPoint", VertexGeometry=model.point(radius, 0, z)) for z in (low, high))
    rims = [model.add("IfcCircle", Position=placed(z), Radius=radius / model.unit) for z in (low, high)]
    line = model.add("IfcPolyline", Points=[model.point(radius, 0, low), model.point(radius, 0, high)])
    below, above, seam = edge(bottom, bottom, rims[0]), edge(top, top, rims[1]), edge(bottom, top, line)
    wall = model.add("IfcCylindricalSurface", Position=placed(low), Radius=radius / model.unit)
    planes = [model.add("IfcPlane", Position=placed(z)) for z in (low, high)]
    faces = [
        face(wall, True, (below, True), (seam, True), (above, False), (seam, False)),
        face(planes[0], False, (below, False)),
        face(planes[1], True, (above, True)),
    ]
    return model.add("IfcAdvancedBrep", Outer=model.add("IfcClosedShell", CfsFaces=faces))


@pytest.mark.parametrize("name", ["M24x80 8.8", "8.8"])
@pytest.mark.parametrize("unit", [1.0, 1000.0, 25.4])
def test_a_shank_bounded_by_a_cylinder(unit, name):
    model = Model(unit=unit)
    for place in plain_bolts(model):
        head = model.extruded(model.outline([circle(HEX, 6)]), 15.0, at(z=-15.0))
        model.product("IfcMechanicalFastener", name, place, [cylinder(model, D / 2, 0.0, LENGTH), head], "AdvancedBrep")
    joint = check(model, tolerance=0.01)
    assert joint.provenance["bolts.diameter"].source == ("read" if "M24" in name else "measured")
