"""Type and traits of an antenna, inferred from words. The words are data (``types.toml``)."""

from __future__ import annotations

import re
import tomllib
from collections.abc import Iterable
from functools import cache
from importlib.resources import files

from specs.claims.claim import Claim
from specs.claims.quantity import Plane, Quantity
from specs.claims.types import AntennaType, Trait
from specs.units.glyphs import fold


@cache
def _words() -> dict[str, list[tuple[str, re.Pattern[str]]]]:
    data = tomllib.loads(files("specs.claims").joinpath("types.toml").read_text("utf-8"))
    return {
        group: [(name, _any_of(words)) for name, words in entries.items()]
        for group, entries in data.items()
    }


def _any_of(words: Iterable[str]) -> re.Pattern[str]:
    parts = [(r"(?<![a-z])" if w[0].isascii() else "") + re.escape(w) for w in words]
    return re.compile("|".join(parts))


def antenna_type(text: str) -> str | None:
    """The type of antenna that a text names, the most telling word first; None if it names none.

    >>> antenna_type("5.8 GHz sector panel, 90°")
    'sector panel'
    """
    folded = fold(text).lower() + " "
    for name, pattern in _words()["types"]:
        if pattern.search(folded):
            return AntennaType(name).value
    return None


def traits_of(text: str, claims: Iterable[Claim]) -> frozenset[str]:
    """The plain facts that words and claims give away about an antenna."""
    folded = fold(text).lower()
    traits = {name for name, pattern in _words()["traits"] if pattern.search(folded)}
    for claim in claims:
        if claim.quantity is Quantity.POLARIZATION:
            traits |= _polarization_traits(claim)
        if (
            claim.quantity is Quantity.BEAMWIDTH
            and claim.plane in (Plane.AZIMUTH, Plane.H)
            and claim.normalized.nominal >= 359
        ):
            traits.add(Trait.OMNIDIRECTIONAL.value)
        if claim.stated.unit == "dBic":
            traits.add(Trait.CIRCULAR.value)
    return frozenset(traits)


def _polarization_traits(claim: Claim) -> set[str]:
    words = fold(claim.stated.text).lower()
    found = set()
    for name in (Trait.CIRCULAR.value, Trait.LINEAR.value):
        pattern = dict(_words()["polarization"])[name]
        if pattern.search(words):
            found.add(name)
    return found
