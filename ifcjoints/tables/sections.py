"""Sizes of common rolled sections by their designation (sections.csv); a small table, to confirm what a model says."""

from __future__ import annotations

import re
from functools import cache

from ..model.joints import SectionShape
from ..model.sections import SectionDimensions
from .rows import rows_of


def section_size(designation: str) -> SectionDimensions | None:
    """Return the handbook's size of a section such as "IPE 400", "HE 240 B", "W16x36"; None where it is not listed."""
    return _table().get(_plain(designation))


def _plain(designation: str) -> str:
    """Return the designation in the table's spelling."""
    text = re.sub(r"[\s_-]", "", designation.upper()).replace("×", "X").replace("*", "X")
    wide = re.fullmatch(r"HE(\d+)([ABM])", text)
    return f"HE{wide.group(2)}{wide.group(1)}" if wide else text


@cache
def _table() -> dict[str, SectionDimensions]:
    return {row["name"]: _size(row) for row in rows_of("sections.csv")}


def _size(row: dict[str, str]) -> SectionDimensions:
    shape: SectionShape = "U" if row["name"].startswith("U") else "I"
    h, b, tw, tf = (float(row[key]) for key in ("h", "b", "tw", "tf"))
    return SectionDimensions(shape, h, b, tw, tf, float(row["r"]) if row["r"] else None)
