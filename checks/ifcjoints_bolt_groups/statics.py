"""Statics of bolt rows about the compression flange's centre line.

Every function takes traced quantities, so that what is worked out is also what is shown. Lengths in mm,
forces in N, moments in Nmm. M_c is the moment of the actions about the compression flange's centre line;
`y` are the rows' lever arms from it, `n` the bolts in each row.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass

from ifcjoints.checking import NotApplicable, Quantity, Subject, Trace
from ifcjoints.model.joints import Interface

METHOD = "linear strain about the compression flange's centre line"
OPEN_METHOD = "linear strain, equilibrium of N and M about the bolts' centroid"


@dataclass(frozen=True, slots=True)
class BoltRow:
    """A row of the joint: its place in `joint.rows`, its bolts and its lever arm."""

    index: int
    n: Quantity
    y: Quantity


@dataclass(frozen=True, slots=True)
class Loads:
    """The actions: N > 0 in tension, M ≥ 0 in the direction looked at, V ≥ 0, and N's lever arm."""

    N: Quantity
    M: Quantity
    V: Quantity
    e_N: Quantity


def given_rows(subject: Subject, trace: Trace) -> list[BoltRow]:
    """Record the rows, farthest from the compression flange first."""
    origin = subject.joint.provenance.get("rows")
    told = f"{origin.source}: {origin.detail}" if origin else "given"
    rows = []
    for index, row in enumerate(subject.joint.rows):
        number = index + 1
        y = trace.given(f"y_{number}", row.lever_arm(subject.tension_flange), "mm", f"row {number}, {told}")
        n = trace.given(f"n_{number}", row.count, "", f"bolts in row {number}")
        rows.append(BoltRow(index, n, y))
    return sorted(rows, key=lambda row: -float(row.y))


def given_loads(subject: Subject, interface: Interface, trace: Trace) -> Loads:
    """Record the actions, the moment in the direction looked at; zero where there is no action."""
    action = subject.action
    if action is None:
        N, M, V = (trace.constant(symbol, 0.0) for symbol in ("N_Ed", "M_Ed", "V_Ed"))
        return Loads(N, M, V, trace.constant("e_N", interface.axis_lever_arm(subject.tension_flange)))
    forces, told = action.forces, f"{action.case}, {action.source}"
    return Loads(
        trace.given("N_Ed", forces.N_kN * 1e3, "kN", told),
        trace.given("M_Ed", abs(forces.M_kNm) * 1e6, "kNm", told),
        trace.given("V_Ed", abs(forces.V_kN) * 1e3, "kN", told),
        trace.given(
            "e_N", interface.axis_lever_arm(subject.tension_flange), "mm", "member's axis from the compression flange"
        ),
    )


def total(terms: Sequence[Quantity]) -> Quantity:
    """Return the sum of at least one quantity."""
    result = terms[0]
    for term in terms[1:]:
        result = result + term
    return result


def pulling(rows: Sequence[BoltRow]) -> list[BoltRow]:
    """Return the rows on the tension side of the compression flange."""
    found = [row for row in rows if row.y > 0]
    if not found:
        raise NotApplicable("no bolt row lies on the tension side of the compression flange.")
    return found


@dataclass(frozen=True, slots=True)
class LinearGroup:
    """Rows that pull in proportion to their lever arm, while the compression flange bears."""

    rows: list[BoltRow]
    S_1: Quantity
    S_2: Quantity

    @classmethod
    def of(cls, rows: Sequence[BoltRow], trace: Trace) -> LinearGroup:
        """Record the sums Σ n y and Σ n y² over the pulling rows."""
        active = pulling(rows)
        S_1 = trace.step("Σny", total([row.n * row.y for row in active]), "mm", METHOD)
        S_2 = trace.step("Σny²", total([row.n * row.y**2 for row in active]), "mm²", METHOD)
        return cls(active, S_1, S_2)

    def bears(self, M_c: Quantity, N: Quantity) -> bool:
        """Whether the compression flange still bears: always without axial tension, else while Σ F ≥ N."""
        return float(N) <= 0 or float(M_c) * float(self.S_1) >= float(N) * float(self.S_2) * (1 - 1e-12)

    def row_force(self, row: BoltRow, M_c: Quantity) -> Quantity:
        """F_r = n_r M_c y_r / Σ n y²."""
        return row.n * M_c * row.y / self.S_2

    def compression(self, M_c: Quantity, N: Quantity) -> Quantity:
        """C = Σ F − N = M_c Σ n y / Σ n y² − N."""
        return M_c * self.S_1 / self.S_2 - N


@dataclass(frozen=True, slots=True)
class OpenGroup:
    """Rows that pull when the joint opens altogether: N and M act on the bolts alone."""

    rows: list[BoltRow]
    count: Quantity
    mean: Quantity
    inertia: Quantity

    @classmethod
    def of(cls, rows: Sequence[BoltRow], trace: Trace) -> OpenGroup:
        """Record the centroid of the rows and their second moment about it."""
        count = trace.step("n", total([row.n for row in rows]), "", OPEN_METHOD)
        mean = trace.step("ȳ", total([row.n * row.y for row in rows]) / count, "mm", OPEN_METHOD)
        inertia = trace.step("Σn(y−ȳ)²", total([row.n * (row.y - mean) ** 2 for row in rows]), "mm²", OPEN_METHOD)
        return cls(list(rows), count, mean, inertia)

    def bolt_force(self, y: Quantity, M_c: Quantity, N: Quantity) -> Quantity:
        """F_b = N / n + (M_c − N ȳ) (y − ȳ) / Σ n (y − ȳ)², for one bolt at lever arm y."""
        return N / self.count + (M_c - N * self.mean) * (y - self.mean) / self.inertia

    def moment_at(self, bolt_force: Quantity, N: Quantity) -> Quantity:
        """The M_c at which the bolt farthest out carries this force."""
        far = self.rows[0].y
        return (bolt_force - N / self.count) * self.inertia / (far - self.mean) + N * self.mean


def open_group(rows: Sequence[BoltRow], N: Quantity, moment: Callable[[OpenGroup], float], trace: Trace) -> OpenGroup:
    """Return the rows that pull when the flange does not bear: rows join as the zero line passes them.

    `moment` gives the M_c in question for a set of rows. NotApplicable where no set can balance it.
    """
    slack = 1e-9 * abs(float(N))
    for size in range(max(2, len(pulling(rows))), len(rows) + 1):
        group = OpenGroup.of(rows[:size], Trace())
        if float(group.inertia) <= 0:
            continue
        forces = [_plain_force(group, float(row.y), moment(group), float(N)) for row in rows]
        if min(forces[:size]) >= -slack and all(force <= slack for force in forces[size:]):
            return OpenGroup.of(rows[:size], trace)
    raise NotApplicable("the axial tension cannot be balanced by bolts in tension alone.")


def _plain_force(group: OpenGroup, y: float, M_c: float, N: float) -> float:
    moment = M_c - N * float(group.mean)
    return N / float(group.count) + moment * (y - float(group.mean)) / float(group.inertia)
