"""EN 1993-1-8:2005: figures of single clauses, each with where it comes from.

"From memory" and "computed" (independently of this project) say how a figure was come by. Section properties are those
that handbooks of rolled sections print, from memory.
"""

import math

import pytest

from ifcjoints.model.section_properties import area
from ifcjoints_en1993.ed2005 import (
    bolts,
    classification,
    column_web_compression,
    column_web_shear,
    rotation,
    stiffened_web,
    transformation,
    welds,
)

F_VW_D = [
    # f_u, β_w, f_vw,d: computed, γ_M2 = 1.25
    (360.0, 0.80, 207.8),
    (430.0, 0.85, 233.7),
    (410.0, 0.85, 222.8),
    (510.0, 0.90, 261.7),
    (490.0, 0.90, 251.5),
    (470.0, 0.90, 241.2),
]


@pytest.mark.parametrize(("f_u", "beta_w", "strength"), F_VW_D)
def test_strength_of_fillet_welds(f_u, beta_w, strength):
    """4.5.3.3(3)."""
    assert welds.shear_strength(f_u, beta_w, 1.25) == pytest.approx(strength, abs=0.051)


def test_a_transverse_weld_carries_more_by_the_directional_method():
    """√(3/2) = 1.2247, from 4.5.3.2 and 4.5.3.3."""
    directional = welds.transverse_resistance(5.0, 510.0, 0.9, 1.25)
    simplified = welds.simplified_resistance(5.0, welds.shear_strength(510.0, 0.9, 1.25))
    assert directional / simplified == pytest.approx(1.2247, abs=5e-5)


@pytest.mark.parametrize(
    ("f_y", "f_u", "beta_w", "share"),
    [(235.0, 360.0, 0.8, 0.46), (275.0, 430.0, 0.85, 0.48), (355.0, 510.0, 0.9, 0.55)],
)
def test_full_strength_throats(f_y, f_u, beta_w, share):
    """Throat over thickness of double fillet welds as design guides give it, to two digits; from memory."""
    throat = welds.full_strength_throat(10.0, f_y, 1.0, f_u, beta_w, 1.25)
    assert throat / 10.0 == pytest.approx(share, abs=0.0061)


def test_a_weld_of_full_strength_is_just_full():
    """Two welds of that throat, pulled by what the plate yields at: the equivalent stress is at its limit, 4.5.3.2."""
    a = welds.full_strength_throat(12.0, 355.0, 1.0, 470.0, 0.9, 1.25)
    stress = welds.transverse_stress(12.0 * 355.0 / 2, a)
    assert welds.equivalent_stress(stress, stress, 0.0) == pytest.approx(welds.equivalent_limit(470.0, 0.9, 1.25))


@pytest.mark.parametrize(
    ("d", "A_s", "property_class", "f_ub", "tension", "shear"),
    [
        (16, 157.0, "8.8", 800.0, 90.4, 60.3),
        (20, 245.0, "8.8", 800.0, 141.1, 94.1),
        (24, 353.0, "8.8", 800.0, 203.3, 135.6),
        (30, 561.0, "8.8", 800.0, 323.1, 215.4),
        (16, 157.0, "10.9", 1000.0, 113.0, 62.8),
        (20, 245.0, "10.9", 1000.0, 176.4, 98.0),
        (24, 353.0, "10.9", 1000.0, 254.2, 141.2),
        (30, 561.0, "10.9", 1000.0, 403.9, 224.4),
    ],
)
def test_bolts(d, A_s, property_class, f_ub, tension, shear):
    """Table 3.4 with tabulated stress areas: computed, familiar from handbooks."""
    assert bolts.tension_resistance(bolts.K_2, f_ub, A_s, 1.25) / 1e3 == pytest.approx(tension, abs=0.051)
    factor = bolts.ALPHA_V_THREAD[property_class]
    assert bolts.shear_resistance(factor, f_ub, A_s, 1.25) / 1e3 == pytest.approx(shear, abs=0.051)
    assert bolts.shear_resistance(bolts.ALPHA_V_SHANK, f_ub, math.pi * d**2 / 4, 1.25) / 1e3 > shear


def test_bearing_by_hand():
    """Table 3.4 by hand: M20 8.8, d_0 22, t 10, f_u 430, e_1 = e_2 = 40, p_1 = 60.

    α_d = 40/66 = 0.6061 at the end and 60/66 − 0.25 = 0.6591 inside; k_1 = min(2.8·40/22 − 1.7; 2.5) = 2.5;
    F_b = 2.5·0.6061·430·20·10/1.25 = 104.2 kN and 113.4 kN.
    """
    k_1 = bolts.k_1_edge(40.0, None, 22.0)
    assert k_1 == 2.5
    for alpha_d, resistance in ((bolts.bearing_end(40.0, 22.0), 104.2), (bolts.bearing_inner(60.0, 22.0), 113.4)):
        found = bolts.bearing_resistance(k_1, bolts.alpha_b(alpha_d, 800.0, 430.0), 430.0, 20.0, 10.0, 1.25)
        assert found / 1e3 == pytest.approx(resistance, abs=0.06)


def test_bearing_is_bounded():
    """α_b and k_1 end at 1.0 and 2.5; a soft bolt in a strong plate bears as its own strength (Table 3.4)."""
    assert bolts.alpha_b(3.0, 1000.0, 430.0) == 1.0
    assert bolts.alpha_b(3.0, 400.0, 510.0) == pytest.approx(400 / 510)
    assert bolts.k_1_inner(80.0, 22.0) == 2.5
    assert bolts.k_1_inner(55.0, 22.0) == pytest.approx(1.8)
    assert bolts.k_1_edge(60.0, 55.0, 22.0) == pytest.approx(1.8)


@pytest.mark.parametrize(("packing", "factor"), [(0.0, 1.0), (8.0, 1.0), (12.0, 216 / 228), (24.0, 216 / 264)])
def test_packing(packing, factor):
    """M24, 9d/(8d + 3t_p) beyond d/3 = 8 mm (3.6.1(12))."""
    assert bolts.packing_factor(24.0, packing) == pytest.approx(factor)


def test_packing_begins_without_a_step():
    assert bolts.packing_factor(24.0, 8.0 + 1e-9) == pytest.approx(1.0, abs=1e-9)


@pytest.mark.parametrize(
    ("bearing", "shear", "group"),
    [((50.0, 60.0), 70.0, 110.0), ((50.0, 60.0), 55.0, 100.0), ((50.0, 60.0), 40.0, 80.0)],
)
def test_groups_of_bolts(bearing, shear, group):
    """3.7(1), its three cases by hand."""
    assert bolts.group_in_shear(shear, bearing) == group


def test_combined():
    """A bolt full in tension keeps 1 − 1/1.4 of its shear (Table 3.4)."""
    assert bolts.combined(bolts.SHARE_BESIDE_FULL_TENSION, 1.0, 1.0, 1.0) == pytest.approx(1.0)
    assert bolts.rows_in_shear(100.0, 0, 4) == 400.0


SHEAR_AREAS = [
    # h, b, t_w, t_f, r, A_v in cm² as section tables print it: from memory
    (200, 100, 5.6, 8.5, 12, 14.00),
    (300, 150, 7.1, 10.7, 15, 25.68),
    (400, 180, 8.6, 13.5, 21, 42.69),
    (500, 200, 10.2, 16, 21, 59.87),
    (200, 200, 9, 15, 18, 24.83),
    (300, 300, 11, 19, 27, 47.43),
]


@pytest.mark.parametrize(("h", "b", "t_w", "t_f", "r", "printed"), SHEAR_AREAS)
def test_shear_areas_of_rolled_sections(h, b, t_w, t_f, r, printed):
    """EN 1993-1-1:2005, 6.2.6(3)a)."""
    A = area(h, b, t_w, t_f, r)
    found = column_web_shear.shear_area_rolled(A, b, t_f, t_w, r, h - 2 * t_f, 1.0)
    assert found / 100 == pytest.approx(printed, abs=0.011)


def test_slenderness_of_a_panel():
    """69ε with ε = 0.81 in S355, from memory of EN 1993-1-1:2005, Table 5.2."""
    assert column_web_shear.greatest_slenderness(355.0) == pytest.approx(69 * 0.81, rel=5e-3)


@pytest.mark.parametrize(("slender", "factor"), [(0.2, 1.0), (0.5, 0.8430), (1.0, 0.5399), (2.0, 0.1962)])
def test_buckling_curve_c(slender, factor):
    """Printed in tables of buckling curves to EN 1993-1-1:2005, 6.3.1.2: from memory."""
    assert stiffened_web.buckling_factor(slender) == pytest.approx(factor, abs=1e-4)


def test_outstand_of_a_stiffener():
    """13ε, as guides give EN 1993-1-5:2006, 9.2.1(8), for flats: from memory."""
    assert stiffened_web.greatest_outstand(1.0, 235.0, 210000.0) == pytest.approx(13.0, abs=0.05)


@pytest.mark.parametrize(("other", "beta"), [(0.0, 1.0), (100.0, 0.0), (-100.0, 2.0), (-300.0, 2.0), (50.0, 0.5)])
def test_transformation_parameter(other, beta):
    """5.3(9); the first three are the cases of Table 5.4."""
    assert transformation.beta(100.0, other) == beta


def test_plate_buckling_of_the_web():
    """ρ of 6.2.6.2: (λ − 0.2)/λ² = 0.8 at λ = 1; the standard's two branches meet at 0.72 within half a per cent."""
    assert column_web_compression.plate_buckling(1.0) == pytest.approx(0.8)
    assert column_web_compression.plate_buckling(0.72) == 1.0
    assert column_web_compression.plate_buckling(0.7201) == pytest.approx(1.0, abs=5e-3)


def test_axial_stress_in_the_web():
    """k_wc of 6.2.6.2(2): 1 up to 0.7 f_y, 0.7 at f_y."""
    assert column_web_compression.axial_stress_factor(0.7 * 355, 355.0) == 1.0
    assert column_web_compression.axial_stress_factor(355.0, 355.0) == pytest.approx(0.7)


@pytest.mark.parametrize(("t_p", "below", "s_p"), [(20.0, 0.0, 20.0), (20.0, 5.0, 25.0), (20.0, 50.0, 40.0)])
def test_spread_through_the_plate(t_p, below, s_p):
    """6.2.6.2(1): at least t_p, up to 2t_p where the plate goes on far enough."""
    assert column_web_compression.spread_in_plate(t_p, below) == s_p


def test_rigid_and_pinned():
    """5.2.2.5, Figure 5.4: IPE 300 (8356 cm⁴) over 6 m, 25EI/L = 73.1 and 0.5EI/L = 1.46 MNm/rad by hand."""
    upper = classification.rigid_from(classification.K_B_SWAY, 210000.0, 8356e4, 6000.0)
    lower = classification.pinned_up_to(210000.0, 8356e4, 6000.0)
    assert (upper / 1e9, lower / 1e9) == pytest.approx((73.1, 1.46), rel=2e-3)
    classes = [classification.stiffness_class(S, upper, lower) for S in (80e9, 20e9, 1e9)]
    assert classes == ["rigid", "semi-rigid", "nominally pinned"]


def test_classes_by_strength():
    """5.2.3: from the weaker of the members, and a quarter of it."""
    assert classification.full_strength_at_top(100.0, 80.0) == 80.0
    assert classification.full_strength_within(100.0, 80.0) == 100.0
    classes = [classification.strength_class(M, 100.0) for M in (100.0, 99.0, 25.0)]
    assert classes == ["full-strength", "partial-strength", "nominally pinned"]


def test_thickness_that_turns():
    """6.4.2(2)b by hand: M20 8.8 in S355, 0.36·20·√(800/355) = 10.81 mm."""
    assert rotation.greatest_thickness(20.0, 800.0, 355.0) == pytest.approx(10.81, abs=0.005)
