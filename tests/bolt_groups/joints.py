"""Random joints and actions for the tests of both methods."""

from dataclasses import replace

from hypothesis import strategies as st

from ifcjoints.checking.runner import run_check
from ifcjoints.checking.testing import plain_joint, plain_subject
from ifcjoints_bolt_groups.elastic import elastic
from ifcjoints_bolt_groups.plastic import PlasticOptions, plastic

DISTANCE = 400.0
LIMITS = ("never", "brittle_rows", "always")
METHODS = (elastic, plastic)


@st.composite
def joints(draw):
    """Draw a joint with two to seven rows, some of them outside the flanges, symmetric or not, bolts as they come."""
    levels = draw(st.lists(st.integers(-8, 48), min_size=2, max_size=7, unique=True))
    rows = tuple((10.0 * level + 3.0, draw(st.sampled_from([2, 4]))) for level in sorted(levels, reverse=True))
    return plain_joint(
        rows,
        flange_distance=DISTANCE,
        axis=draw(st.sampled_from([DISTANCE / 2, 90.0, 330.0])),
        flange=(draw(st.floats(120, 300)), draw(st.floats(8, 30))),
        inclinations=(draw(st.floats(0, 30)), draw(st.floats(0, 30))),
        bolt=(draw(st.sampled_from([16.0, 20.0, 24.0, 30.0])), draw(st.sampled_from(["4.6", "8.8", "10.9"]))),
        plate_thickness=draw(st.floats(8, 40)),
    )


moments = st.floats(1.0, 300.0).flatmap(lambda m: st.sampled_from([m, -m]))
axial_forces = st.one_of(st.just(0), st.integers(-15000, 10000)).map(lambda tenths: tenths / 10)
forces = st.tuples(axial_forces, st.sampled_from([0.0, -120.0, 80.0]), moments)


def answer(method, joint, acting=None, limit="brittle_rows", **others):
    """Run a method under (N kN, V kN, M kNm), or without an action."""
    subject = replace(plain_subject(joint, acting, **others), options=PlasticOptions(triangular_limit=limit))
    return run_check(method, subject)


def mirrored(joint):
    """Turn a joint upside down: the same joint with its flanges' names exchanged."""
    rows = [
        row.model_copy(update={"y_bottom_mm": row.y_top_mm, "y_top_mm": row.y_bottom_mm})
        for row in reversed(joint.rows)
    ]
    face = joint.interface
    turned = face.model_copy(
        update={
            "top": face.bottom,
            "bottom": face.top,
            "axis_y_mm": face.flange_distance_mm - face.axis_y_mm,
            "member_slope_deg": -face.member_slope_deg,
        }
    )
    return joint.model_copy(update={"rows": tuple(rows), "interface": turned})


def seen_from_compression(joint, side):
    """Return lever arms, bolts a row, flange distance and the axis's lever arm as the direction sees them."""
    face = joint.interface
    arms = [row.lever_arm(side) for row in joint.rows]
    return arms, [row.count for row in joint.rows], face.flange_distance_mm, face.axis_lever_arm(side)
