"""Requests a second of the claims endpoint, as a ratio to a bare Flask JSON echo.

Both run in processes of their own on the same server and answer one connection that is kept open;
their batches take turns, so that a busy machine slows both. Run with ``--benchmark-only``.
"""

from __future__ import annotations

import http.client
import json
import subprocess
import sys
import time
from collections.abc import Iterator
from contextlib import contextmanager
from statistics import median

from pytest_benchmark.fixture import BenchmarkFixture

from service.api.validations import EXAMPLE

TARGET = 0.5
REACHED = 0.2
"""The target is half of the echo; this is the floor below which it must not fall again."""
BATCHES, REQUESTS = 9, 60

_SERVE = """
from waitress.server import create_server
server = create_server(app, host="127.0.0.1", port=0, threads=4)
print(server.effective_port, flush=True)
server.run()
"""
_ECHO = """
from flask import Flask, request
app = Flask("echo")
@app.post("/api/v1/validations")
def echo():
    return request.get_json()
"""
_OURS = """
from service.app import create_app
app = create_app()
"""


@contextmanager
def connection(made_by: str) -> Iterator[http.client.HTTPConnection]:
    code = made_by + _SERVE
    with subprocess.Popen([sys.executable, "-c", code], stdout=subprocess.PIPE, text=True) as child:
        assert child.stdout is not None
        one = http.client.HTTPConnection("127.0.0.1", int(child.stdout.readline()), timeout=20)
        try:
            yield one
        finally:
            one.close()
            child.kill()


def batch(one: http.client.HTTPConnection, body: bytes) -> float:
    """Seconds for a request."""
    began = time.perf_counter()
    for _ in range(REQUESTS):
        one.request("POST", "/api/v1/validations", body, {"Content-Type": "application/json"})
        answer = one.getresponse()
        assert answer.read()
        assert answer.status == 200
    return (time.perf_counter() - began) / REQUESTS


def test_claims_are_judged_nearly_as_fast_as_they_are_echoed(benchmark: BenchmarkFixture) -> None:
    body = json.dumps(EXAMPLE).encode()
    with connection(_ECHO) as echo, connection(_OURS) as ours:
        batch(echo, body), batch(ours, body)  # both warm
        pairs = [(batch(echo, body), batch(ours, body)) for _ in range(BATCHES)]
        benchmark.pedantic(batch, args=(ours, body), rounds=1, iterations=1)
    ratio = median(bare / judged for bare, judged in pairs)
    benchmark.extra_info["ratio to a bare echo"] = round(ratio, 3)
    print(
        f"\necho {1 / min(e for e, _ in pairs):.0f}/s, claims {1 / min(o for _, o in pairs):.0f}/s,"
        f" ratio {ratio:.2f} (target {TARGET})"
    )
    assert ratio >= REACHED
