"""How a file's own statics show which way the forces inside its members count."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import product

import numpy as np
import pytest

from ifcjoints.actions.analysis import read_analysis
from ifcjoints.actions.analysis_ends import EndForces
from sample_models.making import turned
from tests.actions.made_analysis import Analysis, Bar

SPAN, HEIGHT, LOAD = 8.0, 4.0, 20.0
K = HEIGHT / SPAN
"""Stiffness ratio I_beam h / (I_column l) of a portal of one section."""
THRUST = LOAD * SPAN**2 / (4 * HEIGHT * (K + 2))
BASE, CORNER = THRUST * HEIGHT / 3, 2 * THRUST * HEIGHT / 3
"""Portal with fixed bases under a uniform load on its beam, from memory (the usual frame formulas):
H = w l² / (4 h (k + 2)), M at the base H h / 3, at the corner 2 H h / 3."""
LIFT = LOAD * SPAN / 2

EAVE, FAR_EAVE = np.array([0, 0, HEIGHT]), np.array([SPAN, 0, HEIGHT])
CONVENTIONS = {
    "towards the end": (1, 1, 1, 1, 1, 1),
    "towards the start": (-1, -1, -1, -1, -1, -1),
    "compression positive": (-1, 1, 1, 1, 1, 1),
    "moment the other way": (1, 1, 1, 1, -1, -1),
    "shear the other way": (1, -1, -1, 1, 1, 1),
}


def portal(
    ways: tuple[bool, bool, bool] = (False, False, False), pinned: bool = False, sideways: bool = False
) -> list[Bar]:
    """Left column, beam and right column in equilibrium; each as modelled from its other end where said."""
    base, thrust = (0.0, LOAD * SPAN**2 / (4 * HEIGHT * (2 * K + 3))) if pinned else (BASE, THRUST)
    corner = thrust * HEIGHT - base
    left = Bar((0, 0, 0), EAVE, (thrust, 0, LIFT), (0, base, 0), z=(1, 0, 0))
    beam = Bar(EAVE, FAR_EAVE, (thrust, 0, LIFT), (0, -corner, 0), (0, 0, -LOAD))
    right = Bar((SPAN, 0, 0), FAR_EAVE, (-thrust, 0, LIFT), (0, -base, 0), z=(1, 0, 0))
    bars = (left, beam, right)
    for bar in bars if sideways else ():
        bar.z = (0, 1, 0)
    return [bar.backwards() if back else bar for bar, back in zip(bars, ways, strict=True)]


def write(
    bars: list[Bar], convention=(1,) * 6, kind: str = "POLYGONAL", stations: int = 5, supports: bool = True
) -> list[EndForces]:
    """Write the portal's results, forces inside its members signed by a convention, and read them again."""
    analysis = Analysis()
    activities = []
    for name, bar in zip(("left", "beam", "right"), bars, strict=True):
        member = analysis.member(bar.start * 1e3, bar.end * 1e3, bar.z, name)
        samples = []
        for x in np.linspace(0, bar.length, stations):
            at = None if kind == "EQUIDISTANT" else x * 1e3
            samples.append((at, bar.in_local(bar.section(x)) * convention))
        activities.append(analysis.along(member, samples, kind))
    return finish(analysis, activities, bars, supports)


def end_actions(analysis: Analysis, name: str, bar: Bar, sign: float = 1.0):
    """Write a bar's results as concentrated reactions on its two ends."""
    member = analysis.member(bar.start * 1e3, bar.end * 1e3, bar.z, name)
    first, last = -bar.section(0.0), bar.section(bar.length)
    samples = [(0.0, sign * bar.in_local(first)), (bar.length * 1e3, sign * bar.in_local(last))]
    return analysis.along(member, samples, "DISCRETE")


def write_end_actions(bars: list[Bar], sign: float = 1.0, others: Sequence[Bar] = ()) -> list[EndForces]:
    """Write the portal's results, and those of other bars, as concentrated reactions on the members' two ends."""
    analysis = Analysis()
    named = [*zip(("left", "beam", "right"), bars, strict=True), *(("other", bar) for bar in others)]
    activities = [end_actions(analysis, name, bar, sign) for name, bar in named]
    return finish(analysis, activities, bars, supports=True)


def finish(analysis: Analysis, activities: list, bars: list[Bar], supports: bool) -> list[EndForces]:
    for bar in (bars[0], bars[2]) if supports else ():
        up = bar if bar.start[2] < bar.end[2] else bar.backwards()
        node = analysis.node(up.start * 1e3)
        activities.append(analysis.support(node, (*up.force, *up.moment)))
    analysis.results("ULS", *activities)
    return read_analysis(analysis.file)


def on_corner(ends: list[EndForces]) -> tuple[np.ndarray, np.ndarray]:
    """What the left column puts on the beam's end, in world axes, kN and kNm."""
    found = [each for each in ends if each.member.startswith("beam") and np.allclose(each.point, EAVE * 1e3)]
    (end,) = found
    assert end.doubt is None
    force = np.array([end.force_along(axis) for axis in np.eye(3)]) / 1e3
    return force, np.array([end.moment_about(axis) for axis in np.eye(3)]) / 1e6


@pytest.mark.parametrize("convention", CONVENTIONS.values(), ids=CONVENTIONS)
@pytest.mark.parametrize("ways", list(product([False, True], repeat=3)))
def test_the_corner_of_a_portal_whatever_the_signs_and_ways_of_the_members(convention, ways):
    force, moment = on_corner(write(portal(ways), convention))
    assert force == pytest.approx([THRUST, 0, LIFT], abs=1e-9)
    assert moment == pytest.approx([0, -CORNER, 0], abs=1e-9)


@pytest.mark.parametrize("kind", ["POLYGONAL", "EQUIDISTANT", "DISCRETE"])
@pytest.mark.parametrize("stations", [2, 3, 11])
def test_samples_of_any_kind_and_number(kind, stations):
    force, moment = on_corner(write(portal(), CONVENTIONS["towards the start"], kind, stations))
    assert (force[0], force[2], moment[1]) == pytest.approx((THRUST, LIFT, -CORNER))


@pytest.mark.parametrize("sideways", [False, True])
@pytest.mark.parametrize("convention", CONVENTIONS.values(), ids=CONVENTIONS)
def test_pinned_bases_show_the_moments_sign_through_the_shear(convention, sideways):
    """H = w l² / (4 h (2 k + 3)) with pinned bases, from memory; no support reaction holds a moment."""
    thrust = LOAD * SPAN**2 / (4 * HEIGHT * (2 * K + 3))
    force, moment = on_corner(write(portal(pinned=True, sideways=sideways), convention))
    assert (force[0], force[2], moment[1]) == pytest.approx((thrust, LIFT, -thrust * HEIGHT))


@pytest.mark.parametrize("sign", [1.0, -1.0])
def test_concentrated_reactions_on_the_ends_are_told_from_forces_inside(sign):
    bars = portal((False, False, True))
    force, moment = on_corner(write_end_actions(bars, sign))
    assert (force[0], force[2], moment[1]) == pytest.approx((THRUST, LIFT, -CORNER))


def test_a_bar_that_keeps_the_slice_law_by_chance_does_not_mislead():
    """V_s = 30 and V_e = 50 kN under 10 kN/m on 8 m, with V_s l/2 and V_e l/2 at the ends: dM/dx = V by chance."""
    chance = Bar((0, 50, 0), (8, 50, 0), (0, 0, 30), (0, -120, 0), (0, 0, -10))
    force, moment = on_corner(write_end_actions(portal((False, False, True)), others=[chance]))
    assert (force[0], force[2], moment[1]) == pytest.approx((THRUST, LIFT, -CORNER))


def test_a_cantilevers_two_reactions_do_not_pass_for_forces_inside():
    analysis = Analysis()
    cantilever = Bar((0, 50, 0), (3, 50, 0), (0, 0, 60), (0, -90, 0), (0, 0, -20))
    beam = Bar(EAVE, FAR_EAVE, (0, 0, LIFT), (0, -LOAD * SPAN**2 / 12, 0), (0, 0, -LOAD))
    activities = [end_actions(analysis, "cantilever", cantilever), end_actions(analysis, "beam", beam)]
    for bar in (cantilever, beam, beam.backwards()):
        activities.append(analysis.support(analysis.node(bar.start * 1e3), (*bar.force, *bar.moment)))
    analysis.results("ULS", *activities)
    inside = [each for each in read_analysis(analysis.file) if "CurveReaction" in each.source]
    far = next(each for each in inside if each.member.startswith("beam") and each.end == "end")
    assert far.force_along(np.array([0, 0, 1.0])) == pytest.approx(LIFT * 1e3)
    assert far.moment_about(np.array([0, 1.0, 0])) == pytest.approx(LOAD * SPAN**2 / 12 * 1e6)


def test_a_support_with_a_load_on_it_neither_tells_nor_contradicts():
    analysis = Analysis()
    activities = []
    bars = portal()
    for name, bar in zip(("left", "beam", "right"), bars, strict=True):
        member = analysis.member(bar.start * 1e3, bar.end * 1e3, bar.z, name)
        samples = [(x * 1e3, bar.in_local(bar.section(x))) for x in np.linspace(0, bar.length, 5)]
        activities.append(analysis.along(member, samples))
    for bar, pressed in ((bars[0], 0.0), (bars[2], 70.0)):
        node = analysis.node(bar.start * 1e3)
        force = bar.force + (0, 0, pressed)
        activities.append(analysis.support(node, (*force, *bar.moment)))
        if pressed:
            analysis.load(node, (0, 0, -pressed, 0, 0, 0))
    analysis.results("ULS", *activities)
    force, moment = on_corner(read_analysis(analysis.file))
    assert (force[0], force[2], moment[1]) == pytest.approx((THRUST, LIFT, -CORNER))


def test_a_model_placed_askew_turns_forces_axes_and_supports_with_it():
    world = turned(70.0, about=(1, 2, 3), shift=(5000, 0, -400))
    analysis = Analysis(world=world)
    bar = Bar((0, 0, 0), (2, 0, 0), (-50, 4, 30), (1, -60, 8), z=(0, 1, 1))
    member = analysis.member(bar.start * 1e3, bar.end * 1e3, bar.z)
    samples = [(x * 1e3, bar.in_local(bar.section(x))) for x in (0.0, 2.0)]
    own = turned(40.0, about=(0, 1, 1))
    six = np.concatenate([own[:3, :3].T @ bar.force, own[:3, :3].T @ bar.moment])
    support = analysis.support(analysis.node(bar.start * 1e3, own), six, "LOCAL_COORDS")
    analysis.results("ULS", analysis.along(member, samples), support)
    ends = [each for each in read_analysis(analysis.file) if each.end == "start"]
    assert len(ends) == 2
    for each in ends:
        assert each.point == pytest.approx(world[:3, 3])
        assert each.force @ each.basis == pytest.approx(world[:3, :3] @ bar.force * 1e3)
        assert each.moment @ each.basis == pytest.approx(world[:3, :3] @ bar.moment * 1e6)


def test_an_end_of_which_no_support_tells_is_not_known():
    """Both columns start at their bases: nothing shows how reactions on a member's far end count."""
    with_start, with_end = write_end_actions(portal()), write_end_actions(portal((False, True, False)))
    assert not np.isnan(on_corner(with_start)[0]).any()
    assert np.isnan(on_corner(with_end)[0][[0, 2]]).all()


@pytest.mark.parametrize("kind", ["POLYGONAL", "DISCRETE"])
def test_without_support_reactions_nothing_is_known(kind):
    force, moment = on_corner(write(portal(), kind=kind, supports=False))
    assert np.isnan(force[[0, 2]]).all()
    assert np.isnan(moment[1])


def test_supports_that_speak_against_one_another_leave_it_unknown():
    bars = portal()
    good = write(bars)
    assert not np.isnan(on_corner(good)[0]).any()
    analysis = Analysis()
    activities = []
    for name, bar, sign in zip(("left", "beam", "right"), bars, (1.0, 1.0, -1.0), strict=True):
        member = analysis.member(bar.start * 1e3, bar.end * 1e3, bar.z, name)
        samples = [(x * 1e3, sign * bar.in_local(bar.section(x))) for x in np.linspace(0, bar.length, 5)]
        activities.append(analysis.along(member, samples))
    force, moment = on_corner(finish(analysis, activities, bars, supports=True))
    assert np.isnan(force[[0, 2]]).all()
    assert np.isnan(moment[1])


def test_a_stated_convention_fills_in_but_never_overrules_the_file():
    analysis = Analysis()
    bar = portal()[1]
    member = analysis.member(bar.start * 1e3, bar.end * 1e3, bar.z, "beam")
    samples = [(x * 1e3, bar.in_local(bar.section(x))) for x in np.linspace(0, bar.length, 3)]
    analysis.results("ULS", analysis.along(member, samples))
    force, moment = on_corner(read_analysis(analysis.file, "towards_end"))
    assert (force[0], force[2], moment[1]) == pytest.approx((THRUST, LIFT, -CORNER))
