"""Write the sample models: `python -m sample_models.make` (or `make samples`)."""

from __future__ import annotations

from collections.abc import Callable
from datetime import datetime, timezone
from pathlib import Path

from . import boathouse, hall, mezzanine
from .steelwork import CREATED, Steelwork
from .truth import ModelTruth

HERE = Path(__file__).parent
STAMP = datetime.fromtimestamp(CREATED, timezone.utc).strftime("%Y-%m-%dT%H:%M:%S")

MODELS: dict[str, Callable[[], tuple[Steelwork, ModelTruth]]] = {
    "heron_yard_hall": hall.build,
    "heron_yard_mezzanine": mezzanine.build,
    "heron_yard_boathouse": boathouse.build,
}


def write(name: str, folder: Path) -> Path:
    """Write one model; the same bytes each time."""
    steel, _ = MODELS[name]()
    header = steel.file.header.file_name
    header.name, header.time_stamp = f"{name}.ifc", STAMP
    header.author, header.organization = ("",), ("",)
    header.preprocessor_version = header.originating_system = "ifcjoints sample models"
    header.authorization = ""
    path = folder / f"{name}.ifc"
    steel.file.write(str(path))
    return path


if __name__ == "__main__":
    for each in MODELS:
        print(write(each, HERE))
