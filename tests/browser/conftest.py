"""A real browser before a real server. Without Chromium these tests are skipped, unless all are
required (``BEAMPROOF_REQUIRE_ALL=1``)."""

from __future__ import annotations

import os
import shutil
import threading
from collections.abc import Iterator
from pathlib import Path

import pytest
from playwright.sync_api import Browser, BrowserContext, Page, Request, sync_playwright
from waitress.server import create_server

from service.app import create_app
from service.checking import desk
from service.settings import Settings

SHEETS = Path(__file__).parents[2] / "fixtures" / "sheets"
ARGUMENTS = [
    "--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run",
    "--disable-background-networking", "--disable-component-update", "--disable-sync",
]  # fmt: skip


@pytest.fixture(scope="session")
def browser() -> Iterator[Browser]:
    chromium = shutil.which("chromium")
    if chromium is None:
        if os.environ.get("BEAMPROOF_REQUIRE_ALL") == "1":
            pytest.fail("Chromium is not installed, and every test is required.")
        pytest.skip("Chromium is not installed: the browser tests need Debian's package.")
    with sync_playwright() as playwright:
        opened = playwright.chromium.launch(executable_path=chromium, args=ARGUMENTS)
        yield opened
        opened.close()


@pytest.fixture(scope="session")
def base() -> Iterator[str]:
    app = create_app(Settings())
    server = create_server(app, host="127.0.0.1", port=0, threads=12)
    thread = threading.Thread(target=server.run)
    thread.start()
    yield f"http://127.0.0.1:{server.effective_port}"
    server.close()
    thread.join(10)
    server.task_dispatcher.shutdown()
    desk(app).close()


class Watched:
    """A page with the faults and outside requests it made."""

    def __init__(self, context: BrowserContext, base: str) -> None:
        self.page: Page = context.new_page()
        self.base = base
        self.outside: list[str] = []
        self.faults: list[str] = []
        self.page.on("request", self._request)
        self.page.on("pageerror", lambda error: self.faults.append(str(error)))
        self.page.on("console", lambda m: self.faults.append(m.text) if _is_fault(m.text) else None)

    def _request(self, request: Request) -> None:
        if not request.url.startswith((self.base + "/", "data:")):
            self.outside.append(request.url)

    def open(self, path: str) -> Page:
        self.page.goto(self.base + path)
        return self.page


def _is_fault(text: str) -> bool:
    return "Content Security Policy" in text or "Uncaught" in text


def watched(browser: Browser, base: str, **options: object) -> Iterator[Watched]:
    context = browser.new_context(**options)  # type: ignore[arg-type]
    context.set_default_timeout(20_000)
    made = Watched(context, base)
    yield made
    context.close()
    assert made.outside == []
    assert made.faults == []


@pytest.fixture
def at(browser: Browser, base: str) -> Iterator[Watched]:
    yield from watched(browser, base)


@pytest.fixture
def plain(browser: Browser, base: str) -> Iterator[Watched]:
    """A browser that runs no script."""
    yield from watched(browser, base, java_script_enabled=False)


@pytest.fixture(params=["light", "dark"])
def phone(browser: Browser, base: str, request: pytest.FixtureRequest) -> Iterator[Watched]:
    """A phone's width, light and dark."""
    size = {"width": 390, "height": 844}
    yield from watched(browser, base, viewport=size, color_scheme=request.param)
