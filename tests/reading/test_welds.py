"""Welds by their own or their type's name, and throats from legs only where the weld is a fillet."""

import math

import numpy as np
import pytest

from ifcjoints.reading.bodies import BodyReader
from ifcjoints.reading.placements import Placements
from ifcjoints.reading.properties import PropertyTable
from ifcjoints.reading.units import read_units
from ifcjoints.reading.welds import is_weld, read_weld
from ifcjoints.settings import ReadingSettings
from sample_models.making import Model


def seam(model, **attributes):
    body = model.extruded(model.outline([[(0, 0), (8, 0), (0, 8)]]), 160.0)
    return model.product("IfcFastener", attributes.pop("Name", "seam"), np.eye(4), [body], **attributes)


def read(model, element):
    units = read_units(model.file)
    bodies = BodyReader(units, Placements(units.length))
    return read_weld(element, bodies, PropertyTable(ReadingSettings(), units.length))


@pytest.mark.parametrize(
    ("kind", "throat"),
    [
        ("Fillet Weld", 8 / math.sqrt(2)),
        ("fillet", 8 / math.sqrt(2)),
        ("Single V Groove Weld", None),
        ("Plug Weld", None),
        ("V", None),
        ("butt weld", None),
    ],
)
def test_only_a_fillet_s_leg_gives_a_throat(kind, throat):
    model = Model()
    weld = seam(model, PredefinedType="WELD")
    model.properties(weld, "Pset_FastenerWeld", Type1=kind, z=8.0)
    assert read(model, weld).throat == (None if throat is None else pytest.approx(throat))


def test_a_stated_throat_goes_before_the_leg_and_holds_for_any_weld():
    model = Model(unit=25.4)
    weld = seam(model, PredefinedType="WELD")
    model.properties(weld, "Pset_FastenerWeld", Type1="V", a=5.0, z=8.0)
    assert read(model, weld).throat == pytest.approx(5.0)


@pytest.mark.parametrize(
    ("attributes", "expected"),
    [
        ({"PredefinedType": "WELD"}, True),
        ({"Name": "Fillet weld 6"}, True),
        ({"ObjectType": "WELD"}, True),
        ({"PredefinedType": "GLUE"}, False),
        ({"Name": "M24x80 8.8"}, False),
    ],
    ids=str,
)
def test_welds_by_name_and_kind(attributes, expected):
    model = Model()
    assert is_weld(seam(model, **attributes)) == expected


def test_a_weld_told_by_its_type():
    model = Model()
    weld = seam(model)
    owner = model.rooted("IfcFastenerType", Name="F6", PredefinedType="WELD")
    model.rooted("IfcRelDefinesByType", RelatedObjects=[weld], RelatingType=owner)
    assert is_weld(weld)
