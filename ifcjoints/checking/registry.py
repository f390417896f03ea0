"""Which checks are installed. Built-in packs and a firm's packs come through the same entry points."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from fnmatch import fnmatchcase
from importlib.metadata import EntryPoint, entry_points

from ..errors import CheckRegistrationError, SettingsError
from .contract import Check

GROUP = "ifcjoints.checks"


@dataclass(frozen=True, slots=True)
class InstalledCheck:
    """A check, and the package and version it came from."""

    check: Check
    package: str
    version: str


def installed_checks(packs: Sequence[str] = (), only: str | None = None) -> list[InstalledCheck]:
    """Return the installed checks by name, limited to `packs` (import packages) and a glob on the name.

    Raises SettingsError for a pack that is not installed, CheckRegistrationError for a check that
    cannot be loaded or goes by two names.
    """
    points = sorted(entry_points(group=GROUP), key=lambda point: point.name)
    known = {_package(point) for point in points}
    for pack in packs:
        if pack not in known:
            raise SettingsError(f'no check pack "{pack}" is installed; installed are: {", ".join(sorted(known))}.')
    return [
        _load(point)
        for point in points
        if (not packs or _package(point) in packs) and (only is None or fnmatchcase(point.name, only))
    ]


def refuse_unknown(names: Iterable[str]) -> None:
    """Raise SettingsError for a check that options are given to and that no installed pack has."""
    known = sorted({point.name for point in entry_points(group=GROUP)})
    for name in names:
        if name not in known:
            raise SettingsError(f'the settings give options to a check "{name}"; installed are: {", ".join(known)}.')


def _package(point: EntryPoint) -> str:
    return point.module.partition(".")[0]


def _load(point: EntryPoint) -> InstalledCheck:
    try:
        check = point.load()
    except CheckRegistrationError:
        raise
    except Exception as error:
        raise CheckRegistrationError(f"the check {point.name} ({point.value}) cannot be loaded: {error}.") from error
    if not isinstance(check, Check) or check.name != point.name:
        raise CheckRegistrationError(
            f"the entry point {point.name} ({point.value}) does not name a check of that name."
        )
    return InstalledCheck(check, _package(point), point.dist.version if point.dist else "unknown")
