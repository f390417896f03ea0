"""Bodies that are alike all round an axis: shanks, heads, nuts, washers, in one piece or many."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from ..model.geometry import Solid, unit
from ..model.units import Array, Mm
from .bodies import PlacedPiece

SYMMETRY = 0.06
"""How far the two spreads across the axis may differ, as a share of the larger spread."""

COAXIAL: Mm = 1.5
LONGEST_NUT: Mm = 60.0
WIDEST_NUT: Mm = 60.0
"""Length and radius that no nut or washer of steelwork exceeds; common practice, no source."""

WIDER = 1.25
"""A head or nut is at least this many times as wide as the shank."""


@dataclass(frozen=True, slots=True)
class Step:
    """A length of a turned body: from `low` to `high` along the axis, out to `radius`."""

    low: Mm
    high: Mm
    radius: Mm
    hollow: bool

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


@dataclass(frozen=True, slots=True, eq=False)
class BoltBody:
    """A bolt as measured: under its head, towards its tip, and its shank. `has_head` tells if that was seen."""

    point: Array
    direction: Array
    length: Mm
    diameter: Mm | None
    has_head: bool

    def moved(self, matrix: Array) -> BoltBody:
        """Return the bolt under a rigid transformation (4, 4)."""
        turn = matrix[:3, :3]
        return BoltBody(
            turn @ self.point + matrix[:3, 3], turn @ self.direction, self.length, self.diameter, self.has_head
        )


def as_turned(placed: PlacedPiece) -> TurnedBody | None:
    """Return a piece as a turned body in the world, or None."""
    sweep = placed.piece.sweep
    if sweep is None:
        return _from_edges(placed.in_world())
    rings = sweep.profile.rings
    middle, radius = _middle(rings[0])
    if sweep.profile.radius is None and not _is_regular(rings[0], middle, radius):
        return None
    turn, shift = placed.matrix[:3, :3], placed.matrix[:3, 3]
    local = sweep.plane[:3, :2] @ middle + sweep.plane[:3, 3]
    step = Step(0.0, sweep.length, sweep.profile.radius or radius, len(rings) > 1)
    return TurnedBody(turn @ local + shift, turn @ unit(sweep.along), (step,))


def turned_bodies(pieces: list[PlacedPiece]) -> list[TurnedBody]:
    """Return the turned bodies among pieces; a shell that holds several bodies is taken apart first."""
    found = []
    for placed in pieces:
        if placed.piece.sweep is not None:
            found.append(as_turned(placed))
        else:
            found += [_from_edges(body) for body in placed.in_world().bodies()]
    return [body for body in found if body is not None]


def is_nut_or_washer(pieces: list[PlacedPiece]) -> bool:
    """Whether a part is a loose nut or washer: rings about an axis, no larger than those of steelwork."""
    sizes = [np.ptp(placed.piece.solid.bounds, axis=0).max() for placed in pieces]
    if max(sizes) > 2 * WIDEST_NUT:
        return False
    steps = [step for body in turned_bodies(pieces) for step in body.steps]
    return bool(steps) and all(step.hollow for step in steps) and _is_small(steps)


def _is_small(steps: list[Step]) -> bool:
    low, high = _reach(steps)
    return high - low <= LONGEST_NUT and max(step.radius for step in steps) <= WIDEST_NUT


def bolts_of(bodies: list[TurnedBody]) -> list[BoltBody]:
    """Join turned bodies on one axis into bolts; what has no solid shank (loose nuts, washers) is left out."""
    found = [_bolt(group) for group in _on_one_axis(bodies)]
    return [bolt for bolt in found if bolt is not None]


def _middle(ring: Array) -> tuple[Array, Mm]:
    middle = (ring.min(axis=0) + ring.max(axis=0)) / 2 if len(ring) % 2 == 0 else ring.mean(axis=0)
    return middle, float(np.linalg.norm(ring - middle, axis=1).max())


def _is_regular(ring: Array, middle: Array, radius: Mm) -> bool:
    radii = np.linalg.norm(ring - middle, axis=1)
    return len(ring) >= 5 and float(np.ptp(radii)) < 0.05 * radius


def _from_edges(solid: Solid) -> TurnedBody | None:
    """Find the axis about which the corners lie alike, and the steps from the edges along it."""
    corners = np.unique(np.round(solid.vertices, 6), axis=0)
    middle = corners.mean(axis=0)
    spreads, directions = np.linalg.eigh(np.cov((corners - middle).T))
    low_pair = spreads[1] - spreads[0] < spreads[2] - spreads[1]
    if min(spreads[1] - spreads[0], spreads[2] - spreads[1]) > SYMMETRY * spreads[1 if low_pair else 2]:
        return None
    axis = directions[:, 2 if low_pair else 0]
    steps = _steps(solid, middle, axis)
    return TurnedBody(middle, axis, steps) if steps else None


def _steps(solid: Solid, middle: Array, axis: Array) -> tuple[Step, ...]:
    start = solid.vertices[solid.corners] - middle
    end = solid.vertices[solid.next_corner] - middle
    edge = end - start
    length = np.linalg.norm(edge, axis=1)
    lengthwise = (np.abs(edge @ axis) > 0.999 * length) & (length > 0.5)
    spans: dict[tuple[float, float], list[float]] = {}
    for a, b in zip(start[lengthwise], end[lengthwise], strict=True):
        low, high = sorted((float(a @ axis), float(b @ axis)))
        radius = float(np.linalg.norm(a - (a @ axis) * axis))
        spans.setdefault((round(low, 1), round(high, 1)), []).append(radius)
    return tuple(Step(low, high, max(radii), min(radii) < 0.8 * max(radii)) for (low, high), radii in spans.items())


def _on_one_axis(bodies: list[TurnedBody]) -> list[list[TurnedBody]]:
    """Group bodies whose axes lie in one line and which touch along it."""
    groups: list[list[TurnedBody]] = []
    for body in bodies:
        for group in groups:
            if any(_joined(body, other) for other in group):
                group.append(body)
                break
        else:
            groups.append([body])
    return groups


def _joined(a: TurnedBody, b: TurnedBody) -> bool:
    away = b.point - a.point
    along = float(away @ a.direction)
    if abs(a.direction @ b.direction) < 0.999 or np.linalg.norm(away - along * a.direction) > COAXIAL:
        return False
    low_a, high_a = _reach(_turned_to(a, a))
    low_b, high_b = _reach(_turned_to(b, a))
    slack = 8.0
    return low_b < high_a + slack and low_a < high_b + slack


def _turned_to(body: TurnedBody, reference: TurnedBody) -> list[Step]:
    """Return a body's steps measured along another's axis."""
    sense = 1.0 if body.direction @ reference.direction > 0 else -1.0
    shift = float((body.point - reference.point) @ reference.direction)
    ends = [(shift + sense * step.low, shift + sense * step.high) for step in body.steps]
    return [Step(min(pair), max(pair), step.radius, step.hollow) for pair, step in zip(ends, body.steps, strict=True)]


def _reach(steps: list[Step]) -> tuple[Mm, Mm]:
    return min(step.low for step in steps), max(step.high for step in steps)


def _bolt(group: list[TurnedBody]) -> BoltBody | None:
    reference = group[0]
    steps = [step for body in group for step in _turned_to(body, reference)]
    solid = [step for step in steps if not step.hollow]
    if not solid:
        return None
    slim = min(step.radius for step in solid)
    shank = max((step for step in solid if step.radius < 1.1 * slim), key=lambda step: step.length)
    if shank.length < 1.5 * shank.radius:
        return None
    thin = [step for step in solid if step.radius < WIDER * shank.radius]
    low, high = _reach(thin)
    wide = [step for step in steps if step.radius >= WIDER * shank.radius]
    head = _head(wide, low, high)
    if head is None:
        return _placed_bolt(reference, low, high, shank.radius, False)
    at_low = head.low + head.high < low + high
    if at_low:
        return _placed_bolt(reference, max(low, head.high), high, shank.radius, True)
    return _placed_bolt(reference, min(high, head.low), low, shank.radius, True)


def _head(wide: list[Step], low: Mm, high: Mm) -> Step | None:
    """Return the wide step that closes an end of the body: the head. Of two such, the thinner one."""
    ends = [step for step in wide if not step.hollow and (step.low < low + 0.5 or step.high > high - 0.5)]
    outside = [step for step in ends if step.high < low + 0.5 or step.low > high - 0.5]
    return min(outside or ends, key=lambda step: step.length, default=None)


def _placed_bolt(reference: TurnedBody, head: Mm, tip: Mm, radius: Mm, has_head: bool) -> BoltBody:
    sense = 1.0 if tip > head else -1.0
    point = reference.point + head * reference.direction
    return BoltBody(point, sense * reference.direction, abs(tip - head), 2 * radius, has_head)
