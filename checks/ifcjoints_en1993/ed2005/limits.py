"""What limits rows, groups of rows and the whole joint: the results of the components, ready for the assembly."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Generic, Literal

from ifcjoints.checking import N

Component = Literal[
    "column flange in bending",
    "end plate in bending",
    "column web in tension",
    "beam web in tension",
    "punching of the column flange",
    "punching of the end plate",
    "column web panel in shear",
    "column web in compression",
    "beam flange and web in compression",
]


@dataclass(frozen=True, slots=True)
class Limit(Generic[N]):
    """What a component allows one row, or a group of rows that follow each other, to carry together; N.

    Rows are numbered from 0, the farthest from the centre of compression. A T-stub tells its mode, and the pattern of
    yield lines where the mode has one.
    """

    rows: tuple[int, ...]
    component: Component
    resistance: N
    where: str = ""
    mode: str = ""
    pattern: str = ""

    def __str__(self) -> str:
        """Tell rows, component, mode and pattern."""
        words = [rows_in_words(self.rows), named(self.component, self.where), self.mode, self.pattern]
        return ", ".join(word for word in words if word)


@dataclass(frozen=True, slots=True)
class Cap(Generic[N]):
    """What a component allows all rows to carry together: V_wp,Rd/β, or a resistance in compression; N."""

    component: Component
    resistance: N
    where: str = ""

    def __str__(self) -> str:
        """Tell the component."""
        return named(self.component, self.where)


def named(component: str, where: str) -> str:
    """Return a component's name, with where it is in a joint that has two of it."""
    return f"{component} ({where})" if where else component


def rows_in_words(rows: tuple[int, ...]) -> str:
    """Return rows as a person counts them, from 1."""
    return f"row {rows[0] + 1}" if len(rows) == 1 else f"rows {rows[0] + 1}-{rows[-1] + 1}"


def rows_in_figures(rows: tuple[int, ...]) -> str:
    """Return rows for a symbol's index, counted from 1."""
    return f"{rows[0] + 1}" if len(rows) == 1 else f"{rows[0] + 1}-{rows[-1] + 1}"
