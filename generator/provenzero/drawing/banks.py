"""Banks of bottles as rows from the bottles to the line they are attached to, and the row that names the header."""

from dataclasses import dataclass

from provenzero.drawing.block import Block, Tap
from provenzero.drawing.canvas import BOX_MARGIN, Canvas
from provenzero.drawing.cells import ROOM, Cell, standing, through
from provenzero.drawing.marks import Vent
from provenzero.drawing.model import Role
from provenzero.drawing.plates import named
from provenzero.drawing.pumps import fittings
from provenzero.drawing.row import Row
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import BOTTLE_HALF, BOTTLE_HEIGHT, bottle, gas_valve, upright_shut_off
from provenzero.drawing.tags import (
    LOCK_HALF,
    Tag,
    label,
    label_width,
    leader,
    lock_half,
    lozenge,
    tag,
    vent_mark,
    vent_width,
)
from provenzero.network.model import LineId
from provenzero.unit.model import HEADER, Bank

_STEM = 1.7
_NUB = 1.2
_VALVE_TALL = 5.6
_BESIDE = 3.6


@dataclass(frozen=True, slots=True)
class _Bottles:
    """Neighbouring bottles of which the same is to be shown."""

    first: int
    last: int
    gas: Role
    fluid: Role
    gas_position: str
    position: str
    gas_lock: int | None
    lock: int | None
    vent: Vent | None


def bank_block(scene: Scene, item: Bank, limit_mm: float, silent: frozenset[LineId]) -> Block:
    """One bank: bottles at the left, then bleed and gauges, then the isolation valve."""
    main = LineId(item.attached_to)
    fluid = scene.port(item.tag, "fluid") or main
    cells = [_bottles_cell(scene, item, group, fluid) for group in _groups(scene, item)]
    if item.bleed is not None:
        cells.append(standing(scene, item.bleed, fluid))
    cells += fittings(scene, item.fittings, fluid)
    if item.isolation is not None:
        valve = through(scene, item.isolation)
        cells.append(_turned(valve))
    row = Row(scene, fluid, cells, limit_mm=limit_mm, silent=silent, from_first=True)
    return Block(
        names=(item.tag,),
        width=row.width,
        up=row.up,
        down=row.down,
        right=(Tap(main, row.out),),
        roomy=row.out == 0.0,
        draw=row.draw,
    )


def header_block(scene: Scene, limit_mm: float, silent: frozenset[LineId]) -> Block:
    """The row that names the accumulator header, with the fittings that stand on it."""
    line = LineId(HEADER)
    cells = [named(scene, line), *fittings(scene, scene.unit.header_fittings, line)]
    row = Row(scene, line, cells, limit_mm=limit_mm, silent=silent)
    return Block(names=(HEADER,), width=row.width, up=row.up, down=row.down, right=(Tap(line, row.out),), draw=row.draw)


def _turned(cell: Cell) -> Cell:
    """The same cell met from its other side."""
    return Cell(
        left=cell.left,
        right=cell.right,
        up=cell.up,
        down=cell.down,
        line_in=cell.line_out,
        line_out=cell.line_in,
        body=cell.body,
        clear=cell.clear,
        paint=cell.paint,
    )


def _groups(scene: Scene, item: Bank) -> list[_Bottles]:
    found: list[_Bottles] = []
    for number in range(1, item.bottles + 1):
        key = f"{item.tag}/{number}"
        valve = item.bottle_valves[number - 1].tag if item.bottle_valves else None
        here = _Bottles(
            number,
            number,
            scene.marks.role(LineId(f"{key}.gas")),
            scene.marks.role(scene.port(key, "fluid") or LineId(item.attached_to)),
            scene.position(f"{key}-gas"),
            "" if valve is None else scene.position(valve),
            scene.lock(f"{key}-gas"),
            None if valve is None else scene.lock(valve),
            scene.vent(f"{key}-gas"),
        )
        if found and _same(found[-1], here):
            here = _Bottles(
                found.pop().first, number, here.gas, here.fluid, here.gas_position, here.position, None, None, here.vent
            )
        found.append(here)
    return found


def _same(one: _Bottles, other: _Bottles) -> bool:
    if any(lock is not None for lock in (one.gas_lock, one.lock, other.gas_lock, other.lock)):
        return False
    shown = (one.gas, one.fluid, one.gas_position, one.position, one.vent)
    return shown == (other.gas, other.fluid, other.gas_position, other.position, other.vent)


def _bottles_cell(scene: Scene, item: Bank, group: _Bottles, fluid: LineId) -> Cell:
    numbers = range(group.first, group.last + 1)
    keys = [f"{item.tag}/{number}" for number in numbers]
    side = scene.port(keys[0], "fluid") or fluid
    valves = [item.bottle_valves[number - 1].tag for number in numbers] if item.bottle_valves else []
    words = _words(item, group)
    valve_words = _valve_words(valves)
    stem = _STEM + (BOX_MARGIN + 0.2 if group.lock is not None else 0.0)
    foot = stem + (_VALVE_TALL + 1.0 + (BOX_MARGIN if group.lock is not None else 0.0) if valves else 0.0)
    top = foot + BOTTLE_HEIGHT + _NUB + 2.2
    margin = BOX_MARGIN if group.gas_lock is not None else 0.0
    shut_locked = group.lock is not None
    beside = _beside(scene, group, LineId(f"{keys[0]}.gas"))
    told = scene.told(side) if valves else ""
    beneath = _BESIDE + label_width(told) if told else 0.0
    left = (
        max(words.width + BOTTLE_HALF, valve_words.width + 2.8 + (2 * LOCK_HALF + 1.4 if shut_locked else 0.0))
        + 2 * ROOM
    )

    def paint(canvas: Canvas, x: float, y: float) -> None:
        canvas.dot(fluid, (x, y))
        if valves:
            canvas.wire(fluid, (x, y), (x, y - stem))
            body = canvas.symbol(
                upright_shut_off(group.position == "open"), (x, y - stem - _VALVE_TALL / 2), *valves, boxed=shut_locked
            )
            canvas.wire(side, (x, y - stem - _VALVE_TALL), (x, y - foot))
            canvas.alike(side, [LineId(f"{key}.fluid") for key in keys[1:]])
            if told:
                middle = y - foot + 0.5
                leader(canvas, side, (x, middle), (x + _BESIDE, middle))
                label(canvas, scene, side, (x + _BESIDE + label_width(told) / 2, middle))
            _beside_valve(canvas, group, valve_words, body, valves)
        else:
            canvas.wire(side, (x, y), (x, y - foot))
        canvas.symbol(bottle(item.separator), (x, y - foot), *keys, *([item.tag] if group.first == 1 else []))
        words.words(canvas, x - BOTTLE_HALF - ROOM - words.width, y - foot - 6.6, *keys)
        nub = y - foot - BOTTLE_HEIGHT
        canvas.wire(LineId(f"{keys[0]}.gas"), (x, nub), (x, nub - _NUB))
        canvas.alike(LineId(f"{keys[0]}.gas"), [LineId(f"{key}.gas") for key in keys[1:]])
        gas = [f"{key}-gas" for key in keys]
        body = canvas.symbol(
            gas_valve(group.gas_position == "venting"), (x, nub - _NUB - 1.1), *gas, boxed=group.gas_lock is not None
        )
        _beside_gas(canvas, scene, group, (body.right, nub - _NUB - 1.1), gas)

    return Cell(
        left=left,
        right=max(BOTTLE_HALF, 0.9 + margin + beside, beneath) + ROOM,
        up=max(top + margin, top + 2.0 if beside else 0.0),
        down=1.0,
        line_in=fluid,
        line_out=fluid,
        body=None,
        clear=0.0,
        paint=paint,
    )


def _valve_words(valves: list[str]) -> Tag:
    """The tag of a bottle valve, or the first and the last of several."""
    if len(valves) > 1:
        return Tag((f"{valves[0]} ..", valves[-1]))
    return tag(valves[0]) if valves else Tag(())


def _words(item: Bank, group: _Bottles) -> Tag:
    count = group.last - group.first + 1
    if count == item.bottles:
        return Tag((item.tag, f"{count} \u00d7"), bold=True)
    span = f"{group.first}" if count == 1 else f"{group.first}-{group.last}"
    return Tag((f"{item.tag}/", span), bold=True)


def _beside(scene: Scene, group: _Bottles, gas: LineId) -> float:
    """Room right of the gas valve for its lock, the word on the gas and the mark of an open vent [mm]."""
    told = scene.told(gas)
    return (
        (0.0 if group.gas_lock is None else 2 * lock_half(group.gas_lock) + ROOM)
        + (label_width(told) + 2 * ROOM if told else 0.0)
        + (0.0 if group.vent is None else vent_width(scene, group.vent) + ROOM)
    )


def _beside_gas(canvas: Canvas, scene: Scene, group: _Bottles, at: tuple[float, float], names: list[str]) -> None:
    x, y = at
    gas = LineId(names[0].removesuffix("-gas") + ".gas")
    told = scene.told(gas)
    if told:
        width = label_width(told)
        leader(canvas, gas, (x, y), (x + ROOM, y))
        label(canvas, scene, gas, (x + ROOM + width / 2, y))
        x += width + 2 * ROOM
    if group.gas_lock is not None:
        lozenge(canvas, (x + lock_half(group.gas_lock), y), group.gas_lock, *names)
        x += 2 * lock_half(group.gas_lock) + ROOM
    if group.vent is not None:
        vent_mark(canvas, scene, group.vent, (x, y - 2.8), *names)


def _beside_valve(
    canvas: Canvas, group: _Bottles, words: Tag, body: tuple[float, float, float, float], names: list[str]
) -> None:
    left, top, _, bottom = body
    middle = (top + bottom) / 2
    if group.lock is not None:
        half = lock_half(group.lock)
        left -= 2 * half + 0.3
        lozenge(canvas, (left + half, middle), group.lock, *names)
    words.words(canvas, left - ROOM - words.width, middle - words.height / 2, *names)
