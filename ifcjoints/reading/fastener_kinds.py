"""What a fastener is, by its predefined type and by what its texts say."""

from __future__ import annotations

import re
from functools import cache
from typing import Any

from ..model.parts import BoltKind

Texts = list[tuple[str, str]]
"""Texts, each with where it stands."""

NO_BOLT_WORDS: tuple[tuple[BoltKind, str], ...] = (
    ("stud", r"\bstud|shear ?connector"),
    ("anchor", r"anchor|holding[ -]?down"),
    ("loose_part", r"^\W*(nut|washer)s?\b"),
    ("other", r"\b(nail|dowel|rivet|staple)s?\b|(self|wood|deck|roof)\w*[ -](drilling|tapping|screw)|\btek\b"),
    ("other", r"\bscrew"),
)
"""Words of a fastener that is no bolt. They are tried in this order on every text."""

STRUCTURAL_SCREW = r"\bM\s?\d{2}\b|\d\.\d|hex"
"""A hexagon head screw of the bolt series (ISO 4017) is a bolt threaded to its head: told by size, class or head."""

PREDEFINED: dict[str, BoltKind] = {
    "ANCHORBOLT": "anchor", "BOLT": "bolt", "STUDSHEARCONNECTOR": "stud", "SHEARCONNECTOR": "stud"
}  # fmt: skip
UNDEFINED = (None, "NOTDEFINED", "USERDEFINED")

NAMED_BOLT = re.compile(r"bolt(?!ed)|\bM\s?\d{2}\s*[xX*×]\s*\d{2}|\bD=\S+.* L=", re.IGNORECASE)
"""A name that only a bolt has, whatever the class of its element."""


def texts_of(element: Any, owner: Any) -> Texts:
    """Return the texts that may tell what a fastener is, each with where it stands: its own, then its type's."""
    found = []
    for each in (element, owner) if owner is not None else (element,):
        for name in ("ObjectType", "ElementType", "Description", "Name", "Tag"):
            text = getattr(each, name, None)
            if text:
                found.append((str(text), f"{each.is_a()}.{name}"))
    return found


def kind_of(element: Any, owner: Any, texts: Texts) -> tuple[BoltKind, str]:
    """Tell bolts from anchors, studs and the rest, and why: by predefined type, then by what the texts say."""
    for each in (element, owner):
        predefined = getattr(each, "PredefinedType", None)
        if predefined not in UNDEFINED:
            return PREDEFINED.get(predefined, "other"), f"predefined type {predefined}"
    for text, origin in texts:
        kind = _kind_in(text)
        if kind is not None:
            return kind, f'{origin} "{text.strip()}"'
    return "bolt", "no other kind named"


@cache
def _kind_in(text: str) -> BoltKind | None:
    for kind, words in NO_BOLT_WORDS:
        if re.search(words, text, re.IGNORECASE) and not _is_structural_screw(words, text):
            return kind
    return None


def _is_structural_screw(words: str, text: str) -> bool:
    return words == r"\bscrew" and re.search(STRUCTURAL_SCREW, text, re.IGNORECASE) is not None


def is_named_bolt(element: Any) -> bool:
    """Whether an element of any class is called a bolt, or by a bolt's size."""
    texts = (getattr(element, name, None) for name in ("Name", "ObjectType", "Description"))
    return any(NAMED_BOLT.search(text) for text in texts if text)
