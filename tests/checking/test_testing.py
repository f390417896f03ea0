"""The kit that packs are tested with raises when a case does not end as it should."""

from dataclasses import replace

import pytest

from ifcjoints.checking import NotCheckable, Verdict
from ifcjoints.checking.testing import (
    Case,
    case_parameters,
    example_cases,
    plain_joint,
    plain_subject,
    run_case,
    run_cases,
)
from ifcjoints.model.base import Frozen

from .made import made


class Limits(Frozen):
    limit: float = 0.5


def told(subject, trace):
    return Verdict({}, "", subject.options.limit)


def lacking(subject, trace):
    raise NotCheckable("the bolts' diameter is not known.")


@pytest.mark.parametrize("expect", ["fail", "not_checkable"])
def test_a_case_that_ends_otherwise_is_told(monkeypatch, expect):
    case = Case("a light moment", plain_subject(plain_joint()), expect)
    with pytest.raises(AssertionError, match=f'made.check, "a light moment": ended as pass, not {expect}'):
        run_case(made(monkeypatch), case)


def test_a_reason_that_does_not_name_what_is_missing_is_told(monkeypatch):
    built, subject = made(monkeypatch, function=lacking), plain_subject(plain_joint())
    assert run_case(built, Case("x", subject, "not_checkable", missing="diameter")).status == "not_checkable"
    with pytest.raises(AssertionError, match="does not name grade"):
        run_case(built, Case("x", subject, "not_checkable", missing="grade"))


def test_a_case_takes_the_check_s_own_options_unless_it_brings_some(monkeypatch):
    built, subject = made(monkeypatch, function=told, options=Limits), plain_subject(plain_joint())
    assert run_case(built, Case("defaults", subject, "pass")).utilisation == 0.5
    assert run_case(built, Case("own", replace(subject, options=Limits(limit=1.5)), "fail")).utilisation == 1.5


def test_all_cases_are_run_and_the_first_that_ends_otherwise_is_named(monkeypatch):
    with pytest.raises(AssertionError, match=example_cases()[1].title):
        run_cases(made(monkeypatch))


def test_every_case_becomes_a_test_of_its_own(monkeypatch):
    parameters = case_parameters(made(monkeypatch))
    assert parameters["ids"] == [case.title for case in example_cases()]
    assert len(parameters["argvalues"]) == 3


def test_a_plain_joint_s_rows_are_told_from_both_flanges():
    """By hand: flanges 300 mm apart, rows 40 mm above the top one, 60 mm below it and 50 mm under the bottom one."""
    joint = plain_joint(((340.0, 2), (240.0, 4), (-50.0, 2)), flange_distance=300.0)
    assert [row.y_top_mm for row in joint.rows] == [-40.0, 60.0, 350.0]
    assert [row.position for row in joint.rows] == ["outside_top", "between", "outside_bottom"]
    assert joint.bolts.count == 8


@pytest.mark.parametrize(("moment", "flange"), [(5.0, "top"), (-5.0, "bottom")])
def test_a_plain_subject_s_moment_decides_the_tension_flange(moment, flange):
    assert plain_subject(plain_joint(), (0.0, 0.0, moment)).tension_flange == flange
