"""Files with faults: the run goes on, and what is wrong is listed with its element."""

from __future__ import annotations

import re
import zipfile

import numpy as np
import pytest

from ifcjoints.detection.find_joints import find_joints
from ifcjoints.reading.open_model import open_model
from ifcjoints.reading.read_model import read_model
from ifcjoints.settings import Settings
from sample_models.making import Model, at, box, circle, i_ring, prism_faces

from .scenes import EndPlate, joints_of, rows_of


def read(file):
    settings = Settings()
    contents = read_model(file, settings.reading)
    return contents.problems, find_joints(contents, settings).joints


def problem(problems, element) -> str:
    """The one message about this element."""
    guid = element if isinstance(element, str) else element.GlobalId
    (message,) = [each.message for each in problems if each.element == guid]
    return message


def made(dialect="brep"):
    model, scene = Model(), EndPlate(dialect=dialect)
    scene.build(model)
    return model, scene


def test_a_clean_model_has_no_problems():
    for dialect in ("swept", "outline", "brep"):
        problems, joints = read(made(dialect)[0].file)
        assert not problems
        assert joints[0].moment_joint


@pytest.mark.parametrize("schema", ["IFC2X3", "IFC4", "IFC4X3"])
@pytest.mark.parametrize("suffix", [".ifc", ".ifczip"])
def test_schemas_and_zipped_files(tmp_path, schema, suffix):
    model, scene = Model(schema), EndPlate()
    scene.build(model)
    path = tmp_path / f"model{suffix}"
    if suffix == ".ifc":
        model.file.write(str(path))
    else:
        with zipfile.ZipFile(path, "w") as archive:
            archive.writestr("model.ifc", model.file.to_string())
    (joint,) = joints_of(open_model(path))
    assert rows_of(joint) == pytest.approx(list(scene.rows), abs=0.05)


def test_doubled_global_ids():
    model, scene = made()
    plate, beam = scene.made["plate"], scene.made["beam"]
    plate.GlobalId = beam.GlobalId
    problems, joints = read(model.file)
    assert "GlobalId" in problem(problems, beam)
    assert joints[0].moment_joint
    assert len({joint.id for joint in joints}) == len(joints)


def test_a_part_without_a_placement():
    model, scene = made()
    lost = model.product("IfcPlate", "lost", np.eye(4), [model.extruded(model.outline([box(100, 100)]), 10.0)])
    lost.ObjectPlacement = None
    problems, joints = read(model.file)
    assert "placement" in problem(problems, lost)
    assert joints[0].moment_joint
    assert rows_of(joints[0]) == pytest.approx(list(scene.rows), abs=0.05)


def test_placements_that_lead_in_a_circle():
    model, scene = made()
    place = scene.made["beam"].ObjectPlacement
    place.PlacementRelTo = model.placement(np.eye(4), place)
    problems, joints = read(model.file)
    assert "placement" in problem(problems, scene.made["beam"])
    assert not joints[0].moment_joint


@pytest.mark.parametrize("what", ["IFCLOCALPLACEMENT", "IFCPRODUCTDEFINITIONSHAPE", "IFCSHAPEREPRESENTATION",
                                  "IFCIFACETEDBREP", "IFCCLOSEDSHELL", "IFCPOLYLOOP", "IFCCARTESIANPOINT"])  # fmt: skip
def test_dangling_references(tmp_path, what):
    """An entity of an odd plate is missing from the file: the joint beside it is found all the same."""
    model, scene = made()
    matrix = at(-1000, 0, 3000)
    model.product("IfcPlate", "broken", matrix, [model.brep_prism([box(90, 90)], 10.0)], "Brep")
    lines = model.file.to_string().splitlines(keepends=True)
    number = max((index for index, line in enumerate(lines) if what in line), default=None)
    if number is not None:
        del lines[number]
    path = tmp_path / "dangling.ifc"
    path.write_text("".join(lines))
    _, joints = read(open_model(path))
    assert [joint.moment_joint for joint in joints] == [True]
    assert rows_of(joints[0]) == pytest.approx(list(scene.rows), abs=0.05)


def replace_body(model, element, vertices, faces):
    shell = model.add("IfcClosedShell", CfsFaces=model.faces(vertices, faces))
    element.Representation.Representations[0].Items = [model.add("IfcFacetedBrep", Outer=shell)]


def plate_faces(scene):
    b, h, t = scene.plate
    holes = [circle(13, 16, x, z - scene.axis_height) for x, z in scene.places()]
    return prism_faces([box(b, h), *holes], t)


def test_degenerate_faces():
    """Faces without area, corners said twice, slivers: nothing of the joint changes."""
    model, scene = made()
    vertices, faces = plate_faces(scene)
    outside = faces[0][0]
    broken = [*faces, [[0, 1, 1]], [[0, 0, 0, 0]], [[0, 1, 0]]]
    broken[0] = [[outside[0], *outside], *faces[0][1:]]
    replace_body(model, scene.made["plate"], vertices, broken)
    _, joints = read(model.file)
    assert joints[0].moment_joint, joints[0].why
    assert rows_of(joints[0]) == pytest.approx(list(scene.rows), abs=0.05)
    assert joints[0].plates[0].thickness_mm == pytest.approx(scene.plate[2], abs=0.01)


@pytest.mark.parametrize("missing", [0, 1, 3, 20])
def test_open_shells_of_a_plate(missing):
    """A face is missing: a broad one, one of the edge, or of a hole's wall. The joint is found, the body told of."""
    model, scene = made()
    vertices, faces = plate_faces(scene)
    replace_body(model, scene.made["plate"], vertices, [face for k, face in enumerate(faces) if k != missing])
    problems, joints = read(model.file)
    assert "open" in problem(problems, scene.made["plate"])
    assert joints[0].moment_joint, joints[0].why
    assert rows_of(joints[0]) == pytest.approx(list(scene.rows), abs=0.05)
    assert joints[0].plates[0].thickness_mm == pytest.approx(scene.plate[2], abs=0.01)


def test_an_open_shell_of_a_beam():
    """The face of a flange's edge is missing: the section is closed again where it is open."""
    model, scene = made()
    ring = i_ring(*scene.beam)
    vertices, faces = prism_faces([ring], 4000.0)
    replace_body(model, scene.made["beam"], vertices, [face for k, face in enumerate(faces) if k != 2])
    problems, joints = read(model.file)
    assert "open" in problem(problems, scene.made["beam"])
    assert joints[0].moment_joint, joints[0].why
    assert rows_of(joints[0]) == pytest.approx(list(scene.rows), abs=0.05)


def test_an_element_whose_body_cannot_be_built():
    model, _ = made()
    flat = model.extruded(model.outline([[(0, 0), (1, 0), (0, 0)]]), 10.0)
    bad = model.product("IfcPlate", "bad", at(0, 0, 3000), [flat])
    problems, joints = read(model.file)
    assert problem(problems, bad)
    assert joints[0].moment_joint


def test_every_message_is_one_sentence_in_plain_words():
    model, scene = made()
    scene.made["plate"].GlobalId = scene.made["beam"].GlobalId
    flat = model.extruded(model.outline([[(0, 0), (1, 0), (0, 0)]]), 10.0)
    model.product("IfcPlate", "bad", at(0, 0, 3000), [flat])
    problems, _ = read(model.file)
    assert len(problems) == 2
    assert not any(re.search(r"Traceback|\n", each.message) for each in problems)
