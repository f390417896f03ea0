"""The contract that a check fulfils, the calculation trace, the registry and the runner."""

from .contract import Case, Check, NoOptions, NotApplicable, NotCheckable, Subject, Verdict, check
from .trace import N, Quantity, Trace, greatest, least, root

__all__ = [
    "Case",
    "Check",
    "N",
    "NoOptions",
    "NotApplicable",
    "NotCheckable",
    "Quantity",
    "Subject",
    "Trace",
    "Verdict",
    "check",
    "greatest",
    "least",
    "root",
]
