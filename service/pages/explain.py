"""What each kind of problem means: where the ``type`` of a problem document leads."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from inspect import getdoc

from flask import Blueprint, render_template

from service.problems import STATUS_OF
from specs.errors import BeamproofError

pages = Blueprint("explain", __name__)


@dataclass(frozen=True, slots=True)
class Kind:
    """A kind of problem."""

    code: str
    status: int
    meaning: str
    advice: str


OF_THE_INTERFACE = (
    Kind("json-malformed", 400, "The body is no JSON.", "Send JSON in UTF-8."),
    Kind("request-invalid", 422, "The body lacks something or has something in the wrong form.",
         "Look at 'errors': each points at a place."),
    Kind("several-files", 422, "The form holds several files.", "Send one request for each file."),
    Kind("not-ready", 503, "No sheet can be read at the moment.", "Try again in a few seconds."),
    Kind("bad-request", 400, "The request cannot be understood, or names a host that the service "
         "does not answer for.", "Compare the request with /openapi.json."),
    Kind("forbidden", 403, "The request comes from a page of another site.",
         "Send it from a page of this service, or from a program."),
    Kind("not-found", 404, "Nothing stands at this address.", "Check the address."),
    Kind("method-not-allowed", 405, "The address does not take this method.",
         "Use one that the header 'Allow' names."),
    Kind("request-entity-too-large", 413, "The body is larger than accepted.", "Send less."),
    Kind("unsupported-media-type", 415, "The body is of another type than the address takes.",
         "Send the type that /openapi.json names."),
    Kind("internal-error", 500, "The service failed.",
         "Try again; if it happens again, give the request id to whoever runs the service."),
)  # fmt: skip


@pages.get("/problems")
def problems() -> str:
    """All kinds of problem."""
    return render_template("problems.html", kinds=[*_typed(BeamproofError), *OF_THE_INTERFACE])


def _typed(root: type[BeamproofError]) -> Iterator[Kind]:
    for error in root.__subclasses__():
        meaning = (getdoc(error) or "").partition("\n")[0].replace("``", "")
        yield Kind(error.code, STATUS_OF.get(error.code, 422), meaning, error.advice)
        yield from _typed(error)
