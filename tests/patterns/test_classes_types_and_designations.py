"""What types and materials carry, and whether the designation agrees with the body."""

from __future__ import annotations

import pytest

from ifcjoints.tables.sections import section_size
from sample_models.making import Model

from .scenes import HEB300, EndPlate, joints_of, rows_of


def conflicts(joint):
    return [finding for finding in joint.findings if finding.code == "data-conflict"]


def named(scene, beam_type_name="IPE 400", **more):
    """The scene with the beam's designation in its name only."""
    model = Model()
    scene.dialect, scene.beam_name = "brep", beam_type_name
    scene.build(model, **more)
    return model, scene


@pytest.mark.parametrize("text", ["IPE 400", "IPE400", "Beam IPE 400", "ipe400"])
def test_the_designation_confirms(text):
    model, _ = named(EndPlate(), text)
    (joint,) = joints_of(model)
    assert joint.supported.section.designation.upper().replace(" ", "") == "IPE400"
    assert not conflicts(joint)


@pytest.mark.parametrize(
    ("text", "word", "handbook"), [("IPE 450", "h", 450), ("HEA 400", "h", 390), ("IPE 360", "h", 360)]
)
def test_a_designation_that_the_body_belies(text, word, handbook):
    model, scene = named(EndPlate(), text)
    (joint,) = joints_of(model)
    (finding,) = conflicts(joint)
    assert f"{word} = {handbook:.1f} mm" in finding.message
    assert finding.limit == handbook
    assert finding.value == pytest.approx(400, abs=0.2)
    assert finding.elements == (scene.made["beam"].GlobalId,)


def test_a_thinner_web_than_the_handbook():
    model, _ = named(EndPlate(beam=(400.0, 180.0, 6.0, 13.5, 21.0)))
    (joint,) = joints_of(model)
    assert "tw = 8.6 mm in the handbook" in conflicts(joint)[0].message


@pytest.mark.parametrize(
    ("text", "size"),
    [
        ("HE 300 B", (300, 300, 11, 19, 27)), ("HEB300", (300, 300, 11, 19, 27)), ("HEA 200", (190, 200, 6.5, 10, 18)),
        ("IPE 600", (600, 220, 12, 19, 24)), ("W14X90", (355.6, 368.3, 11.18, 18.03, None)),
        ("w18x50", (457.2, 190.5, 9.017, 14.48, None)),
    ],
)  # fmt: skip
def test_handbook_sizes(text, size):
    """Sizes as printed: W shapes d, bf, tw, tf in inches times 25.4 (W14x90 14.0, 14.5, .440, .710)."""
    found = section_size(text)
    assert [found.h, found.b, found.tw, found.tf] == pytest.approx(size[:4], rel=1e-3)
    assert found.r == size[4]


@pytest.mark.parametrize("text", ["IPE 9000", "box 3", "", "PL20"])
def test_what_the_table_does_not_hold(text):
    assert section_size(text) is None


def test_a_type_carries_body_material_and_properties():
    """Occurrences map their type's body; grade and designation stand at the type only."""
    model, scene = Model(), EndPlate(beam_name="B7")
    made = scene.build(model)
    items = made["beam"].Representation.Representations[0].Items
    body = model.representation(items)
    source = model.add("IfcRepresentationMap", MappingOrigin=model.at_origin, MappedRepresentation=body)
    beam_type = model.rooted("IfcBeamType", Name="T1", RepresentationMaps=[source], PredefinedType="BEAM")
    made["beam"].Representation.Representations = [
        model.representation([model.map_again(source)], "MappedRepresentation")
    ]
    model.rooted("IfcRelDefinesByType", RelatedObjects=[made["beam"]], RelatingType=beam_type)
    model.material(beam_type, "S355J2")
    label = model.file.create_entity("IfcLabel", "IPE 400")
    single = model.add("IfcPropertySingleValue", Name="Profile", NominalValue=label)
    beam_type.HasPropertySets = [model.rooted("IfcPropertySet", Name="Own", HasProperties=[single])]
    (joint,) = joints_of(model)
    assert joint.supported.grade.startswith("S355")
    assert joint.supported.section.designation == "IPE 400"
    assert rows_of(joint) == pytest.approx(list(scene.rows), abs=0.05)


@pytest.mark.parametrize("how", ["material", "profile set usage", "list"])
def test_materials(how):
    model, scene = Model(), EndPlate()
    made = scene.build(model)
    steel = model.add("IfcMaterial", Name="S275JR")
    relating = steel
    if how == "profile set usage":
        profile = made["beam"].Representation.Representations[0].Items[0].SweptArea
        one = model.add("IfcMaterialProfile", Material=steel, Profile=profile)
        set_of = model.add("IfcMaterialProfileSet", Name="IPE 400", MaterialProfiles=[one])
        relating = model.add("IfcMaterialProfileSetUsage", ForProfileSet=set_of, CardinalPoint=5)
    elif how == "list":
        relating = model.add("IfcMaterialList", Materials=[steel])
    model.rooted("IfcRelAssociatesMaterial", RelatedObjects=[made["beam"]], RelatingMaterial=relating)
    (joint,) = joints_of(model)
    assert joint.supported.grade.startswith("S275")
    assert joint.supporting.grade is None
    assert joint.supporting.section.h_mm == HEB300[0]
