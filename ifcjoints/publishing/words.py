"""The words in which people read what the model of results holds as keys. A status is a sign and a word."""

from __future__ import annotations

from ..model.actions import FlangeSide
from ..model.findings import Severity
from ..model.joints import Configuration, RowPosition, Source
from ..model.results import Status

STATUS: dict[Status, tuple[str, str]] = {
    "pass": ("✓", "passes"),
    "fail": ("✗", "fails"),
    "resistance_only": ("R", "resistance only"),
    "not_applicable": ("–", "not applicable"),
    "not_checkable": ("?", "not checkable"),
}
SEVERITY: dict[Severity, tuple[str, str]] = {
    "error": ("✗", "error"),
    "warning": ("△", "warning"),
    "note": ("·", "note"),
}
SOURCE: dict[Source, tuple[str, str]] = {
    "read": ("", "read from the model"),
    "measured": ("", "measured on the model"),
    "given": ("", "given"),
    "assumed": ("△", "ASSUMED"),
}
CONFIGURATION: dict[Configuration, str] = {
    "beam_to_column_flange": "beam to column flange",
    "beam_to_column_web": "beam to column web",
    "beam_to_beam": "beam to beam",
    "splice": "end-plate splice",
    "base_plate": "base plate",
    "cover_plate_splice": "cover-plate splice",
    "other": "other",
}
POSITION: dict[RowPosition, str] = {
    "outside_top": "above the top flange",
    "between": "between the flanges",
    "outside_bottom": "below the bottom flange",
}
TENSION: dict[FlangeSide, str] = {"top": "top flange in tension", "bottom": "bottom flange in tension"}
CAUTION = (
    "These results support a competent engineer's check. They replace neither it nor the governing code and contract."
)
