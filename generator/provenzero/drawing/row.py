"""Cells side by side on a line, on as many levels as the width allows, with the words that must stand on their lines."""

from dataclasses import dataclass

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import Cell
from provenzero.drawing.model import Point
from provenzero.drawing.scene import Scene
from provenzero.drawing.tags import LABEL_HEIGHT, label, label_width, leader
from provenzero.network.model import LineId

_TURN = 1.4
_TIGHT = 0.8


@dataclass(frozen=True, slots=True)
class _Level:
    cells: tuple[Cell, ...]
    offset: float
    down: float


@dataclass(slots=True)
class _Stretch:
    line: LineId
    points: list[Point]
    boundaries: list[Point]


class Row:
    """A row of cells from one end to the other. `first`: the line at its left end. `silent`: lines named elsewhere."""

    def __init__(
        self, scene: Scene, first: LineId, cells: list[Cell], *, limit_mm: float, silent: frozenset[LineId]
    ) -> None:
        self._scene = scene
        self._first = first
        self._silent = silent
        self._levels = self._spread(cells, limit_mm)
        self.width = max((_width(level.cells) for level in self._levels), default=0.0)
        if len(self._levels) > 1:
            self.width += _TURN
        self.last = cells[-1].line_out if cells else first
        self.up = max((c.up for c in self._levels[0].cells), default=0.4)
        self.down = self._levels[-1].offset + self._levels[-1].down

    @property
    def out(self) -> float:
        """How far under the first level the row ends [mm]."""
        return self._levels[-1].offset

    def draw(self, canvas: Canvas, x: float, y: float, end: float) -> None:
        """Draw the row from x at the height y; its last line goes on to the end."""
        stretch = _Stretch(self._first, [(x, y)], [])
        for number, level in enumerate(self._levels):
            here, base = x, y + level.offset
            if number:
                before = self._levels[number - 1]
                turn = y + before.offset + before.down + _TURN / 2
                right = x + self.width - 0.3
                stretch.points += [(right, y + before.offset), (right, turn), (x, turn), (x, base)]
            for cell in level.cells:
                here += cell.left
                if cell.body is not None:
                    stretch.points.append((here + cell.body[0], base))
                    self._finish(canvas, stretch)
                    stretch = _Stretch(cell.line_out, [(here + cell.body[1], base)], [])
                cell.paint(canvas, here, base)
                here += cell.right
                stretch.boundaries.append((here, base))
        stretch.points.append((end, y + self.out))
        self._finish(canvas, stretch)

    def _spread(self, cells: list[Cell], limit_mm: float) -> list[_Level]:
        groups: list[list[Cell]] = [[]]
        for cell in cells:
            if groups[-1] and _width(tuple(groups[-1])) + cell.left + cell.right > limit_mm:
                groups.append([])
            groups[-1].append(cell)
        levels: list[_Level] = []
        for group in groups:
            offset = 0.0
            if levels:
                offset = levels[-1].offset + levels[-1].down + _TURN + max(cell.up for cell in group)
            down = max((cell.down for cell in group), default=0.4)
            levels.append(_Level(tuple(group), offset, down + self._words_height(group)))
        return levels

    def _words_height(self, cells: list[Cell]) -> float:
        lines = {line for cell in cells for line in (cell.line_in, cell.line_out)} - self._silent
        told = sum(bool(self._scene.told(line)) for line in lines)
        return 0.0 if not told else (LABEL_HEIGHT + 0.6) * min(told, 2)

    def _finish(self, canvas: Canvas, stretch: _Stretch) -> None:
        canvas.wire(stretch.line, *stretch.points)
        words = self._scene.told(stretch.line)
        if not words or stretch.line in self._silent:
            return
        width = label_width(words) + _TIGHT
        ...


def _width(cells: tuple[Cell, ...]) -> float:
    return sum(cell.left + cell.right for cell in cells)
