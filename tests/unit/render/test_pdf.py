"""The PDF: the same bytes, tagged, complete on every page, no step torn in two, room for a gloved hand."""

import re
import sys
from collections.abc import Iterator
from dataclasses import replace
from io import BytesIO
from typing import Any

import pytest
from pypdf import PdfReader

from provenzero.document.model import Document, Paper, Steps, Words
from provenzero.render.html import html
from provenzero.render.pdf import PdfUnavailableError, pdf

weasyprint = pytest.importorskip("weasyprint")

MM = 96 / 25.4  # CSS pixels
SMALLEST_BOX_MM = 9.0


@pytest.fixture(scope="module")
def pages() -> dict[str, PdfReader]:
    return {}


@pytest.fixture
def reader(document: Document, svg: str, pages: dict[str, PdfReader]) -> PdfReader:
    if "reader" not in pages:
        pages["reader"] = PdfReader(BytesIO(pdf(html(document, svg))))
    return pages["reader"]


def text(reader: PdfReader, page: int) -> str:
    return re.sub(r"\s+", " ", reader.pages[page].extract_text())


def boxes(page: str) -> Iterator[tuple[str, float]]:
    """Class and height [mm] of every box for handwriting, as laid out."""
    for sheet in weasyprint.HTML(string=page).render().pages:
        for box in sheet._page_box.descendants():
            names = "" if box.element is None else (box.element.get("class") or "")
            if not {"box", "blank"}.isdisjoint(names.split()) and box.element_tag in ("div", "td"):
                yield names, box.border_height() / MM


def test_the_same_page_gives_the_same_bytes(document: Document, svg: str) -> None:
    page = html(document, svg)
    assert pdf(page) == pdf(page)


def test_it_is_tagged_and_says_its_language_and_title(reader: PdfReader) -> None:
    root: Any = reader.trailer["/Root"]
    assert root["/MarkInfo"]["/Marked"]
    assert root["/Lang"] == "en"
    assert root["/ViewerPreferences"]["/DisplayDocTitle"]
    assert reader.metadata is not None
    assert reader.metadata.title == 'Lock-out permit: Change "hoses" - ram'
    assert b"pdfuaid" in root["/Metadata"].get_data()


def test_no_date_of_the_machine_gets_in(reader: PdfReader) -> None:
    assert reader.metadata is not None
    assert "/CreationDate" not in reader.metadata


def test_its_parts_can_be_found_in_the_outline(reader: PdfReader) -> None:
    def titles(items: object) -> Iterator[str]:
        for item in items if isinstance(items, list) else []:
            if isinstance(item, list):
                yield from titles(item)
            else:
                yield str(item["/Title"])

    assert {"Lock-out permit", "B. Isolate"} <= set(titles(reader.outline))


def test_every_page_says_what_it_belongs_to_and_which_of_how_many_it_is(reader: PdfReader) -> None:
    count = len(reader.pages)
    assert count > 2
    for number in range(count):
        found = text(reader, number)
        assert f"Page {number + 1} of {count}" in found
        assert "9f3a 61c0 7be2 4d15" in found
        assert 'LP "7" \\ 42' in found
        assert "NOT VERIFIED AGAINST THE STEEL" in found


@pytest.mark.parametrize("lines", [0, 7, 14, 21])
def test_a_step_is_never_torn_in_two(lines: int, document: Document, svg: str) -> None:
    first, second = document.sections
    filler = Words(paragraphs=("Line.",) * lines)
    longer = replace(second, blocks=(filler, *second.blocks))
    made = PdfReader(BytesIO(pdf(html(replace(document, sections=(first, longer)), svg))))
    sheets = [text(made, number) for number in range(len(made.pages))]
    for number in range(1, 15):
        wanted = (f"Close HV-{number}.", f"unlike{number}: STOP.", f"board{number} ", f"second{number} checks.")
        pages = [{i for i, sheet in enumerate(sheets) if words in sheet} for words in wanted]
        assert len(pages[0]) == 1
        assert all(found in (pages[0], set()) for found in pages), f"B{number}: {pages}"


def test_a_warning_is_on_the_page_of_its_step(reader: PdfReader) -> None:
    sheets = [text(reader, number) for number in range(1, len(reader.pages))]
    for number in (5, 10):
        sheet = next(s for s in sheets if f"Close HV-{number}." in s)
        assert "WARNING Title of warning" in sheet[: sheet.index(f"Close HV-{number}.")]


def test_no_heading_is_left_alone_at_the_foot_of_a_page(document: Document) -> None:
    second = replace(document.sections[1], fresh=False)
    steps = Steps(cards=next(block for block in second.blocks if isinstance(block, Steps)).cards[:1])
    for lines in range(40, 56, 3):
        filler = replace(document.sections[0], blocks=(Words(paragraphs=("Line.",) * lines),))
        short = replace(second, blocks=(second.blocks[0], steps))
        made = PdfReader(BytesIO(pdf(html(replace(document, sections=(filler, short))))))
        sheets = [text(made, number) for number in range(len(made.pages))]
        heading = next(sheet for sheet in sheets if "B. Isolate" in sheet)
        assert "Lead." in heading
        assert "Close HV-1." in heading


def test_every_box_has_room_for_handwriting(document: Document, svg: str) -> None:
    found = list(boxes(html(document, svg)))
    assert {name.split()[0] for name, _ in found} == {"box", "blank"}
    assert [height for _, height in found if height < SMALLEST_BOX_MM] == []


def test_nothing_reaches_over_the_edge_of_the_paper(document: Document, svg: str) -> None:
    for paper in Paper:
        for sheet in weasyprint.HTML(string=html(replace(document, paper=paper), svg)).render().pages:
            for box in sheet._page_box.children[0].descendants():
                if box.element_tag in ("td", "th", "table", "div"):
                    assert box.position_x + box.border_width() <= sheet.width - 10 * MM


@pytest.mark.parametrize(("paper", "size"), [(Paper.A4, (595, 842)), (Paper.LETTER, (612, 792))])
def test_the_sheet_is_that_of_the_document(paper: Paper, size: tuple[int, int], document: Document, svg: str) -> None:
    made = PdfReader(BytesIO(pdf(html(replace(document, paper=paper), svg))))
    box = made.pages[0].mediabox
    assert (round(box.width), round(box.height)) == size


def test_all_fonts_are_ours_and_inside(reader: PdfReader) -> None:
    sheets: list[Any] = list(reader.pages)
    fonts = {str(font.get_object()["/BaseFont"]) for sheet in sheets for font in sheet["/Resources"]["/Font"].values()}
    assert fonts
    assert all("Permit" in name for name in fonts), fonts


@pytest.mark.logs("disallowed protocol")
def test_a_file_of_the_machine_cannot_be_drawn_in(document: Document, svg: str) -> None:
    page = html(document, svg)
    spied = page.replace("<h2>", '<link rel="stylesheet" href="file:///etc/passwd"><h2>')
    assert pdf(spied) == pdf(page)


def test_without_the_layout_library_the_error_says_what_to_do(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setitem(sys.modules, "weasyprint", None)
    with pytest.raises(
        PdfUnavailableError,
        match=r"Pango.*HTML.*apt-get install libpango.*dnf install pango.*brew install pango.*Windows",
    ):
        pdf("<p>x</p>")
