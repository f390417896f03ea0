"""Whether a member's body agrees with the section that its designation names."""

from __future__ import annotations

from collections.abc import Iterable, Iterator

from ..model.findings import Finding
from ..model.parts import Part
from ..tables.sections import section_size

SAME_SIZE = (2.5, 0.01)
"""Depth and width agree within so many mm, or this share: handbooks round (American ones to a tenth of an inch)."""

SAME_THICKNESS = (0.8, 0.05)


def section_conflicts(parts: Iterable[Part]) -> Iterator[Finding]:
    """Yield a finding for each member whose section is not the one its designation names in the handbook."""
    for part in parts:
        size = section_size(part.designation) if part.designation else None
        if part.member is None or size is None:
            continue
        own = part.member.section
        for name, found, stated, (least, share) in (
            ("h", own.h, size.h, SAME_SIZE),
            ("b", own.b, size.b, SAME_SIZE),
            ("tw", own.tw, size.tw, SAME_THICKNESS),
            ("tf", own.tf, size.tf, SAME_THICKNESS),
        ):
            if found is not None and stated is not None and abs(found - stated) > max(least, share * stated):
                how = "states" if part.member.stated else "measures"
                yield Finding(
                    code="data-conflict",
                    severity="warning",
                    message=f"{part.name}: {part.designation} has {name} = {stated:.1f} mm in the handbook, "
                    f"the model's body {how} {found:.1f} mm",
                    elements=(part.global_id,),
                    value=round(found, 4),
                    limit=stated,
                    reference="tables/sections.csv",
                )
                break
