"""A bolt's size: what the model states, in whatever unit it was meant, held against the measured shank."""

from __future__ import annotations

import re
from collections.abc import Iterable
from dataclasses import dataclass, replace
from functools import cache

from ..model.joints import Provenance
from ..model.units import Mm
from .axial import BoltBody
from .fastener_kinds import Texts

INCH: Mm = 25.4
PLAUSIBLE = (5.0, 100.0)
PLAUSIBLE_LENGTH = (10.0, 1000.0)
"""Between these diameters and lengths a bolt of steelwork lies; common practice, no source."""

SERIES = (
    *(float(d) for d in (6, 8, 10, 12, 14, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 42, 45, 48, 52, 56, 60, 64)),
    *(INCH * eighths / 8 for eighths in (2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 14, 16, 18, 20, 22, 24)),
)
"""The sizes that bolts are made in: ISO 261, and ASME B1.1 by eighths of an inch; from memory."""

ON_SERIES = 0.003
"""A shank's diameter this near to a size is that size (rounding in the file)."""

AGREES = 0.015
AGREES_LENGTH: Mm = 1.0
"""Share of the diameter, and of the length at least so much, by which a stated and a drawn bolt may differ."""

NUMBER = r"\d+[ -]\d+/\d+|\d+/\d+|\d+(?:\.\d+)?"
MARK = r"\s*(?:\"|″|in\b\.?|inch(?:es)?\b)"
METRIC = re.compile(
    r"(?:\b|BOLT|H)M\s?(\d{1,2})(?!\d)(?:\s*[xX*×]\s*(?:\d(?:[.,]\d+)?\s*[xX*×]\s*)?(\d{2,3})(?![\d.]))?"
)
LETTERED = re.compile(rf"\bD\s?=\s?({NUMBER})(?:.*?\bL\s?=\s?({NUMBER}))?")
INCHES = re.compile(
    rf"(?<![\d/.=])({NUMBER}){MARK}(?:\s*[xX*×]\s*({NUMBER}))?"
    r"|(?<![\d/.=])(\d+[ -]\d+/\d+|\d+/\d+)\s*[xX*×]\s*(\d+[ -]\d+/\d+|\d+/\d+|\d+)"
)


@dataclass(frozen=True, slots=True)
class StatedSize:
    """A diameter or length as stated: in mm if the model's unit was meant. `sure` tells that the unit is known.

    Of the units it may be meant in, `unit` is tried first.
    """

    value: Mm
    origin: str
    sure: bool = False
    unit: str = ""

    def readings(self, length_unit: Mm) -> list[tuple[Mm, str]]:
        """Return the value in mm, and in which unit: the model's first, else what people also write."""
        if self.sure:
            return [(self.value, "")]
        bare = self.value / length_unit
        others = [(bare * each, name) for each, name in ((1.0, "mm"), (INCH, "inches"), (1000.0, "metres"))]
        readings = [(self.value, ""), *((each, f", taken as {name}") for each, name in others if each != self.value)]
        return sorted(readings, key=lambda reading: reading[1] != self.unit)


@dataclass(frozen=True, slots=True)
class Settled:
    """A size settled on, where it came from, what disagrees, if anything does, and the unit it was taken in."""

    value: Mm | None = None
    provenance: Provenance | None = None
    conflict: str | None = None
    unit: str = ""


def settle_diameter(stated: list[StatedSize], body: BoltBody | None, length_unit: Mm) -> Settled:
    """Settle on the first stated diameter that the shank agrees with; without a shank on the first plausible one.

    Where none agrees the smaller figure is used, which is never the stronger bolt. Whatever disagrees is told.
    """
    plausible = _first_within(stated, PLAUSIBLE, length_unit)
    if body is None or body.diameter is None or body.flats is None:
        return _held(plausible, "diameter", stated, AGREES * (plausible.value or 0.0), length_unit)
    limits = body.flats * (1 - AGREES), body.diameter * (1 + AGREES)
    agreed = _first_within(stated, limits, length_unit, ", agrees with the shank")
    measured = true_diameter(body.diameter, body.flats)
    if agreed.value is None and plausible.value is not None and plausible.value < (measured.value or 0.0):
        told = f"the stated diameter of {plausible.value:.1f} mm disagrees with the shank's {measured.value:.1f} mm"
        return replace(plausible, conflict=told)
    settled = agreed if agreed.value is not None else measured
    return _held(settled, "diameter", stated, AGREES * (settled.value or 0.0), length_unit)


def settle_length(stated: list[StatedSize], body: BoltBody | None, length_unit: Mm, unit: str = "") -> Settled:
    """Settle on a stated length that the body agrees with; else on the body's own. Whatever disagrees is told.

    Without a body a length is taken in the `unit` that the diameter was taken in.
    """
    if body is None:
        alike = [replace(each, unit=unit) for each in stated]
        settled, slack = _first_within(alike, PLAUSIBLE_LENGTH, length_unit), AGREES_LENGTH
    else:
        slack = max(AGREES_LENGTH, AGREES * body.length)
        limits = body.length - slack, body.length + slack
        settled = _first_within(stated, limits, length_unit, ", agrees with the shank")
    if settled.value is None and body is not None:
        settled = _measured(body.length, "from the bolt's shank")
    return _held(settled, "length", stated, slack, length_unit)


def _held(settled: Settled, what: str, stated: list[StatedSize], slack: Mm, length_unit: Mm) -> Settled:
    """Hold what was settled on against everything stated, and tell the first figure that it cannot be."""
    value, provenance = settled.value, settled.provenance
    if value is None or provenance is None:
        return settled
    for each in stated:
        if not any(abs(reading - value) <= slack for reading, _ in each.readings(length_unit)):
            used = f"the {value:.1f} mm {'of the shank' if provenance.source == 'measured' else provenance.detail}"
            told = f"the stated {what} of {each.value:.1f} mm ({each.origin}) disagrees with {used}"
            return replace(settled, conflict=told)
    return settled


def true_diameter(corners: Mm, flats: Mm) -> Settled:
    """Return the diameter of a faceted shank: over its corners or its flats, whichever is a size bolts are made in.

    Facets may stand inside or outside of the true circle. Where both are sizes (a hexagon of M22 has the flats of a
    3/4 in. bolt), or neither is, the smaller one is used, and both are told.
    """
    if corners - flats < 1e-3 * corners:
        return _measured(corners, "from the bolt's shank")
    if _is_size(corners) and not _is_size(flats):
        return _measured(corners, "over the corners of the bolt's shank")
    if _is_size(flats) and not _is_size(corners):
        return _measured(flats, "over the flats of the bolt's shank")
    return _measured(flats, f"over the flats of the bolt's shank; over its corners it is {corners:.2f} mm")


def sizes_in_texts(texts: Texts) -> tuple[list[StatedSize], list[StatedSize]]:
    """Read diameters and lengths out of texts such as "M20x60 8.8", "D=3/4 L=2 1/4 A325N" or "7/8 in. x 3 1/2"."""
    diameters, lengths = [], []
    for text, origin in texts:
        if origin.endswith(".Tag"):
            continue
        diameter, length = _sizes(text)
        where = f'{origin} "{text.strip()}"'
        if diameter is None or not PLAUSIBLE[0] <= diameter <= PLAUSIBLE[1]:
            continue
        diameters.append(StatedSize(diameter, where, True))
        lengths += [StatedSize(length, where, True)] if length else []
    return diameters, lengths


@cache
def _sizes(text: str) -> tuple[Mm | None, Mm | None]:
    metric = METRIC.search(text)
    if metric:
        return _in_mm(metric.group(1), 1.0), _in_mm(metric.group(2), 1.0)
    lettered = LETTERED.search(text)
    if lettered:
        unit = INCH if _number(lettered.group(1)) < PLAUSIBLE[0] else 1.0
        return _in_mm(lettered.group(1), unit), _in_mm(lettered.group(2), unit)
    inches = INCHES.search(text)
    if inches:
        return _in_mm(inches.group(1) or inches.group(3), INCH), _in_mm(inches.group(2) or inches.group(4), INCH)
    return None, None


def _in_mm(text: str | None, unit: Mm) -> Mm | None:
    return _number(text) * unit if text else None


def _number(text: str) -> float:
    return sum(_fraction(part) for part in re.split(r"[ -]", text))


def _fraction(text: str) -> float:
    above, _, below = text.partition("/")
    return float(above) / (float(below or 1) or 1.0)


def _first_within(stated: Iterable[StatedSize], limits: tuple[Mm, Mm], length_unit: Mm, agreement: str = "") -> Settled:
    for each in stated:
        for value, unit in each.readings(length_unit):
            if limits[0] <= value <= limits[1]:
                return Settled(value, Provenance(source="read", detail=f"{each.origin}{unit}{agreement}"), unit=unit)
    return Settled()


def _is_size(diameter: Mm) -> bool:
    return any(abs(diameter - size) <= ON_SERIES * size for size in SERIES)


def _measured(value: Mm, detail: str) -> Settled:
    return Settled(value, Provenance(source="measured", detail=detail))
