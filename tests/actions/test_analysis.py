"""Member-end forces of analysis models in IFC, against hand statics: signs, units, directions, places."""

import numpy as np
import pytest

from ifcjoints import Settings, audit
from ifcjoints.settings import ActionsSettings
from sample_models.making import Model, turned
from tests.patterns.scenes import EndPlate

NODE, SPAN = np.array([-150.0, 0.0, 3000.0]), 8000.0
LOAD = 20.0
END_MOMENT, END_SHEAR = LOAD * SPAN**2 / 12 / 1e6, LOAD * SPAN / 2 / 1e3
"""A beam of 8 m fixed at both ends under 20 kN/m: w l²/12 = 106.7 kNm hogging and w l/2 = 80 kN at either end."""


class Analysis(Model):
    """An analysis model being made: force unit kN, moment unit kNm, lengths as the model's."""

    def __init__(self, unit: float = 1000.0, world: np.ndarray | None = None, kilo: bool = True) -> None:
        super().__init__(unit=unit, world=world)
        prefix = "KILO" if kilo else None
        newton = self.add("IfcSIUnit", UnitType="FORCEUNIT", Prefix=prefix, Name="NEWTON")
        metre = self.add("IfcSIUnit", UnitType="LENGTHUNIT", Name="METRE")
        parts = [self.add("IfcDerivedUnitElement", Unit=each, Exponent=1) for each in (newton, metre)]
        torque = self.add("IfcDerivedUnit", Elements=parts, UnitType="TORQUEUNIT")
        self.project.UnitsInContext.Units = [*self.project.UnitsInContext.Units, newton, torque]
        self.scale = 1.0 if kilo else 1000.0

    def member(self, start: np.ndarray, end: np.ndarray, z: tuple[float, ...] | None = (0, 0, 1)) -> object:
        """Add a curve member between two points in mm, its local z axis told or not."""
        vertices = [self.add("IfcVertexPoint", VertexGeometry=self.point(*point)) for point in (start, end)]
        edge = self.add("IfcEdge", EdgeStart=vertices[0], EdgeEnd=vertices[1])
        axis = self.direction(*(z or (0, 0, 1)))
        made = self.rooted(
            "IfcStructuralCurveMember", Name="M1", ObjectPlacement=self.placement(self.world),
            Representation=self._topology("Edge", edge), PredefinedType="RIGID_JOINED_MEMBER", Axis=axis,
        )  # fmt: skip
        if z is None:
            made.Axis = None
        return made

    def _topology(self, kind: str, item: object) -> object:
        shape = self.add(
            "IfcTopologyRepresentation",
            ContextOfItems=self.context, RepresentationIdentifier="Reference", RepresentationType=kind, Items=[item],
        )  # fmt: skip
        return self.add("IfcProductDefinitionShape", Representations=[shape])

    def single(self, force: tuple[float, ...], moment: tuple[float, ...]) -> object:
        """Add a single force in kN and kNm."""
        values = [value * self.scale for value in (*force, *moment)]
        names = ("ForceX", "ForceY", "ForceZ", "MomentX", "MomentY", "MomentZ")
        return self.add("IfcStructuralLoadSingleForce", **dict(zip(names, values, strict=True)))

    def along(self, member: object, start: tuple, end: tuple, axes: str = "LOCAL_COORDS") -> object:
        """Add resultants at both ends, each (force, moment)."""
        load = self.add(
            "IfcStructuralLoadConfiguration",
            Values=[self.single(*start), self.single(*end)], Locations=[[0.0], [SPAN / self.unit]],
        )  # fmt: skip
        return self._reaction("IfcStructuralCurveReaction", member, load, axes, PredefinedType="DISCRETE")

    def at_point(self, member: object, point: np.ndarray, force: tuple, moment: tuple) -> object:
        """Add what the joint exerts on the member at a point, in world axes."""
        vertex = self.add("IfcVertexPoint", VertexGeometry=self.point(*point))
        shape = self._topology("Vertex", vertex)
        load = self.single(force, moment)
        placement = self.placement(self.world)
        return self._reaction(
            "IfcStructuralPointReaction", member, load, "GLOBAL_COORDS", Representation=shape, ObjectPlacement=placement
        )

    def _reaction(self, kind: str, member: object, load: object, axes: str, **more: object) -> object:
        made = self.rooted(kind, AppliedLoad=load, GlobalOrLocal=axes, **more)
        self.rooted("IfcRelConnectsStructuralActivity", RelatingElement=member, RelatedStructuralActivity=made)
        return made

    def results(self, case: str, *activities: object) -> None:
        """Group results for a load combination."""
        load = self.rooted(
            "IfcStructuralLoadGroup", Name=case, PredefinedType="LOAD_COMBINATION", ActionType="NOTDEFINED",
            ActionSource="NOTDEFINED",
        )  # fmt: skip
        group = self.rooted(
            "IfcStructuralResultGroup", TheoryType="FIRST_ORDER_THEORY", ResultForLoadGroup=load, IsLinear=True
        )
        self.rooted("IfcRelAssignsToGroup", RelatedObjects=list(activities), RelatingGroup=group)


def fixed_beam(analysis: Analysis, backwards: bool = False, z: tuple[float, ...] | None = (0, 0, 1)) -> None:
    """Add the fixed beam with its resultants on the face towards the end: at the start shear −80, at the end +80."""
    far = NODE + [SPAN, 0, 0]
    member = analysis.member(*((far, NODE) if backwards else (NODE, far)), z=z)
    start = ((0, 0, -END_SHEAR), (0, END_MOMENT, 0))
    end = ((0, 0, END_SHEAR), (0, END_MOMENT, 0))
    analysis.results("ULS 1", analysis.along(member, start, end))


def audited(analysis: Analysis, folder, world: np.ndarray | None = None, settings: Settings | None = None):
    path = folder / "analysis.ifc"
    analysis.file.write(str(path))
    steel = Model(world=world)
    EndPlate().build(steel)
    return audit(steel.file, actions=path, settings=settings or Settings())


def forces(result):
    (joint,) = result.joints
    found = [each.actions for each in joint.checks if each.check == "bolt_group.elastic" and each.actions]
    return [(each.N_kN, each.V_kN, each.M_kNm) for each in found]


@pytest.mark.parametrize("backwards", [False, True])
@pytest.mark.parametrize(("unit", "kilo"), [(1000.0, True), (1.0, False), (304.8, True)])
def test_a_fixed_beam_under_uniform_load(backwards, unit, kilo, tmp_path):
    analysis = Analysis(unit, kilo=kilo)
    fixed_beam(analysis, backwards)
    result = audited(analysis, tmp_path)
    assert forces(result) == [pytest.approx((0.0, END_SHEAR, END_MOMENT), abs=1e-6)]
    assert any("check the sign of one joint by hand" in problem.message for problem in result.problems)
    assert result.joints[0].checks[0].case == "ULS 1"


def test_the_local_axes_turned_about_the_member(tmp_path):
    """With its z axis sideways, the same beam bends about its local z: y = z × x points down."""
    analysis = Analysis()
    member = analysis.member(NODE, NODE + [SPAN, 0, 0], z=(0, 1, 0))
    start = ((0, END_SHEAR, 0), (0, 0, END_MOMENT))
    analysis.results("ULS 1", analysis.along(member, start, ((0, -END_SHEAR, 0), (0, 0, END_MOMENT))))
    assert forces(audited(analysis, tmp_path)) == [pytest.approx((0.0, END_SHEAR, END_MOMENT), abs=1e-6)]


def test_a_cantilever_with_a_tip_load_and_tension(tmp_path):
    """30 kN down at 2 m and 50 kN outwards: the joint holds up 30, pulls back 50, and hogs 60 kNm."""
    analysis = Analysis()
    member = analysis.member(NODE, NODE + [2000.0, 0, 0])
    analysis.results("tip", analysis.at_point(member, NODE, (-50.0, 0, 30.0), (0, -60.0, 0)))
    assert forces(audited(analysis, tmp_path)) == [pytest.approx((50.0, 30.0, 60.0), abs=1e-9)]


def test_a_whole_building_turned_keeps_the_signs(tmp_path):
    world = turned(130.0, shift=(12000.0, -7000.0, 500.0))
    analysis = Analysis(world=world)
    fixed_beam(analysis)
    assert forces(audited(analysis, tmp_path, world)) == [pytest.approx((0.0, END_SHEAR, END_MOMENT), abs=1e-6)]


def test_several_combinations_act_each_by_itself(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE, NODE + [SPAN, 0, 0])
    for case, moment in (("gravity", -60.0), ("uplift", 25.0)):
        analysis.results(case, analysis.at_point(member, NODE, (0, 0, 0), (0, moment, 0)))
    (joint,) = audited(analysis, tmp_path).joints
    by_case = {each.case: (each.tension_flange, each.actions.M_kNm) for each in joint.checks}
    assert by_case["gravity"] == ("top", pytest.approx(60.0))
    assert by_case["uplift"] == ("bottom", pytest.approx(-25.0))


def test_local_results_without_a_z_axis_are_left_out_and_said(tmp_path):
    analysis = Analysis()
    fixed_beam(analysis, z=None)
    result = audited(analysis, tmp_path)
    assert forces(result) == []
    assert any("z axis" in problem.message for problem in result.problems)


def test_a_member_far_away_or_another_way_is_not_taken(tmp_path):
    analysis = Analysis()
    member = analysis.member(NODE + [0, 900.0, 0], NODE + [SPAN, 900.0, 0])
    other = analysis.member(NODE, NODE + [0, SPAN, 0])
    analysis.results(
        "far",
        analysis.at_point(member, NODE + [0, 900.0, 0], (0, 0, 1.0), (0, -1.0, 0)),
        analysis.at_point(other, NODE, (0, 0, 2.0), (2.0, 0, 0)),
    )
    assert forces(audited(analysis, tmp_path)) == []
    wide = Settings(actions=ActionsSettings(node_distance_mm=1200.0))
    assert forces(audited(analysis, tmp_path, settings=wide)) == [pytest.approx((0.0, 1.0, 1.0))]


def test_two_members_at_one_place_are_not_told_apart(tmp_path):
    analysis = Analysis()
    activities = []
    for moment in (10.0, 20.0):
        member = analysis.member(NODE, NODE + [SPAN, 0, 0])
        activities.append(analysis.at_point(member, NODE, (0, 0, 0), (0, -moment, 0)))
    analysis.results("ULS", *activities)
    result = audited(analysis, tmp_path)
    assert forces(result) == []
    assert any("none is used" in problem.message for problem in result.problems)


def test_a_file_without_results_is_said(tmp_path):
    result = audited(Analysis(), tmp_path)
    assert any("no member-end forces" in problem.message for problem in result.problems)
