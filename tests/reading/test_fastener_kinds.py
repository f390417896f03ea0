"""What a fastener is, by its predefined type and its texts."""

import pytest

from ifcjoints.reading.fastener_kinds import is_named_bolt, kind_of, texts_of
from sample_models.making import Model


def kind(schema="IFC4", **attributes):
    model = Model(schema)
    element = model.rooted("IfcMechanicalFastener", **attributes)
    return kind_of(element, None, texts_of(element, None))


@pytest.mark.parametrize(
    ("attributes", "expected"),
    [
        ({}, "bolt"),
        ({"Name": "M20x60 8.8"}, "bolt"),
        ({"PredefinedType": "BOLT", "Name": "stud"}, "bolt"),
        ({"PredefinedType": "ANCHORBOLT"}, "anchor"),
        ({"PredefinedType": "STUDSHEARCONNECTOR"}, "stud"),
        ({"PredefinedType": "RIVET"}, "other"),
        ({"PredefinedType": "SCREW", "Name": "M12"}, "other"),
        ({"PredefinedType": "USERDEFINED", "ObjectType": "Anchor rod"}, "anchor"),
        ({"Name": "Shear studs D=3/4 L=3 1/2"}, "stud"),
        ({"Name": "Hexagon head screw M20x60 8.8 ISO 4017"}, "bolt"),
        ({"Name": "Self-drilling screw 5.5x25"}, "other"),
        ({"Name": "self drilling screw M6"}, "other"),
        ({"Name": "Nut M24"}, "loose_part"),
        ({"Name": "Washers 24"}, "loose_part"),
        ({"Name": "Bolt with nut and washer"}, "bolt"),
    ],
    ids=str,
)
def test_kinds(attributes, expected):
    found, reason = kind(**attributes)
    assert found == expected
    if expected != "bolt":
        told = next(value for value in (attributes.get("PredefinedType"), *attributes.values()) if value)
        assert attributes.get("ObjectType", told) in reason


@pytest.mark.parametrize("predefined", ["COUPLER", "RAILJOINT", "ROPE"])
def test_later_schemas_kinds_that_are_no_bolts(predefined):
    assert kind("IFC4X3", PredefinedType=predefined)[0] == "other"


@pytest.mark.parametrize(
    ("name", "expected"),
    [
        ("M20x60 8.8", True),
        ("BOLTM20*40", True),
        ("Bolt", True),
        ("D=3/4 L=2 Site A325N", True),
        ("bolted end plate", False),
        ("PL 20x200", False),
        ("IPE 300", False),
        (None, False),
    ],
)
def test_names_that_only_bolts_have(name, expected):
    model = Model()
    assert is_named_bolt(model.rooted("IfcBuildingElementProxy", Name=name)) == expected
