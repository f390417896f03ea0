"""What is wrong with a model's elements, told with the element."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import Any

from ..model.findings import Problem
from .bodies import PlacedPiece


def doubled_ids(elements: Sequence[Any]) -> Iterator[Problem]:
    """Yield a problem for every GlobalId that two elements or more have."""
    owners: dict[str, list[Any]] = {}
    for element in elements:
        owners.setdefault(element.GlobalId, []).append(element)
    for guid, those in owners.items():
        if len(those) > 1:
            told = ", ".join(f"#{each.id()} ({each.is_a()})" for each in those)
            yield Problem(element=guid, message=f"one GlobalId stands for {len(those)} elements: {told}")


def body_faults(pieces: Sequence[PlacedPiece]) -> Iterator[str]:
    """Yield what is wrong with an element's body: shells that do not close."""
    read = [placed.piece for placed in pieces if placed.piece.sweep is None and placed.piece.cut_from is None]
    edges = sum(piece.solid.open_edges for piece in read if piece.solid.is_open)
    if edges:
        yield f"its body is an open shell ({edges} edges bound one face only); what is measured on it may be off"
