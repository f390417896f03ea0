"""Several members on one end plate: its bolts are shared out among them."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace

import numpy as np
import shapely

from .end_plates import EndConnection
from .groups import BoltGroup
from .rows import bolts_in_plane


def bolts_about(connection: EndConnection, connections: Sequence[EndConnection], group: BoltGroup) -> BoltGroup:
    """Return the group's bolts that lie nearest to this member, of all that stand on its plate."""
    rivals = [each for each in connections if each.plate == connection.plate]
    if len(rivals) < 2:
        return group
    away = np.array([_distances(each, group) for each in rivals])
    mine = away.argmin(axis=0) == rivals.index(connection)
    bolts = tuple(number for number, is_mine in zip(group.bolts, mine, strict=True) if is_mine)
    return replace(group, bolts=bolts, points=group.points[mine])


def _distances(connection: EndConnection, group: BoltGroup) -> list[float]:
    places = bolts_in_plane(group.points, group.direction, connection.frame)
    standing = shapely.union_all(list(connection.cuts.values()))
    return [float(distance) for distance in shapely.distance(shapely.points(places), standing)]
