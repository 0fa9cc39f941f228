"""How wide words are on paper: an upper estimate, so that what is laid out apart stays apart.

Widths in thousandths of the font size, a little above those of the regular and the bold face that the documents carry; the
wider of the two usual replacements (DejaVu Sans) stays within the bold ones for tags in capitals and digits.
"""

from provenzero.drawing.model import Anchor, Box, Text

_CAPITAL = 0.76
_NARROW = frozenset("ijlI.,:;|'!()[] ")
_WIDE = frozenset("mwMW@%\u2193")
_REGULAR = {"narrow": 0.37, "wide": 0.97, "lower": 0.62, "capital": _CAPITAL, "digit": 0.66, "other": 0.66}
_BOLD = {"narrow": 0.42, "wide": 1.05, "lower": 0.65, "capital": 0.79, "digit": 0.70, "other": 0.69}
ASCENT = 0.75
DESCENT = 0.2


def _class_of(letter: str) -> str:
    if letter in _NARROW:
        return "narrow"
    if letter in _WIDE:
        return "wide"
    if letter.isdigit():
        return "digit"
    if letter.islower():
        return "lower"
    return "capital" if letter.isupper() else "other"


def width_mm(words: str, size_mm: float, *, bold: bool = False) -> float:
    """The greatest width of the words [mm] at a font size [mm]."""
    table = _BOLD if bold else _REGULAR
    return size_mm * sum(table[_class_of(letter)] for letter in words)


def box_of(text: Text) -> Box:
    """The rectangle that the words may take."""
    width = width_mm(text.words, text.size_mm, bold=text.bold)
    x, y = text.at
    left = {Anchor.START: x, Anchor.MIDDLE: x - width / 2, Anchor.END: x - width}[text.anchor]
    return Box(left, y - ASCENT * text.size_mm, left + width, y + DESCENT * text.size_mm)


def broken(words: str, size_mm: float, limit_mm: float, *, bold: bool = False) -> tuple[str, ...]:
    """The words on as many lines as the limit needs, broken after blanks, hyphens, dots and strokes where possible."""
    pieces = _pieces(words)
    lines: list[str] = []
    here = ""
    for piece in pieces:
        if here and width_mm((here + piece).rstrip(), size_mm, bold=bold) > limit_mm:
            lines.append(here.rstrip())
            here = ""
        here += piece
        while width_mm(here.rstrip(), size_mm, bold=bold) > limit_mm and len(here) > 1:
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
        if letter in " -./_":
            found.append("")
    return [piece for piece in found if piece]


def _fitting(words: str, size_mm: float, limit_mm: float, *, bold: bool) -> int:
    count = 1
    while count < len(words) and width_mm(words[: count + 1], size_mm, bold=bold) <= limit_mm:
        count += 1
    return count
