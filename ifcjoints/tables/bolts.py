"""Bolt grades (bolt_grades.csv), bolt sizes (bolt_sizes.csv) and the tensile stress area of a bolt."""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from functools import cache

from ..model.basis import StandardName
from ..model.units import Mm, Mm2, Nmm2
from .rows import rows_of

UNIT_NOISE: Mm = 0.06
"""A model that rounds 19.05 mm to 19.1 still means 3/4 in; no two sizes lie closer than twice this."""

INCH: Mm = 25.4


@dataclass(frozen=True, slots=True)
class BoltGrade:
    """A bolt's grade: the standard that covers it, its strengths, and where they are printed.

    `f_yb` is set for property classes, `F_nt` and `F_nv` for ASTM bolts, `f_ub` for both. `threads_in_shear_plane`
    is True unless the grade says otherwise (X).
    """

    name: str
    standard: StandardName
    source: str
    f_ub: Nmm2
    f_yb: Nmm2 = 0.0
    F_nt: Nmm2 = 0.0
    F_nv: Nmm2 = 0.0
    threads_in_shear_plane: bool = True


@dataclass(frozen=True, slots=True)
class BoltSize:
    """A size of the metric or the inch series with its tensile stress area, and the formula's source."""

    name: str
    d: Mm
    A_s: Mm2
    metric: bool
    source: str


PROPERTY_CLASS = re.compile(
    r"(?<![\d.,MmDdLl=])(?<![=x×*] )(?<!length )(?<!grip )(4\.6|4\.8|5\.6|5\.8|6\.8|8\.8|10\.9)"
    r"(?![\d.,]*\d)(?!\s?(?:mm|cm|m\b|in\b|\"|x|×|\*))",
    re.IGNORECASE,
)
"""A property class standing by itself; a size ("L=8.8 mm", "M8.8x40", "length 10.9") is none."""


@cache
def bolt_grade(text: str) -> BoltGrade | None:
    """Return the grade that a text names ("8.8", "M20x60 10.9", "A325N", "D=3/4 L=2 A490-X"), or None.

    N and X say whether threads lie in the shear plane. SC (slip-critical) and no letter leave it open: in the
    plane, the safe side.
    """
    american = re.search(
        r"(?<![A-Za-z\d])(?:(A\s?(?:307|325|490)|F\s?(?:1852|2280))M?|(?:Group|GROUP)\s?(120|144|150|200))[\s-]?(N|X|SC)?(?![A-Z\d])",
        text,
    )
    if american:
        name, group, suffix = american.groups(default="")
        return _american(f"Group {group}" if group else re.sub(r"\s", "", name), suffix)
    class_ = PROPERTY_CLASS.search(text)
    if class_ is None:
        return None
    row = _grades()[class_.group(1)]
    return BoltGrade(row["name"], "EN 1993-1-8", row["source"], float(row["f_ub"]), f_yb=float(row["f_yb"]))


def _american(name: str, suffix: str) -> BoltGrade:
    row, excluded = _grades()[name], suffix == "X"
    return BoltGrade(
        name + suffix,
        "AISC 360",
        row["source"],
        float(row["f_ub"]),
        F_nt=float(row["F_nt"]),
        F_nv=float(row["F_nv_X" if excluded else "F_nv_N"]),
        threads_in_shear_plane=not excluded,
    )


@cache
def bolt_size(d: Mm) -> BoltSize | None:
    """Return the size of the metric coarse or the inch series that a diameter stands for, or None off both."""
    return next((size for size in _sizes() if abs(size.d - d) <= UNIT_NOISE), None)


def tensile_stress_area(d: Mm) -> Mm2 | None:
    """Return the tensile stress area of a bolt with a coarse thread in mm², or None off both series."""
    size = bolt_size(d)
    return size.A_s if size else None


def metric_stress_area(d: Mm, pitch: Mm) -> Mm2:
    """π/4 (d − 0.9382 P)² in mm² (ISO 898-1, from memory)."""
    return math.pi / 4 * (d - 0.9382 * pitch) ** 2


def inch_stress_area(d: float, threads: float) -> float:
    """0.7854 (d − 0.9743/n)² in square inches, n threads per inch (AISC Manual, Table 7-17, from memory)."""
    return 0.7854 * (d - 0.9743 / threads) ** 2


@cache
def _sizes() -> tuple[BoltSize, ...]:
    return tuple(_size(row["name"], float(row["d"]), row["pitch"], row["threads"]) for row in rows_of("bolt_sizes.csv"))


def _size(name: str, d: Mm, pitch: str, threads: str) -> BoltSize:
    if pitch:
        return BoltSize(name, d, metric_stress_area(d, float(pitch)), True, "ISO 898-1, coarse thread")
    area = inch_stress_area(d / INCH, float(threads)) * INCH**2
    return BoltSize(name, d, area, False, "AISC Manual, unified coarse thread")


@cache
def _grades() -> dict[str, dict[str, str]]:
    return {row["name"]: row for row in rows_of("bolt_grades.csv")}
