"""Forces on members' ends from analysis models in IFC, against hand statics: signs, units, directions, places."""

from __future__ import annotations

import numpy as np
import pytest

from ifcjoints import Settings, audit
from ifcjoints.errors import ActionsError
from ifcjoints.settings import ActionsSettings
from sample_models.making import Model, turned
from tests.actions.made_analysis import Analysis, Bar
from tests.patterns.scenes import EndPlate

NODE, SPAN = np.array([-150.0, 0.0, 3000.0]), 8000.0
FAR = NODE + [SPAN, 0, 0]
LOAD = 20.0
END_MOMENT, END_SHEAR = LOAD * 8.0**2 / 12, LOAD * 8.0 / 2
"""A beam of 8 m fixed at both ends under 20 kN/m: w l²/12 = 106.7 kNm hogging and w l/2 = 80 kN at either end."""


def write_fixed_beam(analysis: Analysis, backwards: bool = False, z=(0, 0, 1), axes: str = "LOCAL_COORDS"):
    """Add the fixed beam with the forces inside it, and its supports' reactions."""
    beam = Bar(NODE / 1e3, FAR / 1e3, (0, 0, END_SHEAR), (0, -END_MOMENT, 0), (0, 0, -LOAD), z)
    beam = beam.backwards() if backwards else beam
    member = analysis.member(beam.start * 1e3, beam.end * 1e3, z)
    samples = [(x * 1e3, beam.section(x)) for x in np.linspace(0, beam.length, 5)]
    if axes == "LOCAL_COORDS":
        samples = [(at, beam.in_local(six)) for at, six in samples]
    supports = [
        analysis.support(analysis.node(NODE), (0, 0, END_SHEAR, 0, -END_MOMENT, 0)),
        analysis.support(analysis.node(FAR), (0, 0, END_SHEAR, 0, END_MOMENT, 0)),
    ]
    analysis.results("ULS 1", analysis.along(member, samples, axes=axes), *supports)
    return member


def audited(analysis: Analysis, folder, world=None, settings=None, steel=None):
    path = folder / "analysis.ifc"
    analysis.file.write(str(path))
    model = Model(world=world)
    (steel or EndPlate()).build(model)
    return audit(model.file, actions=path, settings=settings or Settings())


def acting(result):
    (joint,) = result.joints
    checks = [each for each in joint.checks if each.check == "bolt_group.elastic" and each.actions]
    return {each.case: (each.actions.N_kN, each.actions.V_kN, each.actions.M_kNm) for each in checks}


def said(result, text: str) -> bool:
    return any(text in problem.message for problem in result.problems)


@pytest.mark.parametrize("backwards", [False, True])
@pytest.mark.parametrize("axes", ["LOCAL_COORDS", "GLOBAL_COORDS"])
@pytest.mark.parametrize(("unit", "kilo"), [(1000.0, True), (1.0, False), (304.8, True)])
def test_a_fixed_beam_under_uniform_load(backwards, axes, unit, kilo, tmp_path):
    analysis = Analysis(unit, kilo=kilo)
    write_fixed_beam(analysis, backwards, axes=axes)
    assert acting(audited(analysis, tmp_path)) == {"ULS 1": pytest.approx((0.0, END_SHEAR, END_MOMENT), abs=1e-6)}


@pytest.mark.parametrize("z", [(0, 0, 1), (0, 0, -1), (0, 1, 0), (1, 3, -2)])
def test_the_local_axes_may_be_turned_about_the_member(z, tmp_path):
    analysis = Analysis()
    write_fixed_beam(analysis, z=z)
    assert acting(audited(analysis, tmp_path)) == {"ULS 1": pytest.approx((0.0, END_SHEAR, END_MOMENT), abs=1e-6)}


def test_a_whole_building_turned_keeps_the_signs(tmp_path):
    world = turned(130.0, shift=(12000.0, -7000.0, 500.0))
    analysis = Analysis(world=world)
    write_fixed_beam(analysis)
    result = audited(analysis, tmp_path, world)
    assert acting(result) == {"ULS 1": pytest.approx((0.0, END_SHEAR, END_MOMENT), abs=1e-6)}


@pytest.mark.parametrize("backwards", [False, True])
def test_a_cantilever_with_a_tip_load_and_tension(backwards, tmp_path):
    """30 kN down at 2 m and 50 kN outwards: the joint holds up 30, pulls back 50, and hogs 60 kNm."""
    analysis = Analysis()
    ends = (NODE, NODE + [2000.0, 0, 0])
    analysis.member(*(ends[::-1] if backwards else ends))
    analysis.results("tip", analysis.support(analysis.node(NODE), (-50.0, 0, 30.0, 0, -60.0, 0)))
    assert acting(audited(analysis, tmp_path)) == {"tip": pytest.approx((50.0, 30.0, 60.0), abs=1e-9)}


def test_a_support_may_have_axes_of_its_own(tmp_path):
    """Turned a quarter about y: its x points down, its z points along the beam."""
    analysis = Analysis()
    analysis.member(NODE, NODE + [2000.0, 0, 0])
    quarter = turned(90.0, about=(0, 1, 0))
    support = analysis.support(analysis.node(NODE, quarter), (-30.0, 0, -50.0, 0, -60.0, 0), "LOCAL_COORDS")
    analysis.results("tip", support)
    assert acting(audited(analysis, tmp_path)) == {"tip": pytest.approx((50.0, 30.0, 60.0), abs=1e-9)}


def test_a_sloping_member_takes_n_and_v_along_its_own_axis(tmp_path):
    """40 kN straight down at 2 m of a rafter that rises 10°: 40 sin 10° of it pushes along the member."""
    steel = EndPlate(slope=10.0, dialect="outline")
    run = steel.run()
    analysis = Analysis()
    start = np.array([0.0, 0.0, 3000.0]) - 150.0 * run
    member = analysis.member(start, start + 4000.0 * run)
    moment = np.cross(2.0 * run, (0, 0, -40.0))
    analysis.results("snow", analysis.at_point(member, start, (0, 0, 40.0, *(-moment))))
    expected = (-40.0 * run[2], 40.0 * run[0], 80.0 * run[0])
    assert acting(audited(analysis, tmp_path, steel=steel)) == {"snow": pytest.approx(expected, abs=0.01)}


def test_several_combinations_act_each_by_itself(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    for case, moment in (("gravity", -60.0), ("uplift", 25.0)):
        analysis.results(case, analysis.at_point(member, NODE, (0, 0, 0, 0, moment, 0)))
    (joint,) = audited(analysis, tmp_path).joints
    by_case = {each.case: (each.tension_flange, each.actions.M_kNm) for each in joint.checks}
    assert by_case["gravity"] == ("top", pytest.approx(60.0))
    assert by_case["uplift"] == ("bottom", pytest.approx(-25.0))


def test_a_case_that_is_no_combination_is_said(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    analysis.results("G", analysis.at_point(member, NODE, (0, 0, 9, 0, -6, 0)), kind="LOAD_CASE")
    result = audited(analysis, tmp_path)
    assert acting(result) == {"G": pytest.approx((0.0, 9.0, 6.0))}
    assert said(result, "without any factor")


def test_the_model_itself_may_hold_the_analysis_and_only_counts_when_asked(tmp_path):
    analysis = Analysis(unit=1.0)
    member = analysis.member(NODE, FAR)
    analysis.results("ULS", analysis.at_point(member, NODE, (0, 0, 9, 0, -6, 0)))
    EndPlate().build(analysis)
    path = tmp_path / "both.ifc"
    analysis.file.write(str(path))
    assert acting(audit(path)) == {}
    assert acting(audit(path, actions=path)) == {"ULS": pytest.approx((0.0, 9.0, 6.0))}


def test_a_source_names_file_entity_member_and_case(tmp_path):
    from ifcjoints.actions.analysis import read_analysis  # noqa: PLC0415

    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    reaction = analysis.at_point(member, NODE, (0, 0, 9, 0, -6, 0))
    analysis.results("ULS 7", reaction)
    (end,) = read_analysis(analysis.file)
    for part in (f"#{reaction.id()} IfcStructuralPointReaction", "M1", "start", "load combination ULS 7"):
        assert part in end.source


@pytest.mark.parametrize("place", [(0, 900.0, 0), (-900.0, 0, 0)])
def test_a_member_far_away_is_not_taken(place, tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE + place, FAR + place)
    analysis.results("far", analysis.at_point(member, NODE + place, (0, 0, 1.0, 0, -1.0, 0)))
    result = audited(analysis, tmp_path)
    assert acting(result) == {}
    assert said(result, "1 member ends act on no joint")
    wide = Settings(actions=ActionsSettings(node_distance_mm=1200.0, aside_mm=1000.0))
    assert acting(audited(analysis, tmp_path, settings=wide)) == {"far": pytest.approx((0.0, 1.0, 1.0))}


@pytest.mark.parametrize("way", [(0, SPAN, 0), (-SPAN, 0, 0), (SPAN, 0, SPAN / 6)])
def test_a_member_that_runs_another_way_is_not_taken(way, tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, NODE + way)
    analysis.results("aside", analysis.at_point(member, NODE, (0, 0, 1.0, 0, -1.0, 0)))
    assert acting(audited(analysis, tmp_path)) == {}


@pytest.mark.parametrize(("apart", "taken"), [(0.0, {}), (40.0, {}), (160.0, {"ULS": pytest.approx((0, 0, 10.0))})])
def test_the_nearest_member_counts_unless_another_is_as_near(apart, taken, tmp_path):
    analysis = Analysis()
    activities = []
    for moment, shift in ((10.0, 0.0), (20.0, apart)):
        start = np.array([0.0, shift, 3000.0])
        member = analysis.member(start, start + [SPAN, 0, 0])
        activities.append(analysis.at_point(member, start, (0, 0, 0, 0, -moment, 0)))
    analysis.results("ULS", *activities)
    result = audited(analysis, tmp_path)
    assert acting(result) == taken
    assert said(result, "alike; none is used") == (not taken)


def test_one_analysis_member_for_two_beams_is_used_for_neither(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    analysis.results("ULS", analysis.at_point(member, NODE, (0, 0, 0, 0, -10.0, 0)))
    path = tmp_path / "analysis.ifc"
    analysis.file.write(str(path))
    steel = Model()
    for side in (-150.0, 150.0):
        place = np.eye(4)
        place[1, 3] = side
        EndPlate(plate=(200.0, 540.0, 25.0), column=(300.0, 200.0, 11.0, 19.0, 27.0)).build(steel, place)
    result = audit(steel.file, actions=path)
    assert len(result.joints) == 2
    assert all(each.actions is None for joint in result.joints for each in joint.checks)
    assert said(result, "of different members; it is used for none")


def test_what_bends_the_weak_axis_is_said(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    analysis.results("ULS", analysis.at_point(member, NODE, (0, 4.0, 9.0, 1.5, -6.0, 2.5)))
    result = audited(analysis, tmp_path)
    assert acting(result) == {"ULS": pytest.approx((0.0, 9.0, 6.0))}
    assert said(result, "4.0 kN of shear across, 1.5 kNm of torsion and 2.5 kNm about the weak axis")


def test_a_file_without_results_is_refused(tmp_path):
    with pytest.raises(ActionsError, match=r"analysis\.ifc: it holds no analysis results"):
        audited(Analysis(), tmp_path)
