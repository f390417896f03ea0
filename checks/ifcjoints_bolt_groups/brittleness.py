"""Whether what is bolted together yields before the bolts break, so that rows may share their forces plastically."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from ifcjoints.checking import N, Subject, Trace, root
from ifcjoints.model.joints import Joint
from ifcjoints.model.units import Mm
from ifcjoints.tables.bolts import bolt_grade, bolt_size
from ifcjoints.tables.steels import steel_grade

from .origins import origin

RULE = "SCI P398, step 1C; UK NA to BS EN 1993-1-8, NA.2.7 (from memory)"


def ductile_thickness(d: N, f_ub: N, f_y: N) -> N:
    """Greatest thickness in mm of a plate that yields before its bolts break, d/1.9·√(f_ub/f_y) (SCI P398, step 1C)."""
    return d / 1.9 * root(f_ub / f_y)


@dataclass(frozen=True, slots=True)
class BoltedPlate:
    """A plate that the bolts pull on, as far as its figures are known, and where its thickness is from."""

    name: str
    thickness: Mm | None
    grade: str | None
    told: str


def why_brittle(subject: Subject, trace: Trace) -> str:
    """Return why rows count as brittle, or nothing where one plate is thin enough. One whose figures lack is not."""
    bolts = subject.joint.bolts
    grade, size = bolt_grade(bolts.grade or ""), bolt_size(bolts.diameter_mm or 0.0)
    if grade is None or size is None:
        return "the bolts are not known"
    reasons = [_why_thick(plate, size.d, grade.f_ub, trace) for plate in _bolted_plates(subject)]
    if not reasons:
        return "no end plate is known"
    return "" if "" in reasons else " and ".join(reasons)


def _why_thick(plate: BoltedPlate, d: Mm, f_ub: float, trace: Trace) -> str:
    """Return why a plate does not yield before the bolts break, or nothing where it does."""
    if plate.thickness is None:
        return f"the {plate.name}'s thickness is not known"
    steel = steel_grade(plate.grade, plate.thickness) if plate.grade else None
    if steel is None:
        return f"the {plate.name}'s yield strength is not known"
    t = trace.given(f"t ({plate.name})", plate.thickness, "mm", plate.told)
    f_y = trace.given(f"f_y ({plate.name})", steel.f_y, "N/mm²", f"{steel.source}, {steel.name}")
    bolt = trace.constant("d", d), trace.constant("f_ub", f_ub)
    most = trace.step(f"t_max ({plate.name})", ductile_thickness(*bolt, f_y), "mm", RULE)
    return "" if t <= most else f"the {plate.name} is thicker than t_max"


def _bolted_plates(subject: Subject) -> Iterator[BoltedPlate]:
    """Yield the end plates, and the column's flange where that is what they are bolted to."""
    joint: Joint = subject.joint
    plates = [plate for plate in joint.plates if plate.role == "end_plate"]
    for number, plate in enumerate(plates, 1):
        name = "end plate" if len(plates) == 1 else f"end plate {number}"
        yield BoltedPlate(name, plate.thickness_mm, plate.grade, origin(subject, f"plates.{plate.global_id}.thickness"))
    carrier = joint.supporting
    if joint.configuration == "beam_to_column_flange" and carrier is not None and carrier.section is not None:
        yield BoltedPlate("column flange", carrier.section.tf_mm, carrier.grade, origin(subject, "supporting.section"))
