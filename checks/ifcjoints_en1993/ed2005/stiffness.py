"""Rotational stiffness: EN 1993-1-8:2005, 6.3.1 and 6.3.3. N, mm; S_j in Nmm/rad."""

from __future__ import annotations

from collections.abc import Sequence

from ifcjoints.checking import N

from ..figures import number, total

CLAUSE = "EN 1993-1-8:2005, 6.3.1"
ROWS = "EN 1993-1-8:2005, 6.3.3.1"
PSI = 2.7
"""ψ of a bolted end plate (Table 6.8)."""


def in_series(k: Sequence[N]) -> N:
    """1/Σ(1/k): k_eff,r of a row (6.30), or of the whole joint."""
    return 1 / total(1 / each for each in k)


def equivalent_lever_arm(k_eff: Sequence[N], h: Sequence[N]) -> N:
    """z_eq of rows at h_r, (6.31)."""
    pairs = list(zip(k_eff, h, strict=True))
    return total(k * arm**2 for k, arm in pairs) / total(k * arm for k, arm in pairs)


def equivalent_coefficient(k_eff: Sequence[N], h: Sequence[N], z_eq: N) -> N:
    """k_eq of rows at h_r, (6.29)."""
    return total(k * arm for k, arm in zip(k_eff, h, strict=True)) / z_eq


def initial(E: N, z: N, k: Sequence[N]) -> N:
    """S_j,ini, (6.27) with μ = 1."""
    return E * z**2 * in_series(k)


def ratio(M_Ed: N, M_jRd: N) -> N:
    """μ = S_j,ini/S_j of an end-plate joint, (6.28); defined up to M_j,Rd."""
    if float(M_Ed) <= 2 / 3 * float(M_jRd):
        return number(1.0, M_Ed)
    mu: N = (1.5 * M_Ed / M_jRd) ** PSI
    return mu


def at_moment(S_jini: N, mu: N) -> N:
    """S_j (6.27)."""
    return S_jini / mu
