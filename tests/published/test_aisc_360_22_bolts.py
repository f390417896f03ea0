"""AISC 360-22, J3: design strengths φr_n of single bolts (LRFD, φ = 0.75) in kip.

As AISC Manual Tables 7-1 and 7-2 print them (from memory; agreed by an independent calculation from Table J3.2,
which was seen in print). J3.8: F'_nt, computed independently from the printed formula.
"""

import pytest

from ifcjoints.checking.runner import run_check
from ifcjoints.checking.testing import plain_joint, plain_subject
from ifcjoints.tables.bolts import bolt_grade
from ifcjoints_bolt_groups.bolts_aisc360 import combined, reduced_tension_stress
from ifcjoints_bolt_groups.elastic import elastic

KIP, KSI = 4.4482216, 6.894757
STRENGTHS = [
    (0.75, "A325N", 29.8, 17.9),
    (0.75, "A325X", 29.8, 22.5),
    (0.75, "A490N", 37.4, 22.5),
    (0.75, "A490X", 37.4, 27.8),
    (0.875, "A325N", 40.6, 24.3),
    (0.875, "A490X", 51.0, 37.9),
    (1.0, "A325N", 53.0, 31.8),
    (1.0, "A490N", 66.6, 40.0),
    (1.0, "A490X", 66.6, 49.5),
    (1.25, "A325N", 82.8, 49.7),
    (1.25, "A490N", 104.0, 62.6),
]


@pytest.mark.parametrize(("inches", "grade", "tension", "shear"), STRENGTHS)
def test_strengths(inches, grade, tension, shear):
    joint = plain_joint(bolt=(inches * 25.4, grade), flange_grade="A992")
    result = run_check(elastic, plain_subject(joint, standard="AISC 360"))
    steps = {step.symbol: step.value for step in result.steps}
    assert steps["d"] == pytest.approx(inches * 25.4)
    assert steps["φR_nt"] / KIP == pytest.approx(tension, abs=0.11)
    assert steps["φR_nv"] / KIP == pytest.approx(shear, abs=0.11)


@pytest.mark.parametrize(("F_nt", "F_nv", "f_rv", "reduced"), [(90, 54, 30, 50.33), (113, 68, 20, 102.59)])
def test_tension_beside_shear(F_nt, F_nv, f_rv, reduced):
    assert reduced_tension_stress(F_nt * 1.0, F_nv * 1.0, f_rv * 1.0, 0.75) == pytest.approx(reduced, abs=0.01)
    at_the_limit = combined(0.75 * reduced, 0.75 * F_nt, f_rv, 0.75 * F_nv)
    assert at_the_limit == pytest.approx(1.0, abs=2e-4)


@pytest.mark.parametrize(
    ("grade", "F_nt", "F_nv_N", "F_nv_X"),
    [
        ("A307", 45, 27, 27), ("A325", 90, 54, 68), ("F1852", 90, 54, 68), ("Group 120", 90, 54, 68),
        ("Group 144", 108, 65, 81), ("A490", 113, 68, 84), ("F2280", 113, 68, 84), ("Group 150", 113, 68, 84),
        ("Group 200", 150, 90, 113),
    ],
)  # fmt: skip
def test_nominal_stresses_of_table_j3_2(grade, F_nt, F_nv_N, F_nv_X):
    """In ksi, seen in print."""
    found, excluded = bolt_grade(grade), bolt_grade(f"{grade}-X")
    assert (found.F_nt / KSI, found.F_nv / KSI) == pytest.approx((F_nt, F_nv_N), abs=2e-3)
    assert excluded.F_nv / KSI == pytest.approx(F_nv_X, abs=2e-3)
