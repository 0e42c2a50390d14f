"""The questions to the vendor as a plain letter."""

from __future__ import annotations

import textwrap

from specs.report.model import Report


def letter(report: Report, width: int = 78) -> str:
    """A letter with every question of a report, by antenna; empty when there is none."""
    parts: list[str] = []
    for antenna in report.antennas:
        questions = list(dict.fromkeys(f.question for f in antenna.findings if f.question))
        if not questions:
            continue
        parts.append(f"{antenna.label}\n")
        parts += [_numbered(i, q, width) for i, q in enumerate(questions, start=1)]
    if not parts:
        return ""
    head = textwrap.fill(
        f"We are reading your data sheet '{report.sheet.name}' and ask you to clear up the "
        "following before we order.",
        width,
    )
    return f"Dear Sir or Madam,\n\n{head}\n\n" + "\n".join(parts) + "\nKind regards\n"


def _numbered(index: int, question: str, width: int) -> str:
    lead = f"{index}. "
    return textwrap.fill(
        question, width, initial_indent=lead, subsequent_indent=" " * len(lead)
    ) + "\n"  # fmt: skip
