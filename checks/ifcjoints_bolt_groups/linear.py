"""A stiff plate on bolts that only pull and flanges that only push.

The plate moves by w(y) = a + b y. Bolts pull in proportion to w where it is positive; a flange pushes where w = 0
at its centre line. For a given N and M_c there is one such state, and it is one of four:

- the plate turns about the bearing flange: F_r = n_r M_c y_r / Σny², C = ΣF − N ≥ 0;
- no row pulls: C = −N lies between the flanges at y_C = −M_c / (−N), and by statics of the two the bearing flange
  takes |N| (1 − y_C/z) = −N + M_c/z, the other one |N| y_C/z = −M_c/z;
- the joint is open: F_b = N/n + (M_c − N ȳ)(y − ȳ)/Σn(y − ȳ)² over the bolts with w > 0, which are those that the
  line w = 0 has passed; n, ȳ and the sum are theirs;
- the plate turns about the other flange: the first state seen from there, with M′_c = N z − M_c.

Force and moment balance in each, and the states meet where they border: at C = 0 the first gives F_b = N y/Σny, and
so does the third.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from ifcjoints.checking import NotApplicable, Quantity, Trace, least

from .group import BoltRow, Group, Spread, total
from .loads import STATICS

METHOD = "linear strain about the bearing flange's centre line"
OPEN = "joint open: linear strain about the centroid of the bolts that pull"
TWO_FLANGES = "no row pulls: statics of the two flanges"
SLACK = 1e-9


@dataclass(frozen=True, slots=True)
class OpenRows:
    """The rows that pull in an open joint, with the sums over their bolts."""

    rows: tuple[BoltRow, ...]
    n: Quantity
    mean: Quantity
    inertia: Quantity

    @classmethod
    def of(cls, rows: tuple[BoltRow, ...], trace: Trace) -> OpenRows:
        """Record the bolts, their centroid and their second moment about it."""
        n = trace.step("n", total(row.n for row in rows), "", OPEN)
        mean = trace.step("ȳ", total(row.n * row.y for row in rows) / n, "mm", OPEN)
        inertia = trace.step("Σn(y−ȳ)²", total(row.n * (row.y - mean) ** 2 for row in rows), "mm²", OPEN)
        return cls(rows, n, mean, inertia)

    def bolt_force(self, y: Quantity, M_c: Quantity, N: Quantity) -> Quantity:
        """The force of one bolt at lever arm y; N."""
        return N / self.n + (M_c - N * self.mean) * (y - self.mean) / self.inertia

    def moment_at(self, bolt_force: Quantity, N: Quantity) -> Quantity:
        """The M_c at which a bolt of the farthest row carries this force; Nmm."""
        return (bolt_force - N / self.n) * self.inertia / (self.rows[0].y - self.mean) + N * self.mean


def linear_spread(group: Group, M_c: Quantity, mark: str, trace: Trace) -> Spread:
    """Return the forces that balance N and M_c; NotApplicable where bolts and flanges cannot.

    `mark` is set behind the symbols, to tell forces at the action from those at the resistance.
    """
    if _turns_other_way(group, M_c):
        turned = group.turned(trace)
        return _spread(turned, group.turned_moment(M_c, trace), mark, trace).turned()
    return _spread(group, M_c, mark, trace)


def _turns_other_way(group: Group, M_c: Quantity) -> bool:
    """Whether the plate bears, or bears more, on the other flange than on the group's own."""
    N = float(group.N)
    if N <= 0:
        return float(M_c) < N * float(group.z)
    mean = sum(float(row.n) * float(row.y) for row in group.rows) / float(group.count)
    return float(M_c) < N * mean


def _spread(group: Group, M_c: Quantity, mark: str, trace: Trace) -> Spread:
    zero = trace.constant("0", 0.0)
    forces = {row.index: zero for row in group.rows}
    if float(group.N) <= 0 and float(M_c) <= 0:
        near = trace.step(f"F_c{mark}", M_c / group.z - group.N, "kN", TWO_FLANGES)
        return Spread(forces, near, trace.step(f"F_c,2{mark}", -M_c / group.z, "kN", TWO_FLANGES))
    if _bears(group, M_c):
        for row in group.pulling:
            force = row.n * M_c * row.y / group.S_2
            forces[row.index] = trace.step(f"F_{row.index + 1}{mark}", force, "kN", METHOD)
        return Spread(forces, compression(group, forces, mark, trace), zero)
    opened = _open_rows(group, lambda _rows: float(M_c), trace)
    for row in opened.rows:
        force = row.n * opened.bolt_force(row.y, M_c, group.N)
        forces[row.index] = trace.step(f"F_{row.index + 1}{mark}", force, "kN", OPEN)
    return Spread(forces, zero, zero)


def compression(group: Group, forces: dict[int, Quantity], mark: str, trace: Trace) -> Quantity:
    """Record C = ΣF − N."""
    pull = total([force for force in forces.values() if float(force) > 0] or [trace.constant("0", 0.0)])
    return trace.step(f"C{mark}", pull - group.N if float(group.N) else pull, "kN", f"{STATICS}, C = ΣF − N")


def linear_limit(group: Group, trace: Trace) -> tuple[Quantity, str]:
    """Return the greatest M_c at which no bolt and no flange is beyond its resistance, and what stops it.

    For an axial force that the joint carries alone.
    """
    far = group.pulling[0]
    by_bolt = trace.step("M_c,bolt", group.tension * group.S_2 / far.y, "kNm", f"{METHOD}, row {far.index + 1}")
    if not _bears(group, by_bolt):
        opened = _open_rows(group, lambda rows: float(rows.moment_at(group.tension, group.N)), trace)
        M_c = trace.step("M_c,Rd", opened.moment_at(group.tension, group.N), "kNm", OPEN)
        return M_c, f"row {far.index + 1}, bolt tension"
    if float(group.flange) + float(group.N) >= 0:
        by_flange = trace.step("M_c,flange", _flange_and_N(group) * group.S_2 / group.S_1, "kNm", METHOD)
    else:
        by_flange = trace.step("M_c,flange", _flange_and_N(group) * group.z, "kNm", TWO_FLANGES)
    M_c = trace.step("M_c,Rd", least(by_bolt, by_flange), "kNm", METHOD)
    return M_c, f"row {far.index + 1}, bolt tension" if by_bolt <= by_flange else "compression flange"


def _flange_and_N(group: Group) -> Quantity:
    return group.flange + group.N if float(group.N) else group.flange


def _bears(group: Group, M_c: Quantity) -> bool:
    """Whether C = ΣF − N is no tension when the plate turns about the bearing flange."""
    if not group.pulling:
        return False
    pull = float(M_c) * float(group.S_1) / float(group.S_2)
    return pull >= 0 and pull >= float(group.N) * (1 - 1e-12)


def _open_rows(group: Group, moment: Callable[[OpenRows], float], trace: Trace) -> OpenRows:
    """Return the farthest rows that pull together while all others do not; `moment` gives M_c for a set of rows."""
    N, slack = float(group.N), SLACK * abs(float(group.N))
    for size in range(2, len(group.rows) + 1):
        rows = OpenRows.of(group.rows[:size], Trace())
        if float(rows.inertia) <= 0:
            continue
        turning = (moment(rows) - N * float(rows.mean)) / float(rows.inertia)
        forces = [N / float(rows.n) + turning * (float(row.y) - float(rows.mean)) for row in group.rows]
        if min(forces[:size]) >= -slack and all(force <= slack for force in forces[size:]):
            return OpenRows.of(group.rows[:size], trace)
    raise NotApplicable("the axial tension cannot be balanced by bolts that only pull and flanges that only push.")
