"""EN 1993-1-8:2005, Table 3.4: design resistances of single bolts, γ_M2 = 1.25, threads in the shear plane.

Figures as handbooks print them from tabulated stress areas (ISO 898-1); computed independently, familiar from
handbooks. The strengths are those of Table 3.1: 4.6, 8.8 and 10.9 seen in print, the others from memory.
"""

import pytest

from ifcjoints.checking.runner import run_check
from ifcjoints.checking.testing import plain_joint, plain_subject
from ifcjoints.tables.bolts import bolt_grade, tensile_stress_area
from ifcjoints_bolt_groups.bolts_en1993 import combined, tension_beside_shear
from ifcjoints_bolt_groups.elastic import elastic

RESISTANCES = [
    (16, "8.8", 90.4, 60.3),
    (20, "8.8", 141.1, 94.1),
    (24, "8.8", 203.3, 135.6),
    (30, "8.8", 323.1, 215.4),
    (16, "10.9", 113.0, 62.8),
    (20, "10.9", 176.4, 98.0),
    (24, "10.9", 254.2, 141.2),
    (30, "10.9", 403.9, 224.4),
]


@pytest.mark.parametrize(("diameter", "grade", "tension", "shear"), RESISTANCES)
def test_resistances(diameter, grade, tension, shear):
    """Tabulated areas are rounded to 1 mm², so the figures agree to three digits."""
    result = run_check(elastic, plain_subject(plain_joint(bolt=(float(diameter), grade))))
    steps = {step.symbol: step.value for step in result.steps}
    assert steps["F_t,Rd"] == pytest.approx(tension, rel=2.5e-3)
    assert steps["F_v,Rd"] == pytest.approx(shear, rel=2.5e-3)


@pytest.mark.parametrize(
    ("grade", "f_yb", "f_ub"),
    [("4.6", 240, 400), ("4.8", 320, 400), ("5.6", 300, 500), ("5.8", 400, 500), ("6.8", 480, 600), ("8.8", 640, 800),
     ("10.9", 900, 1000)],
)  # fmt: skip
def test_strengths_of_table_3_1(grade, f_yb, f_ub):
    found = bolt_grade(grade)
    assert found is not None
    assert (found.f_yb, found.f_ub) == (f_yb, f_ub)


@pytest.mark.parametrize(
    ("diameter", "area"), [(12, 84.3), (16, 157), (20, 245), (22, 303), (24, 353), (27, 459), (30, 561), (36, 817)]
)
def test_stress_areas_of_iso_898_1(diameter, area):
    """ISO 898-1 prints the areas to three digits (from memory)."""
    assert tensile_stress_area(diameter) == pytest.approx(area, abs=0.51 if area > 100 else 0.06)


def test_a_bolt_full_in_tension_keeps_two_sevenths_of_its_shear():
    """1 − 1/1.4 of F_v,Rd; design guides for portal frames take 0.28 (Single-Storey Steel Buildings, Part 11)."""
    assert combined(0.28, 1.0, 1.0, 1.0) <= 1.0
    assert combined(1 - 1 / 1.4, 1.0, 1.0, 1.0) == pytest.approx(1.0)
    assert tension_beside_shear(1 - 1 / 1.4, 1.0, 50.0) == pytest.approx(50.0)
