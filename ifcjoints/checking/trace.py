"""The calculation trace: a figure that remembers how it was worked out.

A clause function is a pure function of plain figures. Called with floats it gives a float; called
with quantities it gives a quantity that knows its formula in symbols and in figures. So a trace and
a number always come from the same expression:

    >>> def tension_resistance(k_2: N, f_ub: N, A_s: N, gamma_M2: N) -> N:
    ...     return k_2 * f_ub * A_s / gamma_M2
    >>> trace = Trace()
    >>> k_2 = trace.given("k_2", 0.9, "", "Table 3.4")
    >>> F_tRd = trace.step("F_t,Rd", tension_resistance(k_2, ...), "kN", "Table 3.4")

Quantities are in N, mm and N/mm²; a step may show kN or kNm.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from typing import TypeVar

from ..model.results import Step

SCALE = {"kN": 1e3, "kNm": 1e6}
"""How many of the inner unit (N, Nmm) make one of a shown unit."""

CONSTANTS = {math.pi: "π", math.sqrt(2): "√2", math.sqrt(3): "√3"}
"""Numbers that a person would write as a symbol."""

_SUM, _QUOTIENT, _PRODUCT, _POWER, _ATOM = 1, 2, 3, 4, 5
"""How firmly a formula holds together. A quotient is looser than a product, so that a / b is never read into a·b."""


def figure(value: float) -> str:
    """Write a number as a person would put it into a formula."""
    if value == 0 or not math.isfinite(value):
        return f"{value:g}"
    decimals = max(0, 3 - math.floor(math.log10(abs(value)))) if abs(value) < 1e4 else 0
    text = f"{value:.{decimals}f}"
    return text.rstrip("0").rstrip(".") if "." in text else text


class Quantity:
    """A number with the formula that gave it. Compares and orders by value."""

    __slots__ = ("figures", "rank", "symbols", "value")

    def __init__(self, value: float, symbols: str, figures: str, rank: int = _ATOM) -> None:
        self.value = value
        self.symbols = symbols
        self.figures = figures
        self.rank = rank

    def __float__(self) -> float:
        return float(self.value)

    def __repr__(self) -> str:
        return f"Quantity({self.symbols} = {self.value:g})"

    def _wrapped(self, rank: int) -> tuple[str, str]:
        if self.rank < rank:
            return f"({self.symbols})", f"({self.figures})"
        negative = self.figures.startswith("-") or self.figures.startswith("−")
        return self.symbols, f"({self.figures})" if negative and rank > _SUM else self.figures

    def _join(self, other: Quantity | float, value: float, sign: str, ranks: tuple[int, int, int]) -> Quantity:
        left, right = self._wrapped(ranks[0]), _quantity(other)._wrapped(ranks[1])
        return Quantity(value, f"{left[0]}{sign}{right[0]}", f"{left[1]}{sign}{right[1]}", ranks[2])

    def __add__(self, other: Quantity | float) -> Quantity:
        return self._join(other, self.value + float(other), " + ", (_SUM, _SUM, _SUM))

    def __radd__(self, other: float) -> Quantity:
        return _quantity(other) + self

    def __sub__(self, other: Quantity | float) -> Quantity:
        return self._join(other, self.value - float(other), " − ", (_SUM, _QUOTIENT, _SUM))

    def __rsub__(self, other: float) -> Quantity:
        return _quantity(other) - self

    def __mul__(self, other: Quantity | float) -> Quantity:
        return self._join(other, self.value * float(other), "·", (_PRODUCT, _PRODUCT, _PRODUCT))

    def __rmul__(self, other: float) -> Quantity:
        return _quantity(other) * self

    def __truediv__(self, other: Quantity | float) -> Quantity:
        return self._join(other, self.value / float(other), " / ", (_PRODUCT, _POWER, _QUOTIENT))

    def __rtruediv__(self, other: float) -> Quantity:
        return _quantity(other) / self

    def __pow__(self, exponent: float) -> Quantity:
        shown = "²" if exponent == 2 else "³" if exponent == 3 else f"^{exponent:g}"
        base = self._wrapped(_ATOM)
        return Quantity(self.value**exponent, f"{base[0]}{shown}", f"{base[1]}{shown}", _POWER)

    def __neg__(self) -> Quantity:
        inner = self._wrapped(_QUOTIENT)
        return Quantity(-self.value, f"−{inner[0]}", f"−{inner[1]}", _SUM)

    def __lt__(self, other: Quantity | float) -> bool:
        return self.value < float(other)

    def __le__(self, other: Quantity | float) -> bool:
        return self.value <= float(other)

    def __gt__(self, other: Quantity | float) -> bool:
        return self.value > float(other)

    def __ge__(self, other: Quantity | float) -> bool:
        return self.value >= float(other)


N = TypeVar("N", float, Quantity)
"""A plain figure or a traced one: the type of a clause function's arguments."""


def _quantity(value: Quantity | float) -> Quantity:
    if isinstance(value, Quantity):
        return value
    return Quantity(value, CONSTANTS.get(value) or figure(value), figure(value))


def _function(name: str, value: float, arguments: Sequence[Quantity]) -> Quantity:
    symbols = "; ".join(argument.symbols for argument in arguments)
    figures = "; ".join(argument.figures for argument in arguments)
    return Quantity(value, f"{name}({symbols})", f"{name}({figures})", _ATOM)


def least(first: N, *others: N) -> N:
    """The smallest of the figures, as the standards write min(a; b)."""
    values: list[Quantity | float] = [first, *others]
    smallest = min(float(value) for value in values)
    if isinstance(first, Quantity):
        return _function("min", smallest, [_quantity(value) for value in values])
    return smallest


def greatest(first: N, *others: N) -> N:
    """The largest of the figures, as the standards write max(a; b)."""
    values: list[Quantity | float] = [first, *others]
    largest = max(float(value) for value in values)
    if isinstance(first, Quantity):
        return _function("max", largest, [_quantity(value) for value in values])
    return largest


def root(value: N) -> N:
    """The square root."""
    if isinstance(value, Quantity):
        return _function("√", math.sqrt(value.value), (value,))
    return math.sqrt(value)


class Trace:
    """The steps of one calculation, in the order a person would follow them."""

    def __init__(self) -> None:
        self.steps: list[Step] = []

    def given(self, symbol: str, value: float, unit: str, origin: str) -> Quantity:
        """Record an input and where it came from; return it for use in formulas."""
        self._record(symbol, "", "", value, unit, origin)
        return Quantity(value, symbol, figure(value))

    def constant(self, symbol: str, value: float) -> Quantity:
        """Return a number under a symbol without a line of its own (an index, a count already told)."""
        return Quantity(value, symbol, figure(value))

    def step(self, symbol: str, result: Quantity, unit: str, reference: str) -> Quantity:
        """Record a worked-out figure and its clause; return it under its symbol."""
        self._record(symbol, result.symbols, result.figures, result.value, unit, reference)
        return Quantity(result.value, symbol, figure(result.value))

    def _record(self, symbol: str, symbols: str, figures: str, value: float, unit: str, reference: str) -> None:
        shown = value / SCALE.get(unit, 1.0)
        self.steps.append(
            Step(
                symbol=symbol,
                expression=symbols,
                figures=figures,
                value=shown,
                unit=unit,
                reference=reference,
            )
        )
