"""Named properties of an element, its own and its type's."""

from __future__ import annotations

from collections.abc import Iterable
from typing import Any

import ifcopenshell.util.element as element_util


def property_texts(element: Any, names: Iterable[str]) -> list[tuple[str, str]]:
    """Return (value, "Set.Property") for each named property that is filled, in the order of the names.

    A name is "Set.Property", or "*.Property" for that property in any set.
    """
    sets = element_util.get_psets(element, psets_only=True)
    found = []
    for name in names:
        wanted, _, property_name = name.partition(".")
        for set_name, values in sets.items():
            value = values.get(property_name) if wanted in ("*", set_name) else None
            if value not in (None, ""):
                found.append((str(value), f"{set_name}.{property_name}"))
    return found
