"""Random joints in random units, places and dialects of geometry are found again exactly as they were built."""

from __future__ import annotations

import pytest
from hypothesis import HealthCheck, assume, given, settings
from hypothesis import strategies as st

from sample_models.making import FOOT, INCH, Model, turned
from tests.patterns.scenes import HEB300, IPE400, EndPlate, joints_of, rows_of
from tests.patterns.test_haunches_and_stiffeners import Haunched

BEAMS = [
    IPE400,
    (300.0, 150.0, 7.1, 10.7, 15.0),
    (600.0, 220.0, 12.0, 19.0, 24.0),
    (402.844, 177.444, 7.468, 10.922, 10.0),
    (190.0, 200.0, 6.5, 10.0, 18.0),
]
WITHIN = 0.1


@st.composite
def places(draw):
    """A place in plan anywhere within 400 km, turned about the vertical and up to 15° out of plumb."""
    shift = draw(st.tuples(st.floats(-4e8, 4e8), st.floats(-4e8, 4e8), st.floats(-1e5, 1e6)))
    plumb = turned(draw(st.floats(-15, 15)), (draw(st.floats(-1, 1)), 1.0, 0))
    return turned(draw(st.floats(-180, 180)), (0, 0, 1), shift) @ plumb


@st.composite
def end_plates(draw):
    """An end plate with two to six rows, at least one of them with a lever arm of half the depth."""
    beam = draw(st.sampled_from(BEAMS))
    slope = draw(st.one_of(st.just(0.0), st.floats(-25, 25)))
    d = draw(st.sampled_from([16.0, 19.05, 20.0, 24.0, 30.0]))
    scene = EndPlate(
        beam=beam, column=HEB300, d=d, slope=slope, gauge=draw(st.floats(80, 120)),
        dialect=draw(st.sampled_from(["swept", "outline", "brep"])),
    )  # fmt: skip
    distance = scene.flange_distance
    steps = draw(st.lists(st.floats(2.4 * d, 180.0), min_size=1, max_size=5))
    top = draw(st.floats(0.6 * distance, distance + 120.0))
    rows = [top]
    for step in steps:
        rows.append(rows[-1] - step)
    scene.rows = tuple(y for y in rows if y > -100.0)
    assume(len(scene.rows) >= 2)
    reach = max(distance / 2 + 140.0, max(abs(y - distance / 2) for y in scene.rows) + 2 * d)
    scene.plate = (draw(st.floats(beam[1], 260.0)), 2 * reach, draw(st.floats(10, 45)))
    return scene


MODELS = {
    "schema": st.sampled_from(["IFC2X3", "IFC4", "IFC4X3"]),
    "unit": st.sampled_from([1.0, 10.0, 1000.0, INCH, FOOT]),
    "world": places(),
}


def compare(joint, scene) -> None:
    assert joint.moment_joint, joint.why
    assert rows_of(joint) == pytest.approx(list(scene.rows), abs=WITHIN)
    assert [row.count for row in joint.rows] == [2] * len(scene.rows)
    assert [row.gauge_mm for row in joint.rows] == pytest.approx([scene.gauge] * len(scene.rows), abs=WITHIN)
    assert joint.plates[0].thickness_mm == pytest.approx(scene.plate[2], abs=WITHIN)
    assert joint.bolts.count == 2 * len(scene.rows)
    assert joint.interface.top.width_mm == pytest.approx(scene.beam[1], abs=WITHIN)
    assert joint.interface.top.thickness_mm == pytest.approx(scene.beam[3], abs=WITHIN)
    assert joint.interface.top.inclination_deg == pytest.approx(abs(scene.slope), abs=0.05)
    assert joint.bolts.grip_mm == pytest.approx(scene.plate[2] + scene.column[3], abs=WITHIN)
    section = joint.supported.section
    found = [section.h_mm, section.b_mm, section.tw_mm, section.tf_mm, section.r_mm]
    assert found == pytest.approx(list(scene.beam), abs=0.2)


@given(end_plates(), st.fixed_dictionaries(MODELS))
@settings(deadline=None, max_examples=120, suppress_health_check=[HealthCheck.too_slow])
def test_end_plates(scene, how):
    model = Model(**how)
    scene.build(model)
    (joint,) = joints_of(model)
    compare(joint, scene)
    assert joint.interface.flange_distance_mm == pytest.approx(scene.flange_distance, abs=WITHIN)


@given(st.sampled_from(["plates", "rolled"]), st.sampled_from(["swept", "brep"]), st.fixed_dictionaries(MODELS),
       st.floats(80, 120))  # fmt: skip
@settings(deadline=None, max_examples=40, suppress_health_check=[HealthCheck.too_slow])
def test_haunches(kind, dialect, how, gauge):
    model, scene = Model(**how), Haunched(kind, dialect)
    scene.gauge = gauge
    scene.build(model)
    (joint,) = joints_of(model)
    compare(joint, scene)
    assert joint.interface.bottom.part == "haunch"
