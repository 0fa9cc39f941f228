"""Plates with words: where a line comes from or goes to, a panel, the name of a shared line."""

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import ROOM, Cell
from provenzero.drawing.metric import broken, width_mm
from provenzero.drawing.model import Box, Fill, Kind, Pen, Point, Polygon, Rect, Text
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import Symbol
from provenzero.drawing.tags import PITCH, TAG_MM, label, label_width
from provenzero.network.model import LineId

_TIP = 1.4
_FLAG_MM = 19.0
_FLAG_PITCH = 2.8


def from_flag(words: str) -> Symbol:
    """A flag that says where a line comes from; the line leaves its tip, which is the origin."""
    width, half, lines = _flag_size(words)
    outline = ((-width, -half), (-_TIP, -half), (0.0, 0.0), (-_TIP, half), (-width, half))
    return _flag(lines, outline, -width + 0.6, Box(-width, -half, 0.0, half))


def to_flag(words: str) -> Symbol:
    """A flag that says where a line goes to; the line meets its flat end, which is the origin."""
    width, half, lines = _flag_size(words)
    outline = ((0.0, -half), (width - _TIP, -half), (width, 0.0), (width - _TIP, half), (0.0, half))
    return _flag(lines, outline, 0.6, Box(0.0, -half, width, half))


def _flag_size(words: str) -> tuple[float, float, tuple[str, ...]]:
    lines = broken(words, TAG_MM, _FLAG_MM)
    return max(width_mm(line, TAG_MM) for line in lines) + 1.2 + _TIP, (len(lines) * _FLAG_PITCH + 0.8) / 2, lines


def _flag(lines: tuple[str, ...], outline: tuple[Point, ...], left: float, body: Box) -> Symbol:
    middle = left + max(width_mm(line, TAG_MM) for line in lines) / 2
    top = -(len(lines) - 1) * _FLAG_PITCH / 2 + 0.95
    texts = [
        Text(at=(middle, top + place * _FLAG_PITCH), words=line, size_mm=TAG_MM) for place, line in enumerate(lines)
    ]
    return Symbol(shapes=(Polygon(points=outline, pen=Pen.SYMBOL, fill=Fill.PAPER), *texts), body=body)


def plate(words: str, limit_mm: float, *, bold: bool = False, half_mm: float = 0.0) -> Symbol:
    """A plate with words on as many lines as needed; the origin is the middle of its left side. `half_mm`: half its least height."""
    lines = broken(words, TAG_MM, limit_mm, bold=bold)
    width = max(width_mm(line, TAG_MM, bold=bold) for line in lines) + 1.4
    tall = len(lines) * PITCH + 0.7
    half = max(tall / 2, half_mm)
    frame = Rect(at=(0.0, -half), width=width, height=2 * half, pen=Pen.SYMBOL, fill=Fill.PAPER, round_mm=0.6)
    top = -tall / 2 + 0.35 + 2.2
    texts = [
        Text(at=(width / 2, top + place * PITCH), words=line, size_mm=TAG_MM, bold=bold)
        for place, line in enumerate(lines)
    ]
    return Symbol(shapes=(frame, *texts), body=Box(0.0, -half, width, half))


def named(scene: Scene, line: LineId) -> Cell:
    """A cell that names a shared line over it and carries the word that must stand on it."""
    wide = name_width(scene, line)

    def paint(canvas: Canvas, x: float, y: float) -> None:
        name_over(canvas, scene, line, x + wide / 2, y)

    return Cell(left=0.0, right=wide, up=4.6, down=1.8, line_in=line, line_out=line, body=None, clear=0.0, paint=paint)


def name_width(scene: Scene, line: LineId) -> float:
    """Width of the name of a shared line over it, or of the word on it [mm]."""
    told = scene.told(line)
    return max(width_mm(scene.name(line), TAG_MM, bold=True), label_width(told) if told else 0.0) + 2 * ROOM


def name_over(canvas: Canvas, scene: Scene, line: LineId, x: float, y: float) -> None:
    """Put the name of a shared line over it, and on it the word that must stand there."""
    base = y - (2.3 if scene.told(line) else 1.2)
    text = Text(at=(x, base), words=scene.name(line), size_mm=TAG_MM, bold=True)
    canvas.add(Kind.TAG, (text,), line)
    label(canvas, scene, line, (x, y))
