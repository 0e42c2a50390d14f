"""hidden-text: a figure that the page does not show."""

from __future__ import annotations

from collections.abc import Iterator

from specs.rules.facts import Facts
from specs.rules.finding import Severity
from specs.rules.rule import Conflict, rule


@rule(
    id="hidden-text",
    topic="sheet",
    scope="sheet",
    needs=(),
    formula="what is judged is what is shown",
    source="common practice, no source",
    tiers=(("a labelled figure that the page does not show", "unclear"),),
)
def hidden_text(facts: Facts) -> Iterator[Conflict]:
    """A figure in the text of a page that the page does not show.

    What it checks
    --------------
    No labelled figure stands in invisible text.

    Why it must hold
    ----------------
    A buyer sees the page, a machine reads its text. Where the two differ, one of them is misled.

    Flagged
    -------
    (An invisible figure in a PDF; it cannot be shown in plain text.)

    Accepted
    --------
    Frequency: 2400-2500 MHz
    Gain: 7 dBi
    """
    for item in facts.sheet.unread:
        if item.reason == "hidden":
            text = " ".join(item.text.split())[:80]
            yield Conflict(
                severity=Severity.UNCLEAR,
                claims=(),
                message=f"'{text}' on page {item.page} stands in text that the page does not show.",
                question=f"Is '{text}' part of the specification?",
            )
