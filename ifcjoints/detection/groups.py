"""Bolts that hold the same parts together, side by side, are one group."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from itertools import combinations, pairwise

import numpy as np

from ..model.geometry import unit
from ..model.parts import Bolt
from ..model.units import Array, Mm
from .plies import Ply


@dataclass(frozen=True, slots=True, eq=False)
class BoltGroup:
    """Bolts with parallel axes through the same parts. `parts` in order along `direction`."""

    bolts: tuple[int, ...]
    parts: tuple[int, ...]
    direction: Array
    points: Array
    grip: Mm


def group_bolts(bolts: Sequence[Bolt], plies: Sequence[list[Ply]], tolerance_deg: float) -> list[BoltGroup]:
    """Group the bolts that pass through two parts or more; two bolts that share a pair of parts belong together."""
    parent = {number: number for number, through in enumerate(plies) if _distinct(through)}

    def root(number: int) -> int:
        while parent[number] != number:
            parent[number] = parent[parent[number]]
            number = parent[number]
        return number

    held: dict[tuple[int, int], list[int]] = {}
    for number in parent:
        for pair in combinations(sorted({ply.part for ply in plies[number]}), 2):
            held.setdefault(pair, []).append(number)
    parallel = np.cos(np.radians(tolerance_deg))
    for together in held.values():
        for one, other in pairwise(sorted(together, key=lambda number: _heading(bolts[number]))):
            if abs(_direction(bolts[one]) @ _direction(bolts[other])) > parallel:
                parent[root(other)] = root(one)
    members: dict[int, list[int]] = {}
    for number in parent:
        members.setdefault(root(number), []).append(number)
    return [_group(numbers, bolts, plies) for numbers in members.values()]


def _distinct(through: list[Ply]) -> bool:
    return len({ply.part for ply in through}) >= 2


def _direction(bolt: Bolt) -> Array:
    assert bolt.direction is not None
    return bolt.direction


def _heading(bolt: Bolt) -> tuple[float, ...]:
    """Return the line a bolt lies along, whichever way it points, so that parallel bolts sort side by side."""
    line = np.round(_direction(bolt), 2) + 0.0
    return tuple(line * (1.0 if tuple(line) > (0.0, 0.0, 0.0) else -1.0))


def _group(numbers: list[int], bolts: Sequence[Bolt], plies: Sequence[list[Ply]]) -> BoltGroup:
    first = _direction(bolts[numbers[0]])
    directions = np.array([_direction(bolts[number]) for number in numbers])
    senses = np.where(directions @ first > 0, 1.0, -1.0)
    direction = unit((directions * senses[:, None]).sum(axis=0))
    points = np.array([bolts[number].point for number in numbers])
    places: dict[int, list[float]] = {}
    grips = []
    for number, point, sense in zip(numbers, points, senses, strict=True):
        through = plies[number]
        grips.append(max(ply.high for ply in through) - min(ply.low for ply in through))
        for ply in through:
            middle = float(point @ direction) + sense * (ply.low + ply.high) / 2
            places.setdefault(ply.part, []).append(middle)
    order = sorted(places, key=lambda part: float(np.mean(places[part])))
    return BoltGroup(tuple(numbers), tuple(order), direction, points, float(np.median(grips)))
