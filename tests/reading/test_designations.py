"""What is a section's designation in the texts that models hold, and what is a mark or a plate's size."""

from __future__ import annotations

import pytest

from ifcjoints.reading.designations import PATTERN


@pytest.mark.parametrize(
    ("text", "designation"),
    [
        ("IPE 400", "IPE 400"), ("Rafter IPE400 S355", "IPE400"), ("HE 240 B", "HE 240 B"), ("HEB 300", "HEB 300"),
        ("HE240A", "HE240A"), ("HEA-300 col", "HEA-300"), ("UPN 200", "UPN 200"), ("W16x36", "W16x36"),
        ("w10 W12x53", "W12x53"), ("W 18X50", "W 18X50"), ("HSS6x6x3/8", "HSS6x6x3/8"), ("L4x4x1/4", "L4x4x1/4"),
        ("L100x10", "L100x10"), ("C8x11.5", "C8x11.5"), ("533x210x92 UKB", "533x210x92 UKB"),
        ("UB457x191x67", "UB457x191x67"), ("HEB 300 / 6 m", "HEB 300"), ("SHS 100x100x8", "SHS 100x100x8"),
        ("RHS 200×100×8", "RHS 200×100×8"), ("IPE 400 A", "IPE 400 A"), ("PIPE3-1/2STD", "PIPE3-1/2STD"),
    ],
)  # fmt: skip
def test_designations(text, designation):
    found = PATTERN.search(text)
    assert (found.group(0) if found else None) == designation


@pytest.mark.parametrize(
    "text",
    ["C1", "B1", "S275", "S355J2", "L1", "T3", "W4", "HP-2", "PL20x200", "Beam", "FL12*150",
     "C-101", "Column C12", "S 355", "H1", "U2", "A325"],
)  # fmt: skip
def test_marks_grades_and_plates_are_none(text):
    assert PATTERN.search(text) is None
