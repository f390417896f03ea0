"""Large made models for timing: columns on a grid, a beam by end plate to either flange of each.

Written as STEP text, since making the entities one by one would take longer than what is to be timed.
"""

from __future__ import annotations

import math
import uuid
from collections.abc import Iterator
from pathlib import Path

import ifcopenshell.guid

PLATE = (200.0, 560.0, 25.0)
COLUMN = (300.0, 300.0, 11.0, 19.0, 27.0)
BEAM = (400.0, 180.0, 8.6, 13.5, 21.0)
ROW_YS = (-240.0, -130.0, -40.0, 60.0, 140.0, 240.0)
"""Heights of the rows from the beam's axis; a joint has the outermost four, five or six of them."""

GAUGE, HOLE = 110.0, 26.0


class Step:
    """A STEP file being written, entity by entity."""

    def __init__(self) -> None:
        self.lines: list[str] = []
        self._counter = 0

    def add(self, text: str) -> str:
        self.lines.append(f"#{len(self.lines) + 1}={text};")
        return f"#{len(self.lines)}"

    def guid(self) -> str:
        self._counter += 1
        return ifcopenshell.guid.compress(uuid.uuid5(uuid.NAMESPACE_OID, f"grid {self._counter}").hex)

    def point(self, *xyz: float) -> str:
        return self.add(f"IFCCARTESIANPOINT(({','.join(f'{value:.6f}' for value in xyz)}))")

    def direction(self, *xyz: float) -> str:
        return self.add(f"IFCDIRECTION(({','.join(f'{value:.6f}' for value in xyz)}))")

    def axes(self, origin: tuple[float, ...], z: str = "$", x: str = "$") -> str:
        return self.add(f"IFCAXIS2PLACEMENT3D({self.point(*origin)},{z},{x})")

    def placement(self, origin: tuple[float, ...], z: str = "$", x: str = "$") -> str:
        return self.add(f"IFCLOCALPLACEMENT($,{self.axes(origin, z, x)})")


def write_grid(path: Path, joints: int) -> None:
    """Write a model with this many end-plate joints (an even number)."""
    path.write_text(grid_text(joints), encoding="ascii")


def grid_text(joints: int) -> str:
    """Return the STEP text of a grid with this many joints, some eight to twelve bolts each."""
    step = Step()
    shared = _Shared(step)
    side = math.ceil(math.sqrt(joints / 2))
    for number in range(joints // 2):
        x, y = 6000.0 * (number % side), 7000.0 * (number // side)
        shared.column(x, y)
        for sense in (1.0, -1.0):
            shared.beam_end(x, y, sense, 4 + (number + (sense > 0)) % 3)
        shared.noise(x, y)
    return "\n".join(_wrapped(step, shared))


def _wrapped(step: Step, shared: _Shared) -> Iterator[str]:
    yield "ISO-10303-21;\nHEADER;\nFILE_DESCRIPTION((''),'2;1');"
    yield "FILE_NAME('grid.ifc','2026-01-01T00:00:00',(''),(''),'','','');\nFILE_SCHEMA(('IFC4'));\nENDSEC;\nDATA;"
    yield from step.lines
    yield "ENDSEC;\nEND-ISO-10303-21;\n"


class _Shared:
    """What all joints of the grid have in common, and how one joint is written."""

    def __init__(self, step: Step) -> None:
        self.step = step
        origin = step.axes((0.0, 0.0, 0.0))
        self.context = step.add(f"IFCGEOMETRICREPRESENTATIONCONTEXT($,'Model',3,1.E-05,{origin},$)")
        unit = step.add("IFCSIUNIT(*,.LENGTHUNIT.,.MILLI.,.METRE.)")
        units = step.add(f"IFCUNITASSIGNMENT(({unit}))")
        step.add(f"IFCPROJECT('{step.guid()}',$,'Grid',$,$,$,$,({self.context}),{units})")
        self.x, self.y, self.z = (step.direction(*row) for row in ((1, 0, 0), (0, 1, 0), (0, 0, 1)))
        self.minus_x, self.minus_y = step.direction(-1, 0, 0), step.direction(0, -1, 0)
        self.column_profile = self._profile("HEB 300", COLUMN)
        self.beam_profile = self._profile("IPE 400", BEAM)
        self.at_origin = origin
        self.bolt_map = self._bolt_map()
        self.operator = step.add(f"IFCCARTESIANTRANSFORMATIONOPERATOR3D($,$,{step.point(0, 0, 0)},1.,$)")
        self.members: list[str] = []

    def _profile(self, name: str, size: tuple[float, ...]) -> str:
        h, b, tw, tf, r = size
        return self.step.add(f"IFCISHAPEPROFILEDEF(.AREA.,'{name}',$,{b},{h},{tw},{tf},{r},$,$)")

    def _extruded(self, profile: str, depth: float) -> str:
        return self.step.add(f"IFCEXTRUDEDAREASOLID({profile},{self.at_origin},{self.z},{depth})")

    def _body(self, items: str, kind: str) -> str:
        shape = self.step.add(f"IFCSHAPEREPRESENTATION({self.context},'Body','{kind}',({items}))")
        return self.step.add(f"IFCPRODUCTDEFINITIONSHAPE($,$,({shape}))")

    def _bolt_map(self) -> str:
        step = self.step
        shank = step.add("IFCCIRCLEPROFILEDEF(.AREA.,$,$,12.)")
        hexagon = [step.point(20.8 * math.cos(a), 20.8 * math.sin(a)) for a in (math.pi / 3 * k for k in range(6))]
        outline = step.add(f"IFCPOLYLINE(({','.join([*hexagon, hexagon[0]])}))")
        head_profile = step.add(f"IFCARBITRARYCLOSEDPROFILEDEF(.AREA.,$,{outline})")
        down = step.direction(0, 0, -1)
        head = step.add(f"IFCEXTRUDEDAREASOLID({head_profile},{self.at_origin},{down},15.)")
        nut = step.add(f"IFCEXTRUDEDAREASOLID({head_profile},{step.axes((0, 0, 46))},{self.z},21.5)")
        shape = step.add(
            f"IFCSHAPEREPRESENTATION({self.context},'Body','SweptSolid',({self._extruded(shank, 80.0)},{head},{nut}))"
        )
        return step.add(f"IFCREPRESENTATIONMAP({self.at_origin},{shape})")

    def column(self, x: float, y: float) -> None:
        place = self.step.placement((x, y, 0.0), self.z, self.y)
        body = self._body(self._extruded(self.column_profile, 3500.0), "SweptSolid")
        self.step.add(f"IFCCOLUMN('{self.step.guid()}',$,'C1',$,$,{place},{body},'C1',.COLUMN.)")
        for z in (2807.0, 3193.0):
            for side in (1.0, -1.0):
                self._plate_brep((x, y + side * 78.0, z), (140.0, 262.0, 14.0), self.z, (), "stiffener")

    def beam_end(self, x: float, y: float, sense: float, rows: int) -> None:
        h = COLUMN[0]
        face = x + sense * h / 2
        into = self.x if sense > 0 else self.minus_x
        place = self.step.placement((face + sense * PLATE[2], y, 3000.0), into, self.y)
        body = self._body(self._extruded(self.beam_profile, 2400.0), "SweptSolid")
        self.step.add(f"IFCBEAM('{self.step.guid()}',$,'B1',$,$,{place},{body},'B1',.BEAM.)")
        levels = sorted({*ROW_YS[: (rows + 1) // 2], *ROW_YS[len(ROW_YS) - rows // 2 :]})
        holes = [(side * GAUGE / 2, level) for level in levels for side in (1.0, -1.0)]
        centre = (face + sense * PLATE[2] / 2, y, 3000.0)
        self._plate_brep(centre, (PLATE[0], PLATE[1], PLATE[2]), into, tuple(holes), "end plate")
        out = self.minus_x if sense > 0 else self.x
        for across, level in holes:
            self._bolt((face + sense * PLATE[2], y + across, 3000.0 + level), out)

    def _bolt(self, origin: tuple[float, ...], along: str) -> None:
        mapped = self.step.add(f"IFCMAPPEDITEM({self.bolt_map},{self.operator})")
        place = self.step.placement(origin, along, self.y)
        body = self._body(mapped, "MappedRepresentation")
        self.step.add(
            f"IFCMECHANICALFASTENER('{self.step.guid()}',$,'M24x80 10.9',$,$,{place},{body},$,24.,80.,.BOLT.)"
        )

    def _plate_brep(
        self,
        centre: tuple[float, ...],
        size: tuple[float, ...],
        normal: str,
        holes: tuple[tuple[float, float], ...],
        name: str,
    ) -> None:
        """Write a plate as a B-rep of its own; x across, y up, z along the normal, holes as inner bounds."""
        step, (b, h, t) = self.step, size
        outline = [(-b / 2, -h / 2), (b / 2, -h / 2), (b / 2, h / 2), (-b / 2, h / 2)]
        rings = [outline] + [_circle(*hole) for hole in holes]
        low = [[step.point(x, y, -t / 2) for x, y in ring] for ring in rings]
        high = [[step.point(x, y, t / 2) for x, y in ring] for ring in rings]
        faces = [self._face([ring[::-1] for ring in low]), self._face(high)]
        for below, above in zip(low, high, strict=True):
            for k in range(len(below)):
                j = (k + 1) % len(below)
                faces.append(self._face([[below[k], below[j], above[j], above[k]]]))
        shell = step.add(f"IFCCLOSEDSHELL(({','.join(faces)}))")
        body = self._body(step.add(f"IFCFACETEDBREP({shell})"), "Brep")
        place = step.placement(centre, normal, self.y)
        step.add(f"IFCPLATE('{step.guid()}',$,'{name}',$,$,{place},{body},$,.USERDEFINED.)")

    def _face(self, rings: list[list[str]]) -> str:
        bounds = []
        for number, ring in enumerate(rings):
            loop = self.step.add(f"IFCPOLYLOOP(({','.join(ring)}))")
            kind = "IFCFACEBOUND" if number else "IFCFACEOUTERBOUND"
            bounds.append(self.step.add(f"{kind}({loop},.T.)"))
        return self.step.add(f"IFCFACE(({','.join(bounds)}))")

    def noise(self, x: float, y: float) -> None:
        """Write parts far from any bolt: a post, kick plates, a grating."""
        for number in range(4):
            self._plate_brep((x + 2500.0, y + 2500.0, 400.0 * number), (900.0, 120.0, 6.0), self.x, (), "kick plate")
        rings = tuple((100.0 * (k % 4) - 150.0, 100.0 * (k // 4) - 150.0) for k in range(16))
        self._plate_brep((x + 2500.0, y + 3500.0, 3200.0), (500.0, 500.0, 8.0), self.z, rings, "grating")
        place = self.step.placement((x + 2500.0, y + 1500.0, 0.0), self.z, self.x)
        body = self._body(self._extruded(self.beam_profile, 3000.0), "SweptSolid")
        self.step.add(f"IFCCOLUMN('{self.step.guid()}',$,'P1',$,$,{place},{body},'P1',.COLUMN.)")


def _circle(x: float, y: float, corners: int = 16) -> list[tuple[float, float]]:
    angles = [-2 * math.pi * k / corners for k in range(corners)]
    return [(x + HOLE / 2 * math.cos(a), y + HOLE / 2 * math.sin(a)) for a in angles]
