"""The joint's bolt by the run's standard: what it carries in tension, in shear, and in both."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from ifcjoints.checking import NotCheckable, Quantity, Subject, Trace, greatest, least
from ifcjoints.tables.bolts import BoltGrade, BoltSize, bolt_grade, bolt_size

from . import bolts_aisc360 as aisc
from . import bolts_en1993 as en
from .origins import origin


@dataclass(frozen=True, slots=True)
class BoltResistance:
    """Design resistances of one bolt in N.

    `beside_shear` gives the tension resistance that a shear force leaves; `interaction` the ratio of a tension
    beside a shear force, at most 1 where it holds; both stand in `clause`, the resistance to shear in `shear_clause`.
    """

    tension: Quantity
    shear: Quantity
    beside_shear: Callable[[Quantity], Quantity]
    interaction: Callable[[Quantity, Quantity], Quantity]
    clause: str
    shear_clause: str


def bolt_resistance(subject: Subject, trace: Trace) -> BoltResistance:
    """Work out the resistances of the joint's bolt; NotCheckable says what is lacking."""
    grade, size = _grade(subject), _size(subject)
    told = origin(subject, "bolts.diameter")
    d = trace.given("d", size.d, "mm", f"{size.name} ({told})")
    if grade.standard == "AISC 360":
        return _aisc(subject, trace, grade, d)
    if not size.metric:
        raise NotCheckable(
            f"the bolts are {size.name} of grade {grade.name}, and property classes are for metric sizes; "
            "correct the diameter or the grade in the model."
        )
    return _en(subject, trace, grade, size)


def _grade(subject: Subject) -> BoltGrade:
    text = subject.joint.bolts.grade
    grade = bolt_grade(text) if text else None
    if grade is None:
        told = f'the bolts\' grade "{text}" is not in the tables' if text else "the bolts' grade is not known"
        raise NotCheckable(f"{told}; give it in the model or set [defaults] bolt_grade.")
    if grade.standard != subject.basis.standard:
        raise NotCheckable(
            f"bolts of grade {grade.name} are not covered by {subject.basis.standard}; "
            f'set [basis] standard = "{grade.standard}".'
        )
    return grade


def _size(subject: Subject) -> BoltSize:
    d = subject.joint.bolts.diameter_mm
    if d is None:
        raise NotCheckable("the bolts' diameter is not known; give it in the model (NominalDiameter or a body).")
    size = bolt_size(d)
    if size is None:
        raise NotCheckable(
            f"the bolts' diameter of {d:.2f} mm is no size of the metric coarse or the inch series; "
            "give the nominal diameter in the model (NominalDiameter)."
        )
    return size


def _en(subject: Subject, trace: Trace, grade: BoltGrade, size: BoltSize) -> BoltResistance:
    A_s = trace.given("A_s", size.A_s, "mm²", size.source)
    f_ub = trace.given("f_ub", grade.f_ub, "N/mm²", f"{grade.source}, {grade.name} ({origin(subject, 'bolts.grade')})")
    gamma_M2 = trace.given("γ_M2", subject.basis.gamma_M2, "", "settings")
    k_2 = trace.given("k_2", en.K_2, "", f"{en.TABLE}, bolts not countersunk")
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
        en.TABLE,
    )


def _aisc(subject: Subject, trace: Trace, grade: BoltGrade, d: Quantity) -> BoltResistance:
    threads = "in" if grade.threads_in_shear_plane else "out of"
    table = f"{grade.source}, {grade.name} ({origin(subject, 'bolts.grade')})"
    F_nt = trace.given("F_nt", grade.F_nt, "N/mm²", table)
    F_nv = trace.given("F_nv", grade.F_nv, "N/mm²", f"{table}, threads {threads} the shear plane")
    phi = trace.given("φ", subject.basis.phi_bolt, "", "settings")
    A_b = trace.step("A_b", aisc.shank_area(d), "mm²", aisc.CLAUSE)
    tension = trace.step("φR_nt", aisc.strength(phi, F_nt, A_b), "kN", aisc.CLAUSE)
    shear = trace.step("φR_nv", aisc.strength(phi, F_nv, A_b), "kN", aisc.CLAUSE)
    zero = trace.constant("0", 0.0)

    def beside(F_v: Quantity) -> Quantity:
        stress = least(F_nt, aisc.reduced_tension_stress(F_nt, F_nv, F_v / A_b, phi))
        return aisc.strength(phi, greatest(zero, stress), A_b)

    def interaction(F_t: Quantity, F_v: Quantity) -> Quantity:
        return aisc.combined(F_t, tension, F_v, shear)

    return BoltResistance(tension, shear, beside, interaction, aisc.COMBINED_CLAUSE, aisc.CLAUSE)
