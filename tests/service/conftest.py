from __future__ import annotations

from collections.abc import Iterator
from io import BytesIO
from pathlib import Path
from typing import Any

import pytest
from flask import Flask
from flask.testing import FlaskClient
from werkzeug.test import TestResponse

from service.app import create_app
from service.checking import desk
from service.settings import Settings

SHEETS = Path(__file__).parents[2] / "fixtures" / "sheets"


class Buffered(FlaskClient):
    """Takes every answer whole, so that no file stays open."""

    def open(self, *args: Any, **kwargs: Any) -> TestResponse:
        return super().open(*args, **({"buffered": True} | kwargs))


@pytest.fixture(scope="session")
def app() -> Iterator[Flask]:
    made = create_app(Settings(sheet_bytes=300_000, claims_bytes=50_000, text_bytes=20_000))
    made.test_client_class = Buffered
    yield made
    desk(made).close()


@pytest.fixture
def client(app: Flask) -> FlaskClient:
    return app.test_client()


@pytest.fixture(scope="session")
def panel() -> bytes:
    """A sheet that overclaims: its verdict is hold."""
    return (SHEETS / "of-5800-17-sector-panel.pdf").read_bytes()


@pytest.fixture(scope="session")
def honest() -> bytes:
    """A sheet that is released."""
    return (SHEETS / "ka-s24-65-sector.pdf").read_bytes()


class Sender:
    """Sends sheets to the API and to the form."""

    def __init__(self, client: FlaskClient) -> None:
        self.client = client

    def sheet(self, data: bytes, name: str = "sheet.pdf") -> TestResponse:
        return self.client.post("/api/v1/sheets", data={"file": (BytesIO(data), name)})

    def form(self, *files: tuple[bytes, str], text: str = "", to: str = "/check") -> TestResponse:
        sent = [(BytesIO(data), name) for data, name in files]
        return self.client.post(
            to, data={"file": sent, "text": text}, headers={"Accept": "text/html"}
        )


@pytest.fixture
def send(client: FlaskClient) -> Sender:
    return Sender(client)
