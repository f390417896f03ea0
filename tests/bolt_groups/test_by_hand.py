"""Joints small enough to be worked by hand; each figure is worked out beside its test, from statics."""

import math

import pytest

from ifcjoints.checking.testing import plain_joint
from ifcjoints.model.joints import JointMember, Section
from ifcjoints_bolt_groups.brittleness import ductile_thickness
from ifcjoints_bolt_groups.elastic import elastic
from ifcjoints_bolt_groups.plastic import plastic

from .joints import METHODS, answer

both = pytest.mark.parametrize("method", METHODS, ids=lambda method: method.name)

F_T = 0.9 * 800 * 0.7853981634 * (24 - 0.9382 * 3) ** 2 / 1.25 / 1e3
"""M24 8.8 by EN 1993-1-8:2005, Table 3.4, in kN."""
F_C = 180 * 13.5 * 355 / 1e3
"""A flange of 180 × 13.5 in S355: 862.65 kN."""


def steps(result):
    return {step.symbol: step for step in result.steps}


def test_the_example_of_the_elastic_manual():
    joint = plain_joint(((150.0, 2), (25.0, 2)), flange_distance=150.0)
    result = answer(elastic, joint, (0.0, 0.0, 2.5))
    assert result.row_forces_kN == pytest.approx((2 * 8.108, 2 * 8.108 / 6), rel=1e-4)
    assert "8108 N" in elastic.manual["Example"]


def test_the_example_of_the_plastic_manual():
    result = answer(plastic, plain_joint(), limit="never")
    third = F_C - 4 * F_T
    assert result.row_forces_kN == pytest.approx((2 * F_T, 2 * F_T, third), rel=1e-6)
    assert result.resistance["M_kNm"] == pytest.approx(2 * F_T * 0.79 + third * 0.06, rel=1e-6)
    assert result.resistance["M_kNm"] == pytest.approx(323.8, abs=0.06)
    assert "323.8 kNm" in plastic.manual["Example"]


def test_what_governs_is_named():
    """Rows at 450, 340 and 60 mm: M_bolt = F_t·Σny²/450, M_flange = F_c·Σny²/Σny; Σny² = 643 400, Σny = 1700."""
    result = answer(elastic, plain_joint())
    assert result.resistance["M_kNm"] == pytest.approx(F_T * 643.4 / 450, rel=1e-6)
    assert result.governing == "row 1, bolt tension"
    narrow = answer(elastic, plain_joint(flange=(100.0, 10.0)))
    assert narrow.resistance["M_kNm"] == pytest.approx(355.0 * 643.4 / 1700, rel=1e-6)
    assert narrow.governing == "compression flange"
    assert answer(plastic, plain_joint(flange=(100.0, 10.0))).governing == "compression flange"
    downwards = answer(elastic, plain_joint(), tension_flange="bottom")
    assert downwards.governing == "row 3, bolt tension"


def test_each_direction_presses_its_own_flange():
    """One flange square, the other at 60°: its force along itself presses the interface with half."""
    joint = plain_joint(inclinations=(60.0, 0.0), flange=(100.0, 10.0))
    for side, resistance in (("top", 0.5 * 355), ("bottom", 355.0)):
        told = steps(answer(elastic, joint, tension_flange=side))
        assert told["F_c,Rd"].value == pytest.approx(resistance, rel=1e-9)


def test_a_compression_between_the_flanges_is_shared_by_statics():
    """N = −600 kN midway and M = 60 kNm: the resultant lies 100 mm off the middle of 400 mm, so 3/4 and 1/4."""
    result = answer(elastic, plain_joint(((450.0, 2), (60.0, 2)), flange_distance=400.0), (-600.0, 0.0, 60.0))
    told = steps(result)
    assert result.row_forces_kN == (0.0, 0.0)
    assert result.compression_kN == pytest.approx(600.0)
    assert told["F_c,Ed"].value == pytest.approx(450.0)
    assert told["F_c,2,Ed"].value == pytest.approx(150.0)
    assert result.utilisation == pytest.approx(450 / F_C, rel=1e-6)
    assert result.resistance["M_kNm"] == pytest.approx(
        min(F_T * (2 * 450**2 + 2 * 60**2) / 450, (F_C - 600) * (2 * 450**2 + 2 * 60**2) / 1020) / 1e3 + 120, rel=1e-6
    )


def test_an_axial_force_near_the_tension_flange_presses_that_one():
    """N = −1000 kN with the axis 40 mm from the top flange of 400 mm, no moment: 9/10 of it on the top flange."""
    joint = plain_joint(((450.0, 2), (60.0, 2)), flange_distance=400.0, axis=360.0, flange=(180.0, 13.5))
    result = answer(elastic, joint, (-1000.0, 0.0, 0.0))
    assert result.status == "fail"
    assert result.utilisation == pytest.approx(900 / F_C, rel=1e-6)
    assert result.governing == "tension flange, pressed, under the axial force alone"
    assert result.resistance["M_kNm"] == 0.0
    assert answer(plastic, joint, (-1000.0, 0.0, 0.0)).status == "fail"


@both
def test_an_axial_tension_opens_the_joint(method):
    """Rows at 350 and 50 mm of 400 mm, N = 400 kN midway, M = 15 kNm: C would be negative; ±15/0.3 kN about 200."""
    joint = plain_joint(((350.0, 2), (50.0, 2)), flange_distance=400.0)
    result = answer(method, joint, (400.0, 0.0, 15.0))
    assert result.row_forces_kN == pytest.approx((250.0, 150.0))
    assert result.compression_kN == pytest.approx(0.0, abs=1e-9)


@both
def test_at_the_border_of_opening_both_states_agree(method):
    """C = 0 at M_c Σny = N Σny²: just above and just below it the forces are the same."""
    joint = plain_joint(((350.0, 2), (50.0, 2)), flange_distance=400.0)
    N = 300.0
    border = N * (350**2 + 50**2) / 400 / 1e3 - N * 0.2
    above, below = (answer(method, joint, (N, 0.0, border * (1 + sign * 1e-9))) for sign in (1, -1))
    assert above.row_forces_kN == pytest.approx(below.row_forces_kN, rel=1e-6)


def test_a_row_beyond_the_flange_joins_when_the_joint_opens_past_it():
    """Rows at 350, 50 and −50 mm: under N = 400 kN alone at 200 mm, none of them is idle; ȳ = 116.7."""
    joint = plain_joint(((350.0, 2), (50.0, 2), (-50.0, 2)), flange_distance=400.0)
    idle = answer(elastic, joint, (200.0, 0.0, 60.0))
    joined = answer(elastic, joint, (600.0, 0.0, 1.0))
    assert idle.row_forces_kN[2] == 0.0
    assert joined.row_forces_kN[2] > 0.0
    assert sum(joined.row_forces_kN) == pytest.approx(600.0)


def test_rows_beyond_the_flange_carry_what_an_axial_tension_needs():
    """Rows at 350, 50 and −50 mm under 900 kN: the two upper ones 4 F_t = 812 kN, the last the remaining 88 kN."""
    joint = plain_joint(((350.0, 2), (50.0, 2), (-50.0, 2)), flange_distance=400.0, axis=120.0)
    result = answer(plastic, joint, (900.0, 0.0, 1.0), limit="never")
    M_c = 2 * F_T * 350 + 2 * F_T * 50 - (900 - 4 * F_T) * 50
    assert result.resistance["M_kNm"] == pytest.approx((M_c - 900 * 120) / 1e3, rel=1e-6)


@both
def test_too_much_axial_tension_leaves_no_moment(method):
    """Four M24 8.8 carry 812 kN."""
    joint = plain_joint(((350.0, 2), (50.0, 2)), flange_distance=400.0)
    result = answer(method, joint, (820.0, 0.0, 1.0))
    assert result.status == "fail"
    assert result.resistance["M_kNm"] == 0.0
    assert answer(method, joint, (800.0, 0.0, 1.0)).resistance["M_kNm"] > 0


def test_brittle_rows_keep_to_a_triangle():
    """The second row at most 340/450 of the first, the third 60/450; a flange that never governs."""
    joint = plain_joint(flange=(300.0, 30.0))
    result = answer(plastic, joint, limit="always")
    first = 2 * F_T
    assert result.row_forces_kN == pytest.approx((first, first * 340 / 450, first * 60 / 450), rel=1e-6)
    assert result.resistance["M_kNm"] == pytest.approx(answer(elastic, joint).resistance["M_kNm"], rel=1e-9)


def test_a_triangle_counts_force_per_bolt():
    """A first row of two and a second of four: per bolt 340/450 of the first row's, so twice that for the row."""
    joint = plain_joint(((450.0, 2), (340.0, 4)), flange=(300.0, 40.0))
    result = answer(plastic, joint, limit="always")
    assert result.row_forces_kN == pytest.approx((2 * F_T, 4 * F_T * 340 / 450), rel=1e-6)


def with_column(joint, thickness, grade):
    section = Section(designation=None, shape="I", h_mm=300, b_mm=300, tf_mm=thickness)
    column = JointMember(global_id="c", name="column", end=None, section=section, grade=grade)
    return joint.model_copy(update={"supporting": column})


@pytest.mark.parametrize(
    ("plate", "column", "brittle"),
    [
        (19.0, None, False),
        (20.0, None, True),
        (25.0, (21.0, "S275"), False),
        (25.0, (22.0, "S275"), True),
        (25.0, (None, "S275"), True),
        (25.0, (12.0, None), True),
    ],
)
def test_rows_are_brittle_unless_a_plate_yields_first(plate, column, brittle):
    """M24 8.8: 24/1.9·√(800/345) = 19.2 mm in S355 over 16 mm thick, in S275 21.9 mm; what is not known is no help."""
    joint = plain_joint(plate_thickness=plate, flange=(300.0, 30.0), plate_grade="S355")
    joint = with_column(joint, *column) if column else joint
    free, shown = answer(plastic, joint, limit="never"), answer(plastic, joint, limit="brittle_rows")
    assert (shown.resistance["M_kNm"] < 0.999 * free.resistance["M_kNm"]) == brittle


def test_the_ductile_thickness():
    """SCI P398, step 1C (from memory): M24 8.8 on S275 over 16 mm thick, 24/1.9·√(800/265) = 21.9 mm."""
    assert ductile_thickness(24.0, 800.0, 265.0) == pytest.approx(21.9, abs=0.06)


@pytest.mark.parametrize(
    ("changes", "words"),
    [({"plate_grade": None}, "the end plate's yield strength is not known"), ({}, "thicker than t_max")],
)
def test_why_rows_are_brittle_is_said(changes, words):
    result = answer(plastic, plain_joint(plate_thickness=30.0, flange=(300.0, 30.0), **changes))
    assert words in steps(result)["F_2"].reference


def test_shear_takes_from_the_tension_of_each_bolt():
    """V = 6·0.5·F_v,Rd: each bolt keeps 1.4·(1 − 0.5) = 0.7 of F_t,Rd (Table 3.4)."""
    joint = plain_joint(flange=(300.0, 30.0))
    F_v = 0.6 * 800 * 0.7853981634 * (24 - 0.9382 * 3) ** 2 / 1.25 / 1e3
    result = answer(plastic, joint, (0.0, 6 * 0.5 * F_v, 100.0), limit="never")
    assert result.resistance["M_kNm"] == pytest.approx(0.7 * result.resistance["M_without_V_kNm"], rel=1e-9)
    assert result.utilisation == pytest.approx(max(100 / result.resistance["M_kNm"], 0.5))
    little = answer(plastic, joint, (0.0, 6 * 0.2 * F_v, 100.0), limit="never")
    assert set(little.resistance) == {"M_kNm"}


def test_shear_and_tension_together_govern_the_elastic_check():
    """F_v/F_v,Rd + F_t/(1.4 F_t,Rd) of the first row's bolts, with V over all six."""
    M, V = 200.0, 400.0
    result = answer(elastic, plain_joint(), (0.0, V, M))
    F_v = 0.6 / 0.9 * F_T
    F_t = M * 1e3 * 450 / 643.4e3
    assert result.utilisation == pytest.approx(V / 6 / F_v + F_t / (1.4 * F_T), rel=1e-6)
    assert result.governing == "row 1, bolt tension and shear"


@both
def test_more_shear_than_the_bolts_carry_fails_without_any_moment(method):
    result = answer(method, plain_joint(), (0.0, 900.0, 0.0))
    assert result.status == "fail"
    assert result.governing == "bolt shear"
    assert result.utilisation == pytest.approx(900 / 6 / (0.6 / 0.9 * F_T), rel=1e-6)


@both
def test_inputs_tell_where_they_came_from(method):
    told = steps(answer(method, plain_joint(), (50.0, 20.0, 30.0)))
    assert all("given: plain figures" in told[symbol].reference for symbol in ("d", "f_ub", "y_1", "t_fc", "f_y,fc"))
    assert all("LC1, plain figures" in told[symbol].reference for symbol in ("N_Ed", "V_Ed", "M_Ed"))


@both
@pytest.mark.parametrize("slope", [12.0, -7.0])
def test_the_action_of_a_sloping_member_is_resolved_on_the_interface(method, slope):
    """A plumb load of 100 kN and a pull of 40 kN square to an upright plate, in the axes of a member that slopes."""
    s, c = math.sin(math.radians(slope)), math.cos(math.radians(slope))
    N, V = 40 * c - 100 * s, 100 * c + 40 * s
    sloping, square = (
        answer(method, plain_joint(slope=slope), (N, V, 90.0)),
        answer(method, plain_joint(), (40, 100, 90)),
    )
    assert sloping.utilisation == pytest.approx(square.utilisation)
    assert sloping.resistance == pytest.approx(square.resistance)
    assert steps(sloping)["N_i"].value == pytest.approx(40.0)
    assert steps(sloping)["V_i"].value == pytest.approx(100.0)


def test_an_open_joint_pulls_as_in_the_elastic_check_while_it_can():
    joint = plain_joint(((350.0, 2), (250.0, 4), (50.0, 2)), flange_distance=400.0)
    linear = answer(elastic, joint, (500.0, 0.0, 12.0))
    assert linear.compression_kN == 0.0
    for limit in ("never", "always"):
        assert answer(plastic, joint, (500.0, 0.0, 12.0), limit=limit).row_forces_kN == linear.row_forces_kN


def test_only_rows_that_stretch_even_out_an_axial_tension():
    """Eight M24 8.8 carry 1624 kN if each takes its part; linearly the two lowest would be overloaded by 1400 kN."""
    joint = plain_joint(((350.0, 2), (250.0, 4), (50.0, 2)), flange_distance=400.0)
    assert answer(elastic, joint, (1400.0, 0.0, 1.0)).status == "fail"
    assert answer(plastic, joint, (1400.0, 0.0, 1.0), limit="always").status == "fail"
    stretched = answer(plastic, joint, (1400.0, 0.0, 1.0), limit="never")
    assert stretched.status == "pass"
    assert sum(stretched.row_forces_kN) - stretched.compression_kN == pytest.approx(1400.0)
    assert all(force <= n * F_T * (1 + 1e-9) for force, n in zip(stretched.row_forces_kN, (2, 4, 2), strict=True))


def test_the_limit_of_an_open_joint():
    """Rows at 350 and 50 mm of two bolts, N = 700 kN midway: the upper at 2 F_t, the lower at 700 − 2 F_t."""
    result = answer(elastic, plain_joint(((350.0, 2), (50.0, 2)), flange_distance=400.0), (700.0, 0.0, 1.0))
    M_c = 2 * F_T * 350 + (700 - 2 * F_T) * 50
    assert result.resistance["M_kNm"] == pytest.approx((M_c - 700 * 200) / 1e3, rel=1e-6)
    assert "row 1, bolt tension" in result.governing


def test_each_flange_has_its_own_resistance_when_both_are_pressed():
    """N = −800 kN midway, no moment to speak of: 400 kN on each; the top flange lies at 60° and is good for half."""
    joint = plain_joint(((450.0, 2), (60.0, 2)), flange_distance=400.0, inclinations=(0.0, 60.0))
    for method in METHODS:
        result = answer(method, joint, (-800.0, 0.0, 1e-6))
        assert result.utilisation == pytest.approx(400 / (F_C / 2), rel=1e-6)
        assert result.governing == "tension flange, pressed"
