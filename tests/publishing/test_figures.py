from __future__ import annotations

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from ifcjoints.publishing import figures


@given(st.floats(min_value=0, max_value=1e6))
def test_a_utilisation_never_reads_better_than_it_is(value: float) -> None:
    read = float(figures.ratio(value))
    assert (read <= 1.0) == (value <= 1.0)
    assert value - 1e-6 <= read < value + 0.01 + 1e-6


@pytest.mark.parametrize(
    ("value", "text"),
    [
        (1.004, "1.01"), (math.nextafter(1.0, 2.0), "1.01"), (1.0, "1.00"), (0.996, "1.00"), (0.83, "0.83"),
        (0.83305, "0.84"), (0.1 + 0.2, "0.30"), (0.0, "0.00"), (12.345, "12.35"),
    ],
)  # fmt: skip
def test_utilisations_are_rounded_up(value: float, text: str) -> None:
    assert figures.ratio(value) == text


@given(st.floats(min_value=0, max_value=1))
def test_all_means_all(value: float) -> None:
    assert (figures.percent(value) == "100 %") == (value == 1.0)


@given(st.floats(min_value=-1e6, max_value=1e6), st.floats(min_value=-1e6, max_value=1e6))
def test_a_figure_and_its_limit_can_be_told_apart(value: float, limit: float) -> None:
    first, second = (text.replace(figures.MINUS, "-") for text in figures.apart(value, limit))
    assert (first == second) == (value == limit)
    assert (float(first) < float(second)) == (value < limit)


@pytest.mark.parametrize(
    ("value", "text"),
    [(180.25, "180.2"), (-52.25, "−52.2"), (-0.04, "0.0"), (-0.0, "0.0"), (1234.56, "1234.6"), (-0.05001, "−0.1")],
)
def test_forces_and_lengths_to_a_tenth(value: float, text: str) -> None:
    assert figures.tenths(value) == text


@given(st.floats(min_value=-1e9, max_value=1e9).filter(lambda value: value == 0 or abs(value) > 1e-9))
def test_figures_of_a_calculation_keep_five_digits(value: float) -> None:
    read = float(figures.plain(value).replace(figures.MINUS, "-"))
    assert read == pytest.approx(value, rel=5.1e-5, abs=0)
