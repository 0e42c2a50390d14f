"""The newest sheets with their reports, kept in memory until others push them out.

What a browser is shown has an address as long as it stands here; nothing is written to disk.
"""

from __future__ import annotations

import threading
from collections import OrderedDict
from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Kept:
    """A sheet as it was sent, and its report as JSON (``beamproof.report/1``)."""

    id: str
    name: str
    data: bytes
    report: bytes

    @property
    def size(self) -> int:
        """Bytes held."""
        return len(self.data) + len(self.report)


class Shelf:
    """Kept sheets by id (SHA-256 of the bytes), the least recently used leave first. Thread-safe.

    At most ``most`` of them, and at most ``most_bytes`` together; one that is larger than that by
    itself is not kept.
    """

    def __init__(self, most: int, most_bytes: int) -> None:
        self._most, self._most_bytes = most, most_bytes
        self._kept: OrderedDict[str, Kept] = OrderedDict()
        self._bytes = 0
        self._lock = threading.Lock()

    def put(self, kept: Kept) -> None:
        """Keep a sheet; the same bytes again take the place of the earlier."""
        with self._lock:
            self._drop(kept.id)
            if kept.size > self._most_bytes:
                return
            self._kept[kept.id] = kept
            self._bytes += kept.size
            while len(self._kept) > self._most or self._bytes > self._most_bytes:
                self._drop(next(iter(self._kept)))

    def get(self, sheet_id: str) -> Kept | None:
        """A sheet by its id; None when it is not here, or no longer."""
        with self._lock:
            if sheet_id in self._kept:
                self._kept.move_to_end(sheet_id)
            return self._kept.get(sheet_id)

    def _drop(self, sheet_id: str) -> None:
        gone = self._kept.pop(sheet_id, None)
        if gone is not None:
            self._bytes -= gone.size
