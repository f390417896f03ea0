"""Fastener elements → bolts: one :class:`Bolt` for each physical bolt."""

from __future__ import annotations

import re
from typing import Any

import ifcopenshell.util.element as element_util

from ..model.joints import Provenance
from ..model.parts import Bolt, BoltKind
from ..model.units import Array, Mm
from ..settings import Meaning
from ..tables.bolts import bolt_grade
from .axial import BoltBody, bolts_of
from .bodies import BodyReader
from .bolt_lines import bolts_from_lines
from .properties import PropertyTable
from .turned import turned_bodies
from .unreadable import Unreadable

KIND_WORDS: tuple[tuple[BoltKind, str], ...] = (
    ("stud", r"\bstud|shear ?connector"),
    ("anchor", r"anchor|holding[ -]?down"),
    ("loose_part", r"^\W*(nut|washer)\b"),
    ("other", r"\b(screw|nail|dowel|rivet|staple)"),
)
PREDEFINED: dict[str, BoltKind] = {
    "ANCHORBOLT": "anchor", "BOLT": "bolt", "STUDSHEARCONNECTOR": "stud", "SHEARCONNECTOR": "stud",
    "DOWEL": "other", "NAIL": "other", "NAILPLATE": "other", "RIVET": "other", "SCREW": "other", "STAPLE": "other",
}  # fmt: skip
AGREE = 0.12
"""A stated and a measured diameter this near to one another are the same bolt (threads, facets)."""

PLAUSIBLE = (5.0, 100.0)
"""Between these diameters in mm a bolt of steelwork lies; common practice, no source."""


Texts = list[tuple[str, str]]
"""Texts, each with where it stands."""


class FastenerReader:
    """Reads fastener elements."""

    def __init__(self, bodies: BodyReader, length_unit: float, properties: PropertyTable) -> None:
        self._bodies = bodies
        self._length = length_unit
        self._properties = properties
        self.conflicts: list[tuple[str, str]] = []
        self._shapes: dict[tuple[tuple[int, bytes], ...], list[BoltBody]] = {}

    def read(self, element: Any) -> list[Bolt]:
        """Return the bolts of one element: as many as its body shows, or one where it has none."""
        owner = element_util.get_type(element)
        texts = texts_of(element, owner)
        kind = kind_of(element, texts)
        grade = self._grade(element, texts)
        nominal = [self._nominal(element, owner, name) for name in ("NominalDiameter", "NominalLength")]
        return [
            self._bolt(element, index, kind, grade, nominal, body)
            for index, body in enumerate(self._measured(element) or [None])
        ]

    def _measured(self, element: Any) -> list[BoltBody | None]:
        """Measure the bolts of an element; a shape that many elements share is measured once."""
        try:
            pieces = self._bodies.own_pieces(element)
        except Unreadable as reason:
            self.conflicts.append((element.GlobalId, f"the bolt's body cannot be read: {reason}"))
            return []
        key = tuple((id(placed.piece), placed.matrix.tobytes()) for placed in pieces)
        if key not in self._shapes:
            self._shapes[key] = bolts_of(turned_bodies(pieces))
        bolts = self._shapes[key] or bolts_from_lines(element, self._length)
        world = self._bodies.world_of(element)
        return [body.moved(world) for body in bolts]

    def _bolt(
        self,
        element: Any,
        index: int,
        kind: tuple[BoltKind, str],
        grade: tuple[str | None, Provenance | None],
        nominal: list[tuple[Mm, str] | None],
        body: BoltBody | None,
    ) -> Bolt:
        provenance: dict[str, Provenance] = {}
        diameter, from_diameter = self._settle(element, "diameter", nominal[0], body.diameter if body else None)
        length, from_length = self._settle_length(nominal[1], body)
        for key, origin in (("diameter", from_diameter), ("length", from_length), ("grade", grade[1])):
            if origin is not None:
                provenance[key] = origin
        point, direction = (body.point, body.direction) if body else self._axis_from_placement(element)
        name = element.Name or element.is_a()
        return Bolt(
            element.GlobalId,
            element.id(),
            index,
            name,
            *kind,
            point,
            direction,
            diameter,
            length,
            grade[0],
            provenance,
        )

    def _settle(
        self, element: Any, what: str, stated: tuple[Mm, str] | None, measured: Mm | None
    ) -> tuple[Mm | None, Provenance | None]:
        """Settle on the stated size where the body agrees, in whatever unit it was meant; else measure."""
        if stated is None:
            if measured is None:
                return None, None
            return measured, Provenance(source="measured", detail="from the bolt's shank")
        value, origin = stated
        for factor in (1.0, 1000.0, 25.4, 1 / self._length, 25.4 / self._length):
            tried = value * factor
            if measured is None and PLAUSIBLE[0] <= tried <= PLAUSIBLE[1]:
                return tried, Provenance(source="read", detail=origin)
            if measured is not None and abs(tried - measured) <= AGREE * measured:
                return tried, Provenance(source="read", detail=f"{origin}, agrees with the shank")
        if measured is None:
            return None, None
        self.conflicts.append(
            (
                element.GlobalId,
                f"the stated {what} of {value:.1f} mm disagrees with the shank's {measured:.1f} mm",
            )
        )
        return measured, Provenance(source="measured", detail=f"from the shank; {origin} says {value:.1f} mm")

    def _settle_length(
        self, stated: tuple[Mm, str] | None, body: BoltBody | None
    ) -> tuple[Mm | None, Provenance | None]:
        if body is None:
            return (None, None) if stated is None else (stated[0], Provenance(source="read", detail=stated[1]))
        if stated is not None and abs(stated[0] - body.length) <= AGREE * body.length:
            return stated[0], Provenance(source="read", detail=f"{stated[1]}, agrees with the shank")
        return body.length, Provenance(source="measured", detail="from the bolt's shank")

    def _nominal(self, element: Any, owner: Any, name: str) -> tuple[Mm, str] | None:
        """Return a stated size in mm, from the element, its type, a property, or its name."""
        for each in (element, owner):
            value = getattr(each, name, None) if each is not None else None
            if value:
                return float(value) * self._length, f"{each.is_a()}.{name}"
        meaning: Meaning = "bolt_diameter" if name == "NominalDiameter" else "bolt_length"
        return self._properties.length(element, meaning) or size_in_name(element, name)

    def _grade(self, element: Any, texts: Texts) -> tuple[str | None, Provenance | None]:
        """Return the designation of the first text that names a grade this program knows."""
        materials = [(material.Name, "material") for material in element_util.get_materials(element) if material.Name]
        stated = [(str(each.value), each.origin) for each in self._properties.stated(element, "bolt_grade")]
        for text, origin in (*stated, *texts, *materials):
            found = bolt_grade(text)
            if found is not None:
                self._properties.used.update([origin] if (text, origin) in stated else [])
                return found.name, Provenance(source="read", detail=f'{origin} "{text.strip()}"')
        return None, None

    def _axis_from_placement(self, element: Any) -> tuple[Array | None, Array | None]:
        """Take the placement's z axis for a bolt without a body, as the schema's examples draw them."""
        if element.ObjectPlacement is None:
            return None, None
        matrix = self._bodies.world_of(element)
        return matrix[:3, 3], matrix[:3, 2]


def texts_of(element: Any, owner: Any) -> Texts:
    """Return the texts that may tell what a fastener is, each with where it stands: its own, then its type's."""
    found = []
    for each in (element, owner) if owner is not None else (element,):
        for name in ("ObjectType", "ElementType", "Description", "Name", "Tag"):
            text = getattr(each, name, None)
            if text:
                found.append((str(text), f"{each.is_a()}.{name}"))
    return found


def kind_of(element: Any, texts: Texts) -> tuple[BoltKind, str]:
    """Tell bolts from anchors, studs and the rest: by predefined type, then by what the texts say."""
    predefined = element_util.get_predefined_type(element)
    if predefined in PREDEFINED:
        return PREDEFINED[predefined], f"predefined type {predefined}"
    for text, origin in texts:
        for kind, words in KIND_WORDS:
            if re.search(words, text, re.IGNORECASE):
                return kind, f'{origin} "{text.strip()}"'
    return "bolt", "no other kind named"


def size_in_name(element: Any, name: str) -> tuple[Mm, str] | None:
    """Read a size out of a name such as "M20x60 8.8" or "D=3/4 L=2 1/4 A325N"."""
    for attribute in ("Name", "Description", "ObjectType"):
        text = getattr(element, attribute, None) or ""
        metric = re.search(r"\bM\s?(\d{1,2})(?!\d)(?:\s*[xX*]\s*(\d+))?", text)
        if metric:
            value = metric.group(1 if name == "NominalDiameter" else 2)
            if value:
                return float(value), f'{attribute} "{text}"'
        inches = re.search(rf"\b{'D' if name == 'NominalDiameter' else 'L'}=(\d+ \d+/\d+|\d+/\d+|\d+)\b", text)
        if inches:
            return sum(_fraction(part) for part in inches.group(1).split()) * 25.4, f'{attribute} "{text}"'
    return None


def _fraction(text: str) -> float:
    above, _, below = text.partition("/")
    return float(above) / float(below or 1)
