"""Claims as JSON in, a report out: for workflows that already have the figures."""

from __future__ import annotations

from typing import Any

from flask import Response
from flask_openapi.blueprint import APIBlueprint
from flask_openapi.models.media_type import MediaType
from flask_openapi.models.request_body import RequestBody
from flask_openapi.models.tag import Tag

from service.api.answers import JSON, answers, json_answer, json_body
from specs.pipeline import check_claims
from specs.report.model import Report

api = APIBlueprint(
    "validations", __name__, url_prefix="/api/v1", abp_tags=[Tag(name="validations")]
)

EXAMPLE: dict[str, Any] = {
    "schema": "beamproof.claims/1",
    "antennas": [
        {
            "label": "OF-5800-17",
            "type": "sector panel",
            "claims": [
                {"quantity": "gain", "text": "17.0 dBd"},
                {"quantity": "beamwidth", "plane": "azimuth", "value": 90, "unit": "deg"},
                {"quantity": "beamwidth", "plane": "elevation", "value": 12, "unit": "deg"},
                {"quantity": "frequency", "value": [5150, 5850], "unit": "MHz"},
            ],
        }
    ],
}

# The body is validated where it is read, once: described here, not declared as an argument.
_form: Any = {"$ref": "#/components/schemas/GivenClaims"}
_BODY = RequestBody(
    description="beamproof.claims/1; its JSON Schema is at /api/v1/schemas/claims",
    content={JSON: MediaType.model_validate({"schema": _form, "example": EXAMPLE})},
)


@api.post(
    "/validations",
    request_body=_BODY,
    responses=answers(200, Report, 400, 413, 415, 422),
)
def check_given_claims() -> Response:
    """Check claims.

    Answers with the report; nothing is kept. Read 'verdict' to gate an order.
    """
    return json_answer(check_claims(json_body(), "claims.json"))
