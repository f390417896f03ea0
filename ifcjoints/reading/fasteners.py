"""Fastener elements → bolts: one :class:`Bolt` for each physical bolt."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import ifcopenshell.util.element as element_util

from ..model.joints import Provenance
from ..model.parts import Bolt, BoltKind
from ..model.units import Array, Mm
from ..settings import Meaning
from ..tables.bolts import bolt_grade
from .axial import BoltBody
from .bodies import BodyReader, body_of
from .bolt_lines import bolts_from_lines
from .bolt_shapes import BoltShapes
from .bolt_sizes import Settled, StatedSize, settle_diameter, settle_length, sizes_in_texts
from .fastener_kinds import Texts, is_named_bolt, kind_of, texts_of
from .properties import PropertyTable
from .reach import FARTHEST, OutOfReach
from .unreadable import Unreadable

FROM_PLACEMENT = Provenance(source="assumed", detail="the z axis of the bolt's placement, as it has no body")


@dataclass(frozen=True, slots=True)
class _Common:
    """What all bolts of one element share."""

    kind: tuple[BoltKind, str]
    grade: tuple[str | None, Provenance | None]
    diameters: list[StatedSize]
    lengths: list[StatedSize]


class FastenerReader:
    """Reads fastener elements."""

    def __init__(self, bodies: BodyReader, length_unit: Mm, properties: PropertyTable) -> None:
        self._bodies = bodies
        self._length = length_unit
        self._properties = properties
        self._conflicts: list[tuple[str, str]] = []
        self._lengths: dict[str, list[str]] = {}
        self._shapes = BoltShapes()

    def read(self, element: Any) -> list[Bolt]:
        """Return the bolts of one element: as many as its body shows, or one where it has none."""
        owner = element_util.get_type(element)
        texts = texts_of(element, owner)
        kind = kind_of(element, owner, texts)
        bolts, loose = self._measured(element)
        if loose and kind[0] == "bolt":
            kind = "loose_part", "its body is a nut or a washer"
        diameters, lengths = sizes_in_texts(texts)
        common = _Common(
            kind,
            self._grade(element, texts),
            [*self._stated(element, owner, "NominalDiameter", "bolt_diameter"), *diameters],
            [*self._stated(element, owner, "NominalLength", "bolt_length"), *lengths],
        )
        return [self._bolt(element, index, common, body) for index, body in enumerate(bolts or [None])]

    def read_by_shape(self, element: Any) -> list[Bolt]:
        """Return the bolts of an element of another class, which its name and its body must both tell to be bolts.

        For a fastener that is no weld one of the two is enough.
        """
        is_bolt = is_named_bolt(element)
        if is_bolt != element.is_a("IfcFastener"):
            is_bolt = bool(self._measured(element)[0])
        return self.read(element) if is_bolt else []

    def problems(self) -> list[tuple[str, str]]:
        """Return what disagrees or cannot be read, by element; lengths that many bolts share are told once."""
        lengths = [(who[0], f"{what} (so it is with {len(who)} bolts)") for what, who in self._lengths.items()]
        return [*self._conflicts, *lengths]

    def _measured(self, element: Any) -> tuple[list[BoltBody], bool]:
        """Measure the bolts of an element, and tell if there are but loose parts."""
        try:
            pieces = self._bodies.own_pieces(element)
        except (Unreadable, OutOfReach) as reason:
            self._conflicts.append((element.GlobalId, f"the bolt's body cannot be read: {reason}"))
            return [], False
        bolts, loose = self._shapes.measured(pieces)
        world = self._bodies.world_of(element)
        return [body.moved(world) for body in bolts or bolts_from_lines(element, self._length)], loose

    def _bolt(self, element: Any, index: int, common: _Common, body: BoltBody | None) -> Bolt:
        diameter = settle_diameter(common.diameters, body, self._length)
        length = settle_length(common.lengths, body, self._length, diameter.unit)
        self._note(element, diameter, length)
        point, direction = (body.point, body.direction) if body else self._axis_from_placement(element)
        axis = FROM_PLACEMENT if body is None and point is not None else None
        settled = {"diameter": diameter.provenance, "length": length.provenance, "grade": common.grade[1], "axis": axis}
        if point is None and body_of(element) is not None and common.kind[0] == "bolt":
            self._conflicts.append((element.GlobalId, "no bolt can be made out in its body, so its axis is unknown"))
        return Bolt(
            element.GlobalId,
            element.id(),
            index,
            element.Name or element.is_a(),
            *common.kind,
            point,
            direction,
            diameter.value,
            length.value,
            common.grade[0],
            {key: origin for key, origin in settled.items() if origin is not None},
        )

    def _note(self, element: Any, diameter: Settled, length: Settled) -> None:
        if diameter.conflict is not None and (element.GlobalId, diameter.conflict) not in self._conflicts[-1:]:
            self._conflicts.append((element.GlobalId, diameter.conflict))
        for settled in (diameter, length):
            origin = settled.provenance.detail.partition(",")[0] if settled.provenance else ""
            self._properties.count(origin)
        if length.conflict is not None:
            self._lengths.setdefault(length.conflict, []).append(element.GlobalId)

    def _stated(self, element: Any, owner: Any, name: str, meaning: Meaning) -> list[StatedSize]:
        """Return the sizes that attributes and properties state, its own before its type's."""
        found = []
        for each in (element, owner):
            value = getattr(each, name, None) if each is not None else None
            if value and 0 < value * self._length < FARTHEST:
                found.append(StatedSize(float(value) * self._length, f"{each.is_a()}.{name}"))
        stated = self._properties.lengths(element, meaning)
        return [*found, *(StatedSize(value, origin, sure) for value, origin, sure in stated)]

    def _grade(self, element: Any, texts: Texts) -> tuple[str | None, Provenance | None]:
        """Return the designation of the first text that names a known grade, else the grade stated, whatever it is."""
        stated = [(str(each.value), each.origin) for each in self._properties.stated(element, "bolt_grade")]
        standards = [(str(each.value), each.origin) for each in self._properties.stated(element, "bolt_standard")]
        named = _known_grades([*stated, *standards, *texts])
        if not named:
            named = [(text, origin, text) for text, origin in stated[:1]] or _known_grades(_materials(element))
        if not named:
            return None, None
        name, origin, text = named[0]
        self._note_grades(element, named)
        self._properties.used.update([origin] if (text, origin) in (*stated, *standards) else [])
        return name, Provenance(source="read", detail=f'{origin} "{text}"')

    def _note_grades(self, element: Any, named: list[tuple[str, str, str]]) -> None:
        """Tell two grades of which neither is the other's shorter name (A325, A325N)."""
        first, where, _ = named[0]
        for other, origin, _ in named[1:]:
            if not (other.startswith(first) or first.startswith(other)):
                told = f"its grade is {first} by {where} and {other} by {origin}; {first} is used"
                self._conflicts.append((element.GlobalId, told))
                return

    def _axis_from_placement(self, element: Any) -> tuple[Array | None, Array | None]:
        """Take the placement's z axis for a bolt without a body, as the schema's examples draw them.

        A body that no bolt can be measured in may stand anywhere about its placement: its axis is unknown.
        """
        if element.ObjectPlacement is None or body_of(element) is not None:
            return None, None
        matrix = self._bodies.world_of(element)
        return matrix[:3, 3], matrix[:3, 2]


def unknown_bolt(element: Any) -> Bolt:
    """Return the bolt that an element stands for which cannot be read: it counts, though nothing is known of it."""
    name = element.Name or element.is_a()
    reason = "it cannot be read"
    return Bolt(element.GlobalId, element.id(), 0, name, "bolt", reason, None, None, None, None, None)


def _known_grades(texts: Texts) -> list[tuple[str, str, str]]:
    """Return the designations of the grades that texts name, each with where it stands and the whole text."""
    found = [(bolt_grade(text), origin, text.strip()) for text, origin in texts]
    return [(grade.name, origin, text) for grade, origin, text in found if grade is not None]


def _materials(element: Any) -> Texts:
    return [(material.Name, "material") for material in element_util.get_materials(element) if material.Name]
