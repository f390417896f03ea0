"""Design actions at a member's end, in the signs of the result files.

`M_kNm` > 0 puts the top flange in tension, `N_kN` > 0 is tension in the member,
`V_kN` > 0 acts downwards on the supported member's side.
"""

from __future__ import annotations

from typing import Literal

from .base import Frozen
from .units import KiloNewton, KiloNewtonMetre

FlangeSide = Literal["top", "bottom"]


class Forces(Frozen):
    """Axial force, shear and moment at the member's end."""

    N_kN: KiloNewton
    V_kN: KiloNewton
    M_kNm: KiloNewtonMetre


class Action(Frozen):
    """The forces of one load case or combination, and where they were given."""

    case: str
    forces: Forces
    source: str

    @property
    def tension_flange(self) -> FlangeSide:
        """The flange that the moment pulls."""
        return "top" if self.forces.M_kNm >= 0 else "bottom"
