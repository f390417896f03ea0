"""Where grades and holes may stand, and what is said where they do not."""

import numpy as np
import pytest

from ifcjoints import Settings, audit
from ifcjoints.settings import PropertyRow, ReadingSettings
from sample_models.making import Model, at, box, circle

from .scenes import EndPlate, joints_of


@pytest.mark.parametrize(
    ("text", "grade"),
    [
        ("M20x60 8.8", "8.8"),
        ("HEX BOLT M24*80-10.9", "10.9"),
        ("D=3/4 L=2 1/4 Site A325N", "A325N"),
        ("3/4 in. A490-X", "A490X"),
        ("A325SC", "A325SC"),
    ],
)
@pytest.mark.parametrize("attribute", ["Name", "Description", "ObjectType"])
def test_a_grade_in_the_bolt_s_texts(attribute, text, grade):
    model = Model()
    design = EndPlate()
    design.build(model)
    for bolt in design.made["bolts"]:
        bolt.Name = "bolt"
        setattr(bolt, attribute, text)
    (joint,) = joints_of(model)
    assert joint.bolts.grade == grade
    assert text in joint.provenance["bolts.grade"].detail


def test_a_grade_in_a_property_set_of_any_exporter():
    model = Model()
    design = EndPlate()
    design.build(model)
    for bolt in design.made["bolts"]:
        bolt.Name = "bolt"
        model.properties(bolt, "Fabricator data", Festigkeit="10.9")
    assert joints_of(model)[0].bolts.grade is None
    row = PropertyRow(meaning="bolt_grade", property="Fabricator data.Festigkeit")
    taught = Settings(reading=ReadingSettings(properties=(row,)))
    (joint,) = joints_of(model, taught)
    assert joint.bolts.grade == "10.9"
    assert "Fabricator data.Festigkeit" in joint.provenance["bolts.grade"].detail


def test_bolts_of_two_grades_are_a_finding_and_no_grade_is_guessed():
    model = Model()
    design = EndPlate()
    design.build(model)
    design.made["bolts"][0].Name = "M24x80 10.9"
    (joint,) = joints_of(model)
    assert joint.bolts.grade is None
    (finding,) = [each for each in joint.findings if each.code == "mixed-bolts"]
    assert "10.9, 8.8" in finding.message


@pytest.mark.parametrize("text", ["STEEL/S355JR", "S275J0+AR", "A992 Wide Flange Steel: fu=65  fy=50", "S355J2"])
def test_a_steel_grade_in_the_material_s_name(text):
    model = Model()
    design = EndPlate()
    design.build(model)
    model.material(design.made["beam"], text)
    assert joints_of(model)[0].supported.grade == text


def test_a_steel_grade_in_a_property():
    model = Model()
    design = EndPlate()
    design.build(model)
    model.material(design.made["beam"], "Steel")
    model.properties(design.made["beam"], "Own set", Grade="S460N")
    assert joints_of(model)[0].supported.grade == "S460N"


def test_a_grade_nowhere_is_unknown_and_stops_the_check():
    model = Model()
    EndPlate().build(model)
    (joint,) = audit(model.file).joints
    assert joint.supported.grade is None
    assert {result.status for result in joint.checks} == {"not_checkable"}


def plate_with(model, rings):
    return model.product(
        "IfcPlate", "EP1", at(0, 0, 3000, (1, 0, 0), (0, 1, 0)), [model.extruded(model.outline(rings), 25.0)]
    )


def scene_without_plate(model):
    design = EndPlate()
    design.build_column(model, np.eye(4))
    design.build_beam(model, np.eye(4))
    design.build_bolts(model, np.eye(4))
    return design


def holes_as(model, design, how):
    """Drill the end plate in one of the ways that exports do."""
    places = [(x, z - design.axis_height) for x, z in design.places()]
    if how == "rings of the outline":
        plate_with(model, [box(200, 540), *[circle(13, 16, x, y) for x, y in places]])
        return
    plate = plate_with(model, [box(200, 540)])
    if how == "openings":
        for x, z in design.places():
            body = model.extruded(model.profile("IfcCircleProfileDef", Radius=13.0), 60.0)
            model.opening(plate, at(-10, x, z, (1, 0, 0)), [body])


@pytest.mark.parametrize("how", ["rings of the outline", "openings"])
def test_round_holes(how):
    model = Model()
    holes_as(model, scene_without_plate(model), how)
    assert joints_of(model)[0].bolts.hole_diameter_mm == pytest.approx(26.0, abs=0.1)


def test_slots_are_told_by_their_width():
    model = Model()
    design = scene_without_plate(model)
    plate = plate_with(model, [box(200, 540)])
    slot = [(20 + 13 * np.cos(a), 13 * np.sin(a)) for a in np.linspace(-np.pi / 2, np.pi / 2, 9)]
    slot += [(-x, -y) for x, y in slot]
    for x, z in design.places():
        model.opening(plate, at(-10, x, z, (1, 0, 0)), [model.extruded(model.outline([slot]), 60.0)])
    assert joints_of(model)[0].bolts.hole_diameter_mm == pytest.approx(26.0, abs=0.1)


def test_no_holes_at_all_is_said_once_for_the_model():
    model = Model()
    for place in (0.0, 8000.0):
        design = EndPlate()
        shift = at(0, place, 0)
        design.build_column(model, shift)
        design.build_beam(model, shift)
        design.build_bolts(model, shift)
        body = [model.extruded(model.outline([box(200, 540)]), 25.0)]
        model.product("IfcPlate", "EP1", shift @ at(0, 0, 3000, (1, 0, 0), (0, 1, 0)), body)
    result = audit(model.file)
    assert [joint.bolts.hole_diameter_mm for joint in result.joints] == [None, None]
    assert sum("no holes" in problem.message for problem in result.problems) == 1
