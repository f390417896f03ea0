"""A member's section designation, as far as the model names one."""

from __future__ import annotations

import re
from typing import Any

import ifcopenshell.util.element as element_util

from .bodies import PlacedPiece
from .properties import PropertyTable

BY_DEPTH = r"IPE|IPN|HE|HEA|HEB|HEM|HEAA|UPN|UPE|UNP|INP|PIPE"
"""Series whose sections are named by one number, the depth, and perhaps a variant: HE 240 B, IPE 400 A."""

BY_SIZES = r"W|WT|HP|MC|C|S|M|ST|MT|L|T|HSS|TS|HD|HL|RHS|SHS|CHS|UB|UC|UKB|UKC|PFC|UKPFC|U|I|H"
"""Series named by sizes or by depth and mass, with a cross between: W16x36, L100x100x10. A mark such as C1 is none."""

NUMBER, CROSS = r"(?:(?:\d+[- ])?\d+/\d+|\d+(?:[.,]\d+)?)", r"\s?[x×*]\s?"
PATTERN = re.compile(
    rf"(?<![A-Z0-9])(?:(?:{BY_DEPTH})[\s-]?\d{{2,4}}(?:\s?(?:AA|A|B|M|O|R|V))?(?![A-Z0-9])"
    rf"|PIPE\s?{NUMBER}\s?(?:STD|XS|XXS)"
    rf"|(?:{BY_SIZES})[\s-]?{NUMBER}(?:{CROSS}{NUMBER}){{1,3}}(?![A-Z0-9])"
    rf"|{NUMBER}(?:{CROSS}{NUMBER}){{2}}\s?(?:UKB|UKC|UB|UC|PFC|UKPFC)(?![A-Z0-9]))",
    re.IGNORECASE,
)
"""The shape of a designation, not a list of sections."""


def read_designation(element: Any, pieces: list[PlacedPiece], properties: PropertyTable) -> str | None:
    """Return the section's name from the profile, the material's profile set, a property or the element's texts."""
    for placed in pieces:
        if placed.piece.sweep is not None and placed.piece.sweep.profile.name:
            found = PATTERN.search(placed.piece.sweep.profile.name)
            if found:
                return placed.piece.sweep.profile.name
    texts: list[tuple[str | None, str | None]] = [(_profile_set_name(element), None)]
    texts += [(str(stated.value), stated.origin) for stated in properties.stated(element, "designation")]
    texts += [(getattr(element, name, None), None) for name in ("Description", "Name", "ObjectType")]
    for text, origin in texts:
        found = PATTERN.search(text) if text else None
        if found:
            properties.used.update([origin] if origin else [])
            return found.group(0)
    return None


def _profile_set_name(element: Any) -> str | None:
    material = element_util.get_material(element, should_skip_usage=True)
    if material is None or not material.is_a("IfcMaterialProfileSet"):
        return None
    profile = material.MaterialProfiles[0].Profile
    name = (profile.ProfileName if profile is not None else None) or material.Name
    return str(name) if name else None
