"""The whole of a bolted end-plate joint: its moment resistance, 6.2.7.2, and its stiffness, 6.3.3.1.

    joint = EndPlateJoint(rows=(565.3, 465.3), bolts=…, column=ColumnSide(…), plates=(EndPlate(…),), caps=(Cap(…),), …)
    resistance = moment_resistance(joint, TriangularLimit(), untraced)

All figures are floats, or all are quantities of a trace; then `sheets` hands out the trace's sheets.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Generic

from ifcjoints.checking import N

from ..figures import Sheets, smallest
from . import stiffness_coefficients as k
from .assembly import Assembly, Row, TriangularLimit, assemble
from .column import column_side
from .end_plate import end_plate_side
from .inputs import Bolts, ColumnSide, EndPlate, Factors
from .limits import Cap, Limit
from .rows import GEOMETRY, edge
from .side import Side, limits_of, smallest_lengths
from .stiffness import ROWS, equivalent_coefficient, equivalent_lever_arm, in_series


@dataclass(frozen=True, slots=True)
class EndPlateJoint(Generic[N]):
    """A joint of rows with two bolts each.

    `heights` are the lever arms of the rows above the centre of compression, the farthest first; one end plate and a
    column, or the two end plates of a splice; `caps` what limits all rows together. NotApplicable and ValueError as
    the functions below raise them.
    """

    heights: tuple[N, ...]
    bolts: Bolts[N]
    plates: tuple[EndPlate[N], ...]
    factors: Factors[N]
    column: ColumnSide[N] | None = None
    caps: tuple[Cap[N], ...] = ()


def sides_of(joint: EndPlateJoint[N], sheets: Sheets[N]) -> list[Side[N]]:
    """Place the rows on every flange and plate that they pull on."""
    edges = [edge(plate.b_p, joint.bolts.w) for plate in joint.plates]
    if joint.column is not None:
        edges.append(edge(joint.column.b, joint.bolts.w))
    e_min = sheets("bolts, geometry")("e_min", smallest(edges), "mm", GEOMETRY)
    sides = [end_plate_side(plate, joint.bolts, joint.heights, e_min, joint.factors, sheets) for plate in joint.plates]
    if joint.column is not None:
        sides.insert(0, column_side(joint.column, joint.bolts, joint.heights, e_min, joint.factors, sheets))
    return sides


def moment_resistance(joint: EndPlateJoint[N], reading: TriangularLimit, sheets: Sheets[N]) -> Assembly[N]:
    """M_j,Rd and the rows' forces at it, without axial force."""
    sides = sides_of(joint, sheets)
    outside = {side.outside.row for side in sides if side.outside is not None}
    rows = [Row(h, index in outside) for index, h in enumerate(joint.heights)]
    limits = _limits(joint, sides, sheets)
    return assemble(rows, limits, joint.caps, joint.bolts.F_tRd, reading, sheets("moment resistance"))


def tension_resistance(joint: EndPlateJoint[N], sheets: Sheets[N]) -> N:
    """N_j,Rd in tension, without any moment: what all rows together may carry, for 6.2.7.1(3).

    Heights are then measured from any level below all rows, and flanges stiffen the plate at both ends of the beam.
    Where the rows' resultant does not lie on the member's axis, the member must bear that eccentricity too.
    """
    rows = [Row(h) for h in joint.heights]
    limits = _limits(joint, sides_of(joint, sheets), sheets)
    reading = TriangularLimit(when="never")
    return assemble(rows, limits, (), joint.bolts.F_tRd, reading, sheets("axial tension")).compression


def _limits(joint: EndPlateJoint[N], sides: Sequence[Side[N]], sheets: Sheets[N]) -> list[Limit[N]]:
    return [limit for side in sides for limit in limits_of(side, joint.bolts, joint.factors, sheets)]


@dataclass(frozen=True, slots=True)
class RowsStiffness(Generic[N]):
    """k_eff,r of every row, z_eq and k_eq."""

    k_eff: tuple[N, ...]
    z_eq: N
    k_eq: N


def rows_stiffness(joint: EndPlateJoint[N], A_s: N, L_b: N, d_c: N | None, sheets: Sheets[N]) -> RowsStiffness[N]:
    """z_eq and k_eq of the rows from k_3 and k_4 (the column's), k_5 (every plate's) and k_10 (the bolts').

    `d_c` is the clear depth of the column's web; None for a splice.
    """
    lengths = [(side, smallest_lengths(side)) for side in sides_of(joint, sheets)]
    k_eff = []
    for row in range(len(joint.heights)):
        step = sheets(f"row {row + 1}, stiffness")
        springs = [step("k_10", k.bolts(A_s, L_b), "mm", k.TABLE)]
        for side, of_rows in lengths:
            l_eff, m = of_rows[row]
            l_eff = step(f"ℓ_eff,{side.mark}", l_eff, "mm", f"{side.reference}, the row's smallest")
            name = "k_5" if side.mark == "ep" else "k_4"
            springs.append(step(name, k.plate_in_bending(l_eff, side.flange.t_f, m), "mm", k.TABLE))
            if side.mark == "fc" and joint.column is not None and d_c is not None:
                springs.append(step("k_3", k.column_web_in_tension(l_eff, joint.column.t_w, d_c), "mm", k.TABLE))
        k_eff.append(step(f"k_eff,{row + 1}", in_series(springs), "mm", ROWS))
    return _equivalent(k_eff, joint.heights, sheets)


def _equivalent(k_eff: Sequence[N], heights: Sequence[N], sheets: Sheets[N]) -> RowsStiffness[N]:
    step = sheets("rows, stiffness")
    z_eq = step("z_eq", equivalent_lever_arm(k_eff, heights), "mm", ROWS)
    k_eq = step("k_eq", equivalent_coefficient(k_eff, heights, z_eq), "mm", ROWS)
    return RowsStiffness(tuple(k_eff), z_eq, k_eq)
