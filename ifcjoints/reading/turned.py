"""Bodies that are alike all round an axis, as steps along it: shanks, heads, nuts, washers, drilled holes.

A body is sliced between the levels of its corners. Where every slice is a ring about one axis (a circle, a regular
polygon, or one with a bore), it is a turned body, however its faces were written: extruded, revolved, triangulated.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from itertools import pairwise

import numpy as np
import shapely

from ..model.geometry import Frame, Solid, unit
from ..model.units import Array, Mm
from .bodies import PlacedPiece

LEVEL: Mm = 0.05
"""Corners nearer than this along the axis lie on one level."""

ROUND = 0.69
"""The least ratio of the distances to the sides and to the corners: a square's is 0.707, a hexagon's 0.866."""

SAME = 0.01
"""Steps whose radii differ by less than this share are one."""


@dataclass(frozen=True, slots=True)
class Step:
    """A length of a turned body: from `low` to `high` along the axis, `radius` to its corners, `flat` to its sides.

    A step that `tapers` has its radii half-way along.
    """

    low: Mm
    high: Mm
    radius: Mm
    flat: Mm
    hollow: bool
    tapers: bool = False

    @property
    def length(self) -> Mm:
        """The step's length along the axis."""
        return self.high - self.low


@dataclass(frozen=True, slots=True, eq=False)
class TurnedBody:
    """A body about an axis through `point` along `direction`, as steps measured from the point."""

    point: Array
    direction: Array
    steps: tuple[Step, ...]


def as_turned(placed: PlacedPiece) -> TurnedBody | None:
    """Return a piece as a turned body in the world, or None."""
    sweep = placed.piece.sweep
    upright = sweep is not None and abs(unit(sweep.along) @ sweep.plane[:3, 2]) > 1 - 1e-9
    if sweep is None or sweep.profile.radius is None or not upright:
        return turned_of(placed.in_world())
    rings = sweep.profile.rings
    middle = (rings[0].min(axis=0) + rings[0].max(axis=0)) / 2
    turn, shift = placed.matrix[:3, :3], placed.matrix[:3, 3]
    local = sweep.plane[:3, :2] @ middle + sweep.plane[:3, 3]
    radius = sweep.profile.radius
    step = Step(0.0, sweep.length, radius, radius, len(rings) > 1)
    return TurnedBody(turn @ local + shift, turn @ unit(sweep.along), (step,))


def turned_bodies(pieces: list[PlacedPiece]) -> list[TurnedBody]:
    """Return the turned bodies among pieces; a shell that holds several bodies is taken apart first."""
    found = []
    for placed in pieces:
        if placed.piece.sweep is not None:
            found.append(as_turned(placed))
        else:
            found += [turned_of(body) for body in placed.in_world().bodies()]
    return [body for body in found if body is not None]


def turned_of(solid: Solid) -> TurnedBody | None:
    """Return a solid as a turned body, or None."""
    tried = (_about(solid, axis) for axis in _axes(solid))
    return next((body for body in tried if body is not None), None)


def _axes(solid: Solid) -> Iterator[Array]:
    """Guess the axis: the odd one out of the main directions of the faces, then of the corners.

    The faces' directions do not depend on how faces are split; a body as long as twice its width has three
    alike, and its corners tell then.
    """
    yield _odd_one_out((solid.normals * solid.areas[:, None]).T @ solid.normals)
    yield _odd_one_out(np.cov(solid.vertices.T))


def _odd_one_out(tensor: Array) -> Array:
    spreads, directions = np.linalg.eigh(tensor)
    odd: Array = directions[:, 2 if spreads[1] - spreads[0] < spreads[2] - spreads[1] else 0]
    return odd


def _about(solid: Solid, guess: Array) -> TurnedBody | None:
    """Slice a solid along a guessed axis; None where a slice is no ring about it."""
    frame = Frame.from_z(solid.vertices[0], _square_to_caps(solid, guess))
    local = frame.to_local(solid.vertices)
    circle = shapely.minimum_bounding_circle(shapely.MultiPoint(local[:, :2])).centroid
    origin = frame.to_world(np.array([circle.x, circle.y, 0.0]))
    away = np.hypot(local[:, 0] - circle.x, local[:, 1] - circle.y)
    steps: list[Step] = []
    for low, high in pairwise(_levels(local[:, 2])):
        middle = Frame(origin + frame.axes[2] * (low + high) / 2, frame.axes)
        step = _slice(solid.cut(middle), low, high)
        if step is None:
            return None
        step = replace(step, tapers=not _at(away[np.abs(local[:, 2] - low) <= LEVEL], step.radius))
        steps = [*steps[:-1], *_merged(steps[-1], step)] if steps else [step]
    return TurnedBody(origin, frame.axes[2], tuple(steps)) if steps else None


def _at(radii: Array, radius: Mm) -> bool:
    """Whether the corners at a step's end lie as far out as its middle."""
    return bool((np.abs(radii - radius) < 0.1 * SAME * radius).any())


def _square_to_caps(solid: Solid, guess: Array) -> Array:
    """Return the direction square to the faces that close the body, which are exact where the guess is not."""
    along = solid.normals @ guess
    caps = np.abs(along) > 0.98
    if not caps.any():
        return guess
    return unit((solid.normals[caps] * (solid.areas[caps] * np.sign(along[caps]))[:, None]).sum(axis=0))


def _levels(heights: Array) -> list[float]:
    ordered = np.unique(heights)
    first = np.concatenate([[True], np.diff(ordered) > LEVEL])
    levels: list[float] = ordered[first].tolist()
    levels[-1] = float(ordered[-1])
    return levels


def _slice(segments: Array, low: Mm, high: Mm) -> Step | None:
    """Measure the ring that a slice's segments (k, 2, 2) make about the origin; None where they make no ring."""
    if len(segments) < 3:
        return None
    a, b = segments[:, 0], segments[:, 1]
    radius = float(np.linalg.norm(segments, axis=2).max())
    middles = np.linalg.norm(a + b, axis=1) / 2
    outer = middles > ROUND * radius
    run = b - a
    away = np.abs(run[:, 0] * a[:, 1] - run[:, 1] * a[:, 0]) / np.maximum(np.linalg.norm(run, axis=1), 1e-9)
    around = np.abs(
        np.arctan2(a[outer, 0] * b[outer, 1] - a[outer, 1] * b[outer, 0], (a[outer] * b[outer]).sum(axis=1))
    )
    if around.sum() < 0.99 * 2 * np.pi:
        return None
    flat = float(away[outer].min())
    hollow = bool((~outer).any() or around.sum() > 3 * np.pi)
    return Step(low, high, radius, flat, hollow) if flat > ROUND * radius else None


def _merged(before: Step, step: Step) -> list[Step]:
    same_kind = (before.hollow, before.tapers) == (step.hollow, step.tapers)
    if not same_kind or abs(before.radius - step.radius) > SAME * step.radius:
        return [before, step]
    radius, flat = max(before.radius, step.radius), min(before.flat, step.flat)
    return [replace(step, low=before.low, radius=radius, flat=flat)]
