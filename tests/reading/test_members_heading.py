"""Which end of a measured member is its start, whatever the order of its faces."""

import numpy as np
import pytest

from ifcjoints.model.geometry import Solid
from ifcjoints.reading.bodies import Piece
from ifcjoints.reading.members import as_member
from sample_models.making import i_ring

RING = np.array(i_ring(400.0, 180.0, 8.6, 13.5, 21.0))


@pytest.mark.parametrize("way", [(0, 0, 1), (0, 0, -1), (1, 0, 0), (0.6, 0.8, 0)])
@pytest.mark.parametrize("shuffled", [0, 1, 2, 3])
def test_it_starts_at_the_end_nearer_to_its_own_origin(way, shuffled):
    along = np.array(way, float)
    hint = np.eye(3)[int(np.argmin(np.abs(along)))]
    x = np.cross(along, hint) / np.linalg.norm(np.cross(along, hint))
    matrix = np.eye(4)
    matrix[:3, :3] = np.column_stack([x, np.cross(along, x), along])
    solid = Solid.extruded([RING], matrix, np.array([0.0, 0.0, 3000.0]))
    order = np.random.default_rng(shuffled).permutation(len(solid.vertices))
    back = np.argsort(order)
    mixed = Solid(solid.vertices[order], back[solid.corners], solid.loop_start, solid.loop_face)
    member = as_member(Piece(mixed))
    assert member.axis == pytest.approx(along, abs=1e-6)
    assert np.linalg.norm(member.start) < 1.0
    assert member.depth[np.argmax(np.round(np.abs(member.depth), 6))] > 0
