"""Named properties of an element, its own and its type's, by what the settings say they mean."""

from __future__ import annotations

import re
from collections import Counter
from dataclasses import dataclass
from typing import Any

import ifcopenshell.util.element as element_util

from ..model.units import Mm
from ..settings import Meaning, PropertyRow, ReadingSettings

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

    def length(self, element: Any, meaning: Meaning) -> tuple[Mm, str] | None:
        """Return the first positive length stated, in mm, and where; count its property as used."""
        for stated in self.stated(element, meaning):
            number = _number(stated.value)
            if number is not None and number > 0:
                self.used[stated.origin] += 1
                unit = {"model": self._length, "mm": 1.0, "in": INCH}[stated.row.unit]
                return number * unit, stated.origin
        return None

    def _sets_of(self, element: Any) -> dict[str, dict[str, Any]]:
        """Return an element's property sets; those of the element asked about last are kept."""
        if self._sets[0] != element.id():
            self._sets = element.id(), element_util.get_psets(element, psets_only=True)
        return self._sets[1]


def _first(value: Any) -> Any:
    return value[0] if isinstance(value, tuple | list) else value


def _number(value: Any) -> float | None:
    """Return a number, or one that begins a text ("24", "24 mm"); None for anything else."""
    if isinstance(value, int | float) and not isinstance(value, bool):
        return float(value)
    found = re.match(r"\s*(\d+(?:\.\d+)?)(?![\d/,])", str(value))
    return float(found.group(1)) if found else None
