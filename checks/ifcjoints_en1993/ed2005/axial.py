"""Axial force beside the moment: EN 1993-1-8:2005, 6.2.7.1(2) and (3). N and Nmm."""

from __future__ import annotations

from ifcjoints.checking import N

CLAUSE = "EN 1993-1-8:2005, 6.2.7.1"
NEGLIGIBLE = 0.05
"""Share of N_pl,Rd up to which the axial force of the member does not count."""


def share(N_Ed: N, N_plRd: N) -> N:
    """The axial force as a share of the member's plastic resistance."""
    return N_Ed / N_plRd


def plastic_resistance(A: N, f_y: N, gamma_M0: N) -> N:
    """N_pl,Rd of the member (EN 1993-1-1:2005, 6.2.4)."""
    return A * f_y / gamma_M0


def interaction(M_Ed: N, M_jRd: N, N_Ed: N, N_jRd: N) -> N:
    """M_j,Ed/M_j,Rd + N_j,Ed/N_j,Rd, to be at most 1, (6.24); N_j,Rd is the joint's without any moment."""
    return M_Ed / M_jRd + N_Ed / N_jRd


def reduced_moment(M_jRd: N, N_Ed: N, N_jRd: N) -> N:
    """The moment that (6.24) leaves beside an axial force; nothing where it is negative."""
    return M_jRd * (1 - N_Ed / N_jRd)
