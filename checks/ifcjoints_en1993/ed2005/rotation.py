"""Whether a bolted joint can turn enough for plastic global analysis: EN 1993-1-8:2005, 6.4.1 and 6.4.2. N, mm, N/mm².

The clauses hold for S235, S275 and S355 and an axial force of at most 5 % of N_pl,Rd (6.4.1); otherwise the capacity
is to be shown by test.
"""

from __future__ import annotations

from ifcjoints.checking import N, root

from .assembly import Assembly
from .limits import Limit

CLAUSE = "EN 1993-1-8:2005, 6.4.2"
WITHOUT_CHECK = "EN 1993-1-8:2005, 6.4.1"
STEELS = ("S235", "S275", "S355")
OVERSTRENGTH = 1.2
BENDING = ("column flange in bending", "end plate in bending")


def need_not_turn(M_jRd: float, M_pl: float) -> bool:
    """Whether the joint is so strong that the hinge forms in the member: M_j,Rd ≥ 1.2 M_pl,Rd (6.4.1)."""
    return M_jRd >= OVERSTRENGTH * M_pl


def governed_by_bending(assembly: Assembly[N]) -> bool:
    """Whether flange or plate, and not the bolts, limit every row that carries a force (6.4.2(2)a, read strictly)."""
    limits = [row.governing.limit for row in assembly.rows if float(row.F_tRd) > 0]
    return all(isinstance(limit, Limit) and limit.component in BENDING and limit.mode != "mode 3" for limit in limits)


def greatest_thickness(d: N, f_ub: N, f_y: N) -> N:
    """The most a column flange or an end plate may measure for it to yield well before its bolts break (6.4.2(2)b)."""
    return 0.36 * d * root(f_ub / f_y)


def turns_by_bending(assembly: Assembly[N], t: float, greatest_thickness: float) -> bool:
    """Whether flange or plate gives the rotation (6.4.2(2)).

    M_j,Rd must be governed by one of the two in bending, and the thickness `t` of either be no more than the limit.
    """
    return governed_by_bending(assembly) and t <= greatest_thickness


def turns_by_shear(assembly: Assembly[N], slenderness: float, greatest_slenderness: float) -> bool:
    """Whether the column's web panel gives the rotation: it governs, and d/t_w ≤ 69ε (6.4.2(1))."""
    return assembly.governing == "column web panel in shear" and slenderness <= greatest_slenderness
