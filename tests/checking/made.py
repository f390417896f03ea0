"""A check made in a test, with a manual that keeps the contract unless the test spoils it."""

import types

from ifcjoints.checking import Verdict, check, contract
from ifcjoints.checking.registry import InstalledCheck
from ifcjoints.checking.testing import example_cases

NAME = "made.check"
MANUAL = "\n\n".join(f"{heading}\n{'-' * len(heading)}\nSome text." for heading in contract.HEADINGS)


def made(monkeypatch, *, name=NAME, manual=MANUAL, method="clause 1", cases=None, function=None, **options):
    """Register a check whose module has this docstring."""
    module = types.SimpleNamespace(__doc__=f"Title.\n\n{manual}")
    monkeypatch.setattr(contract.inspect, "getmodule", lambda _function: module)
    decorate = check(name, title="Made", method=method, cases=example_cases() if cases is None else cases, **options)
    return decorate(function or (lambda subject, trace: Verdict({"M_kNm": 1.0}, "row 1", 0.5)))


def installed(check):
    return [InstalledCheck(check, "made_pack", "1")]
