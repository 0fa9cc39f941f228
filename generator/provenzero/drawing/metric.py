"""How wide words are on paper: an upper estimate, so that what is laid out apart stays apart.

The widths are fractions of the font size. Each is the greater of those in the face that the documents carry and in the wide face that
most often replaces it (DejaVu Sans), rounded up; a letter that is not in the table counts as wide.
"""

from functools import cache

from provenzero.drawing.model import Anchor, Box, Text

_REGULAR = {
    0.30: "'ijl",
    0.33: " ,.",
    0.36: "/:;\\|",
    0.39: "f",
    0.42: "!()[]rt",
    0.45: "I",
    0.48: '"-',
    0.51: "*_`",
    0.54: "?s",
    0.57: "JLcz",
    0.60: "Fkvxy",
    0.63: "aeo",
    0.66: "$0123456789EKPSTbdghnpqu{}",
    0.69: "ABVXYZ",
    0.72: "R",
    0.75: "CU",
    0.78: "&DGHN",
    0.81: "OQ",
    0.84: "#+<=>^w~\u00d7",
    0.90: "M",
    0.96: "%",
    0.99: "Wm",
}
_BOLD = {
    0.33: "'",
    0.36: " ijl",
    0.39: ",./\\|",
    0.42: ":;",
    0.45: "f",
    0.48: "!()-I[]t",
    0.51: "_`r",
    0.54: '"',
    0.57: "*J",
    0.60: "?csz",
    0.66: "Lvxy",
    0.69: "EFTaeko",
    0.72: "$0123456789bdghnpqu{}",
    0.75: "PSYZ",
    0.78: "ABCKRVX",
    0.84: "#+<=>DGHNU^~\u00d7",
    0.87: "OQ",
    0.90: "&",
    0.93: "w",
    1.02: "%M",
    1.05: "m",
}
_WIDE = 1.11
ASCENT = 0.75
DESCENT = 0.2


def _letters(table: dict[float, str]) -> dict[str, float]:
    return {letter: width for width, letters in table.items() for letter in letters}


_FACES = {False: _letters(_REGULAR), True: _letters(_BOLD)}


@cache
def width_mm(words: str, size_mm: float, *, bold: bool = False) -> float:
    """The greatest width of the words [mm] at a font size [mm]."""
    face = _FACES[bold]
    return size_mm * sum(face.get(letter, _WIDE) for letter in words)


def box_of(text: Text) -> Box:
    """The rectangle that the words may take."""
    width = width_mm(text.words, text.size_mm, bold=text.bold)
    x, y = text.at
    left = {Anchor.START: x, Anchor.MIDDLE: x - width / 2, Anchor.END: x - width}[text.anchor]
    return Box(left, y - ASCENT * text.size_mm, left + width, y + DESCENT * text.size_mm)


@cache
def broken(words: str, size_mm: float, limit_mm: float, *, bold: bool = False) -> tuple[str, ...]:
    """The words on as many lines as the limit needs, broken after blanks, hyphens, dots and strokes where possible."""
    lines: list[str] = []
    here = ""
    for piece in _pieces(words):
        if here and width_mm((here + piece).rstrip(), size_mm, bold=bold) > limit_mm:
            lines.append(here.rstrip())
            here = ""
        here += piece
        while len(here) > 1 and width_mm(here.rstrip(), size_mm, bold=bold) > limit_mm:
            cut = _fitting(here, size_mm, limit_mm, bold=bold)
            lines.append(here[:cut])
            here = here[cut:]
    if here.strip() or not lines:
        lines.append(here.rstrip())
    return tuple(lines)


def _pieces(words: str) -> list[str]:
    found = [""]
    for letter in words:
        found[-1] += letter
        if letter in " -./_:":
            found.append("")
    return [piece for piece in found if piece]


def _fitting(words: str, size_mm: float, limit_mm: float, *, bold: bool) -> int:
    count = 1
    while count < len(words) and width_mm(words[: count + 1], size_mm, bold=bold) <= limit_mm:
        count += 1
    return count
