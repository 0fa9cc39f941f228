"""Cells side by side on a line, on as many levels as the width allows, with the words that must stand on their lines."""

from dataclasses import dataclass, field

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import Cell
from provenzero.drawing.model import Point
from provenzero.drawing.scene import Scene
from provenzero.drawing.tags import LABEL_HEIGHT, label, label_width, leader
from provenzero.network.model import LineId

_TURN = 1.6
_APART = 0.8
_BANDS = 2


@dataclass(slots=True)
class _Level:
    cells: list[Cell]
    offset: float
    tags_down: float
    words_down: float
    taken: list[tuple[float, float, int]] = field(default_factory=list)

    @property
    def down(self) -> float:
        return self.tags_down + self.words_down


@dataclass(slots=True)
class _Stretch:
    """A piece of one line from device to device: its corners, where a leader may leave it, where a word fits on it."""

    line: LineId
    points: list[Point]
    leaders: list[tuple[float, int]] = field(default_factory=list)
    free: list[tuple[float, float, int]] = field(default_factory=list)


class Row:
    """A row of cells from one end to the other. `first`: the line at its left end. `silent`: lines named elsewhere.

    `from_first`: the line begins under the first cell and not at the left end.
    """

    def __init__(
        self, scene: Scene, first: LineId, cells: list[Cell], *, limit_mm: float, silent: frozenset[LineId],
        from_first: bool = False,
    ) -> None:
        self._scene = scene
        self._first = first
        self._silent = silent
        self._begin = cells[0].left if from_first and cells else 0.0
        self._levels = self._spread(cells, limit_mm)
        self.width = max(_width(level.cells) for level in self._levels)
        if len(self._levels) > 1:
            self.width += _TURN
        self.last = cells[-1].line_out if cells else first
        self.up = max((c.up for c in self._levels[0].cells), default=0.5)
        self.out = self._levels[-1].offset
        self.down = self.out + self._levels[-1].down

    def draw(self, canvas: Canvas, x: float, y: float, end: float) -> None:
        """Draw the row from x at the height y; its last line goes on to the end."""
        begin = x + self._begin
        stretch = _Stretch(self._first, [(begin, y)], [(begin, 0)])
        clear = begin
        for number, level in enumerate(self._levels):
            here, base = x, y + level.offset
            if number:
                above = self._levels[number - 1]
                turn = y + above.offset + above.down + _TURN / 2
                right = x + self.width - 0.4
                stretch.points += [(right, y + above.offset), (right, turn), (x, turn), (x, base)]
                clear = x
            for cell in level.cells:
                at = here + cell.left
                if cell.body is not None:
                    stretch.free.append((clear, at + cell.clear, number))
                    stretch.points.append((at + cell.body[0], base))
                    self._finish(canvas, stretch, x, y)
                    stretch = _Stretch(cell.line_out, [(at + cell.body[1], base)])
                    clear = at + cell.body[1] + 1.0
                else:
                    stretch.free.append((clear, at - 1.0, number))
                    clear = at + 1.0
                cell.paint(canvas, at, base)
                here = at + cell.right
                stretch.leaders.append((here, number))
        stretch.free.append((clear, end, len(self._levels) - 1))
        stretch.points.append((end, y + self.out))
        self._finish(canvas, stretch, x, y)

    def _spread(self, cells: list[Cell], limit_mm: float) -> list[_Level]:
        groups: list[list[Cell]] = [[]]
        for cell in cells:
            if groups[-1] and _width(groups[-1]) + cell.left + cell.right > limit_mm:
                groups.append([])
            groups[-1].append(cell)
        levels: list[_Level] = []
        for group in groups:
            offset = 0.0
            if levels:
                offset = levels[-1].offset + levels[-1].down + _TURN + max(cell.up for cell in group)
            tags_down = max((cell.down for cell in group), default=0.5)
            levels.append(_Level(group, offset, tags_down, self._words_down(group)))
        return levels

    def _words_down(self, cells: list[Cell]) -> float:
        lines = {line for cell in cells for line in (cell.line_in, cell.line_out)} - self._silent
        told = sum(bool(self._scene.told(line)) for line in lines)
        return (LABEL_HEIGHT + 0.5) * min(told, _BANDS)

    def _finish(self, canvas: Canvas, stretch: _Stretch, x: float, y: float) -> None:
        canvas.wire(stretch.line, *stretch.points)
        words = self._scene.told(stretch.line)
        if not words or stretch.line in self._silent:
            return
        width = label_width(words)
        roomy = max(stretch.free, key=lambda piece: piece[1] - piece[0])
        if roomy[1] - roomy[0] >= width + _APART:
            middle = (roomy[0] + roomy[1]) / 2
            label(canvas, self._scene, stretch.line, (middle, y + self._levels[roomy[2]].offset))
            return
        at, number = stretch.leaders[0]
        level = self._levels[number]
        left = min(max(at - width / 2, x), max(x, x + self.width - width))
        band = next(b for b in range(9) if all(b != o or left > r + _APART or left + width + _APART < s for s, r, o in level.taken))
        level.taken.append((left, left + width, band))
        top = y + level.offset + level.tags_down + 0.4 + band * (LABEL_HEIGHT + 0.5)
        leader(canvas, stretch.line, (at, y + level.offset), (at, top))
        label(canvas, self._scene, stretch.line, (left + width / 2, top + LABEL_HEIGHT / 2))


def _width(cells: list[Cell]) -> float:
    return sum(cell.left + cell.right for cell in cells)
