"""Bolted end-plate joints of any kind, from their design dimensions, in any dialect of geometry."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass, field
from typing import Any

import numpy as np

from ifcjoints.detection.find_joints import find_joints
from ifcjoints.model.joints import Joint
from ifcjoints.reading.read_model import read_model
from ifcjoints.settings import Settings
from sample_models.making import Model, at, box, circle, i_ring

IPE400 = (400.0, 180.0, 8.6, 13.5, 21.0)
HEB300 = (300.0, 300.0, 11.0, 19.0, 27.0)
UP, ACROSS, OUT = (0, 0, 1), (0, 1, 0), (1, 0, 0)


@dataclass
class EndPlate:
    """A beam by its end plate on a column. The column stands at x < 0, its face at x = 0; the beam runs to +x.

    `rows` are heights of the bolt rows above the bottom flange's centre line at the interface, `slope` in degrees
    is the beam's fall or rise away from the column, `dialect` is how bodies are written: swept, outline or brep.
    """

    beam: Sequence[float] = IPE400
    column: Sequence[float] = HEB300
    plate: Sequence[float] = (200.0, 540.0, 25.0)
    rows: Sequence[float] = (443.25, 333.25, 60.0)
    gauge: float = 110.0
    d: float = 24.0
    slope: float = 0.0
    level: float = 3000.0
    length: float = 4000.0
    dialect: str = "swept"
    beam_class: str = "IfcBeam"
    column_class: str = "IfcColumn"
    plate_class: str = "IfcPlate"
    beam_name: str = "B1"
    made: dict[str, Any] = field(default_factory=dict)

    @property
    def flange_distance(self) -> float:
        """Between the flanges' centre lines, along the upright interface."""
        return (self.beam[0] - self.beam[3]) / math.cos(math.radians(self.slope))

    @property
    def axis_height(self) -> float:
        """Where the beam's axis meets the interface."""
        return self.level

    def run(self) -> np.ndarray:
        """The beam's direction."""
        angle = math.radians(self.slope)
        return np.array([math.cos(angle), 0.0, math.sin(angle)])

    def section(self, model: Model, size: Sequence[float], length: float, matrix: np.ndarray, name: str) -> list[Any]:
        """Write a member's body in this dialect, along z of `matrix` (in the element's own axes)."""
        h, b, tw, tf, r = size
        if self.dialect == "swept":
            return [model.extruded(model.i_profile(h, b, tw, tf, r, name), length, matrix)]
        if self.dialect == "outline":
            return [model.extruded(model.outline([i_ring(h, b, tw, tf, r)], name), length, matrix)]
        return [model.brep_prism([i_ring(h, b, tw, tf, r)], length, matrix)]

    def flat(self, model: Model, rings: Sequence[Any], thickness: float) -> list[Any]:
        """Write a plate's body in this dialect."""
        if self.dialect == "brep":
            return [model.brep_prism(rings, thickness)]
        return [model.extruded(model.outline(rings), thickness)]

    @property
    def rep(self) -> str:
        """The representation type of this dialect."""
        return "Brep" if self.dialect == "brep" else "SweptSolid"

    def build(self, model: Model, place: np.ndarray | None = None) -> dict[str, Any]:
        """Write column, end plate, beam and bolts; `place` moves the whole joint."""
        place = np.eye(4) if place is None else place
        self.made["column"] = self.build_column(model, place)
        self.made["plate"] = self.build_plate(model, place)
        self.made["beam"] = self.build_beam(model, place)
        self.made["bolts"] = self.build_bolts(model, place)
        return self.made

    def build_column(self, model: Model, place: np.ndarray) -> Any:
        matrix = place @ at(-self.column[0] / 2, 0, 0, UP, ACROSS)
        body = self.section(model, self.column, 2 * self.level, np.eye(4), "C")
        return model.product(self.column_class, "C1", matrix, body, self.rep)

    def bottom(self) -> float:
        """The height of the bottom flange's centre line at the interface."""
        return self.axis_height - self.flange_distance / 2

    def places(self) -> list[tuple[float, float]]:
        """Each bolt's place across and up."""
        return [(side * self.gauge / 2, self.bottom() + y) for y in self.rows for side in (1, -1)]

    def build_plate(self, model: Model, place: np.ndarray) -> Any:
        b, h, t = self.plate
        middle = self.axis_height
        holes = [circle(self.d / 2 + 1, 16, x, z - middle) for x, z in self.places()]
        matrix = place @ at(0, 0, middle, OUT, ACROSS)
        return model.product(self.plate_class, "EP1", matrix, self.flat(model, [box(b, h), *holes], t), self.rep)

    def build_beam(self, model: Model, place: np.ndarray) -> Any:
        """The beam's end is cut upright, on the end plate's outer face."""
        run, t = self.run(), self.plate[2]
        start = np.array([0.0, 0.0, self.axis_height]) + run * t / run[0]
        matrix = place @ at(*start, axis=run, ref=ACROSS)
        if self.slope and self.dialect != "swept":
            return model.product(self.beam_class, self.beam_name, matrix, [self.cut_beam(model)], "Brep")
        body = self.section(model, self.beam, self.length, np.eye(4), "IPE 400")
        if self.slope:
            body = [self.clipped(model, body[0], run)]
            return model.product(self.beam_class, self.beam_name, matrix, body, "Clipping")
        return model.product(self.beam_class, self.beam_name, matrix, body, self.rep)

    def clipped(self, model: Model, body: Any, run: np.ndarray) -> Any:
        """Extend the extrusion back past the plate and clip it with the plate's plane."""
        reach = self.beam[0] * abs(math.tan(math.radians(self.slope)))
        body.Position.Location.Coordinates = [0.0, 0.0, -reach / model.unit]
        body.Depth += reach / model.unit
        frame = at(axis=run, ref=ACROSS)[:3, :3]
        normal = frame.T @ np.array([1.0, 0.0, 0.0])
        plane = model.add("IfcPlane", Position=model.axes(at(axis=normal)))
        half = model.add("IfcHalfSpaceSolid", BaseSurface=plane, AgreementFlag=True)
        return model.add("IfcBooleanClippingResult", Operator="DIFFERENCE", FirstOperand=body, SecondOperand=half)

    def cut_beam(self, model: Model) -> Any:
        """Write the beam as a B-rep whose first end lies in the plate's plane."""
        ring = i_ring(*self.beam)
        run = self.run()
        frame = at(axis=run, ref=ACROSS)[:3, :3]
        normal = frame.T @ np.array([1.0, 0.0, 0.0])
        low = [(x, y, -(x * normal[0] + y * normal[1]) / normal[2]) for x, y in ring]
        high = [(x, y, self.length) for x, y in ring]
        count = len(ring)
        faces = [[list(range(count))[::-1]], [list(range(count, 2 * count))]]
        faces += [[[k, (k + 1) % count, (k + 1) % count + count, k + count]] for k in range(count)]
        return model.brep(low + high, faces)

    def build_bolts(self, model: Model, place: np.ndarray) -> list[Any]:
        t, tf = self.plate[2], self.column[3]
        turn = place[:3, :3]
        made = []
        for x, z in self.places():
            point = turn @ np.array([t, x, z]) + place[:3, 3]
            made.append(model.bolt(point, turn @ np.array([-1.0, 0, 0]), self.d, t + tf + 1.3 * self.d))
        return made


def joints_of(model: Model | Any, settings: Settings | None = None) -> list[Joint]:
    """Read a made model and find its joints; no bolt may be lost."""
    file = model.file if isinstance(model, Model) else model
    settings = settings or Settings()
    found = find_joints(read_model(file, settings.reading), settings)
    assert found.coverage.bolts == found.coverage.bolts_in_joints + found.coverage.bolts_elsewhere
    return list(found.joints)


def rows_of(joint: Joint) -> list[float]:
    """The rows' heights above the bottom flange's centre line, from the top."""
    return [row.y_bottom_mm for row in joint.rows]
