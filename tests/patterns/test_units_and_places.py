"""The same joint in every unit, schema, dialect and place."""

from __future__ import annotations

import numpy as np
import pytest

from sample_models.making import FOOT, INCH, Model, at, turned

from .scenes import EndPlate, joints_of, rows_of


def check(model: Model, scene: EndPlate) -> None:
    (joint,) = joints_of(model)
    assert joint.moment_joint, joint.why
    assert joint.configuration == "beam_to_column_flange"
    assert rows_of(joint) == pytest.approx(sorted(scene.rows, reverse=True), abs=0.1)
    assert joint.interface.flange_distance_mm == pytest.approx(scene.flange_distance, abs=0.1)
    assert [row.gauge_mm for row in joint.rows] == pytest.approx([scene.gauge] * len(scene.rows), abs=0.1)
    assert joint.plates[0].thickness_mm == pytest.approx(scene.plate[2], abs=0.01)
    section = joint.supported.section
    figures = [section.h_mm, section.b_mm, section.tw_mm, section.tf_mm, section.r_mm]
    assert figures == pytest.approx(list(scene.beam), abs=0.2)


@pytest.mark.parametrize("dialect", ["swept", "outline", "brep"])
@pytest.mark.parametrize("schema", ["IFC2X3", "IFC4", "IFC4X3"])
@pytest.mark.parametrize("unit", [1.0, 10.0, 1000.0, INCH, FOOT])
def test_units(schema, unit, dialect):
    model, scene = Model(schema, unit), EndPlate(dialect=dialect)
    scene.build(model)
    check(model, scene)


@pytest.mark.parametrize("dialect", ["swept", "outline", "brep"])
@pytest.mark.parametrize("slope", [-12.0, 5.0, 30.0])
def test_slopes(slope, dialect):
    model, scene = Model(), EndPlate(dialect=dialect, slope=slope, plate=(200, 640, 20))
    scene.build(model)
    check(model, scene)


@pytest.mark.parametrize("dialect", ["swept", "brep"])
@pytest.mark.parametrize(
    "world",
    [turned(33.0), turned(-120.0, (0, 0, 1), (4e8, -2e8, 1e5)), at(4e8, 3e8, 0) @ turned(61.0)],
    ids=["turned", "turned and far", "400 km away"],
)
@pytest.mark.parametrize("unit", [1.0, 1000.0])
def test_places(world, dialect, unit):
    model, scene = Model(unit=unit, world=world), EndPlate(dialect=dialect)
    scene.build(model)
    check(model, scene)


def test_map_conversion_disturbs_nothing():
    model, scene = Model(), EndPlate()
    scene.build(model)
    system = model.add("IfcProjectedCRS", Name="EPSG:25832")
    model.add(
        "IfcMapConversion", SourceCRS=model.context, TargetCRS=system, Eastings=4e5, Northings=5.6e6,
        OrthogonalHeight=120.0, XAxisAbscissa=0.8, XAxisOrdinate=0.6, Scale=0.001,
    )  # fmt: skip
    check(model, scene)


@pytest.mark.parametrize("dialect", ["swept", "brep"])
def test_nested_placements(dialect):
    model, scene = Model(unit=1000.0), EndPlate(dialect=dialect)
    made = scene.build(model)
    outer = model.placement(turned(25.0, (0, 0, 1), (7e6, -3e6, 200.0)))
    inner = model.placement(at(1000.0, 2000.0, 0.0), outer)
    for element in (made["column"], made["plate"], made["beam"], *made["bolts"]):
        element.ObjectPlacement.PlacementRelTo = inner
    check(model, scene)


def test_mirrored_place():
    """Everything mapped by an operator that mirrors: left becomes right, rows stay."""
    model, scene = Model(), EndPlate()
    made = scene.build(model)
    mirror = model.add(
        "IfcCartesianTransformationOperator3D",
        Axis1=model.direction(1, 0, 0), Axis2=model.direction(0, -1, 0), Axis3=model.direction(0, 0, 1),
        LocalOrigin=model.point(0, 0, 0),
    )  # fmt: skip
    for element in (made["column"], made["plate"], made["beam"]):
        shape = element.Representation.Representations[0]
        element.Representation.Representations = [
            model.representation([model.mapped(shape.Items, operator=mirror)], "MappedRepresentation")
        ]
    check(model, scene)


def test_scaled_operator():
    """A shape library drawn at half its size, mapped at twice."""
    model, scene = Model(), EndPlate(dialect="brep")
    made = scene.build(model)
    twice = model.add("IfcCartesianTransformationOperator3D", LocalOrigin=model.point(0, 0, 0), Scale=2.0)
    shape = made["plate"].Representation.Representations[0]
    for point in {corner for corner in model.file.traverse(shape) if corner.is_a("IfcCartesianPoint")}:
        point.Coordinates = [value / 2 for value in point.Coordinates]
    made["plate"].Representation.Representations = [
        model.representation([model.mapped(shape.Items, "Brep", twice)], "MappedRepresentation")
    ]
    check(model, scene)


def test_rows_do_not_hang_on_the_place():
    """Turning the whole model about the vertical changes no figure."""
    figures = []
    for degrees in (0.0, 17.0, 90.0, 211.0):
        model = Model(world=turned(degrees, (0, 0, 1), (1000.0 * degrees, 0, 0)))
        EndPlate(slope=7.0, plate=(200, 640, 20)).build(model)
        figures.append(rows_of(joints_of(model)[0]))
    np.testing.assert_allclose(figures, [figures[0]] * 4, atol=1e-3)
