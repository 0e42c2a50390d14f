"""The grammar of one printed figure."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum


class Relation(StrEnum):
    """How a printed figure stands to the truth it claims."""

    EQUAL = "equal"
    AT_LEAST = "at_least"
    AT_MOST = "at_most"
    RANGE = "range"


@dataclass(frozen=True, slots=True)
class Figure:
    """One printed figure: ends as printed, relation, tolerance, unit in its one spelling.

    ``unit`` is '' when none is printed. ``half_step`` is half a step of the last digit.
    """

    text: str
    low: float
    high: float
    relation: Relation
    tolerance: float | None
    unit: str
    half_step: float
