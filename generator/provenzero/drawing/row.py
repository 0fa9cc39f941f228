"""Cells side by side on a line, on as many levels as the width allows, with room for the words that must stand on it."""

from dataclasses import dataclass, field, replace

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import Cell
from provenzero.drawing.model import Point
from provenzero.drawing.scene import Scene
from provenzero.drawing.tags import label, label_width
from provenzero.network.model import LineId

_TURN = 3.2
_APART = 0.8
_INDENT = 1.4
_OFF_DOT = 1.0


@dataclass(slots=True)
class _Level:
    cells: list[Cell]
    offset: float
    down: float


@dataclass(slots=True)
class _Stretch:
    """A piece of one line from device to device: its corners, and where a word fits on it (left, right, level)."""

    line: LineId
    points: list[Point]
    free: list[tuple[float, float, int]] = field(default_factory=list)


class Row:
    """A row of cells from one end to the other. `first`: the line at its left end. `silent`: lines named elsewhere.

    `from_first`: the line begins under the first cell and not at the left end. `run_out`: free line after the last cell.
    Afterwards `ends` tells where each cell ends if all stand on one level.
    """

    def __init__(  # noqa: PLR0913 - a row is its cells and its two ends
        self,
        scene: Scene,
        first: LineId,
        cells: list[Cell],
        *,
        limit_mm: float,
        silent: frozenset[LineId],
        from_first: bool = False,
        run_out: float = 0.0,
    ) -> None:
        self._scene = scene
        self._first = first
        self._silent = silent
        roomy = self._with_room(cells, run_out, -cells[0].left if from_first and cells else 0.0)
        self._begin = roomy[0].left if from_first and roomy else 0.0
        self._levels = self._spread(roomy, limit_mm)
        self.ends = _ends(roomy)
        self.width = max(_width(level.cells) + (_INDENT if n else 0.0) for n, level in enumerate(self._levels))
        if len(self._levels) > 1:
            self.width += _TURN
        self.last = cells[-1].line_out if cells else first
        self.up = max((c.up for c in self._levels[0].cells), default=0.5)
        self.out = self._levels[-1].offset
        self.down = self.out + self._levels[-1].down

    def draw(self, canvas: Canvas, x: float, y: float, end: float) -> None:
        """Draw the row from x at the height y; its last line goes on to the end."""
        begin = x + self._begin
        stretch = _Stretch(self._first, [(begin, y)])
        done: list[_Stretch] = []
        clear = begin
        for number, level in enumerate(self._levels):
            here, base = x, y + level.offset
            if number:
                above = self._levels[number - 1]
                turn = y + above.offset + above.down + _TURN / 2
                right = x + self.width - 0.5
                stretch.free.append((clear, right - _OFF_DOT, number - 1))
                stretch.points += [(right, y + above.offset), (right, turn), (x, turn), (x, base)]
                clear = x + _OFF_DOT
                here = x + _INDENT
            for cell in level.cells:
                at = here + cell.left
                stretch.free.append((clear, at + (cell.clear if cell.body is not None else -_OFF_DOT), number))
                clear = at + _OFF_DOT
                if cell.body is not None:
                    stretch.points.append((at + cell.body[0], base))
                    done.append(stretch)
                    stretch = _Stretch(cell.line_out, [(at + cell.body[1], base)])
                    clear = at + cell.body[1] + _OFF_DOT
                cell.paint(canvas, at, base)
                here = at + cell.right
        stretch.free.append((clear, end, len(self._levels) - 1))
        stretch.points.append((end, y + self.out))
        self._put(canvas, [*done, stretch], y)

    def _put(self, canvas: Canvas, stretches: list[_Stretch], y: float) -> None:
        best: dict[LineId, tuple[float, float, int]] = {}
        for stretch in stretches:
            canvas.wire(stretch.line, *stretch.points)
            for piece in stretch.free:
                if stretch.line not in best or piece[1] - piece[0] > best[stretch.line][1] - best[stretch.line][0]:
                    best[stretch.line] = piece
        for line, (left, right, number) in best.items():
            if line not in self._silent:
                label(canvas, self._scene, line, ((left + right) / 2, y + self._levels[number].offset))

    def _with_room(self, cells: list[Cell], run_out: float, clear: float) -> list[Cell]:
        """The cells, moved apart where a word must stand between them and does not fit."""
        found = list(cells)
        best: dict[LineId, tuple[float, int]] = {}
        line = self._first
        for place, cell in enumerate(cells):
            free = clear + cell.left + (cell.clear if cell.body is not None else -_OFF_DOT)
            if line not in best or free > best[line][0]:
                best[line] = (free, place)
            clear = cell.right - _OFF_DOT - (0.0 if cell.body is None else cell.body[1])
            line = cell.line_out
        if cells and (line not in best or clear + run_out > best[line][0]):
            best[line] = (clear + run_out, len(cells))
        for told, (free, place) in best.items():
            words = self._scene.told(told)
            short = label_width(words) + _APART - free
            if not words or told in self._silent or short <= 0.0:
                continue
            if place < len(cells):
                found[place] = replace(found[place], left=found[place].left + short)
            else:
                found[-1] = replace(found[-1], right=found[-1].right + short)
        return found

    def _spread(self, cells: list[Cell], limit_mm: float) -> list[_Level]:
        groups: list[list[Cell]] = [[]]
        for cell in cells:
            here = _reaching(cell, _width(groups[-1]) + (_INDENT if len(groups) > 1 else 0.0))
            if groups[-1] and _width(groups[-1]) + here.left + here.right > limit_mm:
                groups.append([_reaching(self._led_in(cell), _INDENT)])
            else:
                groups[-1].append(here)
        levels: list[_Level] = []
        for group in groups:
            offset = 0.0
            if levels:
                offset = levels[-1].offset + levels[-1].down + _TURN + max(cell.up for cell in group)
            levels.append(_Level(group, offset, max((cell.down for cell in group), default=0.5)))
        return levels

    def _led_in(self, cell: Cell) -> Cell:
        """The first cell of a further level, with room before it for the word on the line that comes down to it."""
        words = self._scene.told(cell.line_in)
        if not words or cell.line_in in self._silent:
            return cell
        clear = cell.clear if cell.body is not None else -_OFF_DOT
        return replace(cell, left=max(cell.left, label_width(words) + _APART + _OFF_DOT - _INDENT - clear))


def _reaching(cell: Cell, before: float) -> Cell:
    """The cell, with as much room at its left as it reaches back beyond what stands before it."""
    return replace(cell, left=max(cell.left, cell.lead - before)) if cell.lead > before + cell.left else cell


def _ends(cells: list[Cell]) -> list[float]:
    ends = [0.0]
    for cell in cells:
        ends.append(ends[-1] + cell.left + cell.right)
    return ends


def _width(cells: list[Cell]) -> float:
    return sum(cell.left + cell.right for cell in cells)
