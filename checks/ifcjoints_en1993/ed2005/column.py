"""The column's flange in bending and web in tension, as a side of the joint: EN 1993-1-8:2005, 6.2.6.3 and 6.2.6.4."""

from __future__ import annotations

from collections.abc import Sequence

from ifcjoints.checking import N

from ..figures import Sheets, Step
from .effective_lengths import STIFFENED, UNSTIFFENED, Place
from .inputs import Bolts, ColumnSide, Factors
from .rows import GEOMETRY, bolt_to_web, edge, runs_of
from .side import Side
from .t_stub import Flange
from .transformation import TABLE, omega
from .web_tension import COLUMN, column_web


def column_side(
    column: ColumnSide[N], bolts: Bolts[N], heights: Sequence[N], e_min: N, factors: Factors[N], sheets: Sheets[N]
) -> Side[N]:
    """Place the rows on the column's flange; `e_min` is the least edge distance of all that is bolted together."""
    step = sheets("column flange, geometry")
    m = step("m_fc", bolt_to_web(bolts.w, column.t_w, column.s), "mm", GEOMETRY)
    e = step("e_fc", edge(column.b, bolts.w), "mm", GEOMETRY)
    rows = range(len(heights))
    return Side(
        bending="column flange in bending",
        punching="punching of the column flange",
        tension="column web in tension",
        where="",
        mark="fc",
        reference=STIFFENED if column.stiffeners else UNSTIFFENED,
        flange=Flange(column.t_f, column.f_y, m, e_min, bolts.e_w, column.backing_plate, bolts.prying),
        f_u=column.f_u,
        web=lambda b_eff, mark, step: _web(column, b_eff, mark, factors, step),
        runs=runs_of(heights, rows, Place(m, e), column.stiffeners, column.ends, step),
    )


def _web(column: ColumnSide[N], b_eff: N, mark: str, factors: Factors[N], step: Step[N]) -> N:
    factor = step("ω", omega(column.beta, b_eff, column.t_w, column.A_vc), "", TABLE)
    return step(f"F_t,wc,{mark}", column_web(factor, b_eff, column.t_w, column.f_y_web, factors.gamma_M0), "kN", COLUMN)
