from __future__ import annotations

from typing import Any

import pytest

from ifcjoints.model.findings import Finding
from ifcjoints.publishing.verdict import count, decisive, in_short, joint_status

from . import examples

ERROR = Finding(code="short-bolt", severity="error", message="A bolt is too short.")
WARNING = Finding(code="edge-distance", severity="warning", message="Near the edge.")


def check(status: str, **fields: Any) -> Any:
    used = {"pass": 0.5, "fail": 1.5}.get(status)
    return examples.result(status=status, utilisation=used, **fields)


@pytest.mark.parametrize(
    ("statuses", "findings", "expected"),
    [
        (["pass", "resistance_only"], [], "pass"),
        (["pass", "not_checkable"], [], "not_checkable"),
        (["not_applicable", "not_checkable"], [], "not_checkable"),
        (["pass", "not_applicable"], [WARNING], "pass"),
        (["not_checkable", "fail"], [], "fail"),
        (["pass"], [ERROR], "fail"),
        ([], [], "not_applicable"),
        (["resistance_only", "not_applicable"], [], "resistance_only"),
    ],
)
def test_a_joint_is_as_good_as_the_worst_that_applies_to_it(
    statuses: list[str], findings: list[Finding], expected: str
) -> None:
    joint = examples.moment_joint(checks=tuple(map(check, statuses)), findings=tuple(findings))
    assert joint_status(joint) == expected
    # The exit status and the reports must not part.
    assert examples.audit(joint).failed == (expected == "fail")


def test_what_decides_is_named() -> None:
    passing, failing = check("pass", governing="row 1"), check("fail", check="other", governing="flange")
    resistances = [check("resistance_only", resistance={"M_kNm": figure}) for figure in (150.0, 120.04)]
    assert decisive(examples.moment_joint(checks=(passing, failing), findings=(ERROR,))) == "other: flange"
    assert decisive(examples.moment_joint(checks=(passing,), findings=(ERROR, ERROR))) == "short-bolt and 1 more"
    assert decisive(examples.moment_joint(checks=(passing,), findings=(WARNING,))) == "bolt_group.elastic: row 1"
    assert "least M = 120.0 kNm" in decisive(examples.moment_joint(checks=tuple(resistances)))
    assert decisive(examples.simple_joint()) == ""


def test_a_summary_names_moment_joints_and_whatever_fails() -> None:
    joints = (examples.simple_joint(), examples.simple_joint(id="J03", findings=(ERROR,)), examples.moment_joint())
    assert [joint.id for joint in in_short(examples.audit(*joints))] == ["J01", "J03"]
    counts = count(examples.audit(*joints))
    assert (counts.joints, counts.moment_joints, counts.failing, counts.not_checkable) == (3, 1, 2, 1)
    assert (counts.assumed_inputs, counts.bolts_elsewhere) == (1, 5)
