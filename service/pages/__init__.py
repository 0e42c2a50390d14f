"""The pages for people: they work without JavaScript, and look like the report.

::

    intake.py     /, /check, /results, /demo  sheets in
    reports.py    /reports/<id>               a report, and its exports
    convert.py    /convert                    one figure in other units
    rules.py      /rules, /rules/<id>         what sheets are held against
    explain.py    /problems                   what each error means
    look.py       /look/tokens.css            the tokens shared with the report
    glance.py     a report in one line
"""

from __future__ import annotations

from flask import Flask

from service.pages import convert, explain, intake, look, reports, rules

_PARTS = (intake.pages, reports.pages, convert.pages, rules.pages, explain.pages, look.pages)


def register(app: Flask) -> None:
    """Add the pages to an application."""
    for part in _PARTS:
        app.register_blueprint(part)
