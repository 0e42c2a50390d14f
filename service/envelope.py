"""What surrounds every answer: a request id, safety headers, one line in the log."""

from __future__ import annotations

import logging
import re
import time
import uuid

from flask import Flask, Response, g, request

LOG = logging.getLogger("beamproof.service")

_REQUEST_ID = re.compile(r"[A-Za-z0-9._-]{8,64}")

PAGE_POLICY = (
    "default-src 'none'; script-src 'self'; style-src 'self'; img-src 'self' data:; "
    "connect-src 'self'; form-action 'self'; base-uri 'none'; frame-ancestors 'none'"
)
"""Our own pages: own scripts and styles as files, nothing inline, nothing from outside."""

REPORT_POLICY = (
    "sandbox allow-downloads; default-src 'none'; style-src 'unsafe-inline'; img-src data:; "
    "form-action 'none'; base-uri 'none'; frame-ancestors 'none'"
)
"""A report carries text of a stranger: no script can run, whatever the sheet says."""

DATA_POLICY = "default-src 'none'; base-uri 'none'; frame-ancestors 'none'"
"""Answers that are no page."""

_HEADERS = {
    "X-Content-Type-Options": "nosniff",
    "X-Frame-Options": "DENY",
    "Referrer-Policy": "no-referrer",
    "Cross-Origin-Opener-Policy": "same-origin",
    "Cross-Origin-Resource-Policy": "same-origin",
    "Permissions-Policy": "camera=(), geolocation=(), microphone=(), usb=()",
}


def surround(app: Flask) -> None:
    """Give every answer of an application its request id, headers and log line."""
    app.before_request(_begin)
    app.after_request(_end)


def request_id() -> str:
    """The id of the request at hand: the caller's, when it sent a plain one, else a new one."""
    if "request_id" not in g:
        sent = request.headers.get("X-Request-ID", "")
        g.request_id = sent if _REQUEST_ID.fullmatch(sent) else uuid.uuid4().hex
    return str(g.request_id)


def _begin() -> None:
    g.began = time.perf_counter()


def _end(response: Response) -> Response:
    headers = response.headers
    for name, value in _HEADERS.items():
        headers.setdefault(name, value)
    is_page = response.mimetype == "text/html"
    headers.setdefault("Content-Security-Policy", PAGE_POLICY if is_page else DATA_POLICY)
    if not request.path.startswith("/static/"):
        headers.setdefault("Cache-Control", "no-store")
    headers["X-Request-ID"] = request_id()
    # The path is logged without its query: a question or a name may be confidential.
    LOG.info(
        "request id=%s method=%s path=%s status=%d ms=%.1f",
        request_id(),
        request.method,
        _plain(request.path),
        response.status_code,
        1e3 * (time.perf_counter() - g.get("began", time.perf_counter())),
    )
    return response


def _plain(path: str) -> str:
    """A path that cannot break the line it is logged on."""
    return path[:200].encode("unicode_escape").decode("ascii").replace(" ", "%20")
