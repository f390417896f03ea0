"""A check that does not keep its contract does not register."""

import pytest

from ifcjoints.checking import contract
from ifcjoints.checking.testing import example_cases
from ifcjoints.errors import CheckRegistrationError

from .made import MANUAL, NAME, made


def test_what_keeps_the_contract_registers_with_its_manual(monkeypatch):
    built = made(monkeypatch)
    assert built.name == NAME
    assert built.manual == dict.fromkeys(contract.HEADINGS, "Some text.")
    assert [case.expect for case in built.cases] == ["pass", "fail", "not_checkable"]


@pytest.mark.parametrize("heading", contract.HEADINGS)
def test_every_heading_is_asked_for(monkeypatch, heading):
    with pytest.raises(CheckRegistrationError, match=heading):
        made(monkeypatch, manual=MANUAL.replace(heading, "Other words"))


@pytest.mark.parametrize("heading", contract.HEADINGS)
def test_a_heading_without_text_is_none(monkeypatch, heading):
    underlined = f"{heading}\n{'-' * len(heading)}\n"
    with pytest.raises(CheckRegistrationError, match=f"lacks {heading}"):
        made(monkeypatch, manual=MANUAL.replace(f"{underlined}Some text.", underlined))


@pytest.mark.parametrize("heading", contract.HEADINGS)
def test_a_heading_that_is_not_underlined_is_a_line_of_text(monkeypatch, heading):
    with pytest.raises(CheckRegistrationError, match=heading):
        made(monkeypatch, manual=MANUAL.replace(f"{heading}\n{'-' * len(heading)}", heading))


def test_a_module_without_a_docstring_has_no_manual(monkeypatch):
    with pytest.raises(CheckRegistrationError, match="What it checks"):
        made(monkeypatch, manual="")


def test_a_clause_is_asked_for(monkeypatch):
    with pytest.raises(CheckRegistrationError, match="clause"):
        made(monkeypatch, method=" ")


@pytest.mark.parametrize("missing", ["pass", "fail", "not_checkable"])
def test_a_case_of_each_kind_is_asked_for(monkeypatch, missing):
    with pytest.raises(CheckRegistrationError, match=f"ends as {missing}"):
        made(monkeypatch, cases=[case for case in example_cases() if case.expect != missing])
