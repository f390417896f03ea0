"""Write an audit into an open IFC model: a group for each joint, property sets on it and on its end plates.

Everything that stood in the model stays as it was. Results of an earlier audit are brought up to date or
taken away (:mod:`.standing_results` tells how they are found), and every GlobalId follows from the
joint's id, so that writing twice is writing once.
"""

from __future__ import annotations

import json
from collections import Counter
from pathlib import Path
from typing import Any
from uuid import UUID, uuid5

import ifcopenshell
import ifcopenshell.guid

from ..errors import OutputError
from ..model.audit import Audit
from ..model.joints import Joint
from .property_values import check_properties, check_set_name, joint_properties
from .standing_results import JOINT_SET, StandingResults

_NAMESPACE = UUID("5b0f6a52-6c1d-5d0e-9a35-0d2f3d6c8e11")


def write_back(file: Any, audit: Audit) -> None:
    """Write the audit into an open `ifcopenshell.file` (IFC2X3, IFC4, IFC4X3), in memory."""
    results = StandingResults(file)
    elements = _Elements(file)
    on_plate: Counter[str] = Counter()
    for joint in audit.joints:
        _write_joint(results, elements, joint, audit, on_plate)
    results.sweep()


def write_model(source: Path, target: Path, audit: Audit) -> None:
    """Write a copy of a model file with the audit in it. OutputError if it does not arrive whole."""
    file = ifcopenshell.open(str(source))
    write_back(file, audit)
    file.write(str(target))
    if not _is_whole(target):
        raise OutputError(f"{target.name}: the model could not be written whole; make room on the disk.")


def _is_whole(path: Path) -> bool:
    """The writer says nothing of a full disk; the file's last line does."""
    if not path.is_file():
        return False
    with path.open("rb") as stream:
        stream.seek(max(0, path.stat().st_size - 64))
        return stream.read().rstrip().endswith(b"END-ISO-10303-21;")


def _write_joint(
    results: StandingResults, elements: _Elements, joint: Joint, audit: Audit, on_plate: Counter[str]
) -> None:
    found, missing = elements.of_joint(joint)
    group = results.put_group(
        _global_id(joint.id, "group"), joint.name, "MOMENT_JOINT" if joint.moment_joint else "JOINT"
    )
    results.put_members(group, _global_id(joint.id, "members"), found)
    about = joint_properties(joint, audit)
    if missing:
        about["Not in the group"] = f"no single element bears the GlobalId {', '.join(missing)}"
    results.put_set(group, _set_ids(joint.id, "joint"), JOINT_SET, about)
    for result in joint.checks:
        # A joint that is no moment joint says so itself; a set for each check would only say it again.
        if joint.moment_joint or result.status != "not_applicable":
            ids = _set_ids(joint.id, "check", result.check, result.tension_flange, result.case)
            results.put_set(group, ids, check_set_name(result), check_properties(result))
    for plate in dict.fromkeys(each.global_id for each in joint.plates if each.role == "end_plate"):
        element = elements.single(plate)
        if element is not None:
            on_plate[plate] += 1
            # Names of property sets are unique on an element, also where a plate serves two joints.
            name = JOINT_SET if on_plate[plate] == 1 else f"{JOINT_SET} {on_plate[plate]}"
            results.put_set(element, _set_ids(joint.id, "plate", plate), name, about)


def _global_id(*role: str | None) -> str:
    return str(ifcopenshell.guid.compress(uuid5(_NAMESPACE, json.dumps(role)).hex))


def _set_ids(*role: str | None) -> tuple[str, str]:
    """Return the GlobalIds of a property set and of the relation that puts it on its element."""
    return _global_id(*role), _global_id(*role, "relation")


class _Elements:
    """The model's products by GlobalId; a GlobalId that two of them bear stands for neither."""

    def __init__(self, file: Any) -> None:
        self.found: dict[str, Any] = {}
        for element in file.by_type("IfcProduct"):
            global_id = element.GlobalId
            self.found[global_id] = None if global_id in self.found else element

    def single(self, global_id: str) -> Any | None:
        return self.found.get(global_id)

    def of_joint(self, joint: Joint) -> tuple[list[Any], list[str]]:
        """Return the elements that make up a joint, and the GlobalIds that name no single element."""
        names = [member.global_id for member in (joint.supported, joint.supporting) if member]
        names += [plate.global_id for plate in joint.plates]
        names += joint.bolts.global_ids
        names += [weld.global_id for weld in joint.welds if weld.global_id]
        unique = dict.fromkeys(names)
        found = [element for element in map(self.single, unique) if element is not None]
        return found, [name for name in unique if self.single(name) is None]
