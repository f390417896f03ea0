"""The trace: what is shown and what is worked out are one."""

import math
import re

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from ifcjoints.checking import Quantity, Trace, greatest, least, root
from ifcjoints.checking.trace import figure

numbers = st.floats(-900.0, 900.0).map(lambda value: round(value, 1)).filter(lambda value: abs(value) >= 0.5)


def evaluated(figures: str) -> float:
    """Evaluate what a person would read."""
    text = figures.replace("·", "*").replace("−", "-").replace("²", "**2").replace("³", "**3").replace("√", "math.sqrt")
    return eval(re.sub(r";", ",", text), {"math": math, "min": min, "max": max})


@st.composite
def formulas(draw, depth=4):
    """Draw a formula as a traced quantity and as a plain float."""
    if depth == 0 or draw(st.booleans()):
        value = draw(numbers)
        return Quantity(value, "x", figure(value)), value
    (a, x), (b, y) = draw(formulas(depth - 1)), draw(formulas(depth - 1))
    bare = draw(st.sampled_from(["neither", "left", "right"]))
    if bare == "left":
        a = x = draw(numbers)
    elif bare == "right":
        b = y = draw(numbers)
    kind = draw(st.sampled_from("+-*/^~<>r"))
    if kind == "+":
        return a + b, x + y
    if kind == "-":
        return a - b, x - y
    if kind == "*":
        return a * b, x * y
    if kind == "/":
        assume(abs(y) > 1e-6)
        return a / b, x / y
    if bare == "left":
        assume(kind in "+-*/")
    if kind == "^":
        assume(abs(x) < 1e9)
        return (a**2, x**2) if draw(st.booleans()) else (a**3, x**3)
    if kind == "~":
        return -a, -x
    if kind == "r":
        assume(x > 0)
        return root(a), math.sqrt(x)
    return (least(a, b), min(x, y)) if kind == "<" else (greatest(a, b), max(x, y))


@given(formulas())
def test_the_figures_shown_give_the_value_told(pair):
    traced, plain = pair
    assert float(traced) == pytest.approx(plain, rel=1e-12, abs=1e-12)
    assert evaluated(traced.figures) == pytest.approx(plain, rel=1e-9, abs=1e-9)


@given(st.lists(numbers, min_size=2, max_size=2))
def test_a_clause_function_gives_the_same_with_floats_and_with_quantities(pair):
    def clause(a, b):
        return 0.9 * a / (b + 1.25) - least(a, b) ** 2

    a, b = (Quantity(value, name, figure(value)) for value, name in zip(pair, "ab", strict=True))
    assert float(clause(a, b)) == clause(*pair)


def test_numbers_beside_quantities_are_written_out():
    a = Quantity(2.0, "a", "2")
    assert (1.25 / a).symbols == "1.25 / a"
    assert (3 - a).symbols == "3 − a"
    assert (0.9 * a + 1).symbols == "0.9·a + 1"
    assert (a * -1.5).figures == "2·(-1.5)"
    assert (a**1.5).symbols == "a^1.5"


def test_quantities_are_ordered_by_value():
    a, b = Quantity(2.0, "a", "2"), Quantity(3.0, "b", "3")
    assert a < b <= 3.0
    assert b > a >= 2.0
    assert least(b, a, 2.5).symbols == "min(b; a; 2.5)"
    assert (float(least(b, a, 2.5)), float(greatest(a, b, 2.5))) == (2.0, 3.0)
    assert (least(3.0, 2.0), greatest(3.0, 2.0), root(9.0)) == (2.0, 3.0, 3.0)


def test_a_step_goes_on_under_its_symbol_with_its_full_value():
    trace = Trace()
    third = trace.step("a", trace.given("b", 1.0, "mm", "measured") / 3, "mm", "statics")
    assert (third.symbols, third.figures, float(third)) == ("a", "0.3333", 1.0 / 3.0)
    assert [(step.expression, step.figures) for step in trace.steps] == [("", ""), ("b / 3", "1 / 3")]


def test_a_constant_has_no_line_of_its_own():
    trace = Trace()
    assert (trace.constant("n", 4) * 2).symbols == "n·2"
    assert trace.steps == []


@given(numbers, st.sampled_from(["mm", "", "N/mm²", "kN", "kNm"]))
def test_only_kilonewtons_and_kilonewton_metres_are_scaled(value, unit):
    """1 kN = 10³ N, 1 kNm = 10⁶ Nmm."""
    trace = Trace()
    inner = value * {"kN": 1000, "kNm": 1_000_000}.get(unit, 1)
    assert float(trace.given("x", inner, unit, "given")) == inner
    assert trace.steps[0].value == pytest.approx(value, rel=1e-12)


def test_symbols_are_bracketed_only_where_they_must_be():
    a, b, c = (Quantity(value, name, figure(value)) for value, name in ((2.0, "a"), (3.0, "b"), (4.0, "c")))
    assert (a * (b + c)).symbols == "a·(b + c)"
    assert (a - (b - c)).symbols == "a − (b − c)"
    assert (a / (b * c)).symbols == "a / (b·c)"
    assert (a * b + c).symbols == "a·b + c"
    assert ((a + b) ** 2).symbols == "(a + b)²"
    assert ((a**2) ** 3).symbols == "(a²)³"


def test_a_quotient_within_a_product_cannot_be_misread():
    """Written a / b·c, a person would take the product for the divisor."""
    a, b, c = (Quantity(value, name, figure(value)) for value, name in ((2.0, "a"), (3.0, "b"), (4.0, "c")))
    assert (a / b * c).symbols == "(a / b)·c"
    assert (a / b / c).symbols == "(a / b) / c"
    assert (a * b / c).symbols == "a·b / c"
    assert (a - b / c).symbols == "a − b / c"


def test_steps_are_told_in_the_unit_shown():
    trace = Trace()
    force = trace.given("F", 12_500.0, "kN", "given")
    moment = trace.step("M", force * trace.given("z", 400.0, "mm", "measured"), "kNm", "statics")
    assert [(step.symbol, step.value, step.unit) for step in trace.steps] == [
        ("F", 12.5, "kN"),
        ("z", 400.0, "mm"),
        ("M", 5.0, "kNm"),
    ]
    assert float(moment) == 5e6
    assert trace.steps[2].expression == "F·z"


@pytest.mark.parametrize(
    ("value", "text"),
    [(0.0, "0"), (0.9, "0.9"), (353.04, "353"), (1.25, "1.25"), (203_042.4, "203042"), (0.01234, "0.01234")],
)
def test_numbers_are_written_as_a_person_would(value, text):
    assert figure(value) == text


@given(st.floats(1e-12, 1e12), st.sampled_from([1, -1]))
def test_a_number_keeps_four_figures_and_loses_no_zeros_before_the_point(size, sign):
    shown = figure(sign * size)
    assert float(shown) == pytest.approx(sign * size, rel=5.001e-4)
    assert "e" not in shown
