"""Bolt rows in the interface plane, relative to the flanges' centre lines."""

from __future__ import annotations

import numpy as np

from ..model.geometry import Frame
from ..model.joints import Row, RowPosition
from ..model.units import Array, Mm


def bolts_in_plane(points: Array, direction: Array, frame: Frame) -> Array:
    """Return where the bolts' axes meet the interface plane: x and y in its frame (k, 2)."""
    local = frame.to_local(points)
    run = frame.axes @ direction
    flat: Array = local[:, :2] - local[:, 2:] / run[2] * run[:2]
    return flat


def find_rows(places: Array, flange_distance: Mm, tolerance: Mm) -> list[Row]:
    """Gather bolts (k, 2) with y from the bottom flange's centre line into rows, top to bottom."""
    rows = []
    for group in _levels(places, tolerance):
        y = float(group[:, 1].mean())
        across = tuple(round(float(x), 4) for x in np.sort(group[:, 0]))
        rows.append(
            Row(
                y_bottom_mm=round(y, 4),
                y_top_mm=round(flange_distance - y, 4),
                count=len(group),
                gauge_mm=_gauge(across),
                position=_position(y, flange_distance),
                x_mm=across,
            )
        )
    return rows


def _levels(places: Array, tolerance: Mm) -> list[Array]:
    ordered = places[np.argsort(-places[:, 1])]
    cuts = np.flatnonzero(-np.diff(ordered[:, 1]) > tolerance) + 1
    return np.split(ordered, cuts)


def _gauge(across: tuple[Mm, ...]) -> Mm | None:
    left, right = [x for x in across if x < 0], [x for x in across if x >= 0]
    return round(min(right) - max(left), 4) if left and right else None


def _position(y: Mm, flange_distance: Mm) -> RowPosition:
    if y > flange_distance:
        return "outside_top"
    return "outside_bottom" if y < 0 else "between"
