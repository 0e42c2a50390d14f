"""The application: the interface for programs and the pages for people."""

from __future__ import annotations

from importlib.metadata import version

from flask import Flask, request
from flask_openapi.models.info import Info
from flask_openapi.openapi import OpenAPI
from werkzeug.exceptions import Forbidden

from service import api, pages
from service.api.conversions import ConversionRequest
from service.api.description import describe
from service.checking import open_desk
from service.envelope import surround
from service.problems import Problem, handle_errors, invalid
from service.settings import Settings, from_environment
from specs.claims.given import GivenClaims

_FORM_OVERHEAD = 100_000
_OPENAPI_VERSION = "3.1.0"  # the newest that common clients and validators read
_OWN_ORIGIN = ("same-origin", "none")


def create_app(settings: Settings | None = None) -> Flask:
    """The application, by ``settings`` or by those of the environment.

    Raises ``SettingsError``. Reading processes start with the first sheet;
    ``service.checking.desk(app).close()`` ends them.
    """
    settings = settings or from_environment()
    app = OpenAPI(
        __name__,
        info=Info(
            title="Beamproof",
            version=version("beamproof"),
            description="Antenna sheets and claims in, judged reports out.",
        ),
        doc_ui=False,
        static_folder="pages/static",
        template_folder="pages/templates",
        validation_error_callback=invalid,
        validation_error_model=Problem,
    )
    app.openapi_version = _OPENAPI_VERSION
    app.config.update(
        MAX_CONTENT_LENGTH=settings.sheet_bytes + _FORM_OVERHEAD,
        MAX_FORM_MEMORY_SIZE=settings.text_bytes + _FORM_OVERHEAD,
        MAX_FORM_PARTS=settings.files_at_once + 10,
        TRUSTED_HOSTS=list(settings.trusted_hosts),
        CLAIMS_BYTES=settings.claims_bytes,
        FORM_BYTES=settings.form_bytes,
        SHEET_BYTES=settings.sheet_bytes,
        TEXT_BYTES=settings.text_bytes,
        FILES_AT_ONCE=settings.files_at_once,
    )
    app.jinja_env.trim_blocks = app.jinja_env.lstrip_blocks = True
    surround(app)
    handle_errors(app)
    app.before_request(_refuse_other_sites)
    open_desk(app, settings)
    describe(app, GivenClaims, ConversionRequest)
    api.register(app)
    pages.register(app)
    return app


def _refuse_other_sites() -> None:
    """A page of another site must not make a browser send sheets here."""
    sent_from = request.headers.get("Sec-Fetch-Site", "none")
    if request.method not in ("GET", "HEAD") and sent_from not in _OWN_ORIGIN:
        raise Forbidden("The request comes from a page of another site.")
