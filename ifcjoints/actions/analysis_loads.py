"""The resultant of the loads of a case, to hold its support reactions against: they must be opposite."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from typing import Any

import numpy as np

from ..model.units import Array
from .analysis_model import StructuralModel

Resultant = Callable[[Any], "Array | None"]
"""Tells one action's resultant force (3,) in the world, N; None where it cannot be told."""


def resultant_of(group: Any, resultant: Resultant, depth: int = 0) -> Array | None:
    """Return the resultant (3,) of a load group, case or combination; None unless all of it can be told."""
    if depth > 10 or any(getattr(group, "SelfWeightCoefficients", None) or ()):
        return None
    total = np.zeros(3)
    for load, factor in _parts(group):
        if load.is_a("IfcStructuralLoadGroup"):
            own = load.Coefficient
            inner = resultant_of(load, resultant, depth + 1)
            part = None if inner is None else inner * (1.0 if own is None else float(own))
        else:
            part = resultant(load)
        if part is None:
            return None
        total += factor * part
    return total


def _parts(group: Any) -> Iterator[tuple[Any, float]]:
    """Yield the actions and groups in a load group, with the factors they enter it by."""
    for rel in group.IsGroupedBy:
        factor = float(rel.Factor) if rel.is_a("IfcRelAssignsToGroupByFactor") else 1.0
        for each in rel.RelatedObjects:
            if each.is_a("IfcStructuralLoadGroup") or each.is_a("IfcStructuralAction"):
                yield each, factor


def reactions_follow_loads(model: StructuralModel, share: float) -> bool:
    """Whether the support reactions of any case are its loads again, not their opposites, within a share."""
    for case, load in model.loads.items():
        held = np.zeros(3)
        for reaction in model.reactions:
            if reaction.case.name == case and reaction.item in model.connections and not reaction.doubt:
                held += np.nan_to_num(reaction.samples[0].force) @ reaction.basis
        size = float(np.linalg.norm(load))
        if size > 0 and float(np.linalg.norm(held - load)) <= share * size:
            return True
    return False
