"""Grades as models write them, and look-alikes that are none."""

import pytest

from ifcjoints.tables.bolts import bolt_grade, tensile_stress_area
from ifcjoints.tables.steels import steel_grade


@pytest.mark.parametrize(
    ("text", "name"),
    [
        ("8.8", "8.8"), ("M20x60 8.8", "8.8"), ("10.9", "10.9"), ("ISO 4014 M24 x 90-10.9", "10.9"), ("A325N", "A325N"),
        ("A325-X", "A325X"), ("A325SC", "A325SC"), ("A490", "A490"),
        ("D=3/4 L=2 1/4 Site A325N", "A325N"), ("A325M", "A325"),
    ],
)  # fmt: skip
def test_bolt_grades(text, name):
    assert bolt_grade(text).name == name


@pytest.mark.parametrize("text", ["", "18.8", "8.85", "M8x40", "A3250", "BA325", "10.9.1", "length 108.8"])
def test_what_is_no_bolt_grade(text):
    assert bolt_grade(text) is None


def test_threads_lie_in_the_shear_plane_unless_the_grade_says_otherwise():
    """AISC 360-22, Table J3.2 (seen in print): F_nv of Group 120 is 54 ksi, or 68 ksi with the threads out."""
    ksi = 6.894757
    assert bolt_grade("A325").F_nv == pytest.approx(54 * ksi, rel=1e-4)
    assert bolt_grade("A325N").F_nv == pytest.approx(54 * ksi, rel=1e-4)
    assert bolt_grade("A325X").F_nv == pytest.approx(68 * ksi, rel=1e-4)
    assert bolt_grade("A490X").F_nt == pytest.approx(113 * ksi, rel=1e-4)


@pytest.mark.parametrize(
    ("text", "thickness", "f_y"),
    [
        ("S355JR", 16.0, 355), ("STEEL/S355J2", 16.1, 345), ("S275J0+AR", 40.0, 265), ("S275", 41.0, 255),
        ("S235JR", 63.0, 215),
        ("S460N", 10.0, 460), ("S355J2", 100.0, 315),
    ],
)  # fmt: skip
def test_yield_strengths_by_thickness(text, thickness, f_y):
    """EN 10025-2, and EN 10025-3 for S460 (from memory)."""
    assert steel_grade(text, thickness).f_y == f_y


@pytest.mark.parametrize(
    ("text", "ksi"),
    [
        ("A992 Wide Flange Steel: fu=65  fy=50", 50),
        ("A36", 36),
        ("A572 Gr. 50", 50),
        ("A500 Grade C", 50),
        ("A572-50", 50),
    ],
)
def test_american_grades(text, ksi):
    """ASTM minimum yield stress in ksi (from memory)."""
    assert steel_grade(text, 12.0).f_y == pytest.approx(ksi * 6.894757, rel=1e-4)


@pytest.mark.parametrize("text", ["", "Steel", "S3555", "C30/37", "S350", "XS355", "A360", "A9921"])
def test_what_is_no_steel_grade(text):
    assert steel_grade(text, 10.0) is None


def test_a_plate_thicker_than_the_table_has_no_strength():
    assert steel_grade("S355", 101.0) is None


@pytest.mark.parametrize("diameter", [19.05, 23.0, 7.0])
def test_off_the_metric_series_there_is_no_stress_area(diameter):
    assert tensile_stress_area(diameter) is None
