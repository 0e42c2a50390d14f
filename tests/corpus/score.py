"""Scores reading and extraction on forged sheets.

``python -m tests.corpus.score --split tuning --limit 300``; ``--family NAME`` for one family,
``--show-misses N``, ``--write DIR`` to keep the sheets with their truth.
"""

# ruff: noqa: E501  (pools of words and printed markup read best on one line)
from __future__ import annotations

import argparse
import time
from collections import Counter, defaultdict
from collections.abc import Callable, Iterable
from dataclasses import dataclass, field
from pathlib import Path
from typing import Any

from fixtures.forge.store import sheets
from fixtures.forge.truth import Fact, Forged
from tests.corpus.match import Got, got, same, same_antenna, same_band, same_value

Reader = Callable[[bytes, str], Any]


@dataclass(slots=True)
class Tally:
    """Right, missed and extra claims of one group."""

    right: int = 0
    missed: int = 0
    extra: int = 0

    @property
    def precision(self) -> float:
        """Share of what was read that is true."""
        return self.right / (self.right + self.extra) if self.right + self.extra else 1.0

    @property
    def recall(self) -> float:
        """Share of what is true that was read."""
        return self.right / (self.right + self.missed) if self.right + self.missed else 1.0

    @property
    def f1(self) -> float:
        """Harmonic mean of both."""
        total = 2 * self.right + self.missed + self.extra
        return 2 * self.right / total if total else 1.0


@dataclass(frozen=True, slots=True)
class Fault:
    """One miss or invention: sheet, kind, quantity, why and the source text."""

    sheet: str
    kind: str
    quantity: str
    why: str
    text: str


@dataclass(slots=True)
class Result:
    """Tallies by level and group, and every fault."""

    tallies: dict[int, dict[str, Tally]] = field(
        default_factory=lambda: {n: defaultdict(Tally) for n in (1, 2, 3)}
    )
    faults: list[Fault] = field(default_factory=list)
    traps: int = 0
    sprung: Counter[str] = field(default_factory=Counter)
    failed: list[str] = field(default_factory=list)
    perfect: int = 0
    sheets: int = 0
    relation_right: int = 0
    statistic_right: int = 0
    matched: int = 0
    seconds: float = 0.0
    by_sheet: list[float] = field(default_factory=list)
    reliability: dict[int, list[bool]] = field(default_factory=lambda: defaultdict(list))


def _unique(items: Iterable[Any], key: Callable[[Any], Any]) -> list[Any]:
    seen: dict[Any, Any] = {}
    for item in items:
        seen.setdefault(key(item), item)
    return list(seen.values())


def _fact_key(level: int) -> Callable[[Fact], Any]:
    def key(f: Fact) -> Any:
        base: tuple[Any, ...] = (f.quantity, round(f.low, 3), round(f.high, 3), f.unit)
        if level >= 2:
            base += (None if f.quantity == "frequency" else f.band_mhz, f.plane)
        if level >= 3:
            base += (f.antenna,)
        return base

    return key


def _got_key(level: int) -> Callable[[Got], Any]:
    def key(g: Got) -> Any:
        base: tuple[Any, ...] = g.value
        if level >= 2:
            base += (None if g.quantity == "frequency" else g.band, g.plane)
        if level >= 3:
            base += (g.antenna,)
        return base

    return key


def _match(
    claims: list[Got], facts: list[Fact], level: int
) -> tuple[list[tuple[Got, Fact]], list[Fact], list[Got]]:
    """Pairs, missed facts, extra claims; each claim and fact is used once (maximum matching)."""
    claims = _unique(claims, _got_key(level))
    must = _unique([f for f in facts if not f.optional], _fact_key(level))
    edges = [[i for i, c in enumerate(claims) if same(c, f, level)] for f in must]
    owner: dict[int, int] = {}

    def settle(fact: int, seen: set[int]) -> bool:
        for i in edges[fact]:
            if i not in seen:
                seen.add(i)
                if i not in owner or settle(owner[i], seen):
                    owner[i] = fact
                    return True
        return False

    for n in range(len(must)):
        settle(n, set())
    found = {n: i for i, n in owner.items()}
    pairs = [(claims[i], must[n]) for n, i in found.items()]
    missed = [f for n, f in enumerate(must) if n not in found]
    free = [f for f in facts if f.optional]
    extra = [
        c
        for i, c in enumerate(claims)
        if i not in owner
        # A claim that says a found fact once more (with the single band, or for one model) is
        # neither right again nor wrong.
        and not any(same(c, f, level) for f in free)
        and not any(same(c, f, level) for f in must)
    ]
    return pairs, missed, extra


def _groups(sheet: Forged, quantity: str) -> list[str]:
    return ["all", f"q:{quantity}", f"f:{sheet.family}", f"p:{sheet.producer}",
            *(f"h:{p}" for p in sheet.phenomena)]  # fmt: skip


def _why_missed(f: Fact, claims: list[Got], unread: str) -> str:
    alike = [c for c in claims if same_value(c, f)]
    if alike:
        c = alike[0]
        parts = []
        if not any(same_band(c, f) for c in alike):
            parts.append(f"band {c.band} for {f.band_mhz}")
        if not any(c.plane == f.plane for c in alike):
            parts.append(f"plane {c.plane} for {f.plane}")
        if not parts and not any(same_antenna(c, f) for c in alike):
            parts.append(f"antenna {c.antenna!r} for {f.antenna!r}")
        return ", ".join(parts) or "band and plane not together"
    for c in claims:
        if c.quantity == f.quantity and abs(c.low - f.low) < 0.01 and abs(c.high - f.high) < 0.01:
            return f"unit {c.unit!r} for {f.unit!r}"
    return "in unread" if f.text and f.text[-12:] in unread else "not found"


def score(
    forged: Iterable[Forged],
    read: Reader,
    level_shown: int = 2,
    note: Callable[[Forged], None] | None = None,
) -> Result:
    """Reads every sheet and compares with its truth."""
    result = Result()
    for sheet in forged:
        if note:
            note(sheet)
        result.sheets += 1
        result.traps += len(sheet.traps)
        started = time.perf_counter()
        try:
            seen = read(sheet.data, sheet.name)
            claims, unread = got(seen), " ".join(u.text for u in seen.unread)
        except Exception as error:
            result.failed.append(f"{sheet.name}: {type(error).__name__}: {error}")
            claims, unread = [], ""
        result.seconds += time.perf_counter() - started
        facts = list(sheet.facts)
        clean = True
        for level in (1, 2, 3):
            pairs, missed, extra = _match(claims, facts, level)
            for kind, quantities in (
                ("right", [f.quantity for _, f in pairs]),
                ("missed", [f.quantity for f in missed]),
                ("extra", [c.quantity for c in extra]),
            ):
                for quantity in quantities:
                    for group in _groups(sheet, quantity):
                        tally = result.tallies[level][group]
                        setattr(tally, kind, getattr(tally, kind) + 1)
            if level == 2:
                whole = 2 * len(pairs) + len(missed) + len(extra)
                result.by_sheet.append(2 * len(pairs) / whole if whole else 1.0)
                result.matched += len(pairs)
                result.relation_right += sum(c.relation == f.relation for c, f in pairs)
                result.statistic_right += sum(c.statistic == f.statistic for c, f in pairs)
                wrong = {id(c) for c in extra}
                for c in claims:
                    result.reliability[min(9, int(c.confidence * 10))].append(id(c) not in wrong)
            if level != level_shown:
                continue
            clean = not missed and not extra
            for f in missed:
                why = _why_missed(f, claims, unread)
                shown = f"{f.low:g}..{f.high:g} {f.unit}"
                result.faults.append(
                    Fault(sheet.name, "missed", f.quantity, why, f"{shown} <- {f.text}")
                )
            for c in extra:
                trap = next((t for t in sheet.traps if same_value(c, t)), None)
                if trap:
                    result.sprung[trap.kind] += 1
                    why = f"trap {trap.kind}"
                elif any(same_value(c, f) for f in facts):
                    why = f"wrong band or plane: {c.band} {c.plane} {c.antenna!r}"
                else:
                    why = "invented"
                shown = f"{c.low:g}..{c.high:g} {c.unit}"
                result.faults.append(
                    Fault(sheet.name, "extra", c.quantity, why, f"{shown} <- {c.text}")
                )
        result.perfect += clean
    return result


def table(result: Result, prefixes: tuple[str, ...] = ("q:", "f:")) -> str:
    """A compact table: level 1 and 2 by quantity, family and what else is asked for."""
    lines = [
        f"{'':26}{'facts':>6} {'P1':>6}{'R1':>6}{'F1':>6}   {'P2':>6}{'R2':>6}{'F2':>6}   {'F3':>6}"
    ]

    def add(name: str, group: str) -> None:
        one, two, three = (result.tallies[n][group] for n in (1, 2, 3))
        lines.append(
            f"{name:26}{two.right + two.missed:6d} {one.precision:6.3f}{one.recall:6.3f}{one.f1:6.3f}"
            f"   {two.precision:6.3f}{two.recall:6.3f}{two.f1:6.3f}   {three.f1:6.3f}"
        )

    add("ALL", "all")
    for prefix in prefixes:
        names = sorted(g for g in result.tallies[2] | result.tallies[1] if g.startswith(prefix))
        if prefix != "q:":
            names.sort(key=lambda g: result.tallies[2][g].f1)
        lines.append("-" * 80)
        for group in names:
            add(group.removeprefix(prefix), group)
    invented = sum(f.kind == "extra" and not f.why.startswith("wrong band") for f in result.faults)
    springs = ", ".join(f"{k} {n}" for k, n in result.sprung.most_common()) or "none"
    m = max(1, result.matched)
    lines += [
        "-" * 80,
        f"sheets {result.sheets}, mean F2 of a sheet "
        f"{sum(result.by_sheet) / max(1, len(result.by_sheet)):.3f}, perfect {result.perfect}, failed {len(result.failed)}; "
        f"invented {invented}; traps sprung {result.sprung.total()} of {result.traps} ({springs}); "
        f"relation right {result.relation_right / m:.3f}, statistic right "
        f"{result.statistic_right / m:.3f}; product time {result.seconds:.1f} s",
    ]
    return "\n".join(lines)


def reliability(result: Result) -> str:
    """Share of right claims by stated confidence."""
    return "\n".join(
        f"confidence {b / 10:.1f}-{(b + 1) / 10:.1f}: {len(v):5d} claims, {sum(v) / len(v):.3f} right"
        for b, v in sorted(result.reliability.items())
    )


def _writer(into: Path) -> Callable[[Forged], None]:
    into.mkdir(parents=True, exist_ok=True)

    def write(sheet: Forged) -> None:
        (into / sheet.name).write_bytes(sheet.data)
        told = "\n".join(map(str, (*sheet.facts, *sheet.traps)))
        (into / f"{sheet.name}.truth").write_text(told + "\n", encoding="utf-8")

    return write


def main() -> None:
    """The command line."""
    options = argparse.ArgumentParser(description=__doc__)
    options.add_argument("--split", choices=("tuning", "heldout"), default="tuning")
    options.add_argument("--limit", type=int, default=300)
    options.add_argument("--family")
    options.add_argument("--show-misses", type=int, default=0, metavar="N")
    options.add_argument("--kind", choices=("missed", "extra"), help="show only these faults")
    options.add_argument("--quantity", help="show only faults of this quantity")
    options.add_argument("--phenomena", action="store_true", help="also by phenomenon and producer")
    options.add_argument("--reliability", action="store_true")
    options.add_argument("--level", type=int, choices=(1, 2, 3), default=2, help="of the faults")
    options.add_argument("--write", type=Path, metavar="DIR")
    chosen = options.parse_args()
    import specs

    read: Reader = specs.read_sheet
    note = _writer(chosen.write) if chosen.write else None
    result = score(sheets(chosen.split, chosen.limit, chosen.family), read, chosen.level, note)
    print(table(result, ("q:", "f:", "h:", "p:") if chosen.phenomena else ("q:", "f:")))
    if chosen.reliability:
        print(reliability(result))
    for line in result.failed[: max(5, chosen.show_misses)]:
        print("FAILED", line)
    shown = [
        f for f in result.faults
        if (chosen.kind in (None, f.kind)) and (chosen.quantity in (None, f.quantity))
    ]  # fmt: skip
    if chosen.split == "heldout" and chosen.show_misses:
        print("Faults of the held-out split are not shown: it must stay unseen.")
        return
    for f in shown[: chosen.show_misses]:
        print(f"{f.kind:6} {f.sheet:44} {f.quantity:13} {f.why:34} {f.text[:110]}")


if __name__ == "__main__":
    main()
