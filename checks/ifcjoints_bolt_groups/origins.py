"""Where a joint's figure came from, in the words of the trace."""

from __future__ import annotations

from ifcjoints.checking import Subject


def origin(subject: Subject, key: str, otherwise: str = "origin not recorded") -> str:
    """Return the provenance of a figure of the joint as "source: detail"."""
    told = subject.joint.provenance.get(key)
    return f"{told.source}: {told.detail}" if told else otherwise
