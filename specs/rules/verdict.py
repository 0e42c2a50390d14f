"""Findings and coverage to a verdict for the purchasing workflow, with one sentence why."""

from __future__ import annotations

from collections.abc import Sequence

from specs.rules.finding import Finding, Judgement, Severity

RELEASE, QUERY, HOLD = "release", "query", "hold"
_RANK = {RELEASE: 0, QUERY: 1, HOLD: 2}

PHYSICAL_TOPICS = ("identities", "gain against beamwidth", "gain against size")


def verdict_of(judgement: Judgement) -> tuple[str, str]:
    """(verdict, reason) of one antenna.

    Hold with anything impossible or implausible; query with anything doubtful or unclear, with a
    rule that crashed, or when no physical rule could run; else release.
    """
    findings = judgement.findings
    if severe := [f for f in findings if f.severity.rank >= Severity.IMPLAUSIBLE.rank]:
        return HOLD, _because(severe)
    if open_questions := [f for f in findings if f.severity.rank >= Severity.UNCLEAR.rank]:
        return QUERY, _because(open_questions)
    if judgement.failures:
        return QUERY, "A rule failed to run, so the antenna is not fully checked."
    if not _checked(judgement):
        return QUERY, "No physical check could run on the figures given."
    return RELEASE, f"{len(judgement.coverage.ran)} checks ran and none found more than a note."


def _checked(judgement: Judgement) -> bool:
    from specs.rules import RULES

    physical = {r.id for r in RULES if r.topic in PHYSICAL_TOPICS}
    return bool(physical & set(judgement.coverage.ran) - {"vswr-out-of-range"})


def _because(findings: Sequence[Finding]) -> str:
    more = len(findings) - 1
    if more == 0:
        return findings[0].message
    return f"{findings[0].message} {more} more finding{'s' if more > 1 else ''} of this weight."


def worst(
    antennas: Sequence[tuple[str, str]], whole: Sequence[Finding], any_antenna: bool
) -> tuple[str, str]:
    """(verdict, reason) of a sheet from those of its antennas and its own findings."""
    if not any_antenna:
        return QUERY, "No claim about an antenna was read from the sheet."
    verdict, reason = max(antennas, key=lambda v: _RANK[v[0]])
    if verdict == RELEASE and any(f.severity.rank >= Severity.UNCLEAR.rank for f in whole):
        return QUERY, _because([f for f in whole if f.severity.rank >= Severity.UNCLEAR.rank])
    return verdict, reason
