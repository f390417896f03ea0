"""Steel Buildings in Europe, Single-Storey Steel Buildings, Part 11: Moment Connections, Table 4.23, splice in S355.

Two IPE 500, M24 8.8, six rows of two bolts 417, 347, 277, 207, 137 and 67 mm from the compression flange's centre line;
M_Rd = 426.3 kNm, seen in print. In S355 the first row fails in its bolts (2 F_t,Rd), so the triangular limit of
EN 1993-1-8:2005, 6.2.7.2(9), fixes all others: 426.3 = 2 F_t,Rd/417·Σh², whatever plate, welds and flange are. The
flange is made wide here, because the component method takes the beam's own compression resistance for it.
"""

import pytest

from ifcjoints.checking.runner import run_check
from ifcjoints.checking.testing import plain_joint, plain_subject
from ifcjoints_bolt_groups.elastic import elastic
from ifcjoints_bolt_groups.plastic import plastic

ROWS = (417.0, 347.0, 277.0, 207.0, 137.0, 67.0)


@pytest.mark.parametrize("method", [elastic, plastic], ids=lambda method: method.name)
def test_moment_of_six_rows_in_a_triangle(method):
    joint = plain_joint(
        tuple((height, 2) for height in ROWS), flange_distance=484.0, flange=(300.0, 16.0), bolt=(24.0, "8.8"),
        plate_thickness=25.0,
    )  # fmt: skip
    result = run_check(method, plain_subject(joint))
    assert result.resistance["M_kNm"] == pytest.approx(426.3, rel=2e-3)
    assert result.governing == "row 1, bolt tension"
