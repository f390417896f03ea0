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

FREE = {"audit", "cli", "__init__", "__main__"}
IFC_FILES = {"publishing/property_sets.py", "publishing/standing_results.py"}
PACK_MAY = {"model", "checking", "tables"}
GEOMETRY = {"ifcopenshell", "shapely"}


def imports(path: Path, package: str):
    """Yield the absolute name of every module that a file of a package imports.

    Names taken from `ifcjoints` itself count as modules: `from ifcjoints import reading` imports a folder.
    """
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            yield from (alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            above = package.split(".")[: len(package.split(".")) - node.level + 1] if node.level else []
            module = ".".join([*above, *([node.module] if node.module else [])])
            yield from [f"{module}.{alias.name}" for alias in node.names] if module == "ifcjoints" else [module]


def files_of(folder: Path):
    return sorted(path for path in folder.rglob("*.py") if "__pycache__" not in path.parts)


def faults(root: Path) -> list[str]:
    """Return every import against the arrows in the program and the packs under a root."""
    found = []
    for path in files_of(root / "ifcjoints"):
        inside = path.relative_to(root / "ifcjoints")
        room = inside.parts[0].removesuffix(".py")
        names = imports(path, ".".join(["ifcjoints", *inside.parts[:-1]]))
        found += [f"{inside} imports {name}" for name in names if not may_import(room, inside.as_posix(), name)]
    for folder in ("checks", "tests/example_pack"):
        for path in files_of(root / folder):
            inside = path.relative_to(root / folder)
            names = imports(path, ".".join(inside.parts[:-1]))
            found += [f"{inside} imports {name}" for name in names if not pack_may_import(inside.parts[0], name)]
    return found


def may_import(room: str, path: str, name: str) -> bool:
    """Tell whether a file of the program in this folder (or file of its own) may import a module."""
    parts = name.split(".")
    if parts[0] == "ifcopenshell":
        return room == "reading" or path in IFC_FILES or path.startswith("actions/analysis")
    if parts[0] == "shapely":
        return room in ("reading", "detection")
    if parts[0].startswith("ifcjoints_"):
        return False
    if parts[0] != "ifcjoints" or room in FREE:
        return True
    return len(parts) > 1 and (parts[1] == room or parts[1] in ALLOWED[room])


def pack_may_import(pack: str, name: str) -> bool:
    """Tell whether a file of a pack may import a module: of the program's the border only, of packs only its own."""
    parts = name.split(".")
    if parts[0] == "ifcjoints":
        return len(parts) > 1 and parts[1] in PACK_MAY
    return parts[0] not in GEOMETRY and (parts[0] == pack or not parts[0].startswith("ifcjoints_"))


def test_nobody_imports_against_the_arrows():
    assert faults(ROOT) == []


@pytest.mark.parametrize(
    ("path", "line"),
    [
        ("ifcjoints/reading/x.py", "from ..detection.rows import find_rows"),
        ("ifcjoints/reading/x.py", "from ifcjoints import publishing"),
        ("ifcjoints/reading/x.py", "from .. import publishing"),
        ("ifcjoints/reading/x.py", "import ifcjoints.publishing.report"),
        ("ifcjoints/reading/x.py", "import ifcjoints"),
        ("ifcjoints/reading/x.py", "def late():\n    from ..detection import rows"),
        ("ifcjoints/model/x.py", "from ..tables.steels import steel_grade"),
        ("ifcjoints/model/x.py", "import ifcopenshell.util.unit"),
        ("ifcjoints/publishing/report.py", "import ifcopenshell"),
        ("ifcjoints/actions/table.py", "import ifcopenshell"),
        ("ifcjoints/audit.py", "import ifcopenshell"),
        ("ifcjoints/detection/x.py", "import ifcopenshell"),
        ("ifcjoints/checking/x.py", "from ..reading import bodies"),
        ("ifcjoints/publishing/x.py", "import shapely"),
        ("ifcjoints/audit.py", "import ifcjoints_bolt_groups"),
        ("checks/ifcjoints_bolt_groups/x.py", "from ifcjoints.detection.rows import find_rows"),
        ("checks/ifcjoints_bolt_groups/x.py", "from ifcjoints import audit"),
        ("checks/ifcjoints_bolt_groups/x.py", "from ifcjoints.settings import Settings"),
        ("checks/ifcjoints_bolt_groups/x.py", "import ifcjoints"),
        ("checks/ifcjoints_bolt_groups/x.py", "import shapely.geometry"),
        ("checks/ifcjoints_made/x.py", "from ifcjoints_bolt_groups.bolt import bolt"),
        ("tests/example_pack/ifcjoints_made/x.py", "from ifcjoints.reading import units"),
    ],
)
def test_the_rule_sees_a_fault(path, line, tmp_path):
    assert len(faults(made_tree(tmp_path, path, line))) == 1


@pytest.mark.parametrize(
    ("path", "line"),
    [
        ("ifcjoints/reading/x.py", "import ifcopenshell\nimport shapely\nfrom ..model import parts\nfrom . import y"),
        ("ifcjoints/detection/x.py", "import shapely\nfrom ..reading.plates import plate\nfrom .. import settings"),
        ("ifcjoints/publishing/property_sets.py", "import ifcopenshell.guid\nfrom ..checking import Check"),
        ("ifcjoints/actions/analysis_x.py", "import ifcopenshell"),
        ("ifcjoints/cli.py", "from ifcjoints import audit\nfrom .publishing.report import report"),
        (
            "checks/ifcjoints_made/x.py",
            "import numpy\nfrom ifcjoints.checking import N\nfrom ifcjoints_made.y import z",
        ),
        ("checks/ifcjoints_made/deep/x.py", "from ..y import z\nfrom ifcjoints import checking, model, tables"),
    ],
)
def test_the_rule_lets_the_arrows_pass(path, line, tmp_path):
    assert faults(made_tree(tmp_path, path, line)) == []


def test_every_folder_has_its_place_in_the_rule():
    package = ROOT / "ifcjoints"
    rooms = {path.stem for path in package.glob("*.py")} | {path.parent.name for path in package.glob("*/__init__.py")}
    assert rooms - FREE == set(ALLOWED)


def test_there_are_files_to_look_at():
    """A rule that looks at nothing finds nothing."""
    for folder in ("ifcjoints", "checks", "tests/example_pack"):
        assert len(files_of(ROOT / folder)) > 1


def made_tree(root, path, line):
    file = root / path
    file.parent.mkdir(parents=True)
    file.write_text(line + "\n", encoding="utf-8")
    return root
