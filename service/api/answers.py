"""What the interface takes and gives: media types checked once, models turned to JSON once."""

from __future__ import annotations

from typing import Any

from flask import Response, current_app, request
from flask_openapi.models.media_type import MediaType
from flask_openapi.models.response import Response as Described
from pydantic import BaseModel
from werkzeug.exceptions import UnsupportedMediaType

from service.problems import MEDIA_TYPE, Problem

JSON = "application/json"

_MEANINGS = {
    400: "The body is no JSON.",
    404: "There is none of that name.",
    413: "The body is larger than accepted.",
    415: "The media type is not accepted.",
    422: "The request or what it holds cannot be read; 'errors' point at the places.",
    503: "As much is being read as the service takes at once.",
}


def answers(status: int, model: type[BaseModel], *problems: int) -> dict[Any, Any]:
    """Descriptions of what an operation may answer: its model, or one of the problems."""
    form: Any = {"$ref": f"#/components/schemas/{Problem.__name__}"}
    content = {MEDIA_TYPE: MediaType.model_validate({"schema": form})}
    described: dict[Any, Any] = {
        str(s): Described(description=_MEANINGS[s], content=content) for s in problems
    }
    return {str(status): model} | described


def json_answer(body: str | bytes | BaseModel, status: int = 200) -> Response:
    """A JSON answer from a model, or from JSON that is written already."""
    text = body.model_dump_json(by_alias=True) if isinstance(body, BaseModel) else body
    return Response(text, status, mimetype=JSON)


def json_body() -> bytes:
    """The body of a request that must be JSON.

    Raises the errors 415 and 413 of HTTP.
    """
    expect(JSON)
    request.max_content_length = current_app.config["CLAIMS_BYTES"]
    return request.get_data()


def expect(media_type: str) -> None:
    """Raise the error 415 when the body is of another type."""
    if request.mimetype != media_type:
        sent = f"is '{request.mimetype[:80]}'" if request.mimetype else "has no media type"
        raise UnsupportedMediaType(f"The body {sent}; it must be '{media_type}'.")
