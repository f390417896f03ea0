"""A model's own units, turned into mm and radians once and for all."""

from __future__ import annotations

import math
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

from ..errors import ModelError

SI_PREFIXES = {
    None: 1.0, "EXA": 1e18, "PETA": 1e15, "TERA": 1e12, "GIGA": 1e9, "MEGA": 1e6, "KILO": 1e3, "HECTO": 1e2,
    "DECA": 1e1, "DECI": 1e-1, "CENTI": 1e-2, "MILLI": 1e-3, "MICRO": 1e-6, "NANO": 1e-9, "PICO": 1e-12,
    "FEMTO": 1e-15, "ATTO": 1e-18,
}  # fmt: skip


@dataclass(frozen=True, slots=True)
class Units:
    """`length` is the mm in one unit of length of the model, `angle` the radians in one unit of angle."""

    length: float
    angle: float


def read_units(file: Any) -> Units:
    """Read the project's units; without a unit of length lengths are in metres, the SI unit.

    Raises ModelError for a unit of length that is no length at all.
    """
    found: dict[str, Any] = {}
    for unit in _assigned(file):
        if unit is not None and unit.is_a("IfcNamedUnit"):
            found.setdefault(unit.UnitType, unit)
    metres = _factor(found["LENGTHUNIT"]) if "LENGTHUNIT" in found else 1.0
    if metres is None or not (math.isfinite(metres) and metres > 0):
        raise ModelError("the model's unit of length cannot be told; state it as an SI unit or with a conversion.")
    radians = _factor(found["PLANEANGLEUNIT"]) if "PLANEANGLEUNIT" in found else 1.0
    return Units(metres * 1000.0, radians or 1.0)


def read_factor(file: Any, unit_type: str) -> float | None:
    """How many SI units make one of the project's units of a type, named or derived; None if it states none.

    Raises ModelError for a unit whose size does not say.
    """
    for unit in _assigned(file):
        if unit is not None and getattr(unit, "UnitType", None) == unit_type:
            factor = _derived_factor(unit) if unit.is_a("IfcDerivedUnit") else _factor(unit)
            if factor is None or not (math.isfinite(factor) and factor > 0):
                raise ModelError(f"the {unit_type} cannot be told; state it as an SI unit or with a conversion.")
            return factor
    return None


def _derived_factor(derived: Any) -> float | None:
    factor = 1.0
    for element in derived.Elements:
        inner = _factor(element.Unit)
        if inner is None:
            return None
        # The SI's unit of mass is the kilogram, the schema's the gram.
        grams = element.Unit.is_a("IfcSIUnit") and element.Unit.Name == "GRAM"
        factor *= (inner / 1000.0 if grams else inner) ** element.Exponent
    return factor


def _assigned(file: Any) -> Iterator[Any]:
    """Yield the units of the project's own assignment first: a file may hold other assignments."""
    projects = [project.UnitsInContext for project in file.by_type("IfcProject")]
    for assignment in [each for each in projects if each is not None] or file.by_type("IfcUnitAssignment"):
        yield from assignment.Units


def _factor(unit: Any) -> float | None:
    """How many SI units (metres, radians) make one of this unit; None where it does not say."""
    if unit.is_a("IfcSIUnit"):
        return SI_PREFIXES.get(unit.Prefix, 1.0)
    measure = unit.ConversionFactor if unit.is_a("IfcConversionBasedUnit") else None
    if measure is None:
        return None
    inner = _factor(measure.UnitComponent)
    return None if inner is None else float(measure.ValueComponent.wrappedValue) * inner
