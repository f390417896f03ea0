from __future__ import annotations

import json
from pathlib import Path

import jsonschema
import pytest

from ifcjoints.model.audit import Audit
from ifcjoints.publishing.audit_json import SCHEMA_PATH, audit_schema, write_audit

from . import examples


def test_the_published_schema_is_current() -> None:
    assert json.loads(SCHEMA_PATH.read_text(encoding="utf-8")) == audit_schema(), (
        "run python -m ifcjoints.publishing.audit_json"
    )


def test_an_audit_keeps_to_the_schema_and_comes_back_the_same(tmp_path: Path) -> None:
    audit = examples.audit()
    write_audit(audit, tmp_path / "audit.json")
    text = (tmp_path / "audit.json").read_text(encoding="utf-8")
    validator = jsonschema.Draft202012Validator(json.loads(SCHEMA_PATH.read_text(encoding="utf-8")))
    validator.check_schema(validator.schema)
    assert [error.message for error in validator.iter_errors(json.loads(text))] == []
    assert Audit.model_validate_json(text) == audit


@pytest.mark.parametrize(("place", "value"), [("format_version", 2), ("joints", {}), ("basis", None)])
def test_the_schema_refuses_what_is_no_audit(place: str, value: object) -> None:
    validator = jsonschema.Draft202012Validator(audit_schema())
    document = json.loads(examples.audit().to_json())
    assert not validator.is_valid({**document, place: value})


def test_the_fields_that_others_rely_on_are_there() -> None:
    document = json.loads(examples.audit().to_json())
    assert (document["format"], document["format_version"]) == ("ifcjoints-audit", 1)
    assert {"path", "sha256", "schema", "length_unit_mm", "originating_system"} <= set(document["model"])
    assert {"standard", "edition", "national_choices", "actions"} <= set(document["basis"])
    assert {"bolts", "bolts_in_joints", "bolts_elsewhere", "parts"} <= set(document["coverage"])
    joint = document["joints"][0]
    assert {
        "id", "name", "configuration", "moment_joint", "why", "family", "supported", "supporting", "plates", "bolts",
        "rows", "welds", "completeness", "provenance", "checks", "findings",
    } <= set(joint)  # fmt: skip
    assert {"y_bottom_mm", "y_top_mm", "count", "gauge_mm", "position"} <= set(joint["rows"][0])
    assert {
        "check", "case", "tension_flange", "status", "actions", "resistance", "utilisation", "governing",
        "row_forces_kN", "compression_kN", "steps", "reason",
    } <= set(joint["checks"][0])  # fmt: skip
