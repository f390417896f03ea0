"""Laws that both methods keep, on random joints: equilibrium, mirroring, monotonicity, elastic below plastic."""

import itertools

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from ifcjoints_bolt_groups.elastic import elastic
from ifcjoints_bolt_groups.plastic import plastic

from .joints import LIMITS, METHODS, answer, axial_forces, forces, joints, mirrored, moments, seen_from_compression

both = pytest.mark.parametrize("method", METHODS, ids=lambda method: method.name)


@both
@given(joint=joints(), acting=forces, limit=st.sampled_from(LIMITS))
def test_forces_are_in_equilibrium_with_the_action(method, joint, acting, limit):
    """ΣF − C = N, and the compression lies on a flange, or between them where no row pulls."""
    result = answer(method, joint, acting, limit)
    assume(result.status in ("pass", "fail"))
    N, V, M = acting
    assume(method is elastic or V == 0)
    assume(method is elastic or abs(M) <= result.resistance["M_kNm"] or result.resistance["M_kNm"] == 0)
    arms, _, z, e_N = seen_from_compression(joint, result.tension_flange)
    pull, C = sum(result.row_forces_kN), result.compression_kN
    scale = max(pull, abs(N), abs(M) * 1e3 / z)
    assert min(result.row_forces_kN) >= -1e-9 * scale
    assert -1e-9 * scale <= C
    assert pull - C == pytest.approx(N, abs=1e-9 * scale)
    turned = sum(force * arm for force, arm in zip(result.row_forces_kN, arms, strict=True))
    compression_moment = turned - (abs(M) * 1e3 + N * e_N)
    if pull > 1e-9 * scale:
        assert min(abs(compression_moment), abs(compression_moment - C * z)) <= 1e-9 * scale * z
    else:
        assert -1e-9 * scale * z <= compression_moment <= C * z + 1e-9 * scale * z


@both
@given(joint=joints(), limit=st.sampled_from(LIMITS), side=st.sampled_from(["top", "bottom"]))
def test_forces_at_the_resistance_balance_it(method, joint, limit, side):
    result = answer(method, joint, limit=limit, tension_flange=side)
    assume(result.status == "resistance_only")
    arms, *_ = seen_from_compression(joint, side)
    moment = sum(force * arm for force, arm in zip(result.row_forces_kN, arms, strict=True)) / 1e3
    assert moment == pytest.approx(result.resistance["M_kNm"], rel=1e-9)
    assert sum(result.row_forces_kN) == pytest.approx(result.compression_kN, rel=1e-9)


@given(joint=joints(), acting=forces, limit=st.sampled_from(LIMITS))
def test_elastic_resistance_is_at_most_the_plastic_one(joint, acting, limit):
    low, high = (answer(method, joint, acting, limit) for method in METHODS)
    assume(low.status in ("pass", "fail") and high.status in ("pass", "fail"))
    without_shear = high.resistance.get("M_without_V_kNm", high.resistance["M_kNm"])
    assert high.resistance["M_kNm"] <= without_shear * (1 + 1e-9)
    assert low.resistance["M_kNm"] <= without_shear * (1 + 1e-9) + 1e-9


@given(joint=joints(), acting=forces, limit=st.sampled_from(LIMITS))
def test_what_passes_elastically_passes_plastically(joint, acting, limit):
    if answer(elastic, joint, acting, limit).status == "pass":
        assert answer(plastic, joint, acting, limit).utilisation <= 1 + 1e-9


@given(joint=joints(), acting=forces)
def test_a_triangle_never_raises_the_resistance(joint, acting):
    free, kept = (answer(plastic, joint, acting, limit) for limit in ("never", "always"))
    assume(free.status in ("pass", "fail"))
    assert kept.resistance["M_kNm"] <= free.resistance["M_kNm"] * (1 + 1e-9) + 1e-9


@both
@given(joint=joints(), acting=forces, slope=st.sampled_from([0.0, 9.0, -15.0]))
def test_a_mirrored_joint_has_its_directions_exchanged(method, joint, acting, slope):
    N, V, M = acting
    face = joint.interface.model_copy(update={"member_slope_deg": slope})
    joint = joint.model_copy(update={"interface": face})
    here, there = answer(method, joint, acting), answer(method, mirrored(joint), (N, -V, -M))
    assert there.status == here.status
    assert there.resistance == pytest.approx(here.resistance)
    assert there.row_forces_kN[::-1] == pytest.approx(here.row_forces_kN, abs=1e-6)


@both
@given(joint=joints(), acting=forces)
def test_the_sense_of_shear_does_not_matter(method, joint, acting):
    N, V, M = acting
    here, there = answer(method, joint, (N, V, M)), answer(method, joint, (N, -V, M))
    assert (here.utilisation, here.resistance) == (there.utilisation, there.resistance)


@both
@given(joint=joints(), N=axial_forces, M=moments, limit=st.sampled_from(("never", "brittle_rows")))
def test_without_shear_a_joint_passes_where_the_moment_is_within_the_resistance(method, joint, N, M, limit):
    result = answer(method, joint, (N, 0.0, M), limit)
    assume(result.status in ("pass", "fail"))
    M_Rd = result.resistance["M_kNm"]
    assume(abs(abs(M) - M_Rd) > 1e-6 * M_Rd)
    if abs(M) > M_Rd:
        assert result.status == "fail"
    elif method is elastic or limit == "never":
        assert result.status == "pass"


@both
@given(joint=joints(), N=axial_forces, M=moments)
def test_the_moment_stated_is_the_last_that_passes(method, joint, N, M):
    result = answer(method, joint, (N, 0.0, M), "never")
    assume(result.status in ("pass", "fail") and result.resistance["M_kNm"] > 0.01)
    sign = 1.0 if M > 0 else -1.0
    at, beyond = (
        answer(method, joint, (N, 0.0, sign * factor * result.resistance["M_kNm"]), "never")
        for factor in (1 - 1e-9, 1 + 1e-6)
    )
    assert at.utilisation == pytest.approx(1.0, abs=1e-6)
    assert beyond.status == "fail"


@both
@pytest.mark.parametrize("standard", ["EN 1993-1-8", "AISC 360"])
@given(joint=joints(), side=st.sampled_from(["top", "bottom"]))
def test_stronger_bolts_never_lower_the_resistance(method, standard, joint, side):
    grades = ("4.6", "5.6", "8.8", "10.9") if standard == "EN 1993-1-8" else ("A307", "A325", "A490", "Group 200")

    def resistance(d, grade):
        bolts = joint.bolts.model_copy(update={"diameter_mm": d, "grade": grade})
        stronger = joint.model_copy(update={"bolts": bolts})
        result = answer(method, stronger, limit="always", tension_flange=side, standard=standard)
        assume(result.status == "resistance_only")
        return result.resistance["M_kNm"]

    by_size = [resistance(d, grades[2]) for d in (16.0, 19.05, 24.0, 30.0) if d != 19.05 or standard == "AISC 360"]
    by_grade = [resistance(20.0, grade) for grade in grades]
    assert by_size == sorted(by_size)
    assert by_grade == sorted(by_grade)


@both
@given(joint=joints(), V=st.sampled_from([0.0, 100.0]), M=moments)
def test_utilisation_never_falls_with_the_moment(method, joint, V, M):
    used = [answer(method, joint, (0.0, V, M * share)).utilisation for share in (0.1, 0.4, 0.7, 1.0)]
    assume(None not in used)
    assert used == sorted(used)


@both
@given(joint=joints(), M=moments, limit=st.sampled_from(LIMITS))
def test_utilisation_never_falls_with_the_shear(method, joint, M, limit):
    results = [answer(method, joint, (0.0, V, M), limit) for V in (0.0, 60.0, 200.0, 500.0, 1200.0)]
    used = [result.utilisation for result in results]
    assume(None not in used)
    assert all(later >= earlier * (1 - 1e-9) or later > 1 for earlier, later in itertools.pairwise(used))
    fails = [result.status == "fail" for result in results]
    assert fails == sorted(fails)


@both
@given(joint=joints(), acting=forces, limit=st.sampled_from(LIMITS))
def test_what_passes_overloads_no_bolt_and_no_flange(method, joint, acting, limit):
    """Table 3.4 and the flange's yield, from the resistances in the result's own steps."""
    result = answer(method, joint, acting, limit)
    assume(result.status == "pass")
    told = {step.symbol: step.value for step in result.steps}
    shear = abs(acting[1]) / joint.bolts.count / told["F_v,Rd"]
    for row, force in zip(joint.rows, result.row_forces_kN, strict=True):
        tension = force / row.count / told["F_t,Rd"]
        assert tension <= 1 + 1e-6
        assert shear + tension / 1.4 <= 1 + 1e-6
    assert result.compression_kN <= (told["F_c,Rd"] + told.get("F_c,Rd,2", 0.0)) * (1 + 1e-6)
