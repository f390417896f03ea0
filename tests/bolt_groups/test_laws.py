"""Laws that both methods keep, on random joints: equilibrium, mirroring, monotonicity, elastic below plastic."""

from dataclasses import replace

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from ifcjoints.checking.runner import run_check
from ifcjoints.checking.testing import plain_joint, plain_subject
from ifcjoints_bolt_groups.elastic import elastic
from ifcjoints_bolt_groups.plastic import PlasticOptions, plastic

DISTANCE = 400.0
LIMITS = ("never", "brittle_rows", "always")


@st.composite
def joints(draw):
    """Draw a joint with two to seven rows, some of them outside the flanges, symmetric or not."""
    levels = draw(st.lists(st.integers(-8, 48), min_size=2, max_size=7, unique=True))
    rows = tuple((10.0 * level + 3.0, draw(st.sampled_from([2, 4]))) for level in sorted(levels, reverse=True))
    return plain_joint(
        rows,
        flange_distance=DISTANCE,
        flange=(draw(st.floats(120, 300)), draw(st.floats(8, 30))),
        inclinations=(draw(st.floats(0, 30)), draw(st.floats(0, 30))),
        bolt=(draw(st.sampled_from([16.0, 20.0, 24.0, 30.0])), draw(st.sampled_from(["4.6", "8.8", "10.9"]))),
        plate_thickness=draw(st.floats(8, 40)),
    )


forces = st.tuples(
    st.sampled_from([0.0, -400.0, -60.0, 40.0, 150.0, 500.0]),
    st.sampled_from([0.0, -120.0, 80.0]),
    st.floats(1.0, 300.0).flatmap(lambda m: st.sampled_from([m, -m])),
)


def subject(joint, acting=None, limit="brittle_rows", **others):
    return replace(plain_subject(joint, acting, **others), options=PlasticOptions(triangular_limit=limit))


def mirrored(joint):
    """Turn a joint upside down: the same joint with its flanges' names exchanged."""
    rows = [
        row.model_copy(update={"y_bottom_mm": row.y_top_mm, "y_top_mm": row.y_bottom_mm})
        for row in reversed(joint.rows)
    ]
    face = joint.interface
    turned = face.model_copy(
        update={"top": face.bottom, "bottom": face.top, "axis_y_mm": face.flange_distance_mm - face.axis_y_mm}
    )
    return joint.model_copy(update={"rows": tuple(rows), "interface": turned})


@pytest.mark.parametrize("method", [elastic, plastic], ids=lambda method: method.name)
@given(joint=joints(), acting=forces, limit=st.sampled_from(LIMITS))
def test_forces_are_in_equilibrium_with_the_action(method, joint, acting, limit):
    result = run_check(method, subject(joint, acting, limit))
    assume(result.status in ("pass", "fail"))
    assume(method is elastic or result.status == "pass")
    N, _, M = acting
    arms = [row.lever_arm(result.tension_flange) for row in joint.rows]
    pull = sum(result.row_forces_kN)
    scale = max(pull, abs(N), result.compression_kN, 1e-6)
    assert pull - result.compression_kN == pytest.approx(N, abs=1e-9 * scale)
    about_flange = abs(M) * 1e3 + N * joint.interface.axis_lever_arm(result.tension_flange)
    if pull > 0:
        turned = sum(force * arm for force, arm in zip(result.row_forces_kN, arms, strict=True))
        assert turned == pytest.approx(about_flange, abs=1e-9 * scale * DISTANCE)
    else:
        assert about_flange <= 1e-9 * scale * DISTANCE
        assert -about_flange / result.compression_kN <= DISTANCE * 2


@given(joint=joints(), limit=st.sampled_from(LIMITS), side=st.sampled_from(["top", "bottom"]))
def test_resistance_forces_are_in_equilibrium(joint, limit, side):
    for method in (elastic, plastic):
        result = run_check(method, subject(joint, limit=limit, tension_flange=side))
        assume(result.status == "resistance_only")
        arms = [row.lever_arm(side) for row in joint.rows]
        moment = sum(force * arm for force, arm in zip(result.row_forces_kN, arms, strict=True)) / 1e3
        assert moment == pytest.approx(result.resistance["M_kNm"], rel=1e-9)
        assert sum(result.row_forces_kN) == pytest.approx(result.compression_kN, rel=1e-9)


@given(joint=joints(), acting=forces, limit=st.sampled_from(LIMITS))
def test_elastic_resistance_is_at_most_the_plastic_one(joint, acting, limit):
    N, _, M = acting
    low = run_check(elastic, subject(joint, (N, 0.0, M), limit))
    high = run_check(plastic, subject(joint, (N, 0.0, M), limit))
    assume(low.status in ("pass", "fail") and high.status in ("pass", "fail"))
    assert low.resistance["M_kNm"] <= high.resistance["M_kNm"] * (1 + 1e-9) + 1e-9


@pytest.mark.parametrize("method", [elastic, plastic], ids=lambda method: method.name)
@given(joint=joints(), acting=forces)
def test_a_mirrored_joint_has_its_directions_exchanged(method, joint, acting):
    N, V, M = acting
    here = run_check(method, subject(joint, acting))
    there = run_check(method, subject(mirrored(joint), (N, V, -M)))
    assert there.status == here.status
    assert there.resistance == pytest.approx(here.resistance)
    assert there.row_forces_kN[::-1] == pytest.approx(here.row_forces_kN, abs=1e-9)


@pytest.mark.parametrize("method", [elastic, plastic], ids=lambda method: method.name)
@given(joint=joints(), side=st.sampled_from(["top", "bottom"]))
def test_stronger_bolts_never_lower_the_resistance(method, joint, side):
    def resistance(bolt):
        stronger = joint.model_copy(update={"bolts": joint.bolts.model_copy(update=bolt)})
        result = run_check(method, subject(stronger, limit="always", tension_flange=side))
        assume(result.status == "resistance_only")
        return result.resistance["M_kNm"]

    by_size = [resistance({"diameter_mm": d, "grade": "8.8"}) for d in (16.0, 20.0, 24.0, 30.0)]
    by_grade = [resistance({"diameter_mm": 20.0, "grade": grade}) for grade in ("4.6", "5.6", "8.8", "10.9")]
    assert by_size == sorted(by_size)
    assert by_grade == sorted(by_grade)


@pytest.mark.parametrize("method", [elastic, plastic], ids=lambda method: method.name)
@given(joint=joints(), acting=forces)
def test_utilisation_never_falls_with_the_moment(method, joint, acting):
    N, V, M = acting
    assume(N <= 0)
    used = [run_check(method, subject(joint, (N, V, M * share))).utilisation for share in (0.4, 0.7, 1.0)]
    assume(None not in used)
    assert used == sorted(used)
