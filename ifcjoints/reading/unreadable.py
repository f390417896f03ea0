"""The sign that a shape cannot be read straight from its entities and must be triangulated."""

from __future__ import annotations


class Unreadable(Exception):  # noqa: N818 - a turn in the road, not an error
    """This shape cannot be read from its entities; the text says why."""
