"""Design actions from a structural analysis model with results, in an IFC file.

What is read, and as what:

- a point reaction on a curve member, at one of its ends: the action of the rest of the structure on the member;
- a point reaction on a connection (a support): the action of the support on the structure, and so on the member's
  end, where the connection joins that member alone and no action stands on the connection itself;
- a curve reaction that samples single forces at a member's ends: forces inside the member or actions on its ends,
  signed as the file's own support reactions show (see :mod:`.analysis_signs`); without such a witness not used,
  unless the settings say how they are signed.

Where all loads of a case can be told and its support reactions are those loads again instead of their opposites, the
file means reactions the other way round, and nothing of it is used.

All three are forces at the end of the member's axis. They are taken as they stand there: nothing is moved to the
face of the support, combined, or multiplied by factors. What cannot be told for certain keeps a `doubt`.
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Iterator
from dataclasses import replace
from pathlib import Path
from typing import Any, Literal

import numpy as np

from ..errors import ActionsError
from ..model.geometry import unit
from ..model.joints import MemberEnd
from ..model.units import Array
from ..reading.open_model import checked, open_model
from .analysis_ends import EndForces
from .analysis_loads import reactions_follow_loads
from .analysis_model import SAME_PLACE, Reaction, StructuralMember, StructuralModel
from .analysis_reading import StructuralReader
from .analysis_signs import (
    ENDS,
    NEGLIGIBLE,
    SAME,
    TOWARDS_END,
    Signs,
    agreed,
    compare,
    learn_signs,
    or_else,
    six,
    supports,
)

UNSIGNED = (
    "no support reaction of the file shows which way all its components count "
    "(write the supports' reactions as well, or say so in [actions] section_forces)"
)
FOLLOWING = "the file's support reactions are its loads again, not their opposites: they act on the supports"
CONTRADICTED = "the file's own support reactions differ from its point reactions on members"
ALIKE = "the axial figures at both ends of the member are one, as forces inside a member are and reactions are not"


def is_analysis(path: Path) -> bool:
    """Whether a file of actions is an IFC file rather than a table."""
    if path.suffix.lower() in (".ifc", ".ifczip", ".ifcxml"):
        return True
    try:
        with path.open("rb") as stream:
            return stream.read(64).lstrip(b"\xef\xbb\xbf \r\n\t").startswith(b"ISO-10303-21")
    except OSError:
        return False


def read_analysis(
    path_or_file: str | Path | Any, section_forces: Literal["shown", "towards_end"] = "shown"
) -> list[EndForces]:
    """Return the forces on the ends of structural members, each end in each case, doubtful ones too.

    Takes a path or an open ``ifcopenshell.file``; `section_forces` says how samples along a member are signed where
    the file's support reactions show nothing ("shown": not at all). Raises ModelError for a file that cannot be
    opened, ActionsError for one without results or without the unit of its moments.
    """
    is_path = isinstance(path_or_file, str | Path)
    name = str(path_or_file) if is_path else "the analysis"
    file = open_model(Path(path_or_file)) if is_path else checked(path_or_file, name)
    model = StructuralReader(file, name).read()
    if not model.reactions:
        raise ActionsError(f"{name}: it holds no analysis results (reactions on structural members or supports).")
    signs = learn_signs(model)
    if section_forces == "towards_end":
        signs = or_else(signs, TOWARDS_END)
    ends = [*_on_members(model), *_inside_members(model, signs), *_at_supports(model)]
    if reactions_follow_loads(model, SAME):
        ends = [replace(each, doubt=each.doubt or FOLLOWING) for each in ends]
    sure = {(each.place, each.case) for each in ends if each.doubt is None}
    return [each for each in ends if each.doubt is None or (each.place, each.case) not in sure]


def _end_forces(
    reaction: Reaction, member: StructuralMember, end: MemberEnd, basis: Array, components: Array, **told: Any
) -> EndForces:
    run = member.end - member.start
    inward = run if end == "start" else -run
    case = reaction.case
    return EndForces(
        member=member.name,
        end=end,
        case=case.name,
        is_combination=case.is_combination,
        point=member.start if end == "start" else member.end,
        axis=unit(inward) if np.linalg.norm(run) > SAME_PLACE else np.full(3, math.nan),
        basis=basis,
        force=components[:3],
        moment=components[3:],
        source=f"{reaction.label} on {member.name} ({end}), {case.kind} {case.name}".rstrip(),
        **told,
    )


def _doubtful(reaction: Reaction, member: StructuralMember, end: MemberEnd, doubt: str) -> EndForces:
    return _end_forces(reaction, member, end, np.eye(3), np.full(6, math.nan), doubt=doubt)


def _on_members(model: StructuralModel) -> Iterator[EndForces]:
    """Yield point reactions on curve members, in doubt where the file itself speaks against them."""
    placed = [*_at_points(model)]
    contradicted, inside = _contradicted(placed, model), _like_inside(placed)
    for number, each in placed:
        doubt = CONTRADICTED if contradicted else ALIKE if (number, each.case) in inside else None
        yield each if each.doubt or doubt is None else replace(each, doubt=doubt)


def _at_points(model: StructuralModel) -> Iterator[tuple[int, EndForces]]:
    """Yield point reactions at the ends of curve members, with the members' step numbers."""
    for reaction in model.reactions:
        member = model.members.get(reaction.item)
        if member is None or reaction.kind != "point":
            continue
        doubt = member.doubt or reaction.doubt
        if doubt:
            yield from ((reaction.item, _doubtful(reaction, member, end, doubt)) for end in ENDS)
            continue
        (sample,) = reaction.samples
        if not math.isnan(sample.at):
            end: MemberEnd = "start" if sample.at == 0.0 else "end"
            told = np.concatenate([sample.force, sample.moment])
            yield reaction.item, _end_forces(reaction, member, end, reaction.basis, told)


def _contradicted(placed: Iterable[tuple[int, EndForces]], model: StructuralModel) -> bool:
    """Whether any support's reaction differs from the point reaction on the member's end that it holds alone."""
    truths = supports(model)
    votes = []
    for number, each in placed:
        truth, local = truths.get((number, each.end, each.case)), model.members[number].local
        if truth is not None and local is not None and each.doubt is None:
            votes.append(compare(truth, six(each.basis, each.force, each.moment, local)))
    return bool((agreed(votes) < 1.0).any())


def _like_inside(placed: Iterable[tuple[int, EndForces]]) -> set[tuple[int, str]]:
    """Return the members and cases whose axial figures at both ends are one, as those of a force inside are.

    Actions on the two ends of a member that carries no load along itself are opposite.
    """
    axial: dict[tuple[int, str], dict[MemberEnd, float]] = {}
    for number, each in placed:
        if each.doubt is None:
            axial.setdefault((number, each.case), {})[each.end] = each.force_along(each.axis)
    return {
        key
        for key, both in axial.items()
        if len(both) == 2
        and abs(both["start"]) > NEGLIGIBLE[0]
        and abs(both["start"] + both["end"]) <= SAME * abs(both["start"])
    }


def _inside_members(model: StructuralModel, signs: Signs) -> Iterator[EndForces]:
    """Yield what curve reactions on members say of their ends."""
    for reaction in model.reactions:
        member = model.members.get(reaction.item)
        if member is None or reaction.kind == "point":
            continue
        doubt = member.doubt or reaction.doubt
        for end in ENDS:
            if doubt or member.local is None:
                yield _doubtful(reaction, member, end, doubt or "the member's local axes cannot be told")
                continue
            acting = signs.on_end(reaction, member, end)
            if acting is None:
                yield _doubtful(reaction, member, end, "it has no sample at this end")
            else:
                yield _end_forces(reaction, member, end, member.local, acting, gap=UNSIGNED)


def _at_supports(model: StructuralModel) -> Iterator[EndForces]:
    """Yield what reactions of connections say of the ends of the members they join."""
    for reaction in model.reactions:
        connection = model.connections.get(reaction.item)
        if connection is None:
            continue
        doubt = reaction.doubt
        if connection.loaded:
            doubt = doubt or "an action stands on the connection as well"
        if len(connection.members) > 1:
            doubt = doubt or f"{len(connection.members)} members share the connection {connection.name}"
        for number in sorted(connection.members & set(model.members)):
            member = model.members[number]
            end = member.end_at(connection.point)
            if end is None:
                continue
            if member.doubt or doubt:
                yield _doubtful(reaction, member, end, member.doubt or doubt or "")
            else:
                told = np.concatenate([reaction.samples[0].force, reaction.samples[0].moment])
                yield _end_forces(reaction, member, end, reaction.basis, told)
