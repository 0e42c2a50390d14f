"""One figure in other units and as other quantities."""

from __future__ import annotations

import math
from typing import Annotated, Any

from flask import Response
from flask_openapi.blueprint import APIBlueprint
from flask_openapi.models.media_type import MediaType
from flask_openapi.models.request_body import RequestBody
from flask_openapi.models.tag import Tag
from pydantic import BaseModel, ConfigDict, Field, ValidationError

from service.api.answers import JSON, answers, json_answer, json_body
from service.problems import invalid
from specs.conversion import Conversion, convert, equivalents

api = APIBlueprint(
    "conversions", __name__, url_prefix="/api/v1", abp_tags=[Tag(name="conversions")]
)

Text = Annotated[str, Field(min_length=1, max_length=200)]
Condition = Annotated[str, Field(min_length=1, max_length=60)]


class ConversionRequest(BaseModel):
    """A figure as one would type it, and what it is wanted as."""

    model_config = ConfigDict(extra="forbid", frozen=True)

    text: Text = Field(description="'7.5 dBd at 450 MHz', 'VSWR 1.5', '62 %'")
    to: Condition | None = Field(None, description="unit or quantity; without it, all there are")
    frequency: Condition | None = Field(None, description="where the text does not carry it")
    loss_resistance: Condition | None = Field(None, description="for efficiency from resistances")


class ConvertedFigure(BaseModel):
    """One figure on another scale; a null end of the interval is open."""

    model_config = ConfigDict(frozen=True, allow_inf_nan=False)

    quantity: str
    unit: str
    low: float | None
    nominal: float
    high: float | None
    words: str
    formula: str
    source: str
    assumptions: list[str]
    read_as: str


class ConversionAnswer(BaseModel):
    """The figure on every scale that was asked for."""

    text: str
    results: list[ConvertedFigure]


_form: Any = {"$ref": f"#/components/schemas/{ConversionRequest.__name__}"}
_BODY = RequestBody(
    content={
        JSON: MediaType.model_validate(
            {"schema": _form, "example": {"text": "7.5 dBd at 450 MHz", "to": "dB/m"}}
        )
    }
)


@api.post(
    "/conversions",
    request_body=_BODY,
    responses=answers(200, ConversionAnswer, 400, 413, 415, 422),
)
def convert_figure() -> Response:
    """Convert a figure, with its interval, formula and source."""
    try:
        asked = ConversionRequest.model_validate_json(json_body())
    except ValidationError as error:
        return invalid(error)
    conditions = {"frequency": asked.frequency, "loss_resistance": asked.loss_resistance}
    found = (
        equivalents(asked.text, **conditions)
        if asked.to is None
        else (convert(asked.text, asked.to, **conditions),)
    )
    return json_answer(ConversionAnswer(text=asked.text, results=[_result(c) for c in found]))


def _result(found: Conversion) -> ConvertedFigure:
    return ConvertedFigure(
        quantity=found.quantity,
        unit=found.unit,
        low=found.low if math.isfinite(found.low) else None,
        nominal=found.nominal,
        high=found.high if math.isfinite(found.high) else None,
        words=str(found),
        formula=found.formula,
        source=found.source,
        assumptions=list(found.assumptions),
        read_as=found.read_as,
    )
