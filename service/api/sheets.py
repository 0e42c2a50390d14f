"""A sheet in, its report out."""

from __future__ import annotations

from flask import Response, request, url_for
from flask_openapi.blueprint import APIBlueprint
from flask_openapi.models.file import FileStorage
from flask_openapi.models.tag import Tag
from pydantic import BaseModel, ConfigDict, Field
from werkzeug.exceptions import NotFound

from service.api.answers import answers, expect, json_answer
from service.checking import desk
from service.problems import Fault, answer
from specs.report.model import Report

api = APIBlueprint("sheets", __name__, url_prefix="/api/v1", abp_tags=[Tag(name="sheets")])


class SheetUpload(BaseModel):
    """A form with one file."""

    model_config = ConfigDict(arbitrary_types_allowed=True)

    file: FileStorage = Field(description="the sheet: PDF, text, Markdown, HTML or claims as JSON")


class SheetPath(BaseModel):
    """Names a sheet."""

    sheet_id: str = Field(description="SHA-256 of the bytes of the sheet, in hexadecimal")


@api.before_request
def _expect_a_form() -> None:
    if request.method == "POST":
        expect("multipart/form-data")


@api.post("/sheets", responses=answers(201, Report, 413, 415, 422, 503))
def check_sheet(form: SheetUpload) -> Response:  # noqa: ARG001 - declares the form in OpenAPI
    """Check a sheet.

    Answers with the report. Its id is the SHA-256 of the bytes: the same bytes have the same id.
    Read 'verdict' to gate an order: 'release', 'query' or 'hold'. The report stays under its
    'Location' while the service runs and newer ones do not push it out.
    """
    files = request.files.getlist("file")
    if not files:
        fault = Fault(pointer="/file", detail="The field holds text, not a file")
        return answer(
            422, "request-invalid", "The field 'file' of the form holds no file.",
            "Send it as a file, with a file name.", [fault],
        )  # fmt: skip
    if len(files) > 1:
        fault = Fault(pointer="/file", detail=f"{len(files)} files were sent")
        return answer(
            422, "several-files", "The form holds several files.",
            "Send one request for each file.", [fault],
        )  # fmt: skip
    kept = desk().check(files[0].read(), files[0].filename or "sheet")
    response = json_answer(kept.report, 201)
    response.headers["Location"] = url_for("sheets.sheet_report", sheet_id=kept.id)
    return response


@api.get("/sheets/<sheet_id>", responses=answers(200, Report, 404))
def sheet_report(path: SheetPath) -> Response:
    """Read the report of a sheet that was checked a short while ago."""
    kept = desk().find(path.sheet_id)
    if kept is None:
        raise NotFound("No sheet of this id is kept. Send the sheet again.")
    return json_answer(kept.report)
