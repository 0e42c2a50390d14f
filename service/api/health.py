"""Whether the service lives, and whether it can read a sheet now."""

from __future__ import annotations

from typing import Literal

from flask import Response
from flask_openapi.blueprint import APIBlueprint
from flask_openapi.models.tag import Tag
from pydantic import BaseModel

from service.api.answers import answers, json_answer
from service.checking import desk
from service.problems import answer

api = APIBlueprint("health", __name__, abp_tags=[Tag(name="health")])


class Health(BaseModel):
    """The state of the service."""

    status: Literal["alive", "ready"]


@api.get("/healthz", responses=answers(200, Health))
def alive() -> Response:
    """Say that the service answers."""
    return json_answer(Health(status="alive"))


@api.get("/readyz", responses=answers(200, Health, 503))
def ready() -> Response:
    """Say whether a sheet can be read now; a small one is."""
    if desk().ready():
        return json_answer(Health(status="ready"))
    return answer(
        503, "not-ready", "No sheet can be read at the moment.", "Try again in a few seconds."
    )
