"""Claims given as JSON (``beamproof.claims/1``), for workflows that already have the figures."""

from __future__ import annotations

import json
from typing import Annotated, Any, Literal

from pydantic import BaseModel, ConfigDict, Field, ValidationError, model_validator

from specs.claims.claim import Antenna, Claim, Evidence, Sheet, Stated
from specs.claims.normalize import DEFAULT_UNIT, normalize, stated_from
from specs.claims.quantity import Plane, Quantity, Statistic
from specs.claims.traits import antenna_type, traits_of
from specs.errors import ClaimsError, UnitsError
from specs.units.figures import Figure, Relation, find_figures, read_figure
from specs.units.glyphs import fold
from specs.units.numerals import numeral
from specs.units.spellings import unit_of

Number = Annotated[float, Field(allow_inf_nan=False)]
Pair = Annotated[list[Number], Field(min_length=2, max_length=2)]


class _Strict(BaseModel):
    model_config = ConfigDict(extra="forbid", frozen=True, allow_inf_nan=False)


class GivenClaim(_Strict):
    """One claim: either ``text`` as a sheet would print it, or ``value`` with ``unit``."""

    quantity: Quantity
    text: Annotated[str, Field(max_length=500)] | None = None
    value: Number | Pair | None = None
    unit: Annotated[str, Field(max_length=40)] | None = None
    statistic: Statistic | None = None
    plane: Plane | None = None
    band_mhz: Pair | None = None
    port: Annotated[str, Field(max_length=80)] | None = None
    kind: Annotated[str, Field(max_length=80)] | None = None
    dimension: Literal["length", "width", "height", "diameter", "depth"] | None = None
    tolerance: Annotated[float, Field(ge=0, allow_inf_nan=False)] | None = None
    relation: Relation | None = None

    @model_validator(mode="after")
    def _one_form(self) -> GivenClaim:
        if (self.text is None) == (self.value is None):
            raise ValueError("give either 'text' or 'value' with 'unit'")
        return self


class GivenAntenna(_Strict):
    """One antenna: its label, its type in words, its claims."""

    label: Annotated[str, Field(min_length=1, max_length=200)]
    type: Annotated[str, Field(max_length=100)] | None = None
    claims: Annotated[list[GivenClaim], Field(max_length=2000)]


class GivenClaims(_Strict):
    """The body of ``beamproof.claims/1``."""

    # The field is called 'schema' in JSON, which pydantic keeps for itself.
    schema_: Literal["beamproof.claims/1"] = Field(alias="schema")
    antennas: Annotated[list[GivenAntenna], Field(min_length=1, max_length=1000)]


def sheet_from_claims(given: str | bytes | dict[str, Any], name: str, sha256: str) -> Sheet:
    """The sheet that a claims document states.

    Raises ``ClaimsError`` with every fault and its place when the document is malformed, or a
    claim cannot be read: a figure is never dropped in silence.
    """
    try:
        if isinstance(given, dict):
            document = GivenClaims.model_validate(given)
        else:
            document = GivenClaims.model_validate_json(given)
    except ValidationError as error:
        faults = json.loads(error.json(include_url=False, include_input=False))
        places = "; ".join(f"{_place(f['loc'])}: {f['msg']}" for f in faults[:10])
        raise ClaimsError(f"The claims are malformed: {places}.") from error
    return Sheet(
        name=name,
        sha256=sha256,
        media_type="application/json",
        pages=0,
        antennas=tuple(_antenna(a, i) for i, a in enumerate(document.antennas)),
        read_by="given",
    )


def _place(location: list[str | int]) -> str:
    return "/" + "/".join(str(part) for part in location)


def antenna_from_claims(given: dict[str, Any]) -> Antenna:
    """One antenna of a claims document, for tests and callers that hold a single one."""
    return _antenna(GivenAntenna.model_validate(given), 0)


def _antenna(given: GivenAntenna, index: int) -> Antenna:
    claims = []
    for number, item in enumerate(given.claims, start=1):
        try:
            claims.append(_claim(item, f"c{number}"))
        except UnitsError as error:
            place = f"/antennas/{index}/claims/{number - 1}"
            raise ClaimsError(f"{place}: {error.message}", error.advice or None) from error
    found = antenna_type(given.type or "")
    return Antenna(
        label=given.label,
        claims=tuple(claims),
        type=found or given.type,
        traits=traits_of(given.type or "", tuple(claims)),
    )


_STATISTIC_OF = {
    "maximum": Statistic.MAXIMUM,
    "minimum": Statistic.MINIMUM,
    "typical": Statistic.TYPICAL,
    "average": Statistic.AVERAGE,
    "nominal": Statistic.NOMINAL,
    "peak": Statistic.PEAK,
}


def _claim(given: GivenClaim, claim_id: str) -> Claim:
    qualifier: str | None = None
    if given.quantity is Quantity.POLARIZATION:
        stated = Stated(given.text or str(given.value), 0.0, 0.0, Relation.EQUAL, None, "")
    else:
        figure = _figure_from_text(given) if given.text is not None else _figure_from_value(given)
        qualifier = figure.qualifier
        stated = stated_from(figure, DEFAULT_UNIT.get(given.quantity))
    statistic = given.statistic or _STATISTIC_OF.get(qualifier or "")
    low, high = given.band_mhz or (None, None)
    text = given.text or f"{given.value} {given.unit or ''}".strip()
    return Claim(
        id=claim_id,
        quantity=given.quantity,
        stated=stated,
        normalized=normalize(given.quantity, stated, statistic),
        statistic=statistic,
        plane=given.plane,
        port=given.port,
        kind=given.dimension or given.kind,
        band_mhz=None if low is None or high is None else (low, high),
        evidence=(Evidence(0, (0.0, 0.0, 0.0, 0.0), text),),
    )


def _figure_from_text(given: GivenClaim) -> Figure:
    text = given.text or ""
    if given.quantity is Quantity.FREQUENCY and len(find_figures(fold(text))) > 1:
        raise ClaimsError(f"'{text}' names several bands.", "Give one frequency claim for each.")
    return read_figure(text)


def _figure_from_value(given: GivenClaim) -> Figure:
    assert given.value is not None
    ends = given.value if isinstance(given.value, list) else [given.value, given.value]
    steps = [numeral(_printed(abs(end))).half_step for end in ends]
    is_range = isinstance(given.value, list) and ends[0] != ends[1]
    relation = given.relation or (Relation.RANGE if is_range else Relation.EQUAL)
    unit = unit_of(given.unit) if given.unit and given.unit != "x" else (given.unit or "")
    return Figure(
        text=f"{'-'.join(_signed(e) for e in dict.fromkeys(ends))} {given.unit or ''}".strip(),
        low=min(ends),
        high=max(ends),
        relation=relation,
        tolerance=given.tolerance,
        unit=unit,
        half_step=max(steps),
    )


def _printed(value: float) -> str:
    """The digits a person would print: 65 for 65.0, 16.25 for 16.25."""
    return f"{value:.12g}" if "e" not in f"{value:.12g}" else f"{value:f}"


def _signed(value: float) -> str:
    return f"{'-' if value < 0 else ''}{_printed(abs(value))}"
