"""The results of ours that stand in an open IFC file: found, brought up to date, taken away.

Ours are the property sets named `IfcJoints_Joint` or `IfcJoints_Check…`, the groups with our ObjectType
and the relations between them, all with :data:`MARK` at the start of their Description. Whatever others
have put into one of our groups, or said of it, stays: the group of a joint that is gone is then handed
over to them without our marks. The inside of our property sets is ours alone.
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator, Sequence
from typing import Any

from .property_values import CHECK_PREFIX, LONGEST_NAME, Properties, Value

MARK = "Written by ifcjoints"
DESCRIPTION = f"{MARK}. It supports a competent engineer's check and does not replace it."
JOINT_SET = "IfcJoints_Joint"
GROUP_TYPES = ("MOMENT_JOINT", "JOINT")
MEMBERS = " Members: "


class StandingResults:
    """Our results in one file, and which of them the new audit still wants."""

    def __init__(self, file: Any) -> None:
        self.file = file
        self.wanted: set[int] = set()
        self.history: Any | None = None

    def put_group(self, global_id: str, name: str, kind: str) -> Any:
        """Make a joint's group, or bring the one that stands up to date."""
        return self._put("IfcGroup", global_id, Name=_label(name), Description=DESCRIPTION, ObjectType=kind)

    def put_members(self, group: Any, global_id: str, members: Sequence[Any]) -> None:
        """Put elements into a group. Those that others have put into it stay."""
        together = dict.fromkeys([*members, *self._foreign_members(group, global_id)])
        if together:
            self._put(
                "IfcRelAssignsToGroup",
                global_id,
                Description=DESCRIPTION + MEMBERS + " ".join(member.GlobalId for member in members),
                RelatedObjects=tuple(together),
                RelatingGroup=group,
            )

    def put_set(self, element: Any, ids: tuple[str, str], name: str, properties: Properties) -> None:
        """Put a property set on one element; `ids` are the GlobalIds of the set and of its relation."""
        standing = self._standing("IfcPropertySet", ids[0])
        former: tuple[Any, ...] = standing.HasProperties if standing else ()
        values = former if _say(former, properties) else tuple(self._properties(properties))
        book = self._put("IfcPropertySet", ids[0], Name=_label(name), Description=DESCRIPTION, HasProperties=values)
        if values is not former:
            self._remove_unused(former)
        self._put(
            "IfcRelDefinesByProperties",
            ids[1],
            Description=DESCRIPTION,
            RelatedObjects=(element,),
            RelatingPropertyDefinition=book,
        )

    def sweep(self) -> None:
        """Take away what the new audit does not want any more."""
        for group in self._stale("IfcGroup"):
            self._remove_group(group)
        for relation in [*self._stale("IfcRelAssignsToGroup"), *self._stale("IfcRelDefinesByProperties")]:
            self.file.remove(relation)
        for book in self._stale("IfcPropertySet"):
            self._remove_set(book)

    def _put(self, ifc_class: str, global_id: str, **attributes: Any) -> Any:
        """Make an entity, or change those attributes of the standing one that differ."""
        entity = self._standing(ifc_class, global_id)
        if entity is None:
            history = self._owner_history()
            entity = self.file.create_entity(ifc_class, GlobalId=global_id, OwnerHistory=history, **attributes)
        for name, value in attributes.items():
            if getattr(entity, name) != value:
                setattr(entity, name, value)
        self.wanted.add(entity.id())
        return entity

    def _standing(self, ifc_class: str, global_id: str) -> Any | None:
        try:
            entity = self.file.by_guid(global_id)
        except RuntimeError:
            return None
        return entity if entity.is_a() == ifc_class else None

    def _stale(self, ifc_class: str) -> list[Any]:
        return [
            entity
            for entity in self.file.by_type(ifc_class, include_subtypes=False)
            if entity.id() not in self.wanted and _is_ours(entity)
        ]

    def _foreign_members(self, group: Any, global_id: str = "") -> Iterator[Any]:
        """Yield what stands in our relation to a group (marked, or of this GlobalId) but not through us."""
        for relation in self.file.get_inverse(group):
            if relation.is_a("IfcRelAssignsToGroup") and (_is_ours(relation) or relation.GlobalId == global_id):
                written = (relation.Description or "").partition(MEMBERS)[2].split()
                yield from (each for each in relation.RelatedObjects if each.GlobalId not in written)

    def _remove_group(self, group: Any) -> None:
        """Remove a group, or hand it over if others have put something into it or said something of it."""
        foreign = tuple(dict.fromkeys(self._foreign_members(group)))
        relations = list(self.file.get_inverse(group))
        if not foreign and all(map(_is_ours, relations)):
            self.file.remove(group)
            return
        group.ObjectType = group.Description = None
        if foreign:
            kept = next(each for each in relations if each.is_a("IfcRelAssignsToGroup") and _is_ours(each))
            kept.RelatedObjects, kept.Description = foreign, None

    def _remove_set(self, book: Any) -> None:
        """Remove a property set, its properties, and relations that would be left without it."""
        relations = [each for each in self.file.get_inverse(book) if each.is_a("IfcRelationship")]
        if any(_in_definition_set(book, each) for each in relations):
            # Such a set cannot be changed through the library: the standing one is handed over by name.
            book.Name, book.Description = _label(f"Former {book.Name}"), None
            return
        for relation in relations:
            if any(value in (book, (book,)) for value in relation):
                self.file.remove(relation)
        former = book.HasProperties
        self.file.remove(book)
        self._remove_unused(former)

    def _remove_unused(self, values: Iterable[Any]) -> None:
        for value in values:
            if not self.file.get_total_inverses(value):
                self.file.remove(value)

    def _properties(self, properties: Properties) -> Iterator[Any]:
        for name, value in properties.items():
            nominal = self.file.create_entity(_measure(value), _text(value))
            yield self.file.create_entity("IfcPropertySingleValue", Name=_label(name), NominalValue=nominal)

    def _owner_history(self) -> Any | None:
        """Return one of the file's own histories where the schema demands one; make one only if none exists."""
        if self.file.schema != "IFC2X3":
            return None
        if self.history is None:
            owners = [project.OwnerHistory for project in self.file.by_type("IfcProject")]
            known = [*filter(None, owners), *self.file.by_type("IfcOwnerHistory")]
            self.history = known[0] if known else self._new_history()
        return self.history

    def _new_history(self) -> Any:
        make = self.file.create_entity
        person = make("IfcPerson", FamilyName="unknown")
        organization = make("IfcOrganization", Name="unknown")
        return make(
            "IfcOwnerHistory",
            OwningUser=make("IfcPersonAndOrganization", person, organization),
            OwningApplication=make("IfcApplication", organization, "unknown", "ifcjoints", "ifcjoints"),
            ChangeAction="NOCHANGE",
            CreationDate=0,
        )


def _is_ours(entity: Any) -> bool:
    if not (getattr(entity, "Description", None) or "").startswith(MARK):
        return False
    if entity.is_a("IfcPropertySet"):
        return (entity.Name or "").startswith((JOINT_SET, CHECK_PREFIX))
    return not entity.is_a("IfcGroup") or entity.ObjectType in GROUP_TYPES


def _in_definition_set(book: Any, relation: Any) -> bool:
    """Whether a relation holds a property set in an IfcPropertySetDefinitionSet together with others."""
    definition = getattr(relation, "RelatingPropertyDefinition", None)
    return definition is not None and definition != book


def _say(values: Sequence[Any], properties: Properties) -> bool:
    """Whether standing properties already say just this."""
    if not all(each.is_a("IfcPropertySingleValue") and each.NominalValue for each in values):
        return False
    standing = [(each.Name, each.NominalValue.is_a(), each.NominalValue.wrappedValue) for each in values]
    return standing == [(_label(name), _measure(value), _text(value)) for name, value in properties.items()]


def _measure(value: Value) -> str:
    if isinstance(value, bool):
        return "IfcBoolean"
    if isinstance(value, int):
        return "IfcInteger"
    if isinstance(value, float):
        return "IfcReal"
    return "IfcLabel" if len(value) <= LONGEST_NAME else "IfcText"


def _text(value: Value) -> Value:
    """Replace what a STEP file cannot hold (halves of surrogate pairs)."""
    return value.encode("utf-8", "replace").decode("utf-8") if isinstance(value, str) else value


def _label(text: str) -> str:
    return str(_text(text))[:LONGEST_NAME]
