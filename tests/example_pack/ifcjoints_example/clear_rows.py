"""Bolt rows clear of the flanges.

What it checks
--------------
That every bolt row keeps a distance from both flanges' centre lines.

Why it matters
--------------
A wrench needs room, and a head on the flange's weld cannot be seated.

Method and clause
-----------------
Least distance of a row from a flange's centre line against a multiple of the bolt's diameter; a rule of the office
(common practice, no source), the multiple being the option `diameters`.

Needs
-----
Bolt rows, flanges and the bolts' diameter.

Limits
------
It looks at centre lines only and knows nothing of welds or washers.

Example
-------
A row 60 mm from the flange with M24 bolts and two diameters: 48 / 60 = 0.80, which passes.
"""

from __future__ import annotations

from ifcjoints.checking import N, NotApplicable, NotCheckable, Subject, Trace, Verdict, check
from ifcjoints.checking.testing import Case, plain_joint, plain_subject
from ifcjoints.model.base import Frozen

RULE = "office rule (common practice, no source)"


class Options(Frozen):
    """`diameters`: how many bolt diameters a row keeps from a flange's centre line."""

    diameters: float = 2.0


def needed_distance(diameters: N, d: N) -> N:
    """Least distance in mm of a row from a flange's centre line."""
    return diameters * d


CASES = (
    Case("rows 60 mm off pass", plain_subject(plain_joint(((330.0, 2), (60.0, 2)))), "pass"),
    Case("a row 30 mm off fails", plain_subject(plain_joint(((360.0, 2), (60.0, 2)))), "fail"),
    Case("bolts without a size", plain_subject(plain_joint(bolt=(None, "8.8"))), "not_checkable", missing="diameter"),
)


@check("example.clear_rows", title="Rows clear of the flanges", method=RULE, cases=CASES, options=Options)
def clear_rows(subject: Subject, trace: Trace) -> Verdict:
    """Check the row nearest to a flange."""
    joint, options = subject.joint, subject.options
    if joint.interface is None:
        raise NotApplicable(f"not a moment joint: {joint.why}.")
    if joint.bolts.diameter_mm is None:
        raise NotCheckable("the bolts' diameter is not known; give it in the model.")
    assert isinstance(options, Options)
    nearest = min(min(abs(row.y_bottom_mm), abs(row.y_top_mm)) for row in joint.rows)
    d = trace.given("d", joint.bolts.diameter_mm, "mm", "bolts")
    y = trace.given("y_min", nearest, "mm", "row nearest to a flange's centre line")
    factor = trace.given("k", options.diameters, "", "option diameters")
    needed = trace.step("y_req", needed_distance(factor, d), "mm", RULE)
    ratio = trace.step("η", needed / y, "", RULE)
    return Verdict(resistance={}, governing="row nearest to a flange", utilisation=float(ratio))
