from __future__ import annotations

from collections import Counter
from pathlib import Path
from typing import Any

import ifcopenshell
import ifcopenshell.guid
import ifcopenshell.validate
import pytest

from ifcjoints.publishing.property_sets import write_back, write_model

from . import examples

SCHEMAS = ("IFC2X3", "IFC4", "IFC4X3")

# ifcopenshell's schema rules leave the file that they were read from open.
pytestmark = pytest.mark.filterwarnings("ignore::pytest.PytestUnraisableExceptionWarning")


def model(schema: str = "IFC4") -> Any:
    """A model with the elements of the example audit, a project and, in IFC2X3, its owner."""
    file = ifcopenshell.file(schema=schema)
    history = None
    if schema == "IFC2X3":
        person = file.create_entity("IfcPerson", FamilyName="Modeller")
        office = file.create_entity("IfcOrganization", Name="Office")
        history = file.create_entity(
            "IfcOwnerHistory",
            OwningUser=file.create_entity("IfcPersonAndOrganization", person, office),
            OwningApplication=file.create_entity("IfcApplication", office, "1", "Modelling", "M"),
            ChangeAction="ADDED",
            CreationDate=1,
        )
    unit = file.create_entity("IfcSIUnit", UnitType="LENGTHUNIT", Name="METRE")
    context = file.create_entity(
        "IfcGeometricRepresentationContext",
        ContextType="Model",
        CoordinateSpaceDimension=3,
        WorldCoordinateSystem=file.create_entity(
            "IfcAxis2Placement3D", file.create_entity("IfcCartesianPoint", (0.0, 0.0, 0.0))
        ),
    )
    file.create_entity(
        "IfcProject",
        GlobalId="0" + "P" * 21,
        OwnerHistory=history,
        Name="Hall",
        RepresentationContexts=[context],
        UnitsInContext=file.create_entity("IfcUnitAssignment", [unit]),
    )
    for ifc_class, names in {
        "IfcBeam": [examples.BEAM],
        "IfcColumn": [examples.COLUMN],
        "IfcPlate": [examples.PLATE, examples.FIN],
        "IfcMechanicalFastener": examples.BOLTS,
        "IfcFastener": [examples.WELD],
    }.items():
        for name in names:
            file.create_entity(ifc_class, GlobalId=name, OwnerHistory=history, Name=f"it's {ifc_class}")
    return file


def lines(file: Any) -> dict[int, str]:
    return {entity.id(): str(entity) for entity in file}


def groups(file: Any) -> dict[str, Any]:
    return {group.ObjectType: group for group in file.by_type("IfcGroup") if group.ObjectType}


def sets_of(element: Any) -> dict[str, dict[str, Any]]:
    return {
        relation.RelatingPropertyDefinition.Name: {
            value.Name: value.NominalValue.wrappedValue for value in relation.RelatingPropertyDefinition.HasProperties
        }
        for relation in element.IsDefinedBy
        if relation.is_a("IfcRelDefinesByProperties")
    }


def members_of(group: Any) -> set[str]:
    return {element.GlobalId for relation in group.IsGroupedBy for element in relation.RelatedObjects}


def assert_sound(file: Any, *, rules: bool = False) -> None:
    """No GlobalId twice, nothing dangling, every attribute valid; with `rules` also the schema's WHERE rules."""
    counts = Counter(root.GlobalId for root in file.by_type("IfcRoot"))
    assert [name for name, count in counts.items() if count > 1] == []
    logger = ifcopenshell.validate.json_logger()
    ifcopenshell.validate.validate(file, logger, express_rules=rules)
    assert [statement["message"] for statement in logger.statements] == []


def copy_of(file: Any) -> Any:
    return ifcopenshell.file.from_string(file.to_string())


@pytest.fixture(params=SCHEMAS)
def file(request: pytest.FixtureRequest) -> Any:
    return model(request.param)


def test_groups_what_makes_up_each_joint(file: Any) -> None:
    write_back(file, examples.audit())
    found = groups(file)
    assert set(found) == {"MOMENT_JOINT", "JOINT"}
    assert members_of(found["MOMENT_JOINT"]) == {
        examples.BEAM, examples.COLUMN, examples.PLATE, *examples.BOLTS, examples.WELD,
    }  # fmt: skip
    assert members_of(found["JOINT"]) == {examples.FIN, examples.BOLTS[0]}
    assert_sound(file, rules=True)


def test_property_sets_say_what_the_audit_says(file: Any) -> None:
    write_back(file, examples.audit())
    sets = sets_of(groups(file)["MOMENT_JOINT"])
    assert list(sets) == [
        "IfcJoints_Joint",
        "IfcJoints_Check bolt_group.elastic top LC1",
        "IfcJoints_Check bolt_group.elastic bottom",
        "IfcJoints_Check bolt_group.plastic top LC1",
        "IfcJoints_Check bolt_group.plastic bottom",
    ]
    joint = sets["IfcJoints_Joint"]
    assert joint["Moment joint"] is True
    assert joint["Result"] == "fail"
    assert joint["Name"] == f"B12 to C3 {examples.HOSTILE}"
    assert (joint["Row 1 y_bottom_mm"], joint["Row 4 y_bottom_mm"]) == (441.0, -52.25)
    assert joint["Assumed"] == "bolts.grade"
    assert "edge-distance" in joint["Finding 1"]
    elastic = sets["IfcJoints_Check bolt_group.elastic top LC1"]
    assert (elastic["M_kNm"], elastic["Resistance M_kNm"], elastic["Row 1 force_kN"]) == (100, 120.04, 180.25)
    unchecked = sets["IfcJoints_Check bolt_group.plastic bottom"]
    assert unchecked["Status"] == "not_checkable"
    assert "grade is not known" in unchecked["Reason"]
    assert "Utilisation" not in unchecked


def test_a_failing_utilisation_never_reads_as_one(file: Any) -> None:
    write_back(file, examples.audit())
    sets = sets_of(groups(file)["MOMENT_JOINT"])
    assert sets["IfcJoints_Check bolt_group.plastic top LC1"]["Utilisation"] > 1.0


def test_the_end_plate_carries_the_joint_and_other_plates_do_not(file: Any) -> None:
    write_back(file, examples.audit())
    assert list(sets_of(file.by_guid(examples.PLATE))) == ["IfcJoints_Joint"]
    assert sets_of(file.by_guid(examples.FIN)) == {}


def test_a_plate_of_two_joints_carries_both_under_two_names(file: Any) -> None:
    twin = examples.moment_joint(id="J09")
    write_back(file, examples.audit(examples.moment_joint(), twin))
    sets = sets_of(file.by_guid(examples.PLATE))
    assert [sets[name]["Id"] for name in sorted(sets)] == ["J01", "J09"]
    assert_sound(file)


def test_what_stood_in_the_file_stands_there_unchanged(file: Any) -> None:
    before = lines(file)
    write_back(file, examples.audit())
    after = lines(file)
    assert {number: after.get(number) for number in before} == before
    assert len(after) > len(before)


def test_writing_twice_is_writing_once(file: Any) -> None:
    write_back(file, examples.audit())
    once = file.to_string()
    write_back(file, examples.audit())
    assert file.to_string() == once
    read = ifcopenshell.file.from_string(once)
    write_back(read, examples.audit())
    assert lines(read) == lines(file)


def test_taking_everything_back_leaves_the_file_as_it_was(file: Any) -> None:
    before = lines(file)
    write_back(file, examples.audit())
    write_back(file, examples.audit().model_copy(update={"joints": ()}))
    assert lines(file) == before


def test_results_of_another_audit_are_replaced(file: Any) -> None:
    fresh = model(file.schema)
    other = examples.audit(
        examples.moment_joint(rows=(examples.row(300.0),), checks=(), findings=(), plates=(), name="other")
    )
    write_back(file, examples.audit())
    write_back(file, other)
    write_back(fresh, other)
    assert_sound(file)
    told = [
        (found["MOMENT_JOINT"].Name, members_of(found["MOMENT_JOINT"]), sets_of(found["MOMENT_JOINT"]))
        for found in map(groups, (file, fresh))
    ]
    assert told[0] == told[1]
    assert set(groups(file)) == {"MOMENT_JOINT"}
    assert Counter(entity.is_a() for entity in file) == Counter(entity.is_a() for entity in fresh)


def add_to_group(file: Any, group: Any) -> Any:
    """Do what a modeller may: put an own element into our relation and an own property set on our group."""
    history = group.OwnerHistory
    stair = file.create_entity("IfcStair", GlobalId="0" + "s" * 21, OwnerHistory=history)
    if file.schema == "IFC2X3":
        stair.ShapeType = "STRAIGHT_RUN_STAIR"
    relation = next(each for each in group.IsGroupedBy)
    relation.RelatedObjects = (*relation.RelatedObjects, stair)
    value = file.create_entity("IfcPropertySingleValue", Name="Phase", NominalValue=file.create_entity("IfcLabel", "2"))
    book = file.create_entity(
        "IfcPropertySet", GlobalId="0" + "o" * 21, OwnerHistory=history, Name="Own_Phase", HasProperties=[value]
    )
    file.create_entity(
        "IfcRelDefinesByProperties",
        GlobalId="0" + "r" * 21,
        OwnerHistory=history,
        RelatedObjects=[group],
        RelatingPropertyDefinition=book,
    )
    return stair


def test_what_others_put_into_a_group_stays(file: Any) -> None:
    write_back(file, examples.audit())
    group = groups(file)["MOMENT_JOINT"]
    stair = add_to_group(file, group)
    ours = members_of(group)
    write_back(file, examples.audit())
    assert groups(file)["MOMENT_JOINT"] == group
    assert members_of(group) == ours
    assert "Own_Phase" in sets_of(group)
    smaller = examples.moment_joint(welds=())
    write_back(file, examples.audit(smaller))
    assert members_of(group) == ours - {examples.WELD}
    assert stair.GlobalId in members_of(group)
    assert_sound(file)


def test_a_group_with_things_of_others_is_handed_over_when_its_joint_is_gone(file: Any) -> None:
    write_back(file, examples.audit())
    group = groups(file)["MOMENT_JOINT"]
    stair = add_to_group(file, group)
    write_back(file, examples.audit(examples.simple_joint()))
    assert members_of(group) == {stair.GlobalId}
    assert list(sets_of(group)) == ["Own_Phase"]
    assert group.ObjectType is None
    assert_sound(file)
    write_back(file, examples.audit())
    assert groups(file)["MOMENT_JOINT"] == group
    assert {stair.GlobalId, examples.BEAM} <= members_of(group)
    assert_sound(file)


def test_groups_and_sets_of_others_that_look_like_ours_stay(file: Any) -> None:
    history = file.by_type("IfcProject")[0].OwnerHistory
    group = file.create_entity(
        "IfcGroup", GlobalId="0" + "g" * 21, OwnerHistory=history, Name="mine", ObjectType="MOMENT_JOINT"
    )
    file.create_entity(
        "IfcRelAssignsToGroup",
        GlobalId="0" + "a" * 21,
        OwnerHistory=history,
        RelatedObjects=[file.by_guid(examples.BEAM)],
        RelatingGroup=group,
    )
    before = lines(file)
    write_back(file, examples.audit())
    write_back(file, examples.audit().model_copy(update={"joints": ()}))
    assert lines(file) == before


def test_copies_of_our_results_made_elsewhere_go(file: Any) -> None:
    write_back(file, examples.audit())
    once = lines(file)
    group = groups(file)["MOMENT_JOINT"]
    twin = file.create_entity(
        "IfcGroup", "0" + "t" * 21, group.OwnerHistory, group.Name, group.Description, group.ObjectType
    )
    relation = group.IsGroupedBy[0]
    file.create_entity(
        "IfcRelAssignsToGroup",
        GlobalId="0" + "u" * 21,
        OwnerHistory=group.OwnerHistory,
        Description=relation.Description,
        RelatedObjects=relation.RelatedObjects,
        RelatingGroup=twin,
    )
    write_back(file, examples.audit())
    assert lines(file) == once


def test_a_relation_of_others_to_our_set_does_not_dangle(file: Any) -> None:
    write_back(file, examples.audit())
    book = next(each for each in file.by_type("IfcPropertySet") if each.Name == "IfcJoints_Joint")
    file.create_entity(
        "IfcRelDefinesByProperties",
        GlobalId="0" + "r" * 21,
        OwnerHistory=book.OwnerHistory,
        RelatedObjects=[file.by_guid(examples.COLUMN)],
        RelatingPropertyDefinition=book,
    )
    write_back(file, examples.audit().model_copy(update={"joints": ()}))
    assert lines(file) == lines(model(file.schema))


def test_a_set_that_others_hold_in_a_definition_set_is_handed_over() -> None:
    file = model("IFC4")
    write_back(file, examples.audit())
    book = next(each for each in file.by_type("IfcPropertySet") if each.Name == "IfcJoints_Joint")
    other = next(each for each in file.by_type("IfcPropertySet") if "LC1" in each.Name)
    relation = file.create_entity(
        "IfcRelDefinesByProperties",
        GlobalId="0" + "y" * 21,
        RelatedObjects=[file.by_guid(examples.COLUMN)],
        RelatingPropertyDefinition=book,
    )
    both = f"IFCPROPERTYSETDEFINITIONSET((#{book.id()},#{other.id()}))"
    line = f"#{relation.id()}=IFCRELDEFINESBYPROPERTIES('0{'y' * 21}',$,$,$,(#{file.by_guid(examples.COLUMN).id()}),"
    assert line + f"#{book.id()});" in file.to_string()
    read = ifcopenshell.file.from_string(file.to_string().replace(line + f"#{book.id()});", line + both + ");"))
    write_back(read, examples.audit().model_copy(update={"joints": ()}))
    held = read.by_id(relation.id()).RelatingPropertyDefinition.wrappedValue
    assert sorted(each.Name for each in held) == [f"Former {name}" for name in sorted([book.Name, other.Name])]
    assert_sound(read)


def test_properties_shared_with_others_stay(file: Any) -> None:
    # Programs that slim a file let equal properties of several sets be one.
    write_back(file, examples.audit())
    book = next(each for each in file.by_type("IfcPropertySet") if each.Name == "IfcJoints_Joint")
    shared = book.HasProperties[0]
    own = file.create_entity(
        "IfcPropertySet", GlobalId="0" + "o" * 21, OwnerHistory=book.OwnerHistory, Name="Own", HasProperties=[shared]
    )
    text = str(shared)
    write_back(file, examples.audit(examples.moment_joint(family="F77")))
    write_back(file, examples.audit().model_copy(update={"joints": ()}))
    assert [str(each) for each in own.HasProperties] == [text]


def test_a_doubled_global_id_is_left_out_and_said(file: Any) -> None:
    first = file.by_guid(examples.BEAM)
    file.create_entity("IfcBeam", GlobalId=examples.BEAM, OwnerHistory=first.OwnerHistory)
    before = lines(file)
    write_back(file, examples.audit())
    group = groups(file)["MOMENT_JOINT"]
    assert examples.BEAM not in members_of(group)
    assert examples.BEAM in sets_of(group)["IfcJoints_Joint"]["Not in the group"]
    assert before.items() <= lines(file).items()


def test_an_owner_is_made_in_ifc2x3_only_where_none_exists() -> None:
    file = model("IFC2X3")
    owners = len(file.by_type("IfcOwnerHistory"))
    write_back(file, examples.audit())
    assert len(file.by_type("IfcOwnerHistory")) == owners
    bare = ifcopenshell.file(schema="IFC2X3")
    for name in (examples.BEAM, examples.COLUMN, examples.FIN):
        bare.create_entity("IfcBeam", GlobalId=name)
    write_back(bare, examples.audit())
    write_back(bare, examples.audit())
    assert len(bare.by_type("IfcOwnerHistory")) == 1
    assert all(group.OwnerHistory is not None for group in bare.by_type("IfcGroup"))


def test_write_model_leaves_its_source_alone(tmp_path: Path, file: Any) -> None:
    source, once, twice = tmp_path / "in.ifc", tmp_path / "once.ifc", tmp_path / "twice.ifc"
    file.write(str(source))
    content = source.read_bytes()
    write_model(source, once, examples.audit())
    write_model(once, twice, examples.audit())
    assert source.read_bytes() == content
    assert twice.read_bytes() == once.read_bytes()
    assert groups(ifcopenshell.open(str(twice)))["MOMENT_JOINT"].Name == f"B12 to C3 {examples.HOSTILE}"
