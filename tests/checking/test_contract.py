"""A check that does not keep its contract does not register; what is installed is told truly."""

import types

import pytest

from ifcjoints.checking import NotApplicable, NotCheckable, Verdict, check, contract, registry
from ifcjoints.checking.registry import installed_checks
from ifcjoints.checking.runner import resolve_options, run_check, run_checks
from ifcjoints.checking.testing import Case, example_cases, plain_joint, plain_subject, run_case
from ifcjoints.errors import CheckRegistrationError, SettingsError
from ifcjoints.model.actions import Action, Forces
from ifcjoints.model.base import Frozen
from ifcjoints.model.basis import Basis

MANUAL = "\n\n".join(f"{heading}\n{'-' * len(heading)}\nSome text." for heading in contract.HEADINGS)
BASIS = Basis(standard="EN 1993-1-8", edition="2005")


def made(monkeypatch, *, manual=MANUAL, method="clause 1", cases=None, function=None, options=None):
    """Register a check whose module has this docstring."""
    module = types.SimpleNamespace(__doc__=f"Title.\n\n{manual}")
    monkeypatch.setattr(contract.inspect, "getmodule", lambda _function: module)
    more = {"options": options} if options else {}
    decorate = check(
        "made.check", title="Made", method=method, cases=example_cases() if cases is None else cases, **more
    )
    return decorate(function or (lambda subject, trace: Verdict({"M_kNm": 1.0}, "row 1", 0.5)))


@pytest.mark.parametrize("heading", contract.HEADINGS)
def test_every_heading_is_asked_for(monkeypatch, heading):
    with pytest.raises(CheckRegistrationError, match=heading):
        made(monkeypatch, manual=MANUAL.replace(heading, "Other words"))


def test_a_clause_is_asked_for(monkeypatch):
    with pytest.raises(CheckRegistrationError, match="clause"):
        made(monkeypatch, method=" ")


@pytest.mark.parametrize("missing", ["pass", "fail", "not_checkable"])
def test_a_case_of_each_kind_is_asked_for(monkeypatch, missing):
    with pytest.raises(CheckRegistrationError, match=missing):
        made(monkeypatch, cases=[case for case in example_cases() if case.expect != missing])


def test_a_utilisation_of_one_passes_and_more_fails(monkeypatch):
    for ratio, status in ((1.0, "pass"), (1.0000001, "fail"), (None, "resistance_only")):
        built = made(monkeypatch, function=lambda subject, trace, ratio=ratio: Verdict({}, "", ratio))
        assert run_check(built, plain_subject(plain_joint())).status == status


@pytest.mark.parametrize(("outcome", "status"), [(NotApplicable, "not_applicable"), (NotCheckable, "not_checkable")])
def test_a_check_that_cannot_answer_gives_a_reason_and_no_number(monkeypatch, outcome, status):
    def refuses(subject, trace):
        raise outcome("the plate is curved.")

    result = run_check(made(monkeypatch, function=refuses), plain_subject(plain_joint()))
    assert (result.status, result.reason) == (status, "the plate is curved.")
    assert not result.resistance
    assert result.utilisation is None


def test_each_direction_is_run_under_its_own_actions(monkeypatch):
    installed = [registry.InstalledCheck(made(monkeypatch), "made", "1")]
    actions = [
        Action(case=name, forces=Forces(N_kN=0, V_kN=0, M_kNm=moment), source="table")
        for name, moment in (("A", 10.0), ("B", 20.0))
    ]
    options = resolve_options(installed, {})
    results = run_checks(installed, plain_joint(), actions, BASIS, options)
    assert [(result.tension_flange, result.case) for result in results] == [
        ("top", "A"),
        ("top", "B"),
        ("bottom", None),
    ]


class Limits(Frozen):
    limit: float = 2.0


def test_options_are_filled_in_and_bad_ones_named(monkeypatch):
    installed = [registry.InstalledCheck(made(monkeypatch, options=Limits), "made", "1")]
    assert resolve_options(installed, {})["made.check"] == Limits(limit=2.0)
    assert resolve_options(installed, {"made.check": {"limit": 3}})["made.check"] == Limits(limit=3.0)
    with pytest.raises(SettingsError, match=r"limit of the check made\.check"):
        resolve_options(installed, {"made.check": {"limit": "wide"}})


def test_a_pack_that_is_not_installed_is_named():
    with pytest.raises(SettingsError, match='"ifcjoints_nowhere"'):
        installed_checks(["ifcjoints_nowhere"])


def test_a_glob_limits_the_checks():
    assert [each.check.name for each in installed_checks(only="*.elastic")] == ["bolt_group.elastic"]


class Point:
    """Stands for an entry point."""

    name, value, module, dist = "made.check", "made_pack.x:y", "made_pack.x", None

    def __init__(self, load):
        self.load = load


def broken():
    raise ImportError("no module named nothing")


@pytest.mark.parametrize(
    ("load", "text"), [(broken, "cannot be loaded"), (lambda: "no check", "does not name a check")]
)
def test_a_broken_entry_point_is_named(monkeypatch, load, text):
    monkeypatch.setattr(registry, "entry_points", lambda group: [Point(load)])
    with pytest.raises(CheckRegistrationError, match=text):
        installed_checks()


def test_run_case_says_how_a_case_did_not_end_as_it_should(monkeypatch):
    built = made(monkeypatch)
    with pytest.raises(AssertionError, match="ended as pass, not fail"):
        run_case(built, Case("x", plain_subject(plain_joint()), "fail"))
