"""Steel grades and their strengths by thickness (steel_grades.csv)."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import cache

from ..model.units import Mm, Nmm2
from .rows import rows_of


@dataclass(frozen=True, slots=True)
class SteelStrength:
    """A grade at a thickness: yield strength, ultimate strength, and where they are printed."""

    name: str
    f_y: Nmm2
    f_u: Nmm2
    source: str


@cache
def steel_grade(text: str, thickness: Mm) -> SteelStrength | None:
    """Return the strength of the grade that a text names, or None for none or one not in the table.

    Understands "S355JR", "STEEL/S355J2", "S275J0+AR", "A992 Wide Flange Steel: fu=65 fy=50", "A572 Gr. 50"; the
    grade's name decides, not figures that stand beside it.
    A plate thicker than the table's last step has no strength here.
    """
    name = _name(text)
    for row in _table().get(name, ()) if name else ():
        if thickness <= float(row["t_max"]):
            return SteelStrength(row["name"], float(row["f_y"]), float(row["f_u"]), row["source"])
    return None


@cache
def _table() -> dict[str, list[dict[str, str]]]:
    table: dict[str, list[dict[str, str]]] = {}
    for row in rows_of("steel_grades.csv"):
        table.setdefault(row["name"], []).append(row)
    return table


def _name(text: str) -> str | None:
    european = re.search(r"(?<![A-Z])S\s?(235|275|355|420|460)(?!\d)", text, re.IGNORECASE)
    if european:
        return f"S{european.group(1)}"
    american = re.search(r"(?<![A-Z])A\s?(36|992|588|53)(?!\d)", text)
    if american:
        return f"A{american.group(1)}"
    graded = re.search(
        r"(?<![A-Z])A\s?(572|529|500|913)\W*(?:GR(?:ADE)?\W*)?(50|65|A|B|C)(?![\w])", text, re.IGNORECASE
    )
    if graded is None:
        return None
    number, grade = graded.group(1), graded.group(2).upper()
    return f"A{number}{grade}" if number == "500" else f"A{number}-{grade}"
