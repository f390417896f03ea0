"""Names for plain floats, so that a signature says its units."""

from __future__ import annotations

from typing import TypeAlias

import numpy as np
import numpy.typing as npt

Mm: TypeAlias = float
Mm2: TypeAlias = float
Mm3: TypeAlias = float
Mm4: TypeAlias = float
Degrees: TypeAlias = float
Newton: TypeAlias = float
KiloNewton: TypeAlias = float
KiloNewtonMetre: TypeAlias = float
Nmm2: TypeAlias = float

Array: TypeAlias = npt.NDArray[np.float64]
Vector: TypeAlias = tuple[float, float, float]
"""A point in mm or a direction of unit length, in the model's world axes."""
