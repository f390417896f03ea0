"""Units of length and angle, against the general-purpose unit tools of ifcopenshell."""

from __future__ import annotations

import math

import ifcopenshell
import pytest
from ifcopenshell.util.unit import calculate_unit_scale

from ifcjoints.errors import ModelError
from ifcjoints.reading.units import read_units
from sample_models.making import FOOT, INCH, Model


@pytest.mark.parametrize("schema", ["IFC2X3", "IFC4", "IFC4X3"])
@pytest.mark.parametrize("unit", [1.0, 10.0, 1000.0, INCH, FOOT])
def test_lengths(schema, unit):
    file = Model(schema, unit).file
    assert read_units(file).length == pytest.approx(unit)
    assert read_units(file).length == pytest.approx(calculate_unit_scale(file) * 1000.0)


def test_degrees():
    model = Model()
    radian = model.add("IfcSIUnit", UnitType="PLANEANGLEUNIT", Name="RADIAN")
    value = model.file.create_entity("IfcPlaneAngleMeasure", math.pi / 180)
    factor = model.add("IfcMeasureWithUnit", ValueComponent=value, UnitComponent=radian)
    dimensions = model.file.create_entity("IfcDimensionalExponents", 0, 0, 0, 0, 0, 0, 0)
    degree = model.add(
        "IfcConversionBasedUnit",
        Dimensions=dimensions, UnitType="PLANEANGLEUNIT", Name="DEGREE", ConversionFactor=factor,
    )  # fmt: skip
    assignment = model.project.UnitsInContext
    assignment.Units = [unit for unit in assignment.Units if unit.UnitType == "LENGTHUNIT"] + [degree]
    assert math.degrees(read_units(model.file).angle) == pytest.approx(1.0)


def test_a_conversion_of_millimetres():
    """An inch told as 25.4 mm, not as 0.0254 m."""
    model = Model(unit=INCH)
    (length, _) = model.project.UnitsInContext.Units
    length.ConversionFactor.UnitComponent.Prefix = "MILLI"
    length.ConversionFactor.ValueComponent.wrappedValue = 25.4
    assert read_units(model.file).length == pytest.approx(25.4)


def test_the_project_decides_among_assignments():
    model = Model(unit=10.0)
    other = ifcopenshell.file(schema="IFC4")
    metre = other.create_entity("IfcSIUnit", UnitType="LENGTHUNIT", Name="METRE")
    other.create_entity("IfcUnitAssignment", Units=[metre])
    other.add(model.project)
    assert read_units(other).length == pytest.approx(10.0)


def test_no_units_are_metres():
    assert read_units(ifcopenshell.file(schema="IFC4")).length == 1000.0


@pytest.mark.parametrize("value", [0.0, -1.0])
def test_no_length_at_all(value):
    model = Model(unit=INCH)
    (length, _) = model.project.UnitsInContext.Units
    length.ConversionFactor.ValueComponent.wrappedValue = value
    with pytest.raises(ModelError, match="unit of length"):
        read_units(model.file)


def test_a_unit_that_only_has_a_name():
    model = Model()
    dimensions = model.file.create_entity("IfcDimensionalExponents", 1, 0, 0, 0, 0, 0, 0)
    span = model.add("IfcContextDependentUnit", Dimensions=dimensions, UnitType="LENGTHUNIT", Name="span")
    model.project.UnitsInContext.Units = [span]
    with pytest.raises(ModelError, match="unit of length"):
        read_units(model.file)
