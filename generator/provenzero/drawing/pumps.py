"""Pumps as rows from the suction line to the line they deliver to, with what drives them over them."""

from provenzero.drawing.block import Block, Tap
from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import LEAD, ROOM, Cell, device_cell, standing, through
from provenzero.drawing.feed import Feed, feed
from provenzero.drawing.row import Row
from provenzero.drawing.scene import Inline, Scene
from provenzero.drawing.symbols import DRIVE_RADIUS, PUMP_RADIUS, check_valve, drive, pump, shaft
from provenzero.drawing.tags import tag
from provenzero.network.devices.pumps import LIQUID
from provenzero.network.model import LineId
from provenzero.unit.model import CheckValve, Drive, Element, Fitting, Pump

_SHAFT = 1.5


def pump_block(scene: Scene, item: Pump, limit_mm: float, silent: frozenset[LineId]) -> Block:
    """One pump with everything between its suction and its delivery."""
    cells = elements(scene, item.suction, LIQUID, lock_below=True)
    suction = scene.port(item.tag, "suction") or LIQUID
    discharge = scene.port(item.tag, "discharge") or LineId(item.delivers_to)
    cells.append(_pump_cell(scene, item, suction, discharge, cells))
    rest = item.discharge
    if rest and isinstance(rest[0], CheckValve):
        cells.append(device_cell(scene, rest[0].tag, check_valve(), discharge, discharge))
        rest = rest[1:]
    cells += elements(scene, rest, discharge, lock_below=True)
    row = Row(scene, LIQUID, cells, limit_mm=limit_mm, silent=silent)
    return Block(
        names=(item.tag,),
        width=row.width,
        up=row.up,
        down=row.down,
        left=(Tap(LIQUID),),
        right=(Tap(LineId(item.delivers_to), row.out),),
        draw=row.draw,
    )


def elements(scene: Scene, run: tuple[Element, ...], start: LineId, *, lock_below: bool = False) -> list[Cell]:
    """The cells of a run: what the fluid goes through, and what stands on the line where it has come to."""
    cells: list[Cell] = []
    here = start
    for element in run:
        if isinstance(element, Inline):
            cells.append(through(scene, element, lock_below=lock_below))
            here = cells[-1].line_out
        else:
            cells.append(standing(scene, element, here))
    return cells


def fittings(scene: Scene, items: tuple[Fitting, ...], line: LineId, *, below: bool = False) -> list[Cell]:
    """The cells of fittings that stand on one line."""
    return [standing(scene, item, line, below=below) for item in items]


def _pump_cell(scene: Scene, item: Pump, suction: LineId, discharge: LineId, before: list[Cell]) -> Cell:
    """The pump, what drives it under it, and the way of the energy under the suction."""
    words = tag(item.tag)
    energy = _energy(scene, item)
    half = max(words.width / 2 + ROOM, PUMP_RADIUS + LEAD)
    rise = PUMP_RADIUS + _SHAFT + DRIVE_RADIUS
    if energy is not None:
        rise = max(
            rise, max((cell.down for cell in before), default=0.0) + energy.up + 0.5, PUMP_RADIUS + energy.near + 0.2
        )

    def paint(canvas: Canvas, x: float, y: float) -> None:
        body = canvas.symbol(pump(), (x, y), item.tag)
        words.above(canvas, x, body, item.tag)
        canvas.symbol(shaft(rise - PUMP_RADIUS - DRIVE_RADIUS), (x, y + rise - DRIVE_RADIUS))
        canvas.symbol(drive(item.drive), (x, y + rise))
        if energy is not None:
            energy.draw(canvas, x - DRIVE_RADIUS, y + rise)

    return Cell(
        left=half,
        right=half,
        up=PUMP_RADIUS + words.reach,
        down=rise + max(DRIVE_RADIUS, 0.0 if energy is None else energy.down),
        line_in=suction,
        line_out=discharge,
        body=(-PUMP_RADIUS, PUMP_RADIUS),
        clear=-PUMP_RADIUS,
        paint=paint,
        lead=0.0 if energy is None else energy.width + DRIVE_RADIUS + ROOM,
    )


def _energy(scene: Scene, item: Pump) -> Feed | None:
    load = scene.port(item.tag, "drive")
    if load is None:
        return None
    if item.drive is Drive.AIR:
        return feed(scene, scene.wording.air, load, item.energy)
    return feed(scene, item.supply, load, item.energy)
