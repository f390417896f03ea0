"""One word for a joint: the worst of what its checks and findings say."""

from __future__ import annotations

from ..model.joints import Joint
from ..model.results import Result, Status

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
