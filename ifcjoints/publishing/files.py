"""Write result files so that either all of them stand whole or the folder is as it was."""

from __future__ import annotations

import shutil
import tempfile
from collections.abc import Callable, Iterable, Mapping
from pathlib import Path

from ..errors import OutputError


def write_files(
    folder: Path, writers: Mapping[str, Callable[[Path], None]], inputs: Iterable[Path] = ()
) -> tuple[Path, ...]:
    """Write files into a folder, which is made if need be; return where they stand.

    Each of `writers` is given a path of its own in a temporary neighbour and writes one file there;
    only when all have done so are the files moved in place. Raises OutputError where the folder cannot
    be written to or a file would replace one of the `inputs`; whatever is raised, nothing half-written stays.
    """
    targets = [folder / name for name in writers]
    for target in targets:
        _refuse(target, inputs)
    made = _make(folder)
    try:
        with tempfile.TemporaryDirectory(prefix=".ifcjoints-", dir=folder) as neighbour:
            for name, write in writers.items():
                write(Path(neighbour) / name)
            for name, target in zip(writers, targets, strict=True):
                (Path(neighbour) / name).replace(target)
    except BaseException as error:
        if made is not None:
            shutil.rmtree(made, ignore_errors=True)
        if isinstance(error, OSError):
            raise OutputError(f"{folder}: the results cannot be written ({error.strerror}).") from error
        raise
    return tuple(targets)


def _refuse(target: Path, inputs: Iterable[Path]) -> None:
    if target.is_dir():
        raise OutputError(f"{target}: a folder stands where this result file belongs; move it or name another --out.")
    for given in inputs:
        if target.exists() and given.exists() and target.samefile(given):
            raise OutputError(f"{target}: this result would replace an input of the run; name another --out.")


def _make(folder: Path) -> Path | None:
    """Make the folder and those above it; return the topmost that was made."""
    made = None
    try:
        for each in reversed((folder, *folder.parents)):
            if not each.exists():
                each.mkdir()
                made = made or each
    except OSError as error:
        if made is not None:
            shutil.rmtree(made, ignore_errors=True)
        raise OutputError(f"{folder}: this folder cannot be made ({error.strerror}); name another --out.") from error
    return made
