"""The runner of a check's cases, and the joints from plain figures that packs build theirs of."""

from dataclasses import replace

import pytest

from ifcjoints.checking import NotCheckable, Verdict
from ifcjoints.checking.contract import HEADINGS, Case, Check
from ifcjoints.checking.testing import case_parameters, example_cases, plain_joint, plain_subject, run_case, run_cases
from ifcjoints.model.base import Frozen


def within_100_kNm(subject, trace):
    """Stand for a check that knows one figure."""
    if subject.joint.bolts.grade is None:
        raise NotCheckable("the bolts' grade is not known.")
    return Verdict({"M_kNm": 100.0}, "the one figure", abs(subject.action.forces.M_kNm) / 100.0)


CHECK = Check("made.check", "Made", "clause", within_100_kNm, dict.fromkeys(HEADINGS, "."), example_cases(), Frozen)


def test_all_cases_are_run():
    assert [result.status for result in run_cases(CHECK)] == ["pass", "fail", "not_checkable"]


@pytest.mark.parametrize(
    ("case", "told"),
    [
        (Case("light", plain_subject(plain_joint(), (0, 0, 60)), "fail"), '"light": ended as pass, not fail'),
        (Case("heavy", plain_subject(plain_joint(), (0, 0, 600)), "pass"), "ended as fail, not pass"),
        (
            Case("odd", plain_subject(plain_joint(bolt=(24.0, None))), "not_checkable", missing="diameter"),
            "the reason does not name diameter",
        ),
    ],
)
def test_a_case_that_ends_otherwise_is_told(case, told):
    with pytest.raises(AssertionError, match=told):
        run_cases(replace(CHECK, cases=(*CHECK.cases, case)))


class Limits(Frozen):
    limit: float = 0.5


def test_a_case_takes_the_check_s_own_options_unless_it_brings_some():
    def limited(subject, trace):
        return Verdict({}, "", subject.options.limit)

    limiting, subject = replace(CHECK, function=limited, options=Limits), plain_subject(plain_joint())
    assert run_case(limiting, Case("defaults", subject, "pass")).utilisation == 0.5
    assert run_case(limiting, Case("own", replace(subject, options=Limits(limit=1.5)), "fail")).utilisation == 1.5


@pytest.mark.parametrize(**case_parameters(CHECK))
def test_cases_are_handed_to_pytest_one_by_one(case):
    assert case in CHECK.cases


def test_they_go_by_their_titles():
    assert case_parameters(CHECK)["ids"] == [case.title for case in example_cases()]


def test_a_plain_joint_has_the_figures_it_was_given():
    joint = plain_joint(
        ((450.0, 2), (340.0, 4), (-60.0, 2)), gauge=90.0, flange_distance=400.0, axis=150.0, slope=5.0,
        flange=(170.0, 12.0), inclinations=(3.0, 4.0), bolt=(20.0, "10.9"), plate_thickness=25.0,
    )  # fmt: skip
    assert [(row.y_bottom_mm, row.y_top_mm, row.count, row.gauge_mm, row.position) for row in joint.rows] == [
        (450.0, -50.0, 2, 90.0, "outside_top"),
        (340.0, 60.0, 4, 90.0, "between"),
        (-60.0, 460.0, 2, 90.0, "outside_bottom"),
    ]
    face = joint.interface
    assert (face.flange_distance_mm, face.axis_y_mm, face.member_slope_deg) == (400.0, 150.0, 5.0)
    assert (face.bottom.inclination_deg, face.top.inclination_deg) == (3.0, 4.0)
    assert (face.top.width_mm, face.top.thickness_mm) == (170.0, 12.0)
    assert (joint.bolts.count, joint.bolts.diameter_mm, joint.bolts.grade) == (8, 20.0, "10.9")
    assert joint.plates[0].thickness_mm == 25.0


def test_the_moment_tells_the_tension_flange():
    assert plain_subject(plain_joint(), (0, 0, 5)).tension_flange == "top"
    assert plain_subject(plain_joint(), (0, 0, -5)).tension_flange == "bottom"
    assert plain_subject(plain_joint(), tension_flange="bottom").action is None
