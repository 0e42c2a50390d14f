"""The description of the interface: ``/openapi.json``, and a page to read and try it."""

from __future__ import annotations

from importlib.resources import as_file, files
from typing import Any, cast

from flask import (
    Blueprint,
    Response,
    current_app,
    json,
    make_response,
    render_template,
    send_from_directory,
)
from flask_openapi.models.schema import Schema
from flask_openapi.openapi import OpenAPI
from pydantic import BaseModel

from service.api.answers import JSON

pages = Blueprint("description", __name__)

_VIEWER = files("flask_openapi_swagger").joinpath("templates", "swagger")
_VIEWER_FILES = {
    "swagger-ui.css": "css/swagger-ui.css",
    "swagger-ui-bundle.js": "js/swagger-ui-bundle.js",
}
# The viewer sets styles on its elements and shows small pictures of its own; it still runs no
# script but files of ours, and reaches nothing but this service.
POLICY = (
    "default-src 'none'; script-src 'self'; style-src 'self' 'unsafe-inline'; "
    "img-src 'self' data:; font-src 'self' data:; connect-src 'self'; form-action 'none'; "
    "base-uri 'none'; frame-ancestors 'none'"
)


def describe(app: OpenAPI, *bodies: type[BaseModel]) -> None:
    """Add to the description the models of bodies that are validated where they are read."""
    for model in bodies:
        schema = model.model_json_schema(ref_template="#/components/schemas/{model}")
        inner = schema.pop("$defs", {})
        for name, form in (inner | {model.__name__: schema}).items():
            app.components_schemas[name] = Schema(**form)


def openapi(app: OpenAPI) -> dict[str, Any]:
    """The OpenAPI description of an application."""
    made: dict[str, Any] = app.api_doc
    for operations in made["paths"].values():
        for operation in operations.values():
            # The framework adds its own form of the error 422 wherever we name none.
            if "application/json" in operation["responses"].get("422", {}).get("content", {}):
                del operation["responses"]["422"]
    for schema in made["components"]["schemas"].values():
        schema.pop("$defs", None)  # they stand beside it
    return made


@pages.get("/openapi.json")
def document() -> Response:
    """The OpenAPI description."""
    return Response(json.dumps(openapi(cast(OpenAPI, current_app))), mimetype=JSON)


@pages.get("/openapi")
def page() -> Response:
    """The page that shows the description."""
    response = make_response(render_template("openapi.html"))
    response.headers["Content-Security-Policy"] = POLICY
    return response


@pages.get("/openapi/viewer/<name>")
def viewer(name: str) -> Response:
    """A file of the viewer, from its installed package."""
    with as_file(_VIEWER) as folder:
        response = send_from_directory(folder, _VIEWER_FILES.get(name, "none"))
    response.headers["Cache-Control"] = "private, max-age=86400"
    return response
