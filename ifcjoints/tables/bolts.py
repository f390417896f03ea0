"""Bolt grades (bolt_grades.csv) and the stress area of a bolt."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import cache

from ..model.basis import StandardName
from ..model.units import Mm, Mm2, Nmm2
from .rows import rows_of


@dataclass(frozen=True, slots=True)
class BoltGrade:
    """A bolt's grade: the standard that covers it, and its strengths.

    `f_yb` and `f_ub` are set for property classes, `F_nt` and `F_nv` for ASTM bolts. `threads_in_shear_plane`
    is True unless the grade says otherwise (X).
    """

    name: str
    standard: StandardName
    f_yb: Nmm2 = 0.0
    f_ub: Nmm2 = 0.0
    F_nt: Nmm2 = 0.0
    F_nv: Nmm2 = 0.0
    threads_in_shear_plane: bool = True


@cache
def bolt_grade(text: str) -> BoltGrade | None:
    """Return the grade that a text names ("8.8", "M20x60 10.9", "A325N", "D=3/4 L=2 A490-X"), or None."""
    american = re.search(r"(?<![A-Z\d])A\s?(307|325|490)M?[\s-]?(N|X|SC)?(?![A-Z\d])", text)
    if american:
        return _american(f"A{american.group(1)}", american.group(2) or "")
    class_ = re.search(r"(?<![\d.])(4\.6|4\.8|5\.6|5\.8|6\.8|8\.8|10\.9)(?![\d.]*\d)", text)
    if class_ is None:
        return None
    row = _table()[class_.group(1)]
    return BoltGrade(row["name"], "EN 1993-1-8", f_yb=float(row["f_yb"]), f_ub=float(row["f_ub"]))


def _american(name: str, suffix: str) -> BoltGrade:
    row, excluded = _table()[name], suffix == "X"
    F_nv = float(row["F_nv_X" if excluded else "F_nv_N"])
    return BoltGrade(name + suffix, "AISC 360", F_nt=float(row["F_nt"]), F_nv=F_nv, threads_in_shear_plane=not excluded)


@cache
def _table() -> dict[str, dict[str, str]]:
    return {row["name"]: row for row in rows_of("bolt_grades.csv")}


PITCHES: dict[int, Mm] = {
    8: 1.25,
    10: 1.5,
    12: 1.75,
    14: 2,
    16: 2,
    18: 2.5,
    20: 2.5,
    22: 2.5,
    24: 3,
    27: 3,
    30: 3.5,
    33: 3.5,
    36: 4,
    39: 4,
}
"""Coarse pitches of ISO 261, from memory."""


def tensile_stress_area(d: Mm) -> Mm2 | None:
    """Return the stress area of a metric coarse thread, π/4 (d − 0.9382 P)² (ISO 898-1), or None off the series."""
    pitch = PITCHES.get(round(d)) if abs(d - round(d)) < 0.05 else None
    return None if pitch is None else 0.7853981633974483 * (round(d) - 0.9382 * pitch) ** 2
