"""The table of design actions: a CSV file with the header `member,end,case,N_kN,V_kN,M_kNm`.

`member` is a GlobalId, tag, name or mark; `end` is `start`, `end` or empty for both. The columns may
stand in any order. Nothing is guessed: whatever does not read as one plain number in a table of just
these columns is refused, with the file and the line.
"""

from __future__ import annotations

import csv
import math
import re
from collections.abc import Iterator
from dataclasses import dataclass
from io import StringIO
from pathlib import Path

from ..errors import ActionsError
from ..model.actions import Action, Forces
from ..model.joints import MemberEnd

COLUMNS = ("member", "end", "case", "N_kN", "V_kN", "M_kNm")
HEADER = ",".join(COLUMNS)
ENDS: dict[str, MemberEnd | None] = {"start": "start", "end": "end", "": None}

# Stricter than float(), which also takes nan, inf and 1_000.
_NUMBER = re.compile(r"[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?", re.ASCII)


@dataclass(frozen=True, slots=True)
class ActionRow:
    """One line of the table: the forces at a member's end (`end` None: at both) in one case."""

    line: int
    member: str
    end: MemberEnd | None
    action: Action


def read_actions(path: Path) -> tuple[ActionRow, ...]:
    """Read a table of design actions. ActionsError names the file, the line and the remedy."""
    lines = _lines(path)
    first = next(lines, None)
    if first is None:
        raise ActionsError(f"{path}: the table is empty; its first line must be {HEADER}.")
    order = _column_order(path, *first)
    rows: dict[tuple[str, str, str], ActionRow] = {}
    for number, cells in lines:
        row = _row(f"{path}, line {number}", number, cells, order)
        earlier = rows.setdefault((row.member, row.end or "", row.action.case), row)
        if earlier is not row:
            raise ActionsError(
                f"{row.action.source}: this repeats line {earlier.line} "
                f"(member {row.member}, end {row.end or 'both'}, case {row.action.case}); keep one of them."
            )
    if not rows:
        raise ActionsError(f"{path}: the table has a header but no line of actions.")
    return tuple(rows.values())


def _lines(path: Path) -> Iterator[tuple[int, list[str]]]:
    """Yield the table's lines with their numbers, cells stripped; blank lines left out."""
    try:
        text = path.read_bytes().decode("utf-8-sig")
    except OSError as error:
        raise ActionsError(f"{path}: the actions cannot be read ({error.strerror}).") from error
    except UnicodeDecodeError as error:
        raise ActionsError(f"{path}: this is not UTF-8 text; save the table as CSV in UTF-8.") from error
    if "\0" in text:
        raise ActionsError(f"{path}: this is not a CSV table; save the table as CSV in UTF-8.")
    reader = csv.reader(StringIO(text, newline=""), strict=True)
    try:
        for cells in reader:
            stripped = [cell.strip() for cell in cells]
            if any(stripped):
                yield reader.line_num, stripped
    except csv.Error as error:
        raise ActionsError(f"{path}, line {reader.line_num}: this is not a CSV line ({error}).") from error


def _column_order(path: Path, line: int, header: list[str]) -> list[int]:
    """Return where each of COLUMNS stands in the header."""
    place = f"{path}, line {line}"
    for separator, name in ((";", "semicolons"), ("\t", "tabs")):
        if any(separator in cell for cell in header):
            raise ActionsError(
                f"{place}: {name} part the columns; part them by commas and write decimals with a point."
            )
    missing = [name for name in COLUMNS if name not in header]
    unknown = [name for name in header if name not in COLUMNS]
    doubled = [name for name in COLUMNS if header.count(name) > 1]
    for word, names in (("lacks", missing), ("has the unknown column", unknown), ("doubles", doubled)):
        if names:
            listed = ", ".join(f'"{name}"' for name in names)
            raise ActionsError(f"{place}: the header {word} {listed}; it must be {HEADER}.")
    return [header.index(name) for name in COLUMNS]


def _row(place: str, line: int, cells: list[str], order: list[int]) -> ActionRow:
    if len(cells) != len(COLUMNS):
        raise ActionsError(
            f"{place}: {len(cells)} values stand under {len(COLUMNS)} columns "
            "(decimals are written with a point, a text that holds a comma in quotes)."
        )
    member, end, case, *figures = (cells[place_of] for place_of in order)
    if not member or not case:
        raise ActionsError(f"{place}: the {'case' if member else 'member'} is not named.")
    if end.lower() not in ENDS:
        raise ActionsError(f'{place}: the end "{end}" is neither start nor end; leave it empty for both.')
    forces = Forces(**{name: _number(place, name, text) for name, text in zip(COLUMNS[3:], figures, strict=True)})
    return ActionRow(line, member, ENDS[end.lower()], Action(case=case, forces=forces, source=place))


def _number(place: str, column: str, text: str) -> float:
    if not _NUMBER.fullmatch(text) or not math.isfinite(float(text)):
        raise ActionsError(f'{place}: {column} is "{text}", which is no plain number (write 12.5; no comma, no unit).')
    return float(text)
