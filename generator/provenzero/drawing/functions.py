"""Functions as rows: supply, four-way valve with its movers, the two lines, the cylinder, and bottles on a line."""

from provenzero.drawing.block import Block, Tap
from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import ROOM, outlet
from provenzero.drawing.fourway import PORT_LEFT, PORT_RIGHT, SIDE, four_way
from provenzero.drawing.function_plan import (
    CLOSE_RUN,
    CYLINDER_PORTS,
    NAME_PITCH,
    SURGE_GAP,
    TANK_AT,
    VALVE_BOTTOM,
    VALVE_TOP,
    FunctionPlan,
    Limits,
    plan_of,
    title,
)
from provenzero.drawing.metric import ASCENT, width_mm
from provenzero.drawing.model import Anchor, Kind, Point, Text
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import CYLINDER_LONG, cylinder
from provenzero.drawing.tags import LABEL_HEIGHT, TAG_MM, Tag, label, label_width, lock_half, lozenge, vent_mark
from provenzero.network.model import LineId
from provenzero.unit.model import RESERVOIR, RETURNS, Function


def function_block(scene: Scene, item: Function, limits: Limits) -> Block:
    """One function from its supply to its cylinder."""
    plan = plan_of(scene, item, limits)
    taps = [Tap(LineId(item.fed_from), plan.row_at)]
    if scene.unit.common_returns:
        taps.append(Tap(LineId(RETURNS), plan.returns))

    def draw(canvas: Canvas, x: float, y: float, _: float) -> None:
        _draw(canvas, scene, item, plan, (x, y))

    return Block(
        names=(item.name, item.valve.tag), width=plan.width, up=plan.up, down=plan.down, left=tuple(taps), draw=draw
    )


def _draw(canvas: Canvas, scene: Scene, item: Function, plan: FunctionPlan, corner: Point) -> None:
    x, y = corner
    tag = item.valve.tag
    symbol = four_way(item.valve.centre, scene.position(tag))
    canvas.symbol(symbol, (x + plan.valve, y + VALVE_TOP), tag, boxed=scene.lock(tag) is not None)
    _draw_title(canvas, title(scene, item), x + plan.valve + SIDE + PORT_LEFT - 1.0, y, tag)
    _draw_supply(canvas, scene, item, plan, corner)
    plan.movers.draw(canvas, x + plan.mover, y + VALVE_TOP)
    _draw_return(canvas, scene, item, plan, corner)
    where = scene.vent(tag)
    if where is not None:
        vent_mark(canvas, scene, where, (x + plan.vent[0], y + plan.vent[1]), tag)
    _draw_lines(canvas, scene, item, plan, corner)
    _draw_cylinder(canvas, scene, item, plan, corner)


def _draw_title(canvas: Canvas, head: Tag, right: float, y: float, name: str) -> None:
    left = right - head.width
    head.words(canvas, left, y + 0.2, name)
    if head.lock is not None:
        lozenge(canvas, (left - ROOM - lock_half(head.lock), y + 0.2 + head.height / 2), head.lock, name)


def _draw_supply(canvas: Canvas, scene: Scene, item: Function, plan: FunctionPlan, corner: Point) -> None:
    x, y = corner
    supply = scene.port(item.name, "supply") or LineId(item.fed_from)
    port = x + plan.valve + SIDE + PORT_LEFT
    end = port if plan.turn is None else x + plan.turn
    plan.row.draw(canvas, x, y + plan.row_at, end)
    foot = (end, y + plan.row_at + plan.row.out)
    canvas.wire(supply, foot, (end, y + plan.supply), (port, y + plan.supply), (port, y + VALVE_BOTTOM))


def _draw_return(canvas: Canvas, scene: Scene, item: Function, plan: FunctionPlan, corner: Point) -> None:
    x, y = corner
    port = x + plan.valve + SIDE + PORT_RIGHT
    tank = scene.port(item.name, "return") or LineId(RETURNS)
    if scene.unit.common_returns:
        canvas.wire(tank, (port, y + VALVE_BOTTOM), (port, y + plan.returns), (x, y + plan.returns))
        return
    canvas.wire(tank, (port, y + VALVE_BOTTOM), (port, y + TANK_AT))
    outlet(canvas, scene, LineId(RESERVOIR), (port, y + TANK_AT), f"{item.valve.tag}-return")
    if plan.word_at:
        middle = port - 1.4 + label_width(scene.told(tank)) / 2
        label(canvas, scene, tank, (middle, y + plan.word_at + LABEL_HEIGHT / 2))


def _draw_lines(canvas: Canvas, scene: Scene, item: Function, plan: FunctionPlan, corner: Point) -> None:
    x, y = corner
    runs = (("open", PORT_LEFT, 0.0, CYLINDER_PORTS[1]), ("close", PORT_RIGHT, CLOSE_RUN, CYLINDER_PORTS[0]))
    for side, port, run, end in runs:
        line = LineId(f"{item.name}.{side}")
        start, finish = x + plan.valve + SIDE + port, x + plan.cylinder + end
        canvas.wire(line, (start, y + VALVE_TOP), (start, y + run), (finish, y + run), (finish, y + VALVE_TOP))
        told = scene.told(line)
        if told:
            label(canvas, scene, line, (x + plan.valve + SIDE + PORT_RIGHT + 1.6 + label_width(told) / 2, y + run))
        for cell, place in plan.above if side == "open" else plan.below:
            cell.paint(canvas, x + place, y + run)
        for block, drop, level in plan.surge:
            tap = block.right[0]
            if tap.line == line:
                canvas.dot(line, (x + drop, y + run))
                canvas.wire(line, (x + drop, y + run), (x + drop, y + level + tap.offset))
                block.draw(canvas, x + drop - block.width - SURGE_GAP, y + level, x + drop)


def _draw_cylinder(canvas: Canvas, scene: Scene, item: Function, plan: FunctionPlan, corner: Point) -> None:
    x, y = corner
    left, top = x + plan.cylinder, y + VALVE_TOP
    canvas.symbol(cylinder(scene.marks.pistons.get(item.name, "")), (left, top), item.name)
    letters = (
        (scene.wording.closing, (left - 0.6, top + SIDE / 2 + 0.9), Anchor.END),
        (scene.wording.opening, (left + CYLINDER_PORTS[1] + 1.5, top - 2.0), Anchor.START),
    )
    for words, at, anchor in letters:
        canvas.add(Kind.TAG, (Text(at=at, words=words, size_mm=2.4, anchor=anchor),), item.name)
    half = max(width_mm(words, TAG_MM, bold=True) for words in plan.name) / 2
    middle = min(max(left + CYLINDER_LONG / 2, x + plan.name_at[0] + half), x + plan.width - half)
    for number, words in enumerate(plan.name):
        at = (middle, y + plan.name_at[1] + ASCENT * TAG_MM + number * NAME_PITCH)
        canvas.add(Kind.TAG, (Text(at=at, words=words, size_mm=TAG_MM, bold=True),), item.name)
