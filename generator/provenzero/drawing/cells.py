"""The pieces of a row: valves that the fluid goes through, and fittings that stand on a line."""

from collections.abc import Callable
from dataclasses import dataclass
from itertools import pairwise

from provenzero.drawing.canvas import BOX_MARGIN, Canvas
from provenzero.drawing.model import Box
from provenzero.drawing.scene import Inline, Scene
from provenzero.drawing.symbols import (
    RING_RADIUS,
    TANK_TOP,
    Symbol,
    check_valve,
    instrument,
    outlet_to_air,
    reducer,
    relief,
    ring,
    shut_off,
    strainer,
    tank,
)
from provenzero.drawing.tags import (
    CORNER,
    GAP,
    LABEL_HEIGHT,
    LOCK_HALF,
    VENT_HEIGHT,
    Tag,
    label,
    label_width,
    lock_half,
    locked_tag,
    lozenge,
    tag,
    vent_mark,
    vent_width,
)
from provenzero.network.model import LineId
from provenzero.unit.model import (
    ATMOSPHERE,
    RESERVOIR,
    Bleed,
    CheckValve,
    Fitting,
    Instrument,
    Reducer,
    Relief,
    Strainer,
    Valve,
)

LEAD = 1.3
ROOM = 0.6
RISE = 5.8
_DROP = 1.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Cell:
    """A piece of a row about a point on its line.

    `body`: where the line stops, None for what only stands on it. `clear`: up to where, from the left, nothing is near
    the line. `lead`: how far it reaches back under the cells before it.
    """

    left: float
    right: float
    up: float
    down: float
    line_in: LineId
    line_out: LineId
    body: tuple[float, float] | None
    clear: float
    paint: Callable[[Canvas, float, float], None]
    lead: float = 0.0


def symbol_of(scene: Scene, element: Inline) -> Symbol:
    """The symbol of what the fluid goes through, where it stands."""
    match element:
        case Valve():
            return shut_off(scene.position(element.tag) == "open", element.exhausts)
        case CheckValve():
            return check_valve()
        case Strainer():
            return strainer()
        case Reducer():
            return reducer()


def through(scene: Scene, element: Inline, *, lock_below: bool = False) -> Cell:
    """A cell of what the fluid goes through."""
    return device_cell(scene, element.tag, symbol_of(scene, element), *scene.ends(element.tag), lock_below=lock_below)


def device_cell(  # noqa: PLR0913 - a device is its tag, its symbol and its two lines
    scene: Scene, name: str, symbol: Symbol, line_in: LineId, line_out: LineId, *, lock_below: bool = False
) -> Cell:
    """A cell of any device that the line goes through, its tag over it, its lock beside the tag or at the corner below."""
    lock, where = scene.lock(name), scene.vent(name)
    low = None if not lock_below else lock
    part = Part(name, symbol, tag(name) if lock_below else locked_tag(scene, name), boxed=lock is not None)
    body = part.body
    mark = 0.0 if where is None else vent_width(scene, where)
    left = max(part.left + ROOM, LEAD - symbol.body.left, mark / 2)
    right = max(part.right + ROOM, LEAD + symbol.body.right, mark / 2)
    corner = 0.0
    if lock is not None:
        corner = CORNER + lock_half(lock)
        left = max(left, corner - body.left)
    up = part.words.reach + (0.0 if where is None else GAP + VENT_HEIGHT)

    def paint(canvas: Canvas, x: float, y: float) -> None:
        placed = part.paint(canvas, (x, y), below=False)
        if low is not None:
            lozenge(canvas, (placed.left - CORNER, placed.bottom + CORNER), low, name)
        if where is not None:
            vent_mark(canvas, scene, where, (x - mark / 2, placed.top - up), name)

    return Cell(
        left=left,
        right=right,
        up=up - body.top,
        down=body.bottom + (0.0 if low is None else CORNER + LOCK_HALF),
        line_in=line_in,
        line_out=line_out,
        body=(symbol.body.left, symbol.body.right),
        clear=body.left - corner,
        paint=paint,
    )


def standing(scene: Scene, fitting: Fitting, line: LineId, *, below: bool = False) -> Cell:
    """A cell of a fitting that stands on a line (or hangs under it)."""
    match fitting:
        case Instrument():
            return _instrument(scene, fitting, line, below=below)
        case Bleed():
            return _branch(scene, [_shut(scene, fitting.valve)], line, LineId(fitting.to), below=below)
        case Relief():
            return _branch(
                scene, [Part(fitting.tag, relief(), tag(fitting.tag))], line, LineId(fitting.to), below=below
            )


@dataclass(frozen=True, slots=True)
class Part:
    """A device that is put with its tag over or under it, and its lock at the corner of its box."""

    name: str
    symbol: Symbol
    words: Tag
    boxed: bool = False

    @property
    def body(self) -> Box:
        """The body, with the box of an isolation point."""
        return self.symbol.body.grown(BOX_MARGIN) if self.boxed else self.symbol.body

    @property
    def left(self) -> float:
        """Room to the left of the origin [mm]."""
        return max(-self.body.left, self.words.left(self.body))

    @property
    def right(self) -> float:
        """Room to the right of the origin [mm]."""
        return max(self.body.right, self.words.right(self.body))

    def paint(self, canvas: Canvas, at: tuple[float, float], *, below: bool) -> Box:
        """Put the device; returns its body."""
        placed = canvas.symbol(self.symbol, at, self.name, boxed=self.boxed)
        (self.words.below if below else self.words.above)(canvas, at[0], placed, self.name)
        return placed


def part_of(scene: Scene, name: str, symbol: Symbol) -> Part:
    """A device with its tag, boxed and numbered if it is locked."""
    return Part(name, symbol, locked_tag(scene, name), boxed=scene.lock(name) is not None)


def _instrument(scene: Scene, item: Instrument, line: LineId, *, below: bool) -> Cell:
    dial = Part(item.tag, instrument(item.kind), tag(item.tag))
    if item.valve is not None:
        return _branch(scene, [_shut(scene, item.valve), dial], line, None, below=below)
    sign = 1 if below else -1
    room = dial.right + ROOM

    def paint(canvas: Canvas, x: float, y: float) -> None:
        body = dial.paint(canvas, (x, y + sign * RISE), below=below)
        canvas.wire(line, (x, y), (x, body.top if below else body.bottom))
        canvas.dot(line, (x, y))

    return _on_line(line, room, room, RISE - dial.body.top + dial.words.reach, below=below, paint=paint)


def _shut(scene: Scene, valve: Valve) -> Part:
    symbol = shut_off(scene.position(valve.tag) == "open", valve.exhausts)
    return part_of(scene, valve.tag, symbol)


def _on_line(  # noqa: PLR0913 - a cell is its extents and its paint
    line: LineId, left: float, right: float, reach: float, *, below: bool, paint: Callable[[Canvas, float, float], None]
) -> Cell:
    return Cell(
        left=left,
        right=right,
        up=1.0 if below else reach,
        down=reach if below else 1.0,
        line_in=line,
        line_out=line,
        body=None,
        clear=0.0,
        paint=paint,
    )


def _branch(scene: Scene, parts: list[Part], line: LineId, to: LineId | None, *, below: bool) -> Cell:
    """A stub from a line, then devices side by side, then an outlet or nothing."""
    sign = 1 if below else -1
    places = [max(1.3 - parts[0].body.left, 0.4 + parts[0].left if below else 0.0)]
    for one, other in pairwise(parts):
        apart = max(one.right + ROOM + other.left, one.body.right + LEAD - other.body.left)
        places.append(places[-1] + apart)
    beside = outlet_half(to)
    out = places[-1] + parts[-1].body.right + beside + (0.2 if to in (RESERVOIR, ATMOSPHERE) else 1.0)
    if below and to is not None:
        out = max(out, places[-1] + parts[-1].right + beside + ROOM)
    where = scene.vent(parts[0].name)
    stub = scene.ends(parts[0].name)[1] if to is None else None
    told = scene.told(stub) if stub is not None else ""
    edge = max((p.body.bottom if below else -p.body.top) + p.words.reach for p in parts)
    if below and to is not None:
        edge = max(edge, 4.6)
    mark = 0.0 if where is None else vent_width(scene, where) + GAP
    width = mark + (label_width(told) if told else 0.0)
    right = max(out + beside if to is not None else 0.0, places[-1] + parts[-1].right, width) + ROOM

    def paint(canvas: Canvas, x: float, y: float) -> None:
        level = y + sign * RISE
        canvas.dot(line, (x, y))
        here, points = line, [(x, y), (x, level)]
        for place, part in zip(places, parts, strict=True):
            canvas.wire(here, *points, (x + place + part.symbol.body.left, level))
            part.paint(canvas, (x + place, level), below=below)
            here = stub or to or line
            points = [(x + place + part.symbol.body.right, level)]
        if to is not None and to in (RESERVOIR, ATMOSPHERE):
            canvas.wire(to, *points, (x + out, level), (x + out, level + _DROP))
            outlet(canvas, scene, to, (x + out, level + _DROP))
        elif to is not None:
            canvas.wire(to, *points, (x + out - beside, level))
            outlet(canvas, scene, to, (x + out, level - RING_RADIUS))
        beyond = level + sign * (edge + GAP)
        if where is not None:
            vent_mark(canvas, scene, where, (x, beyond if below else beyond - VENT_HEIGHT), parts[0].name)
        if stub is not None and told:
            label(canvas, scene, stub, (x + mark + label_width(told) / 2, beyond + sign * LABEL_HEIGHT / 2))

    extra = GAP + max(0.0 if where is None else VENT_HEIGHT, LABEL_HEIGHT if told else 0.0)
    return _on_line(
        line,
        max(parts[0].left - places[0], 0.5) + ROOM,
        right,
        RISE + edge + (extra if width else 0.0),
        below=below,
        paint=paint,
    )


def outlet_half(to: LineId | None) -> float:
    """Half the width of the end of a line that lets out [mm]."""
    return tank().body.right if to in (RESERVOIR, ATMOSPHERE) else RING_RADIUS


def outlet(canvas: Canvas, scene: Scene, to: LineId, at: tuple[float, float], *names: str) -> None:
    """Put the end of a line that lets out: the tank, the air, or the ring of the line it goes to."""
    centre = (at[0], at[1] + TANK_TOP)
    if to == RESERVOIR:
        canvas.symbol(tank(), centre, *names)
    elif to == ATMOSPHERE:
        canvas.symbol(outlet_to_air(), centre, *names)
    else:
        canvas.symbol(ring(scene.letters.get(to, "?")), (at[0], at[1] + RING_RADIUS), *names)
