from __future__ import annotations

import itertools
import re
from xml.etree import ElementTree

import pytest
from hypothesis import given
from hypothesis import strategies as st

from ifcjoints.model.joints import Joint, JointBolts
from ifcjoints.publishing.drawing import LINE, draw, spread

from . import examples

SVG = "{http://www.w3.org/2000/svg}"


def read(joint: Joint) -> ElementTree.Element:
    return ElementTree.fromstring(draw(joint))


def bolts(svg: ElementTree.Element) -> list[tuple[float, float, float]]:
    return [tuple(float(circle.get(name, "")) for name in ("cx", "cy", "r")) for circle in svg.iter(f"{SVG}circle")]


def labels(svg: ElementTree.Element) -> list[tuple[str, float, float]]:
    return [(str(each.text), float(each.get("x", "")), float(each.get("y", ""))) for each in svg.iter(f"{SVG}text")]


def test_bolts_stand_to_scale_and_y_points_up() -> None:
    joint = examples.moment_joint()
    drawn = sorted(bolts(read(joint)))
    true = sorted((x, -row.y_bottom_mm, 12.0) for row in joint.rows for x in row.x_mm)
    scale = (drawn[-1][0] - drawn[0][0]) / (true[-1][0] - true[0][0])
    for one, two in itertools.pairwise(zip(drawn, true, strict=True)):
        for axis in (0, 1):
            assert two[0][axis] - one[0][axis] == pytest.approx(scale * (two[1][axis] - one[1][axis]), abs=0.02)
    assert drawn[0][2] == pytest.approx(scale * 12.0, abs=0.01)


def test_every_row_is_dimensioned_from_the_bottom_flange() -> None:
    texts = [text for text, _, _ in labels(read(examples.moment_joint()))]
    for expected in ("441.0", "331.0", "58.0", "−52.2", "386.5 top flange", "0 bottom flange", "row 1", "row 4"):
        assert expected in texts


@pytest.mark.parametrize("count", [1, 4, 12, 40])
def test_labels_do_not_overlap_and_stay_in_the_picture(count: int) -> None:
    rows = tuple(examples.row(430.0 - 9.7 * number) for number in range(count))
    svg = read(examples.moment_joint(rows=rows))
    height = float(svg.get("viewBox", "").split()[3])
    columns: dict[float, list[float]] = {}
    for _, x, y in labels(svg):
        columns.setdefault(x, []).append(y)
    assert sum(map(len, columns.values())) == 2 * count + 2
    for column in columns.values():
        assert all(abs(low - high) >= LINE - 0.02 for low, high in itertools.pairwise(sorted(column)))
        assert min(column) > LINE / 2
        assert max(column) < height


def test_nothing_is_drawn_outside_the_picture() -> None:
    svg = read(examples.moment_joint())
    width, height = (float(text) for text in svg.get("viewBox", "").split()[2:])
    for path in svg.iter(f"{SVG}path"):
        if "shape" in path.get("class", ""):
            for x, y in re.findall(r"([\d.-]+),([\d.-]+)", path.get("d", "")):
                assert 0 < float(x) < width
                assert 0 < float(y) < height


def test_bolts_of_unknown_diameter_are_marked_without_a_size() -> None:
    unknown = JointBolts(global_ids=(), count=8, diameter_mm=None, grade=None, hole_diameter_mm=None, grip_mm=None)
    svg = read(examples.moment_joint(bolts=unknown))
    assert bolts(svg) == []
    assert len([path for path in svg.iter(f"{SVG}path") if path.get("class") == "axis"]) == 8


def test_a_joint_without_rows_or_interface_has_no_drawing() -> None:
    assert draw(examples.simple_joint()) == ""
    assert draw(examples.moment_joint(rows=())) == ""


@given(st.lists(st.floats(-500, 500), min_size=1, max_size=30), st.floats(1, 20))
def test_spread_labels_keep_their_order_and_distance(places: list[float], least: float) -> None:
    wanted = sorted(places)
    placed = spread(wanted, least)
    assert all(second - first >= least - 1e-9 for first, second in itertools.pairwise(placed))
    # The least movement in the sense of least squares leaves the mean where it was.
    assert sum(placed) == pytest.approx(sum(wanted), abs=1e-6)
    if all(second - first >= least for first, second in itertools.pairwise(wanted)):
        assert placed == pytest.approx(wanted, abs=1e-9)
