"""Rows filled from the farthest one inwards: the statics of the plastic method.

Every function keeps within what one bolt and the flanges carry and balances force and moment, so that by the lower
bound theorem of plasticity the joint carries at least as much, if bolts and plates can stretch that far. `brittle`
is the reason why rows may not, or nothing; brittle rows keep below a triangle: force per bolt of row r at most
(F_x/n_x)·y_r/y_x of the farthest row x.
"""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass

from ifcjoints.checking import Quantity, Trace, least

from .group import BoltRow, Group, Spread, total
from .linear import SLACK, compression, linear_limit, linear_spread
from .loads import STATICS

METHOD = "rows filled from the farthest inwards; no prying, no plate or flange bending"
MIXED = "joint open: between the rows filled from either side with N"

Forces = dict[int, Quantity]


@dataclass(frozen=True, slots=True)
class Filled:
    """Rows filled until the compression flange is at its resistance, M_c of them, and what stopped the filling.

    `M_c` is None where the rows with y > 0 do not even carry an axial tension.
    """

    forces: Forces
    M_c: Quantity | None
    stop: str


@dataclass(frozen=True, slots=True)
class Limit:
    """The greatest M_c, the forces at it, and what stops it."""

    M_c: Quantity
    spread: Spread
    stop: str


def fill_to_flange(group: Group, brittle: str, mark: str, trace: Trace) -> Filled | None:
    """Fill the rows until the compression flange's resistance stops them; None where it is too small for N alone."""
    if float(group.flange) + float(group.N) <= 0:
        return None
    room = group.flange + group.N if float(group.N) else group.flange
    room = trace.step(f"ΣF_max{mark}", room, "kN", f"{STATICS}, compression flange at its resistance")
    forces = _fill(group, group.pulling, room, brittle, mark, trace)
    if _sum(forces) < float(group.N):
        return Filled(forces, None, "bolt tension, joint open")
    M_c = trace.step(f"M_c,Rd{mark}", _moment(group, forces), "kNm", METHOD)
    if _sum(forces) >= float(room) * (1 - SLACK):
        return Filled(forces, M_c, "compression flange")
    bolts = f"row {group.pulling[0].index + 1}, bolt tension" if brittle else "bolt tension of all pulling rows"
    return Filled(forces, M_c, bolts)


def plastic_limit(group: Group, filled: Filled | None, brittle: str, mark: str, trace: Trace) -> Limit:
    """Return the greatest M_c, for an axial force that the joint carries alone.

    Where no row pulls, or brittle rows leave the joint open, the linear distribution answers.
    """
    if filled is None or (filled.M_c is None and brittle):
        M_c, stop = linear_limit(group, trace)
        return Limit(M_c, linear_spread(group, M_c, mark, trace), stop)
    forces, M_c_filled = filled.forces, filled.M_c
    if M_c_filled is None:
        rest = trace.step(f"ΔF{mark}", group.N - total(forces.values()), "kN", f"{STATICS}, N not yet carried")
        behind = [row for row in group.rows if row.y <= 0]
        forces = forces | _fill(group, behind, rest, "", mark, trace)
        M_c_filled = trace.step(f"M_c,Rd{mark}", _moment(group, forces), "kNm", METHOD)
    C = compression(group, forces, mark, trace)
    return Limit(M_c_filled, Spread(_with_zeros(group, forces, trace), C, trace.constant("0", 0.0)), filled.stop)


def plastic_spread(
    group: Group, M_c: Quantity, filled: Filled | None, brittle: str, mark: str, trace: Trace
) -> Spread | None:
    """Return row and flange forces that balance N and M_c within every resistance; None where none do.

    Those of the filled rows in proportion; else, where that would leave the flange in tension or no row pulls, the
    linear ones; else, for rows that may stretch, any that an open joint can carry.
    """
    spread = _scaled(group, M_c, filled, mark, trace) if filled is not None else None
    if spread is None and float(group.N):
        spread = _linear_within(group, M_c, mark, trace)
    if spread is None and not brittle and float(group.N) > 0:
        spread = _open(group, M_c, mark, trace)
    return spread


def _scaled(group: Group, M_c: Quantity, filled: Filled, mark: str, trace: Trace) -> Spread | None:
    """Scale the filled rows so that they balance M_c; None where they cannot, or the flange would be in tension."""
    if filled.M_c is None or not 0 <= float(M_c) <= float(filled.M_c) * (1 + SLACK):
        return None
    aside = Trace()
    share = trace.constant("0", 0.0)
    if float(M_c) > 0:
        share = aside.step(f"μ{mark}", M_c / filled.M_c, "", f"{METHOD}, in proportion to the moment")
    forces = {
        row.index: aside.step(_symbol(row, mark), share * filled.forces[row.index], "kN", METHOD)
        for row in group.pulling
        if row.index in filled.forces
    }
    C = compression(group, forces, mark, aside)
    if float(C) < -SLACK * (float(group.flange) + abs(float(group.N))):
        return None
    trace.steps += aside.steps
    return Spread(_with_zeros(group, forces, trace), C, trace.constant("0", 0.0))


def _linear_within(group: Group, M_c: Quantity, mark: str, trace: Trace) -> Spread | None:
    aside = Trace()
    spread = linear_spread(group, M_c, mark, aside)
    if not _within(spread, group):
        return None
    trace.steps += aside.steps
    return spread


def _within(spread: Spread, group: Group) -> bool:
    """Whether no bolt and no flange carries more than it can."""
    pairs = [(spread.rows[row.index], float(row.n) * float(group.tension)) for row in group.rows]
    pairs += [(spread.flange, float(group.flange)), (spread.other, float(group.other or group.flange))]
    return all(float(force) <= resistance * (1 + SLACK) + SLACK for force, resistance in pairs)


def _open(group: Group, M_c: Quantity, mark: str, trace: Trace) -> Spread | None:
    """Return forces of an open joint between its two extremes: rows filled with N from the one or the other side."""
    aside = Trace()
    far = _with_zeros(group, _fill(group, group.rows, group.N, "", f"{mark},far", aside), aside)
    near = _with_zeros(group, _fill(group, group.rows[::-1], group.N, "", f"{mark},near", aside), aside)
    if _sum(far) < float(group.N) * (1 - SLACK):
        return None
    M_far = aside.step(f"M_c{mark},far", _moment(group, far), "kNm", MIXED)
    M_near = aside.step(f"M_c{mark},near", _moment(group, near), "kNm", MIXED)
    if M_c < M_near:
        return _bearing_other_way(group, M_c, mark, trace)
    if M_c > M_far:
        return None
    trace.steps += aside.steps
    share = trace.constant("λ", 1.0)
    if M_far > M_near:
        share = trace.step("λ", (M_c - M_near) / (M_far - M_near), "", MIXED)
    forces = {
        row.index: trace.step(
            _symbol(row, mark), near[row.index] + share * (far[row.index] - near[row.index]), "kN", MIXED
        )
        for row in group.rows
    }
    zero = trace.constant("0", 0.0)
    return Spread(forces, zero, zero)


def _bearing_other_way(group: Group, M_c: Quantity, mark: str, trace: Trace) -> Spread | None:
    aside = Trace()
    turned = group.turned(aside)
    filled = fill_to_flange(turned, "", "′", aside)
    spread = _scaled(turned, group.turned_moment(M_c, aside), filled, mark, aside) if filled else None
    trace.steps += aside.steps if spread else []
    return spread.turned() if spread else None


def _fill(group: Group, rows: Iterable[BoltRow], room: Quantity, brittle: str, mark: str, trace: Trace) -> Forces:
    """Give each row in turn what it can carry until nothing of the room is left."""
    forces: Forces = {}
    for row in rows:
        if float(room) > 0:
            force = least(room, *_caps(group, row, forces, brittle))
            forces[row.index] = trace.step(_symbol(row, mark), force, "kN", _reference(brittle))
            room = room - forces[row.index]
    return forces


def _caps(group: Group, row: BoltRow, forces: Forces, brittle: str) -> list[Quantity]:
    """Return what limits a row: its bolts, and for brittle rows the triangle below the farthest one."""
    full, far = row.n * group.tension, group.pulling[0] if brittle else row
    return [full] if row is far else [full, row.n * (forces[far.index] / far.n) * row.y / far.y]


def _reference(brittle: str) -> str:
    return f"{METHOD}; triangular limit: {brittle}" if brittle else METHOD


def _symbol(row: BoltRow, mark: str) -> str:
    return f"F_{row.index + 1}{mark}"


def _moment(group: Group, forces: Forces) -> Quantity:
    return total(forces[row.index] * row.y for row in group.rows if row.index in forces)


def _sum(forces: Forces) -> float:
    return sum(map(float, forces.values()))


def _with_zeros(group: Group, forces: Forces, trace: Trace) -> Forces:
    return {row.index: forces.get(row.index) or trace.constant("0", 0.0) for row in group.rows}
