"""V. B. Bhandari, Design of Machine Elements, Examples 7.5 and 7.6 (pp. 236-237): bolts in out-of-plane loading.

The printed figures are the bolt areas A; provenance (a), seen in print. The joint turns about the lower edge of
its plate, which stands here for the compression flange's centre line.
"""

import math

import pytest

from ifcjoints.checking.runner import run_check
from ifcjoints.checking.testing import plain_joint, plain_subject
from ifcjoints_bolt_groups.elastic import elastic


def forces(rows, load_kN, eccentricity_mm):
    joint = plain_joint(rows, flange_distance=rows[0][0], bolt=(20.0, "4.6"))
    subject = plain_subject(joint, (0.0, load_kN, load_kN * eccentricity_mm / 1000))
    result = run_check(elastic, subject)
    shear = next(step.value for step in result.steps if step.symbol == "F_v,Ed") * 1e3
    tension = next(step.value for step in result.steps if step.symbol == "F_t,Ed") * 1e3
    assert result.row_forces_kN[0] * 1e3 == pytest.approx(2 * tension)
    return tension, shear


def test_example_7_5_by_maximum_shear_stress():
    tension, shear = forces(((150.0, 2), (25.0, 2)), 25.0, 100.0)
    allowed = 380 / (2 * 2.5)
    assert math.hypot(tension / 2, shear) / allowed == pytest.approx(98.022213, rel=1e-6)


def test_example_7_6_by_principal_stress():
    tension, shear = forces(((550.0, 2), (50.0, 2)), 25.0, 500.0)
    allowed = 35
    assert (tension / 2 + math.hypot(tension / 2, shear)) / allowed == pytest.approx(401.446244, rel=1e-6)
