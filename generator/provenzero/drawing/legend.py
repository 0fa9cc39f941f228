"""The legend: how each role of a line is drawn, and what the marks mean. Only what stands on the drawing is explained."""

from collections.abc import Sequence

from provenzero.drawing.block import Block
from provenzero.drawing.canvas import Canvas, band
from provenzero.drawing.metric import width_mm
from provenzero.drawing.model import Anchor, Fill, Kind, Pen, Polyline, Role, Shape, Text, moved
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import box, ring, shut_off, words
from provenzero.drawing.tags import down_arrow, lozenge_shapes, word_shapes
from provenzero.network.model import LineId

_SIZE = 2.4
_SAMPLE = 17.0
_ROW = 4.1
_PAD = 0.8


def legend_block(scene: Scene, width: float, sheet: str, ringed: Sequence[LineId]) -> Block:
    """The legend in a frame of a given width.

    `sheet` says which sheet it is, empty if there is only one; `ringed` are the lines that end in rings with letters.
    """
    entries = _entries(scene, ringed)
    wide = _SAMPLE + 1.2 + max(width_mm(text, _SIZE) for _, text in entries) + 1.0
    columns = max(1, min(len(entries), int((width - 2 * _PAD) / wide)))
    rows = -(-len(entries) // columns)
    head = 3.4 if sheet else 0.0
    height = rows * _ROW + 2 * _PAD + head

    def draw(canvas: Canvas, x: float, y: float, _: float) -> None:
        shapes: list[Shape] = [box(x + 0.2, y + 0.2, x + width - 0.2, y + height - 0.2, fill=Fill.NONE, pen=Pen.FINE)]
        if sheet:
            shapes.append(
                Text(at=(x + width - _PAD, y + 3.4), words=sheet, size_mm=_SIZE, anchor=Anchor.END, bold=True)
            )
        step = (width - 2 * _PAD) / columns
        for number, (sample, text) in enumerate(entries):
            left, middle = x + _PAD + (number // rows) * step, y + _PAD + head + (number % rows + 0.5) * _ROW
            shapes += [moved(shape, left + _SAMPLE / 2, middle) for shape in sample]
            shapes.append(Text(at=(left + _SAMPLE + 1.2, middle + 0.9), words=text, size_mm=_SIZE, anchor=Anchor.START))
        canvas.add(Kind.LEGEND, shapes)

    return Block(names=(), width=width, up=0.0, down=height, draw=draw)


def _entries(scene: Scene, ringed: Sequence[LineId]) -> list[tuple[tuple[Shape, ...], str]]:
    text = scene.wording
    marks = scene.marks
    found = set(marks.lines.values())
    half = _SAMPLE / 2 - 0.4
    lines = (
        (Role.LIVE, "", text.legend_live),
        (Role.ZONE, text.opened, text.legend_zone),
        (Role.DEAD, "", text.legend_dead),
        (Role.TRAPPED, text.trapped, text.legend_trapped),
        (Role.UNKNOWN, text.unknown, text.legend_unknown),
    )
    entries: list[tuple[tuple[Shape, ...], str]] = []
    for role, word, meaning in lines:
        if role in found:
            points = ((-half, 0.0), (half, 0.0))
            line = band(points) if role is Role.ZONE else [Polyline(points=points, pen=Pen(role.value))]
            entries.append(((*line, *word_shapes(word, role, (0.0, 0.0))), meaning))
    if marks.locks:
        valve = (*_valves((2.6,), opened=False), box(-1.0, -2.0, 6.2, 2.0, fill=Fill.NONE, pen=Pen.HEAVY))
        entries.append(((*valve, *lozenge_shapes((-4.6, 0.0), "1", tall=2.1)), text.legend_lock))
    if marks.open_vents:
        entries.append(((down_arrow((0.0, -1.9), 3.8),), text.legend_vent))
    entries.append(((*_valves((-4.0,), opened=False), *_valves((4.0,), opened=True)), text.legend_closed))
    square = (box(-1.7, -1.7, 1.7, 1.7, fill=Fill.TINT, pen=Pen.HEAVY),)
    entries.append((square, text.legend_force))
    entries += [(ring(scene.letters[line]).shapes, scene.name(line)) for line in ringed]
    entries.append(((words((-2.0, 0.9), text.closing), words((2.0, 0.9), text.opening)), text.legend_chambers))
    return entries


def _valves(places: tuple[float, ...], *, opened: bool) -> tuple[Shape, ...]:
    return tuple(moved(shape, place, 0.0) for place in places for shape in shut_off(opened, exhausts=False).shapes)
