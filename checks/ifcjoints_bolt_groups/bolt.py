"""The joint's bolt by the run's standard: what it carries in tension, in shear, and in both."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from ifcjoints.checking import NotCheckable, Quantity, Subject, Trace, greatest, least
from ifcjoints.model.joints import Provenance
from ifcjoints.tables.bolts import BoltGrade, bolt_grade, tensile_stress_area

from . import bolts_aisc360 as aisc
from . import bolts_en1993 as en


@dataclass(frozen=True, slots=True)
class BoltResistance:
    """Design resistances of one bolt in N.

    `beside_shear` gives the tension resistance that a shear force leaves; `interaction` the ratio, at most
    1 where it holds, of a tension beside a shear force, and its clause.
    """

    tension: Quantity
    shear: Quantity
    beside_shear: Callable[[Quantity], Quantity]
    interaction: Callable[[Quantity, Quantity], Quantity]
    clause: str


def bolt_resistance(subject: Subject, trace: Trace) -> BoltResistance:
    """Work out the resistances of the joint's bolt; NotCheckable says what is lacking."""
    bolts = subject.joint.bolts
    if bolts.diameter_mm is None:
        raise NotCheckable("the bolts' diameter is not known; give it in the model (NominalDiameter or a body).")
    grade = bolt_grade(bolts.grade) if bolts.grade else None
    if grade is None:
        told = (
            f'the bolts\' grade "{bolts.grade}" is not in the tables'
            if bolts.grade
            else "the bolts' grade is not known"
        )
        raise NotCheckable(f"{told}; give it in the model or set [defaults] bolt_grade.")
    if grade.standard != subject.basis.standard:
        raise NotCheckable(
            f"bolts of grade {grade.name} are not covered by {subject.basis.standard}; "
            f'set [basis] standard = "{grade.standard}".'
        )
    d = trace.given("d", bolts.diameter_mm, "mm", _origin(subject, "bolts.diameter"))
    work_out = _en if grade.standard == "EN 1993-1-8" else _aisc
    return work_out(subject, trace, grade, d)


def _origin(subject: Subject, key: str) -> str:
    origin: Provenance | None = subject.joint.provenance.get(key)
    return f"{origin.source}: {origin.detail}" if origin else "given"


def _en(subject: Subject, trace: Trace, grade: BoltGrade, d: Quantity) -> BoltResistance:
    area = tensile_stress_area(float(d))
    if area is None:
        raise NotCheckable(f"a diameter of {float(d):.2f} mm is no size of the metric coarse series (ISO 261).")
    A_s = trace.given("A_s", area, "mm²", "ISO 898-1, coarse thread")
    f_ub = trace.given(
        "f_ub", grade.f_ub, "N/mm²", f"EN 1993-1-8:2005, Table 3.1, {grade.name} ({_origin(subject, 'bolts.grade')})"
    )
    gamma_M2 = trace.given("γ_M2", subject.basis.gamma_M2, "", "settings")
    k_2 = trace.given("k_2", en.K_2, "", en.TABLE)
    alpha_v = trace.given("α_v", en.ALPHA_V[grade.name], "", f"{en.TABLE}, threads in the shear plane")
    F_tRd = trace.step("F_t,Rd", en.tension_resistance(k_2, f_ub, A_s, gamma_M2), "kN", en.TABLE)
    F_vRd = trace.step("F_v,Rd", en.shear_resistance(alpha_v, f_ub, A_s, gamma_M2), "kN", en.TABLE)
    zero = trace.constant("0", 0.0)
    return BoltResistance(
        F_tRd,
        F_vRd,
        lambda F_vEd: greatest(zero, least(F_tRd, en.tension_beside_shear(F_vEd, F_vRd, F_tRd))),
        lambda F_tEd, F_vEd: en.combined(F_vEd, F_vRd, F_tEd, F_tRd),
        en.TABLE,
    )


def _aisc(subject: Subject, trace: Trace, grade: BoltGrade, d: Quantity) -> BoltResistance:
    threads = "in" if grade.threads_in_shear_plane else "out of"
    table = f"AISC 360-22, Table J3.2, {grade.name} ({_origin(subject, 'bolts.grade')})"
    F_nt = trace.given("F_nt", grade.F_nt, "N/mm²", table)
    F_nv = trace.given("F_nv", grade.F_nv, "N/mm²", f"{table}, threads {threads} the shear plane")
    phi = trace.given("φ", subject.basis.phi_bolt, "", "settings")
    A_b = trace.step("A_b", aisc.shank_area(d), "mm²", aisc.CLAUSE)
    tension = trace.step("φR_nt", aisc.strength(phi, F_nt, A_b), "kN", aisc.CLAUSE)
    shear = trace.step("φR_nv", aisc.strength(phi, F_nv, A_b), "kN", aisc.CLAUSE)
    zero = trace.constant("0", 0.0)

    def beside(shear_force: Quantity) -> Quantity:
        stress = least(F_nt, aisc.reduced_tension_stress(F_nt, F_nv, shear_force / A_b, phi))
        return aisc.strength(phi, greatest(zero, stress), A_b)

    def interaction(tension_force: Quantity, shear_force: Quantity) -> Quantity:
        left = beside(shear_force)
        return tension_force / left if float(left) > 0 else shear_force / shear + tension_force / tension

    return BoltResistance(tension, shear, beside, interaction, aisc.COMBINED_CLAUSE)
