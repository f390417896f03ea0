"""Plastic bolt group under moment out of its plane.

What it checks
--------------
The bolt rows of an end plate under a moment, with axial force and shear, when the rows may stretch until each
carries what its bolts can. The rows are filled from the farthest one inwards until the compression flange is at
its resistance. The check states the moment so reached and, under a design action, row forces that balance it.

Why it matters
--------------
It is the most that the bolts and the flange could give. Where it is much above the elastic moment, the joint lives
on ductility, and someone must have made sure of that.

Method and clause
-----------------
Lower-bound statics: F_r ≤ n_r F_t,Rd and ΣF ≤ F_c,Rd + N, filled from the farthest row; M_Rd = ΣF_r y_r − N e_N, with y
from the compression flange's centre line and e_N the distance of the member's axis. Rows with y ≤ 0 are used only as
far as an axial tension needs them.

Beside shear (V shared equally by all bolts) F_t,Rd falls to what the interaction of EN 1993-1-8:2005, Table 3.4, or
AISC 360-22, J3.8, leaves: F_t,V. Where that lowers the moment, both are stated: M beside V, and M without V.

Where rows are brittle the force per bolt of a row is at most that of the farthest row in proportion to the lever arms,
after the idea of EN 1993-1-8:2005, 6.2.7.2(9). The option `triangular_limit` says when: "brittle_rows" (the default)
unless the end plate, or the column flange or second end plate bolted to it, is thin enough to yield before the bolts
break, t ≤ d/1.9·√(f_ub/f_y) (SCI P398, step 1C; UK NA to BS EN 1993-1-8, NA.2.7: from memory); "always" and "never" as
they say. Where brittle rows leave the joint open, the linear distribution of the elastic check answers.

The row forces at the action are those at the resistance in proportion to M_c; where that would leave the flange in
tension or no row pulls, those of the elastic check; and where these overload an open joint that could still stretch,
forces between the rows filled with N from the one and from the other side. The utilisation is |M| over M_Rd at the
action's axial force and shear, or the use of the most loaded bolt, of a flange, of the bolts in shear, or of all bolts
in axial tension, where that is more.

Needs
-----
As the elastic check; and for the option "brittle_rows" the thickness and grade of the end plate or of what it is
bolted to. Where those are not known the rows count as brittle, and the steps say so.

Limits
------
It assumes no prying and no limit from bending or punching of the end plate or the column's flange, or from webs and
welds: the component method does those. Its moment is therefore an upper bound of theirs, never an approval by itself.
Where the action is more than the rows can balance, the row forces shown are those at the resistance. Where the axial
force alone is too much the resistance is nil, and the ratios are those of the linear distribution; a moment that would
relieve the joint is not counted on. It supports a competent engineer's check and replaces neither it nor the governing
code.

Example
-------
Rows at 450, 340 and 60 mm with two M24 8.8 each, F_t,Rd = 203.0 kN a bolt, that may stretch, and a flange good for
862.7 kN: the first two rows take 406.1 kN each and the third the remaining 50.5 kN, so
M_Rd = 406.1·0.450 + 406.1·0.340 + 50.5·0.060 = 323.8 kNm.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import Literal

from ifcjoints.checking import Quantity, Subject, Trace, Verdict, check
from ifcjoints.checking.testing import example_cases
from ifcjoints.model.base import Frozen

from .bolt import BoltResistance, bolt_resistance
from .brittleness import why_brittle
from .elastic import linear_use, nil_resistance
from .filling import METHOD, Filled, Limit, fill_to_flange, plastic_limit, plastic_spread
from .flange import interface_of
from .group import Group, Spread, group_of
from .loads import STATICS, Loads, given_loads
from .use import Ratios, beyond_alone, bolts_and_flanges, governing


class PlasticOptions(Frozen):
    """`triangular_limit`: whether rows keep to a triangle below the farthest one."""

    triangular_limit: Literal["never", "brittle_rows", "always"] = "brittle_rows"


@dataclass(frozen=True, slots=True)
class Resistance:
    """M_Rd in Nmm, the rows as they were filled for it, and the forces at it; no limit where N alone is too much."""

    M_Rd: Quantity
    filled: Filled | None
    limit: Limit | None


@check(
    "bolt_group.plastic",
    title="Plastic bolt group, out of plane (no prying)",
    method="lower-bound statics of the bolt rows; EN 1993-1-8:2005, Table 3.4 and 6.2.7.2(9), or AISC 360-22, J3",
    cases=example_cases(),
    options=PlasticOptions,
)
def plastic(subject: Subject, trace: Trace) -> Verdict:
    """Check the joint's rows by the plastic method."""
    interface_of(subject)
    bolt = bolt_resistance(subject, trace)
    loads = given_loads(subject, trace)
    brittle = triangular_limit(subject, trace)
    group = group_of(subject, bolt.tension, loads.N, trace)
    beside, stated = group, {}
    if float(loads.V) > 0:
        beside = replace(group, tension=trace.step("F_t,V", bolt.beside_shear(loads.F_v), "kN", bolt.clause))
    if beside.tension < group.tension:
        stated["M_without_V_kNm"] = float(moment_resistance(group, brittle, ",0", trace).M_Rd) / 1e6
    resistance = moment_resistance(beside, brittle, "", trace)
    utilisation = None
    if subject.action is None and resistance.limit is not None:
        spread, governs = resistance.limit.spread, resistance.limit.stop
    else:
        plainly = use_at(beside, bolt, loads, resistance, brittle, trace)
        spread, ratios = plainly or linear_answer(group, bolt, loads, trace)
        utilisation, governs = governing(ratios)
    return Verdict(
        resistance={"M_kNm": float(resistance.M_Rd) / 1e6} | stated,
        governing=governs,
        utilisation=utilisation,
        row_forces_kN=[float(spread.rows[index]) / 1e3 for index in range(len(group.rows))],
        compression_kN=spread.compression / 1e3,
    )


def triangular_limit(subject: Subject, trace: Trace) -> str:
    """Return why rows keep to a triangle, or nothing where they need not."""
    options = subject.options if isinstance(subject.options, PlasticOptions) else PlasticOptions()
    if options.triangular_limit == "brittle_rows":
        return why_brittle(subject, trace)
    return "option triangular_limit is always" if options.triangular_limit == "always" else ""


def moment_resistance(group: Group, brittle: str, mark: str, trace: Trace) -> Resistance:
    """Return M_Rd beside the axial force, and the forces at it."""
    filled = fill_to_flange(group, brittle, mark, trace)
    if float(group.N):
        aside = Trace()
        if plastic_spread(group, group.M_c_alone(aside), filled, brittle, ",N", aside) is None:
            return Resistance(nil_resistance("the axial force alone", f"M_Rd{mark}", trace), filled, None)
    limit = plastic_limit(group, filled, brittle, mark, trace)
    return Resistance(trace.step(f"M_Rd{mark}", group.about_axis(limit.M_c), "kNm", METHOD), filled, limit)


def use_at(
    group: Group, bolt: BoltResistance, loads: Loads, resistance: Resistance, brittle: str, trace: Trace
) -> tuple[Spread, Ratios] | None:
    """Return the forces at the action, or those at the resistance where it is exceeded, and the ratios.

    None where nothing balances the action and no resistance can be put in relation to it.
    """
    M_Rd, limit = resistance.M_Rd, resistance.limit
    if limit is None:
        return None
    M_cEd = trace.step("M_c,Ed", group.about_flange(loads.M), "kNm", STATICS)
    spread = plastic_spread(group, M_cEd, resistance.filled, brittle, ",Ed", trace)
    if spread is None and not 0 < float(M_Rd) < float(loads.M):
        return None
    ratios = {}
    if spread is not None and float(group.tension) > 0:
        ratios = bolts_and_flanges(spread, group, trace)
    if float(loads.N) > 0:
        ratios["axial tension"] = trace.step("η_N", loads.N / (group.count * group.tension), "", STATICS)
    if float(loads.V) > 0:
        ratios["bolt shear"] = trace.step("η_v", loads.F_v / bolt.shear, "", bolt.shear_clause)
    if float(M_Rd) > 0:
        ratios[limit.stop] = trace.step("η", loads.M / M_Rd, "", METHOD)
    return spread or limit.spread, ratios


def linear_answer(group: Group, bolt: BoltResistance, loads: Loads, trace: Trace) -> tuple[Spread, Ratios]:
    """Return the forces and ratios of the elastic check, where there is no moment to put the action in relation to."""
    alone = {}
    if float(loads.N):
        aside = Trace()
        alone = beyond_alone(linear_use(group, bolt, replace(loads, M=trace.constant("0", 0.0)), aside)[1])
        trace.steps += aside.steps if alone else []
    spread, ratios = linear_use(group, bolt, loads, trace)
    return spread, alone | ratios
