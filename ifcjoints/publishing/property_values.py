"""What the property sets in a model say of a joint and its checks, as plain names and values.

A figure is a plain number in the unit that its name ends with (mm, kN, kNm), whatever units the model
has. Figures are rounded for reading; audit.json holds them in full.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence

from ..model.audit import Audit
from ..model.findings import Finding
from ..model.joints import Joint, JointMember
from ..model.results import Result
from . import figures
from .verdict import governing_result, joint_status

Value = str | bool | int | float
Properties = dict[str, Value]

CHECK_PREFIX = "IfcJoints_Check"
LONGEST_NAME = 255
"""Length of an IfcLabel."""


def joint_properties(joint: Joint, audit: Audit) -> Properties:
    """Return the properties of `IfcJoints_Joint`, in the order to be read."""
    worst = governing_result(joint)
    flanges = joint.interface.flange_distance_mm if joint.interface else None
    assumed = sorted(name for name, origin in joint.provenance.items() if origin.source == "assumed")
    return _stated(
        {
            "Id": joint.id,
            "Name": joint.name,
            "Result": joint_status(joint),
            "Utilisation": _utilisation(worst),
            "Moment joint": joint.moment_joint,
            "Why": joint.why,
            "Configuration": joint.configuration,
            "Family": joint.family,
            "Supported": _member(joint.supported),
            "Supporting": _member(joint.supporting),
            "Bolts": joint.bolts.count,
            "Bolt diameter_mm": joint.bolts.diameter_mm,
            "Bolt grade": joint.bolts.grade,
            "Hole diameter_mm": joint.bolts.hole_diameter_mm,
            "Grip_mm": joint.bolts.grip_mm,
            "Flange distance_mm": flanges,
            **_rows(joint),
            **_counted("Finding", [_finding(finding) for finding in joint.findings]),
            "Completeness": figures.share_down(joint.completeness),
            "Assumed": ", ".join(assumed),
            "Standard": f"{audit.basis.standard}:{audit.basis.edition}",
            "Program": f"{audit.generator.name} {audit.generator.version}",
        }
    )


def check_properties(result: Result) -> Properties:
    """Return the properties of one `IfcJoints_Check…`, in the order to be read."""
    forces = result.actions.model_dump() if result.actions else {}
    return _stated(
        {
            "Check": result.check,
            "Status": result.status,
            "Utilisation": _utilisation(result),
            "Governing": result.governing,
            "Reason": result.reason,
            "Case": result.case,
            "Tension flange": result.tension_flange,
            **forces,
            **{f"Resistance {name}": value for name, value in result.resistance.items()},
            **_counted("Row", result.row_forces_kN, " force_kN"),
            "Compression_kN": result.compression_kN,
        }
    )


def check_set_name(result: Result) -> str:
    """Return a name for a result's property set that tells it from the joint's other results."""
    case = f" {result.case}" if result.case is not None else ""
    name = f"{CHECK_PREFIX} {result.check} {result.tension_flange}{case}"
    return name if len(name) <= LONGEST_NAME else f"{name[: LONGEST_NAME - 1]}…"


def _rows(joint: Joint) -> Properties:
    """Return each row's place; row 1 is the topmost."""
    named: dict[str, Value | None] = {}
    for number, row in enumerate(joint.rows, 1):
        start = _number("Row", number, len(joint.rows))
        named |= {
            f"{start} y_bottom_mm": row.y_bottom_mm,
            f"{start} y_top_mm": row.y_top_mm,
            f"{start} bolts": row.count,
            f"{start} gauge_mm": row.gauge_mm,
            f"{start} position": row.position,
        }
    return _stated(named)


def _counted(word: str, values: Sequence[Value], unit: str = "") -> Properties:
    return {_number(word, number, len(values)) + unit: value for number, value in enumerate(values, 1)}


def _number(word: str, number: int, of: int) -> str:
    """Number so that sorting by name keeps the order."""
    return f"{word} {number:0{len(str(of))}d}"


def _member(member: JointMember | None) -> str:
    if member is None:
        return ""
    section = member.section.designation if member.section else None
    end = f"{member.end} of the member" if member.end else None
    return ", ".join(text for text in (member.name, section, member.grade, end, member.global_id) if text)


def _finding(finding: Finding) -> str:
    reference = f" ({finding.reference})" if finding.reference else ""
    return f"{finding.severity}, {finding.code}: {finding.message}{reference}"


def _utilisation(result: Result | None) -> float | None:
    if result is None or result.utilisation is None:
        return None
    return figures.utilisation_up(result.utilisation)


def _stated(properties: Mapping[str, Value | None]) -> Properties:
    """Leave out what is not known, and round to a thousandth, finer than anything is built."""
    return {
        name: round(value, 3) + 0.0 if isinstance(value, float) else value
        for name, value in properties.items()
        if value is not None and value != ""
    }
