"""Both methods against general-purpose solvers that know nothing of states, rows or fillings.

The elastic forces are those of least complementary energy, Σ F²/2n over a joint's bolts, among all pulls and pushes
that balance the action (solved as non-negative least squares); the plastic moment without a triangular limit is a
linear programme.
"""

import numpy as np
import pytest
from hypothesis import assume, given, settings
from scipy.optimize import linprog, nnls

from ifcjoints_bolt_groups.elastic import elastic
from ifcjoints_bolt_groups.plastic import plastic

from .joints import answer, axial_forces, joints, moments, seen_from_compression

STIFF = 1e-4
"""Weight of the energy beside the balance of forces; the balance is missed by about its square."""


def least_energy(arms, counts, z, N, M_c):
    """Return row forces and the two flanges' pushes, and whether they balance N and M_c."""
    energy = np.diag(STIFF / np.sqrt(np.array(counts, float)))
    rows = len(arms)
    balance = np.array([[*np.ones(rows), -1.0, -1.0], [*(np.array(arms) / z), 0.0, -1.0]])
    system = np.vstack([balance, np.hstack([energy, np.zeros((rows, 2))])])
    found, _ = nnls(system, np.array([N, M_c / z, *np.zeros(rows)]), maxiter=1000)
    missed = np.abs(balance @ found - [N, M_c / z]).max()
    return found, missed < 1e-6 * max(abs(N), abs(M_c) / z)


@settings(max_examples=300)
@given(joint=joints(), N=axial_forces, M=moments)
def test_elastic_forces_have_the_least_energy(joint, N, M):
    result = answer(elastic, joint, (N, 0.0, M))
    arms, counts, z, e_N = seen_from_compression(joint, result.tension_flange)
    found, balanced = least_energy(arms, counts, z, N, abs(M) * 1e3 + N * e_N)
    if result.status == "not_applicable":
        _, alone = least_energy(arms, counts, z, N, N * e_N)
        assert all(arm <= 0 for arm in arms) or not balanced or not alone
        return
    scale = max(found)
    assert result.row_forces_kN == pytest.approx(found[:-2], abs=2e-3 * scale)
    assert result.compression_kN == pytest.approx(found[-2:].sum(), abs=2e-3 * scale)


def given_resistances(result):
    """Read what one bolt and the flanges carry from the result's own steps; kN."""
    told = {step.symbol: step.value for step in result.steps}
    return told["F_t,Rd"], told["F_c,Rd"], told.get("F_c,Rd,2", 0.0)


def programme(arms, z, N, e_N, caps, *, M=None):
    """Return the greatest M that pulls and pushes within `caps` balance with N, or None; M may be given."""
    rows = len(arms)
    force = [*np.ones(rows), -1.0, -1.0, 0.0]
    moment = [*arms, 0.0, -z, -1.0]
    bounds = [*[(0.0, cap) for cap in caps], (M, M) if M is not None else (0.0, None)]
    done = linprog([*np.zeros(rows + 2), -1.0], A_eq=[force, moment], b_eq=[N, N * e_N], bounds=bounds)
    return done.x[-1] / 1e3 if done.status == 0 else None


@settings(max_examples=300)
@given(joint=joints(), N=axial_forces, M=moments)
def test_plastic_resistance_is_the_programme_s(joint, N, M):
    """One flange bears, or both do and no row pulls; and N must be carried without a moment."""
    result = answer(plastic, joint, (N, 0.0, M), "never")
    assume(result.status in ("pass", "fail"))
    arms, counts, z, e_N = seen_from_compression(joint, result.tension_flange)
    F_t, F_c, F_c2 = given_resistances(result)
    bolts = [count * F_t for count in counts]
    none = [0.0] * len(arms)
    ways = [[*bolts, F_c, 0.0], [*bolts, 0.0, F_c2], [*none, F_c, F_c2]]
    alone = [programme(arms, z, N, e_N, caps, M=0.0) for caps in ways]
    expected = 0.0
    if any(each is not None for each in alone):
        expected = max(programme(arms, z, N, e_N, caps) or 0.0 for caps in (ways[0], ways[2]))
    assert result.resistance["M_kNm"] == pytest.approx(expected, rel=1e-6, abs=1e-4)
