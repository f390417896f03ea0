"""A horizontal beam's end plate on the flange or web of a column, or on another beam's end plate."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Any

import numpy as np

from .making import at, box
from .steelwork import ACROSS, UP, Size, Steelwork


@dataclass(frozen=True)
class EndPlateDesign:
    """An end plate and its bolts. `rows` are heights above the axis, `shift` lifts the plate."""

    plate: tuple[float, float, float]
    rows: tuple[float, ...]
    gauge: float
    d: float
    label: str
    length: float
    shift: float = 0.0

    @property
    def width(self) -> float:
        """The plate's width."""
        return self.plate[0]

    @property
    def thickness(self) -> float:
        """The plate's thickness."""
        return self.plate[2]


@dataclass
class Face:
    """A face that end plates are bolted to.

    `origin` is where the beam's axis meets it, `out` the way the beam runs from it; `behind` is the thickness of
    what the bolts pass through behind it and `part` that part, drilled where it is one.
    """

    origin: np.ndarray
    out: np.ndarray
    behind: float
    part: Any = None
    across: np.ndarray = field(default_factory=lambda: ACROSS)


def add_end_plate(steel: Steelwork, face: Face, design: EndPlateDesign, name: str, hole: float = 2.0) -> Any:
    """Add an end plate with holes in it and in what is behind it; return the plate."""
    b, h, t = design.plate
    place = at(*face.origin, axis=face.out, ref=face.across)
    up = place[:3, 1] @ UP
    ring = box(b, h, 0.0, design.shift * up)
    plate = steel.plate(name, ring, t, place)
    points = bolt_points(face, design)
    steel.drill(plate, [point + face.out * t / 2 for point in points], face.out, design.d + hole, 2 * t)
    if face.part is not None:
        drill_behind(steel, face, design, hole)
    return plate


def drill_behind(steel: Steelwork, face: Face, design: EndPlateDesign, hole: float = 2.0) -> None:
    """Drill the part behind the face for an end plate's bolts."""
    middle = [point - face.out * face.behind / 2 for point in bolt_points(face, design)]
    steel.drill(face.part, middle, face.out, design.d + hole, 2 * face.behind)


def bolt_points(face: Face, design: EndPlateDesign) -> list[np.ndarray]:
    """Return where the bolts' axes meet the face."""
    return [
        face.origin + UP * level + face.across * side * design.gauge / 2 for level in design.rows for side in (1, -1)
    ]


def add_bolts(steel: Steelwork, face: Face, design: EndPlateDesign) -> list[Any]:
    """Add the bolts, heads on the beam's side."""
    grip = design.thickness + face.behind
    heads = [point + face.out * design.thickness for point in bolt_points(face, design)]
    return steel.bolt_group(design.label, design.d, design.length, grip, heads, -face.out)


def add_beam(
    steel: Steelwork, face: Face, thickness: float, name: str, section: tuple[Size, str], length: float
) -> Any:
    """Add a level beam that starts on an end plate."""
    start = face.origin + face.out * thickness
    size, label = section
    return steel.member("IfcBeam", name, size, label, at(*start, axis=face.out, ref=face.across), length)
