"""A part's steel grade, as the model writes it."""

from __future__ import annotations

from typing import Any

import ifcopenshell.util.element as element_util

from ..model.joints import Provenance
from ..tables.steels import steel_grade
from .properties import PropertyTable


def read_grade(element: Any, properties: PropertyTable) -> tuple[str | None, Provenance | None]:
    """Return the text that names the grade: a known grade wherever it stands, else the material's name."""
    texts = []
    for material in element_util.get_materials(element):
        for name in ("Name", "Description", "Category"):
            text = getattr(material, name, None)
            if text:
                texts.append((str(text), f"IfcMaterial.{name}"))
    texts += [(str(stated.value), stated.origin) for stated in properties.stated(element, "steel_grade")]
    for text, origin in texts:
        if steel_grade(text, 10.0) is not None:
            properties.used.update([origin] if not origin.startswith("IfcMaterial") else [])
            return text, Provenance(source="read", detail=origin)
    return (texts[0][0], Provenance(source="read", detail=texts[0][1])) if texts else (None, None)
