"""Where and how a joint lies in space changes no force: a model turned, moved and written in other units."""

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from ifcjoints import Settings, audit
from ifcjoints.settings import Defaults
from sample_models.making import Model, turned
from tests.patterns.scenes import EndPlate

STEEL = Settings(defaults=Defaults(steel_grade="S355"))


def forces_of(world: np.ndarray, unit: float, slope: float) -> dict[tuple[str, str], tuple[float, ...]]:
    """Return the row forces at the resistance, by check and direction."""
    model = Model(unit=unit, world=world)
    EndPlate(slope=slope, dialect="brep").build(model)
    (joint,) = audit(model.file, settings=STEEL).joints
    assert joint.moment_joint
    return {(result.check, result.tension_flange): result.row_forces_kN for result in joint.checks}


@settings(max_examples=25)
@given(
    degrees=st.floats(0.0, 360.0),
    shift=st.tuples(*[st.floats(-5e5, 5e5)] * 3),
    unit=st.sampled_from([1.0, 10.0, 1000.0, 25.4, 304.8]),
    slope=st.sampled_from([0.0, 7.0, -12.0]),
)
def test_turning_moving_and_units_change_no_force(degrees, shift, unit, slope):
    plain = forces_of(np.eye(4), 1.0, slope)
    moved = forces_of(turned(degrees, shift=shift), unit, slope)
    assert moved.keys() == plain.keys()
    for key, forces in plain.items():
        assert sum(forces) > 0
        assert moved[key] == pytest.approx(forces, rel=1e-6, abs=1e-6)


def test_a_model_laid_on_its_back_keeps_its_forces():
    """Turned about the beam by 180° the flanges change their names, and the directions with them."""
    plain = forces_of(np.eye(4), 1.0, 0.0)
    upside_down = forces_of(turned(180.0, about=(1, 0, 0)), 1.0, 0.0)
    for check in ("bolt_group.elastic", "bolt_group.plastic"):
        assert upside_down[check, "bottom"][::-1] == pytest.approx(plain[check, "top"], rel=1e-6)


@pytest.mark.parametrize("slope", [0.0, 7.0, -12.0])
@pytest.mark.parametrize("degrees", [0.0, 130.0])
def test_the_member_s_slope_is_told_with_its_sign(slope, degrees):
    model = Model(world=turned(degrees))
    EndPlate(slope=slope).build(model)
    (joint,) = audit(model.file, settings=STEEL).joints
    assert joint.interface.member_slope_deg == pytest.approx(slope, abs=1e-3)
