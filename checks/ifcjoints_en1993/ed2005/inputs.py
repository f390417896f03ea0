"""What the component method is told of a joint, as plain figures: bolts, column, end plates. N, mm, N/mm².

Heights are measured from the centre of compression, positive towards the flange in tension.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Generic

from ifcjoints.checking import N

from .rows import Stiffener
from .t_stub import BackingPlate, LongBolts


@dataclass(frozen=True, slots=True)
class Factors(Generic[N]):
    """The partial factors."""

    gamma_M0: N
    gamma_M1: N
    gamma_M2: N


@dataclass(frozen=True, slots=True)
class Bolts(Generic[N]):
    """The joint's bolts, two in every row: F_t,Rd of one, and the gauge w.

    `d_m` is given to check punching, `e_w` to use method 2 of mode 1. `prying` is None where prying is taken to
    develop, as the note of Table 6.2 allows for these joints; given, its L_b decides.
    """

    F_tRd: N
    w: N
    d_m: N | None = None
    e_w: N | None = None
    prying: LongBolts[N] | None = None


@dataclass(frozen=True, slots=True)
class ColumnSide(Generic[N]):
    """The column where the rows pull.

    Width and thicknesses of its section, `s` its root radius r_c or √2·a_c; strengths of flange and web; A_vc and β
    for ω; its stiffeners, and the heights of its free ends where rows are near one.
    """

    b: N
    t_f: N
    t_w: N
    s: N
    f_y: N
    f_u: N
    f_y_web: N
    A_vc: N
    beta: N
    stiffeners: tuple[Stiffener[N], ...] = ()
    ends: tuple[N, ...] = ()
    backing_plate: BackingPlate[N] | None = None


@dataclass(frozen=True, slots=True)
class EndPlate(Generic[N]):
    """An end plate and the beam's web behind it.

    Thickness, width, height of its end beyond the flange in tension, strengths; thickness and strength of the web and
    throat a_w of its fillet welds; the flange in tension, and what else stiffens the plate across (a member's flange
    above its haunch). `a_outer` is the throat of the tension flange's weld on its outer side, None where it is that of
    the inner side. `where` tells the two plates of a splice apart.
    """

    t_p: N
    b_p: N
    end: N
    f_y: N
    f_u: N
    t_w: N
    f_y_web: N
    a_w: N
    flange: Stiffener[N]
    stiffeners: tuple[Stiffener[N], ...] = ()
    a_outer: N | None = None
    where: str = ""
