"""Steel Buildings in Europe, Single-Storey Steel Buildings, Part 11: Moment Connections, Tables 4.22 and 4.23.

Splices of two IPE 500 by end plates 200 mm wide, M24 8.8, gauge 100, six rows between the flanges, the first 90 mm
below the plate's end, pitch 70; Table 4.22 with flush plates 20 mm thick, Table 4.23 with plates 25 mm thick that go on
below the beam and have a seventh row there. γ_M0 = 1.0, γ_M2 = 1.25; no reduction of f_y with thickness.

Seen in print: the dimensions above and the results. Not legible there, and fitted: throats of 6 mm at the web and
9.5 mm at the flange's inner side, and m_x = 50.9 mm of the outer row. What the fit took part in is a check of
consistency and no blind one; the moment 426.3 kNm in S355 depends on none of them.

What is printed and not reproduced is told at the end of the file, with how far off it is.
"""

import pytest

from ifcjoints.model.section_properties import plastic_modulus
from ifcjoints_en1993.ed2005 import axial, bolts, caps, classification, stiffness
from ifcjoints_en1993.ed2005.assembly import TriangularLimit
from ifcjoints_en1993.ed2005.inputs import Bolts, EndPlate, Factors
from ifcjoints_en1993.ed2005.joint import EndPlateJoint, moment_resistance, rows_stiffness, tension_resistance
from ifcjoints_en1993.ed2005.rows import Stiffener
from ifcjoints_en1993.figures import SQRT2, untraced

FACTORS = Factors(1.0, 1.0, 1.25)
F_T_RD = bolts.tension_resistance(0.9, 800.0, 353.0, 1.25)
LEVER = 500.0 - 16.0
INNER = (417.0, 347.0, 277.0, 207.0, 137.0, 67.0)
OUTER = (547.0, *INNER)
W_PL = plastic_modulus(500, 200, 10.2, 16, 21)
A_WEB, A_FLANGE, M_X = 6.0, 9.5, 50.9
I_Y = 48200e4
"""Printed in section tables: IPE 500, 48 200 cm⁴."""


def splice(f_y, heights, t_p, level=0.0, a_web=A_WEB, a_flange=A_FLANGE):
    """`level` lifts the heights, for the rows that pull without a moment; the other flange then stiffens as well."""
    other = (Stiffener(level, 16.0, a_flange),) if level else ()
    plate = EndPlate(
        t_p=t_p, b_p=200.0, end=LEVER + 8 + 110 + level, f_y=f_y, f_u=360.0, t_w=10.2, f_y_web=f_y, a_w=a_web,
        flange=Stiffener(LEVER + level, 16.0, a_flange), stiffeners=other, a_outer=(55.0 - M_X) / (0.8 * SQRT2),
    )  # fmt: skip
    beam = caps.BeamEnd(W_PL * f_y, 500.0, 200.0, 16.0, f_y)
    lifted = tuple(h + level for h in heights)
    cap = caps.beam_pressed(beam, FACTORS, untraced)
    return EndPlateJoint(lifted, Bolts(F_T_RD, w=100.0), (plate, plate), FACTORS, caps=(cap,))


def moment(f_y, heights, t_p=25.0, reading=None, **welds):
    return moment_resistance(splice(f_y, heights, t_p, **welds), reading or TriangularLimit(), untraced)


def initial_stiffness(heights, t_p):
    rows = rows_stiffness(splice(235.0, heights, t_p), 353.0, 2 * t_p + (15 + 21.5) / 2, None, untraced)
    return stiffness.initial(210000.0, rows.z_eq, [rows.k_eq])


@pytest.mark.parametrize("web", [4.5, 6.0, 8.0])
@pytest.mark.parametrize("flange", [5.0, 9.5, 12.0])
def test_s355_inner_rows_without_any_fitted_figure(web, flange):
    """Seen in print: 426.3 kNm. Row 1 fails in its bolts and the triangle below it does the rest: no weld matters."""
    result = moment(355.0, INNER, a_web=web, a_flange=flange)
    assert result.M_jRd / 1e6 == pytest.approx(426.3, rel=5e-4)
    assert result.rows[0].governing.text == "row 1, end plate in bending, mode 3"
    assert {row.governing.text for row in result.rows[1:]} == {"triangular limit below row 1"}


@pytest.mark.parametrize(
    ("heights", "f_y", "printed"),
    [(INNER, 235.0, 358.1), (INNER, 275.0, 407.3), (OUTER, 235.0, 448.6), (OUTER, 275.0, 504.8)],
)
def test_moments_with_the_fitted_welds(heights, f_y, printed):
    """Seen in print, with the fit: 0.3 %."""
    assert moment(f_y, heights).M_jRd / 1e6 == pytest.approx(printed, rel=3e-3)


@pytest.mark.parametrize(("heights", "t_p", "printed"), [(INNER, 25.0, 5.62), (OUTER, 25.0, 3.87), (INNER, 20.0, 7.18)])
def test_shortest_spans_for_which_the_joint_is_rigid(heights, t_p, printed):
    """Seen in print, L_b,min in metres, k_b = 25: 0.5 %. The third, of Table 4.22, took no part in the fit."""
    S = initial_stiffness(heights, t_p)
    span = classification.least_rigid_span(classification.K_B_SWAY, 210000.0, I_Y, S)
    assert span / 1e3 == pytest.approx(printed, rel=5e-3)


@pytest.mark.parametrize(
    ("heights", "t_p", "f_y", "printed"),
    [(INNER, 20.0, 235.0, 1404), (OUTER, 25.0, 235.0, 1684), (OUTER, 25.0, 275.0, 1934)],
)
def test_axial_tension(heights, t_p, f_y, printed):
    """Seen in print, N_t,j,Rd in kN; took no part in the fit: 0.3 %."""
    found = tension_resistance(splice(f_y, heights, t_p, level=100.0), untraced)
    assert found / 1e3 == pytest.approx(printed, rel=3e-3)


@pytest.mark.parametrize(("f_y", "printed"), [(235.0, 2726), (275.0, 3190)])
def test_axial_compression(f_y, printed):
    """Seen in print, N_c,j,Rd in kN: the beam's area, 116 cm² in section tables."""
    assert axial.plastic_resistance(11600.0, f_y, 1.0) / 1e3 == pytest.approx(printed, abs=0.51)


@pytest.mark.parametrize(("count", "printed"), [(14, 531), (12, 455)])
def test_shear(count, printed):
    """Seen in print, V_j,Rd in kN: every bolt fully used in tension keeps 0.28 of its shear, 1 − 1/1.4 rounded down."""
    F_v = bolts.shear_resistance(0.6, 800.0, 353.0, 1.25)
    assert bolts.rows_in_shear(F_v, count, 0, share=0.28) / 1e3 == pytest.approx(printed, rel=1e-3)
    assert 1 < bolts.rows_in_shear(F_v, count, 0) / (printed * 1e3) < 1.025


def test_steps_as_computed_independently():
    """Computed independently of this project, from the fitted welds: regressions, no proof."""
    rows = rows_stiffness(splice(235.0, INNER, 25.0), 353.0, 68.25, None, untraced)
    assert rows.z_eq == pytest.approx(308.5, abs=0.06)
    assert rows.k_eff == pytest.approx([5.802, 4.286, 4.286, 4.286, 4.286, 5.679], abs=2e-3)
    forces = [row.F_tRd / 1e3 for row in moment(235.0, INNER).rows]
    assert forces == pytest.approx([406.7, 298.1, 170.9, 167.8, 21.9, 0.0], abs=0.1)
    forces = [row.F_tRd / 1e3 for row in moment(355.0, INNER).rows]
    assert forces == pytest.approx([406.7, 338.4, 270.1, 201.9, 133.6, 65.3], abs=0.06)


NOT_REPRODUCED = [
    # table, rows, t_p, f_y, printed M_j,Rd, how far above it ours is
    ("4.23", OUTER, 25.0, 355.0, 577.1, (1.010, 1.025)),
    ("4.22", INNER, 20.0, 235.0, 339.9, (1.015, 1.030)),
    ("4.22", INNER, 20.0, 275.0, 360.0, (1.070, 1.085)),
    ("4.22", INNER, 20.0, 355.0, 360.0, (1.130, 1.145)),
]


@pytest.mark.parametrize(("table", "heights", "t_p", "f_y", "printed", "above"), NOT_REPRODUCED)
@pytest.mark.parametrize("reach", ["all_rows", "same_side"])
def test_moments_that_are_not_reproduced(table, heights, t_p, f_y, printed, above, reach):
    """Seen in print and NOT reproduced: ours is above the print, which counts on less than these clauses give.

    Neither reach of the triangular limit explains it, nor any throat. It is no agreement; the bounds only hold how
    far apart the two stand, so that nobody takes these cases for checked.
    """
    result = moment(f_y, heights, t_p, TriangularLimit(reach=reach))
    assert above[0] < result.M_jRd / 1e6 / printed < above[1]


@pytest.mark.parametrize(
    ("heights", "t_p", "f_y", "printed"),
    [(INNER, 20.0, 275.0, 1445), (INNER, 20.0, 355.0, 1691), (OUTER, 25.0, 355.0, 2131)],
)
def test_axial_tensions_that_are_not_reproduced(heights, t_p, f_y, printed):
    """Seen in print, N_t,j,Rd, and NOT reproduced: ours is 9 to 14 % above; something else limits them there."""
    found = tension_resistance(splice(f_y, heights, t_p, level=100.0), untraced)
    assert 1.08 < found / 1e3 / printed < 1.15
