"""Functions as rows: supply, four-way valve with its movers, the two lines, the cylinder, and bottles on the closing line."""

from dataclasses import dataclass

from provenzero.drawing.banks import bank_block
from provenzero.drawing.block import Block, Tap
from provenzero.drawing.canvas import BOX_MARGIN, Canvas
from provenzero.drawing.cells import ROOM, Cell, outlet
from provenzero.drawing.fourway import LEVER, PORT_LEFT, PORT_RIGHT, SIDE, four_way
from provenzero.drawing.metric import broken, width_mm
from provenzero.drawing.model import Anchor, Kind, Text
from provenzero.drawing.movers import Movers, movers
from provenzero.drawing.pumps import elements, fittings
from provenzero.drawing.row import Row
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import CYLINDER_LONG, cylinder
from provenzero.drawing.tags import (
    LOCK_HALF,
    TAG_MM,
    VENT_HEIGHT,
    Tag,
    label,
    label_width,
    lock_half,
    lozenge,
    vent_mark,
    vent_width,
)
from provenzero.network.model import LineId
from provenzero.unit.model import RESERVOIR, RETURNS, Function

_CLOSE_RUN = 3.9
_VALVE_TOP = 6.9
_VALVE_BOTTOM = _VALVE_TOP + SIDE
_SUPPLY_RUN = _VALVE_BOTTOM + 2.1
_APART = 2.4
_CYLINDER = CYLINDER_LONG + 2.6
_CYLINDER_PORTS = (1.2, 9.0)
_LABEL_ROOM = 3.4
_LABEL_MM = 36.0
_NAME_ROOM = 6.0
_TITLE_BOTTOM = 5.9
_NAME_PITCH = 2.7


@dataclass(frozen=True, slots=True, kw_only=True)
class _Plan:
    """Where the parts of a function lie, from its left end and the height of its opening line [mm].

    `row_at`: the height of the supply row. `turn`: where the supply comes up if its row lies under the valve.
    """

    row: Row
    row_at: float
    turn: float | None
    supply: float
    valve: float
    movers: Movers
    mover: float
    above: tuple[tuple[Cell, float], ...]
    below: tuple[tuple[Cell, float], ...]
    surge: tuple[tuple[Block, float, float], ...]
    cylinder: float
    returns: float
    label_at: float
    label: tuple[str, ...]
    width: float
    up: float
    down: float


def function_block(
    scene: Scene, item: Function, limit_mm: float, column_mm: float, silent: frozenset[LineId]
) -> Block:
    """One function from its supply to its cylinder.

    What stands in the supply goes under the valve where the limit asks for it. The name may use the width of the column.
    """
    plan = _measure(scene, item, limit_mm, column_mm, silent, under=False)
    if plan.width > limit_mm and item.valve.supply:
        plan = _measure(scene, item, limit_mm, column_mm, silent, under=True)
    taps = [Tap(LineId(item.fed_from), plan.row_at)]
    if scene.unit.common_returns:
        taps.append(Tap(LineId(RETURNS), plan.returns))

    def draw(canvas: Canvas, x: float, y: float, _: float) -> None:
        _draw(canvas, scene, item, plan, (x, y))

    return Block(
        names=(item.name, item.valve.tag), width=plan.width, up=plan.up, down=plan.down, left=tuple(taps), draw=draw
    )


def _measure(  # noqa: PLR0913 - a function, the room there is, and where its supply goes
    scene: Scene, item: Function, limit_mm: float, column_mm: float, silent: frozenset[LineId], *, under: bool
) -> _Plan:
    feed = LineId(item.fed_from)
    title = _title(scene, item)
    margin = 0.0 if title.lock is None else BOX_MARGIN
    row = Row(
        scene, feed, elements(scene, item.valve.supply, feed), limit_mm=limit_mm, silent=silent,
        run_out=LEVER + SIDE + PORT_LEFT,
    )
    before = 0.0 if under else row.width
    crowded = before > 0.0 and _SUPPLY_RUN - row.up < _TITLE_BOTTOM + 0.4
    needed = (before if crowded else 0.0) + _title_width(title) + 1.4 - SIDE - PORT_LEFT
    valve = max(before + LEVER + margin + 0.6, needed)
    end = movers(scene, item)
    mover = valve + 3 * SIDE + margin
    at = mover + end.width + 1.2
    above, _ = _side_by_side(fittings(scene, item.open_fittings, LineId(f"{item.name}.open")), at)
    below, at = _side_by_side(fittings(scene, item.close_fittings, LineId(f"{item.name}.close"), below=True), at)
    turn, supply, row_at = None, _SUPPLY_RUN, _SUPPLY_RUN
    returns = supply + max(row.down, 0.5) + 1.9
    if under:
        turn = max(row.width + 1.0, valve + SIDE + PORT_RIGHT + _APART)
        supply = _VALVE_TOP + max(SIDE, end.down if turn > mover - 1.0 else 0.0) + _APART
        returns = supply + _APART
        row_at = returns + row.up + 0.8
    beside = turn if turn is not None else valve + SIDE + PORT_RIGHT
    floor = max(
        returns + 0.9 if scene.unit.common_returns else _VALVE_BOTTOM + 9.0, _VALVE_TOP + end.down, row_at + row.down,
        *(_CLOSE_RUN + cell.down for cell, _ in below),
        _vent_top(end, margin) + VENT_HEIGHT if scene.vent(item.valve.tag) is not None else 0.0,
    )
    surge, at, bottom = _surge(scene, item, silent, max(at, beside), floor)
    reach = max(at + _LABEL_ROOM, max((x + c.right for c, x in above), default=0.0) - _CYLINDER_PORTS[1] + 1.0)
    right = reach + _CYLINDER + _LABEL_ROOM
    name_end = max(right, min(column_mm, right + _NAME_ROOM))
    beyond = max(at, beside + 1.0) if surge or below else beside + 1.0
    label_at, lines = _label(item.label, end, mover, name_end, beyond)
    return _Plan(
        row=row, row_at=row_at, turn=turn, supply=supply, valve=valve, movers=end, mover=mover, above=above, below=below,
        surge=surge, cylinder=reach, returns=returns, label_at=label_at, label=lines, width=name_end,
        up=max([0.8, *(cell.up for cell, _ in above)]), down=max(bottom, label_at + (len(lines) - 1) * _NAME_PITCH + 2.5),
    )


def _label(words: str, end: Movers, mover: float, right: float, beyond: float) -> tuple[float, tuple[str, ...]]:
    """How deep the name of the function stands, and its lines: as high as possible, clear of the movers."""
    best: tuple[float, float, tuple[str, ...]] | None = None
    for depth in (SIDE, *(down for _, down in end.profile if down > SIDE)):
        at = _VALVE_TOP + depth + 0.4
        left = max(mover + end.clear(depth), beyond) + 0.6
        lines = broken(words, TAG_MM, min(_LABEL_MM, right - left), bold=True)
        if best is None or at + len(lines) * _NAME_PITCH < best[0]:
            best = (at + len(lines) * _NAME_PITCH, at, lines)
    return (best[1], best[2]) if best is not None else (_VALVE_BOTTOM, (words,))


def _title(scene: Scene, item: Function) -> Tag:
    return Tag((item.valve.tag, scene.position(item.valve.tag).upper()), scene.lock(item.valve.tag), bold=True)


def _title_width(title: Tag) -> float:
    return title.width + (0.0 if title.lock is None else 2 * lock_half(title.lock) + ROOM)


def _side_by_side(cells: list[Cell], start: float) -> tuple[tuple[tuple[Cell, float], ...], float]:
    placed = []
    for cell in cells:
        placed.append((cell, start + cell.left))
        start += cell.left + cell.right
    return tuple(placed), start


def _vent_top(end: Movers, margin: float) -> float:
    return _VALVE_TOP + max(SIDE + margin, end.down) + 0.8


def _surge(
    scene: Scene, item: Function, silent: frozenset[LineId], at: float, floor: float
) -> tuple[tuple[tuple[Block, float, float], ...], float, float]:
    """Banks that stand on a function line: each a row of its own under the function, joined by a drop."""
    placed = []
    for bank in scene.unit.banks:
        if bank.attached_to in (f"{item.name}.open", f"{item.name}.close"):
            block = bank_block(scene, bank, 80.0, silent)
            drop = max(at + 1.0, block.width + 1.0)
            placed.append((block, drop, floor + block.up + 1.0))
            floor += block.height + 1.0
            at = drop + 1.0
    return tuple(placed), at, floor


def _draw(canvas: Canvas, scene: Scene, item: Function, plan: _Plan, at: tuple[float, float]) -> None:
    x, y = at
    left, right = x + plan.valve + SIDE + PORT_LEFT, x + plan.valve + SIDE + PORT_RIGHT
    supply, tank = scene.port(item.name, "supply"), scene.port(item.name, "return")
    if supply is None or tank is None:
        raise ValueError(f"{item.name} has no supply or no return")
    top, bottom = y + _VALVE_TOP, y + _VALVE_BOTTOM
    locked = scene.lock(item.valve.tag) is not None
    canvas.symbol(
        four_way(item.valve.centre, scene.position(item.valve.tag)), (x + plan.valve, top), item.valve.tag, boxed=locked
    )
    end = left if plan.turn is None else x + plan.turn
    level = y + plan.row_at
    plan.row.draw(canvas, x, level, end)
    canvas.wire(supply, (end, level + plan.row.out), (end, y + plan.supply), (left, y + plan.supply), (left, bottom))
    plan.movers.draw(canvas, x + plan.mover, top)
    _draw_title(canvas, _title(scene, item), left - 1.0, y, item.valve.tag)
    _draw_return(canvas, scene, item, tank, (x, y), (right, bottom, y + plan.returns))
    where = scene.vent(item.valve.tag)
    if where is not None:
        corner = ((right if plan.turn is None else x + plan.turn) + 1.6, y + _vent_top(plan.movers, BOX_MARGIN if locked else 0.0))
        vent_mark(canvas, scene, where, corner, item.valve.tag)
    _draw_lines(canvas, scene, item, plan, (x, y))
    _draw_cylinder(canvas, scene, item, plan, (x, y))


def _draw_title(canvas: Canvas, title: Tag, right: float, y: float, name: str) -> None:
    left = right - title.width
    title.words(canvas, left, y + 0.2, name)
    if title.lock is not None:
        lozenge(canvas, (left - ROOM - lock_half(title.lock), y + 0.2 + title.height / 2), title.lock, name)


def _draw_return(  # noqa: PLR0913 - where the return starts and where it ends
    canvas: Canvas, scene: Scene, item: Function, tank: LineId, corner: tuple[float, float], at: tuple[float, float, float]
) -> None:
    right, bottom, level = at
    if scene.unit.common_returns:
        canvas.wire(tank, (right, bottom), (right, level), (corner[0], level))
        return
    canvas.wire(tank, (right, bottom), (right, bottom + 2.2))
    outlet(canvas, scene, LineId(RESERVOIR), (right, bottom + 2.2), f"{item.valve.tag}-return")
    told = scene.told(tank)
    if told:
        label(canvas, scene, tank, (right - 1.9 + label_width(told) / 2, bottom + 7.0))


def _draw_lines(canvas: Canvas, scene: Scene, item: Function, plan: _Plan, at: tuple[float, float]) -> None:
    x, y = at
    top = y + _VALVE_TOP
    runs = (("open", PORT_LEFT, 0.0, _CYLINDER_PORTS[1]), ("close", PORT_RIGHT, _CLOSE_RUN, _CYLINDER_PORTS[0]))
    for side, port, run, end in runs:
        line = LineId(f"{item.name}.{side}")
        start, finish = x + plan.valve + SIDE + port, x + plan.cylinder + end
        canvas.wire(line, (start, top), (start, y + run), (finish, y + run), (finish, top))
        told = scene.told(line)
        if told:
            label(canvas, scene, line, (x + plan.valve + SIDE + PORT_RIGHT + 1.6 + label_width(told) / 2, y + run))
        for cell, place in plan.above if side == "open" else plan.below:
            cell.paint(canvas, x + place, y + run)
        for block, drop, level in plan.surge:
            if block.right[0].line == line:
                canvas.dot(line, (x + drop, y + run))
                canvas.wire(line, (x + drop, y + run), (x + drop, y + level + block.right[0].offset))
                block.draw(canvas, x + drop - block.width - 0.5, y + level, x + drop)


def _draw_cylinder(canvas: Canvas, scene: Scene, item: Function, plan: _Plan, at: tuple[float, float]) -> None:
    x, y = at
    left, top = x + plan.cylinder, y + _VALVE_TOP
    canvas.symbol(cylinder(scene.marks.pistons.get(item.name, "")), (left, top), item.name)
    letters = (
        (scene.wording.closing, (left - 0.6, top + SIDE / 2 + 0.9), Anchor.END),
        (scene.wording.opening, (left + _CYLINDER_PORTS[1] + 1.5, top - 2.0), Anchor.START),
    )
    for words, place, anchor in letters:
        canvas.add(Kind.TAG, (Text(at=place, words=words, size_mm=2.4, anchor=anchor),), item.name)
    half = max(width_mm(words, TAG_MM, bold=True) for words in plan.label) / 2
    middle = min(left + CYLINDER_LONG / 2, x + plan.width - half)
    for number, words in enumerate(plan.label):
        base = (middle, y + plan.label_at + 2.0 + number * _NAME_PITCH)
        canvas.add(Kind.TAG, (Text(at=base, words=words, size_mm=TAG_MM, bold=True),), item.name)
