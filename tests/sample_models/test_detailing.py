"""Every joint is detailed as the standards ask, but for the mistakes that are there on purpose."""

from itertools import pairwise

import pytest

from sample_models import boathouse, hall, mezzanine
from sample_models.making import INCH
from sample_models.portal import Portal
from sample_models.steelwork import FASTENERS, HEB_240, HEB_300, IPE_300, IPE_360, IPE_400

DESIGNS = {
    "eaves": (Portal.eaves_plate, HEB_300[3], IPE_400),
    "apex": (Portal.apex_plate, Portal.apex_plate.thickness, IPE_400),
    "floor": (hall.FLOOR_PLATE, HEB_300[3], IPE_360),
    "gallery": (hall.GALLERY_PLATE, HEB_300[2], IPE_300),
    "gallery splice": (hall.SPLICE_PLATE, hall.SPLICE_PLATE.thickness, IPE_300),
    "gallery post": (hall.SHEAR_PLATE, HEB_240[3], IPE_300),
    "mezzanine": (mezzanine.PLATE, HEB_240[3], IPE_300),
}
"""Each end plate, the thickness behind it, and the beam on it."""


def end_distance(design):
    """From the outermost row to the plate's edge."""
    half = design.plate[1] / 2
    return min(half + design.shift - max(design.rows), min(design.rows) + half - design.shift)


def pitch(design):
    """The least distance between rows."""
    rows = sorted(design.rows)
    return min(upper - lower for lower, upper in pairwise(rows))


def spare_length(design, behind):
    """What stands out past the nut: EN 1090-2 asks for at least one thread (from memory)."""
    _, _, nut, washer = FASTENERS[round(design.d, 2)]
    return design.length - (design.thickness + behind + washer + nut)


@pytest.mark.parametrize("name", DESIGNS)
def test_edges_and_pitches(name):
    """EN 1993-1-8:2005, Table 3.3: e1, e2 ≥ 1.2 d0, p1 ≥ 2.2 d0, p2 ≥ 2.4 d0; holes 2 mm larger than the bolt."""
    design, _, _ = DESIGNS[name]
    hole = design.d + 2.0
    assert end_distance(design) >= 1.2 * hole
    assert (design.width - design.gauge) / 2 >= 1.2 * hole
    assert pitch(design) >= 2.2 * hole
    assert design.gauge >= 2.4 * hole


@pytest.mark.parametrize("name", DESIGNS)
def test_bolts_are_long_enough(name):
    design, behind, _ = DESIGNS[name]
    assert 3.0 <= spare_length(design, behind) <= 25.0


@pytest.mark.parametrize("name", DESIGNS)
def test_heads_stay_out_of_root_fillets_and_flanges(name):
    design, _, (h, _, tw, tf, r) = DESIGNS[name]
    head = FASTENERS[round(design.d, 2)][0] / 3**0.5
    assert design.gauge / 2 - head >= tw / 2 + r
    for row in design.rows:
        assert abs(abs(row) - (h - tf) / 2) >= tf / 2 + head


def test_the_boathouse():
    """AISC 360-22, J3.4 and J3.5: 3/4 in. bolts at least 2 2/3 d apart and 1 in. from the edge."""
    design = boathouse.PLATE
    assert pitch(design) >= 8 / 3 * design.d
    assert end_distance(design) >= INCH
    assert (design.width - design.gauge) / 2 >= INCH
    assert spare_length(design, boathouse.COLUMN[3]) >= 0
    assert spare_length(design, design.thickness) >= 0


def test_the_mistakes_are_mistakes_and_only_those():
    near, short = mezzanine.ROW_AT_THE_EDGE, mezzanine.BOLTS_TOO_SHORT
    assert end_distance(near) == pytest.approx(22.0)
    assert end_distance(near) < 1.2 * (near.d + 2.0)
    assert pitch(near) >= 2.2 * (near.d + 2.0)
    assert spare_length(near, HEB_240[3]) >= 3.0
    assert spare_length(short, HEB_240[3]) == pytest.approx(50.0 - 58.0)
    assert end_distance(short) >= 1.2 * (short.d + 2.0)
    assert (IPE_300[3] + 12.0) / 2 < mezzanine.STIFFENERS_OFF, "no part of a stiffener is in line with the flange"
