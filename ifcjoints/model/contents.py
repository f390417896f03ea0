"""What a model holds for us: its parts, bolts and welds, and what was wrong with it."""

from __future__ import annotations

from dataclasses import dataclass

from .audit import ModelFile
from .findings import Problem
from .parts import Bolt, MemberName, Part, WeldPart


@dataclass(frozen=True, slots=True, eq=False)
class Contents:
    """Everything that was read from one model: the parts near bolts, out of `bodies` in all."""

    model: ModelFile
    parts: tuple[Part, ...]
    bodies: int
    bolts: tuple[Bolt, ...]
    welds: tuple[WeldPart, ...]
    names: tuple[MemberName, ...]
    problems: tuple[Problem, ...]
