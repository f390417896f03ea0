"""Elastic bolt group under moment out of its plane.

What it checks
--------------
The bolt rows of an end plate under a moment, with axial force and shear. The end plate is taken as stiff; the
joint turns about the centre line of the compression flange and every bolt pulls in proportion to its distance
from there. The check states the moment at which the first bolt reaches its design tension resistance or the
compression flange its own, whichever comes first; under a design action it also states each row's force, the
compression, and the most loaded bolt in tension and shear together.

Why it matters
--------------
It needs nothing but the bolts' places and the flange, so it can be followed on one sheet of paper, and it tells at
once when a row lies where it does little work. It asks no ductility of plate, flange or bolts.

Method and clause
-----------------
F_r = n_r M_c y_r / Σ(n y²), C = ΣF − N, with M_c the moment about the compression flange's centre line (|M| plus N
times the distance of the member's axis). Rows on the far side of that line do not pull. Where no row pulls, the
compression resultant lies between the flanges and the near flange takes its share by statics. Where C would turn
into tension the joint opens altogether and the bolts alone carry N and M, linearly about their centroid. Shear is
shared equally by all bolts. Published as bolts in eccentric loading out of their plane, for example in Bhandari,
Design of Machine Elements, Examples 7.5 and 7.6. Bolts: EN 1993-1-8:2005, Table 3.4, or AISC 360-22, J3. Flange:
EN 1993-1-1:2005, 6.2.4, or AISC 360-22, J4.4.

Needs
-----
Bolt rows and flanges at the interface, the bolts' diameter and grade, the compression flange's size and grade.

Limits
------
No prying and no limit from the end plate, the column's flange or web, or the welds: the component method does
those. A stiff plate is assumed. The stated moment resistance is at the action's axial force and does not fall with
shear; the interaction of shear and tension is in the utilisation. Under a large axial tension a moment smaller than
the stated resistance may overload the rows next to the compression flange: the utilisation tells. It supports a
competent engineer's check and replaces neither it nor the governing code.

Example
-------
Two bolts 150 mm and two bolts 25 mm from the compression flange under 2.5 kNm: Σ(n y²) = 2·150² + 2·25² =
46 250 mm², so each outer bolt pulls 2.5·10⁶·150 / 46 250 = 8108 N.
"""

from __future__ import annotations

from dataclasses import dataclass

from ifcjoints.checking import Quantity, Subject, Trace, Verdict, check, greatest, least
from ifcjoints.checking.testing import example_cases

from .bolt import BoltResistance, bolt_resistance
from .flange import flange_resistance, interface_of
from .statics import METHOD, OPEN_METHOD, BoltRow, LinearGroup, Loads, given_loads, given_rows, open_group


@dataclass(frozen=True, slots=True)
class Distribution:
    """Row forces (by place in `joint.rows`), the compression, and the force in the compression flange; N."""

    rows: dict[int, Quantity]
    compression: Quantity
    flange: Quantity


@check(
    "bolt_group.elastic",
    title="Elastic bolt group, out of plane",
    method="linear bolt forces about the compression flange; EN 1993-1-8:2005, Table 3.4 or AISC 360-22, J3",
    cases=example_cases(),
)
def elastic(subject: Subject, trace: Trace) -> Verdict:
    """Check the joint's rows by the elastic method."""
    interface = interface_of(subject)
    bolt = bolt_resistance(subject, trace)
    flange = flange_resistance(subject, trace)
    rows = given_rows(subject, trace)
    loads = given_loads(subject, interface, trace)
    z = trace.given("z", interface.flange_distance_mm, "mm", "between the flange centre lines")
    group = LinearGroup.of(rows, trace)
    M_cRd, limit = moment_limit(rows, group, loads, bolt, (flange, z), trace)
    M_Rd = trace.step("M_Rd", greatest(M_cRd - loads.N * loads.e_N, trace.constant("0", 0.0)), "kNm", METHOD)
    at = M_cRd
    if subject.action is not None:
        at = trace.step("M_c,Ed", loads.M + loads.N * loads.e_N, "kNm", METHOD)
    spread = distribution(rows, group, at, loads.N, z, trace)
    utilisation, governing = None, limit
    if subject.action is not None:
        utilisation, governing = utilise(subject, spread, rows, loads, bolt, flange, trace)
    return Verdict(
        resistance={"M_kNm": float(M_Rd) / 1e6},
        governing=governing,
        utilisation=utilisation,
        row_forces_kN=[float(spread.rows[index]) / 1e3 for index in range(len(rows))],
        compression_kN=float(spread.compression) / 1e3,
    )


def moment_limit(
    rows: list[BoltRow],
    group: LinearGroup,
    loads: Loads,
    bolt: BoltResistance,
    flange: tuple[Quantity, Quantity],
    trace: Trace,
) -> tuple[Quantity, str]:
    """Return the M_c at which the first bolt or the compression flange is at its resistance, and which; Nmm."""
    N, (F_cRd, z) = loads.N, flange
    far = group.rows[0]
    by_bolt = trace.step("M_c,bolt", bolt.tension * group.S_2 / far.y, "kNm", f"{METHOD}, row {far.index + 1}")
    if not group.bears(by_bolt, N):
        return open_limit(rows, loads, bolt, trace)
    if float(F_cRd) + float(N) >= 0:
        by_flange = trace.step("M_c,flange", (F_cRd + N) * group.S_2 / group.S_1, "kNm", METHOD)
    else:
        by_flange = trace.step("M_c,flange", (F_cRd + N) * z, "kNm", "statics of two flanges, no row pulls")
    least_one = trace.step("M_c,Rd", least(by_bolt, by_flange), "kNm", METHOD)
    return least_one, _tension(far) if by_bolt <= by_flange else "compression flange"


def open_limit(rows: list[BoltRow], loads: Loads, bolt: BoltResistance, trace: Trace) -> tuple[Quantity, str]:
    """Return the M_c at which the first bolt is at its resistance where the joint opens altogether; Nmm."""
    N, far = loads.N, rows[0]
    opened = open_group(rows, N, lambda group: float(group.moment_at(bolt.tension, N)), trace)
    if N / opened.count > bolt.tension:
        return trace.step("M_c,Rd", N * loads.e_N, "kNm", "N alone exceeds the bolts' resistance"), "axial tension"
    return trace.step("M_c,bolt", opened.moment_at(bolt.tension, N), "kNm", OPEN_METHOD), _tension(far)


def _tension(row: BoltRow) -> str:
    return f"row {row.index + 1}, bolt tension"


def distribution(
    rows: list[BoltRow], group: LinearGroup, M_c: Quantity, N: Quantity, z: Quantity, trace: Trace
) -> Distribution:
    """Return the forces that balance M_c and N, row by row."""
    zero = trace.constant("0", 0.0)
    forces = {row.index: zero for row in rows}
    if float(M_c) <= 0 and float(N) < 0:
        C = trace.step("C", -N, "kN", "equilibrium, no row pulls")
        share = trace.step("F_c", -N + M_c / z, "kN", "statics of two flanges; M_c is negative")
        return Distribution(forces, C, share)
    if group.bears(M_c, N):
        for row in group.rows:
            forces[row.index] = trace.step(f"F_{row.index + 1}", group.row_force(row, M_c), "kN", METHOD)
        C = trace.step("C", group.compression(M_c, N), "kN", "equilibrium, C = ΣF − N")
        return Distribution(forces, C, C)
    opened = open_group(rows, N, lambda _group: float(M_c), trace)
    for row in opened.rows:
        force = row.n * opened.bolt_force(row.y, M_c, N)
        forces[row.index] = trace.step(f"F_{row.index + 1}", force, "kN", OPEN_METHOD)
    return Distribution(forces, zero, zero)


def utilise(
    subject: Subject,
    spread: Distribution,
    rows: list[BoltRow],
    loads: Loads,
    bolt: BoltResistance,
    flange: Quantity,
    trace: Trace,
) -> tuple[float, str]:
    """Return the largest ratio of the check and what it belongs to."""
    worst = max(rows, key=lambda row: float(spread.rows[row.index]) / float(row.n))
    n = trace.constant(f"n_{worst.index + 1}", float(worst.n))
    F_tEd = trace.step("F_t,Ed", spread.rows[worst.index] / n, "kN", f"one bolt of row {worst.index + 1}")
    count = trace.given("n_bolts", subject.joint.bolts.count, "", "bolts of the joint")
    F_vEd = trace.step("F_v,Ed", loads.V / count, "kN", "shear shared equally by all bolts")
    ratios = {
        _tension(worst): trace.step("η_t", F_tEd / bolt.tension, "", bolt.clause),
        "bolt shear": trace.step("η_v", F_vEd / bolt.shear, "", bolt.clause),
        "compression flange": trace.step("η_c", spread.flange / flange, "", METHOD),
    }
    if float(F_vEd) > 0:
        together = trace.step("η_tv", bolt.interaction(F_tEd, F_vEd), "", bolt.clause)
        ratios[f"row {worst.index + 1}, bolt tension and shear"] = together
    governing = max(ratios, key=lambda name: float(ratios[name]))
    return float(ratios[governing]), governing
