"""What a made model holds, from its design dimensions alone: what an audit of it must find."""

from __future__ import annotations

import math
from dataclasses import dataclass

Mm = float


@dataclass(frozen=True)
class JointTruth:
    """A joint as it was designed. `rows` are heights above the bottom flange's centre line at the interface."""

    supported: str
    supporting: str
    configuration: str
    moment_joint: bool
    bolts: int
    diameter: Mm
    grade: str
    plate: Mm | None = None
    rows: tuple[Mm, ...] = ()
    flange_distance: Mm | None = None


@dataclass(frozen=True)
class ModelTruth:
    """All joints of a model with an end plate, its number of physical bolts, and how many are in no joint."""

    joints: tuple[JointTruth, ...]
    bolts: int
    elsewhere: int


def rows_above(bottom: Mm, heights: tuple[Mm, ...]) -> tuple[Mm, ...]:
    """Return bolt heights, top to bottom, as distances from the bottom flange's centre line."""
    return tuple(height - bottom for height in sorted(heights, reverse=True))


def on_slope(depth: Mm, degrees: float) -> Mm:
    """Return a member's depth as an upright plane cuts it."""
    return depth / math.cos(math.radians(degrees))
