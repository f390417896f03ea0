"""Joints alike in everything but place are one family; the one that differs from its equals is told."""

from __future__ import annotations

from collections import Counter
from collections.abc import Iterator
from dataclasses import dataclass, field

from ..model.findings import Finding
from ..model.joints import Flange, Joint, JointMember, JointPlate, Provenance
from ..model.units import Mm

SAME: Mm = 0.15
"""Figures of one family differ by less (mm, degrees): twice what reading and rounding may do."""

LEAST_EQUALS = 3
"""A joint is an outlier where at least this many joints are equal in what it differs in."""

GAUGE = "gauge"
"""Under this the gauge stands that all rows share; each row's own stands besides."""

Key = tuple[object, ...]
Hand = tuple[tuple[float, ...], ...]


@dataclass(frozen=True, slots=True)
class Likeness:
    """What a joint shares with its family: names and numbers of things, and figures; each under its own words."""

    kin: Key
    words: dict[str, str]
    figures: dict[str, float]
    hand: Hand

    def differences(self, other: Likeness) -> list[str]:
        """Return under which words the two differ. Figures that only one of them has follow from a word."""
        words = [key for key in {**self.words, **other.words} if self.words.get(key) != other.words.get(key)]
        shared = self.figures.keys() & other.figures.keys()
        figures = [key for key in self.figures if key in shared and abs(self.figures[key] - other.figures[key]) > SAME]
        alone = (self.figures.keys() ^ other.figures.keys()) - {GAUGE}
        if GAUGE in figures:
            figures = [key for key in figures if not key.endswith(f" {GAUGE}")]
        return words + figures + ([] if words else sorted(alone))

    def told(self, key: str) -> str:
        """Return what stands under a word."""
        return f"{self.figures[key]:.1f}" if key in self.figures else self.words.get(key, "none")


@dataclass(slots=True)
class _Family:
    name: str
    likeness: Likeness
    joints: list[int] = field(default_factory=list)


def with_families(joints: list[Joint]) -> list[Joint]:
    """Give joints that are alike in everything but place one family, numbered as they first occur.

    Mirrored joints share a family, and their provenance says so; an outlier gets a finding.
    """
    told = [likeness(joint) for joint in joints]
    families = _families(told)
    named = list(joints)
    for family in families:
        for number in family.joints:
            changes: dict[str, object] = {"family": family.name}
            if _is_mirrored(told[number].hand, family.likeness.hand):
                first = joints[family.joints[0]].id
                detail = f"mirrored about the member's web to the first joint of {family.name}, {first}"
                changes["provenance"] = {
                    **joints[number].provenance,
                    "family": Provenance(source="measured", detail=detail),
                }
            named[number] = joints[number].with_fields(**changes)
    for number, finding in _outliers(families, joints):
        named[number] = named[number].with_fields(findings=(*named[number].findings, finding))
    return named


def likeness(joint: Joint) -> Likeness:
    """Return what a joint shares with its family."""
    words = {
        "bolt grade": joint.bolts.grade or "none",
        "number of rows": str(len(joint.rows)),
        "supported member's grade": _grade(joint.supported),
        "supporting member's grade": _grade(joint.supporting),
    }
    words |= {f"number of {role} plates": str(n) for role, n in Counter(p.role for p in joint.plates).items()}
    figures = dict(_figures(joint))
    for prefix, plate in _numbered_plates(joint):
        words[f"{prefix} grade"] = plate.grade or "none"
    kin = (joint.configuration, joint.moment_joint, _section(joint.supported), _section(joint.supporting))
    return Likeness(kin, words, figures, _hand(joint))


def _figures(joint: Joint) -> Iterator[tuple[str, float]]:
    bolts = joint.bolts
    named = (("bolt diameter", bolts.diameter_mm), ("hole diameter", bolts.hole_diameter_mm))
    yield from ((name, value) for name, value in named if value is not None)
    if not joint.rows:
        yield "number of bolts", float(bolts.count)
    for number, row in enumerate(joint.rows, 1):
        yield f"row {number} bolts", float(row.count)
        yield f"row {number} y_bottom", row.y_bottom_mm
        yield f"row {number} {GAUGE}", row.gauge_mm or 0.0
    gauges = [row.gauge_mm or 0.0 for row in joint.rows]
    if gauges and max(gauges) - min(gauges) < SAME:
        yield GAUGE, gauges[0]
    if joint.interface is not None:
        yield "flange distance", joint.interface.flange_distance_mm
        for side, flange in (("top", joint.interface.top), ("bottom", joint.interface.bottom)):
            yield from _flange_figures(side, flange)
    for prefix, plate in _numbered_plates(joint):
        yield f"{prefix} thickness", plate.thickness_mm
        yield f"{prefix} width", plate.width_mm
        yield f"{prefix} depth", plate.depth_mm


def _flange_figures(side: str, flange: Flange) -> Iterator[tuple[str, float]]:
    yield f"{side} flange thickness", flange.thickness_mm
    yield f"{side} flange width", flange.width_mm
    yield f"{side} flange inclination", flange.inclination_deg


def _numbered_plates(joint: Joint) -> Iterator[tuple[str, JointPlate]]:
    """Yield the plates of each role, the largest first, with words for each."""
    counts: Counter[str] = Counter()
    for plate in sorted(joint.plates, key=lambda each: (each.role, -each.depth_mm, -each.width_mm, -each.thickness_mm)):
        counts[plate.role] += 1
        yield f"{plate.role} {counts[plate.role]}", plate


def _grade(member: JointMember | None) -> str:
    return (member.grade if member is not None else None) or "none"


def _section(member: JointMember | None) -> Key:
    if member is None or member.section is None:
        return ()
    section = member.section
    return (section.shape, round(section.h_mm), round(section.b_mm))


def _hand(joint: Joint) -> Hand:
    """Return where things lie across the web: the bolts of each row, and the end plate's two edges."""
    plate = next((shape for shape in joint.front if shape.role == "end_plate"), None)
    edges = [x for x, _ in plate.rings[0]] if plate is not None and plate.rings else [0.0]
    return (*(tuple(sorted(row.x_mm)) for row in joint.rows), (min(edges), max(edges)))


def _is_same(hand: Hand, other: Hand) -> bool:
    if [len(row) for row in hand] != [len(row) for row in other]:
        return False
    return all(abs(a - b) < SAME for one, its in zip(hand, other, strict=True) for a, b in zip(one, its, strict=True))


def _is_mirrored(hand: Hand, other: Hand) -> bool:
    """Whether two joints lie mirrored, row for row, and not just as well alike."""
    return not _is_same(hand, other) and _is_same(hand, tuple(tuple(-x for x in reversed(row)) for row in other))


def _families(told: list[Likeness]) -> list[_Family]:
    families: list[_Family] = []
    by_words: dict[Key, list[_Family]] = {}
    for number, each in enumerate(told):
        known = by_words.setdefault((each.kin, *sorted(each.words.items())), [])
        family = next((family for family in known if _alike(each, family.likeness)), None)
        if family is None:
            family = _Family(f"F{len(families) + 1:02d}", each)
            families.append(family)
            known.append(family)
        family.joints.append(number)
    return families


def _alike(one: Likeness, other: Likeness) -> bool:
    return not one.differences(other) and (_is_same(one.hand, other.hand) or _is_mirrored(one.hand, other.hand))


def _outliers(families: list[_Family], joints: list[Joint]) -> Iterator[tuple[int, Finding]]:
    """Yield each joint that stands alone but for one figure, in which at least three others are equal."""
    large: dict[Key, list[_Family]] = {}
    for family in families:
        if len(family.joints) >= LEAST_EQUALS:
            large.setdefault(family.likeness.kin, []).append(family)
    for family in families:
        if len(family.joints) > 1:
            continue
        for equals in large.get(family.likeness.kin, ()):
            differing = family.likeness.differences(equals.likeness)
            if len(differing) == 1:
                yield family.joints[0], _outlier(family.likeness, equals, differing[0], joints[family.joints[0]])
                break


def _outlier(own: Likeness, equals: _Family, key: str, joint: Joint) -> Finding:
    message = (
        f"{key} is {own.told(key)} where the {len(equals.joints)} otherwise equal joints of {equals.name} "
        f"have {equals.likeness.told(key)}"
    )
    value, limit = (each.figures.get(key) for each in (own, equals.likeness))
    return Finding(
        code="family-outlier",
        severity="note",
        message=message,
        elements=joint.bolts.global_ids,
        value=value,
        limit=limit,
    )
