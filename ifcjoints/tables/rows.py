"""The rows of this package's CSV files. Lines that begin with # tell each file's sources."""

from __future__ import annotations

import csv
from importlib.resources import files


def rows_of(name: str) -> list[dict[str, str]]:
    """Return the rows of a table, each by its column names."""
    text = (files(__package__) / name).read_text(encoding="utf-8")
    return list(csv.DictReader(line for line in text.splitlines() if not line.startswith("#")))
