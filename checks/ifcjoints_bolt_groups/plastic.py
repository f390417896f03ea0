"""Plastic bolt group under moment out of its plane.

What it checks
--------------
The bolt rows of an end plate under a moment, with axial force and shear, when the rows may stretch until each
carries what its bolts can. The rows are filled from the farthest one inwards until the compression flange is at
its resistance. The check states the moment so reached and, under a design action, the row forces that balance it.

Why it matters
--------------
It is the most that the bolts and the flange could give. Where it is much above the elastic moment, the joint lives
on ductility, and someone must have made sure of that.

Method and clause
-----------------
Lower-bound statics: F_r ≤ n_r F_t,Rd, ΣF ≤ F_c,Rd + N, M_Rd = Σ F_r y_r − N e_N. Rows beyond the compression
flange are used only to carry axial tension. Beside shear (shared equally by all bolts) F_t,Rd falls to what the
interaction of EN 1993-1-8:2005, Table 3.4, or AISC 360-22, J3.8, leaves. Where rows are brittle, the force per
bolt of a row is limited to that of the farthest row in proportion to the lever arms, after the idea of
EN 1993-1-8:2005, 6.2.7.2(9). Option `triangular_limit`: "brittle_rows" (default) applies that limit unless the end
plate, or the column flange or second end plate bolted to it, is thin enough to yield before the bolts,
t ≤ d/1.9·√(f_ub/f_y) (SCI P398, step 1C; UK NA to BS EN 1993-1-8, NA.2.7: from memory); "always" and "never" do as
they say.

Needs
-----
As the elastic check; and for the option "brittle_rows" the thickness and grade of the end plate or of what it is
bolted to. Where those are not known the rows count as brittle.

Limits
------
It assumes no prying and no limit from bending of the end plate or the column's flange, or from the webs and welds:
the component method does those. Its moment is therefore an upper bound of theirs, never an approval by itself. It
supports a competent engineer's check and replaces neither it nor the governing code.

Example
-------
Rows at 450, 340 and 60 mm with two bolts of F_t,Rd = 203 kN each and a flange good for 863 kN: the first two rows
take 406 kN each, the third only 863 − 813 = 50 kN, so M_Rd = 406·0.450 + 406·0.340 + 50·0.060 = 324 kNm.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Literal

from ifcjoints.checking import N as Number
from ifcjoints.checking import Quantity, Subject, Trace, Verdict, check, greatest, least, root
from ifcjoints.checking.testing import example_cases
from ifcjoints.model.base import Frozen
from ifcjoints.model.joints import Joint
from ifcjoints.tables.bolts import bolt_grade
from ifcjoints.tables.steels import steel_grade

from .bolt import BoltResistance, bolt_resistance
from .elastic import distribution, moment_limit, utilise
from .flange import flange_resistance, interface_of
from .statics import BoltRow, LinearGroup, Loads, given_loads, given_rows, total

METHOD = "rows filled from the farthest inwards"
NO_PRYING = f"{METHOD}; no prying, no plate or flange bending"
DUCTILE = "SCI P398, step 1C (from memory)"


class PlasticOptions(Frozen):
    """`triangular_limit`: whether rows keep to a triangle below the farthest one."""

    triangular_limit: Literal["never", "brittle_rows", "always"] = "brittle_rows"


@dataclass(frozen=True, slots=True)
class Filled:
    """Row forces by place in `joint.rows`, and the moment M_c they give; N and Nmm."""

    rows: dict[int, Quantity]
    M_c: Quantity
    limit: str


@check(
    "bolt_group.plastic",
    title="Plastic bolt group, out of plane (no prying)",
    method="lower-bound statics of the bolt rows; EN 1993-1-8:2005, Table 3.4 and 6.2.7.2(9), or AISC 360-22, J3",
    cases=example_cases(),
    options=PlasticOptions,
)
def plastic(subject: Subject, trace: Trace) -> Verdict:
    """Check the joint's rows by the plastic method."""
    interface = interface_of(subject)
    bolt = bolt_resistance(subject, trace)
    flange = flange_resistance(subject, trace)
    brittle = rows_are_brittle(subject, trace)
    rows = given_rows(subject, trace)
    loads = given_loads(subject, interface, trace)
    z = trace.given("z", interface.flange_distance_mm, "mm", "between the flange centre lines")
    whole_bolt, bolt = bolt, beside_shear(subject, bolt, loads, trace)
    filled = fill(rows, bolt.tension, flange, loads, brittle, trace)
    if filled is None:
        group = LinearGroup.of(rows, trace)
        M_cRd, limit = moment_limit(rows, group, loads, bolt, (flange, z), trace)
        forces = distribution(rows, group, M_cRd, loads.N, z, trace).rows
        filled = Filled(forces, M_cRd, limit)
    M_Rd = trace.step("M_Rd", greatest(filled.M_c - loads.N * loads.e_N, trace.constant("0", 0.0)), "kNm", NO_PRYING)
    forces, utilisation, governing = filled.rows, None, filled.limit
    if subject.action is not None:
        M_cEd = trace.step("M_c,Ed", loads.M + loads.N * loads.e_N, "kNm", METHOD)
        group = LinearGroup.of(rows, trace)
        if float(M_Rd) > 0 and group.bears(M_cEd, loads.N):
            utilisation = float(trace.step("η", loads.M / M_Rd, "", NO_PRYING))
            forces = (
                _at_action(rows, group, M_cEd, loads, (bolt.tension, z, brittle), trace) if utilisation <= 1 else forces
            )
        else:
            spread = distribution(rows, group, M_cEd, loads.N, z, trace)
            utilisation, governing = utilise(subject, spread, rows, loads, whole_bolt, flange, trace)
            forces = spread.rows
    pull = sum(float(force) for force in forces.values())
    return Verdict(
        resistance={"M_kNm": float(M_Rd) / 1e6},
        governing=governing,
        utilisation=utilisation,
        row_forces_kN=[float(forces[index]) / 1e3 for index in range(len(rows))],
        compression_kN=(pull - float(loads.N)) / 1e3,
    )


def ductile_thickness(d: Number, f_ub: Number, f_y: Number) -> Number:
    """Greatest thickness in mm at which a plate yields before its bolts, d/1.9·√(f_ub/f_y) (SCI P398, step 1C)."""
    return d / 1.9 * root(f_ub / f_y)


def rows_are_brittle(subject: Subject, trace: Trace) -> bool:
    """Whether the triangular limit applies, by the option and the thickness of what is bolted together."""
    options = subject.options if isinstance(subject.options, PlasticOptions) else PlasticOptions()
    if options.triangular_limit != "brittle_rows":
        return options.triangular_limit == "always"
    grade = bolt_grade(subject.joint.bolts.grade or "")
    strength = (grade.f_ub or grade.F_nt / 0.75) if grade else 0.0
    d, f_ub = trace.constant("d", subject.joint.bolts.diameter_mm or 0.0), trace.constant("f_ub", strength)
    for name, thickness, steel in _bolted_plates(subject.joint):
        found = steel_grade(steel, thickness) if steel and thickness else None
        if found is None or thickness is None:
            continue
        t = trace.given(f"t ({name})", thickness, "mm", name)
        f_y = trace.given(f"f_y ({name})", found.f_y, "N/mm²", found.name)
        if t <= trace.step(f"t_max ({name})", ductile_thickness(d, f_ub, f_y), "mm", DUCTILE):
            return False
    return True


def _bolted_plates(joint: Joint) -> list[tuple[str, float | None, str | None]]:
    """Return the end plates, and the column's flange where that is what they are bolted to."""
    plates = [("end plate", plate.thickness_mm, plate.grade) for plate in joint.plates if plate.role == "end_plate"]
    carrier = joint.supporting
    if joint.configuration == "beam_to_column_flange" and carrier is not None and carrier.section is not None:
        return [*plates, ("column flange", carrier.section.tf_mm, carrier.grade)]
    return list(plates)


def beside_shear(subject: Subject, bolt: BoltResistance, loads: Loads, trace: Trace) -> BoltResistance:
    """Return the bolt with the tension resistance that the shear force leaves."""
    if float(loads.V) == 0:
        return bolt
    count = trace.given("n_bolts", subject.joint.bolts.count, "", "bolts of the joint")
    F_vEd = trace.step("F_v,Ed", loads.V / count, "kN", "shear shared equally by all bolts")
    tension = trace.step("F_t,Rd,V", bolt.beside_shear(F_vEd), "kN", f"{bolt.clause}, beside F_v,Ed")
    return BoltResistance(tension, bolt.shear, bolt.beside_shear, bolt.interaction, bolt.clause)


def fill(
    rows: list[BoltRow], F_tRd: Quantity, F_cRd: Quantity, loads: Loads, brittle: bool, trace: Trace
) -> Filled | None:
    """Fill the rows to the most they can carry; None where only the linear distribution answers.

    That is so where the compression flange alone carries N, where brittle rows open altogether, and where the
    bolts cannot carry N.
    """
    left = F_cRd + loads.N
    if float(left) <= 0:
        return None
    left = trace.step("ΣF_max", left, "kN", "equilibrium with the compression flange at its resistance")
    forces: dict[int, Quantity] = {}
    limit, first = "", rows[0]
    for row in rows:
        forces[row.index] = trace.constant(f"F_{row.index + 1}", 0.0)
        if row.y <= 0 or float(left) <= 0:
            continue
        cap = row.n * F_tRd
        if brittle and row is not first:
            cap = least(cap, row.n * (forces[first.index] / first.n) * row.y / first.y)
        at_limit = first if brittle else row
        limit = "compression flange" if float(left) < float(cap) else f"row {at_limit.index + 1}, bolt tension"
        forces[row.index] = trace.step(f"F_{row.index + 1}", least(cap, left), "kN", NO_PRYING)
        left = left - forces[row.index]
    if sum(map(float, forces.values())) < float(loads.N):
        return None if brittle else _opened(rows, forces, F_tRd, loads, trace)
    M_c = trace.step("M_c,Rd", total([forces[row.index] * row.y for row in rows]), "kNm", NO_PRYING)
    return Filled(forces, M_c, limit)


def _opened(
    rows: list[BoltRow], forces: dict[int, Quantity], F_tRd: Quantity, loads: Loads, trace: Trace
) -> Filled | None:
    """Let the rows beyond the compression flange carry the rest of an axial tension; None if they cannot."""
    for row in rows:
        rest = float(loads.N) - sum(map(float, forces.values()))
        if row.y <= 0 and rest > 0:
            needed = loads.N - total(list(forces.values()))
            forces[row.index] = trace.step(f"F_{row.index + 1}", least(row.n * F_tRd, needed), "kN", NO_PRYING)
    if sum(map(float, forces.values())) < float(loads.N) * (1 - 1e-12):
        return None
    M_c = trace.step("M_c,Rd", total([forces[row.index] * row.y for row in rows]), "kNm", NO_PRYING)
    return Filled(forces, M_c, "bolt tension of every row")


def _at_action(
    rows: list[BoltRow],
    group: LinearGroup,
    M_cEd: Quantity,
    loads: Loads,
    limits: tuple[Quantity, Quantity, bool],
    trace: Trace,
) -> dict[int, Quantity]:
    """Return row forces that balance the action: filled from the farthest row, or linear where that cannot be."""
    F_tRd, z, brittle = limits
    forces, carried = _filled_to(rows, M_cEd, F_tRd, trace)
    balanced = abs(carried - float(M_cEd)) <= 1e-9 * abs(float(M_cEd))
    if not brittle and balanced and sum(map(float, forces.values())) >= float(loads.N):
        return {
            index: trace.step(f"F_{index + 1},Ed", force, "kN", NO_PRYING) for index, force in sorted(forces.items())
        }
    return distribution(rows, group, M_cEd, loads.N, z, trace).rows


def _filled_to(
    rows: list[BoltRow], M_cEd: Quantity, F_tRd: Quantity, trace: Trace
) -> tuple[dict[int, Quantity], float]:
    """Fill rows from the farthest inwards until they balance M_c,Ed; return the forces and the moment carried."""
    forces: dict[int, Quantity] = {}
    left = M_cEd
    for row in rows:
        forces[row.index] = trace.constant("0", 0.0)
        if row.y > 0 and float(left) > 0:
            forces[row.index] = least(row.n * F_tRd, left / row.y)
            left = left - forces[row.index] * row.y
    return forces, float(M_cEd) - float(left)
