"""The whole way: IFC → parts → joints → checks → audit."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from importlib.metadata import version
from pathlib import Path
from typing import Any

from .actions.analysis import is_analysis, read_analysis
from .actions.analysis_matching import match_analysis
from .actions.matching import MatchedActions, match_actions
from .actions.table import read_actions
from .checking.registry import InstalledCheck, installed_checks, refuse_unknown
from .checking.runner import resolve_options, run_checks
from .detection.find_joints import find_joints
from .model.audit import Audit, BasisRecord, CheckInfo, FileReference, Generator
from .model.basis import Basis, StandardName
from .model.contents import Contents
from .model.findings import Problem
from .model.joints import Joint
from .reading.open_model import checked, open_model, sha256
from .reading.read_model import read_model
from .settings import Settings
from .tables.bolts import bolt_grade

Progress = Callable[[str, float], None]


def audit(
    model: str | Path | Any,
    actions: str | Path | None = None,
    settings: Settings | None = None,
    *,
    packs: Sequence[str] = (),
    only: str | None = None,
    progress: Progress | None = None,
) -> Audit:
    """Audit the bolted joints of a model.

    `model` is a path or an open ``ifcopenshell.file``; `actions` a CSV table of design actions, or an IFC file
    that holds a structural analysis model with results;
    `packs` and `only` (a glob) limit which checks run; `progress` is told what was done and the
    share of the work (0 to 1). The model is only read. Raises the errors of :mod:`ifcjoints.errors`.
    """
    settings = settings or Settings()
    tell = progress or (lambda _text, _share: None)
    checks = installed_checks(packs, only)
    refuse_unknown(settings.checks)
    options = resolve_options(checks, settings.checks)
    path = Path(model) if isinstance(model, str | Path) else None
    file = open_model(path) if path else checked(model, "the model")
    contents = read_model(file, settings.reading, path, lambda text, share: tell(text, 0.6 * share))
    found = find_joints(contents, settings)
    tell("joints found", 0.8)
    acting, notes = _acting(actions, contents, found.joints, settings)
    basis = _basis(settings, found.joints)
    joints = tuple(
        joint.with_fields(checks=run_checks(checks, joint, acting.get(joint.id, ()), basis, options))
        for joint in found.joints
    )
    tell("checks run", 1.0)
    return Audit(
        generator=Generator(name="ifcjoints", version=version("ifcjoints")),
        model=contents.model,
        basis=_record(basis, Path(actions) if actions is not None else None),
        problems=(*contents.problems, *found.problems, *(Problem(element=None, message=note) for note in notes)),
        properties_used=contents.properties_used,
        settings=_in_force(settings, {name: each.model_dump(mode="json") for name, each in options.items()}),
        installed_checks=tuple(_info(each) for each in checks),
        joints=joints,
        coverage=found.coverage,
        elsewhere=found.elsewhere,
    )


def _acting(
    actions: str | Path | None, contents: Contents, joints: Sequence[Joint], settings: Settings
) -> MatchedActions:
    """Return the actions on each joint, from a table or from an analysis model in IFC."""
    if actions is None:
        return MatchedActions({}, ())
    path = Path(actions)
    if is_analysis(path):
        return match_analysis(read_analysis(path, settings.actions.section_forces), joints, settings)
    return match_actions(read_actions(path), contents.names, joints)


def _basis(settings: Settings, joints: Sequence[Joint]) -> Basis:
    """Take the standard that is set; else the one that covers most of the joints' bolts."""
    if settings.basis.standard is not None:
        return settings.basis.basis(settings.basis.standard)
    counts: dict[StandardName, int] = {"EN 1993-1-8": 0, "AISC 360": 0}
    for joint in joints:
        grade = bolt_grade(joint.bolts.grade) if joint.bolts.grade else None
        if grade is not None:
            counts[grade.standard] += joint.bolts.count
    return settings.basis.basis(max(counts, key=lambda name: counts[name]))


def _record(basis: Basis, actions: Path | None) -> BasisRecord:
    return BasisRecord(
        standard=basis.standard,
        edition=basis.edition,
        national_choices=basis.national_choices(),
        actions=FileReference(path=str(actions), sha256=sha256(actions)) if actions else None,
    )


def _in_force(settings: Settings, options: dict[str, Any]) -> dict[str, Any]:
    return {**settings.model_dump(mode="json"), "checks": options}


def _info(installed: InstalledCheck) -> CheckInfo:
    check = installed.check
    return CheckInfo(
        name=check.name,
        title=check.title,
        package=installed.package,
        version=installed.version,
        method=check.method,
    )
