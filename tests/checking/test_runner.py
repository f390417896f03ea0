"""Every joint is asked in both directions, under its own actions, with the options in force."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from ifcjoints.checking import NotApplicable, NotCheckable, Verdict
from ifcjoints.checking.runner import resolve_options, run_check, run_checks
from ifcjoints.checking.testing import plain_joint, plain_subject
from ifcjoints.errors import SettingsError
from ifcjoints.model.actions import Action, Forces
from ifcjoints.model.base import Frozen
from ifcjoints.model.basis import Basis

from .made import NAME, installed, made

BASIS = Basis(standard="EN 1993-1-8", edition="2005")


class Limits(Frozen):
    limit: float = 2.0


def action(case, moment):
    return Action(case=case, forces=Forces(N_kN=0.0, V_kN=0.0, M_kNm=moment), source="table")


@pytest.mark.parametrize(("ratio", "status"), [(1.0, "pass"), (1.0000001, "fail"), (None, "resistance_only")])
def test_a_utilisation_of_one_passes_and_more_fails(monkeypatch, ratio, status):
    built = made(monkeypatch, function=lambda subject, trace: Verdict({}, "", ratio))
    assert run_check(built, plain_subject(plain_joint())).status == status


@pytest.mark.parametrize(("outcome", "status"), [(NotApplicable, "not_applicable"), (NotCheckable, "not_checkable")])
def test_a_check_that_cannot_answer_gives_a_reason_and_no_number(monkeypatch, outcome, status):
    def refuses(subject, trace):
        trace.given("t", 20.0, "mm", "plate")
        raise outcome("the plate is curved.")

    result = run_check(made(monkeypatch, function=refuses), plain_subject(plain_joint(), (0.0, 0.0, -5.0)))
    assert (result.status, result.reason) == (status, "the plate is curved.")
    assert (result.resistance, result.utilisation, result.row_forces_kN) == ({}, None, ())
    assert (result.case, result.actions.M_kNm, result.tension_flange) == ("LC1", -5.0, "bottom")
    assert [step.symbol for step in result.steps] == ["t"]


def test_a_fault_in_a_check_is_not_taken_for_an_answer(monkeypatch):
    def faulty(subject, trace):
        return Verdict({"M_kNm": 1.0 / len(())}, "row 1")

    with pytest.raises(ZeroDivisionError):
        run_check(made(monkeypatch, function=faulty), plain_subject(plain_joint()))


@given(st.lists(st.floats(-500.0, 500.0), max_size=6))
def test_each_action_is_run_once_and_each_direction_is_answered(moments):
    """Whatever acts: an action is asked in the direction its moment pulls, a direction without one stays open."""
    actions = [action(f"LC{number}", moment) for number, moment in enumerate(moments)]
    with pytest.MonkeyPatch.context() as monkeypatch:
        checks = installed(made(monkeypatch))
    results = run_checks(checks, plain_joint(), actions, BASIS, resolve_options(checks, {}))
    answered = {(result.case, result.tension_flange) for result in results if result.case}
    assert answered == {(each.case, "top" if each.forces.M_kNm >= 0 else "bottom") for each in actions}
    assert len(results) == len(actions) + sum(result.case is None for result in results)
    assert {result.tension_flange for result in results} == {"top", "bottom"}
    open_ones = [result.tension_flange for result in results if result.case is None]
    assert not {direction for _, direction in answered} & set(open_ones)


def test_a_check_is_handed_the_options_in_force(monkeypatch):
    def limited(subject, trace):
        return Verdict({}, "", subject.options.limit)

    checks = installed(made(monkeypatch, function=limited, options=Limits))
    options = resolve_options(checks, {NAME: {"limit": 0.25}})
    results = run_checks(checks, plain_joint(), [], BASIS, options)
    assert [result.utilisation for result in results] == [0.25, 0.25]


def test_options_are_filled_in(monkeypatch):
    checks = installed(made(monkeypatch, options=Limits))
    assert resolve_options(checks, {})[NAME] == Limits(limit=2.0)
    assert resolve_options(checks, {NAME: {"limit": 3}})[NAME] == Limits(limit=3.0)


@pytest.mark.parametrize(
    ("given_options", "place"),
    [({"limit": "wide"}, "limit"), ({"limits": 3.0}, "limits"), ({"limit": float("nan")}, "limit")],
)
def test_options_that_do_not_fit_are_named_with_their_check(monkeypatch, given_options, place):
    checks = installed(made(monkeypatch, options=Limits))
    with pytest.raises(SettingsError, match=rf"the option {place} of the check made\.check"):
        resolve_options(checks, {NAME: given_options})


def test_a_check_without_options_takes_none(monkeypatch):
    with pytest.raises(SettingsError, match=r"the option limit of the check made\.check"):
        resolve_options(installed(made(monkeypatch)), {NAME: {"limit": 1.0}})
