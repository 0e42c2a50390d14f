"""The rules that sheets are held against."""

from __future__ import annotations

from flask import Response
from flask_openapi.blueprint import APIBlueprint
from flask_openapi.models.tag import Tag
from pydantic import BaseModel, ConfigDict, Field
from werkzeug.exceptions import NotFound

from service.api.answers import answers, json_answer
from specs.rules import RULES, RULES_VERSION
from specs.rules.page import RulePage, page_of

api = APIBlueprint("rules", __name__, url_prefix="/api/v1", abp_tags=[Tag(name="rules")])


class Tier(BaseModel):
    """Which measure has which standing."""

    measure: str
    standing: str


class RuleEntry(BaseModel):
    """One rule: what it checks, why it must hold, and by which source."""

    model_config = ConfigDict(from_attributes=True)

    id: str
    topic: str
    title: str
    checks: str
    reason: str
    formula: str
    source: str
    needs: list[str]
    tiers: list[Tier]
    flagged: str = Field(description="text of a sheet on which the rule makes a finding")
    accepted: str = Field(description="text of a sheet on which it makes none")


class RuleList(BaseModel):
    """Every rule, in the order in which they run."""

    rules_version: str
    rules: list[RuleEntry]


class RulePath(BaseModel):
    """Names a rule."""

    rule_id: str = Field(description="its name in words: 'gain-above-directivity'")


@api.get("/rules", responses=answers(200, RuleList))
def list_rules() -> Response:
    """List the rules."""
    entries = [_entry(page_of(rule)) for rule in RULES]
    return json_answer(RuleList(rules_version=RULES_VERSION, rules=entries))


@api.get("/rules/<rule_id>", responses=answers(200, RuleEntry, 404))
def show_rule(path: RulePath) -> Response:
    """Show one rule."""
    rule = next((rule for rule in RULES if rule.id == path.rule_id), None)
    if rule is None:
        raise NotFound("There is no rule of this name. /api/v1/rules lists them.")
    return json_answer(_entry(page_of(rule)))


def _entry(page: RulePage) -> RuleEntry:
    tiers = [Tier(measure=measure, standing=standing) for measure, standing in page.tiers]
    return RuleEntry(
        id=page.id,
        topic=page.topic,
        title=page.title,
        checks=page.checks,
        reason=page.reason,
        formula=page.formula,
        source=page.source,
        needs=list(page.needs),
        tiers=tiers,
        flagged=page.flagged,
        accepted=page.accepted,
    )
