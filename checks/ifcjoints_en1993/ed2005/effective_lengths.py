"""Effective lengths of T-stubs: EN 1993-1-8:2005, Tables 6.4, 6.5 and 6.6. All in mm.

The tables name a row by its place: an inner row, an end row (next to a free end at e_1, or the last of its group), a
row beside a stiffener, a row outside the beam's tension flange. Each place has a circular pattern of yield lines and
non-circular ones; mode 1 takes the shorter, mode 2 the non-circular.

`p` of an inner row is the mean of the pitches on its two sides.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Generic, Literal

from ifcjoints.checking import N, least

from ..figures import Step, total

UNSTIFFENED = "EN 1993-1-8:2005, Table 6.4"
STIFFENED = "EN 1993-1-8:2005, Table 6.5"
END_PLATE = "EN 1993-1-8:2005, Table 6.6"


def circular(m: N) -> N:
    """ℓ_eff,cp of an inner row alone, or of one beside a stiffener."""
    return 2 * (math.pi * m)


def circular_end(m: N, e_1: N) -> N:
    """ℓ_eff,cp of an end row alone."""
    return least(circular(m), math.pi * m + 2 * e_1)


def non_circular(m: N, e: N) -> N:
    """ℓ_eff,nc of an inner row alone."""
    return 4 * m + 1.25 * e


def half(m: N, e: N) -> N:
    """One side of the non-circular pattern of a row alone."""
    return 2 * m + 0.625 * e


def non_circular_end(m: N, e: N, e_1: N) -> N:
    """ℓ_eff,nc of an end row alone."""
    return least(non_circular(m, e), half(m, e) + e_1)


def beside_stiffener(alpha: N, m: N) -> N:
    """ℓ_eff,nc of a row beside a stiffener, alone."""
    return alpha * m


def end_beside_stiffener(alpha: N, m: N, e: N, e_1: N) -> N:
    """ℓ_eff,nc of an end row beside a stiffener.

    Table 6.5 gives e_1 + αm − (2m + 0.625e) alone, which grows without end as the free end moves away; αm of a row far
    from any end bounds it here.
    """
    return least(alpha * m, e_1 + alpha * m - half(m, e))


def circular_inner_of_group(p: N) -> N:
    """ℓ_eff,cp of an inner row as part of a group."""
    return 2 * p


def circular_last_of_group(m: N, p: N) -> N:
    """ℓ_eff,cp of the first or last row of a group, or of a row of it beside a stiffener."""
    return math.pi * m + p


def circular_end_of_group(m: N, p: N, e_1: N) -> N:
    """ℓ_eff,cp of the first or last row of a group, next to a free end."""
    return least(circular_last_of_group(m, p), 2 * e_1 + p)


def inner_of_group(p: N) -> N:
    """ℓ_eff,nc of an inner row as part of a group: its pitch."""
    return p


def last_of_group(m: N, e: N, p: N) -> N:
    """ℓ_eff,nc of the first or last row of a group."""
    return half(m, e) + 0.5 * p


def end_of_group(m: N, e: N, p: N, e_1: N) -> N:
    """ℓ_eff,nc of the first or last row of a group, next to a free end."""
    return least(last_of_group(m, e, p), e_1 + 0.5 * p)


def beside_stiffener_of_group(alpha: N, m: N, e: N, p: N) -> N:
    """ℓ_eff,nc of a row beside a stiffener, as part of a group."""
    return 0.5 * p + alpha * m - half(m, e)


def circular_outside(m_x: N, w: N, e: N) -> N:
    """ℓ_eff,cp of the row outside the tension flange."""
    return least(circular(m_x), math.pi * m_x + w, math.pi * m_x + 2 * e)


def non_circular_outside(m_x: N, e_x: N, e: N, b_p: N, w: N) -> N:
    """ℓ_eff,nc of the row outside the tension flange."""
    return least(
        4 * m_x + 1.25 * e_x, e + 2 * m_x + 0.625 * e_x, 0.5 * b_p, 0.5 * w + 2 * m_x + 0.625 * e_x
    )  # fmt: skip


@dataclass(frozen=True, slots=True)
class Lengths(Generic[N]):
    """ℓ_eff of the circular and the non-circular pattern, of one row or summed over a group; ℓ_eff of the two modes."""

    circular: N
    non_circular: N
    mode_1: N
    mode_2: N

    @property
    def pattern(self) -> Literal["circular", "non-circular"]:
        """Which pattern mode 1 follows."""
        return "circular" if float(self.circular) < float(self.non_circular) else "non-circular"


@dataclass(frozen=True, slots=True)
class Place(Generic[N]):
    """Where a row lies: m to the web, e to the edge, e_1 to a free end if next to one, α if beside a stiffener."""

    m: N
    e: N
    e_1: N | None = None
    alpha: N | None = None


@dataclass(frozen=True, slots=True)
class OutsidePlace(Generic[N]):
    """Where a row outside the tension flange lies: m_x to the flange, e_x to the plate's end, e, b_p and gauge w."""

    m_x: N
    e_x: N
    e: N
    b_p: N
    w: N


@dataclass(frozen=True, slots=True)
class Neighbours(Generic[N]):
    """The pitches from a row to its neighbours in a group; None where it is the first or the last of it."""

    above: N | None
    below: N | None


def alone(place: Place[N] | OutsidePlace[N], reference: str, step: Step[N]) -> Lengths[N]:
    """ℓ_eff of a row considered individually."""
    cp = step("ℓ_eff,cp", circular_alone(place), "mm", reference)
    nc = step("ℓ_eff,nc", non_circular_alone(place), "mm", reference)
    return _of_modes(cp, nc, "ℓ_eff", reference, step)


def of_group(
    places: Sequence[Place[N]], neighbours: Sequence[Neighbours[N]], reference: str, step: Step[N]
) -> Lengths[N]:
    """Σℓ_eff of the rows of a group, in order from the first to the last."""
    cp = [share_circular(place, beside) for place, beside in zip(places, neighbours, strict=True)]
    nc = [share_non_circular(place, beside) for place, beside in zip(places, neighbours, strict=True)]
    return _of_modes(
        step("Σℓ_eff,cp", total(cp), "mm", reference),
        step("Σℓ_eff,nc", total(nc), "mm", reference),
        "Σℓ_eff", reference, step,
    )  # fmt: skip


def _of_modes(cp: N, nc: N, symbol: str, reference: str, step: Step[N]) -> Lengths[N]:
    return Lengths(cp, nc, step(f"{symbol},1", least(nc, cp), "mm", reference), nc)


def circular_alone(place: Place[N] | OutsidePlace[N]) -> N:
    """ℓ_eff,cp of a row alone, by its place."""
    if isinstance(place, OutsidePlace):
        return circular_outside(place.m_x, place.w, place.e)
    return circular(place.m) if place.e_1 is None else circular_end(place.m, place.e_1)


def non_circular_alone(place: Place[N] | OutsidePlace[N]) -> N:
    """ℓ_eff,nc of a row alone, by its place."""
    if isinstance(place, OutsidePlace):
        return non_circular_outside(place.m_x, place.e_x, place.e, place.b_p, place.w)
    m, e, e_1, alpha = place.m, place.e, place.e_1, place.alpha
    if alpha is not None:
        return beside_stiffener(alpha, m) if e_1 is None else end_beside_stiffener(alpha, m, e, e_1)
    return non_circular(m, e) if e_1 is None else non_circular_end(m, e, e_1)


def share_circular(place: Place[N], beside: Neighbours[N]) -> N:
    """What a row adds to Σℓ_eff,cp of its group."""
    p = pitch(beside)
    if beside.above is not None and beside.below is not None:
        return circular_inner_of_group(p)
    if place.e_1 is not None:
        return circular_end_of_group(place.m, p, place.e_1)
    return circular_last_of_group(place.m, p)


def share_non_circular(place: Place[N], beside: Neighbours[N]) -> N:
    """What a row adds to Σℓ_eff,nc of its group."""
    p = pitch(beside)
    if beside.above is not None and beside.below is not None:
        return inner_of_group(p)
    if place.alpha is not None:
        return beside_stiffener_of_group(place.alpha, place.m, place.e, p)
    if place.e_1 is not None:
        return end_of_group(place.m, place.e, p, place.e_1)
    return last_of_group(place.m, place.e, p)


def pitch(beside: Neighbours[N]) -> N:
    """Return p of a row of a group: the pitch to its one neighbour, or the mean of the two."""
    if beside.above is not None and beside.below is not None:
        return 0.5 * (beside.above + beside.below)
    one = beside.above if beside.above is not None else beside.below
    if one is None:
        raise ValueError("a row of a group has a neighbour")
    return one
