"""A member's section designation, as far as the model names one."""

from __future__ import annotations

import re
from typing import Any

import ifcopenshell.util.element as element_util

from .bodies import PlacedPiece
from .properties import property_texts

SERIES = (
    r"IPE|IPN|HE\s?[ABM]?|HEA|HEB|HEM|HD|HL|HP|UPN|UPE|UB|UC|UKB|UKC|UKPFC|PFC"
    r"|W|WT|HSS|TS|PIPE|RHS|SHS|CHS|MC|C|S|M|L|T"
)
PATTERN = re.compile(
    rf"\b(?:(?:{SERIES})[\s-]?\d[\w./-]*(?:\s?x\s?[\d./-]+)*"
    r"|\d{2,4}\s?x\s?\d{2,4}\s?x\s?\d{1,4}\s?(?:UKB|UKC|UB|UC))\b",
    re.IGNORECASE,
)
"""A series and its size, or a size and its series: the shape of a designation, not a list of sections."""


def read_designation(element: Any, pieces: list[PlacedPiece], names: tuple[str, ...]) -> str | None:
    """Return the section's name from the profile, the material's profile set, a property or the element's texts."""
    for placed in pieces:
        if placed.piece.sweep is not None and placed.piece.sweep.profile.name:
            found = PATTERN.search(placed.piece.sweep.profile.name)
            if found:
                return placed.piece.sweep.profile.name
    texts = [_profile_set_name(element), *(text for text, _ in property_texts(element, names))]
    texts += [getattr(element, name, None) for name in ("Description", "Name", "ObjectType")]
    for text in texts:
        found = PATTERN.search(text) if text else None
        if found:
            return found.group(0)
    return None


def _profile_set_name(element: Any) -> str | None:
    material = element_util.get_material(element, should_skip_usage=True)
    if material is None or not material.is_a("IfcMaterialProfileSet"):
        return None
    profile = material.MaterialProfiles[0].Profile
    name = (profile.ProfileName if profile is not None else None) or material.Name
    return str(name) if name else None
