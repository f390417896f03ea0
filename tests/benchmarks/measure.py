"""Time and memory of a whole audit against opening and triangulating the same model, as ratios.

    python -m tests.benchmarks.measure 60 250 1000 4000

Each figure comes from a process of its own; a row's figures are taken one after another, so that they
meet the same machine. `growth` is the exponent of the audit's processor time from the row before.
"""

from __future__ import annotations

import json
import math
import resource
import subprocess
import sys
import tempfile
import time
from collections.abc import Callable
from pathlib import Path

from tests.benchmarks.steel_grid import write_grid

KERNEL = "hybrid-cgal-simple-opencascade"
THREADS = 2


def open_only(path: Path) -> int:
    """Open the model and do nothing with it."""
    import ifcopenshell  # noqa: PLC0415 - each task pays for its own imports only

    file = ifcopenshell.open(str(path))
    return len(file.by_type("IfcElement"))


def triangulate(path: Path) -> int:
    """Open the model and triangulate every body with the geometry iterator."""
    import ifcopenshell  # noqa: PLC0415
    import ifcopenshell.geom  # noqa: PLC0415

    file = ifcopenshell.open(str(path))
    iterator = ifcopenshell.geom.iterator(ifcopenshell.geom.settings(), file, THREADS, geometry_library=KERNEL)
    count = 0
    if iterator.initialize():
        count = 1
        while iterator.next():
            count += 1
    return count


def whole_audit(path: Path) -> int:
    """Audit the model: read, detect, check and write audit.json."""
    from ifcjoints.audit import audit  # noqa: PLC0415

    result = audit(path)
    path.with_suffix(".json").write_text(result.to_json(), encoding="utf-8")
    return sum(joint.moment_joint for joint in result.joints)


TASKS: dict[str, Callable[[Path], int]] = {"open": open_only, "triangulate": triangulate, "audit": whole_audit}


def run_here(task: str, path: Path) -> dict[str, float]:
    """Run a task in this process; seconds without imports, and the process's peak memory in MB."""
    TASKS[task](_warm_up(path))
    start, processor = time.perf_counter(), time.process_time()
    count = TASKS[task](path)
    seconds, busy = time.perf_counter() - start, time.process_time() - processor
    peak = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss / 1024
    return {"seconds": seconds, "busy": busy, "peak_mb": peak, "count": count}


def _warm_up(path: Path) -> Path:
    """Return a tiny model beside the large one, so that imports are paid for before the clock starts."""
    small = path.with_name("warm-up.ifc")
    if not small.exists():
        write_grid(small, 2)
    return small


def run_apart(task: str, path: Path) -> dict[str, float]:
    """Run a task in a process of its own."""
    command = [sys.executable, "-m", "tests.benchmarks.measure", "--task", task, str(path)]
    done = subprocess.run(command, check=True, capture_output=True, text=True)
    figures: dict[str, float] = json.loads(done.stdout.splitlines()[-1])
    return figures


def table(sizes: list[int]) -> None:
    """Print the table of DEVELOPERS.md."""
    print("| joints | model MB | audit s | audit / triangulate | audit / open | peak memory / open | growth |")
    print("|---:|---:|---:|---:|---:|---:|---:|")
    before: tuple[int, float] | None = None
    with tempfile.TemporaryDirectory() as folder:
        for size in sizes:
            path = Path(folder) / f"grid-{size}.ifc"
            write_grid(path, size)
            figures = {task: run_apart(task, path) for task in TASKS}
            assert figures["audit"]["count"] == size, "the audit did not find every joint"
            seconds = figures["audit"]["seconds"]
            busy = figures["audit"]["busy"]
            growth = math.log(busy / before[1]) / math.log(size / before[0]) if before else math.nan
            cells = [
                f"{size}",
                f"{path.stat().st_size / 1e6:.0f}",
                f"{seconds:.1f}",
                f"{seconds / figures['triangulate']['seconds']:.2f}",
                f"{seconds / figures['open']['seconds']:.1f}",
                f"{figures['audit']['peak_mb'] / figures['open']['peak_mb']:.2f}",
                f"{growth:.2f}" if before else "",
            ]
            print("| " + " | ".join(cells) + " |", flush=True)
            before = (size, busy)


if __name__ == "__main__":
    if sys.argv[1:2] == ["--task"]:
        print(json.dumps(run_here(sys.argv[2], Path(sys.argv[3]))))
    else:
        table([int(size) for size in sys.argv[1:]] or [60, 250, 1000, 4000])
