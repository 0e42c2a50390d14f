"""Sheets in: a form that ends on the report, or on one row for each of several sheets."""

from __future__ import annotations

from functools import cache
from importlib.resources import files

from flask import Blueprint, Response, current_app, redirect, render_template, request, url_for
from werkzeug.wrappers import Response as Answer

from service.checking import desk
from service.pages.glance import Row, row_of
from service.problems import STATUS_OF
from specs.errors import BeamproofError, EmptySheet, SheetTooLarge

pages = Blueprint("intake", __name__)

DEMO = "of-5800-17-sector-panel.pdf"


@pages.get("/")
def intake() -> str:
    """The form."""
    return render_template("intake.html", failure=None)


@pages.post("/check")
def check() -> Answer | tuple[str, int]:
    """Check what the form sends: one sheet ends on its report, several on a list of rows."""
    request.max_content_length = current_app.config["FORM_BYTES"]
    sheets = _sheets()
    if len(sheets) == 1:
        data, name = sheets[0]
        try:
            kept = desk().check(data, name)
        except BeamproofError as error:
            failed = render_template("intake.html", failure=Row(name=name, failure=error))
            return failed, STATUS_OF.get(error.code, 422)
        return redirect(url_for("reports.report", sheet_id=kept.id), 303)
    return render_template("results.html", rows=[_row(*sheet) for sheet in sheets], gone=0), 200


@pages.post("/rows")
def rows() -> str:
    """The rows of the sheets that a script sends, as a piece of a page."""
    request.max_content_length = current_app.config["FORM_BYTES"]
    return render_template("rows.html", rows=[_row(*sheet) for sheet in _sheets()])


@pages.get("/results")
def results() -> str:
    """The rows of sheets that were checked a short while ago, named by their ids."""
    named = request.args.getlist("id")[: current_app.config["FILES_AT_ONCE"]]
    found = [desk().find(sheet_id) for sheet_id in named]
    rows = [row_of(kept) for kept in found if kept is not None]
    return render_template("results.html", rows=rows, gone=len(found) - len(rows))


@pages.get("/demo")
def demo() -> Answer:
    """Check the demo sheet."""
    kept = desk().check(_demo(), DEMO)
    return redirect(url_for("reports.report", sheet_id=kept.id), 303)


@pages.get("/demo/sheet.pdf")
def demo_sheet() -> Response:
    """The demo sheet itself."""
    return Response(_demo(), mimetype="application/pdf")


@cache
def _demo() -> bytes:
    return files("service.pages").joinpath("demo", DEMO).read_bytes()


def _sheets() -> list[tuple[bytes, str]]:
    """Bytes and name of every sheet in the form: files, and pasted text."""
    sent = [file for file in request.files.getlist("file") if file.filename]
    most = current_app.config["FILES_AT_ONCE"]
    if len(sent) > most:
        raise SheetTooLarge(f"{len(sent)} files were sent; at most {most} are taken at once.",
                            "Send them in several forms.")  # fmt: skip
    sheets = [(file.read(), file.filename or "sheet") for file in sent]
    text = request.form.get("text", "").encode("utf-8", "replace")
    if len(text) > current_app.config["TEXT_BYTES"]:
        raise SheetTooLarge(f"The pasted text has {len(text):,} bytes.", "Send it as a file.")
    if text.strip():
        sheets.append((text, "pasted-text.txt"))
    if not sheets:
        raise EmptySheet("There is no file and no text in the form.",
                         "Choose a file, or paste the text of a sheet.")  # fmt: skip
    return sheets


def _row(data: bytes, name: str) -> Row:
    try:
        return row_of(desk().check(data, name))
    except BeamproofError as error:
        return Row(name=name, failure=error)
