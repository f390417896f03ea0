"""The arrows of the house: IFC → parts → joints → checks → outputs, and no way back."""

import ast
from pathlib import Path

import pytest

ROOT = Path(__file__).parent.parent
BASE = {"model", "tables", "settings", "errors"}
ALLOWED = {
    "model": set(),
    "errors": set(),
    "settings": {"model", "errors"},
    "tables": {"model"},
    "reading": BASE,
    "detection": BASE | {"reading"},
    "actions": BASE | {"detection", "reading"},
    "checking": BASE,
    "publishing": BASE | {"checking"},
    "revisions": BASE,
}
"""What each folder may import of its neighbours; audit.py, cli.py and the package itself may import all."""

IFC_FOLDERS = {"reading"}
IFC_FILES = {"publishing/property_sets.py", "publishing/standing_results.py", "publishing/ifc_values.py"}
PACK_MAY = {"model", "checking", "tables"}


def imports(path: Path, package: str):
    """Yield the absolute name of every module that a file of a package imports."""
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            yield from (alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            if not node.level:
                yield node.module or ""
                continue
            above = package.split(".")[: len(package.split(".")) - node.level + 1]
            yield ".".join([*above, *([node.module] if node.module else [])])
            if not node.module:
                yield from (".".join([*above, alias.name]) for alias in node.names)


def files_of(folder: Path):
    return sorted(path for path in folder.rglob("*.py") if "__pycache__" not in path.parts)


def faults(root: Path) -> list[str]:
    """Return every import in ifcjoints/ and checks/ under a root that goes against the arrows."""
    found = []
    for path in files_of(root / "ifcjoints"):
        inside = path.relative_to(root / "ifcjoints")
        package = ".".join(["ifcjoints", *inside.parts[:-1]])
        room = inside.parts[0].removesuffix(".py")
        for name in imports(path, package):
            found += [f"{inside} imports {name}"] if not may_import(room, inside.as_posix(), name) else []
    for path in files_of(root / "checks"):
        inside = path.relative_to(root / "checks")
        for name in imports(path, ".".join(inside.parts[:-1])):
            parts = name.split(".")
            if parts[0] == "ifcjoints" and (len(parts) < 2 or parts[1] not in PACK_MAY):
                found.append(f"checks/{inside} imports {name}")
            if parts[0] in ("ifcopenshell", "shapely"):
                found.append(f"checks/{inside} imports {name}")
    return found


def may_import(room: str, path: str, name: str) -> bool:
    parts = name.split(".")
    if parts[0] == "ifcopenshell":
        return room in IFC_FOLDERS or path in IFC_FILES or path.startswith("actions/analysis")
    if parts[0] == "shapely":
        return room in ("reading", "detection")
    if parts[0].startswith("ifcjoints_"):
        return False
    if parts[0] != "ifcjoints" or len(parts) < 2 or room in ("audit", "cli", "__init__", "__main__"):
        return True
    return parts[1] == room or parts[1] in ALLOWED[room]


def test_nobody_imports_against_the_arrows():
    assert faults(ROOT) == []


@pytest.mark.parametrize(
    ("path", "line"),
    [
        ("ifcjoints/reading/x.py", "from ..detection.rows import find_rows"),
        ("ifcjoints/reading/x.py", "from ifcjoints import publishing, model\nimport ifcjoints.publishing"),
        ("ifcjoints/detection/x.py", "import ifcopenshell"),
        ("ifcjoints/checking/x.py", "from ..reading import bodies"),
        ("ifcjoints/publishing/x.py", "import shapely"),
        ("ifcjoints/audit.py", "import ifcjoints_bolt_groups"),
        ("checks/ifcjoints_bolt_groups/x.py", "from ifcjoints.detection.rows import find_rows"),
        ("checks/ifcjoints_bolt_groups/x.py", "from ifcjoints import audit"),
    ],
)
def test_the_rule_sees_a_fault(path, line, tmp_path):
    for folder in ("ifcjoints", "checks"):
        (tmp_path / folder).mkdir()
    file = tmp_path / path
    file.parent.mkdir(parents=True, exist_ok=True)
    file.write_text(line + "\n", encoding="utf-8")
    assert len(faults(tmp_path)) >= 1
