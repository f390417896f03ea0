"""Members put together from three plates that are elements of their own: web, bottom and top flange."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from typing import Any

import numpy as np
import shapely

from ..model.geometry import unit
from ..model.joints import Provenance
from ..model.parts import Part
from ..model.units import Array, Mm
from .members import as_built_up

LEAST_LENGTH: Mm = 1000.0
SLENDER = 2.5
"""Web and flanges are so long, and so many times as long as wide."""

TOUCH: Mm = 2.0
"""A flange lies against the web's edge within this (the weld's gap)."""

TOGETHER = 0.8
"""A flange runs along this share of the web's length at least."""

PARALLEL, SQUARE = 0.95, 0.05
"""Flanges of tapered members run up to 18° out of the web's direction; they stand square on it."""


@dataclass(frozen=True, slots=True, eq=False)
class _Strip:
    """A long plate: its number among the parts, its corners, and the way it runs."""

    number: int
    corners: Array
    run: Array


def join_built_up(parts: Sequence[Part], owners: dict[int, Any]) -> list[Part]:
    """Return the parts with each web and its two flanges joined into one member.

    `owners` are the assemblies by the step id of what they aggregate: a joined member is called by its own.
    """
    strips = [strip for number, part in enumerate(parts) if (strip := _strip(number, part)) is not None]
    if len(strips) < 3:
        return list(parts)
    boxes = [shapely.box(*np.ravel([bound[:2] for bound in parts[strip.number].bounds])) for strip in strips]
    tree = shapely.STRtree(boxes)
    joined: dict[int, Part] = {}
    taken: set[int] = set()
    for strip, box in zip(strips, boxes, strict=True):
        near = [strips[each] for each in tree.query(box.buffer(TOUCH)) if strips[each] is not strip]
        flanges = _flanges(strip, near, parts)
        numbers = {strip.number, *(each.number for each in flanges or ())}
        if flanges is None or numbers & taken:
            continue
        member = _joined(parts[strip.number], [parts[each.number] for each in flanges], owners)
        if member is not None:
            joined[strip.number] = member
            taken |= numbers
    return [joined.get(number, part) for number, part in enumerate(parts) if number in joined or number not in taken]


def _strip(number: int, part: Part) -> _Strip | None:
    if part.plate is None or len(part.solids) != 1 or np.ptp(part.bounds, axis=0).max() < LEAST_LENGTH / 2:
        return None
    box = np.array(shapely.oriented_envelope(shapely.Polygon(part.plate.outline)).exterior.coords)
    edges = np.diff(box[:3], axis=0)
    lengths = np.linalg.norm(edges, axis=1)
    if lengths.max() < max(LEAST_LENGTH, SLENDER * lengths.min()):
        return None
    run = part.plate.frame.axes[:2].T @ unit(edges[int(np.argmax(lengths))])
    return _Strip(number, part.solids[0].vertices, run)


def _flanges(web: _Strip, near: Sequence[_Strip], parts: Sequence[Part]) -> tuple[_Strip, _Strip] | None:
    """Return the two strips that close the web's two long edges; None without exactly one on each."""
    below = [each for each in near if _edge(web, each, parts) < 0]
    above = [each for each in near if _edge(web, each, parts) > 0]
    return (below[0], above[0]) if len(below) == len(above) == 1 else None


def _edge(web: _Strip, flange: _Strip, parts: Sequence[Part]) -> int:
    """Return on which side of the web the flange lies along its edge: −1 or 1; 0 where it does not."""
    own, plate = parts[web.number].plate, parts[flange.number].plate
    assert own is not None
    assert plate is not None
    across = np.cross(own.frame.axes[2], web.run)
    normal = plate.frame.axes[2]
    if abs(normal @ own.frame.axes[2]) > SQUARE or abs(flange.run @ web.run) < PARALLEL:
        return 0
    height = (web.corners - plate.frame.origin) @ normal
    for touching in (np.abs(height) < TOUCH, np.abs(height - plate.thickness) < TOUCH):
        along = web.corners[touching] @ web.run
        beyond = np.all(height < TOUCH) or np.all(height > plate.thickness - TOUCH)
        if beyond and len(along) > 1 and np.ptp(along) > TOGETHER * np.ptp(web.corners @ web.run):
            side = (flange.corners.mean(axis=0) - web.corners.mean(axis=0)) @ across
            return 1 if side > 0 else -1
    return 0


def _joined(web: Part, flanges: Sequence[Part], owners: dict[int, Any]) -> Part | None:
    solids = tuple(solid for part in (web, *flanges) for solid in part.solids)
    member = as_built_up(solids)
    if member is None or member.section.shape != "I":
        return None
    owner = owners.get(web.step_id)
    grade, origin = _flange_grade(flanges)
    return replace(
        web,
        global_id=owner.GlobalId if owner is not None else web.global_id,
        step_id=owner.id() if owner is not None else web.step_id,
        ifc_class=owner.is_a() if owner is not None else web.ifc_class,
        name=(owner.Name or web.name) if owner is not None else web.name,
        grade=grade,
        grade_origin=origin,
        solids=solids,
        plate=None,
        member=member,
        holes=tuple(hole for part in (web, *flanges) for hole in part.holes),
        notches=tuple(notch for part in (web, *flanges) for notch in part.notches),
    )


def _flange_grade(flanges: Sequence[Part]) -> tuple[str | None, Provenance | None]:
    """Return the flanges' grade, which their resistance needs; unknown where the two differ."""
    one, other = flanges
    return (one.grade, one.grade_origin) if one.grade == other.grade else (None, None)
