"""What clause functions and the engine share: plain numbers of either kind, and the sheets a calculation is written on.

Everything here and in the editions is generic over `N`: called with floats it gives floats, called with the traced
quantities of a calculation it gives quantities that know their formula.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Sequence
from functools import reduce
from operator import add
from typing import Protocol

from ifcjoints.checking import N, Quantity, least
from ifcjoints.checking.trace import figure

SQRT2 = math.sqrt(2)
SQRT3 = math.sqrt(3)


class Step(Protocol[N]):
    """Records a worked-out figure with its symbol, unit and clause, and hands it back under that symbol.

    `Trace.step` is one; so is what :func:`untraced` gives.
    """

    def __call__(self, symbol: str, result: N, unit: str, reference: str) -> N:
        """Return the figure, recorded."""


Sheets = Callable[[str], Step[N]]
"""Gives the sheet on which the calculation of this title is written ("row 2, end plate in bending")."""


def untraced(title: str) -> Step[float]:
    """Return a sheet on which nothing is written: for plain numbers."""
    return _hand_back


def _hand_back(symbol: str, result: float, unit: str, reference: str) -> float:
    return result


def number(value: float, like: N) -> N:
    """Return a plain number as the same kind of figure as `like`."""
    if isinstance(like, Quantity):
        return Quantity(value, figure(value), figure(value))
    return value


def smallest(figures: Sequence[N]) -> N:
    """The smallest of at least one figure; a single one stays as it is."""
    return least(figures[0], *figures[1:]) if len(figures) > 1 else figures[0]


def total(figures: Iterable[N]) -> N:
    """The sum of at least one figure."""
    return reduce(add, figures)
