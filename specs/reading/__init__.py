"""Bytes to a neutral document, in this process or in a child process with limits."""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

from specs.reading.limits import Limits
from specs.reading.read import read
from specs.reading.sandbox import Sandbox

if TYPE_CHECKING:
    from specs.reading.pdf import page_sizes, render_page

__all__ = ["Limits", "Sandbox", "page_sizes", "read", "render_page"]


def __getattr__(name: str) -> Any:
    # PDFium is loaded only where a PDF is read.
    if name in ("page_sizes", "render_page"):
        from specs.reading import pdf

        return getattr(pdf, name)
    raise AttributeError(f"module 'specs.reading' has no attribute '{name}'")
