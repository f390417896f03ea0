"""Grades as models write them, and look-alikes that are none."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from ifcjoints.model.basis import EDITIONS
from ifcjoints.tables.bolts import UNIT_NOISE, _sizes, bolt_grade, bolt_size, tensile_stress_area
from ifcjoints.tables.rows import rows_of
from ifcjoints.tables.steels import steel_grade


@pytest.mark.parametrize(
    ("text", "name"),
    [
        ("8.8", "8.8"), ("M20x60 8.8", "8.8"), ("10.9", "10.9"), ("ISO 4014 M24 x 90-10.9", "10.9"), ("A325N", "A325N"),
        ("A325-X", "A325X"), ("A325SC", "A325SC"), ("A490", "A490"),
        ("D=3/4 L=2 1/4 Site A325N", "A325N"), ("A325M", "A325"),
        ("F1852 TC", "F1852"), ("F2280M-X", "F2280X"), ("Group 144-N", "Group 144N"), ("A490X", "A490X"),
        ("M24 10.9HV", "10.9"), ("D=3/4 L=2 A490-X", "A490X"), ("M20x60 10.9", "10.9"),
    ],
)  # fmt: skip
def test_bolt_grades(text, name):
    assert bolt_grade(text).name == name


@pytest.mark.parametrize(
    "text",
    [
        "",
        "18.8",
        "8.85",
        "M8x40",
        "A3250",
        "BA325",
        "10.9.1",
        "length 108.8",
        "L=8.8 mm",
        "8.8mm",
        "length 10.9",
        "M8.8x40",
        "grip 8.8",
        "D=5.6",
        "8.8 x 40",
        "12.9",
        "a 325 mm rod",
        "Group 130",
    ],
)
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
        ("A588", 50),
        ("A913 Grade 65", 65),
    ],
)
def test_american_grades(text, ksi):
    """ASTM minimum yield stress in ksi (from memory)."""
    assert steel_grade(text, 12.0).f_y == pytest.approx(ksi * 6.894757, rel=1e-4)


@pytest.mark.parametrize(
    "text", ["", "Steel", "S3555", "C30/37", "S350", "XS355", "A360", "A9921", "A572-65", "a 36 mm plate"]
)
def test_what_is_no_steel_grade(text):
    assert steel_grade(text, 10.0) is None


@given(
    st.sampled_from(sorted({row["name"] for row in rows_of("steel_grades.csv")})),
    st.tuples(st.floats(1.0, 150.0), st.floats(1.0, 150.0)).map(sorted),
)
def test_a_thicker_plate_is_never_stronger(name, thicknesses):
    """Yield strength falls with thickness in every product standard, and past the table there is none."""
    thin, thick = (steel_grade(name, thickness) for thickness in thicknesses)
    assert thick is None or (thin is not None and thin.f_y >= thick.f_y and thin.f_y < thin.f_u)


def test_a_plate_thicker_than_the_table_has_no_strength():
    assert steel_grade("S355", 101.0) is None


@pytest.mark.parametrize(
    ("inches", "area"), [(0.5, 0.142), (0.625, 0.226), (0.75, 0.334), (0.875, 0.462), (1.0, 0.606), (1.125, 0.763),
                         (1.25, 0.969), (1.375, 1.16), (1.5, 1.41)]
)  # fmt: skip
def test_stress_areas_of_inch_bolts(inches, area):
    """AISC Manual, Table 7-17, tensile stress areas in in² as printed to three digits (from memory)."""
    assert tensile_stress_area(inches * 25.4) / 25.4**2 == pytest.approx(area, abs=0.006 if area > 1 else 0.00051)


@pytest.mark.parametrize(
    ("diameter", "name"), [(19.05, "3/4 in"), (19.1, "3/4 in"), (15.9, "5/8 in"), (16.0, "M16"), (15.96, "M16"),
                           (22.225, "7/8 in"),
                           (22.0, "M22"), (23.9999, "M24")]
)  # fmt: skip
def test_a_size_is_told_through_the_noise_of_units(diameter, name):
    assert bolt_size(diameter).name == name


def test_no_diameter_stands_for_two_sizes():
    for tenth_of_a_hundredth in range(7000, 40000):
        d = tenth_of_a_hundredth / 1000
        assert sum(abs(size.d - d) <= UNIT_NOISE for size in _sizes()) <= 1


@pytest.mark.parametrize("diameter", [7.0, 19.3, 23.0, 26.0, 40.5])
def test_off_both_series_there_is_no_size(diameter):
    assert bolt_size(diameter) is None
    assert tensile_stress_area(diameter) is None


def test_every_row_of_the_tables_tells_its_source():
    for name in ("bolt_grades.csv", "steel_grades.csv"):
        for row in rows_of(name):
            assert len(row["source"]) > 5, row
    assert {row["standard"] for row in rows_of("bolt_grades.csv")} == set(EDITIONS)
