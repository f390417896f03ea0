"""Members in every way that exports write their bodies: the joint and its figures stay the same."""

from __future__ import annotations

import math

import numpy as np
import pytest

from sample_models.making import Model, at, box, i_ring

from .scenes import ACROSS, IPE400, EndPlate, joints_of, rows_of


class OwnBeam(EndPlate):
    """An end plate joint whose beam a function writes: items along z from the plate's face, y up."""

    def __init__(self, items, rep="SweptSolid", **more):
        super().__init__(**more)
        self._items, self._own_rep = items, rep

    def build_beam(self, model, place):
        matrix = place @ at(self.plate[2], 0, self.axis_height, (1, 0, 0), ACROSS)
        return model.product(self.beam_class, self.beam_name, matrix, self._items(model), self._own_rep)


def the_joint(scene, model=None):
    model = model or Model()
    scene.build(model)
    (joint,) = joints_of(model)
    return joint


def figures(section):
    return [section.h_mm, section.b_mm, section.tw_mm, section.tf_mm, section.r_mm]


def profile_beam(profile, length=4000.0):
    return lambda model: [model.extruded(profile(model), length)]


def test_mirrored_and_derived_profiles():
    for kind in ("IfcDerivedProfileDef", "IfcMirroredProfileDef"):

        def profile(model, kind=kind):
            parent = model.i_profile(*IPE400, "IPE 400")
            shift = {}
            if kind == "IfcDerivedProfileDef":
                shift["Operator"] = model.add(
                    "IfcCartesianTransformationOperator2D", Axis1=model.direction(-1, 0), Axis2=model.direction(0, 1),
                    LocalOrigin=model.point(0, 0),
                )  # fmt: skip
            return model.add(kind, ProfileType="AREA", ParentProfile=parent, **shift)

        scene = OwnBeam(profile_beam(profile))
        joint = the_joint(scene)
        assert joint.moment_joint, joint.why
        assert figures(joint.supported.section) == pytest.approx(list(IPE400))
        assert joint.supported.section.designation == "IPE 400"
        assert rows_of(joint) == pytest.approx(list(scene.rows), abs=0.01)


def test_flanges_of_two_thicknesses():
    """The bottom flange is 24 mm thick and 220 wide, the top one 12 mm and 180: rows count from 12 above the bottom."""

    def profile(model):
        return model.profile(
            "IfcAsymmetricIShapeProfileDef",
            BottomFlangeWidth=220, OverallDepth=400, WebThickness=10, BottomFlangeThickness=24,
            TopFlangeWidth=180, TopFlangeThickness=12,
        )  # fmt: skip

    joint = the_joint(OwnBeam(profile_beam(profile), plate=(240, 540, 25)))
    assert joint.moment_joint, joint.why
    assert joint.interface.bottom.thickness_mm == pytest.approx(24, abs=0.05)
    assert joint.interface.top.thickness_mm == pytest.approx(12, abs=0.05)
    assert [joint.interface.bottom.width_mm, joint.interface.top.width_mm] == pytest.approx([220, 180], abs=0.1)
    assert joint.interface.flange_distance_mm == pytest.approx(400 - 12 - 6, abs=0.05)
    assert joint.supported.section.tf_mm is None
    first = 3000 - 386.5 / 2 + 443.25
    assert rows_of(joint)[0] == pytest.approx(first - (2800 + 12), abs=0.05)


def plates_of_a_built_up_beam(h=600.0, b=250.0, tw=10.0, tf=20.0, length=4000.0, taper=0.0):
    """Web, bottom and top flange along z; with a taper in degrees the depth shrinks, the top flange straight."""
    fall = math.tan(math.radians(taper)) * length

    def plates(model):
        web = [(0, -h / 2 + tf), (length, -h / 2 + tf + fall), (length, h / 2 - tf), (0, h / 2 - tf)]
        upright = np.eye(4)
        upright[:3, 0], upright[:3, 1], upright[:3, 2] = (0, 0, 1), (0, 1, 0), (-1, 0, 0)
        upright[:3, 3] = (tw / 2, 0, 0)
        slope, thick = math.radians(taper), tf / math.cos(math.radians(taper))
        bottom = [(0, -h / 2 + tf - thick), (length, -h / 2 + tf - thick + fall), (length, web[1][1]), (0, web[0][1])]
        wide = upright.copy()
        wide[:3, 3] = (b / 2, 0, 0)
        top = [(0, h / 2 - tf), (length, h / 2 - tf), (length, h / 2), (0, h / 2)]
        assert slope >= 0
        return [
            (model.outline([web]), tw, upright),
            (model.outline([bottom]), b, wide),
            (model.outline([top]), b, wide),
        ]

    return plates


@pytest.mark.parametrize("dialect", ["solids", "mapped"])
def test_web_and_flanges_as_solids_of_one_element(dialect):
    plates = plates_of_a_built_up_beam()

    def items(model):
        solids = [model.extruded(profile, depth, matrix) for profile, depth, matrix in plates(model)]
        return [model.mapped(solids)] if dialect == "mapped" else solids

    scene = OwnBeam(items, plate=(260, 760, 25), rows=(640.0, 540.0, 60.0), beam=(600, 250, 10, 20, 0))
    joint = the_joint(scene)
    assert joint.moment_joint, joint.why
    assert figures(joint.supported.section) == pytest.approx([600, 250, 10, 20, None], abs=0.01)
    assert rows_of(joint) == pytest.approx([640, 540, 60], abs=0.05)


@pytest.mark.parametrize("taper", [2.0, 6.0])
def test_a_tapered_plate_built_beam(taper):
    """The bottom flange rises along the beam; carried on to the interface it meets it lower than where it is cut."""
    plates = plates_of_a_built_up_beam(taper=taper)

    def items(model):
        return [model.extruded(profile, depth, matrix) for profile, depth, matrix in plates(model)]

    joint = the_joint(OwnBeam(items, plate=(260, 760, 25), rows=(640.0, 540.0, 60.0), beam=(600, 250, 10, 20, 0)))
    assert joint.moment_joint, joint.why
    slope = math.tan(math.radians(taper))
    thick = 20 / math.cos(math.radians(taper))
    bottom = 3000 - 300 + 20 - thick / 2 - slope * 25
    assert joint.interface.origin_mm[2] == pytest.approx(bottom, abs=0.1)
    assert rows_of(joint) == pytest.approx([2710 + y - bottom for y in (640, 540, 60)], abs=0.1)
    assert joint.interface.bottom.inclination_deg == pytest.approx(taper, abs=0.05)
    assert joint.interface.top.inclination_deg == pytest.approx(0.0, abs=0.05)
    assert joint.interface.bottom.thickness_mm == pytest.approx(20.0, abs=0.05)
    # Half-way square to the axis, not upright: the two differ by the second order of the taper.
    half_way = (3300 + 2700 + 20 - thick - slope * 25) / 2
    assert joint.interface.axis_y_mm == pytest.approx(half_way - bottom, abs=600 * math.radians(taper) ** 2 / 4)


def coped(kind):
    """An IPE 400 whose flanges stop 60 mm short of the end plate: only the web stands on it."""

    def items(model):
        body = model.extruded(model.i_profile(*IPE400, "IPE 400"), 4000.0)
        if kind == "boolean":
            for y in (190.0, -190.0):
                notch = model.extruded(model.outline([box(200, 60, 0, y)]), 60.0)
                body = model.add("IfcBooleanResult", Operator="DIFFERENCE", FirstOperand=body, SecondOperand=notch)
        return [body]

    return items


@pytest.mark.parametrize("kind", ["boolean", "opening"])
def test_copes_leave_no_flange_on_the_plate(kind):
    model = Model()
    scene = OwnBeam(coped(kind), "CSG" if kind == "boolean" else "SweptSolid")
    made = scene.build(model)
    if kind == "opening":
        matrix = at(25, 0, 3000, (1, 0, 0), ACROSS)
        for y in (190.0, -190.0):
            model.opening(made["beam"], matrix, [model.extruded(model.outline([box(200, 60, 0, y)]), 60.0)])
    (joint,) = joints_of(model)
    assert not joint.moment_joint
    assert "flange" in joint.why
    assert joint.supported.section.h_mm == pytest.approx(400)


def test_only_the_top_flange_is_coped():
    def items(model):
        body = model.extruded(model.i_profile(*IPE400, "IPE 400"), 4000.0)
        notch = model.extruded(model.outline([box(200, 60, 0, 190)]), 60.0)
        return [model.add("IfcBooleanResult", Operator="DIFFERENCE", FirstOperand=body, SecondOperand=notch)]

    joint = the_joint(OwnBeam(items, "CSG"))
    assert not joint.moment_joint


def test_a_hollow_beam_is_no_moment_joint_of_two_flanges():
    def profile(model):
        return model.profile("IfcRectangleHollowProfileDef", XDim=200, YDim=300, WallThickness=10)

    joint = the_joint(OwnBeam(profile_beam(profile), plate=(220, 500, 20)))
    assert not joint.moment_joint
    assert joint.supported.section.shape == "hollow_rectangular"


def test_a_channel_beam():
    def profile(model):
        return model.profile(
            "IfcUShapeProfileDef", "UPN 300",
            Depth=300, FlangeWidth=100, WebThickness=10, FlangeThickness=16, FilletRadius=16,
        )  # fmt: skip

    joint = the_joint(OwnBeam(profile_beam(profile), plate=(200, 440, 20), rows=(330.0, 230.0, 50.0)))
    assert joint.moment_joint, joint.why
    assert joint.interface.flange_distance_mm == pytest.approx(284, abs=0.05)


@pytest.mark.parametrize("beam_class", ["IfcBeam", "IfcMember", "IfcColumn", "IfcBuildingElementProxy", "IfcPlate"])
@pytest.mark.parametrize(
    "plate_class", ["IfcPlate", "IfcBeam", "IfcColumn", "IfcMember", "IfcSlab", "IfcBuildingElementProxy",
                    "IfcDiscreteAccessory"],
)  # fmt: skip
def test_the_class_decides_nothing(beam_class, plate_class):
    scene = EndPlate(dialect="brep", beam_class=beam_class, plate_class=plate_class, column_class="IfcMember")
    joint = the_joint(scene)
    assert joint.moment_joint, joint.why
    assert joint.configuration == "beam_to_column_flange"
    assert rows_of(joint) == pytest.approx(list(scene.rows), abs=0.05)


def test_elements_without_a_body():
    model, scene = Model(), EndPlate()
    model.product("IfcBuildingElementProxy", "layout", np.eye(4))
    model.rooted("IfcElementAssembly", Name="A1")
    scene.build(model)
    (joint,) = joints_of(model)
    assert joint.moment_joint


@pytest.mark.parametrize("facets", [1, 2, 6])
def test_root_fillets_in_facets(facets):
    ring = i_ring(*IPE400, facets)
    joint = the_joint(OwnBeam(lambda model: [model.brep_prism([ring], 4000.0)], "Brep"))
    assert figures(joint.supported.section) == pytest.approx(list(IPE400), abs=0.2)


def test_a_profile_only_the_kernel_knows():
    """A surface-curve sweep of an I-profile: measured from the kernel's body."""

    def items(model):
        line = model.add("IfcPolyline", Points=[model.point(0, 0, 0), model.point(0, 0, 2000), model.point(0, 0, 4000)])
        position = model.axes(np.eye(4))
        plane = model.add("IfcPlane", Position=model.axes(at(axis=(1, 0, 0))))
        return [
            model.add(
                "IfcSurfaceCurveSweptAreaSolid", SweptArea=model.i_profile(*IPE400), Position=position,
                Directrix=line, ReferenceSurface=plane, StartParam=0.0, EndParam=2.0,
            )
        ]  # fmt: skip

    joint = the_joint(OwnBeam(items, "AdvancedSweptSolid"), Model("IFC2X3"))
    assert joint.supported.section.shape == "I"
    assert sorted([joint.supported.section.h_mm, joint.supported.section.b_mm]) == pytest.approx([180, 400], abs=0.2)
