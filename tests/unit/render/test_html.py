"""The HTML file stands alone, says what the document says, and lets nothing in or out."""

import re
import subprocess
import sys
from base64 import b64encode
from dataclasses import replace
from hashlib import sha256
from html.parser import HTMLParser
from itertools import pairwise

import pytest

from provenzero.document.model import Document, Paper, Section
from provenzero.render.html import html


@pytest.fixture
def page(document: Document, svg: str) -> str:
    return html(document, svg)


class Outline(HTMLParser):
    """Collects what the tests look at: tags with attributes, headings, ids."""

    def __init__(self, page: str) -> None:
        super().__init__()
        self.tags: list[tuple[str, dict[str, str | None]]] = []
        self.feed(page)

    def handle_starttag(self, tag: str, attrs: list[tuple[str, str | None]]) -> None:
        self.tags.append((tag, dict(attrs)))

    def named(self, tag: str) -> list[dict[str, str | None]]:
        return [attributes for name, attributes in self.tags if name == tag]


def test_nothing_is_loaded_from_anywhere(page: str) -> None:
    outside = set(re.findall(r"(?:https?:)?//[\w.]+", re.sub(r"data:[^\"]+|sha256-[^']+", "", page)))
    assert outside <= {"http://www.w3.org", "http://www.w3"}
    assert "@import" not in page


def test_there_is_no_script_and_no_style_on_an_element(page: str) -> None:
    outline = Outline(page)
    assert not outline.named("script")
    assert not [a for _, a in outline.tags if "style" in a or any(name.startswith("on") for name in a)]


def test_the_policy_lets_in_this_style_sheet_and_nothing_else(page: str) -> None:
    policy = next(a["content"] for a in Outline(page).named("meta") if a.get("http-equiv") == "Content-Security-Policy")
    style = re.search(r"<style>(.*)</style>", page, re.DOTALL)
    assert policy is not None
    assert style is not None
    digest = b64encode(sha256(style.group(1).encode()).digest()).decode()
    assert f"style-src 'sha256-{digest}'" in policy
    assert policy.startswith("default-src 'none';")
    assert "unsafe" not in policy


def test_words_from_a_description_are_words_and_never_markup(page: str) -> None:
    assert "HCU-7 &lt;script&gt;alert(1)&lt;/script&gt;" in page


def test_words_on_every_page_cannot_leave_their_string(page: str) -> None:
    assert '"Document\\a0 LP\\a0 \\22 7\\22 \\a0 \\5c \\a0 42' in page
    assert page.count("</style>") == 1


def test_every_block_and_every_step_is_there(page: str, document: Document) -> None:
    for text in ("One &amp; two.", "A lead.", "First.", "Title of danger", "One row for each lock.", "I have read it."):
        assert text in page
    assert len([a for a in Outline(page).named("article") if a.get("class") == "step"]) == 14
    assert all(f'id="{section.id}"' in page for section in document.sections)


def test_a_notice_that_hurts_nobody_has_no_alert_symbol(page: str) -> None:
    panel = re.search(r'<div class="panel notice">.*?</div>', page, re.DOTALL)
    assert panel is not None
    assert "<svg" not in panel.group(0)
    assert page.count("<title>Safety alert symbol</title>") == 5


def test_ids_are_unique_and_links_lead_to_them(page: str) -> None:
    outline = Outline(page)
    ids = [a["id"] for _, a in outline.tags if "id" in a]
    assert len(ids) == len(set(ids))
    assert {str(a["href"]).removeprefix("#") for a in outline.named("a")} <= set(ids)


def test_headings_skip_no_level(page: str) -> None:
    levels = [int(tag[1]) for tag, _ in Outline(page).tags if re.fullmatch(r"h[1-6]", tag)]
    assert levels[0] == 1
    assert all(later <= sooner + 1 for sooner, later in pairwise(levels))


def test_language_and_title_are_told(page: str) -> None:
    assert Outline(page).named("html") == [{"lang": "en"}]
    assert "<title>Lock-out permit: Change &#34;hoses&#34; - ram</title>" in page


@pytest.mark.parametrize(("paper", "size"), [(Paper.A4, "A4"), (Paper.LETTER, "letter")])
def test_the_sheet_is_that_of_the_document(paper: Paper, size: str, document: Document, svg: str) -> None:
    assert f"@page {{ size: {size};" in html(replace(document, paper=paper), svg)


def test_without_marks_no_bar_stands_on_the_page(document: Document, svg: str) -> None:
    plain = replace(document, identity=replace(document.identity, marks=()))
    assert "@top-center" not in html(plain, svg)
    assert "@top-center" in html(document, svg)


def test_the_drawing_goes_in_as_it_is(page: str, svg: str) -> None:
    assert svg in page


def test_a_drawing_on_several_sheets_goes_in_sheet_by_sheet(document: Document, svg: str) -> None:
    other = svg.replace("Schematic of the unit", "Second sheet")
    page = html(document, svg, other)
    assert page.count('<figure class="drawing">') == 2
    assert page.index("Schematic of the unit") < page.index("Second sheet")


def test_without_a_drawing_the_page_says_so(document: Document) -> None:
    assert "No drawing." in html(document, "")


@pytest.mark.parametrize("other", ["<p>drawing</p>", "<svg><script/></svg><p>", "hello"])
def test_anything_but_a_drawing_is_refused(other: str, document: Document) -> None:
    with pytest.raises(ValueError, match="not an SVG"):
        html(document, other)


def test_a_word_that_is_missing_is_a_fault(document: Document, svg: str) -> None:
    words = {k: v for k, v in document.words.items() if k != "otherwise"}
    with pytest.raises(Exception, match="otherwise"):
        html(replace(document, words=words), svg)


def test_the_same_document_gives_the_same_bytes(page: str, document: Document, svg: str) -> None:
    assert page == html(document, svg)


def test_an_empty_section_is_a_heading_only(document: Document) -> None:
    empty = Section(id="x", mark="X", title="Nothing here", blocks=())
    assert "<h2>Nothing here</h2>" in html(replace(document, sections=(*document.sections, empty)), "")


def test_making_html_does_not_load_the_pdf_library() -> None:
    code = "import sys, provenzero.render.html as h; h._environment(); sys.exit('weasyprint' in sys.modules)"
    assert subprocess.run([sys.executable, "-c", code], check=False).returncode == 0
