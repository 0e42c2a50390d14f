"""Settings of the service, from the environment, validated once at the start.

Every variable is the name of a field in capitals with the prefix ``BEAMPROOF_``:
``BEAMPROOF_PORT=8080``.
"""

from __future__ import annotations

import json
import os
from collections.abc import Mapping
from ipaddress import ip_address
from typing import Annotated, Any

from pydantic import BaseModel, ConfigDict, Field, ValidationError, field_validator

PREFIX = "BEAMPROOF_"


class SettingsError(Exception):
    """A setting is missing or has a value that cannot be used; the message names each one."""


class Settings(BaseModel):
    """What an operator can set. Sizes are bytes, times are seconds."""

    model_config = ConfigDict(frozen=True, extra="forbid")

    host: Annotated[str, Field(min_length=1, max_length=255)] = "127.0.0.1"
    """The address to listen on."""
    port: Annotated[int, Field(ge=1, le=65535)] = 8080
    """The port to listen on."""
    trusted_hosts: tuple[str, ...] = ("localhost", "127.0.0.1", "[::1]")
    """Host names that a request may be addressed to, separated by commas."""
    threads: Annotated[int, Field(ge=4, le=256)] = 12
    """Requests served at once."""
    readers: Annotated[int, Field(ge=1, le=64)] = 2
    """Warm child processes that read sheets."""
    sheet_bytes: Annotated[int, Field(ge=1_000, le=50_000_000)] = 20_000_000
    """The largest sheet accepted."""
    claims_bytes: Annotated[int, Field(ge=1_000, le=50_000_000)] = 2_000_000
    """The largest JSON body accepted."""
    text_bytes: Annotated[int, Field(ge=1_000, le=5_000_000)] = 1_000_000
    """The largest pasted text accepted."""
    form_bytes: Annotated[int, Field(ge=1_000, le=1_000_000_000)] = 100_000_000
    """The largest form accepted, all its files together."""
    files_at_once: Annotated[int, Field(ge=1, le=200)] = 40
    """Files accepted in one form."""
    reading_seconds: Annotated[float, Field(gt=0, le=600)] = 30.0
    """The longest that one sheet may take to read."""
    kept_reports: Annotated[int, Field(ge=1, le=10_000)] = 200
    """Reports kept in memory, the newest ones."""
    kept_bytes: Annotated[int, Field(ge=1_000_000, le=4_000_000_000)] = 200_000_000
    """Memory for kept sheets and reports."""

    @field_validator("trusted_hosts", mode="before")
    @classmethod
    def _listed(cls, value: Any) -> Any:
        if isinstance(value, str):
            return tuple(part.strip() for part in value.split(",") if part.strip())
        return value

    @property
    def is_loopback(self) -> bool:
        """Whether the address is reached from this machine only."""
        if self.host == "localhost":
            return True
        try:
            return ip_address(self.host.strip("[]")).is_loopback
        except ValueError:
            return False

    @property
    def address(self) -> str:
        """The address as a URL."""
        host = f"[{self.host}]" if ":" in self.host and "[" not in self.host else self.host
        return f"http://{host}:{self.port}/"


def from_environment(environment: Mapping[str, str] | None = None, **overrides: object) -> Settings:
    """The settings of an environment; ``overrides`` that are not None outrank it.

    Variables with the prefix that name no field are left alone: other parts may read them.
    Raises ``SettingsError`` that names every variable at fault, its value and what is allowed.

    >>> from_environment({"BEAMPROOF_PORT": "9000"}).port
    9000
    """
    environment = os.environ if environment is None else environment
    given: dict[str, object] = {
        name: environment[PREFIX + name.upper()]
        for name in Settings.model_fields
        if PREFIX + name.upper() in environment
    }
    given |= {name: value for name, value in overrides.items() if value is not None}
    try:
        return Settings.model_validate(given)
    except ValidationError as error:
        faults = json.loads(error.json(include_url=False))
        lines = [
            f"  {PREFIX}{str(fault['loc'][0]).upper()} is {fault['input']!r}: {fault['msg']}."
            for fault in faults
        ]
        raise SettingsError("\n".join(["These settings cannot be used:", *lines])) from error
