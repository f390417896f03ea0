"""What a check is: a function of one subject that works through a trace and gives a verdict.

    @check("bolt_group.elastic", title="…", method="…", cases=CASES)
    def elastic(subject: Subject, trace: Trace) -> Verdict: ...

The check's manual is the docstring of the module it stands in (headings: :data:`HEADINGS`). It raises
:class:`NotApplicable` when the joint lies outside the method and :class:`NotCheckable` when the model or
the settings lack something; it never returns a number for either.
"""

from __future__ import annotations

import inspect
from collections.abc import Callable, Sequence
from dataclasses import dataclass, field
from typing import Literal

from ..errors import CheckRegistrationError
from ..model.actions import Action, FlangeSide
from ..model.base import Frozen
from ..model.basis import Basis
from ..model.joints import Joint
from ..model.units import KiloNewton
from .trace import Trace

HEADINGS = ("What it checks", "Why it matters", "Method and clause", "Needs", "Limits", "Example")


class NotApplicable(Exception):  # noqa: N818 - an outcome, not an error
    """The joint lies outside the method's scope; the text says which limit."""


class NotCheckable(Exception):  # noqa: N818 - an outcome, not an error
    """The model or the settings lack something; the text says what, and where it could be supplied."""


class NoOptions(Frozen):
    """The options of a check that has none."""


@dataclass(frozen=True, slots=True)
class Subject:
    """What a check is asked about: one joint, one direction, one action or none."""

    joint: Joint
    tension_flange: FlangeSide
    action: Action | None
    basis: Basis
    options: Frozen = field(default_factory=NoOptions)


@dataclass(frozen=True, slots=True)
class Verdict:
    """A check's answer. `utilisation` is None where no action was given.

    `resistance` maps a field name with its unit (``"M_kNm"``) to a figure; `row_forces_kN` has one
    figure per row of the joint, all its bolts together.
    """

    resistance: dict[str, float]
    governing: str
    utilisation: float | None = None
    row_forces_kN: Sequence[KiloNewton] = ()
    compression_kN: KiloNewton | None = None


@dataclass(frozen=True, slots=True)
class Case:
    """An example that a check carries: a test, and a page of its manual.

    `expect` is "pass", "fail" or "not_checkable"; `missing` a word that the reason must then hold.
    """

    title: str
    subject: Subject
    expect: Literal["pass", "fail", "not_checkable"]
    missing: str = ""


CheckFunction = Callable[[Subject, Trace], Verdict]


@dataclass(frozen=True, slots=True)
class Check:
    """A registered check. `manual` maps each of :data:`HEADINGS` to its text."""

    name: str
    title: str
    method: str
    function: CheckFunction
    manual: dict[str, str]
    cases: tuple[Case, ...]
    options: type[Frozen]


def check(
    name: str, *, title: str, method: str, cases: Sequence[Case], options: type[Frozen] = NoOptions
) -> Callable[[CheckFunction], Check]:
    """Make a check of a function. Raises CheckRegistrationError where the contract is not kept."""

    def register(function: CheckFunction) -> Check:
        module = inspect.getmodule(function)
        manual = _manual(name, (module.__doc__ if module else None) or "")
        if not method.strip():
            raise CheckRegistrationError(f"{name}: name the clause or published method in `method`.")
        missing = {"pass", "fail", "not_checkable"} - {case.expect for case in cases}
        if missing:
            raise CheckRegistrationError(f"{name}: add a case that ends as {', '.join(sorted(missing))}.")
        return Check(name, title, method, function, manual, tuple(cases), options)

    return register


def _manual(name: str, docstring: str) -> dict[str, str]:
    """Split a module's docstring at its headings, each underlined with dashes."""
    sections: dict[str, list[str]] = {}
    lines = inspect.cleandoc(docstring).splitlines()
    current: list[str] = []
    for line, following in zip(lines, [*lines[1:], ""], strict=True):
        if line in HEADINGS and following.startswith("---"):
            current = sections.setdefault(line, [])
        elif not line.startswith("---"):
            current.append(line)
    manual = {heading: "\n".join(text).strip() for heading, text in sections.items()}
    absent = [heading for heading in HEADINGS if not manual.get(heading)]
    if absent:
        raise CheckRegistrationError(f"{name}: its module's docstring lacks {', '.join(absent)}.")
    return manual
