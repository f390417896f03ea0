"""Heron Yard mezzanine: four joints in a row, three of them with mistakes that happen.

Written in metres, the building turned by 25° and away from the origin.
"""

from __future__ import annotations

from dataclasses import replace

import numpy as np

from .end_plates import EndPlateDesign, Face, add_beam, add_bolts, add_end_plate
from .making import at, turned
from .portal import add_stiffener
from .steelwork import ACROSS, ALONG, HEB_240, IPE_300, UP, Steelwork
from .truth import JointTruth, ModelTruth, rows_above

LEVEL = 3200.0
BAY = 5000.0
PLATE = EndPlateDesign((170.0, 480.0, 20.0), (195.0, 95.0, -95.0, -195.0), 90.0, 20.0, "M20x65 8.8", 65.0)
ROW_AT_THE_EDGE = replace(PLATE, rows=(218.0, 95.0, -95.0, -195.0))
"""Top row 22 mm from the plate's edge; 1.2 d0 is 26.4 mm."""

BOLTS_TOO_SHORT = replace(PLATE, label="M20x50 8.8", length=50.0)
"""The grip is 37 mm; with washer and nut 58 mm are needed."""

STIFFENERS_OFF = 25.0
"""The third mistake: the last column's stiffeners stand this much above the beam's flanges, just clear of the nuts."""


def build() -> tuple[Steelwork, ModelTruth]:
    """Return the model and what it holds."""
    steel = Steelwork("Heron Yard mezzanine", unit=1000.0, world=turned(25.0, shift=(41000.0, 27000.0, 1200.0)))
    columns = [
        steel.member("IfcColumn", f"M{n + 1}", HEB_240, "HEB 240", at(BAY * n, 0, 0, UP, ACROSS), LEVEL + 500.0)
        for n in range(3)
    ]
    designs = ((ROW_AT_THE_EDGE, BOLTS_TOO_SHORT), (PLATE, PLATE))
    truth = []
    for bay, pair in enumerate(designs):
        for end, design in enumerate(pair):
            column, out = columns[bay + end], (ALONG, -ALONG)[end]
            face = _face(column, BAY * (bay + end), out)
            add_end_plate(steel, face, design, f"GP{bay + 1}{end + 1}")
            add_bolts(steel, face, design)
            truth.append(_truth(f"G{bay + 1}", f"M{bay + end + 1}", design))
        start = _face(columns[bay], BAY * bay, ALONG)
        clear = BAY - HEB_240[0] - 2 * PLATE.thickness
        add_beam(steel, start, PLATE.thickness, f"G{bay + 1}", (IPE_300, "IPE 300"), clear)
    for number, column in enumerate(columns):
        offset = STIFFENERS_OFF if number == 2 else 0.0
        _stiffeners(steel, _face(column, BAY * number, -ALONG), offset, number + 1)
    steel.finish()
    return steel, ModelTruth(tuple(truth), sum(joint.bolts for joint in truth), elsewhere=0)


def _face(column: object, x: float, out: np.ndarray) -> Face:
    return Face(np.array([x, 0.0, LEVEL]) + out * HEB_240[0] / 2, out, HEB_240[3], column)


def _stiffeners(steel: Steelwork, face: Face, offset: float, number: int) -> None:
    """Add two pairs of stiffeners to a column, level with the beams' flanges or off by `offset`."""
    half = (IPE_300[0] - IPE_300[3]) / 2
    for level in (half, -half):
        for side in (1, -1):
            mark = f"GS{number}{'TB'[level < 0]}{'LR'[side > 0]}"
            add_stiffener(steel, face, LEVEL + level + offset, side, mark, HEB_240)


def _truth(beam: str, column: str, design: EndPlateDesign) -> JointTruth:
    half = (IPE_300[0] - IPE_300[3]) / 2
    return JointTruth(
        beam, column, "beam_to_column_flange", True, 8, 20.0, "8.8", 20.0, rows_above(-half, design.rows), 2 * half
    )
