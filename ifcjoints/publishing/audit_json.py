"""audit.json, and the JSON Schema that it keeps to, published beside this file as `audit.schema.json`.

`python -m ifcjoints.publishing.audit_json` writes the schema anew after a change to the model.
"""

from __future__ import annotations

import json
from pathlib import Path
from typing import Any

from ..model.audit import Audit

SCHEMA_PATH = Path(__file__).with_name("audit.schema.json")


def write_audit(audit: Audit, path: Path) -> None:
    """Write audit.json."""
    path.write_text(audit.to_json(), encoding="utf-8", newline="\n")


def audit_schema() -> dict[str, Any]:
    """Return the JSON Schema (draft 2020-12) of audit.json."""
    schema = Audit.model_json_schema(by_alias=True, mode="serialization")
    return {"$schema": "https://json-schema.org/draft/2020-12/schema", **schema}


def _schema_text() -> str:
    return json.dumps(audit_schema(), indent=2, ensure_ascii=False) + "\n"


if __name__ == "__main__":
    SCHEMA_PATH.write_text(_schema_text(), encoding="utf-8", newline="\n")
