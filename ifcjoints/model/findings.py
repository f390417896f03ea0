"""Findings: something about a joint or the model that an engineer should look at."""

from __future__ import annotations

from typing import Literal

from .base import Frozen
from .units import Vector

Severity = Literal["error", "warning", "note"]


class Finding(Frozen):
    """One remark on a joint: what, how bad, where, and what it was measured against."""

    code: str
    severity: Severity
    message: str
    elements: tuple[str, ...] = ()
    point_mm: Vector | None = None
    value: float | None = None
    limit: float | None = None
    reference: str | None = None


class Problem(Frozen):
    """Something wrong with the model itself; `element` is a GlobalId or "#id"."""

    element: str | None
    message: str
