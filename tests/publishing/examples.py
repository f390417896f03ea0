"""An audit put together by hand: one moment joint, one simple joint, names that try every border."""

from __future__ import annotations

from typing import Any

from ifcjoints.model.actions import Forces
from ifcjoints.model.audit import (
    Audit,
    BasisRecord,
    CheckInfo,
    Coverage,
    Elsewhere,
    FileReference,
    Generator,
    ModelFile,
)
from ifcjoints.model.findings import Finding, Problem
from ifcjoints.model.joints import (
    Flange,
    Interface,
    Joint,
    JointBolts,
    JointMember,
    JointPlate,
    JointWeld,
    Provenance,
    Row,
    Section,
    Shape,
)
from ifcjoints.model.results import Result, Step

HOSTILE = "<script>alert('B&12')</script> \"Träger\" ✓"
BEAM, COLUMN, PLATE, FIN = (f"0{name * 21}" for name in "bcpf")
BOLTS = tuple(f"{number:022d}" for number in range(4))
WELD = f"0{'w' * 21}"

IPE = Section(designation="IPE 400", shape="I", h_mm=400, b_mm=180, tw_mm=8.6, tf_mm=13.5, r_mm=21)
HEB = Section(designation="HEB 240", shape="I", h_mm=240, b_mm=240, tw_mm=10, tf_mm=17, r_mm=21)


def box(x: float, low: float, high: float) -> tuple[tuple[float, float], ...]:
    return ((-x, low), (x, low), (x, high), (-x, high))


# IPE 400 without its root fillets, y from the bottom flange's centre line
I_SECTION = (
    (-90, -6.75), (90, -6.75), (90, 6.75), (4.3, 6.75), (4.3, 379.75), (90, 379.75),
    (90, 393.25), (-90, 393.25), (-90, 379.75), (-4.3, 379.75), (-4.3, 6.75), (-90, 6.75),
)  # fmt: skip


def flange() -> Flange:
    return Flange(global_id=BEAM, part="member", width_mm=180, thickness_mm=13.5, inclination_deg=0, grade="S355")


def row(y: float, flanges: float = 386.5, **fields: Any) -> Row:
    position = "outside_top" if y > flanges else "outside_bottom" if y < 0 else "between"
    shown = {"count": 2, "gauge_mm": 110.0, "x_mm": (-55.0, 55.0), "position": position, **fields}
    return Row(y_bottom_mm=y, y_top_mm=flanges - y, **shown)


def result(**fields: Any) -> Result:
    forces = Forces(N_kN=0, V_kN=90, M_kNm=100)
    defaults: dict[str, Any] = {
        "check": "bolt_group.elastic", "case": "LC1", "tension_flange": "top", "status": "pass", "actions": forces,
        "resistance": {"M_kNm": 120.04}, "utilisation": 0.83305, "governing": "row 1, bolt tension",
        "row_forces_kN": (180.25, 120.75, -0.0, 0.0), "compression_kN": 301.0,
        "steps": (
            Step(symbol="d", expression="", value=24, unit="mm", reference="bolts.diameter: read"),
            Step(symbol="F_t,Rd", expression="k_2·f_ub·A_s / γ_M2", figures="0.9·1000·353 / 1.25", value=254.16,
                 unit="kN", reference="EN 1993-1-8:2005, Table 3.4"),
        ),
    }  # fmt: skip
    return Result(**{**defaults, **fields})


def moment_joint(**fields: Any) -> Joint:
    defaults: dict[str, Any] = {
        "id": "J01", "name": f"B12 to C3 {HOSTILE}", "configuration": "beam_to_column_flange", "moment_joint": True,
        "why": "An end plate 20 mm thick meets both flanges of B12.", "family": "F01",
        "supported": JointMember(global_id=BEAM, name=HOSTILE, end="start", section=IPE, grade="S355"),
        "supporting": JointMember(global_id=COLUMN, name="C3", end=None, section=HEB, grade="S355"),
        "plates": (
            JointPlate(global_id=PLATE, role="end_plate", thickness_mm=20, width_mm=200, depth_mm=560, grade=None),
        ),
        "bolts": JointBolts(global_ids=BOLTS, count=8, diameter_mm=24, grade="10.9", hole_diameter_mm=26, grip_mm=37),
        "rows": (row(441.0), row(331.0), row(58.0), row(-52.25)),
        "interface": Interface(
            origin_mm=(0, 0, 0), normal=(1, 0, 0), up=(0, 0, 1), across=(0, 1, 0), flange_distance_mm=386.5,
            axis_y_mm=193.25, top=flange(), bottom=flange(),
        ),
        "welds": (JointWeld(global_id=WELD, at="top flange", type="fillet", throat_mm=7), ),
        "front": (
            Shape(global_id=PLATE, role="end_plate", rings=(box(100, -86.5, 473.5),)),
            Shape(global_id=BEAM, role="member", rings=(I_SECTION,)),
            Shape(global_id=COLUMN, role="carrier", rings=(box(120, -146.5, 533.5),)),
        ),
        "completeness": 0.857,
        "provenance": {
            "bolts.diameter": Provenance(source="read", detail=f"IfcMechanicalFastener.NominalDiameter {HOSTILE}"),
            "bolts.grade": Provenance(source="assumed", detail="settings, [defaults] bolt_grade"),
            "rows": Provenance(source="measured", detail="bolt axes in the interface plane"),
        },
        "checks": (
            result(),
            result(tension_flange="bottom", case=None, status="resistance_only", actions=None, utilisation=None),
            result(check="bolt_group.plastic", status="fail", utilisation=1.0004, governing="moment"),
            result(check="bolt_group.plastic", tension_flange="bottom", case=None, status="not_checkable",
                   actions=None, utilisation=None, resistance={}, governing="", row_forces_kN=(),
                   compression_kN=None, steps=(), reason=f"The plate's grade is not known {HOSTILE}."),
        ),
        "findings": (
            Finding(code="edge-distance", severity="warning", message=f"Row 1 stands near the edge {HOSTILE}.",
                    elements=(PLATE,), point_mm=(1, 2, 3), value=29.98, limit=30.0,
                    reference="EN 1993-1-8:2005, Table 3.3"),
        ),
    }  # fmt: skip
    return Joint(**{**defaults, **fields})


def simple_joint(**fields: Any) -> Joint:
    defaults: dict[str, Any] = {
        "id": "J02", "name": "B13 to C3", "configuration": "other", "moment_joint": False,
        "why": "A fin plate meets the web only.", "family": "F02", "supported": None, "supporting": None,
        "plates": (
            JointPlate(global_id=FIN, role="fin_plate", thickness_mm=10, width_mm=100, depth_mm=220, grade="S275"),
        ),
        "bolts": JointBolts(
            global_ids=BOLTS[:1], count=3, diameter_mm=20, grade="8.8", hole_diameter_mm=22, grip_mm=18
        ),
        "completeness": 1.0,
        "checks": (
            result(status="not_applicable", utilisation=None, governing="", reason="No moment joint.", steps=(),
                   row_forces_kN=(), resistance={}, compression_kN=None, actions=None, case=None),
        ),
    }  # fmt: skip
    return Joint(**{**defaults, **fields})


def audit(*joints: Joint, **fields: Any) -> Audit:
    defaults: dict[str, Any] = {
        "generator": Generator(name="ifcjoints", version="0.1.0"),
        "model": ModelFile(
            path=f"models/{HOSTILE}.ifc", sha256="ab" * 32, schema_name="IFC4", length_unit_mm=1000,
            originating_system=HOSTILE,
        ),
        "basis": BasisRecord(
            standard="EN 1993-1-8", edition="2005", national_choices={"gamma_M2": 1.25},
            actions=FileReference(path=f"{HOSTILE}.csv", sha256="cd" * 32),
        ),
        "problems": (Problem(element="#12", message=f"A body that is not closed {HOSTILE}."),),
        "properties_used": {f"Set.{HOSTILE}": 7},
        "settings": {"basis": {"gamma_M2": 1.25}, "defaults": {"bolt_grade": HOSTILE}},
        "installed_checks": (
            CheckInfo(name="bolt_group.elastic", title="Elastic bolt group", package="ifcjoints_bolt_groups",
                      version="0.1.0", method="Linear distribution"),
        ),
        "joints": joints or (moment_joint(), simple_joint()),
        "coverage": Coverage(bolts=16, bolts_in_joints=11, bolts_elsewhere=5, parts=9),
        "elsewhere": (
            Elsewhere(bolts=("anchor-1",), count=5, reason=f"Anchors in concrete {HOSTILE}."),
        ),
    }  # fmt: skip
    return Audit(**{**defaults, **fields})
