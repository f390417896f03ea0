"""A part's steel grade, as the model writes it."""

from __future__ import annotations

from typing import Any

import ifcopenshell.util.element as element_util

from ..model.joints import Provenance
from ..tables.steels import steel_grade
from .properties import property_texts


def read_grade(element: Any, grade_properties: tuple[str, ...]) -> tuple[str | None, Provenance | None]:
    """Return the text that names the grade: a known grade wherever it stands, else the material's name."""
    texts = []
    for material in element_util.get_materials(element):
        for name in ("Name", "Description", "Category"):
            text = getattr(material, name, None)
            if text:
                texts.append((str(text), f"IfcMaterial.{name}"))
    texts += property_texts(element, grade_properties)
    for text, origin in texts:
        if steel_grade(text, 10.0) is not None:
            return text, Provenance(source="read", detail=origin)
    return (texts[0][0], Provenance(source="read", detail=texts[0][1])) if texts else (None, None)
