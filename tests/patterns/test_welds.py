"""Modelled welds: with a body or as a path, their throat in any of the sets that exporters write."""

import pytest

from ifcjoints import Settings
from ifcjoints.settings import PropertyRow, ReadingSettings
from sample_models.making import Model, at

from .scenes import EndPlate, joints_of

T, HALF = 25.0, (400.0 - 13.5) / 2
TOP, BOTTOM = 3000.0 + HALF + 6.75, 3000.0 - HALF - 6.75


def weld(model, z, x=T, path=False, **more):
    """Add a weld across the beam at a height: a triangular prism, or its path alone."""
    place = at(x, -80.0, z, axis=(0, 1, 0), ref=(1, 0, 0))
    more = {"PredefinedType": "WELD", **more} if model.file.schema != "IFC2X3" else {"ObjectType": "WELD"}
    if not path:
        body = model.extruded(model.outline([[(0, 0), (8, 0), (0, 8)]]), 160.0)
        return model.product("IfcFastener", "seam", place, [body], **more)
    made = model.product("IfcFastener", "seam", place, **more)
    line = model.add("IfcPolyline", Points=[model.point(0, 0, 0), model.point(0, 0, 160.0)])
    shape = model.add(
        "IfcShapeRepresentation",
        ContextOfItems=model.context, RepresentationIdentifier="Axis", RepresentationType="Curve3D", Items=[line],
    )  # fmt: skip
    made.Representation = model.add("IfcProductDefinitionShape", Representations=[shape])
    return made


def throats(model, settings=None):
    (joint,) = joints_of(model, settings)
    return [(each.at, each.type, each.throat_mm) for each in joint.welds]


@pytest.mark.parametrize("path", [False, True], ids=["body", "path"])
@pytest.mark.parametrize(
    ("pset", "values", "throat"),
    [
        ("Pset_FastenerWeld", {"a": 6.0}, 6.0),
        ("Pset_FastenerWeld", {"NominalThroatThickness": 5.0}, 5.0),
        ("Pset_FastenerWeld", {"z": 8.0}, 8.0 / 2**0.5),
        ("AISC_EM11_Pset_Weld", {"a": 7.0}, 7.0),
    ],
)
def test_a_throat_in_an_open_property_set(path, pset, values, throat):
    model = Model(unit=1000.0)
    EndPlate().build(model)
    model.properties(weld(model, TOP, path=path), pset, Type1="fillet", **values)
    assert throats(model) == [("top flange", "fillet", pytest.approx(throat, abs=0.01))]


def test_a_throat_in_a_set_of_one_s_own():
    model = Model()
    EndPlate().build(model)
    model.properties(weld(model, BOTTOM), "Shop data", Size="8")
    assert throats(model) == [("bottom flange", "weld", None)]
    rows = (PropertyRow(meaning="weld_leg", property="Shop data.Size", unit="mm"),)
    taught = Settings(reading=ReadingSettings(properties=rows))
    assert throats(model, taught) == [("bottom flange", "weld", pytest.approx(5.66, abs=0.01))]


def test_flanges_and_web_are_told_apart():
    model = Model()
    EndPlate().build(model)
    for z in (TOP, BOTTOM, 3000.0):
        weld(model, z)
    assert [each[0] for each in throats(model)] == ["top flange", "bottom flange", "web"]


@pytest.mark.parametrize("schema", ["IFC2X3", "IFC4", "IFC4X3"])
def test_a_weld_elsewhere_or_none_at_all(schema):
    model = Model(schema=schema)
    EndPlate().build(model)
    assert throats(model) == []
    weld(model, TOP, x=900.0)
    weld(model, TOP, x=-160.0)
    assert throats(model) == []
    weld(model, TOP)
    assert len(throats(model)) == 1
