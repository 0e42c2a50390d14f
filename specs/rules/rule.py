"""What a rule is: its id, what it needs, its check, its formula, source and prose.

A rule file declares one function under ``@rule``. The function yields only the conflict: claims,
numbers, words. The engine stamps the id, the formula and the source. The docstring's sections are
the rule's page, and its two examples run as tests.
"""

from __future__ import annotations

import inspect
import re
from collections.abc import Callable, Iterator
from dataclasses import dataclass

from specs.rules.facts import Facts
from specs.rules.finding import Bound, Ruler, Severity

SECTIONS = ("What it checks", "Why it must hold", "Flagged", "Accepted")
TOPICS = (
    "reference and unit",
    "identities",
    "gain against beamwidth",
    "gain against size",
    "sheet",
)


@dataclass(frozen=True, slots=True)
class Need:
    """A figure a rule cannot do without: its name in words, and whether it is there."""

    words: str
    met: Callable[[Facts], bool]


@dataclass(frozen=True, slots=True)
class Conflict:
    """What a check found: which claims offend, by how much, and what to ask."""

    severity: Severity
    claims: tuple[str, ...]
    message: str
    question: str
    working: str = ""
    assumption: str = ""
    margin_db: float | None = None
    bound: Bound | None = None
    ruler: Ruler | None = None


Check = Callable[[Facts], Iterator[Conflict]]


@dataclass(frozen=True, slots=True)
class Rule:
    """One rule.

    ``applies`` says whether it concerns an antenna of this kind at all; ``scope`` is ``antenna``,
    or ``sheet`` for a rule that looks at the sheet once.
    """

    id: str
    topic: str
    needs: tuple[Need, ...]
    check: Check
    applies: Callable[[Facts], bool]
    formula: str
    source: str
    tiers: tuple[tuple[str, str], ...]
    title: str
    sections: dict[str, str]
    scope: str = "antenna"

    def missing(self, facts: Facts) -> str | None:
        """The first figures that are lacking, in words; None when the rule can run."""
        lacking = [need.words for need in self.needs if not need.met(facts)]
        return " and ".join(lacking) if lacking else None


def _always(_: Facts) -> bool:
    return True


def rule(
    *,
    id: str,  # noqa: A002 - the field's own word
    topic: str,
    needs: tuple[Need, ...],
    formula: str,
    source: str,
    tiers: tuple[tuple[str, str], ...],
    applies: Callable[[Facts], bool] = _always,
    scope: str = "antenna",
) -> Callable[[Check], Rule]:
    """Make a rule of a check function. Registers nothing: ``RULES`` lists the rules by hand.

    ``tiers`` tell in words which measure has which standing, for the rule's page.
    """

    def made(check: Check) -> Rule:
        title, sections = _read_docstring(check.__doc__ or "", id)
        return Rule(
            id, topic, needs, check, applies, formula, source, tiers, title, sections, scope
        )

    return made


def _read_docstring(text: str, rule_id: str) -> tuple[str, dict[str, str]]:
    """Title and sections of a rule's docstring. Raises ``ValueError`` when one is lacking."""
    text = inspect.cleandoc(text)
    parts = re.split(r"^(" + "|".join(SECTIONS) + r")\n-+\n", text, flags=re.MULTILINE)
    title = parts[0].strip().rstrip(".")
    sections = {name: _plain(body) for name, body in zip(parts[1::2], parts[2::2], strict=True)}
    lacking = [s for s in SECTIONS if s not in sections]
    if lacking or not title:
        raise ValueError(f"The docstring of {rule_id} lacks: {', '.join(lacking) or 'a title'}.")
    return title, sections


def _plain(body: str) -> str:
    return inspect.cleandoc("\n" + body).strip()
