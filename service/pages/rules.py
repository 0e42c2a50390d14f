"""The rules by topic, and each with its reason and two examples judged live."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from flask import Blueprint, render_template
from werkzeug.exceptions import NotFound

from specs.pipeline import check_text
from specs.report.model import FindingEntry
from specs.report.phrases import SHAPES
from specs.rules import RULES
from specs.rules.page import RulePage, page_of
from specs.rules.rule import TOPICS

pages = Blueprint("rule_pages", __name__, url_prefix="/rules")


@dataclass(frozen=True, slots=True)
class Example:
    """A sheet in few words, and what the rule says of it."""

    text: str
    findings: tuple[FindingEntry, ...]


@pages.get("")
def index() -> str:
    """All rules."""
    listed = [page_of(rule) for rule in RULES]
    topics = [(topic, [page for page in listed if page.topic == topic]) for topic in TOPICS]
    return render_template("rules.html", topics=topics, total=len(listed))


@pages.get("/<rule_id>")
def rule(rule_id: str) -> str:
    """One rule."""
    page = next((page_of(rule) for rule in RULES if rule.id == rule_id), None)
    if page is None:
        raise NotFound("There is no rule of this name. The list of rules is at /rules.")
    flagged, accepted = _examples(page)
    return render_template(
        "rule.html", page=page, flagged=flagged, accepted=accepted, shapes=SHAPES
    )


@cache
def _examples(page: RulePage) -> tuple[Example, Example]:
    return _judged(page.id, page.flagged), _judged(page.id, page.accepted)


def _judged(rule_id: str, text: str) -> Example:
    report = check_text(text)
    findings = [*report.findings, *(f for a in report.antennas for f in a.findings)]
    return Example(text, tuple(f for f in findings if f.rule == rule_id))
