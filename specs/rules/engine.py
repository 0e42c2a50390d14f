"""Runs the rules on an antenna: findings, coverage, and crashes apart from findings."""

from __future__ import annotations

from specs.claims import Antenna, Sheet
from specs.rules.facts import Facts
from specs.rules.finding import Coverage, Finding, Judgement, NotRun, RuleFailure
from specs.rules.rule import Conflict, Rule


def judge(antenna: Antenna, sheet: Sheet, rules: tuple[Rule, ...] | None = None) -> Judgement:
    """All that the rules say of one antenna, worst findings first."""
    if rules is None:
        from specs.rules import RULES

        rules = RULES
    facts = Facts(antenna, sheet)
    rules = tuple(r for r in rules if r.scope == "antenna")
    findings: list[Finding] = []
    ran: list[str] = []
    not_run: list[NotRun] = []
    not_applicable: list[str] = []
    failures: list[RuleFailure] = []
    for rule in rules:
        try:
            if not rule.applies(facts):
                not_applicable.append(rule.id)
                continue
            missing = rule.missing(facts)
            if missing is not None:
                not_run.append(NotRun(rule.id, missing))
                continue
            findings.extend(_stamped(conflict, rule) for conflict in rule.check(facts))
            ran.append(rule.id)
        except Exception as error:  # a crash of a rule is told apart from what rules find
            failures.append(RuleFailure(rule.id, antenna.label, f"{type(error).__name__}: {error}"))
    findings.sort(key=lambda f: (-f.severity.rank, -(f.margin_db or 0.0)))
    coverage = Coverage(tuple(ran), tuple(not_run), tuple(not_applicable))
    return Judgement(antenna.label, tuple(findings), coverage, tuple(failures))


def judge_whole_sheet(sheet: Sheet) -> tuple[Finding, ...]:
    """The findings of the rules that look at the sheet as a whole."""
    from specs.rules import RULES

    facts = Facts(Antenna(sheet.name, ()), sheet)
    return tuple(
        _stamped(conflict, rule)
        for rule in RULES
        if rule.scope == "sheet"
        for conflict in rule.check(facts)
    )


def _stamped(conflict: Conflict, rule: Rule) -> Finding:
    return Finding(
        rule=rule.id,
        severity=conflict.severity,
        claims=conflict.claims,
        message=conflict.message,
        question=conflict.question,
        source=rule.source,
        formula=rule.formula,
        working=conflict.working,
        assumption=conflict.assumption,
        margin_db=conflict.margin_db,
        bound=conflict.bound,
        ruler=conflict.ruler,
    )
