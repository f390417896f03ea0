"""What properties mean: rows of one's own go first; numbers and texts with units; the count of what was used."""

import pytest

from ifcjoints.reading.properties import PropertyTable
from ifcjoints.settings import ReadingSettings, read_settings
from sample_models.making import Model

TOML = """
[[reading.properties]]
meaning = "bolt_diameter"
property = "Yard data.Durchmesser"
unit = "in"

[[reading.properties]]
meaning = "bolt_grade"
property = "*.Festigkeit"
"""


def bolt_with(model, set_name, **values):
    bolt = model.rooted("IfcMechanicalFastener", Name="bolt")
    model.properties(bolt, set_name, **values)
    return bolt


def test_rows_in_toml_teach_a_new_exporter(tmp_path):
    path = tmp_path / "settings.toml"
    path.write_text(TOML, encoding="utf-8")
    model = Model(unit=1000.0)
    bolt = bolt_with(model, "Yard data", Durchmesser="0.75", Festigkeit="10.9", BoltGrade="8.8")
    table = PropertyTable(read_settings(path).reading, 1000.0)
    assert table.length(bolt, "bolt_diameter") == (pytest.approx(19.05), "Yard data.Durchmesser")
    assert table.text(bolt, "bolt_grade") == "10.9"
    assert dict(table.used) == {"Yard data.Durchmesser": 1, "Yard data.Festigkeit": 1}


@pytest.mark.parametrize(
    ("text", "mm", "sure"),
    [
        ("24", 24 * 304.8, False),
        ("24 mm", 24.0, True),
        ("2.4 cm", 24.0, True),
        ('3/4"', 19.05, True),
        ("2 1/4 in", 57.15, True),
        ("2-1/4 in.", 57.15, True),
        ("0.02 m", 20.0, True),
        ("M24", None, None),
        ("20-24", None, None),
        ("a 6", None, None),
    ],
)
def test_lengths_in_texts(text, mm, sure):
    model = Model(unit=304.8)
    table = PropertyTable(ReadingSettings(), 304.8)
    found = table.lengths(bolt_with(model, "Own", BoltDiameter=text), "bolt_diameter")
    assert found == ([] if mm is None else [(pytest.approx(mm), "Own.BoltDiameter", sure)])


def test_a_set_s_own_row_goes_before_any_set_s():
    model = Model()
    bolt = bolt_with(model, "Other", BoltGrade="4.6")
    model.properties(bolt, "AISC_EM11_Pset_Bolt", BoltGrade="A325N")
    stated = PropertyTable(ReadingSettings(), 1.0).stated(bolt, "bolt_grade")
    assert stated[0].value == "A325N"


def test_nothing_is_counted_that_was_not_taken():
    model = Model()
    table = PropertyTable(ReadingSettings(), 1.0)
    bolt = bolt_with(model, "Own", BoltDiameter=24.0)
    table.lengths(bolt, "bolt_diameter")
    assert not table.used
    table.count("Own.BoltDiameter")
    table.count("IfcMechanicalFastener.NominalDiameter")
    assert dict(table.used) == {"Own.BoltDiameter": 1}
