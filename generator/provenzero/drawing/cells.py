"""The pieces of a row: valves that the fluid goes through, and fittings that stand on a line."""

from collections.abc import Callable
from dataclasses import dataclass
from itertools import pairwise

from provenzero.drawing.canvas import BOX_MARGIN, Canvas
from provenzero.drawing.model import Box
from provenzero.drawing.scene import Inline, Scene
from provenzero.drawing.symbols import (
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
    LABEL_HEIGHT,
    LOCK_HALF,
    VENT_HEIGHT,
    Tag,
    label,
    label_width,
    locked_tag,
    lock_half,
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

LEAD = 2.2
ROOM = 0.7
RISE = 6.4
_NARROWEST = 5.8


@dataclass(frozen=True, slots=True, kw_only=True)
class Cell:
    """A piece of a row about a point on its line.

    `body`: where the line stops, None for what only stands on it. `clear`: up to where, from the left, nothing is near the line.
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


def through(scene: Scene, element: Inline, *, tags_above: bool = False) -> Cell:
    """A cell of what the fluid goes through, its tag under it or over it, its lock at the opposite corner."""
    return device_cell(scene, element.tag, symbol_of(scene, element), *scene.ends(element.tag), tags_above=tags_above)


def device_cell(  # noqa: PLR0913 - a device is its tag, its symbol and its two lines
    scene: Scene, name: str, symbol: Symbol, line_in: LineId, line_out: LineId, *, tags_above: bool = False
) -> Cell:
    """A cell of any device with a symbol that the line goes through."""
    words, lock, where = tag(name), scene.lock(name), scene.vent(name)
    body = symbol.body.grown(BOX_MARGIN) if lock is not None else symbol.body
    half = max(words.width / 2 + ROOM, _NARROWEST)
    beyond = 0.5 + words.height + (0.0 if where is None else 0.5 + VENT_HEIGHT)
    corner = LOCK_HALF + 0.6 if lock is not None else 0.0
    left = half if lock is None else max(half, 0.6 - body.left + lock_half(lock))
    right = half if where is None else max(half, vent_width(scene, where) / 2 + ROOM)

    def paint(canvas: Canvas, x: float, y: float) -> None:
        canvas.symbol(symbol, (x, y), name, boxed=lock is not None)
        edge = y + (body.top if tags_above else body.bottom)
        (words.above if tags_above else words.below)(canvas, x, edge, name)
        if lock is not None:
            at = (x + body.left - 0.6, y + (body.bottom + 0.6 if tags_above else body.top - 0.6))
            lozenge(canvas, at, lock, name)
        if where is not None:
            top = edge - beyond if tags_above else edge + 1.0 + words.height
            vent_mark(canvas, scene, where, (x - vent_width(scene, where) / 2, top), name)

    return Cell(
        left=max(left, right if where is not None else 0.0), right=right,
        up=beyond - body.top if tags_above else corner - body.top,
        down=corner + body.bottom if tags_above else body.bottom + beyond,
        line_in=line_in, line_out=line_out, body=(symbol.body.left, symbol.body.right),
        clear=body.left if lock is None else -left, paint=paint,
    )


def standing(scene: Scene, fitting: Fitting, line: LineId, *, below: bool = False) -> Cell:
    """A cell of a fitting that stands on a line (or hangs under it)."""
    match fitting:
        case Instrument():
            return _instrument(scene, fitting, line, below=below)
        case Bleed():
            valve = fitting.valve
            parts = [_Part(valve.tag, shut_off(scene.position(valve.tag) == "open", valve.exhausts), locked_tag(scene, valve.tag))]
            return _branch(scene, parts, line, LineId(fitting.to), below=below)
        case Relief():
            return _branch(scene, [_Part(fitting.tag, relief(), tag(fitting.tag))], line, LineId(fitting.to), below=below)


@dataclass(frozen=True, slots=True)
class _Part:
    name: str
    symbol: Symbol
    words: Tag

    @property
    def left(self) -> float:
        return max(-self.symbol.body.left, self.words.width / 2)

    @property
    def right(self) -> float:
        return max(self.symbol.body.right, self.words.width / 2)


def _instrument(scene: Scene, item: Instrument, line: LineId, *, below: bool) -> Cell:
    dial = _Part(item.tag, instrument(item.kind), tag(item.tag))
    if item.valve is not None:
        valve = item.valve
        shut = _Part(valve.tag, shut_off(scene.position(valve.tag) == "open", valve.exhausts), locked_tag(scene, valve.tag))
        return _branch(scene, [shut, dial], line, None, below=below)
    sign = 1 if below else -1
    room = dial.right + ROOM
    reach = RISE - dial.symbol.body.top + 0.5 + dial.words.height

    def paint(canvas: Canvas, x: float, y: float) -> None:
        at = (x, y + sign * RISE)
        body = canvas.symbol(dial.symbol, at, dial.name)
        canvas.wire(line, (x, y), (x, body.top if below else body.bottom))
        canvas.dot(line, (x, y))
        _words(canvas, dial, x, body, below=below)

    return _standing_cell(line, room, room, reach, below=below, paint=paint)


def _words(canvas: Canvas, part: _Part, x: float, body: Box, *, below: bool) -> None:
    if below:
        part.words.below(canvas, x, body.bottom, part.name)
    else:
        part.words.above(canvas, x, body.top, part.name)


def _standing_cell(
    line: LineId, left: float, right: float, reach: float, *, below: bool, paint: Callable[[Canvas, float, float], None]
) -> Cell:
    return Cell(
        left=left, right=right, up=1.0 if below else reach, down=reach if below else 1.0, line_in=line, line_out=line,
        body=None, clear=0.0, paint=paint,
    )


def _branch(scene: Scene, parts: list[_Part], line: LineId, to: LineId | None, *, below: bool) -> Cell:
    """A stub from a line, then devices side by side, then an outlet or nothing."""
    sign = 1 if below else -1
    margin = max(BOX_MARGIN if part.words.lock is not None else 0.0 for part in parts)
    places = [max(1.6 + margin - parts[0].symbol.body.left, 0.0)]
    for one, other in pairwise(parts):
        places.append(places[-1] + max(one.right + ROOM + other.left, one.symbol.body.right + LEAD - other.symbol.body.left))
    last = parts[-1]
    out = places[-1] + last.symbol.body.right + margin + 2.1
    ends = [scene.ends(part.name)[1] for part in parts if part.name in scene.network.devices]
    where = next((v for v in (scene.vent(part.name) for part in parts) if v is not None), None)
    stub = ends[0] if to is None and scene.told(ends[0]) else None
    edge = max(max(-p.symbol.body.top, p.symbol.body.bottom) for p in parts) + margin
    if below and to is not None:
        edge = max(edge, 4.2)
    tall = max(part.words.height for part in parts) + 0.5
    extra = (0.5 + VENT_HEIGHT if where is not None else 0.0) + (0.5 + LABEL_HEIGHT if stub is not None else 0.0)
    widths = [vent_width(scene, where)] if where is not None else []
    widths += [label_width(scene.told(stub))] if stub is not None else []
    right = max(out + 1.9 if to is not None else 0.0, places[-1] + last.right, *widths) + ROOM

    def paint(canvas: Canvas, x: float, y: float) -> None:
        level = y + sign * RISE
        canvas.dot(line, (x, y))
        here, at = line, x
        corner = [(x, y)]
        for place, part in zip(places, parts, strict=True):
            canvas.symbol(part.symbol, (x + place, level), part.name, boxed=part.words.lock is not None)
            canvas.wire(here, *corner, (at, level), (x + place + part.symbol.body.left, level))
            if part.name in scene.network.devices:
                here = scene.ends(part.name)[1]
            at = x + place + part.symbol.body.right
            corner = []
            far = level + sign * edge
            (part.words.below if below else part.words.above)(canvas, x + place, far, part.name)
        if to is not None:
            canvas.wire(to, (at, level), (x + out, level), (x + out, level + 1.4))
            outlet(canvas, scene, to, (x + out, level + 1.4))
        beyond = level + sign * (edge + tall)
        if where is not None:
            top = beyond + 0.5 if below else beyond - 0.5 - VENT_HEIGHT
            vent_mark(canvas, scene, where, (x, top), parts[0].name)
        if stub is not None:
            middle = beyond + sign * (extra - LABEL_HEIGHT / 2)
            label(canvas, scene, stub, (x + label_width(scene.told(stub)) / 2, middle))

    left = max(parts[0].left - places[0], 0.5) + ROOM
    return _standing_cell(line, left, right, RISE + edge + tall + extra, below=below, paint=paint)


def outlet(canvas: Canvas, scene: Scene, to: LineId, at: tuple[float, float], *names: str) -> None:
    """Put the end of a line that lets out: the tank, the air, or the ring of the line it goes to."""
    centre = (at[0], at[1] + TANK_TOP)
    if to == RESERVOIR:
        canvas.symbol(tank(), centre, *names)
    elif to == ATMOSPHERE:
        canvas.symbol(outlet_to_air(), centre, *names)
    else:
        canvas.symbol(ring(scene.letters.get(to, "?")), (at[0], at[1] + 1.9), *names)
