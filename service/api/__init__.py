"""The programs' interface: ``/api/v1``, its description, and the health addresses.

::

    sheets.py        a sheet in, its report out
    validations.py   claims as JSON in, a report out
    conversions.py   one figure in other units
    rules.py         the rules, and one of them
    schemas.py       JSON Schemas of what goes in and out
    health.py        /healthz, /readyz
    description.py   /openapi.json and its page
"""

from __future__ import annotations

from flask_openapi.openapi import OpenAPI

from service.api import (
    conversions,
    description,
    health,
    rules,
    schemas,
    sheets,
    validations,
)

_PARTS = (sheets.api, validations.api, conversions.api, rules.api, schemas.api)


def register(app: OpenAPI) -> None:
    """Add the interface to an application."""
    for part in _PARTS:
        app.register_api(part)
    app.register_api(health.api)
    app.register_blueprint(description.pages)
