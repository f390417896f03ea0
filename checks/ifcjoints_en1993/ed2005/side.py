"""One side of a joint: a flange or plate that the rows pull on, the web behind it, and the limits that both set.

A column's flange and an end plate become the same thing here, so that rows and groups are worked out by one engine:
EN 1993-1-8:2005, 6.2.6.3, 6.2.6.4, 6.2.6.5 and 6.2.6.8.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import dataclass, replace
from typing import Generic

from ifcjoints.checking import N

from ..figures import Sheets, Step
from .bolts import TABLE as TABLE_3_4
from .bolts import punching_resistance
from .effective_lengths import (
    Lengths,
    Neighbours,
    OutsidePlace,
    Place,
    alone,
    circular_alone,
    non_circular_alone,
    of_group,
    share_circular,
    share_non_circular,
)
from .inputs import Bolts, Factors
from .limits import Component, Limit, named, rows_in_figures, rows_in_words
from .rows import Run
from .t_stub import Flange, resistance

WebResistance = Callable[[N, str, Step[N]], N]
"""Gives a web's resistance from b_eff, the index of its symbol, and the sheet to write on."""


@dataclass(frozen=True, slots=True)
class Outside(Generic[N]):
    """The row outside the tension flange of an end plate: its number from 0, and its place."""

    row: int
    place: OutsidePlace[N]


@dataclass(frozen=True, slots=True)
class Side(Generic[N]):
    """A flange or plate with its rows, and its web.

    `flange` has the m and e_min that the rows between the flanges share; `mark` is its index in symbols, `reference`
    the table of its lengths.
    """

    bending: Component
    punching: Component
    tension: Component
    where: str
    mark: str
    reference: str
    flange: Flange[N]
    f_u: N
    web: WebResistance[N]
    runs: tuple[Run[N], ...]
    outside: Outside[N] | None = None


def limits_of(side: Side[N], bolts: Bolts[N], factors: Factors[N], sheets: Sheets[N]) -> Iterator[Limit[N]]:
    """Work out what every row alone and every group of rows can carry on this side."""
    if side.outside is not None:
        rows, place = (side.outside.row,), side.outside.place
        flange = replace(side.flange, m=place.m_x, e_min=place.e_x)
        step = sheets(_title(side, side.bending, rows))
        yield _bending(side, flange, rows, alone(place, side.reference, step), bolts, factors, step)
        yield from _punching(side, rows, bolts, factors, sheets)
    for run in side.runs:
        for first in range(len(run.rows)):
            yield from _punching(side, (run.rows[first],), bolts, factors, sheets)
            for last in range(first, len(run.rows)):
                yield from _between_flanges(side, run, first, last, bolts, factors, sheets)


def _between_flanges(
    side: Side[N], run: Run[N], first: int, last: int, bolts: Bolts[N], factors: Factors[N], sheets: Sheets[N]
) -> Iterator[Limit[N]]:
    """Yield what flange or plate, and the web, allow the rows of a run from the first to the last."""
    rows = run.rows[first : last + 1]
    step = sheets(_title(side, side.bending, rows))
    if first == last:
        lengths = alone(run.places[first], side.reference, step)
    else:
        lengths = of_group(run.places[first : last + 1], run.neighbours(first, last), side.reference, step)
    yield _bending(side, side.flange, rows, lengths, bolts, factors, step)
    web = side.web(lengths.mode_1, rows_in_figures(rows), sheets(_title(side, side.tension, rows)))
    yield Limit(rows, side.tension, web, side.where)


def _bending(
    side: Side[N],
    flange: Flange[N],
    rows: tuple[int, ...],
    lengths: Lengths[N],
    bolts: Bolts[N],
    factors: Factors[N],
    step: Step[N],
) -> Limit[N]:
    F_t = step("ΣF_t,Rd", 2 * len(rows) * bolts.F_tRd, "kN", TABLE_3_4)
    symbol = f"F_t,{side.mark},{rows_in_figures(rows)}"
    strength = resistance(flange, lengths, len(rows), F_t, factors.gamma_M0, symbol, step)
    patterns = {"mode 2": "non-circular", "mode 3": ""}
    pattern = patterns.get(strength.mode, lengths.pattern)
    return Limit(rows, side.bending, strength.F_TRd, side.where, strength.mode, pattern)


def _punching(
    side: Side[N], rows: tuple[int, ...], bolts: Bolts[N], factors: Factors[N], sheets: Sheets[N]
) -> Iterator[Limit[N]]:
    if bolts.d_m is not None:
        step = sheets(_title(side, side.punching, rows))
        B_p = step(
            "B_p,Rd", punching_resistance(bolts.d_m, side.flange.t_f, side.f_u, factors.gamma_M2), "kN", TABLE_3_4
        )
        yield Limit(rows, side.punching, step(f"B_p,{rows_in_figures(rows)}", 2 * B_p, "kN", TABLE_3_4), side.where)


def _title(side: Side[N], component: Component, rows: tuple[int, ...]) -> str:
    return f"{rows_in_words(rows)}, {named(component, side.where)}"


def smallest_lengths(side: Side[N]) -> dict[int, tuple[N, N]]:
    """ℓ_eff and m of each row for its stiffness: the smallest of all lengths the tables give it, alone or in a group.

    EN 1993-1-8:2005, Table 6.11 (k_3, k_4, k_5).
    """
    lengths: dict[int, tuple[N, N]] = {}
    if side.outside is not None:
        place = side.outside.place
        lengths[side.outside.row] = (min(_alone(place), key=float), place.m_x)
    for run in side.runs:
        for index, (row, between) in enumerate(zip(run.rows, run.places, strict=True)):
            candidates = _alone(between)
            for beside in _memberships(run, index):
                candidates += [share_circular(between, beside), share_non_circular(between, beside)]
            lengths[row] = (min(candidates, key=float), between.m)
    return lengths


def _alone(place: Place[N] | OutsidePlace[N]) -> list[N]:
    return [circular_alone(place), non_circular_alone(place)]


def _memberships(run: Run[N], index: int) -> Iterator[Neighbours[N]]:
    """Yield a row's neighbours in the kinds of groups it can stand in: last of the ones above, first below, amid."""
    above = run.pitches[index - 1] if index > 0 else None
    below = run.pitches[index] if index < len(run.pitches) else None
    if above is not None:
        yield Neighbours(above, None)
    if below is not None:
        yield Neighbours(None, below)
    if above is not None and below is not None:
        yield Neighbours(above, below)
