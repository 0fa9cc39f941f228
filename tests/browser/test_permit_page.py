"""The HTML permit in a real browser: it asks for nothing, reports no error, fits a phone, and its parts can be reached."""

import ctypes.util
import shutil
import sys
from collections.abc import Iterator
from pathlib import Path

import pytest
from playwright.sync_api import Browser, Page, sync_playwright
from tests.properties.planning import EXAMPLES

from provenzero import pipeline
from provenzero.plan.model import Plan
from provenzero.render.html import html
from provenzero.render.svg import svg

CHROMIUM = shutil.which("chromium") or shutil.which("chromium-browser")
QUIET = ["--no-sandbox", "--disable-gpu", "--disable-quic", "--disable-background-networking", "--disable-sync"]

DRIVER = not sys.platform.startswith("linux") or ctypes.util.find_library("atomic") is not None

pytestmark = [
    pytest.mark.browser,
    pytest.mark.skipif(CHROMIUM is None or not DRIVER, reason="no Chromium here, or no libatomic for its driver"),
]


@pytest.fixture(scope="module")
def browser() -> Iterator[Browser]:
    with sync_playwright() as playwright:
        opened = playwright.chromium.launch(executable_path=CHROMIUM, args=QUIET)
        yield opened
        opened.close()


@pytest.fixture(scope="module")
def permit(tmp_path_factory: pytest.TempPathFactory) -> Path:
    request = pipeline.Request(
        unit_file=EXAMPLES / "jack-up.yaml", job="replace-hoses", on="upper-pipe-rams", issued="2026-01-01 08:00"
    )
    asked = pipeline.ask(request)
    assert isinstance(asked, pipeline.Asked)
    plan = pipeline.plan(asked)
    assert isinstance(plan, Plan)
    made = pipeline.permit(asked, plan)
    file = tmp_path_factory.mktemp("permit") / "permit.html"
    file.write_text(html(made.document, *(svg(sheet) for sheet in made.drawings)), encoding="utf-8")
    return file


def _opened(browser: Browser, file: Path, width: int) -> tuple[Page, list[str]]:
    page = browser.new_page(viewport={"width": width, "height": 900})
    told: list[str] = []
    page.on("console", lambda message: told.append(f"console: {message.text}"))
    page.on("pageerror", lambda error: told.append(f"error: {error}"))
    page.on(
        "request", lambda request: told.append(f"request: {request.url}") if request.url.startswith("http") else None
    )
    page.goto(file.as_uri())
    return page, told


@pytest.mark.parametrize("width", [360, 768, 1280])
def test_the_page_asks_for_nothing_reports_nothing_and_does_not_scroll_sideways(
    browser: Browser, permit: Path, width: int
) -> None:
    page, told = _opened(browser, permit, width)
    assert not told
    assert page.evaluate("document.documentElement.scrollWidth - document.documentElement.clientWidth") <= 1
    page.close()


def test_each_part_can_be_reached_from_the_top_by_a_click(browser: Browser, permit: Path) -> None:
    page, _ = _opened(browser, permit, 1024)
    links = page.locator("nav a")
    assert links.count() > 8
    for i in range(links.count()):
        target = links.nth(i).get_attribute("href")
        links.nth(i).click()
        assert target is not None
        assert page.locator(f"[id='{target.removeprefix('#')}']").bounding_box() is not None
    page.close()


def test_the_drawing_and_every_step_are_seen(browser: Browser, permit: Path) -> None:
    page, _ = _opened(browser, permit, 1024)
    assert page.locator("svg").first.is_visible()
    for word in ("PV-2", "HV-2", "B1", "B2", "D1", "F2", "G3"):
        assert page.locator(f"text={word}").first.is_visible()
    page.close()
