"""The end plate in bending and the beam's web in tension, as a side: EN 1993-1-8:2005, 6.2.6.5 and 6.2.6.8."""

from __future__ import annotations

from collections.abc import Sequence

from ifcjoints.checking import N, NotApplicable

from ..figures import SQRT2, Sheets, Step
from .effective_lengths import END_PLATE, OutsidePlace, Place
from .inputs import Bolts, EndPlate, Factors
from .limits import named
from .rows import GEOMETRY, Stiffener, bolt_to_flange, bolt_to_web, edge, runs_of
from .side import Outside, Side
from .t_stub import Flange
from .web_tension import BEAM, beam_web


def end_plate_side(
    plate: EndPlate[N], bolts: Bolts[N], heights: Sequence[N], e_min: N, factors: Factors[N], sheets: Sheets[N]
) -> Side[N]:
    """Place the rows on an end plate; `e_min` is the least edge distance of all that is bolted together.

    NotApplicable where more than one row lies outside the flange in tension: Table 6.6 has none.
    """
    step = sheets(named("end plate, geometry", plate.where))
    m = step("m_ep", bolt_to_web(bolts.w, plate.t_w, SQRT2 * plate.a_w), "mm", GEOMETRY)
    e = step("e_ep", edge(plate.b_p, bolts.w), "mm", GEOMETRY)
    outside = [row for row, h in enumerate(heights) if float(h) > float(plate.flange.h)]
    inside = [row for row in range(len(heights)) if row not in outside]
    if len(outside) > 1:
        raise NotApplicable("EN 1993-1-8, Table 6.6, knows one row outside the flange in tension, not more.")
    stiffeners: list[Stiffener[N]] = [plate.flange]
    stiffeners.extend(plate.stiffeners)
    return Side(
        bending="end plate in bending",
        punching="punching of the end plate",
        tension="beam web in tension",
        where=plate.where,
        mark="ep",
        reference=END_PLATE,
        flange=Flange(plate.t_p, plate.f_y, m, e_min, bolts.e_w, None, bolts.prying),
        f_u=plate.f_u,
        web=lambda b_eff, mark, step: step(
            f"F_t,wb,{mark}", beam_web(b_eff, plate.t_w, plate.f_y_web, factors.gamma_M0), "kN", BEAM
        ),
        runs=runs_of(heights, inside, Place(m, e), stiffeners, (), step),
        outside=_outside(plate, bolts, heights[0], e, step) if outside else None,
    )


def _outside(plate: EndPlate[N], bolts: Bolts[N], h: N, e: N, step: Step[N]) -> Outside[N]:
    throat = plate.flange.a if plate.a_outer is None else plate.a_outer
    m_x = step("m_x", bolt_to_flange(plate.flange.clear(h), throat), "mm", GEOMETRY)
    e_x = step("e_x", plate.end - h, "mm", GEOMETRY)
    if float(m_x) <= 0 or float(e_x) <= 0:
        raise NotApplicable("row 1 lies on the weld of the flange in tension or off the end plate.")
    return Outside(0, OutsidePlace(m_x, e_x, e, plate.b_p, bolts.w))
