"""A pack of one's own is installed and run through the same entry points as the built-in one."""

import json
import os
import subprocess
import sys
from pathlib import Path

import pytest

from sample_models.make import HERE

PACK = Path(__file__).parent / "example_pack"


@pytest.fixture(scope="module")
def environment(tmp_path_factory):
    """Install the example pack beside the program, without a network."""
    target = tmp_path_factory.mktemp("site")
    command = [sys.executable, "-m", "pip", "install", "--quiet", "--no-index", "--no-deps", "--no-build-isolation"]
    subprocess.run([*command, "--target", str(target), str(PACK)], check=True, capture_output=True)
    return {**os.environ, "PYTHONPATH": str(target)}


def run(environment, *arguments):
    return subprocess.run(
        [sys.executable, "-m", "ifcjoints", *arguments], env=environment, capture_output=True, text=True, check=False
    )


def test_it_is_listed_with_its_package_and_version(environment):
    listed = run(environment, "checks").stdout
    assert "example.clear_rows" in listed
    assert "ifcjoints_example" in listed
    assert "1.2.3" in listed
    assert "bolt_group.elastic" in listed


def test_its_manual_is_printed(environment):
    assert "A wrench needs room" in run(environment, "checks", "example.clear_rows").stdout


def test_it_runs_on_a_model_with_its_options(environment, tmp_path):
    settings = tmp_path / "office.toml"
    settings.write_text('[checks."example.clear_rows"]\ndiameters = 3.5\n', encoding="utf-8")
    model = HERE / "heron_yard_mezzanine.ifc"
    arguments = ("--pack", "ifcjoints_example", "--config", str(settings), "--out", str(tmp_path / "out"))
    done = run(environment, "audit", str(model), *arguments)
    assert done.returncode == 1, done.stderr
    audit = json.loads((tmp_path / "out" / "audit.json").read_text(encoding="utf-8"))
    results = [result for joint in audit["joints"] for result in joint["checks"]]
    assert {result["check"] for result in results} == {"example.clear_rows"}
    assert {result["status"] for result in results} == {"fail"}
    nearest = 144.65 - 95.0
    assert results[-1]["utilisation"] == pytest.approx(3.5 * 20.0 / nearest, rel=1e-4)
    assert audit["settings"]["checks"] == {"example.clear_rows": {"diameters": 3.5}}


def test_its_own_cases_hold(environment):
    code = (
        "from ifcjoints_example.clear_rows import clear_rows\n"
        "from ifcjoints.checking.testing import run_case\n"
        "print(len([run_case(clear_rows, case) for case in clear_rows.cases]))"
    )
    done = subprocess.run([sys.executable, "-c", code], env=environment, capture_output=True, text=True, check=False)
    assert done.stdout.strip() == "3", done.stderr
