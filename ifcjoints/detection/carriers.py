"""What an end plate is bolted to, and what that makes of the joint."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from ..model.joints import Configuration
from ..model.parts import Part
from .end_plates import EndConnection
from .groups import BoltGroup

UPRIGHT = 0.7
"""A member is a column if the cosine between its axis and the vertical is at least this."""


@dataclass(frozen=True, slots=True, eq=False)
class Carrier:
    """The other side of an end plate: its part if it is one, the end plate that meets it, packs between."""

    part: int | None
    configuration: Configuration
    meets: EndConnection | None = None
    packs: tuple[int, ...] = ()
    backing: tuple[int, ...] = ()


def find_carrier(
    connection: EndConnection, others: Sequence[EndConnection], group: BoltGroup, parts: Sequence[Part]
) -> Carrier:
    """Look through the plies from the end plate outwards until a member or another end plate."""
    place = group.parts.index(connection.plate)
    inwards = connection.frame.axes[2] @ group.direction > 0
    beyond = group.parts[:place][::-1] if inwards else group.parts[place + 1 :]
    packs: list[int] = []
    for depth, number in enumerate(beyond):
        facing = [each for each in others if each.plate == number and each.frame.axes[2] @ connection.frame.axes[2] < 0]
        if facing:
            meeting = min(facing, key=lambda each: float(np.linalg.norm(each.frame.origin - connection.frame.origin)))
            return Carrier(meeting.member, "splice", meeting, tuple(packs))
        if parts[number].member is not None:
            backing = tuple(each for each in beyond[depth + 1 :] if _is_backing(each, others, parts))
            return Carrier(number, _onto_member(connection, parts[number]), None, tuple(packs), backing)
        packs.append(number)
    return Carrier(None, "base_plate" if _is_foot(connection) else "other", None, tuple(packs))


def _is_foot(connection: EndConnection) -> bool:
    """Whether an upright member stands on the plate by its foot."""
    return bool(abs(connection.shape.axis[2]) >= UPRIGHT and connection.frame.axes[2][2] >= UPRIGHT)


def _is_backing(number: int, others: Sequence[EndConnection], parts: Sequence[Part]) -> bool:
    return parts[number].plate is not None and all(other.plate != number for other in others)


def _onto_member(connection: EndConnection, carrier: Part) -> Configuration:
    member = carrier.member
    assert member is not None
    if abs(member.axis[2]) < UPRIGHT:
        return "beam_to_beam" if abs(connection.shape.axis[2]) < UPRIGHT else "other"
    normal = connection.frame.axes[2]
    on_flange = abs(member.depth @ normal) > abs(member.strong_axis @ normal)
    return "beam_to_column_flange" if on_flange else "beam_to_column_web"
