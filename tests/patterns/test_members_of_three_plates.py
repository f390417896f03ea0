"""Members whose web and flanges are three plates of an assembly, or three plates on their own."""

from __future__ import annotations

import math

import pytest

from sample_models.making import Model, at, box

from .scenes import EndPlate, joints_of, rows_of

H, B, TW, TF, LENGTH = 600.0, 250.0, 10.0, 20.0, 5000.0


class ThreePlates(EndPlate):
    """A plate-built beam; its bottom flange rises by `taper` degrees along the beam, its top flange is level."""

    def __init__(self, taper: float = 0.0, **more) -> None:
        super().__init__(beam=(H, B, TW, TF, 0), plate=(260, 760, 25), rows=(640.0, 540.0, 60.0), **more)
        self.taper = taper

    def build_beam(self, model, _place):
        t, rise = self.plate[2], math.tan(math.radians(self.taper)) * LENGTH
        low, high = self.level - H / 2, self.level + H / 2
        upright = at(0, 0, 0, (0, -1, 0), (1, 0, 0))
        web = [(t, low + TF), (t + LENGTH, low + TF + rise), (t + LENGTH, high - TF), (t, high - TF)]
        thick = TF / math.cos(math.radians(self.taper))
        bottom = [(t, low + TF - thick), (t + LENGTH, low + TF - thick + rise), web[1], web[0]]
        made = []
        for name, ring, width in (("web", web, TW), ("bottom", bottom, B)):
            matrix = at(y=width / 2) @ upright
            body = [model.extruded(model.outline([ring]), width)]
            made.append(model.product("IfcPlate", name, matrix, body))
        top = at(t + LENGTH / 2, 0, high - TF, (0, 0, 1), (1, 0, 0))
        made.append(model.product("IfcPlate", "top", top, [model.extruded(model.outline([box(LENGTH, B)]), TF)]))
        return made


@pytest.mark.parametrize("assembled", [True, False])
@pytest.mark.parametrize("taper", [0.0, 3.0])
def test_three_plates_make_one_beam(assembled, taper):
    model, scene = Model(), ThreePlates(taper)
    made = scene.build(model)
    for plate, grade in zip(made["beam"], ("S275JR", "S355J2", "S355J2"), strict=True):
        model.material(plate, grade)
    if assembled:
        assembly = model.rooted("IfcElementAssembly", Name="R7")
        model.rooted("IfcRelAggregates", RelatingObject=assembly, RelatedObjects=[*made["beam"], made["plate"]])
    (joint,) = joints_of(model)
    assert joint.moment_joint, joint.why
    slope = math.tan(math.radians(taper))
    bottom = scene.level - H / 2 + TF - TF / 2 / math.cos(math.radians(taper)) - slope * scene.plate[2]
    design = scene.level - H / 2 + TF / 2
    assert rows_of(joint) == pytest.approx([design + y - bottom for y in scene.rows], abs=0.1)
    assert joint.supported.name == ("R7" if assembled else "web")
    assert joint.supported.grade.startswith("S355")
    assert joint.interface.bottom.thickness_mm == pytest.approx(TF, abs=0.05)
    if not taper:
        section = joint.supported.section
        assert [section.h_mm, section.b_mm, section.tw_mm, section.tf_mm] == pytest.approx([H, B, TW, TF], abs=0.01)


def test_flanges_of_two_grades_have_none():
    model, scene = Model(), ThreePlates()
    made = scene.build(model)
    for plate, grade in zip(made["beam"], ("S355J2", "S275JR", "S355J2"), strict=True):
        model.material(plate, grade)
    (joint,) = joints_of(model)
    assert joint.supported.grade is None


def test_one_flange_missing_is_no_member():
    model, scene = Model(), ThreePlates()
    made = scene.build(model)
    model.file.remove(made["beam"][2])
    (joint,) = joints_of(model)
    assert not joint.moment_joint
