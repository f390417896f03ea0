"""Runs checks on joints: every joint, both directions, every action."""

from __future__ import annotations

from collections.abc import Sequence

from pydantic import ValidationError

from ..errors import SettingsError
from ..model.actions import Action, FlangeSide
from ..model.base import Frozen
from ..model.basis import Basis
from ..model.joints import Joint
from ..model.results import Result, Status
from .contract import Check, NotApplicable, NotCheckable, Subject, Verdict
from .registry import InstalledCheck
from .trace import Trace

DIRECTIONS: tuple[FlangeSide, ...] = ("top", "bottom")


def run_check(check: Check, subject: Subject) -> Result:
    """Run one check on one subject."""
    trace = Trace()
    try:
        verdict = check.function(subject, trace)
    except NotApplicable as outcome:
        return _silent(check, subject, "not_applicable", str(outcome), trace)
    except NotCheckable as outcome:
        return _silent(check, subject, "not_checkable", str(outcome), trace)
    return Result(
        check=check.name,
        case=subject.action.case if subject.action else None,
        tension_flange=subject.tension_flange,
        status=_status(verdict),
        actions=subject.action.forces if subject.action else None,
        resistance=verdict.resistance,
        utilisation=verdict.utilisation,
        governing=verdict.governing,
        row_forces_kN=tuple(verdict.row_forces_kN),
        compression_kN=verdict.compression_kN,
        steps=tuple(trace.steps),
    )


def run_checks(
    checks: Sequence[InstalledCheck],
    joint: Joint,
    actions: Sequence[Action],
    basis: Basis,
    options: dict[str, Frozen],
) -> tuple[Result, ...]:
    """Run every check on a joint, under each action in its own direction.

    A direction without an action still gets the joint's resistance.
    """
    subjects: list[tuple[FlangeSide, Action | None]] = []
    for direction in DIRECTIONS:
        acting = [action for action in actions if action.tension_flange == direction]
        subjects += [(direction, action) for action in acting] or [(direction, None)]
    return tuple(
        run_check(installed.check, Subject(joint, direction, action, basis, options[installed.check.name]))
        for installed in checks
        for direction, action in subjects
    )


def resolve_options(checks: Sequence[InstalledCheck], given: dict[str, dict[str, object]]) -> dict[str, Frozen]:
    """Return every check's options, defaults filled in; SettingsError names what does not fit."""
    resolved: dict[str, Frozen] = {}
    for installed in checks:
        check = installed.check
        try:
            resolved[check.name] = check.options.model_validate(given.get(check.name, {}))
        except ValidationError as error:
            first = error.errors()[0]
            place = ".".join(str(part) for part in first["loc"])
            raise SettingsError(f"the option {place} of the check {check.name}: {first['msg']}.") from error
    return resolved


def _status(verdict: Verdict) -> Status:
    if verdict.utilisation is None:
        return "resistance_only"
    return "pass" if verdict.utilisation <= 1.0 else "fail"


def _silent(check: Check, subject: Subject, status: Status, reason: str, trace: Trace) -> Result:
    return Result(
        check=check.name,
        case=subject.action.case if subject.action else None,
        tension_flange=subject.tension_flange,
        status=status,
        actions=subject.action.forces if subject.action else None,
        reason=reason,
        steps=tuple(trace.steps),
    )
