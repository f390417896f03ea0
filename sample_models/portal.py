"""A portal frame's haunched eaves and apex splice, from a handful of design dimensions."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Any

import numpy as np

from .end_plates import EndPlateDesign, Face, add_bolts, add_end_plate
from .making import at
from .steelwork import ACROSS, ALONG, HEB_300, IPE_400, UP, Size, Steelwork
from .truth import JointTruth, on_slope, rows_above

EAVES_PLATE = EndPlateDesign(
    plate=(200.0, 960.0, 25.0), rows=(275.0, 135.0, 45.0, -480.0), gauge=120.0, d=24.0, label="M24x80 10.9",
    length=80.0, shift=-160.0,
)  # fmt: skip
APEX_PLATE = EndPlateDesign(
    plate=(200.0, 590.0, 20.0), rows=(125.0, -45.0, -135.0, -275.0), gauge=110.0, d=20.0, label="M20x70 8.8",
    length=70.0, shift=-60.0,
)  # fmt: skip


@dataclass(frozen=True)
class Portal:
    """The frame: columns at x = 0 and x = `span`, the rafters' axes meeting the columns' inner faces at `eaves`."""

    span: float = 18000.0
    eaves: float = 6000.0
    pitch: float = 8.0
    column: Size = HEB_300
    rafter: Size = IPE_400
    haunch_depth: float = 380.0
    haunch_length: float = 1500.0
    eaves_plate: EndPlateDesign = EAVES_PLATE
    apex_plate: EndPlateDesign = APEX_PLATE

    @property
    def rise(self) -> float:
        """Rise of the rafters per length."""
        return math.tan(math.radians(self.pitch))

    @property
    def half_depth(self) -> float:
        """From the rafter's axis to a flange's centre line, upright."""
        return on_slope(self.rafter[0] - self.rafter[3], self.pitch) / 2

    @property
    def inner_face(self) -> float:
        """Distance of the columns' inner faces from their axes."""
        return self.column[0] / 2

    @property
    def haunch_rise(self) -> float:
        """Rise per length of the haunch's flange: it meets the rafter's bottom flange at the haunch's end."""
        return (self.haunch_depth + self.haunch_length * self.rise) / self.haunch_length

    def axis_at_plate(self) -> float:
        """Height of the rafter's axis on the outer face of the eaves' end plate."""
        return self.eaves + self.eaves_plate.thickness * self.rise

    def haunch_flange_at(self, away: float) -> float:
        """Height of the haunch flange's centre line this far from the column's face."""
        at_plate = self.axis_at_plate() - self.half_depth - self.haunch_depth
        return at_plate + (away - self.eaves_plate.thickness) * self.haunch_rise

    @property
    def haunch_upright(self) -> float:
        """The haunch flange's thickness, as thick as the rafter's, as an upright plane cuts it."""
        return self.rafter[3] * math.hypot(1.0, self.haunch_rise)

    def apex_height(self) -> float:
        """Height of the rafters' axes where they meet."""
        return self.eaves + (self.span / 2 - self.inner_face) * self.rise

    def eaves_truth(self, number: int) -> JointTruth:
        """Return an eaves' rows from the haunch flange's centre line, carried to the column's face."""
        bottom = self.haunch_flange_at(0.0) - self.eaves
        return JointTruth(
            f"R{number}", f"C{number}", "beam_to_column_flange", True, 8, 24.0, "10.9", 25.0,
            rows_above(bottom, self.eaves_plate.rows), self.half_depth - bottom,
        )  # fmt: skip

    def apex_truth(self) -> JointTruth:
        """Return the apex's rows from the bottom flanges' centre lines, carried to where the plates meet."""
        return JointTruth(
            "R1", "R2", "splice", True, 8, 20.0, "8.8", 20.0,
            rows_above(-self.half_depth, self.apex_plate.rows), 2 * self.half_depth,
        )  # fmt: skip


def add_portal(steel: Steelwork, portal: Portal) -> tuple[list, list[JointTruth]]:
    """Add both columns, rafters, haunches and the three joints; return the columns and the truth."""
    columns = [
        steel.member("IfcColumn", f"C{n}", portal.column, "HEB 300", at(x, 0, 0, UP, ACROSS), portal.eaves + 450.0)
        for n, x in ((1, 0.0), (2, portal.span))
    ]
    apex = Face(np.array([portal.span / 2, 0.0, portal.apex_height()]), -ALONG, portal.apex_plate.thickness)
    for number, (column, x, out) in enumerate(zip(columns, (0.0, portal.span), (ALONG, -ALONG), strict=True), 1):
        face = Face(np.array([x, 0.0, portal.eaves]) + out * portal.inner_face, out, portal.column[3], column)
        rafter, welded = _rafter(steel, portal, face, f"R{number}"), _eaves(steel, portal, face, number)
        half = Face(apex.origin, -out, portal.apex_plate.thickness)
        apex_plate = add_end_plate(steel, half, portal.apex_plate, f"AP{number}")
        steel.assemble(f"A-R{number}", [rafter, *welded, apex_plate])
        steel.connect(column, rafter, [welded[0], *add_bolts(steel, face, portal.eaves_plate)])
    add_bolts(steel, apex, portal.apex_plate)
    return columns, [portal.eaves_truth(1), portal.eaves_truth(2), portal.apex_truth()]


def _eaves(steel: Steelwork, portal: Portal, face: Face, number: int) -> list[Any]:
    """Add the column's stiffeners and what is welded to the rafter; return the latter, the end plate first."""
    levels = (portal.eaves + portal.half_depth, portal.haunch_flange_at(0.0))
    for index, level in enumerate(levels):
        for side in (1, -1):
            add_stiffener(steel, face, level, side, f"ST{number}{index}{'LR'[side > 0]}")
    plate = add_end_plate(steel, face, portal.eaves_plate, f"EP{number}")
    return [plate, *_haunch(steel, portal, face, number), *_flange_welds(steel, portal, face, number)]


def _flange_welds(steel: Steelwork, portal: Portal, face: Face, number: int) -> list[Any]:
    """Add the fillet welds on the outer faces of the rafter's top flange and the haunch's flange."""
    t, width = portal.eaves_plate.thickness, portal.rafter[1]
    top = portal.axis_at_plate() + portal.half_depth + on_slope(portal.rafter[3], portal.pitch) / 2
    bottom = portal.haunch_flange_at(t) - portal.haunch_upright / 2
    welds = []
    for index, (level, up, rise) in enumerate(((top, UP, portal.rise), (bottom, -UP, -portal.haunch_rise))):
        along = np.cross(face.out, up)
        start = face.origin * [1, 0, 0] + face.out * t + UP * level - along * width / 2
        place = at(*start, axis=along, ref=face.out)
        welds.append(steel.fillet_weld(f"W{number}{index}", 8.0, place, width, rise))
    return welds


def add_stiffener(steel: Steelwork, face: Face, level: float, side: int, name: str, column: Size = HEB_300) -> None:
    """Add half a pair of stiffeners in a column, level with a beam's flange, its corners clear of the root fillets."""
    h, b, tw, tf, r = column
    half, width, snip = h / 2 - tf, (b - tw) / 2 - 5.0, r + 3.0
    web = face.origin - face.out * h / 2 + ACROSS * side * tw / 2
    ring = [
        (-half, snip), (snip - half, 0.0), (half - snip, 0.0), (half, snip), (half, width), (-half, width),
    ]  # fmt: skip
    place = at(web[0], web[1], level - 6.0, UP, ALONG)
    steel.plate(name, [(x, side * y) for x, y in ring], 12.0, place)


def _haunch(steel: Steelwork, portal: Portal, face: Face, number: int) -> list[Any]:
    """Add a haunch of web and flange plate; outlines in a plane along the frame, x away from the column."""
    t, half = portal.eaves_plate.thickness, portal.haunch_upright / 2
    under = portal.half_depth + on_slope(portal.rafter[3], portal.pitch) / 2

    def rafter_under(away: float) -> float:
        return portal.eaves + away * portal.rise - under

    def face_at_plate(side: int) -> tuple[float, float]:
        return t, portal.haunch_flange_at(t) + side * half

    def face_at_rafter(side: int) -> tuple[float, float]:
        away = (rafter_under(0.0) - portal.haunch_flange_at(0.0) - side * half) / (portal.haunch_rise - portal.rise)
        return away, rafter_under(away)

    web = [face_at_plate(1), face_at_rafter(1), (t, rafter_under(t))]
    flange = [face_at_plate(-1), face_at_rafter(-1), face_at_rafter(1), face_at_plate(1)]
    plates = []
    for name, ring, thickness in ((f"HW{number}", web, 8.6), (f"HF{number}", flange, portal.rafter[1])):
        sense = float(face.out @ ALONG)
        place = at(*(face.origin * [1, 0, 0]), axis=-ACROSS * sense, ref=face.out)
        place[:3, 3] += ACROSS * sense * thickness / 2
        plates.append(steel.plate(name, ring, thickness, place))
    return plates


def _rafter(steel: Steelwork, portal: Portal, face: Face, name: str) -> Any:
    """Add a rafter cut upright at both ends: on the eaves' end plate and on the apex's."""
    run = face.out * math.cos(math.radians(portal.pitch)) + UP * math.sin(math.radians(portal.pitch))
    start = face.origin + run * portal.eaves_plate.thickness / (run @ face.out)
    length = (portal.span / 2 - portal.inner_face - portal.eaves_plate.thickness - portal.apex_plate.thickness) / (
        run @ face.out
    )
    place = at(*start, axis=run, ref=ACROSS)
    towards = place[:3, :3].T @ face.out
    reach = portal.rafter[0] * portal.rise
    cuts = [at(axis=-towards), at(z=length, axis=towards)]
    return steel.cut_member(name, portal.rafter, "IPE 400", place, (-reach, length + reach), cuts)
