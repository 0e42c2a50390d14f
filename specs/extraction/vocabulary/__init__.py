"""The words of sheets, as data: head words, foreign labels, modifiers."""

from __future__ import annotations

import re
import tomllib
from collections import defaultdict
from dataclasses import dataclass
from functools import cache
from importlib.resources import files


@dataclass(frozen=True, slots=True)
class Tag:
    """What a phrase means in a label: a group ('quantity', 'plane', 'foreign' ...) and a name."""

    group: str
    name: str


@dataclass(frozen=True, slots=True)
class Phrase:
    """A known phrase found in a text: its tags and where it ends."""

    text: str
    tags: tuple[Tag, ...]
    end: int


_FIRST = re.compile(r"[^\W_]+|.", re.DOTALL)


def _load(name: str) -> dict[str, dict[str, list[str]]]:
    source = files("specs.extraction.vocabulary").joinpath(name).read_text("utf-8")
    return tomllib.loads(source)


@cache
def tagged_phrases() -> dict[str, tuple[Tag, ...]]:
    """Every known phrase with its tags."""
    tags: dict[str, list[Tag]] = defaultdict(list)
    for quantity, entry in _load("quantities.toml").items():
        for phrase in entry["heads"]:
            tags[phrase].append(Tag("quantity", quantity))
    foreign = tomllib.loads(
        files("specs.extraction.vocabulary").joinpath("foreign.toml").read_text("utf-8")
    )
    for phrase in foreign["heads"]:
        tags[phrase].append(Tag("foreign", "foreign"))
    for phrase in foreign["amplifier"]["heads"]:
        tags[phrase].append(Tag("amplifier", "amplifier"))
    for group, entries in _load("modifiers.toml").items():
        for name, phrases in entries.items():
            for phrase in phrases:
                tags[phrase].append(Tag(group, name))
    return {phrase: tuple(found) for phrase, found in tags.items()}


@cache
def _by_first() -> dict[str, list[str]]:
    index: dict[str, list[str]] = defaultdict(list)
    for phrase in tagged_phrases():
        index[_key(phrase, 0)].append(phrase)
    for phrases in index.values():
        phrases.sort(key=len, reverse=True)
    return dict(index)


def _ideographic(char: str) -> bool:
    return ord(char) >= 0x2E80


def _key(text: str, at: int) -> str:
    if _ideographic(text[at]):
        return text[at]
    word = _FIRST.match(text, at)
    assert word is not None
    run = word[0]
    for index, char in enumerate(run):
        if _ideographic(char):
            return run[:index]
    return run


def phrase_at(lowered: str, at: int) -> Phrase | None:
    """The longest known phrase that starts at a place in a folded, lower-case text."""
    for phrase in _by_first().get(_key(lowered, at), ()):
        if lowered.startswith(phrase, at):
            end = at + len(phrase)
            if end < len(lowered) and _runs_on(phrase[-1], lowered[end]):
                continue
            return Phrase(phrase, tagged_phrases()[phrase], end)
    return None


def _runs_on(last: str, following: str) -> bool:
    """Whether a letter follows a letter of the same kind of script: the word is not over."""
    return (
        last.isalpha()
        and following.isalpha()
        and not _ideographic(last)
        and not _ideographic(following)
    )


@cache
def long_heads() -> dict[str, tuple[Tag, ...]]:
    """Heads of six letters or more: the only ones that a misspelt label may be held against."""
    return {
        phrase: tags
        for phrase, tags in tagged_phrases().items()
        if len(phrase) >= 6
        and not _ideographic(phrase[0])
        and any(t.group in ("quantity", "foreign", "amplifier") for t in tags)
    }
