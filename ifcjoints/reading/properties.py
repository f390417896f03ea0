"""Named properties of an element, its own and its type's, by what the settings say they mean."""

from __future__ import annotations

import re
from collections import Counter
from dataclasses import dataclass
from typing import Any

import ifcopenshell.util.element as element_util

from ..model.units import Mm
from ..settings import Meaning, PropertyRow, ReadingSettings
from .reach import FARTHEST

INCH: Mm = 25.4


@dataclass(frozen=True, slots=True)
class Stated:
    """A property's value and where it stands, "Set.Property"."""

    value: Any
    origin: str
    row: PropertyRow


class PropertyTable:
    """Looks properties up by meaning, and counts in `used` how often each gave what was taken."""

    def __init__(self, settings: ReadingSettings, length_unit: Mm) -> None:
        self._settings = settings
        self._length = length_unit
        self._sets: tuple[int, dict[str, dict[str, Any]]] = (0, {})
        self._asked: set[str] = set()
        self.used: Counter[str] = Counter()

    def stated(self, element: Any, meaning: Meaning) -> list[Stated]:
        """Return the filled properties that have a meaning, in the order of the rows."""
        sets = self._sets_of(element)
        found = []
        for row in self._settings.rows(meaning) if sets else ():
            wanted, _, name = row.property.partition(".")
            for set_name, values in sets.items():
                value = values.get(name) if wanted in ("*", set_name) else None
                if value not in (None, "", (), []):
                    found.append(Stated(_first(value), f"{set_name}.{name}", row))
        return found

    def text(self, element: Any, meaning: Meaning) -> str | None:
        """Return the first text stated, and count its property as used."""
        for stated in self.stated(element, meaning):
            self.used[stated.origin] += 1
            return str(stated.value)
        return None

    def lengths(self, element: Any, meaning: Meaning) -> list[tuple[Mm, str, bool]]:
        """Return the positive lengths stated: in mm, where, and whether their unit is sure (not just the model's)."""
        found = []
        for stated in self.stated(element, meaning):
            length = _length(stated.value, stated.row.unit, self._length)
            if length is not None and 0 < length[0] < FARTHEST:
                found.append((length[0], stated.origin, length[1]))
                self._asked.add(stated.origin)
        return found

    def length(self, element: Any, meaning: Meaning) -> tuple[Mm, str] | None:
        """Return the first positive length stated, in mm, and where; count its property as used."""
        for value, origin, _ in self.lengths(element, meaning):
            self.used[origin] += 1
            return value, origin
        return None

    def count(self, origin: str) -> None:
        """Count a property as used, if a property it is."""
        if origin in self._asked:
            self.used[origin] += 1

    def _sets_of(self, element: Any) -> dict[str, dict[str, Any]]:
        """Return an element's property sets; those of the element asked about last are kept."""
        if self._sets[0] != element.id():
            self._sets = element.id(), element_util.get_psets(element, psets_only=True)
        return self._sets[1]


def _first(value: Any) -> Any:
    return value[0] if isinstance(value, tuple | list) else value


NUMBER = re.compile(
    r"\s*(?:(?:(\d+)[ -])?(\d+)/(\d+)|(\d+(?:\.\d+)?))\s*(mm|cm|m|in|inch|\"|″|)\.?\s*$",
)
UNITS: dict[str, Mm] = {"mm": 1.0, "cm": 10.0, "m": 1000.0, "in": INCH, "inch": INCH, '"': INCH, "″": INCH}


def _length(value: Any, unit: str, model: Mm) -> tuple[Mm, bool] | None:
    """Return a number, or a text such as "24 mm" or "2 1/4 in", as mm, and whether its unit is said."""
    if isinstance(value, int | float) and not isinstance(value, bool):
        return float(value) * UNITS.get(unit, model), unit in UNITS
    found = NUMBER.match(str(value))
    if found is None:
        return None
    whole, above, below, plain, written = found.groups()
    number = float(plain) if plain else float(whole or 0) + float(above) / (float(below) or 1.0)
    return number * UNITS.get(written or unit, model), bool(written) or unit in UNITS
