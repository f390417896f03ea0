"""Bolts whose size, kind or class an exporting program writes in its own way."""

import math

import pytest

from ifcjoints import Settings, audit
from ifcjoints.settings import Defaults
from sample_models.making import Model, at, circle

from .scenes import joints_of
from .test_bolts_bodies import GRIP, HEX, LENGTH, NUT, D, bolt_prisms, check, plain_bolts


@pytest.mark.parametrize("name", ["M24x80 8.8", "bolt"])
@pytest.mark.parametrize("corners", [6, 8, 12, 24])
def test_facets_outside_of_the_true_circle(corners, name):
    model = Model()
    across = D / math.cos(math.pi / corners)
    for place in plain_bolts(model):
        items = [model.brep_prism([circle(across / 2, corners)], LENGTH), model.brep_prism(*bolt_prisms()[1])]
        model.product("IfcMechanicalFastener", name, place, items, "Brep")
    joint = check(model, tolerance=0.25 if name == "bolt" else 0.01)
    assert joint.provenance["bolts.diameter"].source == ("measured" if name == "bolt" else "read")


@pytest.mark.parametrize("unit", [1000.0, 304.8, 10.0], ids=["metres", "feet", "cm"])
def test_nominal_sizes_in_mm_without_a_body(unit):
    model = Model(unit=unit)
    for place in plain_bolts(model):
        model.product("IfcMechanicalFastener", "8.8", place, NominalDiameter=D, NominalLength=LENGTH)
    joint = check(model)
    assert "taken as mm" in joint.provenance["bolts.diameter"].detail
    assert joint.provenance["bolts.axis"].source == "assumed"
    assert any("bolts.axis was assumed" in finding.message for finding in joint.findings)


@pytest.mark.parametrize("property_", [{"NominalDiameter": D, "NominalLength": LENGTH}, {"BoltDiameter": "24 mm"}])
def test_sizes_in_properties_of_bolts_without_bodies(property_):
    model = Model()
    for place in plain_bolts(model):
        bolt = model.product("IfcMechanicalFastener", "8.8", place)
        model.properties(bolt, "Own set", **property_)
    (joint,) = joints_of(model)
    assert joint.bolts.diameter_mm == pytest.approx(D)
    assert "Own set." in joint.provenance["bolts.diameter"].detail


def test_loose_nuts_without_a_telling_name_are_no_second_bolts():
    model = Model()
    places = plain_bolts(model)
    for place in places:
        items = [model.brep_prism(*part) for part in bolt_prisms(nut=False)]
        model.product("IfcMechanicalFastener", "M24x80 8.8", place, items, "Brep")
        nut = model.brep_prism([circle(HEX, 6), circle(D / 2, 16)], NUT)
        model.product("IfcMechanicalFastener", "M24 8", place @ at(z=GRIP), [nut], "Brep")
    check(model)
    result = audit(model.file)
    assert result.coverage.bolts_elsewhere == len(places)
    assert [each.reason for each in result.elsewhere] == ["a loose nut or washer: its body is a nut or a washer"]


@pytest.mark.parametrize("kind", ["IfcFastener", "IfcBuildingElementProxy", "IfcDiscreteAccessory", "IfcBeam"])
def test_bolts_under_another_class(kind):
    model = Model()
    for place in plain_bolts(model):
        model.product(kind, "M24x80 8.8", place, model.bolt_items(D, LENGTH))
    joint = check(model)
    assert joint.bolts.grade == "8.8"
    assert joint.bolts.grip_mm == pytest.approx(GRIP)


def test_an_unreadable_body_leaves_the_bolt_s_axis_unknown_and_is_told():
    model = Model()
    places = plain_bolts(model)
    for place in places:
        cleat = model.extruded(model.outline([[(0, 0), (90, 0), (90, 10), (10, 10), (10, 60), (0, 60)]]), 100.0)
        model.product("IfcMechanicalFastener", "M24x80 8.8", place, [cleat])
    result = audit(model.file)
    assert not result.joints
    assert result.coverage.bolts_elsewhere == len(places)
    assert sum("no bolt can be made out in its body" in each.message for each in result.problems) == len(places)


def test_a_stated_grade_that_is_not_known_is_not_replaced_by_a_default():
    model = Model()
    for place in plain_bolts(model):
        bolt = model.product("IfcMechanicalFastener", "bolt", place, model.bolt_items(D, LENGTH))
        model.properties(bolt, "Own set", BoltGrade="KLASSE Q")
    (joint,) = joints_of(model, Settings(defaults=Defaults(bolt_grade="8.8")))
    assert joint.bolts.grade == "KLASSE Q"
    assert joint.provenance["bolts.grade"].source == "read"


def test_two_texts_that_name_two_grades_are_told():
    model = Model()
    for place in plain_bolts(model):
        bolt = model.product("IfcMechanicalFastener", "M24x80 10.9", place, model.bolt_items(D, LENGTH))
        model.properties(bolt, "Own set", BoltGrade="8.8")
    result = audit(model.file)
    told = [each.message for each in result.problems if "grade" in each.message]
    assert len(told) == result.coverage.bolts
    assert "8.8 by Own set.BoltGrade" in told[0]
    assert "10.9 by IfcMechanicalFastener.Name" in told[0]


def test_shop_and_site_bolts_of_one_grade_are_one_grade():
    model = Model()
    for number, place in enumerate(plain_bolts(model)):
        name = f"D=3/4 L=2 {'Shop' if number % 2 else 'Site'} A325N"
        model.product("IfcMechanicalFastener", name, place, model.bolt_items(19.05, 80.0))
    (joint,) = joints_of(model)
    assert joint.bolts.grade == "A325N"
    assert joint.bolts.diameter_mm == pytest.approx(19.05)
