"""Settings, and where the server is willing to listen."""

from __future__ import annotations

import json
import os
import signal
import socket
import subprocess
import sys
import time
import urllib.request

import pytest

from service.server import OpenToOthers, serve
from service.settings import Settings, SettingsError, from_environment


def test_without_variables_it_is_loopback_only() -> None:
    assert from_environment({}).is_loopback


def test_variables_and_overrides() -> None:
    variables = {"BEAMPROOF_PORT": "9000", "BEAMPROOF_TRUSTED_HOSTS": "a.example, b.example"}
    made = from_environment(
        variables | {"BEAMPROOF_OTHER": "x", "PORT": "1"}, host="::1", port=None
    )
    assert (made.port, made.host) == (9000, "::1")
    assert made.trusted_hosts == ("a.example", "b.example")
    assert made.address == "http://[::1]:9000/"


@pytest.mark.parametrize(
    ("name", "value", "words"),
    [
        ("PORT", "eighty", "valid integer"),
        ("PORT", "0", "greater than or equal to 1"),
        ("PORT", "70000", "less than or equal to 65535"),
        ("READERS", "-1", "greater than or equal to 1"),
        ("SHEET_BYTES", "20 MB", "valid integer"),
        ("READING_SECONDS", "nan", "less than or equal to 600"),
        ("HOST", "", "at least 1 character"),
    ],
)
def test_a_bad_value_is_named_with_what_is_allowed(name: str, value: str, words: str) -> None:
    with pytest.raises(SettingsError) as error:
        from_environment({f"BEAMPROOF_{name}": value})
    assert f"BEAMPROOF_{name}" in str(error.value)
    assert words in str(error.value)


@pytest.mark.parametrize(
    ("host", "loopback"),
    [
        ("127.0.0.1", True), ("127.8.8.8", True), ("::1", True), ("[::1]", True),
        ("localhost", True), ("0.0.0.0", False), ("::", False), ("192.0.2.1", False),
        ("example.org", False), ("localhost.example", False), ("*", False),
    ],
)  # fmt: skip
def test_what_is_loopback(host: str, loopback: bool) -> None:
    assert Settings(host=host).is_loopback is loopback


@pytest.mark.parametrize("host", ["0.0.0.0", "::", "192.0.2.1", "example.org"])
def test_it_does_not_listen_to_others(host: str) -> None:
    with pytest.raises(OpenToOthers, match="no accounts"):
        serve(Settings(host=host))


def _free_port() -> int:
    with socket.socket() as one:
        one.bind(("127.0.0.1", 0))
        return int(one.getsockname()[1])


def _start(**variables: str) -> subprocess.Popen[str]:
    return subprocess.Popen(
        [sys.executable, "-m", "service.server"],
        env={**os.environ, **variables},
        stderr=subprocess.PIPE,
        text=True,
    )


def test_a_real_server_answers_and_stops_when_told() -> None:
    port = _free_port()
    with _start(BEAMPROOF_PORT=str(port)) as server:
        assert server.stderr is not None
        try:
            while "listens" not in (line := server.stderr.readline()):
                assert line, "the server ended without listening"
            with urllib.request.urlopen(f"http://127.0.0.1:{port}/readyz", timeout=30) as answer:
                assert json.load(answer) == {"status": "ready"}
                assert answer.headers["Server"] in (None, "")
        finally:
            server.send_signal(signal.SIGTERM)
            began = time.monotonic()
            server.communicate(timeout=20)
    assert server.returncode == 0
    assert time.monotonic() - began < 10


@pytest.mark.parametrize(
    ("variables", "code", "words"),
    [
        ({"BEAMPROOF_HOST": "0.0.0.0"}, 64, "no accounts"),
        ({"BEAMPROOF_PORT": "x"}, 64, "BEAMPROOF_PORT"),
    ],
)
def test_it_ends_with_a_clear_message(variables: dict[str, str], code: int, words: str) -> None:
    with _start(**variables) as server:
        _, told = server.communicate(timeout=30)
    assert server.returncode == code
    assert words in told
    assert "Traceback" not in told
