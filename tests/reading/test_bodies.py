"""Bodies against the geometry kernel's volumes and boxes."""

from __future__ import annotations

import numpy as np
import pytest

from ifcjoints.reading.bodies import BodyReader
from ifcjoints.reading.placements import Placements
from ifcjoints.reading.units import read_units
from sample_models.making import FOOT, INCH, Model, at, box, circle, i_ring, prism_faces, turned
from tests.patterns.oracle import kernel_volume_and_box

PLACE = turned(37.0, (1, 2, 3), (1200.0, -300.0, 4500.0))
UNITS = (1.0, 10.0, 1000.0, INCH, FOOT)
PROFILES = {
    "i": lambda m: m.i_profile(400, 180, 8.6, 13.5, 21),
    "i_square_roots": lambda m: m.i_profile(400, 180, 8.6, 13.5, None),
    "u": lambda m: m.profile(
        "IfcUShapeProfileDef", Depth=200, FlangeWidth=75, WebThickness=8.5, FlangeThickness=11.5, FilletRadius=11.5
    ),
    "l": lambda m: m.profile("IfcLShapeProfileDef", Depth=100, Width=75, Thickness=8, FilletRadius=10),
    "l_equal": lambda m: m.profile("IfcLShapeProfileDef", Depth=90, Thickness=9),
    "t": lambda m: m.profile(
        "IfcTShapeProfileDef", Depth=150, FlangeWidth=150, WebThickness=9, FlangeThickness=15, FilletRadius=18
    ),
    "rhs": lambda m: m.profile(
        "IfcRectangleHollowProfileDef",
        XDim=100, YDim=200, WallThickness=8, InnerFilletRadius=8, OuterFilletRadius=16,
    ),
    "chs": lambda m: m.profile("IfcCircleHollowProfileDef", Radius=84.15, WallThickness=6.3),
    "rectangle": lambda m: m.profile("IfcRectangleProfileDef", XDim=120, YDim=20),
    "rounded": lambda m: m.profile("IfcRoundedRectangleProfileDef", XDim=120, YDim=60, RoundingRadius=10),
    "circle": lambda m: m.profile("IfcCircleProfileDef", Radius=12),
    "asymmetric": lambda m: m.profile(
        "IfcAsymmetricIShapeProfileDef",
        BottomFlangeWidth=300, OverallDepth=500, WebThickness=12, BottomFlangeThickness=25,
        TopFlangeWidth=200, TopFlangeThickness=20,
    ),
    "placed": lambda m: m.profile(
        "IfcRectangleProfileDef", position=m.flat_axes(30, 50, 25), XDim=120, YDim=20
    ),
    "voids": lambda m: m.outline([box(200, 400), box(50, 60, 20, 100), circle(11, 12, -50, -120)]),
    "voids_turned": lambda m: m.outline([box(200, 400)[::-1], box(50, 60, 20, 100), circle(11, 12)[::-1]]),
}  # fmt: skip


def read(model: Model, element):
    units = read_units(model.file)
    return BodyReader(units, Placements(units.length)).pieces(element)


def agree(model: Model, element, volume_share: float = 2e-3, box_mm: float = 0.6) -> None:
    """The solids' volume and box are the kernel's (whose arcs are chords of its own)."""
    solids = [placed.in_world() for placed in read(model, element)]
    volume, bounds = kernel_volume_and_box(element)
    assert sum(solid.volume for solid in solids) == pytest.approx(volume, rel=volume_share)
    every = np.vstack([solid.vertices for solid in solids])
    np.testing.assert_allclose([every.min(axis=0), every.max(axis=0)], bounds, atol=box_mm)


@pytest.mark.parametrize("name", PROFILES)
def test_extruded_profiles(name):
    model = Model()
    agree(model, model.product("IfcBeam", name, PLACE, [model.extruded(PROFILES[name](model), 700.0)]), 0.012)


def test_mirrored_profile_is_mirrored_about_its_y_axis():
    """ISO 16739, IfcMirroredProfileDef: x becomes −x."""
    model = Model()
    parent = model.profile("IfcLShapeProfileDef", Depth=100, Width=75, Thickness=8)
    profile = model.add("IfcMirroredProfileDef", ProfileType="AREA", ParentProfile=parent)
    (placed,) = read(model, model.product("IfcBeam", "b", np.eye(4), [model.extruded(profile, 10.0)]))
    corner = placed.in_world().vertices[:, :2]
    assert [37.5, 50.0] in corner.tolist()
    assert [-37.5, 50.0] not in corner.tolist()
    assert placed.in_world().volume == pytest.approx((100 * 8 + 67 * 8) * 10)


def test_derived_profile_is_turned_scaled_and_shifted():
    model = Model(unit=INCH)
    parent = model.profile("IfcLShapeProfileDef", Depth=100, Width=75, Thickness=8)
    turn = model.add(
        "IfcCartesianTransformationOperator2D", Axis1=model.direction(0, 1), LocalOrigin=model.point(40, 0), Scale=1.5
    )
    profile = model.add("IfcDerivedProfileDef", ProfileType="AREA", ParentProfile=parent, Operator=turn)
    (placed,) = read(model, model.product("IfcBeam", "b", np.eye(4), [model.extruded(profile, 10.0)]))
    assert placed.in_world().volume == pytest.approx(1.5**2 * (100 * 8 + 67 * 8) * 10)
    low, high = placed.in_world().bounds
    np.testing.assert_allclose([low, high], [[40 - 75, -1.5 * 37.5, 0], [40 + 75, 1.5 * 37.5, 10]])


@pytest.mark.parametrize("unit", UNITS)
def test_units(unit):
    model = Model(unit=unit)
    item = model.extruded(PROFILES["i"](model), 700.0, at(5, 6, 7, axis=(1, 1, 0)))
    agree(model, model.product("IfcBeam", "b", PLACE, [item]))


@pytest.mark.parametrize("along", [(0, 0, 1), (0, 0, -1), (0.3, 0.2, 1), (0.4, -0.1, -0.7)])
def test_ways_of_extruding(along):
    model = Model()
    item = model.extruded(PROFILES["voids"](model), 25.0, at(5, 6, 7, axis=(1, 2, 2)), along)
    agree(model, model.product("IfcPlate", "p", PLACE, [item]), 1e-6, 1e-3)


@pytest.mark.parametrize("schema", ["IFC2X3", "IFC4", "IFC4X3"])
@pytest.mark.parametrize("rings", [[i_ring(400, 180, 8.6, 13.5, 21)], [box(200, 400), circle(11, 12, 30, 40)]])
def test_faceted_breps(schema, rings):
    model = Model(schema)
    agree(model, model.product("IfcBeam", "b", PLACE, [model.brep_prism(rings, 500.0)], "Brep"), 1e-6, 1e-3)


@pytest.mark.parametrize("kind", ["IfcShellBasedSurfaceModel", "IfcFaceBasedSurfaceModel"])
def test_surface_models(kind):
    model = Model()
    vertices, faces = prism_faces([box(100, 200), circle(20, 8)], 30.0)
    if kind == "IfcShellBasedSurfaceModel":
        item = model.add(kind, SbsmBoundary=[model.add("IfcClosedShell", CfsFaces=model.faces(vertices, faces))])
    else:
        item = model.add(kind, FbsmFaces=[model.add("IfcConnectedFaceSet", CfsFaces=model.faces(vertices, faces))])
    element = model.product("IfcPlate", "p", PLACE, [item], "SurfaceModel")
    (placed,) = read(model, element)
    hole = 8 / 2 * 20**2 * np.sin(np.pi / 4)
    assert placed.in_world().volume == pytest.approx((100 * 200 - hole) * 30)


@pytest.mark.parametrize("renumbered", [False, True])
def test_polygonal_face_set(renumbered):
    model = Model()
    vertices, faces = prism_faces([box(100, 200), circle(20, 8)], 30.0)
    made = []
    for loops in faces:
        numbers = [[k + 1 for k in loop] for loop in loops]
        if len(numbers) > 1:
            made.append(
                model.add("IfcIndexedPolygonalFaceWithVoids", CoordIndex=numbers[0], InnerCoordIndices=numbers[1:])
            )
        else:
            made.append(model.add("IfcIndexedPolygonalFace", CoordIndex=numbers[0]))
    order = list(range(len(vertices)))[::-1] if renumbered else list(range(len(vertices)))
    points = model.add("IfcCartesianPointList3D", CoordList=[list(map(float, vertices[k])) for k in order])
    index = [order.index(k) + 1 for k in range(len(vertices))] if renumbered else None
    item = model.add("IfcPolygonalFaceSet", Coordinates=points, Closed=True, Faces=made, PnIndex=index)
    agree(model, model.product("IfcPlate", "p", PLACE, [item], "Tessellation"), 1e-6, 1e-3)


def test_triangulated_face_set():
    model = Model(unit=INCH)
    corners = np.array([[0, 0, 0], [1, 0, 0], [1, 1, 0], [0, 1, 0], [0, 0, 1], [1, 0, 1], [1, 1, 1], [0, 1, 1]])
    quads = [(0, 3, 2, 1), (4, 5, 6, 7), (0, 1, 5, 4), (1, 2, 6, 5), (2, 3, 7, 6), (3, 0, 4, 7)]
    triangles = [t for a, b, c, d in quads for t in ([a + 1, b + 1, c + 1], [a + 1, c + 1, d + 1])]
    points = model.add("IfcCartesianPointList3D", CoordList=(corners * [4.0, 6.0, 0.5]).tolist())
    item = model.add("IfcTriangulatedFaceSet", Coordinates=points, CoordIndex=triangles)
    element = model.product("IfcPlate", "p", PLACE, [item], "Tessellation")
    agree(model, element, 1e-6, 1e-3)
    assert read(model, element)[0].in_world().volume == pytest.approx(4 * 6 * 0.5 * INCH**3)


def operator(model: Model, kind: str = "", **more):
    return model.add(
        f"IfcCartesianTransformationOperator3D{kind}",
        Axis1=model.direction(0, 1, 0), Axis2=model.direction(-1, 0, 0), Axis3=model.direction(0, 0, 1),
        LocalOrigin=model.point(100, 50, 20), **more,
    )  # fmt: skip


OPERATORS = {
    "turned": operator,
    "scaled": lambda m: operator(m, Scale=2.0),
    "unequally scaled": lambda m: operator(m, "nonUniform", Scale=2.0, Scale2=0.5, Scale3=1.5),
    "mirrored": lambda m: m.add(
        "IfcCartesianTransformationOperator3D",
        Axis1=m.direction(1, 0, 0), Axis2=m.direction(0, -1, 0), Axis3=m.direction(0, 0, 1),
        LocalOrigin=m.point(100, 50, 20),
    ),
    "mirrored in z": lambda m: m.add(
        "IfcCartesianTransformationOperator3D",
        Axis1=m.direction(1, 0, 0), Axis2=m.direction(0, 1, 0), Axis3=m.direction(0, 0, -1),
        LocalOrigin=m.point(0, 0, 0),
    ),
    "axes left out": lambda m: m.add("IfcCartesianTransformationOperator3D", LocalOrigin=m.point(1, 2, 3)),
}  # fmt: skip


@pytest.mark.parametrize("name", OPERATORS)
def test_mapped_items(name):
    model = Model(unit=10.0)
    item = model.extruded(PROFILES["l"](model), 300.0, at(5, 6, 7, axis=(1, 2, 2)))
    mapped = model.mapped([item], operator=OPERATORS[name](model))
    element = model.product("IfcBeam", "b", PLACE, [mapped], "MappedRepresentation")
    agree(model, element, 6e-3)


def test_mapped_in_mapped_is_read_once():
    model = Model()
    inner = model.mapped([model.extruded(PROFILES["rectangle"](model), 300.0)])
    outer = model.mapped([inner], "MappedRepresentation", OPERATORS["turned"](model))
    element = model.product("IfcBeam", "b", PLACE, [outer, inner], "MappedRepresentation")
    one, other = read(model, element)
    assert one.piece is other.piece
    agree(model, element, 1e-6)


def test_nested_placements():
    model = Model(unit=1000.0)
    outer = model.placement(turned(30, (0, 0, 1), (1e8, 2e8, 3e5)))
    inner = model.placement(turned(-20, (1, 0, 0), (500, 400, 300)), outer)
    element = model.product("IfcBeam", "b", np.eye(4), [model.extruded(PROFILES["rectangle"](model), 300.0)])
    element.ObjectPlacement = inner
    (placed,) = read(model, element)
    assert placed.in_world().volume == pytest.approx(120 * 20 * 300)
    np.testing.assert_allclose(placed.in_world().bounds, kernel_volume_and_box(element)[1], atol=0.02)
