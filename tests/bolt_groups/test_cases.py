"""The cases that the checks carry, and joints they must refuse."""

import pytest

from ifcjoints.checking.runner import run_check
from ifcjoints.checking.testing import plain_joint, plain_subject, run_case
from ifcjoints_bolt_groups.elastic import elastic
from ifcjoints_bolt_groups.plastic import plastic

METHODS = (elastic, plastic)


@pytest.mark.parametrize(
    ("method", "case"), [(m, c) for m in METHODS for c in m.cases], ids=lambda each: getattr(each, "title", "")
)
def test_case(method, case):
    run_case(method, case)


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
        ({"flange_grade": None}, "[defaults] steel_grade"),
        ({"flange_grade": "Concrete C30/37"}, "Concrete C30/37"),
    ],
)
def test_what_is_lacking_is_named_with_its_remedy(method, changes, remedy):
    result = run_check(method, plain_subject(plain_joint(**changes)))
    assert result.status == "not_checkable"
    assert remedy in result.reason
    assert not result.resistance
