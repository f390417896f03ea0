"""Several bolts in one element, and one shape for many elements, as representation maps and shells write them."""

import numpy as np
import pytest

from sample_models.making import Model, at, circle

from .scenes import EndPlate, joints_of
from .test_bolts_bodies import HEX, LENGTH, D, bolt_prisms, check, joined, plain_bolts


def operator(model, matrix, scale=None, mirrored=False):
    """Write a mapping target; `mirrored` turns one axis about, which no rigid placement can."""
    sense = -1.0 if mirrored else 1.0
    axes = {
        "Axis1": model.direction(*matrix[:3, 0]),
        "Axis2": model.direction(*(sense * matrix[:3, 1])),
        "Axis3": model.direction(*matrix[:3, 2]),
    }
    origin = model.point(*matrix[:3, 3])
    return model.add("IfcCartesianTransformationOperator3D", LocalOrigin=origin, Scale=scale, **axes)


def source_of(model, items, kind="SweptSolid"):
    return model.mapped(items, kind).MappingSource


@pytest.mark.parametrize("mirrored", [False, True], ids=["turned", "mirrored"])
@pytest.mark.parametrize("elements", [1, 2, 3])
def test_groups_as_mapped_items(elements, mirrored):
    model = Model()
    source = source_of(model, model.bolt_items(D, LENGTH))
    places = plain_bolts(model)
    for number in range(elements):
        own = places[number::elements]
        items = [model.map_again(source, operator(model, place, mirrored=mirrored)) for place in own]
        model.product("IfcMechanicalFastener", "8.8", np.eye(4), items, "MappedRepresentation")
    joint = check(model)
    assert len(joint.bolts.global_ids) == elements


def test_a_group_of_thirty():
    model = Model()
    design = EndPlate(rows=[60.0 + 25 * k for k in range(15)])
    for build in (design.build_column, design.build_plate, design.build_beam):
        build(model, np.eye(4))
    source = source_of(model, model.bolt_items(16.0, LENGTH))
    places = [at(design.plate[2], x, z, (-1, 0, 0), (0, 1, 0)) for x, z in design.places()]
    items = [model.map_again(source, operator(model, place)) for place in places]
    model.product("IfcMechanicalFastener", "8.8", np.eye(4), items, "MappedRepresentation")
    (joint,) = joints_of(model)
    assert joint.bolts.count == 30
    assert len(joint.bolts.global_ids) == 1


def test_one_shape_scaled_by_its_mapping():
    model = Model()
    source = source_of(model, model.bolt_items(D / 2, LENGTH / 2))
    for place in plain_bolts(model):
        item = model.map_again(source, operator(model, np.eye(4), scale=2.0))
        model.product("IfcMechanicalFastener", "8.8", place, [item], "MappedRepresentation")
    check(model, tolerance=0.2)


@pytest.mark.parametrize("shells", ["one for each bolt", "one for each solid"])
def test_a_surface_model_of_several_shells(shells):
    model = Model()
    closed = []
    for place in plain_bolts(model):
        prisms = bolt_prisms(place)
        groups = [prisms] if shells == "one for each bolt" else [[prism] for prism in prisms]
        closed += [model.add("IfcClosedShell", CfsFaces=model.faces(*joined(*group))) for group in groups]
    body = model.add("IfcShellBasedSurfaceModel", SbsmBoundary=closed)
    model.product("IfcMechanicalFastener", "8.8", np.eye(4), [body], "SurfaceModel")
    check(model)


def test_bolts_that_get_body_kind_and_grade_from_their_type():
    model = Model()
    items = model.bolt_items(D, LENGTH)
    source = source_of(model, items)
    owner = model.rooted(
        "IfcMechanicalFastenerType",
        Name="Bolt assembly M24x80 10.9", PredefinedType="BOLT", RepresentationMaps=[source],
        NominalDiameter=D, NominalLength=LENGTH,
    )  # fmt: skip
    made = []
    for place in plain_bolts(model):
        body = [model.map_again(source)]
        made.append(model.product("IfcMechanicalFastener", "b", place, body, "MappedRepresentation"))
    model.rooted("IfcRelDefinesByType", RelatedObjects=made, RelatingType=owner)
    joint = check(model)
    assert joint.bolts.grade == "10.9"
    assert joint.provenance["bolts.diameter"].source == "read"


def test_a_head_on_either_side_and_no_nut():
    """The tip, not the head, may lie on the beam's side; grip and rows are the same."""
    model = Model()
    for number, place in enumerate(plain_bolts(model)):
        turned = place if number % 2 else place @ at(z=44.0, axis=(0, 0, -1), ref=(1, 0, 0))
        items = [model.brep_prism([circle(D / 2, 12)], LENGTH), model.brep_prism([circle(HEX, 6)], 15.0, at(z=-15.0))]
        model.product("IfcMechanicalFastener", "8.8", turned, items, "Brep")
    joint = check(model)
    assert joint.bolts.grip_mm == pytest.approx(44.0)


def test_mapped_openings():
    model = Model()
    design = EndPlate()
    for build in (design.build_column, design.build_beam, design.build_bolts):
        build(model, np.eye(4))
    b, h, t = design.plate
    body = [model.extruded(model.outline([[(-b / 2, -h / 2), (b / 2, -h / 2), (b / 2, h / 2), (-b / 2, h / 2)]]), t)]
    plate = model.product("IfcPlate", "EP1", at(0, 0, design.level, (1, 0, 0), (0, 1, 0)), body)
    source = source_of(model, [model.extruded(model.profile("IfcCircleProfileDef", Radius=13.0), 60.0)])
    for x, z in design.places():
        item = model.map_again(source, operator(model, at(-10, x, z, (1, 0, 0))))
        model.opening(plate, np.eye(4), [item], "MappedRepresentation")
    (joint,) = joints_of(model)
    assert joint.bolts.hole_diameter_mm == pytest.approx(26.0)
