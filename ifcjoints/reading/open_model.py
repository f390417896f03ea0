"""Open a model, or say in one sentence why it cannot be used."""

from __future__ import annotations

import hashlib
from pathlib import Path
from typing import Any

import ifcopenshell

from ..errors import ModelError

SCHEMAS = ("IFC2X3", "IFC4", "IFC4X3")


def open_model(path: Path) -> Any:
    """Open an IFC file. ModelError names the file and what is wrong with it."""
    if path.is_dir():
        raise ModelError(f"{path}: this is a folder; name an IFC file in it.")
    try:
        with path.open("rb") as stream:
            start, size = stream.read(64), path.stat().st_size
    except OSError as error:
        raise ModelError(f"{path}: the model cannot be read ({error.strerror}).") from error
    if size == 0:
        raise ModelError(f"{path}: the file is empty; export the model again.")
    if path.suffix.lower() not in (".ifczip", ".ifcxml") and not start.lstrip(b"\xef\xbb\xbf \r\n\t").startswith(
        b"ISO-10303-21"
    ):
        raise ModelError(f"{path}: this is not an IFC file (it does not begin with ISO-10303-21).")
    if path.suffix.lower() == ".ifc" and not _is_whole(path):
        raise ModelError(f"{path}: the file is cut short (END-ISO-10303-21 is missing); export or copy it again.")
    try:
        file = ifcopenshell.open(str(path))
    except Exception as error:
        reason = " ".join(str(error).split()) or type(error).__name__
        raise ModelError(f"{path}: this cannot be read as IFC ({reason}).") from error
    return checked(file, str(path))


def checked(file: Any, name: str) -> Any:
    """Return the open file if its schema is one that this program reads."""
    schema = str(file.schema)
    if schema not in SCHEMAS:
        raise ModelError(f"{name}: its schema {schema} is not read; export it as {', '.join(SCHEMAS)}.")
    return file


def sha256(path: Path) -> str:
    """Return a file's SHA-256 as hexadecimal digits."""
    digest = hashlib.sha256()
    with path.open("rb") as stream:
        while block := stream.read(1 << 20):
            digest.update(block)
    return digest.hexdigest()


def originating_system(file: Any) -> str | None:
    """Return what the file's header says of the program that wrote it."""
    try:
        name = file.wrapped_data.header.file_name_py().originating_system
    except Exception:
        name = getattr(getattr(file.header, "file_name", None), "originating_system", None)
    return str(name) if name else None


def _is_whole(path: Path) -> bool:
    with path.open("rb") as stream:
        stream.seek(max(0, path.stat().st_size - 4096))
        return b"END-ISO-10303-21" in stream.read()
