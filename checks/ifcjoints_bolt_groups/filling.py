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
class Limit:
    """The greatest M_c, the forces at it, and what stops it."""

    M_c: Quantity
    spread: Spread
    stop: str


def plastic_limit(group: Group, brittle: str, mark: str, trace: Trace) -> Limit:
    """Return the greatest M_c with rows filled until the flange's resistance stops them.

    For an axial force that the joint carries alone. Where no row pulls, or brittle rows leave the joint open,
    the linear distribution answers.
    """
    if float(group.flange) + float(group.N) <= 0:
        return _linear(group, mark, trace)
    room = group.flange + group.N if float(group.N) else group.flange
    room = trace.step(f"ΣF_max{mark}", room, "kN", f"{STATICS}, compression flange at its resistance")
    forces = _fill(group, group.pulling, room, brittle, mark, trace)
    pull = _sum(forces)
    stop = "compression flange" if pull >= float(room) * (1 - SLACK) else _bolts_stop(group, brittle)
    if pull < float(group.N):
        if brittle:
            return _linear(group, mark, trace)
        rest = trace.step(f"ΔF{mark}", group.N - total(forces.values()), "kN", f"{STATICS}, N not yet carried")
        behind = [row for row in group.rows if row.y <= 0]
        forces |= _fill(group, behind, rest, "", mark, trace)
        stop = "bolt tension, joint open"
    M_c = trace.step(f"M_c,Rd{mark}", _moment(group, forces), "kNm", METHOD)
    forces, zero = _with_zeros(group, forces, trace), trace.constant("0", 0.0)
    return Limit(M_c, Spread(forces, compression(group, forces, mark, trace), zero), stop)


def plastic_spread(group: Group, M_c: Quantity, brittle: str, mark: str, trace: Trace) -> Spread | None:
    """Return row and flange forces that balance N and M_c within every resistance; None where none do."""
    spread = _bearing(group, M_c, brittle, mark, trace)
    if spread is not None or float(group.N) == 0:
        return spread
    if brittle or float(group.N) < 0:
        return _linear_within(group, M_c, mark, trace)
    return _open(group, M_c, mark, trace)


def _linear(group: Group, mark: str, trace: Trace) -> Limit:
    M_c, stop = linear_limit(group, trace)
    return Limit(M_c, linear_spread(group, M_c, mark, trace), stop)


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


def _bearing(group: Group, M_c: Quantity, brittle: str, mark: str, trace: Trace) -> Spread | None:
    """Fill rows until they balance M_c; None where they cannot, or the flange would not bear or bears too much."""
    if float(M_c) < 0 or not group.pulling:
        return None
    aside, left = Trace(), M_c
    forces: Forces = {}
    for row in group.pulling:
        if float(left) > 0:
            force = least(left / row.y, *_caps(group, row, forces, brittle))
            forces[row.index] = aside.step(_symbol(row, mark), force, "kN", _reference(brittle))
            left = left - forces[row.index] * row.y
    forces = _with_zeros(group, forces, trace)
    C = compression(group, forces, mark, aside)
    scale = SLACK * (float(group.flange) + abs(float(group.N)))
    if float(left) > SLACK * float(M_c) or not -scale <= float(C) <= float(group.flange) + scale:
        return None
    trace.steps += aside.steps
    return Spread(forces, C, trace.constant("0", 0.0))


def _open(group: Group, M_c: Quantity, mark: str, trace: Trace) -> Spread | None:
    """Return forces where the filled rows would leave the flange in tension: between the extremes that carry N."""
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
    spread = _bearing(group.turned(aside), group.turned_moment(M_c, aside), "", mark, aside)
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


def _bolts_stop(group: Group, brittle: str) -> str:
    return f"row {group.pulling[0].index + 1}, bolt tension" if brittle else "bolt tension of all pulling rows"


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
