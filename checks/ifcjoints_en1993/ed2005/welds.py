"""Fillet welds: EN 1993-1-8:2005, 4.5. Throats in mm, stresses in N/mm², forces of a weld per mm of its length in N/mm.

`f_u` is that of the weaker part joined. Effective lengths (4.5.1), long welds (4.11) and plates against unstiffened
flanges (4.10) are the caller's.
"""

from __future__ import annotations

from ifcjoints.checking import N, root

from ..figures import SQRT2, SQRT3

DIRECTIONAL = "EN 1993-1-8:2005, 4.5.3.2"
SIMPLIFIED = "EN 1993-1-8:2005, 4.5.3.3"

BETA_W = {"S235": 0.8, "S275": 0.85, "S355": 0.9, "S420": 1.0, "S460": 1.0}
"""Correlation factor by steel grade (Table 4.1)."""

LEAST_THROAT = 3.0
"""Least throat in mm of a weld that carries force (4.5.2(2))."""


def equivalent_stress(sigma: N, tau_across: N, tau_along: N) -> N:
    """Return the stress on the throat: normal σ_⊥, shear across τ_⊥ and along τ_∥ the weld (4.5.3.2(6))."""
    return root(sigma**2 + 3 * (tau_across**2 + tau_along**2))


def equivalent_limit(f_u: N, beta_w: N, gamma_M2: N) -> N:
    """The most the equivalent stress may be (4.5.3.2(6))."""
    return f_u / (beta_w * gamma_M2)


def normal_limit(f_u: N, gamma_M2: N) -> N:
    """The most σ_⊥ alone may be (4.5.3.2(6))."""
    return 0.9 * f_u / gamma_M2


def transverse_stress(F_w: N, a: N) -> N:
    """σ_⊥ = τ_⊥ of one fillet weld between square plates, pulled across its length by `F_w` per mm; statics at 45°."""
    return F_w / (SQRT2 * a)


def transverse_resistance(a: N, f_u: N, beta_w: N, gamma_M2: N) -> N:
    """F_w,Rd per mm of one fillet weld pulled across its length, directional method: √(σ² + 3τ²) = √2·F_w/a."""
    return a * equivalent_limit(f_u, beta_w, gamma_M2) / SQRT2


def shear_strength(f_u: N, beta_w: N, gamma_M2: N) -> N:
    """f_vw,d, the strength on the throat whatever the direction (4.5.3.3(3))."""
    return f_u / SQRT3 / (beta_w * gamma_M2)


def simplified_resistance(a: N, f_vwd: N) -> N:
    """F_w,Rd per mm of one fillet weld, simplified method (4.5.3.3(2))."""
    return f_vwd * a


def full_strength_throat(t: N, f_y: N, gamma_M0: N, f_u: N, beta_w: N, gamma_M2: N) -> N:
    """Throat of each of two fillet welds that together carry what a plate of thickness `t` yields at.

    The transverse resistance of 4.5.3.2 set equal to half of t·f_y/γ_M0.
    """
    return t * f_y / gamma_M0 / (SQRT2 * equivalent_limit(f_u, beta_w, gamma_M2))
