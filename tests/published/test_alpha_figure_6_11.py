"""α of EN 1993-1-8:2005, Figure 6.11, by the closed form of SCI P398, Appendix G (from memory).

The grid was computed independently of this project from the same closed form: a regression, no proof. The tolerance of
0.1 is what the chart itself can be read to. Exact and independent of the closed form: far from the stiffener αm is the
length 4m + 1.25e of a row without one, and the chart's outermost curves bound it.
"""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from ifcjoints.checking import NotApplicable, Trace
from ifcjoints_en1993.ed2005.alpha import alpha, lambda_1, on_curve
from ifcjoints_en1993.ed2005.effective_lengths import beside_stiffener, non_circular

COLUMNS = (0.2, 0.3, 0.4, 0.5, 0.6, 0.8, 1.0)
GRID = {
    0.30: (8.00, 7.78, 7.32, 7.09, 6.97, 6.92, 6.92),
    0.35: (8.00, 7.29, 6.84, 6.58, 6.44, 6.33, 6.32),
    0.40: (7.69, 6.88, 6.45, 6.20, 6.05, 5.90, 5.88),
    0.45: (7.29, 6.54, 6.14, 5.89, 5.74, 5.58, 5.53),
    0.50: (6.92, 6.23, 5.86, 5.64, 5.49, 5.33, 5.26),
    0.60: (6.27, 5.70, 5.40, 5.21, 5.09, 4.94, 4.87),
    0.70: (5.68, 5.24, 5.01, 4.86, 4.76, 4.65, 4.58),
}
POINTS = [(x, y, value) for x, row in GRID.items() for y, value in zip(COLUMNS, row, strict=True)]
across = st.floats(0.05, 0.9)
away = st.floats(0.01, 3.0)


@pytest.mark.parametrize(("x", "y", "value"), POINTS)
def test_grid(x, y, value):
    assert alpha(x, y) == pytest.approx(value, abs=0.1)


@given(st.floats(20.0, 80.0), st.floats(30.0, 120.0))
def test_far_from_the_stiffener_the_row_is_as_without_one(m, e):
    """αm = 4m + 1.25e wherever that lies between the outermost curves, 4.45 and 8."""
    found = beside_stiffener(alpha(lambda_1(m, e), 1.8), m)
    assert found == pytest.approx(min(max(non_circular(m, e), 4.45 * m), 8 * m), rel=1e-9)


@given(across, away, away)
def test_never_falls_towards_the_stiffener(x, y, other):
    near, far = sorted((y, other))
    assert alpha(x, near) >= alpha(x, far) - 1e-9


@given(across, across, away)
def test_never_rises_towards_the_edge(x, other, y):
    """The farther the bolt from the web, measured against the edge, the shorter αm in units of m."""
    near, far = sorted((x, other))
    assert alpha(near, y) >= alpha(far, y) - 1e-9


@given(across, away)
def test_lies_on_its_own_curve(x, y):
    value = alpha(x, y)
    assert 4.45 <= value <= 8.0
    if 4.4501 < value < 7.9999:
        assert on_curve(value, y) == pytest.approx(x, abs=1e-9)


def test_off_the_chart():
    with pytest.raises(NotApplicable, match=r"ends at 0\.9"):
        alpha(0.91, 0.5)


def test_traced_and_plain_are_one():
    trace = Trace()
    x, y = trace.given("λ_1", 0.4, "", "here"), trace.given("λ_2", 0.5, "", "here")
    found = alpha(x, y)
    assert found.value == alpha(0.4, 0.5)
    assert (found.symbols, found.figures) == ("α(λ_1; λ_2)", "α(0.4; 0.5)")
