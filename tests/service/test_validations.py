"""Claims, figures, rules and schemas by the API."""

from __future__ import annotations

import json
from typing import Any

import jsonschema
import pytest
from flask.testing import FlaskClient
from werkzeug.test import TestResponse

from service.api.validations import EXAMPLE
from specs.report.schemas import claims_schema, report_schema
from specs.rules import RULES


def post(client: FlaskClient, body: Any, path: str = "/api/v1/validations") -> TestResponse:
    data = body if isinstance(body, bytes) else json.dumps(body).encode()
    return client.post(path, data=data, content_type="application/json")


def claims(*given: dict[str, Any]) -> dict[str, Any]:
    antenna = {"label": "OF-5800-17", "type": "sector panel", "claims": list(given)}
    return {"schema": "beamproof.claims/1", "antennas": [antenna]}


def test_claims_give_a_report(client: FlaskClient) -> None:
    jsonschema.validate(EXAMPLE, claims_schema())
    answer = post(client, EXAMPLE)
    assert answer.status_code == 200
    report = answer.get_json()
    jsonschema.validate(report, report_schema())
    assert report["verdict"] == "hold"
    rules = {finding["rule"] for finding in report["antennas"][0]["findings"]}
    assert "gain-above-beamwidth-limit" in rules


def test_a_charset_beside_the_media_type_is_fine(client: FlaskClient) -> None:
    answer = client.post(
        "/api/v1/validations",
        data=json.dumps(EXAMPLE),
        content_type="application/json; charset=utf-8",
    )
    assert answer.status_code == 200


@pytest.mark.parametrize(
    ("body", "status", "pointers"),
    [
        (b"", 400, [""]),
        (b"{", 400, [""]),
        (b"\xff\xfe", 400, [""]),
        (b"[" * 5000, 400, [""]),
        ([], 422, [""]),
        (None, 422, [""]),
        ({"schema": "beamproof.claims/1"}, 422, ["/antennas"]),
        ({**EXAMPLE, "schema": "beamproof.claims/9"}, 422, ["/schema"]),
        ({**EXAMPLE, "order~no/7": 1}, 422, ["/order~0no~17"]),
        (claims({"quantity": "gain"}), 422, ["/antennas/0/claims/0"]),
        (claims({"quantity": "gane", "text": "3 dBi"}), 422, ["/antennas/0/claims/0/quantity"]),
        (claims({"quantity": "gain", "value": "x", "unit": "dBi"}), 422,
         ["/antennas/0/claims/0/value"] * 2),
        (claims({"quantity": "beamwidth", "value": [1, "x"], "unit": "deg"}), 422,
         ["/antennas/0/claims/0/value", "/antennas/0/claims/0/value/1"]),
        (claims({"quantity": "gain", "text": "3 dBi"}, {"quantity": "gain", "text": "3 dBfoo"}),
         422, ["/antennas/0/claims/1"]),
        (claims({"quantity": "gain", "value": 3, "unit": "parsec"}), 422,
         ["/antennas/0/claims/0"]),
    ],
)  # fmt: skip
def test_faults_are_pointed_at(
    client: FlaskClient, body: Any, status: int, pointers: list[str]
) -> None:
    answer = post(client, body)
    problem = answer.get_json()
    assert (answer.status_code, [e["pointer"] for e in problem["errors"]]) == (status, pointers)
    assert answer.mimetype == "application/problem+json"
    assert all(e["detail"] for e in problem["errors"])
    assert "Traceback" not in answer.text


@pytest.mark.parametrize("number", [b"NaN", b"Infinity", b"1e999"])
def test_no_number_is_not_a_number(client: FlaskClient, number: bytes) -> None:
    body = json.dumps(claims({"quantity": "gain", "value": 1, "unit": "dBi"})).encode()
    answer = post(client, body.replace(b'"value": 1', b'"value": ' + number))
    assert answer.status_code in (400, 422), answer.text


def test_a_body_that_is_no_json_by_its_type_is_refused(client: FlaskClient) -> None:
    for kind in ("text/plain", "application/x-www-form-urlencoded", ""):
        answer = client.post("/api/v1/validations", data=b"{}", content_type=kind)
        assert answer.status_code == 415, kind


@pytest.mark.parametrize("path", ["/api/v1/validations", "/api/v1/conversions"])
def test_a_long_body_is_refused(client: FlaskClient, path: str) -> None:
    answer = post(client, b'{"a": "' + b"x" * 60_000 + b'"}', path)
    assert answer.status_code == 413
    assert answer.get_json()["code"] == "request-entity-too-large"


def test_a_figure_is_converted(client: FlaskClient) -> None:
    answer = post(client, {"text": "7.5 dBd", "to": "dBi"}, "/api/v1/conversions")
    (result,) = answer.get_json()["results"]
    assert result["nominal"] == pytest.approx(9.65)  # dBi = dBd + 2.15, the convention
    assert (result["unit"], result["low"], result["high"]) == ("dBi", 9.6, 9.7)


def test_an_open_end_is_null(client: FlaskClient) -> None:
    answer = post(client, {"text": "≥ 14 dBi", "to": "dBd"}, "/api/v1/conversions")
    assert answer.status_code == 200
    assert answer.get_json()["results"][0]["high"] is None


def test_without_a_goal_all_equivalents_are_given(client: FlaskClient) -> None:
    answer = post(client, {"text": "VSWR 1.5"}, "/api/v1/conversions")
    assert len(answer.get_json()["results"]) >= 3


@pytest.mark.parametrize(
    ("body", "code"),
    [
        ({"text": "7.5 parsecs"}, "unknown-unit"),
        ({"text": "7.5 dBd", "to": "deg"}, "incompatible-units"),
        ({"text": "7.5 dBd", "to": "dB/m"}, "missing-condition"),
        ({"text": "no figure"}, "unreadable-figure"),
        ({"text": ""}, "request-invalid"),
        ({"words": "7.5 dBd"}, "request-invalid"),
        ({"text": 7.5}, "request-invalid"),
    ],
)
def test_what_cannot_be_converted_says_why(
    client: FlaskClient, body: dict[str, Any], code: str
) -> None:
    answer = post(client, body, "/api/v1/conversions")
    assert (answer.status_code, answer.get_json()["code"]) == (422, code)
    assert answer.get_json()["detail"]


def test_rules_are_listed_and_shown(client: FlaskClient) -> None:
    listed = client.get("/api/v1/rules").get_json()["rules"]
    assert [entry["id"] for entry in listed] == [rule.id for rule in RULES]
    shown = client.get("/api/v1/rules/gain-above-directivity").get_json()
    assert shown in listed
    assert shown["source"]
    assert client.get("/api/v1/rules/none-such").status_code == 404


def test_schemas_are_shown(client: FlaskClient) -> None:
    assert client.get("/api/v1/schemas/report").get_json() == report_schema()
    assert client.get("/api/v1/schemas/claims").get_json() == claims_schema()
    assert client.get("/api/v1/schemas/none").status_code == 404
