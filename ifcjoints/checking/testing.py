"""For packs and their tests: joints from plain figures, and a runner for the cases a check carries.

    @pytest.mark.parametrize(**case_parameters(elastic))
    def test_case(case):
        run_case(elastic, case)

or, without pytest, ``run_cases(elastic)``.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace
from typing import Any, Literal

from ..model.actions import Action, FlangeSide, Forces
from ..model.basis import EDITIONS, Basis, StandardName
from ..model.joints import Flange, Interface, Joint, JointBolts, JointMember, JointPlate, Provenance, Row, Section
from ..model.results import Result
from ..model.units import Mm
from .contract import Case, Check, NoOptions, Subject
from .runner import run_check

PLAIN_FIGURES = (
    "rows", "bolts.diameter", "bolts.grade", "plates.plate.thickness", "plates.plate.grade",
    "top_flange.thickness", "top_flange.grade", "bottom_flange.thickness", "bottom_flange.grade",
)  # fmt: skip
PLAIN_ROWS: tuple[tuple[Mm, int], ...] = ((450.0, 2), (340.0, 2), (60.0, 2))


def plain_joint(
    rows: Sequence[tuple[Mm, int]] = PLAIN_ROWS,
    *,
    gauge: Mm = 110.0,
    flange_distance: Mm = 390.0,
    axis: Mm | None = None,
    slope: float = 0.0,
    flange: tuple[Mm, Mm] = (180.0, 13.5),
    flange_grade: str | None = "S355",
    inclinations: tuple[float, float] = (0.0, 0.0),
    bolt: tuple[Mm | None, str | None] = (24.0, "8.8"),
    plate_thickness: Mm = 20.0,
    plate_grade: str | None = "S355",
) -> Joint:
    """Build a moment joint from plain figures, with an end plate and nothing known of what carries it.

    `rows` are (y from the bottom flange's centre line, bolts), top to bottom, their bolts two by two about the web
    with this `gauge`; `flange` is (width, thickness) of both flanges, `inclinations` the bottom and the top
    flange's angle in degrees; `axis` where the member's axis meets the interface (y; by default half-way between
    the flanges), `slope` the degrees by which it rises from the interface's normal; `bolt` (diameter, grade).
    Lengths in mm.
    """
    given = Provenance(source="given", detail="plain figures")
    width, thickness = flange
    flanges = [
        Flange(
            global_id="member", part="member", width_mm=width, thickness_mm=thickness, inclination_deg=angle,
            grade=flange_grade,
        )
        for angle in inclinations
    ]  # fmt: skip
    section = Section(designation=None, shape="I", h_mm=flange_distance + thickness, b_mm=width, tf_mm=thickness)
    return Joint(
        id="J-PLAIN",
        name="plain joint",
        configuration="beam_to_column_flange",
        moment_joint=True,
        why="made from plain figures",
        family="F01",
        supported=JointMember(global_id="member", name="beam", end="start", section=section, grade=flange_grade),
        supporting=None,
        plates=(_plate(plate_thickness, width, flange_distance, plate_grade),),
        bolts=JointBolts(
            global_ids=("bolts",), count=sum(count for _, count in rows), diameter_mm=bolt[0], grade=bolt[1],
            hole_diameter_mm=None, grip_mm=None,
        ),
        rows=tuple(_row(y, count, gauge, flange_distance) for y, count in rows),
        interface=Interface(
            origin_mm=(0.0, 0.0, 0.0), normal=(1.0, 0.0, 0.0), up=(0.0, 0.0, 1.0), across=(0.0, -1.0, 0.0),
            flange_distance_mm=flange_distance, axis_y_mm=flange_distance / 2 if axis is None else axis,
            member_slope_deg=slope, bottom=flanges[0], top=flanges[1],
        ),
        completeness=1.0,
        provenance=dict.fromkeys(PLAIN_FIGURES, given),
    )  # fmt: skip


def _plate(thickness: Mm, width: Mm, depth: Mm, grade: str | None) -> JointPlate:
    return JointPlate(
        global_id="plate", role="end_plate", thickness_mm=thickness, width_mm=width, depth_mm=depth + 200.0, grade=grade
    )


def _row(y: Mm, count: int, gauge: Mm, flange_distance: Mm) -> Row:
    position: Literal["outside_top", "between", "outside_bottom"] = "between"
    if y > flange_distance or y < 0:
        position = "outside_top" if y > 0 else "outside_bottom"
    return Row(y_bottom_mm=y, y_top_mm=flange_distance - y, count=count, gauge_mm=gauge, position=position)


def plain_subject(
    joint: Joint,
    forces: tuple[float, float, float] | None = None,
    *,
    tension_flange: FlangeSide = "top",
    standard: StandardName = "EN 1993-1-8",
) -> Subject:
    """Ask about a joint under `forces` (N kN, V kN, M kNm), or about its resistance where there are none."""
    action = None
    if forces is not None:
        N_kN, V_kN, M_kNm = forces
        action = Action(case="LC1", forces=Forces(N_kN=N_kN, V_kN=V_kN, M_kNm=M_kNm), source="plain figures")
        tension_flange = action.tension_flange
    return Subject(joint, tension_flange, action, Basis(standard=standard, edition=EDITIONS[standard]))


def example_cases() -> tuple[Case, ...]:
    """Return a case that passes, one that fails and one that cannot be checked, for any check of bolt rows."""
    return (
        Case("a light moment passes", plain_subject(plain_joint(), (0.0, 50.0, 60.0)), "pass"),
        Case("a moment far beyond the bolts fails", plain_subject(plain_joint(), (0.0, 50.0, 900.0)), "fail"),
        Case(
            "bolts without a grade cannot be checked",
            plain_subject(plain_joint(bolt=(24.0, None)), (0.0, 50.0, 60.0)),
            "not_checkable",
            missing="grade",
        ),
    )


def case_parameters(check: Check) -> dict[str, Any]:
    """Return the arguments of ``pytest.mark.parametrize`` that run a test once for each case of a check, as `case`."""
    return {"argnames": "case", "argvalues": check.cases, "ids": [case.title for case in check.cases]}


def run_cases(check: Check) -> tuple[Result, ...]:
    """Run all cases of a check; AssertionError names the first that did not end as it should."""
    return tuple(run_case(check, case) for case in check.cases)


def run_case(check: Check, case: Case) -> Result:
    """Run one case of a check, with the check's default options where the case gives none.

    AssertionError says how it did not end as it should.
    """
    plain = isinstance(case.subject.options, NoOptions)
    result = run_check(check, replace(case.subject, options=check.options()) if plain else case.subject)
    if result.status != case.expect:
        raise AssertionError(
            f'{check.name}, "{case.title}": ended as {result.status}, not {case.expect} ({result.reason})'
        )
    if case.missing not in result.reason:
        raise AssertionError(f'{check.name}, "{case.title}": the reason does not name {case.missing}: {result.reason}')
    return result
