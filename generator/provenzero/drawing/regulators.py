"""Regulators and bypasses as rows from the line that feeds them, and back under the row to the line they serve."""

from collections.abc import Sequence

from provenzero.drawing.block import Block, Tap
from provenzero.drawing.canvas import BOX_MARGIN, Canvas
from provenzero.drawing.cells import ROOM, Cell, outlet, through
from provenzero.drawing.plates import name_over, name_width, plate
from provenzero.drawing.pumps import elements, fittings
from provenzero.drawing.row import Row
from provenzero.drawing.scene import AIR, Scene
from provenzero.drawing.symbols import Symbol, regulator, ring
from provenzero.drawing.tags import CORNER, LABEL_HEIGHT, LOCK_HALF, label, label_width, lock_half, lozenge, tag
from provenzero.network.model import LineId
from provenzero.unit.model import RESERVOIR, Bypass, Regulator, RegulatorControl

_LIMB = 1.2
_NAME_HALF = 1.8
_RING = 3.8
_TANK = 2.6


def regulator_block(
    scene: Scene, item: Regulator, links: Sequence[Bypass], limit_mm: float, silent: frozenset[LineId]
) -> Block:
    """One regulator, its name on the limb that goes back to the line it serves, and the bypasses that join that limb."""
    feed, serves = LineId(item.fed_from), LineId(item.serves)
    cells = [
        *elements(scene, item.upstream, feed),
        _regulator_cell(scene, item),
        *fittings(scene, item.fittings, serves),
    ]
    row = Row(scene, feed, cells, limit_mm=limit_mm, silent=silent)
    rows = [Row(scene, LineId(n.from_line), [through(scene, n.valve)], limit_mm=limit_mm, silent=silent) for n in links]
    join = max((link.width for link in rows), default=0.0) + 1.0
    regulator_end = row.ends[len(item.upstream) + 1]
    name_at = max(regulator_end, join) + 1.0 if row.out == 0.0 else join + 1.0
    told = scene.told(serves)
    right = max(row.width + 1.0, name_at + name_width(scene, serves) + 1.6)
    limb = row.down + (_LIMB if row.out == 0.0 else _LIMB + 3.0)
    heights: list[float] = []
    foot = limb + 1.1
    for link in rows:
        heights.append(foot + link.up)
        foot = heights[-1] + link.down

    def draw(canvas: Canvas, x: float, y: float, _: float) -> None:
        row.draw(canvas, x, y, x + right)
        canvas.wire(serves, (x + right, y + row.out), (x + right, y + limb), (x, y + limb))
        name_over(canvas, scene, serves, x + name_at + name_width(scene, serves) / 2, y + limb)
        for link, height in zip(rows, heights, strict=True):
            link.draw(canvas, x, y + height, x + join)
        if heights:
            canvas.wire(serves, (x + join, y + limb), (x + join, y + heights[-1]))
            for height in (limb, *heights[:-1]):
                canvas.dot(serves, (x + join, y + height))

    taps = [Tap(feed), Tap(serves, limb)]
    taps += [Tap(LineId(link.from_line), height) for link, height in zip(links, heights, strict=True)]
    return Block(
        names=(item.tag, *(link.valve.tag for link in links)),
        width=right + 1.0,
        up=row.up,
        down=max(limb + (_NAME_HALF if told else 1.1), foot),
        left=tuple(taps),
        draw=draw,
    )


def bypass_block(scene: Scene, item: Bypass, limit_mm: float, silent: frozenset[LineId]) -> Block:
    """One bypass valve between two lines of the corridor."""
    start, end = LineId(item.from_line), LineId(item.to_line)
    row = Row(scene, start, [through(scene, item.valve)], limit_mm=limit_mm, silent=silent)
    limb, right = row.down + 1.2, row.width + 1.0

    def draw(canvas: Canvas, x: float, y: float, _: float) -> None:
        row.draw(canvas, x, y, x + right)
        canvas.wire(end, (x + right, y), (x + right, y + limb), (x, y + limb))

    return Block(
        names=(item.valve.tag,),
        width=right + 1.0,
        up=row.up,
        down=limb + 1.0,
        left=(Tap(start), Tap(end, limb)),
        draw=draw,
    )


def _regulator_cell(scene: Scene, item: Regulator) -> Cell:
    by_air = item.control is RegulatorControl.AIR
    symbol = regulator(scene.position(item.tag), item.relieving, by_air)
    words, lock = tag(item.tag, 15.0), scene.lock(item.tag)
    body = symbol.body if lock is None else symbol.body.grown(BOX_MARGIN)
    tank = scene.port(item.tag, "return")
    air = _air_plate(scene)
    inlet = scene.port(item.tag, "inlet") or LineId(item.fed_from)
    words_left = (-0.4 if tank in scene.letters else 0.3) if item.relieving else 0.8 - words.width / 2
    told = bool(tank is not None and scene.told(tank) and tank not in scene.letters)
    up = -body.top + (1.4 + air.body.bottom - air.body.top if by_air else 0.0)
    ringed = tank in scene.letters
    drop = max(words.reach, 0.6 + (_RING / 2 if ringed else _TANK)) if item.relieving else words.reach
    word = label_width(scene.told(tank)) if told and tank is not None else 0.0
    down = body.bottom + drop + (LABEL_HEIGHT + 0.5 if told else 0.0)
    ring_x = body.left - _RING / 2 - 0.3
    corner = 0.0 if lock is None else CORNER + 2 * lock_half(lock)

    def paint(canvas: Canvas, x: float, y: float) -> None:
        placed = canvas.symbol(symbol, (x, y), item.tag, boxed=lock is not None)
        words.words(canvas, x + words_left, placed.bottom + 0.5, item.tag)
        if lock is not None:
            lozenge(canvas, (placed.left - CORNER, placed.top + 1.2), lock, item.tag)
        if by_air:
            top = y + symbol.body.top
            canvas.wire(AIR, (x, top), (x, placed.top - 1.4))
            canvas.symbol(air, (x - air.body.right / 2, placed.top - 1.4 - air.body.bottom))
        if item.relieving and tank is not None:
            low = placed.bottom + 0.6
            if ringed:
                canvas.wire(tank, (x - 1.4, y + 4.3), (x - 1.4, low), (x + ring_x + _RING / 2, low))
                canvas.symbol(ring(scene.letters[tank]), (x + ring_x, low))
            else:
                canvas.wire(tank, (x - 1.4, y + 4.3), (x - 1.4, low))
                outlet(canvas, scene, LineId(RESERVOIR), (x - 1.4, low), f"{item.tag}-return")
            if told:
                label(canvas, scene, tank, (x - 2.8 + word / 2, placed.bottom + drop + 0.4 + LABEL_HEIGHT / 2))

    return Cell(
        left=max(4.6, words.width / 2, corner - body.left, _RING / 2 - ring_x if ringed else 0.0),
        right=max(6.2, words_left + words.width + ROOM, air.body.right / 2, word - 2.8 + ROOM),
        up=max(up, 0.0 if lock is None else LOCK_HALF - body.top),
        down=max(down, body.bottom + words.reach),
        line_in=inlet,
        line_out=LineId(item.serves),
        body=(symbol.body.left, symbol.body.right),
        clear=body.left - corner,
        paint=paint,
    )


def _air_plate(scene: Scene) -> Symbol:
    return plate(scene.wording.air, 12.0)
