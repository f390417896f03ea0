"""What limits all rows together, with its steps: the panel in shear, the column's web and the beam's flange pressed.

EN 1993-1-8:2005, 6.2.6.1, 6.2.6.2 and 6.2.6.7, for 6.2.7.2(7). N, mm, N/mm².
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Generic

from ifcjoints.checking import N, NotApplicable, least

from ..figures import Sheets, Step, number, smallest
from . import beam_flange, column_web_compression, column_web_shear
from .inputs import Factors
from .limits import Cap
from .transformation import TABLE, omega

E_STEEL = 210000.0
"""Modulus of elasticity in N/mm² (EN 1993-1-1:2005, 3.2.6)."""


@dataclass(frozen=True, slots=True)
class ColumnWeb(Generic[N]):
    """A column's web behind the flange in compression.

    Thicknesses of web and flange, `s` its root radius r_c or √2·a_c, clear depth d_c, strength, A_vc and β; `sigma`
    is the greatest compressive stress in it from axial force and bending, beside the root.
    """

    t_w: N
    t_f: N
    s: N
    d_c: N
    f_y: N
    A_vc: N
    beta: N
    sigma: N


@dataclass(frozen=True, slots=True)
class Push(Generic[N]):
    """What presses on the column: thickness of the beam's or haunch's flange, throat of its weld, s_p of the plate."""

    t_fb: N
    a_p: N
    s_p: N


@dataclass(frozen=True, slots=True)
class BeamEnd(Generic[N]):
    """The beam where it meets the plate: M_c,Rd, depth with the haunch, and its flange in compression."""

    M_cRd: N
    h: N
    b: N
    t_fb: N
    f_y: N


def panel_in_shear(web: ColumnWeb[N], V_add: N | None, factors: Factors[N], sheets: Sheets[N]) -> list[Cap[N]]:
    """V_wp,Rd/β of the panel, with what stiffeners add to it; nothing for β = 0. NotApplicable beyond 69ε."""
    if float(web.beta) == 0:
        return []
    step, clause = sheets("column web panel in shear"), column_web_shear.CLAUSE
    slender = step("d_c/t_w", web.d_c / web.t_w, "", clause)
    most = step("69ε", column_web_shear.greatest_slenderness(web.f_y), "", clause)
    if slender > most:
        raise NotApplicable("the column's web is more slender than 69ε: EN 1993-1-8, 6.2.6.1, does not cover it.")
    V = step("V_wp,Rd", column_web_shear.resistance(web.f_y, web.A_vc, factors.gamma_M0), "kN", clause)
    if V_add is not None:
        V = step("V_wp,Rd + V_wp,add,Rd", V + V_add, "kN", clause)
    return [Cap("column web panel in shear", step("V_wp,Rd/β", V / web.beta, "kN", f"{clause}, 6.2.7.2(7)"))]


def column_web_pressed(web: ColumnWeb[N], push: Push[N], factors: Factors[N], sheets: Sheets[N]) -> Cap[N]:
    """F_c,wc,Rd of an unstiffened web."""
    step, clause = sheets("column web in compression"), column_web_compression.CLAUSE
    b_eff = step(
        "b_eff,c,wc",
        column_web_compression.effective_width_bolted(push.t_fb, push.a_p, web.t_f, web.s, push.s_p),
        "mm", clause,
    )  # fmt: skip
    factor = step("ω", omega(web.beta, b_eff, web.t_w, web.A_vc), "", TABLE)
    k_wc = step("k_wc", column_web_compression.axial_stress_factor(web.sigma, web.f_y), "", clause)
    rho = _buckling_factor(web, b_eff, step)
    crushing = column_web_compression.crushing(factor, k_wc, b_eff, web.t_w, web.f_y, factors.gamma_M0)
    buckling = column_web_compression.buckling(factor, k_wc, rho, b_eff, web.t_w, web.f_y, factors.gamma_M1)
    resistances = [step("F_c,wc,yield", crushing, "kN", clause), step("F_c,wc,buckling", buckling, "kN", clause)]
    return Cap("column web in compression", step("F_c,wc,Rd", least(*resistances), "kN", clause))


def _buckling_factor(web: ColumnWeb[N], b_eff: N, step: Step[N]) -> N:
    E, clause = number(E_STEEL, b_eff), column_web_compression.CLAUSE
    slender = step("λ̄_p", column_web_compression.slenderness(b_eff, web.d_c, web.f_y, E, web.t_w), "", clause)
    return step("ρ", column_web_compression.plate_buckling(slender), "", clause)


def beam_pressed(beam: BeamEnd[N], factors: Factors[N], sheets: Sheets[N], where: str = "") -> Cap[N]:
    """F_c,fb,Rd; for a beam deeper than 600 mm with no more than a fifth from its web."""
    step, clause = sheets("beam flange and web in compression"), beam_flange.CLAUSE
    resistances = [step("M_c,Rd/(h − t_fb)", beam_flange.resistance(beam.M_cRd, beam.h, beam.t_fb), "kN", clause)]
    if float(beam.h) > beam_flange.DEEP:
        flange = beam_flange.resistance_of_deep_beam(beam.b, beam.t_fb, beam.f_y, factors.gamma_M0)
        resistances.append(step("F_c,fb,deep", flange, "kN", clause))
    F_c = step("F_c,fb,Rd", smallest(resistances), "kN", clause)
    return Cap("beam flange and web in compression", F_c, where)
