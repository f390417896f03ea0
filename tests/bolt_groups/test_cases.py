"""The cases that the checks carry, and joints they must refuse."""

import pytest

from ifcjoints.checking.runner import run_check
from ifcjoints.checking.testing import case_parameters, plain_joint, plain_subject, run_case
from ifcjoints_bolt_groups.elastic import elastic
from ifcjoints_bolt_groups.plastic import plastic

METHODS = (elastic, plastic)


@pytest.mark.parametrize(**case_parameters(elastic))
def test_elastic_case(case):
    run_case(elastic, case)


@pytest.mark.parametrize(**case_parameters(plastic))
def test_plastic_case(case):
    run_case(plastic, case)


@pytest.mark.parametrize("method", METHODS, ids=lambda each: each.name)
def test_what_is_no_moment_joint_is_not_applicable(method):
    joint = plain_joint().model_copy(update={"moment_joint": False, "why": "one row only"})
    result = run_check(method, plain_subject(joint))
    assert result.status == "not_applicable"
    assert "one row only" in result.reason
    assert not result.resistance


@pytest.mark.parametrize("method", METHODS, ids=lambda each: each.name)
@pytest.mark.parametrize(
    ("changes", "remedy"),
    [
        ({"bolt": (None, "8.8")}, "diameter"),
        ({"bolt": (24.0, None)}, "[defaults] bolt_grade"),
        ({"bolt": (24.0, "A325")}, '[basis] standard = "AISC 360"'),
        ({"bolt": (23.4, "8.8")}, "23.40 mm"),
        ({"bolt": (19.05, "8.8")}, "3/4 in"),
        ({"bolt": (24.0, "12.9")}, '"12.9"'),
        ({"flange_grade": None}, "[defaults] steel_grade"),
        ({"flange_grade": "Concrete C30/37"}, "Concrete C30/37"),
    ],
)
def test_what_is_lacking_is_named_with_its_remedy(method, changes, remedy):
    result = run_check(method, plain_subject(plain_joint(**changes)))
    assert result.status == "not_checkable"
    assert remedy in result.reason
    assert not result.resistance


@pytest.mark.parametrize("method", METHODS, ids=lambda each: each.name)
def test_the_other_flange_s_grade_is_needed_only_with_an_axial_force(method):
    joint = plain_joint()
    top = joint.interface.top.model_copy(update={"grade": None})
    joint = joint.model_copy(update={"interface": joint.interface.model_copy(update={"top": top})})
    assert run_check(method, plain_subject(joint, (0.0, 20.0, 60.0))).status == "pass"
    with_axial_force = run_check(method, plain_subject(joint, (-50.0, 20.0, 60.0)))
    assert with_axial_force.status == "not_checkable"
    assert with_axial_force.reason.startswith("top flange")


@pytest.mark.parametrize("method", METHODS, ids=lambda each: each.name)
@pytest.mark.parametrize("grade", ["8.8", "A325"])
def test_each_standard_covers_its_own_bolts(method, grade):
    statuses = {
        standard: run_check(
            method, plain_subject(plain_joint(bolt=(20.0, grade)), (0.0, 20.0, 60.0), standard=standard)
        ).status
        for standard in ("EN 1993-1-8", "AISC 360")
    }
    own = "EN 1993-1-8" if grade == "8.8" else "AISC 360"
    assert {standard for standard, status in statuses.items() if status == "pass"} == {own}
    assert set(statuses.values()) == {"pass", "not_checkable"}


@pytest.mark.parametrize("method", METHODS, ids=lambda each: each.name)
def test_rows_that_cannot_pull_are_outside_the_method(method):
    result = run_check(method, plain_subject(plain_joint(((0.0, 2), (-60.0, 2)))))
    assert result.status == "not_applicable"
    assert "no bolt row" in result.reason
