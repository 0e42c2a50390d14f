"""A report as a page that cannot run a script, and its exports."""

from __future__ import annotations

from flask import Blueprint, Response, render_template, url_for
from werkzeug.exceptions import NotFound

from service.checking import desk
from service.envelope import REPORT_POLICY
from service.shelf import Kept
from specs.report.model import Report
from specs.report.table import report_csv
from specs.report.text import render_text

pages = Blueprint("reports", __name__, url_prefix="/reports")

_BODY = "<body>"


@pages.get("/<sheet_id>")
def report(sheet_id: str) -> Response:
    """The report, under a line that leads back and to its exports."""
    kept = _kept(sheet_id)
    bar = render_template("report_bar.html", sheet_id=sheet_id)
    page = desk().page(kept).replace(_BODY, _BODY + bar, 1)
    return _guarded(Response(page, mimetype="text/html"))


@pages.get("/<sheet_id>.html")
def as_html(sheet_id: str) -> Response:
    """The report as one file to keep or send."""
    kept = _kept(sheet_id)
    return _file(_guarded(Response(desk().page(kept), mimetype="text/html")), kept, "html")


@pages.get("/<sheet_id>.json")
def as_json(sheet_id: str) -> Response:
    """The report as JSON."""
    kept = _kept(sheet_id)
    return _file(Response(kept.report, mimetype="application/json"), kept, "json")


@pages.get("/<sheet_id>.csv")
def as_csv(sheet_id: str) -> Response:
    """The claims as a table, safe to open in a spreadsheet."""
    kept = _kept(sheet_id)
    table = report_csv([Report.model_validate_json(kept.report)])
    return _file(Response(table, mimetype="text/csv"), kept, "csv")


@pages.get("/<sheet_id>.txt")
def as_text(sheet_id: str) -> Response:
    """The report as plain text."""
    kept = _kept(sheet_id)
    text = render_text(Report.model_validate_json(kept.report), colour=False)
    return _file(Response(text, mimetype="text/plain"), kept, "txt")


def _kept(sheet_id: str) -> Kept:
    kept = desk().find(sheet_id)
    if kept is None:
        raise NotFound(
            f"No report stands here any more. Send the sheet again at {url_for('intake.intake')}."
        )
    return kept


def _guarded(response: Response) -> Response:
    response.headers["Content-Security-Policy"] = REPORT_POLICY
    return response


def _file(response: Response, kept: Kept, suffix: str) -> Response:
    """An answer that is saved under a name made of the id, never of the name that was sent."""
    name = f"beamproof-{kept.id[:12]}.{suffix}"
    response.headers["Content-Disposition"] = f'attachment; filename="{name}"'
    return response
