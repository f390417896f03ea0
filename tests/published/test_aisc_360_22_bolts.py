"""AISC 360-22, J3: design strengths φr_n of single bolts (LRFD, φ = 0.75) in kip.

As AISC Manual Tables 7-1 and 7-2 print them (from memory; agreed by an independent calculation from Table J3.2,
which was seen in print). J3.8: F'_nt, computed independently from the printed formula.
"""

import pytest

from ifcjoints.checking.runner import run_check
from ifcjoints.checking.testing import plain_joint, plain_subject
from ifcjoints_bolt_groups.bolts_aisc360 import reduced_tension_stress
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
]


@pytest.mark.parametrize(("inches", "grade", "tension", "shear"), STRENGTHS)
def test_strengths(inches, grade, tension, shear):
    joint = plain_joint(bolt=(inches * 25.4, grade), flange_grade="A992")
    result = run_check(elastic, plain_subject(joint, standard="AISC 360"))
    steps = {step.symbol: step.value for step in result.steps}
    assert steps["φR_nt"] / KIP == pytest.approx(tension, abs=0.11)
    assert steps["φR_nv"] / KIP == pytest.approx(shear, abs=0.11)


@pytest.mark.parametrize(("F_nt", "F_nv", "f_rv", "reduced"), [(90, 54, 30, 50.33), (113, 68, 20, 102.59)])
def test_tension_beside_shear(F_nt, F_nv, f_rv, reduced):
    assert reduced_tension_stress(F_nt * 1.0, F_nv * 1.0, f_rv * 1.0, 0.75) == pytest.approx(reduced, abs=0.01)
