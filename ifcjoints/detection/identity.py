"""A joint's id."""

from __future__ import annotations

import hashlib
from collections.abc import Iterable


def joint_id(global_ids: Iterable[str], taken: set[str]) -> str:
    """Return an id that is the same for the same elements, and unique in this model."""
    plain = "J-" + hashlib.sha256(" ".join(sorted(global_ids)).encode()).hexdigest()[:8].upper()
    name, number = plain, 2
    while name in taken:
        name, number = f"{plain}-{number}", number + 1
    taken.add(name)
    return name
