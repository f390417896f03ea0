"""Parts and bolts as they were read: world axes, mm."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Literal

import numpy as np

from .geometry import Prism, Solid, cross
from .joints import Provenance
from .sections import SectionDimensions
from .units import Array, Mm

BoltKind = Literal["bolt", "anchor", "stud", "other", "loose_part"]


@dataclass(frozen=True, slots=True, eq=False)
class MemberShape:
    """A part as a member: its axis through the section's middle, and its section.

    `start` (3,) is the end its own axes begin at, `axis` points to the other end `length` away, `depth`
    runs along the web towards the section's own upper side.
    """

    start: Array
    axis: Array
    depth: Array
    length: Mm
    section: SectionDimensions
    stated: bool

    @property
    def strong_axis(self) -> Array:
        """The axis of strong bending: square to the member and to its depth."""
        return cross(self.axis, self.depth)

    @property
    def middle(self) -> Array:
        """The point half-way along."""
        middle: Array = self.start + self.axis * (self.length / 2)
        return middle


@dataclass(frozen=True, slots=True, eq=False)
class Hole:
    """A hole through a part: its centre, direction, and diameter (the width, for a slot of `slot` extra)."""

    centre: Array
    direction: Array
    diameter: Mm
    slot: Mm = 0.0


@dataclass(frozen=True, slots=True, eq=False)
class Part:
    """An element with a body. It is a plate, a member, or neither; `grade` is as the model writes it.

    `solids` have their holes and notches filled; `notches` are the openings that are no drilled holes.
    """

    global_id: str
    step_id: int
    ifc_class: str
    name: str
    designation: str | None
    grade: str | None
    grade_origin: Provenance | None
    solids: tuple[Solid, ...]
    plate: Prism | None
    member: MemberShape | None
    holes: tuple[Hole, ...] = ()
    notches: tuple[Solid, ...] = ()

    @property
    def bounds(self) -> tuple[Array, Array]:
        """The corners of the axis-parallel box around the part."""
        lows, highs = zip(*(solid.bounds for solid in self.solids), strict=True)
        return np.min(lows, axis=0), np.max(highs, axis=0)


@dataclass(frozen=True, slots=True, eq=False)
class Bolt:
    """One physical bolt: from `point` under its head, `length` along `direction` to its tip.

    `index` numbers the bolts of one element. Without a body and without a nominal size the diameter or
    the length is None.
    """

    global_id: str
    step_id: int
    index: int
    name: str
    kind: BoltKind
    kind_reason: str
    point: Array | None
    direction: Array | None
    diameter: Mm | None
    length: Mm | None
    grade: str | None
    provenance: dict[str, Provenance] = field(default_factory=dict)


@dataclass(frozen=True, slots=True, eq=False)
class WeldPart:
    """A modelled weld: where it is, its kind and throat as far as the model says."""

    global_id: str
    low: Array
    high: Array
    type: str
    throat: Mm | None


@dataclass(frozen=True, slots=True)
class MemberName:
    """By what a member may be called in a table of actions."""

    global_id: str
    names: tuple[str, ...]
