"""A structural analysis model as plain data: members, connections and reactions, in the world, N and mm."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Literal, NamedTuple

import numpy as np

from ..model.joints import MemberEnd
from ..model.units import Array, Mm

SAME_PLACE: Mm = 1.0
"""Ends, vertices and samples this near to one another are at one place."""

Kind = Literal["point", "section", "discrete"]


class Sample(NamedTuple):
    """Components of force (N) and moment (Nmm) (3,) along the reaction's basis, `at` mm from the member's start."""

    at: Mm
    force: Array
    moment: Array


@dataclass(frozen=True, slots=True, eq=False)
class StructuralMember:
    """A straight curve member; `local` (3, 3) holds its local axes as rows, None where the file does not say them.

    `doubt` says why its ends cannot be told; its points are then NaN or only near the truth.
    """

    name: str
    start: Array
    end: Array
    local: Array | None
    doubt: str | None = None

    @property
    def length(self) -> Mm:
        """The distance between its ends."""
        return float(np.linalg.norm(self.end - self.start))

    def end_at(self, point: Array) -> MemberEnd | None:
        """Return the end that lies at a point."""
        if np.linalg.norm(self.start - point) <= SAME_PLACE:
            return "start"
        return "end" if np.linalg.norm(self.end - point) <= SAME_PLACE else None


@dataclass(frozen=True, slots=True, eq=False)
class Connection:
    """A node or support; `members` are the items it joins by their step numbers, `loaded`: an action stands on it."""

    name: str
    point: Array
    members: frozenset[int]
    loaded: bool


@dataclass(frozen=True, slots=True)
class Case:
    """A load case or combination that results were worked out for."""

    name: str
    kind: str
    is_combination: bool


@dataclass(frozen=True, slots=True, eq=False)
class Reaction:
    """One reaction on one item, in one case; `item` is the step number of a member or connection.

    A "point" reaction is an outside action on its item; a "section" one samples the forces inside a member;
    a "discrete" one may be either: the schema uses it for both.
    """

    label: str
    item: int
    case: Case
    kind: Kind
    basis: Array
    samples: tuple[Sample, ...]
    doubt: str | None = None

    def is_inside(self, discrete_inside: bool) -> bool:
        """Whether it samples forces inside its member, told whether discrete ones of its file do."""
        return self.kind == "section" or (self.kind == "discrete" and discrete_inside)


@dataclass(slots=True)
class StructuralModel:
    """All that a file says of members' forces; members and connections by their step numbers.

    `loads` holds the resultants (3,) of the cases all of whose loads can be told, in the world, N.
    """

    members: dict[int, StructuralMember] = field(default_factory=dict)
    connections: dict[int, Connection] = field(default_factory=dict)
    reactions: list[Reaction] = field(default_factory=list)
    loads: dict[str, Array] = field(default_factory=dict)
