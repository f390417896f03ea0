"""Bolts as measured: turned bodies on one axis are shank, head, nut and washers, in one piece or many."""

from __future__ import annotations

import re
from collections.abc import Iterable
from dataclasses import dataclass, replace
from itertools import chain

import numpy as np

from ..model.units import Array, Mm
from .bodies import PlacedPiece
from .turned import Step, TurnedBody, turned_bodies

COAXIAL: Mm = 1.5
ALONG: Mm = 8.0
"""Bodies whose axes lie this near to one line, with no more than this between them along it, are one bolt's."""

LONGEST_NUT: Mm = 60.0
WIDEST_NUT: Mm = 60.0
"""Length and radius that no nut or washer of steelwork exceeds; common practice, no source."""

WIDER = 1.25
"""A head or nut is at least this many times as wide as the shank; a thread's core is less than this narrower."""

ROD = 0.4
"""A shank is longer than this share of its radius; chamfers are shorter."""

STUBBY = 1.5
"""A bolt is at least this many of its radii long."""

ROUND_SHANK = 0.8
"""The least ratio of a shank's distances to its sides and corners: a pentagon's is 0.809."""

FLUSH = 0.15
"""A shank ends with its head; past a nut it goes on by more than this share of its diameter (one pitch at least)."""

TOUCH: Mm = 0.5


@dataclass(frozen=True, slots=True, eq=False)
class BoltBody:
    """A bolt as measured: under its head, towards its tip, and its shank. `has_head` tells if that was seen.

    A faceted shank has a greatest `diameter`, over its corners, and a least one over its `flats`.
    """

    point: Array
    direction: Array
    length: Mm
    diameter: Mm | None
    flats: Mm | None
    has_head: bool

    def moved(self, matrix: Array) -> BoltBody:
        """Return the bolt under a rigid transformation (4, 4)."""
        turn = matrix[:3, :3]
        point, direction = turn @ self.point + matrix[:3, 3], turn @ self.direction
        return BoltBody(point, direction, self.length, self.diameter, self.flats, self.has_head)


def is_nut_or_washer(pieces: list[PlacedPiece], name: str) -> bool:
    """Whether a part is a loose nut or washer: rings about an axis, no larger than those of steelwork.

    One drawn without its bore is told by its six sides, or by its name.
    """
    sizes = [np.ptp(placed.piece.solid.bounds, axis=0).max() for placed in pieces]
    if max(sizes) > 2 * WIDEST_NUT:
        return False
    bodies = turned_bodies(pieces)
    steps = [step for body in bodies for step in body.steps]
    named = re.search(r"\b(nut|washer)s?\b", name, re.IGNORECASE) is not None
    rings = len(bodies) >= len(pieces) and all(step.hollow or named or _has_six_sides(step) for step in steps)
    return rings and all(_is_small(body.steps) for body in bodies)


def are_loose_parts(bodies: list[TurnedBody]) -> bool:
    """Whether there is nothing but nuts and washers: small bodies, of which none is a shank."""
    return bool(bodies) and not bolts_of(bodies) and all(_is_small(body.steps) for body in bodies)


def bolts_of(bodies: list[TurnedBody]) -> list[BoltBody]:
    """Join turned bodies on one axis into bolts; what has no solid shank (loose nuts, washers) is left out."""
    found = [_bolt(group) for group in _on_one_axis(bodies)]
    return [bolt for bolt in found if bolt is not None]


def _has_six_sides(step: Step) -> bool:
    return bool(abs(step.flat - 0.75**0.5 * step.radius) < 0.005 * step.radius)


def _is_small(steps: Iterable[Step]) -> bool:
    low, high = _reach(steps)
    return high - low <= LONGEST_NUT and max(step.radius for step in steps) <= WIDEST_NUT


def _on_one_axis(bodies: list[TurnedBody]) -> list[list[TurnedBody]]:
    """Group bodies whose axes lie in one line and which touch along it."""
    groups: list[list[TurnedBody]] = []
    for body in bodies:
        joined = [group for group in groups if any(_joined(body, other) for other in group)]
        groups = [group for group in groups if not any(group is each for each in joined)]
        groups.append([*chain(*joined), body])
    return groups


def _joined(a: TurnedBody, b: TurnedBody) -> bool:
    away = b.point - a.point
    along = float(away @ a.direction)
    if abs(a.direction @ b.direction) < 0.999 or np.linalg.norm(away - along * a.direction) > COAXIAL:
        return False
    low_a, high_a = _reach(a.steps)
    low_b, high_b = _reach(_turned_to(b, a))
    return low_b < high_a + ALONG and low_a < high_b + ALONG


def _turned_to(body: TurnedBody, reference: TurnedBody) -> list[Step]:
    """Return a body's steps measured along another's axis."""
    sense = 1.0 if body.direction @ reference.direction > 0 else -1.0
    shift = float((body.point - reference.point) @ reference.direction)
    ends = [sorted((shift + sense * step.low, shift + sense * step.high)) for step in body.steps]
    return [replace(step, low=low, high=high) for (low, high), step in zip(ends, body.steps, strict=True)]


def _reach(steps: Iterable[Step]) -> tuple[Mm, Mm]:
    steps = list(steps)
    return min(step.low for step in steps), max(step.high for step in steps)


def _bolt(group: list[TurnedBody]) -> BoltBody | None:
    reference = group[0]
    steps = [step for body in group for step in _turned_to(body, reference)]
    shank = _shank([step for step in steps if not step.hollow])
    if shank is None:
        return None
    low, high = _rod([step for step in steps if not step.hollow and step.radius < WIDER * shank.radius])
    if high - low < STUBBY * shank.radius:
        return None
    wide = [step for step in steps if step.radius >= WIDER * shank.radius]
    head = _head([step for step in wide if not step.hollow], low, high, FLUSH * 2 * shank.radius)
    if head:
        under, tip = _under_head(head, low, high)
    else:
        under, tip = _away_from_nut([step for step in wide if step.hollow], low, high, ROD * 2 * shank.radius)
    sense = 1.0 if tip > under else -1.0
    point = reference.point + under * reference.direction
    diameter, flats = 2 * shank.radius, 2 * shank.flat
    return BoltBody(point, sense * reference.direction, abs(tip - under), diameter, flats, bool(head))


def _shank(solid: list[Step]) -> Step | None:
    """Return the shank: of the slimmest steps the widest, since a thread may be drawn to its core."""
    rods = [step for step in solid if not step.tapers and step.length >= ROD * step.radius]
    rods = [step for step in rods if step.flat >= ROUND_SHANK * step.radius]
    if not rods:
        return None
    slim = min(step.radius for step in rods)
    return max((step for step in rods if step.radius < WIDER * slim), key=lambda step: (step.radius, step.length))


def _rod(slim: list[Step]) -> tuple[Mm, Mm]:
    """Return both ends of the shank and the thread, with the chamfers that follow on them."""
    low, high = _reach(step for step in slim if not step.tapers)
    chamfers = sorted((step for step in slim if step.tapers), key=lambda step: step.low)
    for step in chamfers:
        high = step.high if abs(step.low - high) < TOUCH else high
    for step in reversed(chamfers):
        low = step.low if abs(step.high - low) < TOUCH else low
    return low, high


def _head(wide: list[Step], low: Mm, high: Mm, flush: Mm) -> list[Step]:
    """Return the wide steps that close an end of the rod: the head. Of two such, the thinner ones."""
    blocks = _blocks(wide)
    ends = [block for block in blocks if _sticks_out(block, low, high) < flush]
    outside = [block for block in ends if _reach(block)[1] < low + TOUCH or _reach(block)[0] > high - TOUCH]
    return min(outside or ends, key=lambda block: np.ptp(_reach(block)), default=[])


def _blocks(steps: list[Step]) -> list[list[Step]]:
    """Group steps that follow one another without a gap."""
    blocks: list[list[Step]] = []
    for step in sorted(steps, key=lambda step: step.low):
        if blocks and step.low < _reach(blocks[-1])[1] + TOUCH:
            blocks[-1].append(step)
        else:
            blocks.append([step])
    return blocks


def _sticks_out(block: list[Step], low: Mm, high: Mm) -> Mm:
    """Return how far the rod goes on past a block, at the nearer end."""
    bottom, top = _reach(block)
    return min(bottom - low, high - top)


def _under_head(head: list[Step], low: Mm, high: Mm) -> tuple[Mm, Mm]:
    """Return where the head bears, and the tip. A washer drawn solid onto the head is none of it."""
    bottom, top = _reach(head)
    if bottom + top < low + high:
        seats = [step.high for step in head if step.low < top - TOUCH and abs(step.high - low) < TOUCH]
        return (low if seats else max(low, top)), high
    seats = [step.low for step in head if step.high > bottom + TOUCH and abs(step.low - high) < TOUCH]
    return (high if seats else min(high, bottom)), low


def _away_from_nut(rings: list[Step], low: Mm, high: Mm, thick: Mm) -> tuple[Mm, Mm]:
    """Return both ends of a rod without a head, the one at its nut last."""
    nuts = [(step.low + step.high) / 2 for step in rings if step.length > thick]
    return (high, low) if nuts and sum(nuts) / len(nuts) < (low + high) / 2 else (low, high)
