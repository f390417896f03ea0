"""How a file signs the forces inside its members, told from its own statics.

The open schema has one kind of curve reaction for forces inside a member and for concentrated reactions on it, and
does not say which way forces inside count. So nothing is presumed: where a support holds one member only and no
load stands on it, the support's reaction *is* the action on that member's end, and the samples there, component by
component in the member's local axes, must be the same or the opposite. What holds at every such support of the
file is its convention; what no support shows, or supports show differently, stays unknown.

Shear and moment lend their signs to one another through dM_y/dx = V_z and dM_z/dx = -V_y (equilibrium of a slice,
forces on the face towards the member's end, moments right-handed), where samples along a member keep that law.
"""

from __future__ import annotations

import math
from collections import defaultdict
from collections.abc import Iterable, Iterator
from dataclasses import dataclass, replace
from itertools import pairwise

import numpy as np

from ..model.joints import MemberEnd
from ..model.units import Array
from .analysis_ends import turned
from .analysis_model import SAME_PLACE, Reaction, StructuralMember, StructuralModel

SAME = 0.01
"""Two forces are the same if they differ by no more than this share of the greatest beside them."""
LEAST = 0.02
"""A force tells a sign if it has this share of the greatest beside it."""
NEGLIGIBLE = np.array([50.0] * 3 + [50e3] * 3)
"""N and Nmm below which a component counts as nothing, whatever its sign: half a tenth of kN and kNm."""

BENDING = ((2, 4, 1.0), (1, 5, -1.0))
"""Numbers of shear and moment among the six components, and the sign of dM/dx = ±V."""

ENDS: tuple[MemberEnd, MemberEnd] = ("start", "end")

At = tuple[int, MemberEnd, str]
"""A member's step number, its end, a case's name."""


@dataclass(frozen=True, slots=True, eq=False)
class Signs:
    """Factors (6,) for N, V_y, V_z, M_x, M_y, M_z that turn a sample into the action on its member's end.

    `section` for samples of the forces inside a member, at its end (their opposite at its start); `start` and `end` for
    discrete reactions that may be either, unless they are known to be inside. 0 or NaN: not known.
    """

    section: Array
    start: Array
    end: Array
    discrete_inside: bool

    def on_end(self, reaction: Reaction, member: StructuralMember, end: MemberEnd) -> Array | None:
        """Return the action on a member's end (6,), NaN where its sign is not known; None without a sample there."""
        given = sample_at(reaction, member, end)
        if given is None:
            return None
        if reaction.is_inside(self.discrete_inside):
            factors = self.section if end == "end" else -self.section
        else:
            factors = self.start if end == "start" else self.end
        known = np.abs(factors) == 1.0
        acting: Array = np.where(known, factors * given, math.nan)
        acting[~known & (np.abs(given) <= NEGLIGIBLE)] = 0.0
        return acting


def six(basis: Array, force: Array, moment: Array, into: Array) -> Array:
    """Return force and moment as six components along the rows of another basis."""
    return np.concatenate([turned(basis, force, into), turned(basis, moment, into)])


def sample_at(reaction: Reaction, member: StructuralMember, end: MemberEnd) -> Array | None:
    """Return a reaction's sample at a member's end, as six components in its local axes."""
    place = 0.0 if end == "start" else member.length
    for sample in reaction.samples:
        if abs(sample.at - place) <= SAME_PLACE and member.local is not None:
            return six(reaction.basis, sample.force, sample.moment, member.local)
    return None


def discrete_are_inside(model: StructuralModel) -> bool:
    """Whether a file's discrete reactions sample the forces inside members rather than actions on their ends.

    Shown if samples along a member keep dM/dx = V, with shear at both ends (a cantilever's two reactions keep it as
    well), and no member's two samples are those of two ends without load between them: shears opposite, the sum of the
    moments their couple.
    """
    shown = False
    for reaction, member in _curve_reactions(model):
        first, last = (sample_at(reaction, member, end) for end in ENDS)
        if reaction.kind != "discrete" or first is None or last is None:
            continue
        for shear, moment, _ in BENDING:
            enough = max(LEAST * np.fmax(np.abs(first[:3]), np.abs(last[:3])).max(), NEGLIGIBLE[shear])
            if not min(abs(first[shear]), abs(last[shear])) > enough:
                continue
            couple = abs(first[shear]) * member.length
            opposite = abs(first[shear] + last[shear]) <= SAME * abs(first[shear])
            if opposite and abs(abs(first[moment] + last[moment]) - couple) <= LEAST * couple:
                return False
            shown = shown or _slope_sign(reaction, member, shear, moment) != 0.0
    return shown


def supports(model: StructuralModel) -> dict[At, Array]:
    """Return the actions of supports on the ends of members that they hold alone (6,), in local axes."""
    found: dict[At, list[Array]] = defaultdict(list)
    for reaction in model.reactions:
        connection = model.connections.get(reaction.item)
        if connection is None or reaction.doubt or connection.loaded or len(connection.members) != 1:
            continue
        (number,) = connection.members
        member = model.members.get(number)
        end = member.end_at(connection.point) if member else None
        if member is not None and end is not None and member.local is not None:
            sample = reaction.samples[0]
            truth = six(reaction.basis, sample.force, sample.moment, member.local)
            found[number, end, reaction.case.name].append(truth)
    return {key: truths[0] for key, truths in found.items() if len(truths) == 1}


TOWARDS_END = Signs(np.ones(6), -np.ones(6), np.ones(6), discrete_inside=True)
"""Samples that act on the face that looks towards the member's end, moments right-handed."""


def or_else(shown: Signs, stated: Signs) -> Signs:
    """Fill in stated signs where a file shows none; what it shows, or shows both ways, stands."""
    return replace(
        shown,
        section=np.where(np.isnan(shown.section), stated.section, shown.section),
        start=np.where(np.isnan(shown.start), stated.start, shown.start),
        end=np.where(np.isnan(shown.end), stated.end, shown.end),
    )


def learn_signs(model: StructuralModel) -> Signs:
    """Tell how a file signs its curve reactions."""
    truths = supports(model)
    votes: dict[str, list[Array]] = defaultdict(list)
    along, inside = list(_curve_reactions(model)), discrete_are_inside(model)
    for reaction, member in along:
        for end in ENDS:
            truth = truths.get((reaction.item, end, reaction.case.name))
            given = None if truth is None else sample_at(reaction, member, end)
            if truth is None or given is None:
                continue
            if reaction.is_inside(inside):
                votes["section"].append(compare(truth, given) * (1.0 if end == "end" else -1.0))
            else:
                votes[end].append(compare(truth, given))
    section = _lend(agreed(votes["section"]), [each for each in along if each[0].is_inside(inside)])
    return Signs(section, agreed(votes["start"]), agreed(votes["end"]), inside)


def compare(truth: Array, given: Array) -> Array:
    """Return for each of six components 1 (the same), -1 (opposite), 0 (neither) or NaN (nothing to tell)."""
    size = np.fmax(np.abs(truth), np.abs(given))
    scale = np.repeat([np.nanmax(size[:3], initial=0.0), np.nanmax(size[3:], initial=0.0)], 3)
    same, opposite = np.abs(truth - given) <= SAME * scale, np.abs(truth + given) <= SAME * scale
    votes = np.select([same & ~opposite, opposite & ~same], [1.0, -1.0], 0.0)
    silent = np.isnan(truth) | np.isnan(given) | (size <= np.maximum(LEAST * scale, NEGLIGIBLE))
    return np.where(silent, math.nan, votes)


def agreed(votes: Iterable[Array]) -> Array:
    """Return what all votes on each component say; 0 where they differ, NaN where there are none."""
    table = np.array([np.full(6, math.nan), *votes])
    columns = [column[~np.isnan(column)] for column in table.T]
    return np.array([math.nan if not len(c) else float(c[0]) if (c == c[0]).all() else 0.0 for c in columns])


def _curve_reactions(model: StructuralModel) -> Iterator[tuple[Reaction, StructuralMember]]:
    for reaction in model.reactions:
        member = model.members.get(reaction.item)
        if member is not None and member.local is not None and reaction.kind != "point" and not reaction.doubt:
            yield reaction, member


def _lend(signs: Array, along: list[tuple[Reaction, StructuralMember]]) -> Array:
    """Let a shear whose sign is known tell that of its moment, and the other way round."""
    for shear, moment, law in BENDING:
        votes = []
        if not np.isnan(signs[[shear, moment]]).any():
            continue
        for reaction, member in along:
            if slope := _slope_sign(reaction, member, shear, moment):
                vote = np.full(6, math.nan)
                vote[moment] = signs[shear] * slope * law
                vote[shear] = signs[moment] * slope * law
                votes.append(vote)
        lent = agreed(votes)
        for number in (shear, moment):
            if math.isnan(signs[number]):
                signs[number] = lent[number]
    return signs


def _slope_sign(reaction: Reaction, member: StructuralMember, shear: int, moment: int) -> float:
    """Return 1 or -1 for dM/dx = ±V between a member's ends, 0 where neither holds or nothing can be told."""
    if member.local is None or len(reaction.samples) < 2:
        return 0.0
    places = [sample.at for sample in reaction.samples]
    values = [six(reaction.basis, sample.force, sample.moment, member.local) for sample in reaction.samples]
    steps = zip(pairwise(places), pairwise(values), strict=True)
    area = sum((b - a) * (first[shear] + last[shear]) / 2 for (a, b), (first, last) in steps)
    change = values[-1][moment] - values[0][moment]
    if not abs(area) > NEGLIGIBLE[moment] or not abs(abs(change) - abs(area)) <= LEAST * abs(area):
        return 0.0
    return float(np.sign(area * change))
