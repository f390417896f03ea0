"""One word for a joint: the worst of what its checks and findings say."""

from __future__ import annotations

from dataclasses import dataclass

from ..model.audit import Audit
from ..model.joints import Joint
from ..model.results import Result, Status
from . import figures
from .words import TENSION

# A joint passes only where nothing that applies to it fails or could not be checked.
_WORST_FIRST: tuple[Status, ...] = ("fail", "not_checkable", "pass", "resistance_only", "not_applicable")


def joint_status(joint: Joint) -> Status:
    """Return the worst status of a joint; an error finding counts as failing, no check as not applicable."""
    if any(finding.severity == "error" for finding in joint.findings):
        return "fail"
    found = {result.status for result in joint.checks}
    return next((status for status in _WORST_FIRST if status in found), "not_applicable")


def governing_result(joint: Joint) -> Result | None:
    """Return the result with the highest utilisation, None where no action was given."""
    used = [result for result in joint.checks if result.utilisation is not None]
    return max(used, key=lambda result: result.utilisation or 0.0, default=None)


def decisive(joint: Joint) -> str:
    """Say what a joint's status rests on: an error finding, the governing check, or the least resistance."""
    errors = [finding for finding in joint.findings if finding.severity == "error"]
    result = governing_result(joint)
    if errors and (result is None or result.status != "fail"):
        more = f" and {len(errors) - 1} more" if len(errors) > 1 else ""
        return f"{errors[0].code}{more}"
    return f"{result.check}: {result.governing}" if result else _least_moment(joint)


def _least_moment(joint: Joint) -> str:
    stated = [result for result in joint.checks if "M_kNm" in result.resistance]
    if not stated:
        return ""
    least = min(stated, key=lambda result: result.resistance["M_kNm"])
    moment = figures.tenths(least.resistance["M_kNm"])
    return f"least M = {moment} kNm ({least.check}, {TENSION[least.tension_flange]})"


def in_short(audit: Audit) -> tuple[Joint, ...]:
    """Return the joints that a summary must name: every moment joint, then any other that fails."""
    moment_joints = [joint for joint in audit.joints if joint.moment_joint]
    others = [joint for joint in audit.joints if not joint.moment_joint and joint_status(joint) == "fail"]
    return (*moment_joints, *others)


@dataclass(frozen=True, slots=True)
class Counts:
    """What the head of a report and the summary count."""

    joints: int
    moment_joints: int
    failing: int
    not_checkable: int
    assumed_inputs: int
    bolts_elsewhere: int


def count(audit: Audit) -> Counts:
    """Count joints, and what in them needs a look. A joint may both fail and be not wholly checkable."""
    joints = audit.joints
    unchecked = [any(result.status == "not_checkable" for result in joint.checks) for joint in joints]
    origins = [origin for joint in joints for origin in joint.provenance.values()]
    return Counts(
        joints=len(joints),
        moment_joints=sum(joint.moment_joint for joint in joints),
        failing=sum(joint_status(joint) == "fail" for joint in joints),
        not_checkable=sum(unchecked),
        assumed_inputs=sum(origin.source == "assumed" for origin in origins),
        bolts_elsewhere=audit.coverage.bolts_elsewhere,
    )
