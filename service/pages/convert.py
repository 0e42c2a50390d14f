"""One figure in other units: the address holds the question."""

from __future__ import annotations

from flask import Blueprint, render_template, request

from specs.conversion import Conversion, equivalents
from specs.errors import BeamproofError

pages = Blueprint("convert", __name__)

EXAMPLES = (
    "7.5 dBd at 450 MHz",
    "VSWR 1.5",
    "62 %",
    "24 dB/m at 868 MHz",
    "EIRP 20 dBm",
    "60° at -10 dB",
)
_LONGEST = 200


@pages.get("/convert")
def convert() -> tuple[str, int]:
    """Every equivalent of the figure in ``q``."""
    text = request.args.get("q", "")[:_LONGEST].strip()
    found: tuple[Conversion, ...] = ()
    failure: BeamproofError | None = None
    if text:
        try:
            found = equivalents(text)
        except BeamproofError as error:
            failure = error
    page = render_template(
        "convert.html", text=text, found=found, failure=failure, examples=EXAMPLES
    )
    return page, 200 if failure is None else 422
