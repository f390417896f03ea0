"""Bolts measured from their bodies against the dimensions they were made to.

Heads and nuts have the heights and widths of ISO 4014 and ISO 4032 for M24 (k 15, m 21.5, e 39.98), from memory.
"""

from itertools import permutations

import numpy as np
import pytest

from ifcjoints.reading.axial import are_loose_parts, bolts_of, is_nut_or_washer
from ifcjoints.reading.turned import turned_bodies

from .turning import along, anywhere, lathed, placed

D, LENGTH, HEAD, NUT, ACROSS = 24.0, 80.0, 15.0, 21.5, 39.98


def hexagon(height, low=0.0, **more):
    return lathed([(ACROSS / 2, low), (ACROSS / 2, low + height)], 6, **more)


def shank(low=0.0, high=LENGTH, radius=D / 2, corners=16):
    return lathed([(radius, low), (radius, high)], corners)


def measured(solids, world):
    return bolts_of(turned_bodies([placed(solid, world) for solid in solids]))


def check(solids, seed=1, length=LENGTH, diameter=D, has_head=True):
    """One bolt: under its head at the world's origin, its tip along z."""
    world = anywhere(seed)
    (bolt,) = measured(solids, world)
    assert bolt.diameter == pytest.approx(diameter, abs=1e-6)
    assert bolt.length == pytest.approx(length, abs=1e-6)
    assert bolt.has_head == has_head
    if has_head:
        assert bolt.direction == pytest.approx(world[:3, 2], abs=1e-9)
        assert bolt.point == pytest.approx(world[:3, 3], abs=1e-5)
    return bolt


BORED = {"bore": D / 2}
WASHER = lathed([(22, 44), (22, 48)], 24, bore=12.5)
SETS = {
    "head and shank": [hexagon(HEAD, -HEAD), shank()],
    "solid nut, thread past it": [hexagon(HEAD, -HEAD), shank(), hexagon(NUT, 50)],
    "solid nut, flush": [hexagon(HEAD, -HEAD), shank(), hexagon(NUT, LENGTH - NUT)],
    "bored nut, flush": [hexagon(HEAD, -HEAD), shank(), hexagon(NUT, LENGTH - NUT, **BORED)],
    "washer and nut": [hexagon(HEAD, -HEAD), shank(), WASHER, hexagon(NUT, 48, **BORED)],
    "shank from the head's top": [hexagon(HEAD, -HEAD), shank(-HEAD), hexagon(NUT, 50)],
    "shank from the head's top, nut flush": [hexagon(HEAD, -HEAD), shank(-HEAD), hexagon(NUT, LENGTH - NUT)],
    "solid washer under the head": [hexagon(HEAD, -HEAD), shank(), lathed([(22, 0), (22, 4)], 24), hexagon(NUT, 50)],
    "thread to its core": [hexagon(HEAD, -HEAD), shank(0, 30), shank(30, LENGTH, 10.2), hexagon(NUT, 50)],
    "two-piece head": [hexagon(11, -11), lathed([(17, -HEAD), (17, -11)], 24), shank()],
}


@pytest.mark.parametrize("name", SETS)
def test_bolts_in_pieces_in_any_order_and_place(name):
    for seed, solids in enumerate(permutations(SETS[name])):
        check(list(solids), seed)


TURNED = {
    "plain": [(20, -15), (20, 0), (12, 0), (12, 80)],
    "chamfered tip": [(20, -15), (20, 0), (12, 0), (12, 78), (10, 80)],
    "chamfered head": [(16, -15), (20, -13), (20, 0), (12, 0), (12, 80)],
    "round head": [(4, -14), (10, -13), (16, -9), (20, -3), (20, 0), (12, 0), (12, 80)],
    "washer face": [(20, -15), (20, -0.6), (17, -0.6), (17, 0), (12, 0), (12, 80)],
    "nut in one piece": [(20, -15), (20, 0), (12, 0), (12, 48), (20, 48), (20, 69.5), (12, 69.5), (12, 80)],
    "short grip": [(20, -15), (20, 0), (12, 0), (12, 16), (20, 16), (20, 37.5), (12, 37.5), (12, 80)],
    "core of the thread": [(20, -15), (20, 0), (12, 0), (12, 20), (10.2, 20), (10.2, 80)],
}


@pytest.mark.parametrize("triangles", [True, False], ids=["triangles", "polygons"])
@pytest.mark.parametrize("corners", [8, 13, 24])
@pytest.mark.parametrize("name", TURNED)
def test_bolts_turned_in_one_piece(name, corners, triangles):
    for profile in (TURNED[name], TURNED[name][::-1]):
        check([lathed(profile, corners, triangles=triangles)], corners)


def test_faceted_shanks_have_a_diameter_over_flats():
    bolt = check([shank(corners=6), hexagon(HEAD, -HEAD)])
    assert bolt.flats == pytest.approx(D * 0.75**0.5)


def test_a_rod_without_head_points_to_its_nut():
    for low in (2.0, 50.0):
        solids = [shank(), hexagon(NUT, low, **BORED)]
        world = anywhere(2)
        (bolt,) = measured(solids, world)
        assert not bolt.has_head
        assert bolt.direction @ world[:3, 2] == pytest.approx(1.0 if low > 40 else -1.0)


def test_bolts_side_by_side_stay_apart():
    places = [(x, y) for x in (0, 70, 140) for y in (0, 90)]
    solids = []
    for x, y in places:
        shift = np.eye(4)
        shift[:2, 3] = x, y
        solids += [solid.moved(shift) for solid in SETS["washer and nut"]]
    assert len(measured(solids, anywhere(4))) == len(places)


@pytest.mark.parametrize(
    ("solid", "name", "expected"),
    [
        (hexagon(NUT, bore=12), "part", True),
        (hexagon(NUT), "part", True),
        (WASHER, "part", True),
        (lathed([(22, 0), (22, 4)], 24), "Washer 24", True),
        (lathed([(22, 0), (22, 4)], 24), "cap", False),
        (lathed([(90, 0), (90, 25)], 24, bore=40), "flange", False),
        (lathed([(50, 0), (50, 200)], 24, bore=45), "pipe", False),
        (shank(), "M24", False),
    ],
    ids=lambda value: value if isinstance(value, str) else "",
)
def test_nuts_and_washers_are_told_by_shape(solid, name, expected):
    assert is_nut_or_washer([placed(solid, anywhere(9))], name) == expected


def test_nut_and_washer_alone_are_loose_parts_and_a_bolt_is_not():
    nut, washer = placed(hexagon(NUT, bore=12)), placed(WASHER, along(-48))
    assert are_loose_parts(turned_bodies([nut, washer]))
    assert not are_loose_parts(turned_bodies([nut, washer, placed(shank())]))
