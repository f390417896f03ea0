"""Bolt rows on a column flange or an end plate: which lie together between stiffeners, and where each lies.

Rows are counted from the one farthest from the centre of compression inwards; heights are measured from there, mm.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from itertools import pairwise
from typing import Generic

from ifcjoints.checking import N, NotApplicable

from ..figures import SQRT2, Step
from .alpha import FIGURE, alpha, lambda_1, lambda_2
from .effective_lengths import Neighbours, Place

GEOMETRY = "EN 1993-1-8:2005, Figures 6.8 to 6.11"


def bolt_to_web(w: N, t_w: N, s: N) -> N:
    """m: from the bolt to the toe at the web; s is the root radius of a rolled section, √2·a beside a fillet weld."""
    return (w - t_w) / 2 - 0.8 * s


def bolt_to_flange(clear: N, a: N) -> N:
    """m_x or m_2: from the bolt to the toe of the weld at a flange or stiffener whose face is `clear` away."""
    return clear - 0.8 * (SQRT2 * a)


def edge(b: N, w: N) -> N:
    """e: from the bolt to the edge of a flange or plate of width `b`, the gauge w in its middle."""
    return (b - w) / 2


@dataclass(frozen=True, slots=True)
class Stiffener(Generic[N]):
    """What stiffens a flange or plate across: height of its middle, thickness, throat of its fillet welds; mm."""

    h: N
    t: N
    a: N

    def clear(self, h: N) -> N:
        """Distance of a row at this height from the stiffener's nearer face."""
        return (h - self.h if float(h) > float(self.h) else self.h - h) - self.t / 2


@dataclass(frozen=True, slots=True)
class Run(Generic[N]):
    """Rows with no stiffener between them: their numbers from 0, places, and the pitches from each to the next."""

    rows: tuple[int, ...]
    places: tuple[Place[N], ...]
    pitches: tuple[N, ...]

    def neighbours(self, first: int, last: int) -> list[Neighbours[N]]:
        """The pitches beside each row of the group from the run's `first` to its `last` row."""
        between: list[N | None] = [None]
        between.extend(self.pitches[first:last])
        between.append(None)
        return [Neighbours(above, below) for above, below in pairwise(between)]


def runs_of(
    heights: Sequence[N],
    rows: Sequence[int],
    place: Place[N],
    stiffeners: Sequence[Stiffener[N]],
    ends: Sequence[N],
    step: Step[N],
) -> tuple[Run[N], ...]:
    """Part rows at the stiffeners, and find each row's place; `place` has the m and e they share.

    `ends` are the heights at which the flange or plate stops. NotApplicable where a row lies on a stiffener's weld.
    """
    groups: list[list[int]] = []
    for row in rows:
        if groups and not any(_between(s, heights[row], heights[groups[-1][-1]]) for s in stiffeners):
            groups[-1].append(row)
        else:
            groups.append([row])
    return tuple(_run(heights, group, place, stiffeners, ends, step) for group in groups)


def _between(stiffener: Stiffener[N], low: N, high: N) -> bool:
    return float(low) < float(stiffener.h) < float(high)


def _run(
    heights: Sequence[N],
    rows: list[int],
    place: Place[N],
    stiffeners: Sequence[Stiffener[N]],
    ends: Sequence[N],
    step: Step[N],
) -> Run[N]:
    places = []
    for row in rows:
        beside: list[tuple[N, Stiffener[N] | None]] = []
        if row == rows[0]:
            beside += _next(heights[row], stiffeners, ends, 1)
        if row == rows[-1]:
            beside += _next(heights[row], stiffeners, ends, -1)
        places.append(_place(heights[row], row, place, beside, step))
    pitches = tuple(
        step(f"p_{upper + 1}", heights[upper] - heights[lower], "mm", GEOMETRY) for upper, lower in pairwise(rows)
    )
    return Run(tuple(rows), tuple(places), pitches)


def _next(h: N, stiffeners: Sequence[Stiffener[N]], ends: Sequence[N], way: int) -> list[tuple[N, Stiffener[N] | None]]:
    """What comes next above (+1) or below (−1) a row: a stiffener or a free end, with its height; or nothing."""
    things: list[tuple[N, Stiffener[N] | None]] = [(stiffener.h, stiffener) for stiffener in stiffeners]
    things += [(end, None) for end in ends]
    ahead = [thing for thing in things if way * (float(thing[0]) - float(h)) >= 0]
    return [min(ahead, key=lambda thing: way * float(thing[0]))] if ahead else []


def _place(h: N, row: int, place: Place[N], beside: list[tuple[N, Stiffener[N] | None]], step: Step[N]) -> Place[N]:
    """A row's own place: e_1 to a free end beside it, α of the nearest stiffener beside it."""
    mark = f"_row {row + 1}"
    clear = [bolt_to_flange(stiffener.clear(h), stiffener.a) for _, stiffener in beside if stiffener is not None]
    for end in [height for height, stiffener in beside if stiffener is None]:
        e_1 = end - h if float(end) > float(h) else h - end
        place = replace(place, e_1=step(f"e_1{mark}", e_1, "mm", GEOMETRY))
    if clear:
        m_2 = step(f"m_2{mark}", min(clear, key=float), "mm", GEOMETRY)
        if float(m_2) <= 0:
            raise NotApplicable(f"row {row + 1} lies on the weld of a flange or stiffener.")
        x = step(f"λ_1{mark}", lambda_1(place.m, place.e), "", FIGURE)
        y = step(f"λ_2{mark}", lambda_2(m_2, place.m, place.e), "", FIGURE)
        place = replace(place, alpha=step(f"α{mark}", alpha(x, y), "", FIGURE))
    return place
