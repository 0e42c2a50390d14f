"""Sheets in, reports out, in a browser: with and without script, by keyboard, on a phone."""

from __future__ import annotations

import re

import pytest
from playwright.sync_api import Page, expect

from .conftest import SHEETS, Watched

PANEL = SHEETS / "of-5800-17-sector-panel.pdf"
HONEST = SHEETS / "ka-s24-65-sector.pdf"
SCAN = SHEETS / "ka-h58-scanned.pdf"


def on_the_report(page: Page) -> None:
    expect(page).to_have_url(re.compile(r"/reports/[0-9a-f]{64}$"))
    expect(page.get_by_role("heading", level=1)).to_have_text("Hold")
    expect(page.get_by_text("gain-above-beamwidth-limit").first).to_be_visible()


def test_one_sheet_ends_on_its_report(at: Watched) -> None:
    page = at.open("/")
    page.get_by_label("Sheets").set_input_files(PANEL)
    page.get_by_role("button", name="Check").click()
    on_the_report(page)
    page.get_by_role("link", name="Check another sheet").click()
    expect(page.get_by_role("button", name="Check")).to_be_visible()


def test_without_script_one_sheet_ends_on_its_report(plain: Watched) -> None:
    page = plain.open("/")
    expect(page.get_by_text("You can also drop them here.")).to_be_hidden()
    page.get_by_label("Sheets").set_input_files(PANEL)
    page.get_by_role("button", name="Check").click()
    on_the_report(page)


def test_without_script_several_sheets_end_on_their_rows(plain: Watched) -> None:
    page = plain.open("/")
    page.get_by_label("Sheets").set_input_files([PANEL, HONEST, SCAN])
    page.get_by_role("button", name="Check").click()
    expect(page.get_by_role("listitem").filter(has_text="claims")).to_have_count(2)
    expect(page.get_by_text("Not read.")).to_be_visible()
    page.get_by_role("link", name="Open the report on of-5800-17-sector-panel.pdf").click()
    on_the_report(page)


def test_several_sheets_become_rows_and_stay_under_their_address(at: Watched) -> None:
    page = at.open("/")
    page.get_by_label("Sheets").set_input_files([PANEL, HONEST, SCAN])
    page.get_by_label("Or the text of a sheet").fill("Gain: 9 dBi\nDirectivity: 2 dBi")
    page.get_by_role("button", name="Check").click()
    expect(page.get_by_role("status")).to_have_text("All 4 done.")
    rows = page.locator("#rows .row")
    names = ["of-5800-17", "ka-s24-65", "ka-h58-scanned", "pasted-text"]
    outcomes = ["Hold", "Release", "Not read.", "Hold"]
    for index, (name, outcome) in enumerate(zip(names, outcomes, strict=True)):
        expect(rows.nth(index)).to_contain_text(name)
        expect(rows.nth(index)).to_contain_text(outcome)
    expect(page).to_have_url(re.compile("/results"))
    page.reload()
    expect(page.locator(".row")).to_have_count(3)  # a sheet that was not read leaves nothing


def test_sheets_can_be_dropped(at: Watched) -> None:
    page = at.open("/")
    files = page.evaluate_handle(
        """() => {
          const carried = new DataTransfer();
          for (const name of ["a.txt", "b.txt"]) {
            carried.items.add(new File(["Gain: 9 dBi\\nDirectivity: 2 dBi"], name));
          }
          return carried;
        }"""
    )
    page.dispatch_event("#drop", "drop", {"dataTransfer": files})
    expect(page.get_by_role("status")).to_have_text("All 2 done.")
    expect(page.locator("#rows .row").first).to_contain_text("Hold")


def test_a_lost_service_is_told_in_the_row(at: Watched) -> None:
    page = at.open("/")
    page.route("**/rows", lambda route: route.abort())
    page.get_by_label("Sheets").set_input_files([PANEL, HONEST])
    page.get_by_role("button", name="Check").click()
    expect(page.locator("#rows .row").first).to_contain_text("Not read.")
    expect(page.get_by_role("button", name="Check")).to_be_enabled()


def test_an_empty_form_stays_and_says_why(at: Watched) -> None:
    page = at.open("/")
    page.get_by_role("button", name="Check").click()
    expect(page.get_by_role("status")).to_contain_text("Choose a file")
    expect(page.get_by_label("Sheets")).to_be_focused()


def test_by_keyboard_alone(at: Watched) -> None:
    page = at.open("/")
    page.keyboard.press("Tab")
    expect(page.get_by_role("link", name="Skip to the content")).to_be_focused()
    page.keyboard.press("Enter")
    page.keyboard.press("Tab")
    expect(page.get_by_label("Sheets")).to_be_focused()
    page.keyboard.press("Tab")
    page.keyboard.type("Gain: 9 dBi\nDirectivity: 2 dBi")
    page.keyboard.press("Tab")
    page.keyboard.press("Enter")
    expect(page.get_by_role("heading", level=1)).to_have_text("Hold")
    for _ in range(3):
        page.keyboard.press("Tab")
    expect(page.get_by_role("link", name="HTML")).to_be_focused()


def test_a_report_can_be_saved(at: Watched) -> None:
    page = at.open("/demo")
    for form in ("HTML", "JSON", "CSV", "TXT"):
        with page.expect_download() as saving:
            page.get_by_role("link", name=form, exact=True).click()
        assert saving.value.suggested_filename.endswith(form.lower())


def test_a_hostile_sheet_runs_nothing(at: Watched) -> None:
    page = at.open("/")
    text = (
        "# <img src=x onerror=alert(1)><script>alert(1)</script>\nGain: 3 dBi\n"
        "VSWR: <svg onload=alert(1)>"
    )
    page.on("dialog", lambda dialog: at.faults.append(f"a script ran: {dialog.message}"))
    page.get_by_label("Or the text of a sheet").fill(text)
    page.get_by_role("button", name="Check").click()
    expect(page).to_have_url(re.compile("/reports/"))
    assert page.locator("script").count() == 0


PAGES = [
    "/", "/convert?q=7.5+dBd+at+450+MHz", "/rules", "/rules/gain-above-beamwidth-limit",
    "/problems", "/demo", "/nowhere",
]  # fmt: skip


@pytest.mark.parametrize("path", PAGES)
def test_nothing_is_wider_than_a_phone(phone: Watched, path: str) -> None:
    page = phone.open(path)
    assert page.evaluate("document.documentElement.scrollWidth") <= 390


def test_the_page_of_the_api_works_and_stays_here(at: Watched) -> None:
    page = at.open("/openapi")
    page.locator(".opblock-summary-control", has_text="/api/v1/validations").click()
    page.get_by_role("button", name="Try it out").click()
    page.get_by_role("button", name="Execute").click()
    status = page.locator(".live-responses-table tbody .response-col_status").first
    expect(status).to_contain_text("200")
