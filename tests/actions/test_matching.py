from __future__ import annotations

from collections.abc import Sequence
from typing import Any

import pytest

from ifcjoints.actions.matching import match_actions
from ifcjoints.actions.table import ActionRow
from ifcjoints.errors import ActionsError
from ifcjoints.model.actions import Action, Forces
from ifcjoints.model.joints import Flange, Interface, Joint, JointBolts, JointMember, MemberEnd
from ifcjoints.model.parts import MemberName
from ifcjoints.model.units import Vector

MEMBERS = (
    MemberName("guid-left", ("Rafter", "T-1", "R1")),
    MemberName("guid-right", ("Rafter", "T-2", "R2")),
    MemberName("guid-column", ("Column", "T-3")),
)


def row(line: int, member: str, end: MemberEnd | None, case: str = "LC1", **forces: float) -> ActionRow:
    complete = {"N_kN": 0.0, "V_kN": 0.0, "M_kNm": 0.0, **forces}
    source = f"loads.csv, line {line}"
    return ActionRow(line, member, end, Action(case=case, forces=Forces(**complete), source=source))


def member(global_id: str, end: MemberEnd | None) -> JointMember:
    return JointMember(global_id=global_id, name=global_id, end=end, section=None, grade=None)


def joint(name: str, supported: JointMember | None, supporting: JointMember | None = None, **fields: Any) -> Joint:
    defaults: dict[str, Any] = {
        "configuration": "beam_to_column_flange",
        "moment_joint": True,
        "why": "",
        "family": "F01",
        "bolts": JointBolts(global_ids=(), count=4, diameter_mm=20, grade=None, hole_diameter_mm=None, grip_mm=None),
        "completeness": 1.0,
    }
    ends = {"supported": supported, "supporting": supporting}
    return Joint(id=name, name=name, **{**defaults, **ends, **fields})


def interface(up: Vector = (0, 0, 1), inclination: float = 0.0) -> Interface:
    flange = Flange(
        global_id="x", part="member", width_mm=150, thickness_mm=10, inclination_deg=inclination, grade=None
    )
    return Interface(
        origin_mm=(0, 0, 0), normal=(1, 0, 0), up=up, across=(0, 1, 0), flange_distance_mm=400,
        axis_y_mm=200, top=flange, bottom=flange,
    )  # fmt: skip


def splice(**fields: Any) -> Joint:
    sides = member("guid-left", "end"), member("guid-right", "start")
    return joint("J", *sides, **{"configuration": "splice", "interface": interface(), **fields})


def forces_on(rows: Sequence[ActionRow], *joints: Joint) -> dict[str, dict[str, Forces]]:
    matched = match_actions(rows, MEMBERS, joints).by_joint
    return {name: {action.case: action.forces for action in actions} for name, actions in matched.items()}


@pytest.mark.parametrize("name", ["guid-left", "T-1", "R1"])
def test_a_member_goes_by_any_of_its_names(name: str) -> None:
    at_start, at_end = joint("A", member("guid-left", "start")), joint("B", member("guid-left", "end"))
    assert set(forces_on([row(2, name, "start", M_kNm=5)], at_start, at_end)) == {"A"}
    assert set(forces_on([row(2, name, None, M_kNm=5)], at_start, at_end)) == {"A", "B"}


def test_actions_arrive_as_given_and_the_column_takes_none() -> None:
    beam = joint("A", member("guid-left", "start"), member("guid-column", None))
    given = forces_on([row(2, "R1", "start", N_kN=-3, V_kN=70, M_kNm=-120)], beam)
    assert given == {"A": {"LC1": Forces(N_kN=-3, V_kN=70, M_kNm=-120)}}
    matched = match_actions([row(2, "T-3", "end", M_kNm=9)], MEMBERS, [beam])
    assert matched.by_joint == {}
    assert matched.notes == ("loads.csv, line 2: T-3 has no bolted joint at its end; the row is not used.",)


def test_an_unknown_member_is_named_with_its_line() -> None:
    with pytest.raises(ActionsError, match='line 7: the model has no member "R9"'):
        match_actions([row(7, "R9", None)], MEMBERS, [])


def test_a_name_of_several_members_acts_on_each_and_is_said() -> None:
    joints = joint("A", member("guid-left", "start")), joint("B", member("guid-right", "start"))
    matched = match_actions([row(2, "Rafter", "start", M_kNm=5)], MEMBERS, joints)
    assert set(matched.by_joint) == {"A", "B"}
    assert "2 elements" in matched.notes[0]


@pytest.mark.parametrize(("second", "end"), [("T-1", "start"), ("R1", None), ("Rafter", "start")])
def test_one_case_given_twice_under_two_names_is_refused(second: str, end: MemberEnd | None) -> None:
    with pytest.raises(ActionsError, match=r"line 3: case LC1 .* already given in loads.csv, line 2"):
        match_actions([row(2, "R1", "start", M_kNm=5), row(3, second, end, M_kNm=5)], MEMBERS, [])


def test_at_a_splice_the_other_side_counts_with_its_shear_turned() -> None:
    # Equilibrium of the cut: N and M are the same on both faces, the shear is opposite.
    given = forces_on([row(2, "R2", "start", N_kN=4, V_kN=30, M_kNm=80)], splice())
    assert given == {"J": {"LC1": Forces(N_kN=4, V_kN=-30, M_kNm=80)}}


def test_both_sides_of_a_splice_that_balance_are_one_action() -> None:
    rows = [row(2, "R1", "end", V_kN=-30, M_kNm=80), row(3, "R2", "start", V_kN=30.04, M_kNm=80)]
    matched = match_actions(rows, MEMBERS, [splice()])
    assert [action.source for action in matched.by_joint["J"]] == ["loads.csv, line 2"]
    assert matched.notes == ()


@pytest.mark.parametrize("forces", [{"V_kN": -30, "M_kNm": 80}, {"V_kN": 30, "M_kNm": -80}, {"V_kN": 30, "M_kNm": 81}])
def test_sides_of_a_splice_that_do_not_balance_are_named(forces: dict[str, float]) -> None:
    rows = [row(2, "R1", "end", V_kN=-30, M_kNm=80), row(3, "R2", "start", **forces)]
    with pytest.raises(ActionsError, match=r"line 3: case LC1 .* does not balance loads.csv, line 2"):
        match_actions(rows, MEMBERS, [splice()])


@pytest.mark.parametrize(
    ("plane", "said"),
    [
        (interface(inclination=8), "meet at an angle"),
        (interface(up=(0, 1, 0)), "stand upright"),
        (None, "not known"),
    ],
)
def test_forces_that_cannot_be_carried_over_are_said_not_used(plane: Interface | None, said: str) -> None:
    rows = [row(2, "R2", "start", M_kNm=80)]
    matched = match_actions(rows, MEMBERS, [splice(interface=plane)])
    assert matched.by_joint == {}
    assert len(matched.notes) == 1
    assert said in matched.notes[0]
    own = match_actions([row(2, "R1", "end", M_kNm=5), *rows[1:]], MEMBERS, [splice(interface=plane)])
    assert (set(own.by_joint), own.notes) == ({"J"}, ())


def test_two_joints_on_one_end_are_each_checked_for_all_of_it() -> None:
    joints = joint("A", member("guid-left", "start")), joint("B", member("guid-left", "start"))
    matched = match_actions([row(2, "R1", "start", M_kNm=5)], MEMBERS, joints)
    assert set(matched.by_joint) == {"A", "B"}
    assert "A, B" in matched.notes[0]
