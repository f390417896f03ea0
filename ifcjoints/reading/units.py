"""A model's own units, turned into mm and radians once and for all."""

from __future__ import annotations

import math
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
    """Read the project's unit assignment; without one, lengths are in metres as the schema says for SI."""
    found: dict[str, float] = {}
    for assignment in file.by_type("IfcUnitAssignment"):
        for unit in assignment.Units:
            if unit.is_a("IfcNamedUnit"):
                found.setdefault(unit.UnitType, _factor(unit))
    length = found.get("LENGTHUNIT", 1.0) * 1000.0
    if not (math.isfinite(length) and length > 0):
        raise ModelError(f"the model's unit of length is {length} mm; a positive number is needed.")
    return Units(length, found.get("PLANEANGLEUNIT", 1.0))


def _factor(unit: Any) -> float:
    """How many SI units (metres, radians) make one of this unit."""
    if unit.is_a("IfcSIUnit"):
        return SI_PREFIXES.get(unit.Prefix, 1.0)
    if unit.is_a("IfcConversionBasedUnit"):
        measure = unit.ConversionFactor
        return float(measure.ValueComponent.wrappedValue) * _factor(measure.UnitComponent)
    return 1.0
