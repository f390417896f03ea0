"""The whole outcome of one run: what audit.json holds."""

from __future__ import annotations

from typing import Any, Literal

from pydantic import ConfigDict, Field

from .base import Frozen
from .findings import Problem
from .joints import Joint
from .units import Mm

FORMAT_VERSION = 1


class Generator(Frozen):
    """The program that wrote the audit."""

    name: str
    version: str


class ModelFile(Frozen):
    """The model that was audited; `path` and `sha256` are None for one that lives in memory only."""

    model_config = ConfigDict(populate_by_name=True)

    path: str | None
    sha256: str | None
    schema_name: str = Field(alias="schema")
    length_unit_mm: Mm
    originating_system: str | None


class FileReference(Frozen):
    """A file that went into the run."""

    path: str
    sha256: str


class BasisRecord(Frozen):
    """The one standard and edition of this run, and where the actions came from."""

    standard: str
    edition: str
    national_choices: dict[str, Any]
    actions: FileReference | None


class Coverage(Frozen):
    """The count that shows no bolt was lost."""

    bolts: int
    bolts_in_joints: int
    bolts_elsewhere: int
    parts: int


class Elsewhere(Frozen):
    """Bolts that belong to no joint, and why. `count` counts physical bolts."""

    bolts: tuple[str, ...]
    count: int
    reason: str


class CheckInfo(Frozen):
    """A check that ran: where it came from, and its clause or method."""

    name: str
    title: str
    package: str
    version: str
    method: str


class Audit(Frozen):
    """Everything that one run found.

    `properties_used` counts how often each property of the model, as "Set.Property", gave what was read.
    """

    format: Literal["ifcjoints-audit"] = "ifcjoints-audit"
    format_version: Literal[1] = 1
    generator: Generator
    model: ModelFile
    basis: BasisRecord
    problems: tuple[Problem, ...] = ()
    properties_used: dict[str, int] = {}
    settings: dict[str, Any]
    installed_checks: tuple[CheckInfo, ...] = ()
    joints: tuple[Joint, ...] = ()
    coverage: Coverage
    elsewhere: tuple[Elsewhere, ...] = ()

    @property
    def failed(self) -> bool:
        """Whether any joint fails a check or has an error finding (exit status 1)."""
        return any(
            any(result.status == "fail" for result in joint.checks)
            or any(finding.severity == "error" for finding in joint.findings)
            for joint in self.joints
        )

    def to_json(self) -> str:
        """The audit as the text of audit.json."""
        return self.model_dump_json(indent=2, by_alias=True) + "\n"
