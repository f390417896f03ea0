"""Elastic bolt group under moment out of its plane.

What it checks
--------------
The bolt rows of an end plate under a moment, with axial force and shear. The end plate is taken as stiff: it turns
about the centre line of the compression flange, and every bolt pulls in proportion to its distance from there. The
check states the moment at which the first bolt reaches its design tension resistance or the compression flange its
own, whichever comes first. Under a design action it also states each row's force, the compression, and how far the
most loaded bolt is used in tension, in shear and in both together.

Why it matters
--------------
It needs nothing but the bolts' places, their size and the flange, so it can be followed on one sheet of paper, and
it tells at once when a row lies where it does little work. It asks no ductility of plate, flange or bolts.

Method and clause
-----------------
F_r = n_r M_c y_r / Σny², C = ΣF − N, with y the distance from the compression flange's centre line and M_c the moment
about it: |M| plus N times the distance of the member's axis. Rows with y ≤ 0 do not pull. Published as bolts in
eccentric loading out of their plane, for example in V. B. Bhandari, Design of Machine Elements, Examples 7.5 and 7.6.

Axial force: bolts only pull and flanges only push. Where no row pulls, the compression lies between the flanges at
y_C = −M_c/|N| and each takes its share by statics, the compression flange |N|(1 − y_C/z). Where C would turn into
tension the joint is open and the bolts alone carry N and M, linearly about the centroid of those that pull:
F_b = N/n + (M_c − N ȳ)(y − ȳ)/Σn(y − ȳ)²; rows join as the line of no force passes them. Where a large N off the bolts'
centroid presses the other flange, the plate turns about that one.

Actions are taken along and square to the member, at its end; where it leaves the interface at an angle they are
resolved square to and along the interface. Shear is shared equally by all bolts. Bolts: EN 1993-1-8:2005, Table 3.4, or
AISC 360-22, J3.7 and J3.8, threads in the shear plane unless the grade says otherwise. Flanges: plain yield of their
area, square to the interface, EN 1993-1-1:2005, 6.2.4, or AISC 360-22, J4.4.

Needs
-----
Bolt rows and flanges at the interface, the bolts' diameter and grade, the compression flange's size and grade; with an
axial force also the other flange's.

Limits
------
No prying and no limit from bending or punching of the end plate, from the column's flange or web, or from the welds:
the component method does those. No slip resistance, no bearing, no countersunk bolts. A flange at an angle to the
interface's normal presses it with the part of its force along that normal; what carries the rest is not checked. The
stated moment resistance holds at the action's axial force and does not fall with shear; the interaction of tension
and shear is in the utilisation. Where the axial force alone is too much for a bolt or a flange, the resistance is nil
and the check fails: a moment that would relieve them is not counted on. It supports a competent engineer's check and
replaces neither it nor the governing code.

Example
-------
Two bolts 150 mm and two bolts 25 mm from the compression flange under 2.5 kNm: Σny² = 2·150² + 2·25² = 46 250 mm², so
each outer bolt pulls 2.5·10⁶·150 / 46 250 = 8108 N.
"""

from __future__ import annotations

from ifcjoints.checking import Quantity, Subject, Trace, Verdict, check
from ifcjoints.checking.testing import example_cases

from .bolt import BoltResistance, bolt_resistance
from .flange import interface_of
from .group import Group, Spread, group_of
from .linear import METHOD, linear_limit, linear_spread
from .loads import STATICS, Loads, given_loads
from .use import Ratios, beyond_alone, bolts_and_flanges, governing, shear_and_both


@check(
    "bolt_group.elastic",
    title="Elastic bolt group, out of plane",
    method="linear bolt forces about the compression flange; EN 1993-1-8:2005, Table 3.4 or AISC 360-22, J3",
    cases=example_cases(),
)
def elastic(subject: Subject, trace: Trace) -> Verdict:
    """Check the joint's rows by the elastic method."""
    interface_of(subject)
    bolt = bolt_resistance(subject, trace)
    loads = given_loads(subject, trace)
    group = group_of(subject, bolt.tension, loads.N, trace)
    alone = _too_much_alone(group, trace)
    M_cRd, governs = (group.M_c_alone(Trace()), governing(alone)[1]) if alone else linear_limit(group, trace)
    M_Rd = (
        nil_resistance(governs, "M_Rd", trace) if alone else trace.step("M_Rd", group.about_axis(M_cRd), "kNm", METHOD)
    )
    utilisation = None
    if subject.action is None:
        spread = linear_spread(group, M_cRd, "", trace)
    else:
        spread, ratios = linear_use(group, bolt, loads, trace)
        utilisation, governs = governing(alone | ratios)
    return Verdict(
        resistance={"M_kNm": float(M_Rd) / 1e6},
        governing=governs,
        utilisation=utilisation,
        row_forces_kN=[float(spread.rows[index]) / 1e3 for index in range(len(group.rows))],
        compression_kN=spread.compression / 1e3,
    )


def linear_use(group: Group, bolt: BoltResistance, loads: Loads, trace: Trace) -> tuple[Spread, Ratios]:
    """Return the forces at the action and the ratios of bolts and flanges under them."""
    M_cEd = trace.step("M_c,Ed", group.about_flange(loads.M), "kNm", STATICS)
    spread = linear_spread(group, M_cEd, ",Ed", trace)
    ratios = bolts_and_flanges(spread, group, trace)
    if float(loads.V) > 0:
        ratios |= shear_and_both(spread, group, bolt, loads.F_v, trace)
    return spread, ratios


def nil_resistance(cause: str, symbol: str, trace: Trace) -> Quantity:
    """Record that no moment is stated, and why."""
    return trace.given(symbol, 0.0, "kNm", f"nil: {cause}, is more than the joint carries")


def _too_much_alone(group: Group, trace: Trace) -> Ratios:
    """Return the ratios over 1 under the axial force without any moment; its steps are told only then."""
    if float(group.N) == 0:
        return {}
    aside = Trace()
    spread = linear_spread(group, group.M_c_alone(aside), ",N", aside)
    over = beyond_alone(bolts_and_flanges(spread, group, aside))
    trace.steps += aside.steps if over else []
    return over
