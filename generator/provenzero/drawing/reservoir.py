"""The reservoir with its breather, the return header that runs into it and the drain."""

from provenzero.drawing.block import Block, Tap
from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import LEAD, device_cell, outlet, symbol_of
from provenzero.drawing.metric import width_mm
from provenzero.drawing.model import Anchor, Box, Fill, Pen, Shape, Text
from provenzero.drawing.plates import name_over, name_width
from provenzero.drawing.row import Row
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import Symbol, box, breather, entry, stroke
from provenzero.drawing.tags import TAG_MM, label, label_width
from provenzero.network.devices.pumps import LIQUID
from provenzero.network.model import LineId
from provenzero.unit.model import ATMOSPHERE, RESERVOIR, RETURNS, Reservoir

_LEFT = 6.0
_DEEP = 7.6
_OUTLET = 5.3
_LIMB = -3.6
_BREATHER = 4.0


def reservoir_block(scene: Scene, item: Reservoir, width: float, silent: frozenset[LineId]) -> Block:
    """The reservoir at the foot of the sheet; its height is that of its open top."""
    returns = LineId(RETURNS)
    limb = name_width(scene, returns) + 4.0 if scene.unit.common_returns else 0.0
    drain = _drain(scene, item, silent)
    beside = max(limb, drain.width + LEAD + 4.6 if drain is not None else 0.0)
    right = max(width - beside, _LEFT + 22.0 + width_mm(item.tag, TAG_MM, bold=True))
    limb_at = _LIMB if drain is None else min(_LIMB, _OUTLET - drain.up - (2.2 if scene.told(returns) else 1.3))
    tank = _tank(item, right - _LEFT)

    def draw(canvas: Canvas, x: float, y: float, end: float) -> None:
        canvas.symbol(tank, (x + _LEFT, y), item.tag)
        for line, height in ((LineId(RESERVOIR), 1.9), (LIQUID, 5.6)):
            label(canvas, scene, line, (x + _LEFT + 1.0 + label_width(scene.told(line)) / 2, y + height))
        canvas.wire(LIQUID, (x, y + _OUTLET), (x + _LEFT, y + _OUTLET))
        at = x + _LEFT + _BREATHER
        canvas.wire(LineId(RESERVOIR), (at, y), (at, y - 1.0))
        canvas.symbol(breather(), (at, y - 2.4), f"{item.tag}-breather")
        if scene.unit.common_returns:
            inlet = x + right - 3.0
            canvas.wire(LineId(RESERVOIR), (inlet, y), (inlet, y - 1.0))
            canvas.symbol(entry(), (inlet, y - 1.4), f"{item.tag}-returns")
            canvas.wire(returns, (inlet, y - 1.8), (inlet, y + limb_at), (end, y + limb_at))
            name_over(canvas, scene, returns, inlet + 1.5 + name_width(scene, returns) / 2, y + limb_at)
        if drain is not None:
            finish = x + right + drain.width + LEAD
            drain.draw(canvas, x + right, y + _OUTLET, finish)
            canvas.wire(LineId(ATMOSPHERE), (finish, y + _OUTLET), (finish, y + _OUTLET + 1.0))
            outlet(canvas, scene, LineId(ATMOSPHERE), (finish, y + _OUTLET + 1.0))

    down = max(_DEEP, 0.0 if drain is None else _OUTLET + drain.down, 0.0 if drain is None else _OUTLET + 3.8)
    taps = (Tap(returns, limb_at),) if scene.unit.common_returns else ()
    return Block(
        names=(item.tag,),
        width=right + beside,
        up=2.8 - limb_at + (1.2 if scene.told(returns) else 0.0),
        down=down + 0.4,
        left=(Tap(LIQUID, _OUTLET),),
        right=taps,
        draw=draw,
    )


def _drain(scene: Scene, item: Reservoir, silent: frozenset[LineId]) -> Row | None:
    if item.drain is None:
        return None
    cell = device_cell(scene, item.drain.tag, symbol_of(scene, item.drain), LIQUID, LineId(ATMOSPHERE))
    return Row(scene, LIQUID, [cell], limit_mm=60.0, silent=silent)


def _tank(item: Reservoir, width: float) -> Symbol:
    """The tank with its tag; the words on its gas space and on its fluid stand inside."""
    shapes: list[Shape] = [
        box(0, 0, width, _DEEP, pen=Pen.NONE),
        stroke((0, 0), (0, _DEEP), (width, _DEEP), (width, 0), pen=Pen.HEAVY),
        box(0.4, 2.6, width - 0.4, _DEEP - 0.4, fill=Fill.TINT, pen=Pen.NONE),
        stroke((0.3, 2.6), (width - 0.3, 2.6), pen=Pen.FINE),
        Text(at=(width - 1.5, 6.0), words=item.tag, size_mm=TAG_MM, anchor=Anchor.END, bold=True),
    ]
    return Symbol(shapes=tuple(shapes), body=Box(0, 0, width, _DEEP))
