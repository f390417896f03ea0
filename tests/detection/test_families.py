"""Families of joints: alike in everything but place, mirrored ones said, the odd one out told."""

from __future__ import annotations

import pytest

from sample_models.making import Model, turned
from tests.patterns.scenes import EndPlate, joints_of


class OneSided(EndPlate):
    """A joint whose bolts lie 30 mm to one side of the web."""

    shift = 30.0

    def places(self):
        return [(x + self.shift, z) for x, z in super().places()]


def several(scenes) -> list:
    """Each scene at a place of its own, turned its own way."""
    model = Model()
    for number, scene in enumerate(scenes):
        scene.beam_name = f"B{number + 1}"
        scene.build(model, turned(37.0 * number, (0, 0, 1), (12000.0 * number, 500.0 * number, 0)))
    return sorted(joints_of(model), key=lambda joint: joint.supported.name)


def test_alike_in_everything_but_place():
    joints = several([EndPlate(level=level) for level in (3000.0, 4000.0, 5500.0)])
    assert {joint.family for joint in joints} == {"F01"}
    assert not any("family" in joint.provenance for joint in joints)
    assert not any(finding.code == "family-outlier" for joint in joints for finding in joint.findings)


def test_mirrored_joints_share_a_family_and_say_so():
    mirrored = OneSided()
    mirrored.shift = -30.0
    joints = several([OneSided(), mirrored, OneSided()])
    assert {joint.family for joint in joints} == {"F01"}
    assert ["family" in joint.provenance for joint in joints] == [False, True, False]
    assert "mirrored" in joints[1].provenance["family"].detail
    assert joints[0].id in joints[1].provenance["family"].detail


class Staggered(EndPlate):
    """Rows in turn 15 mm to the left and to the right of the web; `first` is the side of the top row."""

    first = 1.0

    def places(self):
        sides = [self.first * (-1.0) ** number * 15.0 for number in range(len(self.rows)) for _ in (0, 1)]
        return [(x + side, z) for (x, z), side in zip(super().places(), sides, strict=True)]


def test_mirroring_goes_row_by_row():
    other = Staggered()
    other.first = -1.0
    joints = several([Staggered(), other])
    assert {joint.family for joint in joints} == {"F01"}
    assert ["family" in joint.provenance for joint in joints] == [False, True]
    swapped = Staggered()
    swapped.places = lambda: [*EndPlate.places(swapped)[:2], *Staggered.places(swapped)[2:]]
    assert len({joint.family for joint in several([Staggered(), swapped])}) == 2


def test_shifted_but_not_mirrored_is_another_family():
    moved = OneSided()
    moved.shift = 10.0
    joints = several([OneSided(), moved])
    assert len({joint.family for joint in joints}) == 2


@pytest.mark.parametrize(
    ("odd", "words", "value", "limit"),
    [
        ({"rows": (443.25, 323.25, 60.0)}, "row 2 y_bottom", 323.25, 333.25),
        ({"plate": (200.0, 540.0, 20.0)}, "end_plate 1 thickness", 20.0, 25.0),
        ({"rows": (443.25, 333.25)}, "number of rows is 2 ", None, None),
        ({"gauge": 100.0}, "gauge is 100.0 ", 100.0, 110.0),
        ({"gauge": 100.0, "rows": (443.25, 343.25, 60.0)}, "", None, None),
        ({}, "", None, None),
    ],
)
def test_the_odd_one_out(odd, words, value, limit):
    joints = several([EndPlate(), EndPlate(), EndPlate(**odd), EndPlate()])
    told = {
        joint.supported.name: finding
        for joint in joints
        for finding in joint.findings
        if finding.code == "family-outlier"
    }
    if not words:
        assert not told
        return
    assert set(told) == {"B3"}
    assert words in told["B3"].message
    assert "the 3 otherwise equal joints of F01" in told["B3"].message
    assert told["B3"].severity == "note"
    if value is not None:
        assert [told["B3"].value, told["B3"].limit] == pytest.approx([value, limit], abs=0.05)


def test_two_and_two_have_no_odd_one():
    joints = several([EndPlate(), EndPlate(), EndPlate(plate=(200, 540, 20)), EndPlate(plate=(200, 540, 20))])
    assert [joint.family for joint in joints] == ["F01", "F01", "F02", "F02"]
    assert not any(finding.code == "family-outlier" for joint in joints for finding in joint.findings)
