"""How far forces use the bolts and flanges: ratios of force to resistance, each under the name it governs by."""

from __future__ import annotations

from ifcjoints.checking import Quantity, Trace

from .bolt import BoltResistance
from .group import BoltRow, Group, Spread
from .loads import STATICS

Ratios = dict[str, Quantity]


def bolts_and_flanges(spread: Spread, group: Group, trace: Trace) -> Ratios:
    """Return the ratios of the most loaded bolt in tension and of the flanges that are pressed."""
    worst, F_tEd = most_loaded(spread, group)
    F_tEd = trace.step("F_t,Ed", F_tEd, "kN", f"one bolt of row {worst.index + 1}")
    ratios = {f"row {worst.index + 1}, bolt tension": trace.step("η_t", F_tEd / group.tension, "", STATICS)}
    return ratios | flanges_pressed(spread, group, trace)


def flanges_pressed(spread: Spread, group: Group, trace: Trace) -> Ratios:
    """Return the ratios of the flanges that are pressed."""
    ratios = {}
    if float(spread.flange) > 0:
        ratios["compression flange"] = trace.step("η_c", spread.flange / group.flange, "", STATICS)
    if float(spread.other) > 0 and group.other is not None:
        ratios["tension flange, pressed"] = trace.step("η_c,2", spread.other / group.other, "", STATICS)
    return ratios


def shear_and_both(spread: Spread, group: Group, bolt: BoltResistance, F_vEd: Quantity, trace: Trace) -> Ratios:
    """Return the ratios of a bolt in shear, and of the most loaded one in shear and tension together."""
    ratios = {"bolt shear": trace.step("η_v", F_vEd / bolt.shear, "", bolt.shear_clause)}
    worst, F_tEd = most_loaded(spread, group)
    if float(F_tEd) > 0:
        together = trace.step("η_tv", bolt.interaction(F_tEd, F_vEd), "", bolt.clause)
        ratios[f"row {worst.index + 1}, bolt tension and shear"] = together
    return ratios


def beyond_alone(ratios: Ratios) -> Ratios:
    """Return those of the ratios under the axial force without any moment that are over 1, so named."""
    return {f"{name}, under the axial force alone": ratio for name, ratio in ratios.items() if ratio > 1}


def most_loaded(spread: Spread, group: Group) -> tuple[BoltRow, Quantity]:
    """Return the row whose bolts pull most, and the force of one of them; of equals the uppermost."""
    rows = sorted(group.rows, key=lambda row: row.index)
    worst = max(rows, key=lambda row: float(spread.rows[row.index]) / float(row.n))
    return worst, spread.rows[worst.index] / worst.n


def governing(ratios: Ratios) -> tuple[float, str]:
    """Return the largest ratio and its name."""
    name = max(ratios, key=lambda each: float(ratios[each]))
    return float(ratios[name]), name
