"""What an analysis file does not say for certain is not used, and why is said."""

from __future__ import annotations

import numpy as np
import pytest

from ifcjoints.actions.analysis import read_analysis
from ifcjoints.errors import ActionsError
from tests.actions.made_analysis import Analysis
from tests.actions.test_analysis import END_MOMENT, END_SHEAR, FAR, NODE, acting, audited, said, write_fixed_beam

REACTION = (0, 0, 9.0, 0, -6.0, 0)


def beam_with(analysis: Analysis, *activities, case: str = "ULS"):
    analysis.results(case, *activities)
    return analysis


@pytest.mark.parametrize(("unit", "kilo"), [(1.0, True), (1000.0, True), (1.0, False)])
def test_moments_without_a_unit_are_refused_beside_other_units(unit, kilo, tmp_path):
    analysis = Analysis(unit, kilo=kilo, torque=False)
    beam_with(analysis, analysis.at_point(analysis.member(NODE, FAR), NODE, REACTION))
    with pytest.raises(ActionsError, match="TORQUEUNIT"):
        audited(analysis, tmp_path)


def test_si_is_taken_and_said_where_all_other_units_are_si(tmp_path):
    analysis = Analysis(1000.0, kilo=False, torque=False)
    beam_with(analysis, analysis.at_point(analysis.member(NODE, FAR), NODE, REACTION))
    assert "unit not stated, Nm taken" in read_analysis(analysis.file)[0].source
    assert acting(audited(analysis, tmp_path)) == {"ULS": pytest.approx((0, 9.0, 6.0))}


@pytest.mark.parametrize(("missing", "used"), [(0, False), (2, False), (4, False), (1, True), (3, True), (5, True)])
def test_a_component_left_out_matters_only_in_the_members_plane(missing, used, tmp_path):
    analysis = Analysis()
    six = [None if number == missing else value for number, value in enumerate(REACTION)]
    beam_with(analysis, analysis.at_point(analysis.member(NODE, FAR), NODE, six))
    result = audited(analysis, tmp_path)
    assert bool(acting(result)) == used
    assert said(result, "not all of the forces are stated") == (not used)


def test_forces_inside_a_member_without_support_reactions_are_said_not_used(tmp_path):
    from tests.actions.made_analysis import Bar  # noqa: PLC0415

    beam = Bar(NODE / 1e3, FAR / 1e3, (0, 0, END_SHEAR), (0, -END_MOMENT, 0), (0, 0, -20.0))
    analysis = Analysis()
    samples = [(x * 1e3, beam.in_local(beam.section(x))) for x in (0.0, 4.0, 8.0)]
    beam_with(analysis, analysis.along(analysis.member(NODE, FAR), samples))
    result = audited(analysis, tmp_path)
    assert acting(result) == {}
    assert said(result, "no support reaction of the file shows")


def test_local_components_without_an_axis_are_not_used(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, FAR, z=None)
    beam_with(analysis, analysis.at_point(member, NODE, REACTION, "LOCAL_COORDS"))
    result = audited(analysis, tmp_path)
    assert acting(result) == {}
    assert said(result, "local axes cannot be told")


@pytest.mark.parametrize("axes", ["LOCAL_COORDS", "GLOBAL_COORDS"])
def test_ifc2x3_settles_global_components_only(axes, tmp_path):
    analysis = Analysis(schema="IFC2X3")
    beam_with(analysis, analysis.at_point(analysis.member(NODE, FAR), NODE, REACTION, axes))
    found = acting(audited(analysis, tmp_path))
    assert found == ({"ULS": pytest.approx((0, 9.0, 6.0))} if axes == "GLOBAL_COORDS" else {})


def test_reactions_alike_at_both_ends_look_like_forces_inside(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    ends = [analysis.at_point(member, point, (50.0, 0, -9.0, 0, 6.0, 0)) for point in (NODE, FAR)]
    result = audited(beam_with(analysis, *ends), tmp_path)
    assert acting(result) == {}
    assert said(result, "the axial figures at both ends of the member are one")


def test_point_reactions_that_the_supports_contradict_are_not_used(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    support = analysis.support(analysis.node(FAR), (0, 0, 7.0, 0, 3.0, 0))
    wrong = analysis.at_point(member, FAR, (0, 0, -7.0, 0, -3.0, 0))
    result = audited(beam_with(analysis, support, wrong, analysis.at_point(member, NODE, REACTION)), tmp_path)
    assert acting(result) == {}
    assert said(result, "differ from its point reactions")


def test_a_reaction_shared_by_several_members_or_beside_a_load_is_not_used(tmp_path):
    for spoil in ("member", "load"):
        analysis = Analysis()
        analysis.member(NODE, FAR)
        node = analysis.node(NODE)
        beam_with(analysis, analysis.support(node, REACTION))
        if spoil == "member":
            analysis.member(NODE, NODE - [0, 0, 3000.0], z=(1, 0, 0))
        else:
            analysis.load(node, (0, 0, -5.0, 0, 0, 0))
        result = audited(analysis, tmp_path)
        assert acting(result) == {}
        assert said(result, "2 members share the connection" if spoil == "member" else "an action stands on")


@pytest.mark.parametrize("sign", [1.0, -1.0])
@pytest.mark.parametrize("nested", [False, True])
def test_reactions_that_run_with_the_loads_are_actions_on_the_supports(sign, nested, tmp_path):
    """The fixed beam's two reactions of 80 kN hold up 20 kN/m on 8 m; told downwards, they press on the supports."""
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    six = np.array([0, 0, END_SHEAR, 0, -END_MOMENT, 0]) * sign
    supports = [
        analysis.support(analysis.node(NODE), six),
        analysis.support(analysis.node(FAR), six * (1, 1, 1, 1, -1, 1)),
    ]
    loads = [analysis.spread(member, -20.0)]
    if nested:
        case = analysis.rooted(
            "IfcStructuralLoadCase", Name="G", PredefinedType="LOAD_CASE", ActionType="PERMANENT_G",
            ActionSource="DEAD_LOAD_G",
        )  # fmt: skip
        analysis.rooted("IfcRelAssignsToGroup", RelatedObjects=loads, RelatingGroup=case)
        loads = [case]
    analysis.results("ULS", *supports, loads=loads)
    result = audited(analysis, tmp_path)
    assert acting(result) == ({"ULS": pytest.approx((0, END_SHEAR, END_MOMENT))} if sign > 0 else {})
    assert said(result, "they act on the supports") == (sign < 0)


def test_two_results_for_one_case_must_agree(tmp_path):
    for second, used in ((9.0, True), (12.0, False)):
        analysis = Analysis()
        member = analysis.member(NODE, FAR)
        beam_with(analysis, analysis.at_point(member, NODE, REACTION))
        beam_with(analysis, analysis.at_point(member, NODE, (0, 0, second, 0, -6.0, 0)))
        result = audited(analysis, tmp_path)
        assert bool(acting(result)) == used
        assert said(result, "2 times and differently") == (not used)


def test_a_doubtful_result_beside_a_sure_one_of_the_same_case_is_passed_over(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    short_one = analysis.along(member, [(2000.0, REACTION), (4000.0, REACTION)])
    result = audited(beam_with(analysis, short_one, analysis.at_point(member, NODE, REACTION)), tmp_path)
    assert acting(result) == {"ULS": pytest.approx((0, 9.0, 6.0))}
    assert not said(result, "has no sample")


def test_what_belongs_to_no_case_is_not_used(tmp_path):
    analysis = Analysis()
    analysis.at_point(analysis.member(NODE, FAR), NODE, REACTION)
    result = audited(analysis, tmp_path)
    assert acting(result) == {}
    assert said(result, "no group of results")


def spread(analysis, member):
    load = analysis.add("IfcStructuralLoadLinearForce", LinearForceZ=-20.0)
    analysis.results(
        "ULS", analysis.act("IfcStructuralCurveReaction", member, load, "LOCAL_COORDS", PredefinedType="CONST")
    )


def short(analysis, member):
    analysis.results("ULS", analysis.along(member, [(2000.0, REACTION), (4000.0, REACTION)]))


def nowhere(analysis, member):
    reaction = analysis.act("IfcStructuralPointReaction", member, analysis.single(REACTION), "GLOBAL_COORDS")
    analysis.results("ULS", reaction)


def turned_edge(analysis, member):
    item = member.Representation.Representations[0].Items[0]
    oriented = analysis.add("IfcOrientedEdge", EdgeElement=item, Orientation=False)
    member.Representation.Representations[0].Items = [oriented]
    analysis.results("ULS", analysis.at_point(member, NODE, REACTION))


def forceless(analysis, member):
    reaction = analysis.at_point(member, NODE, REACTION)
    reaction.AppliedLoad = None
    analysis.results("ULS", reaction)


def on_a_grid(analysis, member):
    member.ObjectPlacement = analysis.add("IfcGridPlacement")
    analysis.results("ULS", analysis.at_point(member, NODE, REACTION))


def without_an_edge(analysis, member):
    member.Representation = None
    analysis.results("ULS", analysis.at_point(member, NODE, REACTION))


@pytest.mark.parametrize("break_it", [on_a_grid, without_an_edge])
def test_a_member_that_has_no_place_is_told_as_left_over(break_it, tmp_path):
    analysis = Analysis()
    break_it(analysis, analysis.member(NODE, FAR))
    result = audited(analysis, tmp_path)
    assert acting(result) == {}
    assert said(result, "act on no joint that was found")


@pytest.mark.parametrize(
    ("write", "why"),
    [
        (spread, "says nothing of single sections"),
        (short, "has no sample at this end"),
        (nowhere, "does not say at which end"),
        (forceless, "forces are missing"),
        (turned_edge, "its edge is turned round"),
    ],
)
def test_results_that_do_not_tell_an_ends_forces(write, why, tmp_path):
    analysis = Analysis()
    write(analysis, analysis.member(NODE, FAR))
    result = audited(analysis, tmp_path)
    assert acting(result) == {}
    assert said(result, why)


def test_deflections_are_no_forces():
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    write_fixed_beam(analysis)
    moved = analysis.add("IfcStructuralLoadSingleDisplacement", DisplacementZ=0.01)
    before = len(read_analysis(analysis.file))
    shape = analysis.topology("Vertex", analysis.vertex(NODE))
    analysis.results(
        "ULS 1", analysis.act("IfcStructuralPointReaction", member, moved, "GLOBAL_COORDS", Representation=shape)
    )
    assert len(read_analysis(analysis.file)) == before


def test_a_reaction_between_a_members_ends_is_no_end_force():
    analysis = Analysis()
    member = analysis.member(NODE, FAR)
    middle = analysis.at_point(member, (np.array(NODE) + FAR) / 2, REACTION)
    analysis.results("ULS", middle, analysis.at_point(member, NODE, REACTION))
    assert [each.end for each in read_analysis(analysis.file)] == ["start"]
