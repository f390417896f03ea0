"""Audit the bolted moment joints of a steel building model in IFC.

    import ifcjoints

    result = ifcjoints.audit("hall.ifc", actions="hall.actions.csv")
    for joint in result.joints:
        print(joint.name, [row.y_bottom_mm for row in joint.rows])

    ifcjoints.write_back(file, result)      # an open ifcopenshell.file
    text = result.to_json()                 # what audit.json holds

What is listed in `__all__` is what there is. Checks are written with :func:`check` and found through
the entry points "ifcjoints.checks"; everything a check needs stands in :mod:`ifcjoints.checking`.
Results support a competent engineer's check; they replace neither it nor the governing code and contract.
"""

from .audit import audit
from .checking import check
from .model.actions import Action
from .model.audit import Audit
from .model.findings import Finding, Problem
from .model.joints import Joint
from .model.results import Result, Step
from .publishing.property_sets import write_back
from .settings import Settings, read_settings

__all__ = [
    "Action",
    "Audit",
    "Finding",
    "Joint",
    "Problem",
    "Result",
    "Settings",
    "Step",
    "audit",
    "check",
    "read_settings",
    "write_back",
]
