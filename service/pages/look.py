"""The tokens that pages share with the report, and how figures are written on them."""

from __future__ import annotations

from decimal import Decimal
from importlib.resources import files

from flask import Blueprint, Response

from specs.conversion import Conversion

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
    """A figure with four significant digits and a true minus.

    >>> figure(0.325841), figure(-3258.41), figure(60.0)
    ('0.3258', '−3258', '60')
    """
    digits = 0 if abs(value) >= 1000 else 4
    rounded = round(value) if digits == 0 else Decimal(f"{value:.{digits}g}").normalize()
    return format(rounded, "f" if digits else "d").replace("-", "−")


@pages.app_template_filter("unit_in_print")
def unit_in_print(unit: str) -> str:
    """A unit as it is printed: m² for 'm2', nothing for a plain ratio."""
    return {"x": "", "m2": "m²", "cm2": "cm²", "ft2": "ft²", "deg": "°"}.get(unit, unit)


@pages.app_template_filter("span_of")
def span_of(found: Conversion) -> str:
    """The interval of a conversion in words; '' where it is one value."""
    if found.low == found.high:
        return ""
    return str(found) if "at " in str(found) else f"{figure(found.low)} to {figure(found.high)}"
