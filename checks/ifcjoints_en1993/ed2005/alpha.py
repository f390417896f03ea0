"""α of EN 1993-1-8:2005, Figure 6.11, for a row beside a stiffener or below a flange.

The figure is a chart of curves of equal α over λ_1 = m/(m + e) and λ_2 = m_2/(m + e). On the curve of α
(SCI P398, Joints in Steel Construction: Moment-Resisting Joints to Eurocode 3, Appendix G; from memory):

    λ_1,lim = 1.25/(α − 2.75),  λ_2,lim = α·λ_1,lim/2
    λ_1 = λ_1,lim                                                                        where λ_2 ≥ λ_2,lim
    λ_1 = λ_1,lim + (1 − λ_1,lim)·((λ_2,lim − λ_2)/λ_2,lim)^(0.185·α^1.785)              below it

The curve through a point is found by bisection between the chart's outermost curves, 4.45 and 8; a point beyond either
has that curve's α. Far from the stiffener the outer branch gives αm = 4m + 1.25e, the length of a row without one.
"""

from __future__ import annotations

import math

from ifcjoints.checking import N, NotApplicable, Quantity
from ifcjoints.checking.trace import figure

FIGURE = "EN 1993-1-8:2005, Figure 6.11, closed form of SCI P398, Appendix G"
LOWEST, HIGHEST = 4.45, 8.0
LAST_LAMBDA_1 = 0.9
"""Where the chart's axis of λ_1 ends."""

HALVINGS = 48
"""(8 − 4.45)/2^48: exact to the last digit that a float holds."""


def lambda_1(m: N, e: N) -> N:
    """λ_1 of Figure 6.11."""
    return m / (m + e)


def lambda_2(m_2: N, m: N, e: N) -> N:
    """λ_2 of Figure 6.11; `m_2` is the distance from the bolt to the toe of the stiffener's weld."""
    return m_2 / (m + e)


def alpha(lambda_1: N, lambda_2: N) -> N:
    """α of Figure 6.11. NotApplicable where λ_1 lies off the chart."""
    if float(lambda_1) > LAST_LAMBDA_1:
        raise NotApplicable(
            f"λ_1 = {float(lambda_1):.3f} lies off the chart of EN 1993-1-8, Figure 6.11; it ends at {LAST_LAMBDA_1}."
        )
    value = _curve_through(float(lambda_1), float(lambda_2))
    if isinstance(lambda_1, Quantity) and isinstance(lambda_2, Quantity):
        symbols = f"α({lambda_1.symbols}; {lambda_2.symbols})"
        return Quantity(value, symbols, f"α({figure(lambda_1.value)}; {figure(lambda_2.value)})")
    return value


def _curve_through(x: float, y: float) -> float:
    low, high = LOWEST, HIGHEST
    if x <= on_curve(high, y):
        return high
    for _ in range(HALVINGS):
        middle = (low + high) / 2
        low, high = (middle, high) if x < on_curve(middle, y) else (low, middle)
    return low


def on_curve(alpha: float, lambda_2: float) -> float:
    """λ_1 of the point of a curve of equal α at λ_2."""
    x_limit = 1.25 / (alpha - 2.75)
    y_limit = alpha * x_limit / 2
    if lambda_2 >= y_limit:
        return x_limit
    below = (y_limit - lambda_2) / y_limit
    return x_limit + (1 - x_limit) * math.pow(below, 0.185 * math.pow(alpha, 1.785))
