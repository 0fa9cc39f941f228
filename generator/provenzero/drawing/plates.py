"""Plates with words: where a line comes from or goes to, a panel, the name of a shared line."""

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import ROOM, Cell
from provenzero.drawing.metric import broken, width_mm
from provenzero.drawing.model import Box, Fill, Kind, Pen, Polygon, Rect, Shape, Text
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import Symbol
from provenzero.drawing.tags import PITCH, TAG_MM, label, label_width
from provenzero.network.model import LineId

FLAG_HALF = 1.8
_TIP = 1.4


def flag_width(words: str) -> float:
    """Width of a flag [mm]."""
    return width_mm(words, TAG_MM) + 1.2 + _TIP


def from_flag(words: str) -> Symbol:
    """A flag that says where a line comes from; the line leaves its tip, which is the origin."""
    width = flag_width(words)
    outline = ((-width, -FLAG_HALF), (-_TIP, -FLAG_HALF), (0.0, 0.0), (-_TIP, FLAG_HALF), (-width, FLAG_HALF))
    return _flag(words, outline, -width + 0.6, Box(-width, -FLAG_HALF, 0.0, FLAG_HALF))


def to_flag(words: str) -> Symbol:
    """A flag that says where a line goes to; the line meets its flat end, which is the origin."""
    width = flag_width(words)
    outline = ((0.0, -FLAG_HALF), (width - _TIP, -FLAG_HALF), (width, 0.0), (width - _TIP, FLAG_HALF), (0.0, FLAG_HALF))
    return _flag(words, outline, 0.6, Box(0.0, -FLAG_HALF, width, FLAG_HALF))


def _flag(words: str, outline: tuple[tuple[float, float], ...], left: float, body: Box) -> Symbol:
    middle = left + width_mm(words, TAG_MM) / 2
    shapes: tuple[Shape, ...] = (
        Polygon(points=outline, pen=Pen.SYMBOL, fill=Fill.PAPER), Text(at=(middle, 0.95), words=words, size_mm=TAG_MM)
    )
    return Symbol(shapes=shapes, body=body)


def plate(words: str, limit_mm: float, *, bold: bool = False, half_mm: float = 0.0) -> Symbol:
    """A plate with words on as many lines as needed; the origin is the middle of its left side. `half_mm`: half its least height."""
    lines = broken(words, TAG_MM, limit_mm, bold=bold)
    width = max(width_mm(line, TAG_MM, bold=bold) for line in lines) + 1.4
    tall = len(lines) * PITCH + 0.7
    half = max(tall / 2, half_mm)
    frame = Rect(at=(0.0, -half), width=width, height=2 * half, pen=Pen.SYMBOL, fill=Fill.PAPER, round_mm=0.6)
    top = -tall / 2 + 0.35 + 2.2
    texts = [
        Text(at=(width / 2, top + place * PITCH), words=line, size_mm=TAG_MM, bold=bold) for place, line in enumerate(lines)
    ]
    return Symbol(shapes=(frame, *texts), body=Box(0.0, -half, width, half))


def named(scene: Scene, line: LineId) -> Cell:
    """A cell that names a shared line over it and carries the word that must stand on it."""
    words = scene.name(line)
    told = scene.told(line)
    wide = max(width_mm(words, TAG_MM, bold=True), label_width(told) if told else 0.0) + 2 * ROOM

    def paint(canvas: Canvas, x: float, y: float) -> None:
        name_text(canvas, words, line, x + wide / 2, y - (2.3 if told else 1.2))
        label(canvas, scene, line, (x + wide / 2, y))

    return Cell(
        left=0.0, right=wide, up=4.6, down=1.8, line_in=line, line_out=line, body=None, clear=0.0, paint=paint
    )


def name_width(scene: Scene, line: LineId) -> float:
    """Width of the name of a shared line and of the word on it [mm]."""
    told = scene.told(line)
    return width_mm(scene.name(line), TAG_MM, bold=True) + 1.0 + (label_width(told) + 1.0 if told else 0.0)


def name_on(canvas: Canvas, scene: Scene, line: LineId, left: float, y: float) -> None:
    """Put the name of a shared line on the line itself, and after it the word that must stand there."""
    words = scene.name(line)
    width = width_mm(words, TAG_MM, bold=True) + 1.0
    frame = Rect(at=(left, y - 1.7), width=width, height=3.4, pen=Pen.NONE, fill=Fill.PAPER)
    text = Text(at=(left + width / 2, y + 0.95), words=words, size_mm=TAG_MM, bold=True)
    canvas.add(Kind.LABEL, (frame, text), line, role=scene.marks.role(line))
    told = scene.told(line)
    if told:
        label(canvas, scene, line, (left + width + 1.0 + label_width(told) / 2, y))


def name_text(canvas: Canvas, words: str, line: LineId, x: float, base: float) -> None:
    """Put the name of a shared line over it."""
    canvas.add(Kind.TAG, (Text(at=(x, base), words=words, size_mm=TAG_MM, bold=True),), line)
