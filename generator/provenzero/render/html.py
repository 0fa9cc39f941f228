"""A document to one self-contained HTML file: words escaped, style and fonts inside, nothing loaded from anywhere."""

from base64 import b64encode
from functools import cache
from hashlib import sha256

from jinja2 import BaseLoader, Environment, StrictUndefined, TemplateNotFound
from markupsafe import Markup

from provenzero.document.model import (
    Bullets,
    Document,
    DrawingSlot,
    Facts,
    Notice,
    Paper,
    SignOffs,
    Steps,
    Table,
    Words,
)
from provenzero.resources import checklists

_KINDS: dict[type, str] = {
    Facts: "facts",
    Words: "words",
    Bullets: "bullets",
    Notice: "notice",
    Table: "table",
    SignOffs: "sign_offs",
    Steps: "steps",
    DrawingSlot: "drawing_slot",
}
_WEIGHTS = (("regular", 400), ("bold", 700))
_MARK = (
    "@top-center { content: %s; width: 100%%; height: 5mm; margin: 6mm 0 1mm; background: #000; color: #fff; "
    "font-size: 10pt; font-weight: 700; text-align: center; }"
)
_SHEETS = {Paper.A4: "A4", Paper.LETTER: "letter"}


def html(document: Document, *drawings: str) -> str:
    """The document as one file, with its drawings inline; ValueError if one is anything but an SVG element."""
    pictures = [drawing.strip() for drawing in drawings if drawing.strip()]
    if not all(picture.startswith("<svg") and picture.endswith("</svg>") for picture in pictures):
        raise ValueError("a drawing is not an SVG element")
    style = _style(document)
    digest = b64encode(sha256(style.encode()).digest()).decode()
    return (
        _environment()
        .get_template("document.html")
        .render(document=document, drawings=[_ours(p) for p in pictures], style=_ours(style), style_hash=digest)
    )


def _ours(markup: str) -> Markup:
    """Markup of our own making: the style sheet and the drawing, whose words were escaped when it was drawn."""
    return Markup(markup)  # noqa: S704


class _Pages(BaseLoader):
    def get_source(self, environment: Environment, template: str) -> tuple[str, str | None, None]:
        page = checklists().joinpath("pages", template)
        if not page.is_file():
            raise TemplateNotFound(template)
        return page.read_text(encoding="utf-8"), None, None


@cache
def _environment() -> Environment:
    environment = Environment(
        loader=_Pages(), autoescape=True, undefined=StrictUndefined, trim_blocks=True, lstrip_blocks=True
    )
    environment.globals["kind_of"] = lambda block: _KINDS[type(block)]
    return environment


def _style(document: Document) -> str:
    return _fixed() + _page(document)


@cache
def _fixed() -> str:
    rules = [_font(name, weight) for name, weight in _WEIGHTS]
    rules.append(checklists().joinpath("pages", "document.css").read_text(encoding="utf-8"))
    rules += [f".w{percent} {{ width: {percent}%; }}\n" for percent in range(1, 101)]
    return "".join(rules)


def _page(document: Document) -> str:
    """What stands on every sheet: its size, its marks, what it belongs to, page x of y."""
    words = document.words
    known = "   ".join(f"{label} {value}".replace(" ", "\u00a0") for label, value in document.identity.facts)
    marks = "   ".join(document.identity.marks)
    number = f"{_string(words['page'])} ' ' counter(page) ' ' {_string(words['of'])} ' ' counter(pages)"
    mark = _MARK % _string(marks) if marks else ""
    return (
        f"@page {{ size: {_SHEETS[document.paper]}; {mark} "
        f"@bottom-left {{ content: {_string(known)}; }} @bottom-right {{ content: {number}; }} }}\n"
    )


def _string(words: str) -> str:
    """A CSS string that holds exactly these words."""
    return '"' + "".join(c if (c.isalnum() and c.isascii()) or c == " " else f"\\{ord(c):x} " for c in words) + '"'


def _font(name: str, weight: int) -> str:
    data = b64encode(checklists().joinpath("fonts", f"permit-sans-{name}.woff2").read_bytes()).decode()
    return (
        f'@font-face {{ font-family: "Permit Sans"; font-weight: {weight}; font-display: swap; '
        f'src: url("data:font/woff2;base64,{data}") format("woff2"); }}\n'
    )
