"""Copies of a shape give the bolts that measuring each of them gives."""

import numpy as np
import pytest

from ifcjoints.reading import bolt_shapes
from ifcjoints.reading.axial import bolts_of
from ifcjoints.reading.bolt_shapes import BoltShapes
from ifcjoints.reading.turned import turned_bodies

from .turning import anywhere, lathed, placed


def bolt_at(matrix, shank=12.0):
    solids = lathed([(20, -15), (20, 0)], 6), lathed([(shank, 0), (shank, 80)], 16)
    return [placed(solid.moved(matrix)) for solid in solids]


def shifted(matrix, by):
    moved = matrix.copy()
    moved[:3, 3] += by
    return moved


def test_copies_are_measured_once_and_placed_each_in_its_own_place(monkeypatch):
    world = anywhere(1)
    calls = []
    monkeypatch.setattr(bolt_shapes, "turned_bodies", lambda pieces: calls.append(1) or turned_bodies(pieces))
    shapes = BoltShapes()
    for by in np.random.default_rng(2).uniform(-1e5, 1e5, (20, 3)).round(3):
        pieces = bolt_at(shifted(world, by))
        (found,), loose = shapes.measured(pieces)
        (alone,) = bolts_of(turned_bodies(pieces))
        assert found.point == pytest.approx(alone.point, abs=0.02)
        assert found.direction == pytest.approx(alone.direction, abs=1e-6)
        assert not loose
    assert len(calls) <= 4


def test_shapes_that_differ_are_not_taken_for_copies():
    shapes = BoltShapes()
    for shank in (12.0, 12.05, 10.0):
        ((bolt,), _) = shapes.measured(bolt_at(np.eye(4), shank))
        assert bolt.diameter == pytest.approx(2 * shank)
    for seed in range(5):
        world = anywhere(seed)
        ((bolt,), _) = shapes.measured(bolt_at(world))
        assert bolt.direction == pytest.approx(world[:3, 2], abs=1e-6)


def test_nothing_has_no_bolts():
    assert BoltShapes().measured([]) == ([], False)
