"""Problems, headers, request ids, hosts, health and the description, on every route."""

from __future__ import annotations

import logging
import re
from io import BytesIO

import pytest
from flask import Flask
from flask.testing import FlaskClient
from openapi_spec_validator import validate

from service.app import create_app
from service.checking import ServiceBusy, desk
from service.settings import Settings
from specs.errors import BeamproofError

ADDRESSES = [
    "/", "/convert", "/convert?q=VSWR+1.5", "/convert?q=%00", "/rules",
    "/rules/gain-above-directivity", "/problems", "/results", "/openapi", "/openapi.json",
    "/openapi/viewer/swagger-ui-bundle.js", "/look/tokens.css", "/static/pages.css",
    "/static/intake.js", "/demo", "/demo/sheet.pdf", "/healthz", "/readyz", "/api/v1/rules",
    "/api/v1/schemas/report", "/nowhere", "/api/nowhere", "/reports/none",
]  # fmt: skip


def policy(text: str) -> dict[str, str]:
    parts = (part.strip().partition(" ") for part in text.split(";"))
    return {name: rest for name, _, rest in parts}


@pytest.mark.parametrize("address", ADDRESSES)
@pytest.mark.parametrize("accept", ["text/html", "application/json"])
def test_every_answer_is_guarded(client: FlaskClient, address: str, accept: str) -> None:
    answer = client.get(address, headers={"Accept": accept})
    assert answer.status_code < 500
    assert answer.headers["X-Content-Type-Options"] == "nosniff"
    assert answer.headers["X-Frame-Options"] == "DENY"
    assert answer.headers["Referrer-Policy"] == "no-referrer"
    assert re.fullmatch("[0-9a-f]{32}", answer.headers["X-Request-ID"])
    rules = policy(answer.headers["Content-Security-Policy"])
    assert rules["default-src"] == "'none'"
    assert rules["frame-ancestors"] == "'none'"
    assert rules.get("script-src", "'none'") in ("'none'", "'self'")
    assert not [r for r in rules.values() if re.search(r"https?:|\*|unsafe-eval", r)]


@pytest.mark.parametrize("address", ADDRESSES)
def test_no_page_names_an_outside_asset_or_runs_inline(client: FlaskClient, address: str) -> None:
    answer = client.get(address, headers={"Accept": "text/html"}, follow_redirects=True)
    if answer.mimetype != "text/html":
        return
    assert not re.findall(r"""(?:src|href|action)=["']?(?:https?:)?//""", answer.text)
    assert not re.findall(r"<script(?![^>]*\bsrc=)", answer.text)
    assert not re.findall(r"""\son[a-z]+=["']""", answer.text)


def test_a_report_may_not_run_anything(client: FlaskClient) -> None:
    answer = client.get("/demo", follow_redirects=True)
    rules = policy(answer.headers["Content-Security-Policy"])
    assert rules["sandbox"] == "allow-downloads"
    assert "script-src" not in rules
    assert rules["default-src"] == "'none'"


@pytest.mark.parametrize(
    ("method", "address", "status"),
    [
        ("GET", "/api/v1/nowhere", 404),
        ("GET", "/api/v9/sheets", 404),
        ("GET", "/api/v1/sheets", 405),
        ("DELETE", "/api/v1/rules", 405),
        ("PUT", "/api/v1/validations", 405),
        ("POST", "/healthz", 405),
    ],
)
def test_errors_of_http_are_problem_documents(
    client: FlaskClient, method: str, address: str, status: int
) -> None:
    answer = client.open(address, method=method, headers={"Accept": "text/html"})
    assert answer.status_code == status
    assert answer.mimetype == "application/problem+json"
    problem = answer.get_json()
    assert set(problem) == {
        "type", "title", "status", "detail", "code", "advice", "request_id", "errors",
    }  # fmt: skip
    assert status != 405 or answer.headers["Allow"]


def test_a_browser_gets_a_page_and_a_program_a_document(client: FlaskClient) -> None:
    page = client.get("/nowhere", headers={"Accept": "text/html,*/*;q=0.8"})
    assert (page.status_code, page.mimetype) == (404, "text/html")
    assert "Nothing stands at this address." in page.text
    document = client.get("/nowhere", headers={"Accept": "application/json"})
    assert document.mimetype == "application/problem+json"


def test_every_problem_type_leads_to_its_explanation(client: FlaskClient) -> None:
    page = client.get("/problems").text

    def below(root: type[BeamproofError]) -> list[type[BeamproofError]]:
        return [c for child in root.__subclasses__() for c in (child, *below(child))]

    for error in below(BeamproofError):
        assert f'id="{error.code}"' in page
    for address in ("/api/nowhere", "/api/v1/sheets"):
        code = client.get(address).get_json()["type"].removeprefix("/problems#")
        assert f'id="{code}"' in page


def test_a_request_id_is_taken_over_only_when_plain(client: FlaskClient) -> None:
    sent = client.get("/healthz", headers={"X-Request-ID": "order-4711.a"})
    assert sent.headers["X-Request-ID"] == "order-4711.a"
    for bad in ("x", "a b c d e f g", "<script>alert(1)</script>", "y" * 65):
        answer = client.get("/healthz", headers={"X-Request-ID": bad})
        assert answer.headers["X-Request-ID"] != bad


def test_each_request_is_one_line_in_the_log(
    client: FlaskClient, caplog: pytest.LogCaptureFixture
) -> None:
    with caplog.at_level(logging.INFO, "beamproof.service"):
        client.get("/convert%0aforged=1?q=secret")
    (record,) = caplog.records
    assert "\n" not in record.getMessage()
    assert "secret" not in record.getMessage()
    assert "status=404" in record.getMessage()


@pytest.mark.parametrize("accept", ["text/html", "application/json"])
def test_an_unknown_host_is_refused(client: FlaskClient, accept: str) -> None:
    answer = client.get("/", headers={"Host": "evil.example", "Accept": accept})
    assert answer.status_code == 400
    assert answer.mimetype == "application/problem+json"


@pytest.mark.parametrize("sent_from", ["cross-site", "same-site"])
def test_a_page_of_another_site_cannot_send(client: FlaskClient, sent_from: str) -> None:
    answer = client.post(
        "/check",
        data={"file": (BytesIO(b"Gain: 3 dBi"), "a.txt")},
        headers={"Sec-Fetch-Site": sent_from},
    )
    assert answer.status_code == 403


def test_a_fault_of_ours_tells_nothing_of_its_inside(
    caplog: pytest.LogCaptureFixture, monkeypatch: pytest.MonkeyPatch
) -> None:
    app = create_app(Settings())

    def fails(_: object) -> None:
        raise RuntimeError("secret inside")

    monkeypatch.setattr("service.api.validations.check_claims", lambda *_: fails(_))
    answer = app.test_client().post("/api/v1/validations", json={})
    assert answer.status_code == 500
    assert answer.get_json()["code"] == "internal-error"
    assert "secret" not in answer.text
    assert "secret inside" in caplog.text
    desk(app).close()


def test_a_busy_service_says_when_to_come_back(
    app: Flask, client: FlaskClient, monkeypatch: pytest.MonkeyPatch
) -> None:
    places = [desk(app)._places.acquire(blocking=False) for _ in range(10)]
    try:
        assert all(places)
        answer = client.post("/api/v1/sheets", data={"file": (BytesIO(b"Gain: 3 dBi"), "a.txt")})
        assert (answer.status_code, answer.get_json()["code"]) == (503, ServiceBusy.code)
        assert answer.headers["Retry-After"]
        assert client.get("/readyz").status_code == 503
        assert client.get("/healthz").status_code == 200
    finally:
        for _ in places:
            desk(app)._places.release()
    assert client.get("/readyz").get_json() == {"status": "ready"}


def test_the_description_is_valid_and_whole(app: Flask, client: FlaskClient) -> None:
    document = client.get("/openapi.json").get_json()
    validate(document)
    described = {
        (path, method) for path, methods in document["paths"].items() for method in methods
    }
    served = {
        (re.sub(r"<(?:\w+:)?(\w+)>", r"{\1}", rule.rule), method.lower())
        for rule in app.url_map.iter_rules()
        if rule.rule.startswith("/api/") or rule.rule in ("/healthz", "/readyz")
        for method in (rule.methods or set()) - {"HEAD", "OPTIONS"}
    }
    assert described == served
    text = client.get("/openapi.json").text
    names = set(re.findall(r'"#/components/schemas/(\w+)"', text))
    assert names <= set(document["components"]["schemas"])


def test_the_viewer_serves_its_own_files_only(client: FlaskClient) -> None:
    assert client.get("/openapi/viewer/swagger-ui.css").mimetype == "text/css"
    for name in ("__init__.py", "..%2f..%2f__init__.py", "%2e%2e/plugins.py", "none"):
        assert client.get(f"/openapi/viewer/{name}").status_code == 404
