"""A rule as a page: what the command line, the service and the documentation show of it."""

from __future__ import annotations

from dataclasses import dataclass

from specs.rules.rule import Rule


@dataclass(frozen=True, slots=True)
class RulePage:
    """The parts of a rule's page, ready to print."""

    id: str
    topic: str
    title: str
    checks: str
    reason: str
    formula: str
    source: str
    needs: tuple[str, ...]
    tiers: tuple[tuple[str, str], ...]
    flagged: str
    accepted: str


def page_of(rule: Rule) -> RulePage:
    """The page of a rule, from its declaration and docstring."""
    return RulePage(
        id=rule.id,
        topic=rule.topic,
        title=rule.title,
        checks=rule.sections["What it checks"],
        reason=rule.sections["Why it must hold"],
        formula=rule.formula,
        source=rule.source,
        needs=tuple(need.words for need in rule.needs),
        tiers=rule.tiers,
        flagged=rule.sections["Flagged"],
        accepted=rule.sections["Accepted"],
    )


def as_text(rule: Rule) -> str:
    """The page of a rule as plain text for a terminal."""
    page = page_of(rule)
    parts = [
        f"{page.id}\n{page.title}.",
        f"What it checks\n{_indented(page.checks)}",
        f"Why it must hold\n{_indented(page.reason)}",
        f"Formula\n    {page.formula}",
        "Tiers\n" + "\n".join(f"    {measure}: {standing}" for measure, standing in page.tiers),
        f"Source\n    {page.source}",
        "Needs\n    " + ("; ".join(page.needs) if page.needs else "nothing in particular"),
        f"Flagged\n{_indented(page.flagged)}",
        f"Accepted\n{_indented(page.accepted)}",
    ]
    return "\n\n".join(parts)


def _indented(text: str) -> str:
    return "\n".join(f"    {line}" if line else "" for line in text.splitlines())
