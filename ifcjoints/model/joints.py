"""A joint as the result files tell it. Lengths in mm, world points in the model's axes.

Row positions and drawings use the *interface plane*: the face of the end plate that touches the
other part. In it, ``y`` runs square to the member's strong bending axis from the bottom flange's
centre line (y = 0) towards the top flange; ``x`` runs along the strong axis from the middle of the
member's web.
"""

from __future__ import annotations

from typing import Any, Literal

from pydantic import Field

from .actions import FlangeSide
from .base import Frozen
from .findings import Finding
from .results import Result
from .units import Degrees, Mm, Vector

Configuration = Literal[
    "beam_to_column_flange",
    "beam_to_column_web",
    "beam_to_beam",
    "splice",
    "base_plate",
    "cover_plate_splice",
    "other",
]
MemberEnd = Literal["start", "end"]
RowPosition = Literal["outside_top", "between", "outside_bottom"]
Source = Literal["read", "measured", "assumed", "given"]
SectionShape = Literal["I", "U", "L", "T", "hollow_rectangular", "hollow_round", "rectangle", "round", "other"]


class Provenance(Frozen):
    """Where a figure came from: read (entity, property), measured (shape), given, assumed (default)."""

    source: Source
    detail: str


class Section(Frozen):
    """A member's cross-section. `h_mm` is its depth along the web, `b_mm` its width."""

    designation: str | None
    shape: SectionShape
    h_mm: Mm
    b_mm: Mm
    tw_mm: Mm | None = None
    tf_mm: Mm | None = None
    r_mm: Mm | None = None


class JointMember(Frozen):
    """A member that ends at the joint or carries it. `end` is None where it runs through."""

    global_id: str
    name: str
    end: MemberEnd | None
    section: Section | None
    grade: str | None


class JointPlate(Frozen):
    """A plate of the joint; width across and depth along the interface plane's y where that fits."""

    global_id: str
    role: str
    thickness_mm: Mm
    width_mm: Mm
    depth_mm: Mm
    grade: str | None


class JointBolts(Frozen):
    """The joint's bolts. One element may stand for several physical bolts; `count` counts those."""

    global_ids: tuple[str, ...]
    count: int
    diameter_mm: Mm | None
    grade: str | None
    hole_diameter_mm: Mm | None
    grip_mm: Mm | None
    length_mm: Mm | None = None


class Row(Frozen):
    """A bolt row, its place between the flanges, and where its bolts lie across (`x_mm`).

    `gauge_mm` is the distance between the two bolts nearest the web on either side of it;
    None for a row with bolts on one side only.
    """

    y_bottom_mm: Mm
    y_top_mm: Mm
    count: int
    gauge_mm: Mm | None
    position: RowPosition
    x_mm: tuple[Mm, ...] = ()

    def lever_arm(self, tension_flange: FlangeSide) -> Mm:
        """Signed distance from the compression flange's centre line, positive towards the tension flange."""
        return self.y_bottom_mm if tension_flange == "top" else self.y_top_mm


class Flange(Frozen):
    """A flange at the interface: the member's own, or the haunch's.

    `thickness_mm` is the plate's true thickness; `inclination_deg` the angle between the flange and
    the interface's normal (0 where the member meets the plate squarely).
    """

    global_id: str
    part: Literal["member", "haunch"]
    width_mm: Mm
    thickness_mm: Mm
    inclination_deg: Degrees
    grade: str | None


class Interface(Frozen):
    """The plane in which the rows are measured.

    `origin_mm` lies on the bottom flange's centre line in the middle of the web; `normal` points into
    the supported member, `up` from the bottom flange to the top one, `across` = up × normal.
    `axis_y_mm` is where the member's centroidal axis meets the plane (y from the bottom flange);
    `member_slope_deg` is the angle by which that axis rises from `normal` towards `up` as it leaves the joint.
    """

    origin_mm: Vector
    normal: Vector
    up: Vector
    across: Vector
    flange_distance_mm: Mm
    axis_y_mm: Mm
    member_slope_deg: Degrees = 0.0
    top: Flange
    bottom: Flange

    def compression_flange(self, tension_flange: FlangeSide) -> Flange:
        """The flange opposite the one in tension."""
        return self.bottom if tension_flange == "top" else self.top

    def axis_lever_arm(self, tension_flange: FlangeSide) -> Mm:
        """Distance of the member's axis from the compression flange's centre line."""
        return self.axis_y_mm if tension_flange == "top" else self.flange_distance_mm - self.axis_y_mm


class JointWeld(Frozen):
    """A weld of the joint; `global_id` is None where it is not modelled but given or assumed."""

    global_id: str | None
    at: str
    type: str
    throat_mm: Mm | None


class Shape(Frozen):
    """An outline for drawing, as closed rings of (x, y) in the interface plane; the first is the outside."""

    global_id: str
    role: str
    rings: tuple[tuple[tuple[Mm, Mm], ...], ...]


class Joint(Frozen):
    """One bolted joint: what it is made of, where its rows lie, what the checks say of it."""

    id: str
    name: str
    configuration: Configuration
    moment_joint: bool
    why: str
    family: str
    supported: JointMember | None
    supporting: JointMember | None
    plates: tuple[JointPlate, ...] = ()
    bolts: JointBolts
    rows: tuple[Row, ...] = ()
    interface: Interface | None = None
    welds: tuple[JointWeld, ...] = ()
    front: tuple[Shape, ...] = ()
    completeness: float = Field(ge=0.0, le=1.0)
    provenance: dict[str, Provenance] = {}
    checks: tuple[Result, ...] = ()
    findings: tuple[Finding, ...] = ()

    def with_fields(self, **changes: Any) -> Joint:
        """Return a copy with these fields changed, validated like any other joint."""
        return Joint.model_validate({**dict(self), **changes})
