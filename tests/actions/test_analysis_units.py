"""Units of force and moment, against the general-purpose unit tools of ifcopenshell and definitions of the units."""

from __future__ import annotations

import pytest
from ifcopenshell.util.unit import calculate_unit_scale

from ifcjoints.actions.analysis import read_analysis
from ifcjoints.errors import ModelError
from ifcjoints.reading.units import read_factor
from tests.actions.made_analysis import Analysis

POUND_FORCE, FOOT = 0.45359237 * 9.80665, 0.3048
"""The international pound, the standard acceleration of gravity and the international foot: exact by definition."""


def converted(analysis: Analysis, kind: str, name: str, factor: float, base: str):
    unit = analysis.add("IfcSIUnit", UnitType=kind, Name=base)
    value = analysis.file.create_entity("IfcReal", factor)
    measure = analysis.add("IfcMeasureWithUnit", ValueComponent=value, UnitComponent=unit)
    dimensions = analysis.file.create_entity("IfcDimensionalExponents", 1, 1, -2, 0, 0, 0, 0)
    return analysis.add(
        "IfcConversionBasedUnit", Dimensions=dimensions, UnitType=kind, Name=name, ConversionFactor=measure
    )


def derived(analysis: Analysis, *parts):
    elements = [analysis.add("IfcDerivedUnitElement", Unit=unit, Exponent=power) for unit, power in parts]
    return analysis.add("IfcDerivedUnit", Elements=elements, UnitType="TORQUEUNIT")


def assign(analysis: Analysis, *units) -> None:
    kept = [
        unit
        for unit in analysis.project.UnitsInContext.Units
        if unit.UnitType not in ("FORCEUNIT", "TORQUEUNIT")
    ]  # fmt: skip
    analysis.project.UnitsInContext.Units = [*kept, *units]


def kip_feet(analysis: Analysis):
    kip = converted(analysis, "FORCEUNIT", "KIP", 1000 * POUND_FORCE, "NEWTON")
    foot = converted(analysis, "LENGTHUNIT", "FOOT", FOOT, "METRE")
    return kip, derived(analysis, (kip, 1), (foot, 1))


def newton_millimetres(analysis: Analysis):
    newton = analysis.add("IfcSIUnit", UnitType="FORCEUNIT", Name="NEWTON")
    millimetre = analysis.add("IfcSIUnit", UnitType="LENGTHUNIT", Prefix="MILLI", Name="METRE")
    return newton, derived(analysis, (newton, 1), (millimetre, 1))


@pytest.mark.parametrize(
    ("units", "force", "moment"),
    [(kip_feet, 1000 * POUND_FORCE, 1000 * POUND_FORCE * FOOT * 1000), (newton_millimetres, 1.0, 1.0)],
)
def test_forces_arrive_in_n_and_moments_in_nmm(units, force, moment):
    analysis = Analysis()
    assign(analysis, *units(analysis))
    start, end = (0, 0, 0), (5000, 0, 0)
    analysis.results("ULS", analysis.at_point(analysis.member(start, end), start, (0, 0, 2.0, 0, -3.0, 0)))
    (read,) = read_analysis(analysis.file)
    assert read.force[2] == pytest.approx(2.0 * force)
    assert read.moment[1] == pytest.approx(-3.0 * moment)
    for kind in ("FORCEUNIT", "TORQUEUNIT"):
        assert read_factor(analysis.file, kind) == pytest.approx(calculate_unit_scale(analysis.file, kind))


def test_a_moment_from_kilograms_metres_and_seconds():
    """1 kg m² / s² is 1 Nm."""
    analysis = Analysis()
    kilogram = analysis.add("IfcSIUnit", UnitType="MASSUNIT", Prefix="KILO", Name="GRAM")
    metre = analysis.add("IfcSIUnit", UnitType="LENGTHUNIT", Name="METRE")
    second = analysis.add("IfcSIUnit", UnitType="TIMEUNIT", Name="SECOND")
    assign(analysis, derived(analysis, (kilogram, 1), (metre, 2), (second, -2)))
    assert read_factor(analysis.file, "TORQUEUNIT") == pytest.approx(1.0)
    assert read_factor(analysis.file, "FORCEUNIT") is None


def test_a_unit_without_a_size_is_refused():
    analysis = Analysis()
    dimensions = analysis.file.create_entity("IfcDimensionalExponents", 1, 1, -2, 0, 0, 0, 0)
    assign(analysis, analysis.add("IfcContextDependentUnit", Dimensions=dimensions, UnitType="FORCEUNIT", Name="ton"))
    with pytest.raises(ModelError, match="FORCEUNIT cannot be told"):
        read_factor(analysis.file, "FORCEUNIT")
