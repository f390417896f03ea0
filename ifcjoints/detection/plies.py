"""Which parts does each bolt pass through? The bolt's axis picks its plies."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
import shapely

from ..model.parts import Bolt, Part
from ..model.units import Array, Mm

MARGIN: Mm = 2.0
LENGTH_UNKNOWN = 10.0
"""How many diameters of a bolt's axis are followed where its length is not known."""

THROUGH = 0.5
"""The least share of a part's thickness that a bolt must reach through for it to be a ply."""


@dataclass(frozen=True, slots=True)
class Ply:
    """A part that a bolt passes through, from `low` to `high` along the bolt from under its head."""

    part: int
    low: Mm
    high: Mm


class PartIndex:
    """Finds the parts near a place: a tree over the parts' boxes in plan, then their heights."""

    def __init__(self, parts: Sequence[Part]) -> None:
        bounds = [part.bounds for part in parts]
        self.low = np.array([low for low, _ in bounds]).reshape(-1, 3)
        self.high = np.array([high for _, high in bounds]).reshape(-1, 3)
        self._tree = shapely.STRtree(shapely.box(*self.low[:, :2].T, *self.high[:, :2].T))

    def near(self, low: Array, high: Array) -> tuple[Array, Array]:
        """Return pairs (number of the asked box, number of the part) whose boxes (k, 3) meet."""
        asked, found = self._tree.query(shapely.box(*low[:, :2].T, *high[:, :2].T))
        meet = (low[asked, 2] <= self.high[found, 2]) & (high[asked, 2] >= self.low[found, 2])
        return asked[meet], found[meet]

    def around(self, low: Array, high: Array) -> list[int]:
        """Return the parts whose boxes meet one box (3,)."""
        return sorted(self.near(low[None], high[None])[1].tolist())


def find_plies(bolts: Sequence[Bolt], parts: Sequence[Part], index: PartIndex) -> list[list[Ply]]:
    """Return every bolt's plies in order from its head; bolts without an axis have none."""
    plies: list[list[Ply]] = [[] for _ in bolts]
    placed = [number for number, bolt in enumerate(bolts) if bolt.point is not None]
    if not placed or not len(parts):
        return plies
    points = np.array([bolts[number].point for number in placed])
    directions = np.array([bolts[number].direction for number in placed])
    lengths = np.array([reach(bolts[number]) for number in placed])
    ends = points + directions * lengths[:, None]
    asked, found = index.near(np.minimum(points, ends) - MARGIN, np.maximum(points, ends) + MARGIN)
    for part, which in _by_part(asked, found):
        for same in _parallel(which, directions):
            for solid in parts[part].solids:
                crossings = solid.pierced_at(points[same], directions[same[0]])
                for bolt, along in zip(same, crossings, strict=True):
                    plies[placed[bolt]] += _passed(part, along, lengths[bolt])
    return [sorted(each, key=lambda ply: ply.low) for each in plies]


def reach(bolt: Bolt) -> Mm:
    """Return how far along its axis a bolt is followed."""
    return bolt.length if bolt.length is not None else LENGTH_UNKNOWN * (bolt.diameter or 20.0)


def _by_part(asked: Array, found: Array) -> list[tuple[int, Array]]:
    order = np.argsort(found, kind="stable")
    asked, found = asked[order], found[order]
    cuts = np.flatnonzero(np.diff(found)) + 1
    return [
        (int(part[0]), group)
        for part, group in zip(np.split(found, cuts), np.split(asked, cuts), strict=True)
        if len(part)
    ]


def _parallel(which: Array, directions: Array) -> list[Array]:
    """Split bolts into groups that point the same way."""
    groups = []
    left = which
    while len(left):
        same = directions[left] @ directions[left[0]] > 1 - 1e-12
        groups.append(left[same])
        left = left[~same]
    return groups


def _passed(part: int, along: Array, length: Mm) -> list[Ply]:
    if len(along) % 2:
        along = along[:-1]
    spans = along.reshape(-1, 2)
    return [
        Ply(part, float(low), float(high))
        for low, high in spans
        if min(high, length) - max(low, 0.0) >= THROUGH * (high - low) > 0.0
    ]
