"""Document to claims: labels, values, bands, antennas. Start reading at ``assemble``."""

from specs.extraction.assemble import extract

__all__ = ["extract"]
