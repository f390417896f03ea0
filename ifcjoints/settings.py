"""Everything that can be set, in one model; read from TOML, recorded whole in audit.json.

[basis]
standard = "EN 1993-1-8"       # or "AISC 360"; left out: the one that covers most of the model's bolts
gamma_M2 = 1.25

[defaults]                     # used where the model is silent; each use is an assumption, and said
bolt_grade = "8.8"
steel_grade = "S355"

[checks."bolt_group.plastic"]  # options of a check, as `ifcjoints checks NAME` tells them
triangular_limit = "always"
"""

from __future__ import annotations

import sys
from pathlib import Path
from typing import Any, Literal

from pydantic import Field, ValidationError

from .errors import SettingsError
from .model.base import Frozen
from .model.basis import EDITIONS, Basis, StandardName
from .model.units import Degrees, Mm

if sys.version_info >= (3, 11):
    import tomllib
else:  # pragma: no cover
    import tomli as tomllib


class BasisSettings(Frozen):
    """The governing standard and its factors. `standard` None: chosen by the model's own bolts."""

    standard: StandardName | None = None
    gamma_M0: float = Field(default=1.0, gt=0)
    gamma_M1: float = Field(default=1.0, gt=0)
    gamma_M2: float = Field(default=1.25, gt=0)
    phi_bolt: float = Field(default=0.75, gt=0, le=1)
    phi_compression: float = Field(default=0.90, gt=0, le=1)

    def basis(self, standard: StandardName) -> Basis:
        """Return the frozen basis of a run to `standard`."""
        factors = self.model_dump(exclude={"standard"})
        return Basis(standard=standard, edition=EDITIONS[standard], **factors)


class Defaults(Frozen):
    """What to assume where the model is silent; None: assume nothing, the check says what it lacks."""

    bolt_grade: str | None = None
    steel_grade: str | None = None


class DetectionSettings(Frozen):
    """Tolerances of finding joints, in mm and degrees."""

    contact_gap_mm: Mm = Field(default=6.0, gt=0, description="parts nearer than this touch")
    row_tolerance_mm: Mm = Field(default=3.0, gt=0, description="bolts this close in height share a row")
    axis_tolerance_deg: Degrees = Field(default=3.0, gt=0, lt=45, description="axes within this are parallel")
    flange_cover: float = Field(
        default=0.5, gt=0, le=1, description="share of a flange's width that the end plate must cover"
    )


Meaning = Literal[
    "bolt_diameter", "bolt_length", "bolt_grade", "bolt_standard", "steel_grade", "designation", "mark",
    "weld_type", "weld_throat", "weld_leg",
]  # fmt: skip


class PropertyRow(Frozen):
    """One row of the table that says what an exporting program's property means.

    `property` is "Set.Property", or "*.Property" for that property in any set. `unit` is the unit that a bare
    number in it is meant in: the model's own, or always mm or inches.
    """

    meaning: Meaning
    property: str = Field(pattern=r"^[^.]+\..+$")
    unit: Literal["model", "mm", "in"] = "model"


BUILT_IN_ROWS = tuple(
    PropertyRow(meaning=meaning, property=name)
    for meaning, names in {
        "bolt_diameter": ("AISC_EM11_Pset_Bolt.BoltDiameter", "*.NominalDiameter", "*.BoltDiameter"),
        "bolt_length": ("AISC_EM11_Pset_Bolt.BoltLength", "*.NominalLength", "*.BoltLength"),
        "bolt_grade": (
            "AISC_EM11_Pset_Bolt.BoltGrade", "*.StrengthGrade", "*.BoltGrade", "*.Bolt grade", "*.Strength class",
        ),
        "bolt_standard": (
            "AISC_EM11_Pset_Bolt.BoltType", "AISC_EM11_Pset_Bolt.BoltStandard", "*.BoltStandard", "*.Bolt standard",
            "*.Grade",
        ),
        "steel_grade": (
            "AISC_EM11_Pset_Material.MaterialGrade", "*.StructuralGrade", "*.MaterialGrade", "*.Grade",
            "*.Material grade", "*.Material",
        ),
        "designation": ("*.Profile", "*.Section", "*.ProfileName", "*.Reference"),
        "mark": (
            "AISC_EM11_Pset_PieceIdentification.PieceMark", "AISC_EM11_Pset_AssemblyIdentification.AssemblyMark",
            "*.Reference", "*.Mark", "*.Piece mark", "*.Part mark", "*.Assembly mark",
        ),
        "weld_type": ("Pset_FastenerWeld.Type1", "AISC_EM11_Pset_Weld.Type1", "*.Weld type"),
        "weld_throat": (
            "Pset_FastenerWeld.NominalThroatThickness", "Pset_FastenerWeld.a", "AISC_EM11_Pset_Weld.a", "*.Throat",
        ),
        "weld_leg": (
            "Pset_FastenerWeld.WeldLegLength", "Pset_FastenerWeld.z", "AISC_EM11_Pset_Weld.z", "*.Leg",
            "*.Leg length",
        ),
    }.items()
    for name in names
)  # fmt: skip
"""Rows for property sets of the open schema, of the IFC4 steel fabrication exchange (AISC EM.11), and common names."""


class ReadingSettings(Frozen):
    """What properties mean. Rows of one's own come before the built-in ones.

    [[reading.properties]]
    meaning = "bolt_grade"
    property = "Fabricator data.Strength"
    """

    properties: tuple[PropertyRow, ...] = ()
    built_in_properties: tuple[PropertyRow, ...] = BUILT_IN_ROWS

    def rows(self, meaning: Meaning) -> tuple[PropertyRow, ...]:
        """Return the rows for a meaning, in the order they are tried."""
        return tuple(row for row in (*self.properties, *self.built_in_properties) if row.meaning == meaning)


class ActionsSettings(Frozen):
    """How member ends of an analysis model are matched to joints, in mm and degrees, and how its signs are read."""

    node_distance_mm: Mm = Field(
        default=600.0, gt=0, description="farthest an analysis node is from its interface, along the member"
    )
    aside_mm: Mm = Field(default=250.0, gt=0, description="farthest an analysis axis runs beside the member's")
    axis_tolerance_deg: Degrees = Field(default=5.0, gt=0, lt=90, description="analysis axis against the member's")
    alike_mm: Mm = Field(default=50.0, ge=0, description="two members' ends this equally near are not told apart")
    section_forces: Literal["shown", "towards_end"] = Field(
        default="shown",
        description="signs of forces along a member: only as the file's support reactions show them, or, where they "
        "show nothing, acting on the face that looks towards the member's end, moments right-handed",
    )


class Settings(Frozen):
    """All settings of a run."""

    basis: BasisSettings = BasisSettings()
    defaults: Defaults = Defaults()
    detection: DetectionSettings = DetectionSettings()
    reading: ReadingSettings = ReadingSettings()
    actions: ActionsSettings = ActionsSettings()
    checks: dict[str, dict[str, Any]] = {}


def read_settings(path: Path) -> Settings:
    """Read settings from a TOML file; SettingsError names the file and the first thing wrong in it."""
    try:
        data = tomllib.loads(path.read_text(encoding="utf-8"))
    except OSError as error:
        raise SettingsError(f"{path}: the settings cannot be read ({error.strerror}).") from error
    except (tomllib.TOMLDecodeError, UnicodeDecodeError) as error:
        raise SettingsError(f"{path}: this is not TOML: {error}.") from error
    try:
        return Settings.model_validate(data)
    except ValidationError as error:
        first = error.errors()[0]
        place = ".".join(str(part) for part in first["loc"])
        raise SettingsError(f"{path}: {place}: {first['msg']}.") from error
