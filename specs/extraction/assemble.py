"""A document to a sheet: the one place that shows the whole way of extraction."""

from __future__ import annotations

from collections import defaultdict
from dataclasses import replace

from specs.claims import Antenna, Claim, Evidence, Quantity, Sheet, Stated, Trait, Unread
from specs.claims.normalize import DEFAULT_UNIT, normalize
from specs.claims.traits import antenna_type, traits_of
from specs.extraction.claims_of import Draft, Surroundings, read_record
from specs.extraction.confidence import USED_FROM, confidence
from specs.extraction.language import language_of
from specs.extraction.lines import segments
from specs.extraction.pairing import Pair, pairs
from specs.extraction.prose import Mention, mentions
from specs.extraction.records import Record, records
from specs.extraction.tables import boxes
from specs.extraction.titles import subject, title_size
from specs.reading.document import Document, Page


def extract(document: Document) -> Sheet:
    """All antennas and claims of a document, and what looked like a claim and could not be read."""
    antennas: list[Antenna] = []
    unread: list[Unread] = []
    whole_text: list[str] = []
    positioning = False
    loose: list[tuple[int, Mention]] = []
    for page in document.pages:
        read = _Page(page)
        whole_text.extend(b.text for b in read.boxes)
        positioning = positioning or Trait.POSITIONING in read.traits
        for position, record in enumerate(read.records):
            found = read_record(record, read.surroundings(positioning))
            unread.extend(found.unread)
            made = _antennas(record, found.drafts, read)
            if antennas and position == 0 and page.number > 1 and _goes_on(record):
                antennas[-1] = _continued(antennas[-1], made)
                made = made[1:]
            antennas.extend(made)
        loose.extend((page.number, m) for m in read.mentions())
    antennas = _joined(antennas)
    antennas = _with_mentions(antennas, loose, document)
    antennas, doubtful = _settle(antennas)
    return Sheet(
        name=document.name,
        sha256=document.sha256,
        media_type=document.media_type,
        pages=len(document.pages),
        antennas=tuple(antennas),
        language=language_of(" ".join(whole_text)),
        read_by=document.read_by,
        unread=tuple(_named(unread) + doubtful),
        notes=document.notes,
    )


class _Page:
    """One page taken apart: boxes, pairs, records."""

    def __init__(self, page: Page) -> None:
        self.page = page
        self.boxes = boxes(page, segments(page))
        self.pairs = pairs(self.boxes)
        self.records = records(page.number, self.pairs, self.boxes)
        self.names = _model_names(self.pairs)
        # Short texts give away facts that no claim holds, such as a noise figure.
        self.traits = traits_of(" ".join(b.text for b in self.boxes if len(b.text) < 60), ())
        self.subject, self.description = subject(self.boxes, page.height)

    def surroundings(self, positioning: bool) -> Surroundings:
        return Surroundings(
            page=self.page.number,
            boxes=self.boxes,
            names=self.names,
            used=self.values(),
            labels={id(p.box) for p in self.pairs if p.values},
            positioning=positioning,
            read_by=self.page.read_by,
        )

    def values(self) -> set[int]:
        """Identities of the boxes that are values of a label."""
        return {id(b) for p in self.pairs for v in p.values for b in v.boxes if not v.inline}

    def used(self) -> set[int]:
        """Identities of the boxes that pairs have used."""
        return self.values() | {id(p.box) for p in self.pairs}

    def mentions(self) -> list[Mention]:
        return mentions(self.boxes, self.used(), title_size(self.boxes))


def _model_names(found: list[Pair]) -> dict[int, str]:
    return {
        id(value.boxes[0]): value.boxes[0].printed.strip()
        for pair in found
        if pair.label.model
        for value in pair.values
        if not value.inline
    }


def _antennas(record: Record, drafts: list[Draft], page: _Page) -> list[Antenna]:
    """The antennas of a record: one, or one for each variant named in it."""
    if not drafts:
        return []
    names = list(dict.fromkeys(d.name for d in drafts if d.name))
    gains = {d.name for d in drafts if d.name and d.claim.quantity in _TELLING}
    variants = [n for n in names if n in gains] if len(gains) >= 2 else []
    if not variants:
        only = names[0] if len(names) == 1 else None
        label = record.name or _model_of(record) or only or page.subject
        return [_antenna(label, drafts, record, page)]
    return [
        _antenna(
            name, [d for d in drafts if d.name == name or d.name not in variants], record, page
        )
        for name in variants
    ]


_TELLING = frozenset({Quantity.GAIN, Quantity.FREQUENCY, Quantity.BEAMWIDTH})


def _model_of(record: Record) -> str | None:
    for row in record.rows:
        if row.pair.label.model and row.values and len(row.values) == 1:
            return row.values[0].text.strip()
    return None


def _antenna(label: str, drafts: list[Draft], record: Record, page: _Page) -> Antenna:
    claims = _merged(drafts)
    words = " ".join(
        [page.description, record.name or "", label]
        + [
            r.pair.label.text + " " + v.text
            for r in record.rows
            for v in r.values
            if len(v.text) < 60
        ]
    )
    found = antenna_type(page.description) or antenna_type(words)
    return Antenna(
        label=" ".join(label.split())[:120] or "antenna",
        claims=tuple(claims),
        type=found,
        type_inferred=found is not None,
        traits=traits_of(words, claims) | page.traits,
    )


def _goes_on(record: Record) -> bool:
    """Whether the first record of a page goes on with the antenna of the page before."""
    return record.name is None and not record.has(Quantity.FREQUENCY) and _model_of(record) is None


def _continued(antenna: Antenna, made: list[Antenna]) -> Antenna:
    """An antenna with the figures of the next page, which hold for its one band."""
    if not made:
        return antenna
    bands = {(c.normalized.low, c.normalized.high): c for c in antenna.claims
             if c.quantity is Quantity.FREQUENCY}  # fmt: skip
    only = next(iter(bands.values())) if len(bands) == 1 else None
    band = None
    if only is not None:
        scale = only.normalized.nominal / ((only.stated.low + only.stated.high) / 2)
        band = (only.stated.low * scale, only.stated.high * scale)
    more = [replace(c, band_mhz=c.band_mhz or band) for c in made[0].claims]
    return replace(antenna, claims=(*antenna.claims, *more), traits=antenna.traits | made[0].traits)


def _merged(drafts: list[Draft]) -> list[Claim]:
    """A figure repeated is more evidence, not a second claim."""
    merged: dict[tuple[object, ...], tuple[Claim, frozenset[str]]] = {}
    for draft in drafts:
        claim = draft.claim
        key = _key(claim)
        if key in merged:
            known, facts = merged[key]
            evidence = known.evidence + tuple(e for e in claim.evidence if e not in known.evidence)
            facts = facts | {"repeated"} if len(evidence) > len(known.evidence) else facts
            merged[key] = (
                replace(known, evidence=evidence, confidence=confidence(facts)),
                facts,
            )
        else:
            merged[key] = (claim, draft.facts)
    return [claim for claim, _ in merged.values()]


def _key(claim: Claim) -> tuple[object, ...]:
    stated = claim.stated
    text = stated.text if claim.quantity is Quantity.POLARIZATION else ""
    return (claim.quantity, claim.plane, claim.band_mhz, claim.kind, stated.low, stated.high,
            stated.unit, claim.statistic, text)  # fmt: skip


def _joined(antennas: list[Antenna]) -> list[Antenna]:
    """Antennas of one name on several pages are one antenna."""
    by_label: dict[str, Antenna] = {}
    for antenna in antennas:
        known = by_label.get(antenna.label)
        if known is None:
            by_label[antenna.label] = antenna
            continue
        drafts = [Draft(c, None, frozenset({"labelled", "usual range"})) for c in
                  (*known.claims, *antenna.claims)]  # fmt: skip
        by_label[antenna.label] = replace(
            known, claims=tuple(_merged(drafts)), traits=known.traits | antenna.traits
        )
    return list(by_label.values())


def _with_mentions(
    antennas: list[Antenna], loose: list[tuple[int, Mention]], document: Document
) -> list[Antenna]:
    """Figures of titles go to the headline; those of prose fill what no label states.

    A mention that repeats a claim is one more evidence of it. With several antennas on a sheet,
    running text cannot be tied to one of them.
    """
    if len(antennas) > 1:
        return antennas
    if not antennas:
        prose = [_mentioned(page, m) for page, m in loose if m.reading.unit]
        label = document.title or document.name
        return [Antenna(label, tuple(_merged(prose)))] if prose else []
    antenna = antennas[0]
    claims = list(antenna.claims)
    headline: list[Claim] = []
    for page, mention in loose:
        draft = _mentioned(page, mention)
        index = next((i for i, c in enumerate(claims) if _says_same(c, draft.claim)), None)
        if index is not None:
            known = claims[index]
            claims[index] = replace(known, evidence=known.evidence + draft.claim.evidence)
        elif mention.title:
            headline.append(draft.claim)
        elif not any(_rivals(c, draft.claim) for c in claims):
            claims.append(draft.claim)
    return [replace(antenna, claims=tuple(claims), headline=tuple(headline))]


def _mentioned(page: int, mention: Mention) -> Draft:
    reading = mention.reading
    stated = Stated(
        text=mention.box.printed,
        low=reading.figure.low,
        high=reading.figure.high,
        relation=reading.relation,
        tolerance=reading.figure.tolerance,
        unit=reading.unit or DEFAULT_UNIT.get(reading.quantity, ""),
        half_step=reading.figure.half_step,
    )
    facts = frozenset({"from prose", "usual range", "unit printed"})
    claim = Claim(
        id="",
        quantity=reading.quantity,
        stated=stated,
        normalized=normalize(reading.quantity, stated, reading.statistic),
        statistic=reading.statistic,
        plane=reading.plane,
        evidence=(Evidence(page, mention.box.text_box, mention.box.printed),),
        confidence=confidence(facts),
    )
    return Draft(claim, None, facts)


def _says_same(a: Claim, b: Claim) -> bool:
    """Same quantity and figure, in the same plane as far as both say."""
    return (
        a.quantity is b.quantity
        and abs(a.normalized.nominal - b.normalized.nominal) < 1e-6
        and (a.plane is b.plane or a.plane is None or b.plane is None)
    )


def _rivals(a: Claim, b: Claim) -> bool:
    """Both state the quantity, in the same plane."""
    return a.quantity is b.quantity and (a.plane is b.plane or b.plane is None)


def _settle(antennas: list[Antenna]) -> tuple[list[Antenna], list[Unread]]:
    """Number the claims; those too unsure to use become unread candidates."""
    settled: list[Antenna] = []
    doubtful: list[Unread] = []
    count = 0
    for antenna in antennas:
        kept: list[Claim] = []
        for claim in antenna.claims:
            if claim.confidence < USED_FROM:
                place = claim.evidence[0]
                doubtful.append(
                    Unread(
                        place.text,
                        "low-confidence",
                        place.page,
                        place.bbox,
                        claim.quantity,
                        antenna.label,
                    )
                )
                continue
            count += 1
            kept.append(replace(claim, id=f"c{count}"))
        if kept:
            settled.append(replace(antenna, claims=tuple(kept)))
    return settled, doubtful


def _named(unread: list[Unread]) -> list[Unread]:
    seen: dict[tuple[object, ...], Unread] = defaultdict()
    for item in unread:
        seen.setdefault((item.text, item.page, item.bbox), item)
    return list(seen.values())
