"""A joint's bolt rows, flanges and actions, as the statics of one direction see them.

Lengths in mm, forces in N, moments in Nmm, all traced. `y` is a row's lever arm from the flange that bears, `n` its
bolts, and M_c the moment of the actions about that flange's centre line.
"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass

from ifcjoints.checking import NotApplicable, Quantity, Subject, Trace
from ifcjoints.model.joints import Interface

from .flange import flange_resistance, interface_of, opposite
from .loads import STATICS
from .origins import origin

TURNED = "seen from the other flange, which is the one that bears or comes nearest to it"


@dataclass(frozen=True, slots=True)
class BoltRow:
    """A row of the joint: its place in `joint.rows`, its bolts and its lever arm."""

    index: int
    n: Quantity
    y: Quantity


@dataclass(frozen=True, slots=True)
class Group:
    """What one direction calls on, seen from the flange that bears.

    `rows` stand farthest first; the other flange lies at `z`, the member's axis at `e_N`. `tension` is what one
    bolt carries, `flange` and `other` what the two flanges carry in compression; `other` is None where no axial
    force acts, for then that flange is never pressed. `S_1` and `S_2` are Σny and Σny² of the rows with y > 0.
    """

    rows: tuple[BoltRow, ...]
    N: Quantity
    e_N: Quantity
    z: Quantity
    tension: Quantity
    flange: Quantity
    other: Quantity | None
    S_1: Quantity
    S_2: Quantity

    @property
    def pulling(self) -> tuple[BoltRow, ...]:
        """The rows on the tension side of the bearing flange."""
        return tuple(row for row in self.rows if row.y > 0)

    @property
    def count(self) -> Quantity:
        """All bolts of the rows."""
        return total(row.n for row in self.rows)

    def about_flange(self, M: Quantity) -> Quantity:
        """M_c of a moment M and the axial force."""
        return M + self.N * self.e_N if float(self.N) else M

    def M_c_alone(self, trace: Trace) -> Quantity:
        """M_c of the axial force without any moment."""
        return trace.step("M_c,N", self.N * self.e_N, "kNm", "the axial force alone")

    def about_axis(self, M_c: Quantity) -> Quantity:
        """The moment M that gives M_c beside the axial force."""
        return M_c - self.N * self.e_N if float(self.N) else M_c

    def turned(self, trace: Trace) -> Group:
        """Return the same joint seen from its other flange."""
        rows = [
            BoltRow(row.index, row.n, trace.step(f"y′_{row.index + 1}", self.z - row.y, "mm", TURNED))
            for row in reversed(self.rows)
        ]
        e_N = trace.step("e′_N", self.z - self.e_N, "mm", TURNED)
        flange = self.flange if self.other is None else self.other
        return Group(tuple(rows), self.N, e_N, self.z, self.tension, flange, self.flange, *sums(rows, "′", trace))

    def turned_moment(self, M_c: Quantity, trace: Trace) -> Quantity:
        """Return M_c about the other flange, in the opposite sense: N z − M_c."""
        return trace.step("M′_c", self.N * self.z - M_c, "kNm", TURNED)


@dataclass(frozen=True, slots=True)
class Spread:
    """Forces in N that balance the actions: rows by their place in `joint.rows`, and the two flanges' compression."""

    rows: dict[int, Quantity]
    flange: Quantity
    other: Quantity

    @property
    def compression(self) -> float:
        """The whole compression."""
        return float(self.flange) + float(self.other)

    def turned(self) -> Spread:
        """Return the same forces with the flanges' parts exchanged."""
        return Spread(self.rows, self.other, self.flange)


def group_of(subject: Subject, tension: Quantity, N: Quantity, trace: Trace) -> Group:
    """Record the rows and flanges of the subject's direction; NotApplicable where no row could pull."""
    interface, side = interface_of(subject), subject.tension_flange
    flange = flange_resistance(subject, opposite(side), trace)
    other = flange_resistance(subject, side, trace) if float(N) else None
    rows = _rows(subject, trace)
    if not any(row.y > 0 for row in rows):
        raise NotApplicable("no bolt row lies on the tension side of the compression flange.")
    z = trace.given("z", interface.flange_distance_mm, "mm", "between the flange centre lines")
    e_N = _axis(interface, subject, N, trace)
    return Group(tuple(rows), N, e_N, z, tension, flange, other, *sums(rows, "", trace))


def _axis(interface: Interface, subject: Subject, N: Quantity, trace: Trace) -> Quantity:
    e_N = interface.axis_lever_arm(subject.tension_flange)
    if not float(N):
        return trace.constant("e_N", e_N)
    return trace.given("e_N", e_N, "mm", "the member's axis from the compression flange's centre line")


def _rows(subject: Subject, trace: Trace) -> list[BoltRow]:
    told = origin(subject, "rows")
    rows = []
    for index, row in enumerate(subject.joint.rows):
        y = trace.given(f"y_{index + 1}", row.lever_arm(subject.tension_flange), "mm", f"row {index + 1}, {told}")
        n = trace.given(f"n_{index + 1}", row.count, "", f"bolts in row {index + 1}")
        rows.append(BoltRow(index, n, y))
    return sorted(rows, key=lambda row: -float(row.y))


def sums(rows: Sequence[BoltRow], mark: str, trace: Trace) -> tuple[Quantity, Quantity]:
    """Record Σny and Σny² over the rows with y > 0."""
    pulling = [row for row in rows if row.y > 0]
    if not pulling:
        return trace.constant("Σny", 0.0), trace.constant("Σny²", 0.0)
    S_1 = trace.step(f"Σny{mark}", total(row.n * row.y for row in pulling), "mm", f"{STATICS}, rows with y > 0")
    S_2 = trace.step(f"Σny{mark}²", total(row.n * row.y**2 for row in pulling), "mm²", f"{STATICS}, rows with y > 0")
    return S_1, S_2


def total(terms: Iterable[Quantity]) -> Quantity:
    """Return the sum of at least one quantity."""
    first, *others = terms
    for term in others:
        first = first + term
    return first
