"""What can go wrong, as a small family.

    IfcJointsError              anything this package raises on purpose
    ├── InputError              what was handed in cannot be used (exit status 2)
    │   ├── ModelError          the model: missing, empty, cut short, not IFC
    │   ├── ActionsError        the table of design actions
    │   └── SettingsError       the settings file
    ├── OutputError             the results cannot be written where asked (exit status 2)
    └── CheckRegistrationError  a check that does not keep its contract

Each message is one plain sentence that names the file, line, joint or element, and the remedy.
"""

from __future__ import annotations


class IfcJointsError(Exception):
    """Anything this package raises on purpose."""


class InputError(IfcJointsError):
    """What was handed in cannot be used."""


class ModelError(InputError):
    """The model cannot be used."""


class ActionsError(InputError):
    """The table of design actions cannot be used."""


class SettingsError(InputError):
    """The settings cannot be used."""


class OutputError(IfcJointsError):
    """The results cannot be written where asked."""


class CheckRegistrationError(IfcJointsError):
    """A check does not keep the contract of :mod:`ifcjoints.checking`."""
