"""Results of checks, with the steps that lead to them."""

from __future__ import annotations

from typing import Literal

from .actions import FlangeSide, Forces
from .base import Frozen

Status = Literal["pass", "fail", "resistance_only", "not_applicable", "not_checkable"]


class Step(Frozen):
    """One line of a hand calculation.

    `expression` is the formula in symbols, `figures` the same with the numbers put in (empty for
    a value that was read or given), `value` its outcome in `unit`, `reference` the clause,
    published method or origin.
    """

    symbol: str
    expression: str
    figures: str = ""
    value: float
    unit: str
    reference: str


class Result(Frozen):
    """What one check says of one joint, in one direction, under one action (or none).

    `row_forces_kN` holds one figure per row of the joint, in the joint's order, all bolts of the
    row together: at the action, or at the resistance where there is none.
    """

    check: str
    case: str | None
    tension_flange: FlangeSide
    status: Status
    actions: Forces | None = None
    resistance: dict[str, float] = {}
    utilisation: float | None = None
    governing: str = ""
    row_forces_kN: tuple[float, ...] = ()
    compression_kN: float | None = None
    steps: tuple[Step, ...] = ()
    reason: str = ""
