"""Document to claims: labels, values, bands, antennas. Start reading at ``assemble``."""

from specs.extraction.assemble import extract
from specs.extraction.sheet import read_sheet

__all__ = ["extract", "read_sheet"]
