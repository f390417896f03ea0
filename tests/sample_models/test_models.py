"""The sample models are as their script makes them, valid, and hold what their design dimensions say."""

import ifcopenshell
import ifcopenshell.geom
import ifcopenshell.util.shape
import ifcopenshell.validate
import pytest

from ifcjoints import audit
from ifcjoints.model.section_properties import area
from sample_models.make import HERE, MODELS, write
from sample_models.steelwork import HEB_300

NAMES = tuple(MODELS)


@pytest.fixture(scope="module", params=NAMES)
def model(request):
    path = HERE / f"{request.param}.ifc"
    return path, MODELS[request.param]()[1], audit(path, actions=path.with_suffix(".actions.csv"))


@pytest.mark.parametrize("name", NAMES)
def test_a_model_is_as_the_script_makes_it(name, tmp_path):
    assert write(name, tmp_path).read_bytes() == (HERE / f"{name}.ifc").read_bytes()


# The validator leaves the file of its rules open.
@pytest.mark.filterwarnings("ignore::pytest.PytestUnraisableExceptionWarning")
@pytest.mark.parametrize("name", NAMES)
def test_a_model_is_valid(name):
    logger = ifcopenshell.validate.json_logger()
    ifcopenshell.validate.validate(ifcopenshell.open(str(HERE / f"{name}.ifc")), logger, express_rules=True)
    assert logger.statements == []


def found_by_members(result):
    return {(joint.supported.name, joint.supporting.name): joint for joint in result.joints if joint.supporting}


def test_every_designed_joint_is_found_as_designed(model):
    _, truth, result = model
    found = found_by_members(result)
    for joint in truth.joints:
        read = found[joint.supported, joint.supporting]
        assert read.configuration == joint.configuration
        assert read.moment_joint == joint.moment_joint, read.why
        assert read.bolts.count == joint.bolts
        assert read.bolts.diameter_mm == pytest.approx(joint.diameter, abs=1e-6)
        assert joint.grade in read.bolts.grade
        assert next(p.thickness_mm for p in read.plates if p.role == "end_plate") == pytest.approx(joint.plate)
        assert [row.y_bottom_mm for row in read.rows] == pytest.approx(joint.rows, abs=0.01)
        assert read.interface.flange_distance_mm == pytest.approx(joint.flange_distance, abs=0.01)


def test_nothing_else_is_a_moment_joint_and_no_bolt_is_lost(model):
    _, truth, result = model
    assert sum(joint.moment_joint for joint in result.joints) == sum(joint.moment_joint for joint in truth.joints)
    assert result.coverage.bolts == truth.bolts
    assert result.coverage.bolts_elsewhere == truth.elsewhere
    assert not result.problems


def test_every_moment_joint_is_checked_both_ways_with_nothing_assumed(model):
    _, _, result = model
    for joint in result.joints:
        if joint.moment_joint:
            assert joint.completeness == 1.0
            assert {check.tension_flange for check in joint.checks} == {"top", "bottom"}
            assert {check.status for check in joint.checks} <= {"pass", "resistance_only"}


def test_the_kernel_agrees_on_a_column_s_volume():
    """A column of HEB 300, 6450 mm long: area × length, by the geometry kernel within 1 %."""
    file = ifcopenshell.open(str(HERE / "heron_yard_hall.ifc"))
    column = next(each for each in file.by_type("IfcColumn") if each.Name == "C2")
    settings = ifcopenshell.geom.settings()
    settings.set("disable-opening-subtractions", True)
    shape = ifcopenshell.geom.create_shape(settings, column).geometry
    assert ifcopenshell.util.shape.get_volume(shape) * 1e9 == pytest.approx(area(*HEB_300) * 6450.0, rel=0.01)
