"""Collects what is drawn on one sheet: lines of the circuit, symbols, tags and marks, and puts them in drawing order."""

from collections.abc import Iterable, Mapping
from itertools import pairwise

from provenzero.drawing.model import (
    Box,
    Circle,
    Fill,
    Group,
    Kind,
    Pen,
    Point,
    Polyline,
    Rect,
    Role,
    Shape,
    moved,
)
from provenzero.drawing.symbols import Symbol
from provenzero.network.model import LineId

BOX_MARGIN = 0.9
DOT = 0.65
BAND = 1.9
CORE = 1.2
_HATCH_STEP = 1.2
_SAME_MM = 1e-6
_ORDER = (Role.ZONE, Role.DEAD, Role.VENTED, Role.NEUTRAL, Role.UNKNOWN, Role.TRAPPED, Role.LIVE)
_KINDS = (Kind.LINE, Kind.SYMBOL, Kind.MARK, Kind.TAG, Kind.LABEL, Kind.LEGEND)


class Canvas:
    """One sheet while it is being drawn."""

    def __init__(self, roles: Mapping[LineId, Role]) -> None:
        self._roles = roles
        self._wires: dict[LineId, list[tuple[Point, ...]]] = {}
        self._dots: dict[LineId, list[Point]] = {}
        self._alike: dict[LineId, list[LineId]] = {}
        self._groups: list[Group] = []

    def wire(self, line: LineId, *points: Point) -> None:
        """Draw a piece of a line of the circuit through the points, which lie straight above or beside each other."""
        kept = [points[0]]
        for point in points[1:]:
            if abs(point[0] - kept[-1][0]) + abs(point[1] - kept[-1][1]) > _SAME_MM:
                kept.append(point)
        if len(kept) > 1:
            self._wires.setdefault(line, []).append(tuple(kept))

    def alike(self, line: LineId, others: Iterable[LineId]) -> None:
        """Say that the pieces of a line also stand for others of which the same is to be shown."""
        self._alike.setdefault(line, []).extend(others)

    def dot(self, line: LineId, at: Point) -> None:
        """Mark that lines are joined here."""
        self._dots.setdefault(line, []).append(at)

    def symbol(self, symbol: Symbol, at: Point, *names: str, boxed: bool = False) -> Box:
        """Put a symbol; a boxed one is an isolation point. Returns the body."""
        body = symbol.body.moved(*at)
        shapes: list[Shape] = [moved(shape, *at) for shape in symbol.shapes]
        role = Role.NEUTRAL
        if boxed:
            body = body.grown(BOX_MARGIN)
            frame = Rect(
                at=(body.left, body.top), width=body.right - body.left, height=body.bottom - body.top, pen=Pen.HEAVY
            )
            shapes.append(frame)
            role = Role.ISOLATION
        self._groups.append(Group(kind=Kind.SYMBOL, role=role, names=names, shapes=tuple(shapes), body=body))
        return body

    def add(self, kind: Kind, shapes: Iterable[Shape], *names: str, role: Role = Role.NEUTRAL) -> None:
        """Put shapes of another kind: a tag, a label, a mark, a part of the legend."""
        self._groups.append(Group(kind=kind, role=role, names=names, shapes=tuple(shapes)))

    def groups(self) -> tuple[Group, ...]:
        """Everything, lines first, the opened ones lowest."""
        lines = [self._line(line, pieces) for line, pieces in self._wires.items()]
        lines.sort(key=lambda group: _ORDER.index(group.role))
        rest = sorted(self._groups, key=lambda group: _KINDS.index(group.kind))
        return (*lines, *rest)

    def _line(self, line: LineId, pieces: list[tuple[Point, ...]]) -> Group:
        role = self._roles.get(line, Role.NEUTRAL)
        shapes: list[Shape] = []
        if role is Role.ZONE:
            shapes += [Polyline(points=piece, pen=Pen.ZONE_EDGE) for piece in pieces]
            shapes += [Polyline(points=piece, pen=Pen.ZONE_CORE) for piece in pieces]
            for piece in pieces:
                shapes += _hatch(piece)
        else:
            shapes += [Polyline(points=piece, pen=Pen(role.value)) for piece in pieces]
        radius = DOT if role is not Role.ZONE else DOT + 0.2
        shapes += [Circle(centre=at, radius=radius, pen=Pen.NONE, fill=Fill.INK) for at in self._dots.get(line, ())]
        return Group(kind=Kind.LINE, role=role, names=(line, *self._alike.get(line, ())), shapes=tuple(shapes))


def band(points: tuple[Point, ...]) -> list[Shape]:
    """One opened piece of line: a double outline with hatching."""
    return [Polyline(points=points, pen=Pen.ZONE_EDGE), Polyline(points=points, pen=Pen.ZONE_CORE), *_hatch(points)]


def _hatch(points: tuple[Point, ...]) -> list[Shape]:
    """Slanted strokes across a band, within its core."""
    strokes: list[Shape] = []
    half = CORE / 2
    for (x1, y1), (x2, y2) in pairwise(points):
        length = abs(x2 - x1) + abs(y2 - y1)
        ux, uy = (x2 - x1) / length, (y2 - y1) / length
        count = max(1, int((length - CORE) / _HATCH_STEP) + 1)
        start = (length - (count - 1) * _HATCH_STEP) / 2
        for number in range(count):
            x, y = x1 + ux * (start + number * _HATCH_STEP), y1 + uy * (start + number * _HATCH_STEP)
            strokes.append(Polyline(points=((x - half, y + half), (x + half, y - half)), pen=Pen.HATCH))
    return strokes
