"""What a model holds for us: its parts, bolts and welds, and what was wrong with it."""

from __future__ import annotations

from dataclasses import dataclass

from .audit import ModelFile
from .findings import Problem
from .parts import Bolt, MemberName, Part, WeldPart


@dataclass(frozen=True, slots=True, eq=False)
class Contents:
    """Everything that was read from one model: the parts near bolts, out of `bodies` in all.

    `properties_used` counts how often each property, as "Set.Property", gave what was read.
    """

    model: ModelFile
    parts: tuple[Part, ...]
    bodies: int
    bolts: tuple[Bolt, ...]
    welds: tuple[WeldPart, ...]
    names: tuple[MemberName, ...]
    problems: tuple[Problem, ...]
    properties_used: dict[str, int]
