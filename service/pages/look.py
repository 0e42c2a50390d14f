"""The tokens that pages share with the report, and how figures are written on them."""

from __future__ import annotations

from importlib.resources import files

from flask import Blueprint, Response

from specs.conversion import Conversion
from specs.report.phrases import number

pages = Blueprint("look", __name__)


@pages.get("/look/tokens.css")
def tokens() -> Response:
    """The report's tokens: colours of light and dark, type, spacing."""
    text = files("specs.report").joinpath("templates", "tokens.css").read_text("utf-8")
    response = Response(text, mimetype="text/css")
    response.headers["Cache-Control"] = "no-cache"
    response.add_etag()
    return response


@pages.app_template_filter("figure")
def figure(value: float) -> str:
    """A figure with five significant digits and a true minus."""
    if value != 0 and abs(value) < 0.01:
        return f"{value:.4g}".replace("-", "−")
    return number(float(f"{value:.5g}"))


@pages.app_template_filter("span_of")
def span_of(found: Conversion) -> str:
    """The interval of a conversion in words; '' where it is one value."""
    if found.low == found.high:
        return ""
    return str(found) if "at " in str(found) else f"{figure(found.low)} to {figure(found.high)}"
