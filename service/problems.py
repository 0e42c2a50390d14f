"""Errors as answers: problem documents (RFC 9457) for programs, a plain page for people."""

from __future__ import annotations

import json
import re
from typing import Any

from flask import Flask, Response, render_template, request
from pydantic import BaseModel, Field, ValidationError
from werkzeug.exceptions import HTTPException, SecurityError

from service.envelope import LOG, request_id
from specs.errors import BeamproofError, ClaimsError

MEDIA_TYPE = "application/problem+json"

STATUS_OF = {
    "unknown-format": 415,
    "sheet-too-large": 413,
    "too-many-pages": 413,
    "service-busy": 503,
}
"""Status by the code of an error; 422 where none is given."""

_ADVICE_OF = {
    400: "Compare the request with /openapi.json.",
    403: "Send the request from a page of this service, or from a program.",
    404: "Check the address.",
    405: "Use one of the methods in the header 'Allow'.",
    413: "Send less: only the pages or the claims that matter.",
    415: "Send the media type that /openapi.json names for this address.",
    500: "Try again; if it happens again, give the request id to whoever runs this service.",
}
_DETAIL_OF = {
    404: "Nothing stands at this address.",
    405: "This address does not take the method of the request.",
    413: "The body is larger than accepted.",
}
_OUR_PATHS = ("/api/", "/healthz", "/readyz", "/openapi.json")


class Fault(BaseModel):
    """One fault of a request and its place, as a JSON pointer into the body."""

    pointer: str = Field(description="JSON pointer (RFC 6901) into the body; '' is all of it")
    detail: str


class Problem(BaseModel):
    """What went wrong (RFC 9457), with what to do about it."""

    type: str = Field(description="address of the explanation of this kind of problem")
    title: str
    status: int
    detail: str
    code: str = Field(description="stable, for programs")
    advice: str = Field(description="what to do")
    request_id: str
    errors: list[Fault] = Field(default_factory=list)


def handle_errors(app: Flask) -> None:
    """Answer every error of an application as a problem document or an error page."""
    app.register_error_handler(BeamproofError, _typed)
    app.register_error_handler(HTTPException, _http)
    app.register_error_handler(Exception, _unexpected)


def invalid(error: ValidationError, document: Any = None) -> Response:
    """The problem document of a request that does not have the form its model asks for."""
    faults = faults_of(error, document)
    malformed = any(fault["type"] == "json_invalid" for fault in error.errors(include_url=False))
    what = "is no JSON" if malformed else "does not have the form that is asked for"
    return answer(
        400 if malformed else 422,
        "json-malformed" if malformed else "request-invalid",
        f"The request {what}: {_summary(faults)}",
        "Compare the request with /openapi.json.",
        faults,
    )


def faults_of(error: ValidationError, document: Any = None) -> list[Fault]:
    """The faults that pydantic found, with pointers into the document that was sent.

    Pydantic's location names the branch of a union beside keys and indices; a part that leads
    nowhere in the document is left out, save the name of a missing key.
    """
    found = json.loads(error.json(include_url=False, include_input=False))
    faults = [
        Fault(pointer=_pointer(f["loc"], document, f["type"] == "missing"), detail=f["msg"])
        for f in found
    ]
    return list({(f.pointer, f.detail): f for f in faults}.values())


def _pointer(location: list[str | int], document: Any, missing: bool) -> str:
    parts: list[str | int] = []
    here = document
    for index, part in enumerate(location):
        last = index == len(location) - 1
        if document is None or (missing and last):
            parts.append(part)
        elif (isinstance(here, dict) and part in here) or (
            isinstance(here, list) and isinstance(part, int) and part < len(here)
        ):
            parts.append(part)
            here = here[part]  # type: ignore[index]
    return "".join(f"/{str(part).replace('~', '~0').replace('/', '~1')}" for part in parts)


def _summary(faults: list[Fault]) -> str:
    named = "; ".join(f"{f.pointer or 'the whole'}: {f.detail}" for f in faults[:3])
    more = f"; and {len(faults) - 3} more" if len(faults) > 3 else ""
    return f"{named}{more}."


def answer(
    status: int, code: str, detail: str, advice: str, faults: list[Fault] | None = None
) -> Response:
    """An error as a problem document, or as a page for a browser outside the API."""
    problem = Problem(
        type=f"/problems#{code}",
        title=code.replace("-", " ").capitalize(),
        status=status,
        detail=detail,
        code=code,
        advice=advice,
        request_id=request_id(),
        errors=faults or [],
    )
    if _wants_page():
        return Response(render_template("problem.html", problem=problem), status)
    return Response(problem.model_dump_json(), status, mimetype=MEDIA_TYPE)


def _wants_page() -> bool:
    is_known = not isinstance(request.routing_exception, SecurityError)
    if request.path.startswith(_OUR_PATHS) or not is_known:
        return False  # a page needs addresses, and those of an unknown host cannot be made
    kinds = ["application/json", MEDIA_TYPE, "text/html"]
    return request.accept_mimetypes.best_match(kinds) == "text/html"


def _typed(error: BeamproofError) -> Response:
    status = STATUS_OF.get(error.code, 422)
    faults = _claim_faults(error) if isinstance(error, ClaimsError) else []
    if any(fault.detail.startswith("Invalid JSON") for fault in faults):
        status = 400
    response = answer(status, error.code, error.message, error.advice or type(error).advice, faults)
    if status == 503:
        response.headers["Retry-After"] = "2"
    return response


_PLACE = re.compile(r"(/antennas/\d+/claims/\d+): (.+)", re.DOTALL)


def _claim_faults(error: ClaimsError) -> list[Fault]:
    """The faults of claims that were given as JSON, with their places."""
    if isinstance(error.__cause__, ValidationError):
        try:
            document = json.loads(request.get_data())
        except (ValueError, RecursionError):
            document = None
        return faults_of(error.__cause__, document)
    placed = _PLACE.fullmatch(error.message)
    return [Fault(pointer=placed[1], detail=placed[2])] if placed else []


def _http(error: HTTPException) -> Response:
    """Errors of HTTP itself, unknown addresses and methods among them."""
    if error.response is not None:  # made with ``abort(response)``: it is an answer already
        return error.response  # type: ignore[return-value]
    status = error.code or 500
    if status < 400:
        return error.get_response()  # type: ignore[return-value]
    code = (error.name or "error").lower().replace(" ", "-")
    detail = error.description or error.name
    if detail == type(error).description:
        detail = _DETAIL_OF.get(status, detail)
    response = answer(status, code, detail, _ADVICE_OF.get(status, ""))
    for name, value in error.get_headers():
        if name.lower() not in ("content-type", "content-length"):
            response.headers[name] = value
    return response


def _unexpected(error: Exception) -> Response:
    """A fault of ours: logged whole, told without its inside."""
    LOG.error("failed id=%s", request_id(), exc_info=error)
    return answer(500, "internal-error", "The service failed on this request.", _ADVICE_OF[500])
