"""The rule that makes a bolted end plate a moment joint, and the words that say so."""

from __future__ import annotations

from collections.abc import Sequence

import shapely

from ..model.joints import Row
from ..model.units import Mm
from .flanges import FlangeBand

LEAST_ROWS = 2
LEAST_LEVER = 0.5
"""At least one row has a lever arm of this share of the distance between the flange centre lines."""


def judge(
    names: tuple[str, str, str],
    flanges: tuple[FlangeBand, FlangeBand] | None,
    outline: shapely.Polygon,
    rows: Sequence[Row],
    least_cover: float,
) -> tuple[bool, str]:
    """Return whether the joint is a moment joint, and why, with its own figures.

    `names` are the end plate's, the supported member's and the other part's.
    """
    plate, member, other = names
    if flanges is None:
        return False, f"no two flanges of {member} stand on the end plate {plate}"
    for side, band in zip(("bottom", "top"), flanges, strict=True):
        cover = band.cover(outline)
        if cover < least_cover:
            return (
                False,
                f"the end plate {plate} covers {cover:.0%} of the width of the {side} flange of {member}",
            )
    distance = flanges[1].y - flanges[0].y
    if len(rows) < LEAST_ROWS:
        return False, f"the end plate {plate} is bolted through {other} by {len(rows)} row only"
    return _by_lever_arm(names, rows, distance)


def base_plate_reason(names: tuple[str, str, str]) -> str:
    """Return why a column's foot is no moment joint here: it does not press on the far side by its flange alone."""
    plate, member, other = names
    return (
        f"a base plate: {member} stands by its foot on {plate}, bolted to {other}; it bears on what is below over "
        "an area, which the methods for end plates do not cover"
    )


def _by_lever_arm(names: tuple[str, str, str], rows: Sequence[Row], distance: Mm) -> tuple[bool, str]:
    plate, member, other = names
    arms = [max(row.y_bottom_mm, row.y_top_mm) for row in rows]
    best = max(range(len(rows)), key=lambda number: arms[number])
    told = (
        f"end plate {plate} stands on both flanges of {member} and is bolted through {other} by {len(rows)} rows; "
        f"the longest lever arm, {arms[best]:.1f} mm of row {best + 1},"
    )
    limit = f"half of the {distance:.1f} mm between the flange centre lines"
    if arms[best] < LEAST_LEVER * distance:
        return False, f"{told} is less than {limit}"
    return True, f"{told} is at least {limit}"
