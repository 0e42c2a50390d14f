"""The JSON Schemas of what goes in and out."""

from __future__ import annotations

import json
from functools import cache

from flask import Response
from flask_openapi.blueprint import APIBlueprint
from flask_openapi.models.tag import Tag
from pydantic import BaseModel, Field
from werkzeug.exceptions import NotFound

from service.api.answers import answers
from specs.report.schemas import claims_schema, report_schema

api = APIBlueprint("schemas", __name__, url_prefix="/api/v1", abp_tags=[Tag(name="schemas")])

_MADE_BY = {"report": report_schema, "claims": claims_schema}


class SchemaPath(BaseModel):
    """Names a schema."""

    name: str = Field(json_schema_extra={"enum": list(_MADE_BY)})


class JsonSchema(BaseModel, extra="allow"):
    """A JSON Schema (draft 2020-12)."""


@api.get("/schemas/<name>", responses=answers(200, JsonSchema, 404))
def show_schema(path: SchemaPath) -> Response:
    """Read the JSON Schema of the report, or of claims given as JSON."""
    if path.name not in _MADE_BY:
        raise NotFound(f"There is no schema of this name; there are: {', '.join(_MADE_BY)}.")
    return Response(_text(path.name), mimetype="application/schema+json")


@cache
def _text(name: str) -> str:
    return json.dumps(_MADE_BY[name](), indent=2, ensure_ascii=False)
