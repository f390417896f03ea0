"""The equivalent T-stub in tension: EN 1993-1-8:2005, 6.2.4 and Table 6.2. N, mm, N/mm².

Two bolts in each row, one on either side of the web.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Generic, Literal

from ifcjoints.checking import N, NotApplicable, least

from ..figures import Step, smallest
from .effective_lengths import Lengths

TABLE = "EN 1993-1-8:2005, Table 6.2"

Mode = Literal["mode 1", "mode 2", "mode 3", "modes 1-2, no prying"]


def prying_edge(e_min: N, m: N) -> N:
    """n, where the prying force acts."""
    return least(e_min, 1.25 * m)


def plastic_moment(l_eff: N, t_f: N, f_y: N, gamma_M0: N) -> N:
    """M_pl,Rd of a yield line of length `l_eff`: M_pl,1,Rd or M_pl,2,Rd by the mode's length, M_bp,Rd by mode 1's."""
    return 0.25 * l_eff * t_f**2 * f_y / gamma_M0


def mode_1(M_pl1: N, m: N) -> N:
    """F_T,1,Rd, method 1: the flange yields at the web and at the bolts."""
    return 4 * M_pl1 / m


def mode_1_spread(M_pl1: N, m: N, n: N, e_w: N) -> N:
    """F_T,1,Rd, method 2: as method 1, the bolt's force spread under its washer or head; e_w = d_w/4."""
    return (8 * n - 2 * e_w) * M_pl1 / _spread(m, n, e_w)


def backing(M_bp: N, m: N) -> N:
    """What backing plates add to mode 1, method 1."""
    return 2 * M_bp / m


def backing_spread(M_bp: N, m: N, n: N, e_w: N) -> N:
    """What backing plates add to mode 1, method 2."""
    return 4 * n * M_bp / _spread(m, n, e_w)


def _spread(m: N, n: N, e_w: N) -> N:
    return 2 * m * n - e_w * (m + n)


def mode_2(M_pl2: N, m: N, n: N, F_t: N) -> N:
    """F_T,2,Rd: the bolts fail with the flange yielding at the web; `F_t` is ΣF_t,Rd."""
    return (2 * M_pl2 + n * F_t) / (m + n)


def without_prying(M_pl1: N, m: N) -> N:
    """F_T,1-2,Rd: the flange yields and lifts off at its edges."""
    return 2 * M_pl1 / m


def prying_length(m: N, A_s: N, rows: int, l_eff1: N, t_f: N) -> N:
    """L_b*: prying forces may develop in bolts no longer than this."""
    return 8.8 * m**3 * A_s * rows / (l_eff1 * t_f**3)


@dataclass(frozen=True, slots=True)
class BackingPlate(Generic[N]):
    """A plate behind the column's flange on either side of its web: thickness and yield strength."""

    t_bp: N
    f_y: N


@dataclass(frozen=True, slots=True)
class LongBolts(Generic[N]):
    """Bolts for which prying is not taken for granted: stress area and elongation length L_b."""

    A_s: N
    L_b: N


@dataclass(frozen=True, slots=True)
class Flange(Generic[N]):
    """A T-stub's flange: thickness, yield strength, distance m to the web's toe, least edge distance e_min.

    `e_w` is given for method 2 of mode 1, None for method 1. `bolts` is None where prying forces are taken to develop,
    as the note of Table 6.2 allows for beam-to-column joints and splices; given, L_b decides.
    """

    t_f: N
    f_y: N
    m: N
    e_min: N
    e_w: N | None = None
    backing_plate: BackingPlate[N] | None = None
    bolts: LongBolts[N] | None = None


@dataclass(frozen=True, slots=True)
class Strength(Generic[N]):
    """F_T,Rd, and the mode that governs it."""

    F_TRd: N
    mode: Mode


def resistance(
    flange: Flange[N], lengths: Lengths[N], rows: int, F_t: N, gamma_M0: N, symbol: str, step: Step[N]
) -> Strength[N]:
    """Work out F_T,Rd of so many rows with these effective lengths and `F_t` = ΣF_t,Rd; `symbol` is its name."""
    M_pl1 = step("M_pl,1,Rd", plastic_moment(lengths.mode_1, flange.t_f, flange.f_y, gamma_M0), "kNm", TABLE)
    if flange.bolts is not None and not _pries(flange, flange.bolts, lengths, rows, step):
        modes: dict[Mode, N] = {
            "modes 1-2, no prying": step("F_T,1-2,Rd", without_prying(M_pl1, flange.m), "kN", TABLE)
        }
    else:
        n = step("n", prying_edge(flange.e_min, flange.m), "mm", TABLE)
        M_pl2 = step("M_pl,2,Rd", plastic_moment(lengths.mode_2, flange.t_f, flange.f_y, gamma_M0), "kNm", TABLE)
        modes = {
            "mode 1": step("F_T,1,Rd", _yielding(flange, lengths, M_pl1, n, gamma_M0, step), "kN", TABLE),
            "mode 2": step("F_T,2,Rd", mode_2(M_pl2, flange.m, n, F_t), "kN", TABLE),
        }
    modes["mode 3"] = step("F_T,3,Rd", F_t, "kN", TABLE)
    weakest = smallest(list(modes.values()))
    return Strength(step(symbol, weakest, "kN", TABLE), min(modes, key=lambda mode: float(modes[mode])))


def _pries(flange: Flange[N], bolts: LongBolts[N], lengths: Lengths[N], rows: int, step: Step[N]) -> bool:
    longest = step("L_b*", prying_length(flange.m, bolts.A_s, rows, lengths.mode_1, flange.t_f), "mm", TABLE)
    return float(bolts.L_b) <= float(longest)


def _yielding(flange: Flange[N], lengths: Lengths[N], M_pl1: N, n: N, gamma_M0: N, step: Step[N]) -> N:
    """F_T,1,Rd by the method that `e_w` asks for, with the backing plates there are."""
    m, e_w, plate = flange.m, flange.e_w, flange.backing_plate
    if e_w is not None and float(_spread(m, n, e_w)) <= 0:
        raise NotApplicable("the bolts lie so near the edge or the web that method 2 of Table 6.2 has no sense.")
    F_T1 = mode_1(M_pl1, m) if e_w is None else mode_1_spread(M_pl1, m, n, e_w)
    if plate is None:
        return F_T1
    M_bp = step("M_bp,Rd", plastic_moment(lengths.mode_1, plate.t_bp, plate.f_y, gamma_M0), "kNm", TABLE)
    return F_T1 + (backing(M_bp, m) if e_w is None else backing_spread(M_bp, m, n, e_w))
