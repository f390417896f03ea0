"""Units of force and moment of a structural analysis."""

from __future__ import annotations

from typing import Any, NamedTuple

from ..errors import ActionsError, ModelError
from ..reading.units import read_factor, read_units


class ForceUnits(NamedTuple):
    """The mm, N, Nmm and N/m in one of a file's units of length, force, moment and force along a line.

    `assumed` is a word on what was taken to be SI.
    """

    length: float
    newton: float
    newton_mm: float
    newton_per_m: float | None
    assumed: str


def read_force_units(file: Any, name: str) -> ForceUnits:
    """Read a file's units; ActionsError where the one of moments cannot be told."""
    try:
        length = read_units(file).length
        kinds = ("FORCEUNIT", "TORQUEUNIT", "LINEARFORCEUNIT")
        force, torque, spread = (read_factor(file, kind) for kind in kinds)
    except ModelError as error:
        raise ActionsError(f"{name}: {error}") from error
    if torque is None and (force not in (None, 1.0) or length != 1000.0):
        raise ActionsError(
            f"{name}: the unit of moments is not stated beside its other units; assign a TORQUEUNIT in the file."
        )
    missing = [word for word, factor in (("N", force), ("Nm", torque)) if factor is None]
    assumed = f" (unit not stated, {' and '.join(missing)} taken)" if missing else ""
    return ForceUnits(
        length, 1.0 if force is None else force, 1000.0 * (1.0 if torque is None else torque), spread, assumed
    )
