"""Limits within which a sheet is read."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Limits:
    """What one sheet may cost: a hostile file is stopped by one of these.

    ``seconds`` is wall and processor time of one run; ``memory_bytes`` the address space of the
    reading process.
    """

    bytes: int = 50_000_000
    pages: int = 500
    objects_per_page: int = 200_000
    characters: int = 2_000_000
    seconds: float = 30.0
    memory_bytes: int = 2_000_000_000
    sheets_per_worker: int = 500
