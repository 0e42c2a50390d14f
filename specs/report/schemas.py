"""The published JSON Schemas: of the report, and of claims given as JSON.

``python -m specs.report.schemas`` writes them anew; a test proves them current.
"""

from __future__ import annotations

import json
from pathlib import Path
from typing import Any

from specs.claims.given import GivenClaims
from specs.report.model import Report

FOLDER = Path(__file__).parent / "schema"
_DIALECT = "https://json-schema.org/draft/2020-12/schema"


def report_schema() -> dict[str, Any]:
    """JSON Schema of ``beamproof.report/1``."""
    made = Report.model_json_schema(by_alias=True, mode="serialization")
    return {"$schema": _DIALECT, "title": "beamproof.report/1", **_untitled(made)}


def claims_schema() -> dict[str, Any]:
    """JSON Schema of ``beamproof.claims/1``."""
    made = GivenClaims.model_json_schema(by_alias=True)
    return {"$schema": _DIALECT, "title": "beamproof.claims/1", **_untitled(made)}


def _untitled(schema: dict[str, Any]) -> dict[str, Any]:
    return {key: value for key, value in schema.items() if key != "title"}


def published() -> dict[str, str]:
    """File name and text of each schema."""
    return {
        "report-1.schema.json": json.dumps(report_schema(), indent=2) + "\n",
        "claims-1.schema.json": json.dumps(claims_schema(), indent=2) + "\n",
    }


if __name__ == "__main__":
    for name, text in published().items():
        (FOLDER / name).write_text(text, encoding="utf-8")
