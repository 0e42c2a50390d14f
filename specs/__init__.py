"""Antenna sheets: claims read, put on one reference, and held against physics.

>>> from specs import check_text
>>> check_text("Gain: 3 dBi").verdict.value
'query'

The names below are the whole public surface. They are reached on first use, so that importing the
package costs little.
"""

from __future__ import annotations

from importlib import import_module
from typing import TYPE_CHECKING, Any

if TYPE_CHECKING:
    from specs.claims.normalize import normalize
    from specs.conversion import convert
    from specs.extraction import extract, read_sheet
    from specs.pipeline import Checker, check_claims, check_file, check_text
    from specs.report.model import Report
    from specs.rules import RULES

_HOME = {
    "Checker": "specs.pipeline",
    "RULES": "specs.rules",
    "Report": "specs.report.model",
    "check_claims": "specs.pipeline",
    "check_file": "specs.pipeline",
    "check_text": "specs.pipeline",
    "convert": "specs.conversion",
    "extract": "specs.extraction",
    "normalize": "specs.claims.normalize",
    "read_sheet": "specs.extraction",
}

__all__ = [
    "RULES",
    "Checker",
    "Report",
    "check_claims",
    "check_file",
    "check_text",
    "convert",
    "extract",
    "normalize",
    "read_sheet",
]


def __getattr__(name: str) -> Any:
    if name not in _HOME:
        raise AttributeError(f"module 'specs' has no attribute '{name}'")
    return getattr(import_module(_HOME[name]), name)
