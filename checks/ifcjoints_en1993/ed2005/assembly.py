"""The moment resistance put together from its components: EN 1993-1-8:2005, 6.2.7.2. N, mm, Nmm.

Rows are filled from the one farthest from the centre of compression inwards. Each takes the least of what it may alone
(6.2.7.2(6)), what the rows before it leave of each group that ends with it (8), what they leave of the panel's
resistance and of the compression's (7), and, below a row that the bolts limit, its share of a triangle (9).
"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from itertools import pairwise
from typing import Generic, Literal

from ifcjoints.checking import N

from ..figures import Step, number, smallest, total
from .limits import Cap, Limit

CLAUSE = "EN 1993-1-8:2005, 6.2.7.2"
BOLT_LIMITED = 1.9
"""A row above this many F_t,Rd of one bolt (of its two) is limited by its bolts and cannot stretch, 6.2.7.2(9)."""


@dataclass(frozen=True, slots=True)
class TriangularLimit:
    """How 6.2.7.2(9) is read: F_tr,Rd ≤ F_tx,Rd·h_r/h_x below a row x.

    `when`: "beyond_1.9", only below the farthest row whose F_tx,Rd exceeds 1.9 F_t,Rd, as the clause says; "always",
    below the farthest row whatever its force, for joints that cannot be shown to be ductile; "never", for national
    annexes that ask for a thin plate instead.
    `reach`: "all_rows", the row x may lie outside the flange in tension and limit rows inside it, as the clause says;
    "same_side", x is sought among the rows on the same side of that flange. Published tables exist for either reading.
    """

    when: Literal["beyond_1.9", "always", "never"] = "beyond_1.9"
    reach: Literal["all_rows", "same_side"] = "all_rows"


@dataclass(frozen=True, slots=True)
class Row(Generic[N]):
    """A bolt row: its lever arm h_r, and whether it lies outside the flange in tension."""

    h: N
    outside: bool = False


@dataclass(frozen=True, slots=True)
class Offer(Generic[N]):
    """What a row may carry by one of its limits. `limit` is None for the triangular one; `text` names it."""

    force: N
    text: str
    limit: Limit[N] | Cap[N] | None = None


@dataclass(frozen=True, slots=True)
class RowForce(Generic[N]):
    """F_tr,Rd of a row, and the limit that governs it."""

    row: Row[N]
    F_tRd: N
    governing: Offer[N]


@dataclass(frozen=True, slots=True)
class Assembly(Generic[N]):
    """M_j,Rd, the rows' forces at it, their sum, which the compression balances, and the reading of 6.2.7.2(9)."""

    M_jRd: N
    rows: tuple[RowForce[N], ...]
    compression: N
    reading: TriangularLimit

    @property
    def governing(self) -> str:
        """What governs M_j,Rd: a limit on all rows together if one is reached, else that of the farthest row."""
        caps = [row.governing.text for row in self.rows if isinstance(row.governing.limit, Cap)]
        return caps[0] if caps else self.rows[0].governing.text


def assemble(
    rows: Sequence[Row[N]],
    limits: Iterable[Limit[N]],
    caps: Sequence[Cap[N]],
    F_tRd: N,
    reading: TriangularLimit,
    step: Step[N],
) -> Assembly[N]:
    """Fill the rows, which come in the order of falling lever arms; `F_tRd` is one bolt's.

    ValueError where they come otherwise, or a lever arm is not above nothing.
    """
    arms = [float(row.h) for row in rows]
    if not arms or arms[-1] <= 0 or any(near >= far for far, near in pairwise(arms)):
        raise ValueError("rows come from the farthest inwards, each with a lever arm above nothing")
    ending = _by_last_row(limits)
    filled: list[RowForce[N]] = []
    for index, row in enumerate(rows):
        offers = [_alone(ending[index], index, step)]
        offers += _left_by_groups(ending[index], filled)
        offers += _left_by_caps(caps, filled)
        offers += _triangle(row, filled, F_tRd, reading)
        filled.append(_filled(row, index, offers, step))
    M_jRd = step("M_j,Rd", total(each.row.h * each.F_tRd for each in filled), "kNm", f"{CLAUSE}(1)")
    compression = step("ΣF_tr,Rd", total(each.F_tRd for each in filled), "kN", f"{CLAUSE}, compression, equilibrium")
    return Assembly(M_jRd, tuple(filled), compression, reading)


def _by_last_row(limits: Iterable[Limit[N]]) -> dict[int, list[Limit[N]]]:
    """A group limits the last of its rows: those nearer the centre of compression are ignored, 6.2.7.2(5)."""
    ending: dict[int, list[Limit[N]]] = {}
    for limit in limits:
        ending.setdefault(limit.rows[-1], []).append(limit)
    return ending


def _alone(limits: list[Limit[N]], index: int, step: Step[N]) -> Offer[N]:
    single = [limit for limit in limits if len(limit.rows) == 1]
    force = smallest([limit.resistance for limit in single])
    governing = min(single, key=lambda limit: float(limit.resistance))
    return Offer(step(f"F_t{index + 1},alone", force, "kN", f"{CLAUSE}(6)"), str(governing), governing)


def _left_by_groups(limits: list[Limit[N]], filled: list[RowForce[N]]) -> list[Offer[N]]:
    """What the rows before leave of each group's resistance: the tightest only, so that the sum can be read."""
    left = [
        Offer(limit.resistance - total(filled[row].F_tRd for row in limit.rows[:-1]), str(limit), limit)
        for limit in limits
        if len(limit.rows) > 1
    ]
    return _tightest(left)


def _left_by_caps(caps: Sequence[Cap[N]], filled: list[RowForce[N]]) -> list[Offer[N]]:
    """What the rows before leave of the panel's resistance and of those in compression: the tightest only."""
    if not filled:
        return _tightest([Offer(cap.resistance, str(cap), cap) for cap in caps])
    used = total(each.F_tRd for each in filled)
    return _tightest([Offer(cap.resistance - used, str(cap), cap) for cap in caps])


def _tightest(offers: list[Offer[N]]) -> list[Offer[N]]:
    return [min(offers, key=lambda offer: float(offer.force))] if offers else []


def _triangle(row: Row[N], filled: list[RowForce[N]], F_tRd: N, reading: TriangularLimit) -> list[Offer[N]]:
    """The row's share of the triangle below the row x, if there is one (9)."""
    before = [each for each in filled if reading.reach == "all_rows" or each.row.outside == row.outside]
    if reading.when == "beyond_1.9":
        before = [each for each in before if float(each.F_tRd) > BOLT_LIMITED * float(F_tRd)]
    if reading.when == "never" or not before:
        return []
    x = before[0]
    return [Offer(x.F_tRd * row.h / x.row.h, f"triangular limit below row {filled.index(x) + 1}")]


def _filled(row: Row[N], index: int, offers: list[Offer[N]], step: Step[N]) -> RowForce[N]:
    governing = min(offers, key=lambda offer: float(offer.force))
    force = number(0.0, row.h)
    if float(governing.force) > 0:
        force = smallest([offer.force for offer in offers])
    reference = f"{CLAUSE}(5) to (9); {governing.text}"
    return RowForce(row, step(f"F_t{index + 1},Rd", force, "kN", reference), governing)
