"""Stated sizes against drawn ones, in any unit, and sizes out of names."""

import math

import numpy as np
import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from ifcjoints.reading.axial import BoltBody
from ifcjoints.reading.bolt_sizes import (
    SERIES,
    StatedSize,
    settle_diameter,
    settle_length,
    sizes_in_texts,
    true_diameter,
)

INCH = 25.4


def body(diameter, flats=None, length=80.0):
    return BoltBody(np.zeros(3), np.array([0, 0, 1.0]), length, diameter, flats or diameter, True)


@pytest.mark.parametrize("size", SERIES)
@pytest.mark.parametrize("facets", [6, 8, 12, 16, 24])
def test_the_true_diameter_of_polygons_inside_and_outside_the_circle(facets, size):
    ratio = math.cos(math.pi / facets)
    for corners, flats in ((size, size * ratio), (size / ratio, size)):
        settled = true_diameter(corners, flats)
        assert settled.provenance.source == "measured"
        told_both = f"{corners:.2f} mm" in settled.provenance.detail
        assert settled.value == pytest.approx(size, rel=0.004) or (settled.value < size and told_both)


def test_a_hexagon_that_may_be_of_two_sizes_is_taken_for_the_smaller():
    """M22 over its corners is 19.05 mm, 3/4 in., over its flats."""
    settled = true_diameter(22.0, 22.0 * math.cos(math.pi / 6))
    assert settled.value == pytest.approx(0.75 * INCH, rel=1e-3)
    assert "22.00 mm" in settled.provenance.detail


def test_facets_off_every_size_give_the_smaller_diameter_and_say_both():
    settled = true_diameter(21.0, 20.6)
    assert settled.value == 20.6
    assert "21.00" in settled.provenance.detail


@pytest.mark.parametrize("facets", [6, 8, 12])
def test_a_stated_diameter_decides_between_corners_and_flats(facets):
    ratio = math.cos(math.pi / facets)
    for shank in (body(20.0, 20.0 * ratio), body(20.0 / ratio, 20.0)):
        settled = settle_diameter([StatedSize(20.0, "A")], shank, 1.0)
        assert (settled.value, settled.conflict) == (20.0, None)


UNITS = {"mm": 1.0, "inches": INCH, "metres": 1000.0, "feet": 304.8, "cm": 10.0}


@given(
    size=st.sampled_from([d for d in SERIES if 10 <= d <= 40]),
    meant=st.sampled_from(["model", "mm", "inches"]),
    model=st.sampled_from(sorted(UNITS)),
    drawn=st.booleans(),
)
def test_any_unit_is_understood(size, meant, model, drawn):
    number = size / UNITS[model if meant == "model" else meant]
    stated = [StatedSize(number * UNITS[model], "A")]
    assume(drawn or meant == "model" or not 5.0 <= stated[0].value <= 100.0)
    settled = settle_diameter(stated, body(size) if drawn else None, UNITS[model])
    assert settled.value == pytest.approx(size)
    assert settled.provenance.source == "read"
    assert settled.conflict is None


@pytest.mark.parametrize(("stated", "drawn"), [(20.0, 22.0), (19.05, 20.0), (24.0, 22.225), (24.0, 25.4), (27.0, 24.0)])
def test_neighbouring_sizes_are_a_conflict_that_names_both(stated, drawn):
    settled = settle_diameter([StatedSize(stated, "A")], body(drawn), 1.0)
    assert settled.value == min(stated, drawn)
    assert f"{stated:.1f} mm" in settled.conflict
    assert f"{drawn:.1f} mm" in settled.conflict


def test_two_statements_that_disagree_are_told_even_where_the_shank_settles_it():
    stated = [StatedSize(16.0, "attribute"), StatedSize(24.0, "name", True)]
    settled = settle_diameter(stated, body(24.0), 1.0)
    assert settled.value == 24.0
    assert "16.0 mm (attribute)" in settled.conflict
    assert settle_diameter(stated, None, 1.0).conflict is not None


def test_nothing_stated_and_nothing_drawn_is_unknown():
    assert settle_diameter([], None, 1.0).value is None
    assert settle_length([], None, 1.0).value is None
    assert settle_diameter([StatedSize(3000.0, "A", True)], None, 1.0).value is None


def test_a_length_that_disagrees_is_told_and_the_drawn_one_taken():
    settled = settle_length([StatedSize(60.0, "A")], body(24.0, length=80.0), 1.0)
    assert settled.value == 80.0
    assert "60.0 mm" in settled.conflict
    assert settle_length([StatedSize(80.4, "A")], body(24.0, length=80.0), 1.0).conflict is None


@pytest.mark.parametrize(
    ("text", "diameter", "length"),
    [
        ("M20x60 8.8", 20, 60),
        ("M 24 x 80", 24, 80),
        ("HEX BOLT M24*80-10.9", 24, 80),
        ("BOLTM20*40", 20, 40),
        ("HM16", 16, None),
        ("M20x2.5x60", 20, 60),
        ("M30", 30, None),
        ("D=3/4 L=2 1/4 Site A325N", 0.75 * INCH, 2.25 * INCH),
        ("D=1 1/8 L=4", 1.125 * INCH, 4 * INCH),
        ("D=0.75 L=2.5", 0.75 * INCH, 2.5 * INCH),
        ("D=20 L=60", 20, 60),
        ('7/8" x 3 1/2" A490', 0.875 * INCH, 3.5 * INCH),
        ("3/4 x 2-1/4 A325", 0.75 * INCH, 2.25 * INCH),
        ("1 in. bolt", INCH, None),
        ("8.8", None, None),
        ("Bolt 12", None, None),
        ("A325N", None, None),
        ("IPE 300 M1", None, None),
    ],
)
def test_sizes_in_names(text, diameter, length):
    diameters, lengths = sizes_in_texts([(text, "IfcMechanicalFastener.Name")])
    assert [each.value for each in diameters] == ([] if diameter is None else [pytest.approx(diameter)])
    assert [each.value for each in lengths] == ([] if length is None else [pytest.approx(length)])
