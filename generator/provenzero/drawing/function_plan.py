"""Where the parts of a function's row lie: measured before anything is drawn."""

from dataclasses import dataclass

from provenzero.drawing.banks import bank_block
from provenzero.drawing.block import Block
from provenzero.drawing.canvas import BOX_MARGIN
from provenzero.drawing.cells import ROOM, Cell
from provenzero.drawing.fourway import LEVER, PORT_LEFT, PORT_RIGHT, SIDE
from provenzero.drawing.metric import broken
from provenzero.drawing.movers import Movers, movers
from provenzero.drawing.pumps import elements, fittings
from provenzero.drawing.row import Row
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import CYLINDER_LONG
from provenzero.drawing.tags import LABEL_HEIGHT, TAG_MM, VENT_HEIGHT, Tag, label_width, lock_half, vent_width
from provenzero.network.model import LineId
from provenzero.unit.model import Function

CLOSE_RUN = 3.9
VALVE_TOP = 6.9
VALVE_BOTTOM = VALVE_TOP + SIDE
TANK_AT = VALVE_BOTTOM + 2.2
CYLINDER = CYLINDER_LONG + 2.6
CYLINDER_PORTS = (1.2, 9.0)
NAME_PITCH = 2.7
SURGE_GAP = 1.2
_UNDER_VALVE = 2.1
_RUNS_APART = 2.4
_BESIDE_CYLINDER = 3.4
_NAME_MM = 36.0
_NAME_ROOM = 6.0
_NAME_LINE = 2.5
_TITLE_BOTTOM = 5.9
_TANK_BOTTOM = TANK_AT + 2.6
_BAND = 1.2


@dataclass(frozen=True, slots=True, kw_only=True)
class FunctionPlan:
    """Where everything lies, from the left end of the row and the height of the opening line [mm].

    `row_at`: the height of the supply row. `turn`: where the supply comes up if its row lies under the valve, else None.
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
    vent: tuple[float, float]
    word_at: float
    name: tuple[str, ...]
    name_at: tuple[float, float]
    width: float
    up: float
    down: float


@dataclass(frozen=True, slots=True, kw_only=True)
class Limits:
    """The width a function should keep to, the width of the column its name may use [mm], and lines named elsewhere."""

    width: float
    column: float
    silent: frozenset[LineId]


@dataclass(frozen=True, slots=True)
class _Thing:
    """Something under the valve that the name must stand clear of: its right end, top and bottom."""

    right: float
    top: float
    bottom: float


def title(scene: Scene, item: Function) -> Tag:
    """The tag of the four-way valve with the position it stands in."""
    return Tag((item.valve.tag, scene.position(item.valve.tag).upper()), scene.lock(item.valve.tag), bold=True)


def plan_of(scene: Scene, item: Function, limits: Limits) -> FunctionPlan:
    """Measure a function; what stands in its supply goes under the valve where the width asks for it."""
    plan = _measure(scene, item, limits, under=False)
    if plan.width > limits.width and item.valve.supply:
        plan = _measure(scene, item, limits, under=True)
    return plan


def _measure(  # noqa: PLR0915 - one long row of measures
    scene: Scene, item: Function, limits: Limits, *, under: bool
) -> FunctionPlan:
    open_line, close_line = LineId(f"{item.name}.open"), LineId(f"{item.name}.close")
    feed, tank = LineId(item.fed_from), scene.port(item.name, "return") or LineId("")
    head = title(scene, item)
    margin = 0.0 if head.lock is None else BOX_MARGIN
    end = movers(scene, item)
    word_at, tank_bottom = 0.0, _TANK_BOTTOM
    if scene.told(tank) and not scene.unit.common_returns:
        word_at = max(_TANK_BOTTOM, VALVE_TOP + end.down) + 0.4
        tank_bottom = word_at + LABEL_HEIGHT
    row = Row(
        scene,
        feed,
        elements(scene, item.valve.supply, feed),
        limit_mm=limits.width,
        silent=limits.silent,
        run_out=0.0 if under else LEVER + SIDE + PORT_LEFT,
    )
    told_supply = bool(row.ends[1:]) and bool(scene.told(row.last)) and row.last not in limits.silent
    supply = VALVE_BOTTOM + (margin + LABEL_HEIGHT / 2 + 0.2 if told_supply and not under else _UNDER_VALVE)
    before = 0.0 if under else row.width
    crowded = before > 0.0 and supply - row.up < _TITLE_BOTTOM + 0.4
    valve = max(
        before + LEVER + margin + 0.6, (before if crowded else 0.0) + _title_width(head) + 1.4 - SIDE - PORT_LEFT
    )
    port = valve + SIDE + PORT_RIGHT
    mover = valve + 3 * SIDE + margin
    turn, row_at, returns = None, supply, supply + max(row.down, 0.5) + 1.9
    beside = port
    if under:
        beside = turn = max(row.width + 1.0, port + _RUNS_APART)
        supply = max(VALVE_BOTTOM + _RUNS_APART, VALVE_TOP + end.down + _BAND if turn > mover - _BAND else 0.0)
        if not scene.unit.common_returns:
            supply = max(supply, tank_bottom + _BAND)
        returns = supply + _RUNS_APART
        row_at = returns + row.up + _BAND
    where = scene.vent(item.valve.tag)
    at = max(mover + end.width, beside) + _BAND
    if word_at and item.close_fittings:
        at = max(at, port + label_width(scene.told(tank)) + ROOM)
    if where is not None and item.close_fittings:
        at = max(at, beside + 1.6 + vent_width(scene, where) + ROOM)
    above, _ = _side_by_side(fittings(scene, item.open_fittings, open_line), at)
    below, at = _side_by_side(fittings(scene, item.close_fittings, close_line, below=True), at)
    vent = (beside + 1.6, max(VALVE_TOP + max(SIDE + margin, end.down), tank_bottom if word_at else 0.0) + 0.6)
    things = [_Thing(mover, 0.0, VALVE_BOTTOM + margin)]
    things += [_Thing(mover + right, 0.0, VALVE_TOP + down) for right, down in end.profile]
    things += [_Thing(place + cell.right, 0.0, CLOSE_RUN + cell.down) for cell, place in below]
    things.append(_Thing(beside + _BAND, 0.0, max(returns, row_at + row.down) if under else tank_bottom))
    if word_at:
        things.append(_Thing(port + label_width(scene.told(tank)), word_at, tank_bottom))
    if where is not None:
        things.append(_Thing(vent[0] + vent_width(scene, where), vent[1], vent[1] + VENT_HEIGHT))
    floor = max(
        returns + 0.9 if scene.unit.common_returns else tank_bottom + 0.4,
        row_at + row.down,
        *(thing.bottom for thing in things),
    )
    surge, at, bottom = _surge(scene, item, limits.silent, max([at, *(t.right for t in things)]), floor)
    things += [_Thing(drop + _BAND, 0.0, level + block.down) for block, drop, level in surge]
    reach = max(at + _BESIDE_CYLINDER, max((x + c.right for c, x in above), default=0.0) - CYLINDER_PORTS[1] + 1.2)
    right = reach + CYLINDER + _BESIDE_CYLINDER
    wide = max(right, min(limits.column, right + _NAME_ROOM))
    left, top, name = _name(item.label, things, wide)
    room = max([1.0, row.up - row_at, *(cell.up for cell, _ in above)])
    return FunctionPlan(
        row=row,
        row_at=row_at,
        turn=turn,
        supply=supply,
        valve=valve,
        movers=end,
        mover=mover,
        above=above,
        below=below,
        surge=surge,
        cylinder=reach,
        returns=returns,
        vent=vent,
        word_at=word_at,
        name=name,
        name_at=(left, top),
        width=wide,
        up=max(room, 1.8) if scene.told(open_line) else room,
        down=max(bottom, top + (len(name) - 1) * NAME_PITCH + _NAME_LINE),
    )


def _title_width(head: Tag) -> float:
    return head.width + (0.0 if head.lock is None else 2 * lock_half(head.lock) + ROOM)


def _side_by_side(cells: list[Cell], start: float) -> tuple[tuple[tuple[Cell, float], ...], float]:
    placed = []
    for cell in cells:
        placed.append((cell, start + cell.left))
        start += cell.left + cell.right
    return tuple(placed), start


def _surge(
    scene: Scene, item: Function, silent: frozenset[LineId], at: float, floor: float
) -> tuple[tuple[tuple[Block, float, float], ...], float, float]:
    """Banks that stand on a function line: each a row of its own under the function, joined by a drop."""
    placed = []
    for bank in scene.unit.banks:
        if bank.attached_to in (f"{item.name}.open", f"{item.name}.close"):
            block = bank_block(scene, bank, 80.0, silent)
            drop = max(at + 1.0, block.width + SURGE_GAP)
            placed.append((block, drop, floor + block.up + 1.0))
            floor += block.height + 1.0
            at = drop + _BAND
    return tuple(placed), at, floor


def _name(words: str, things: list[_Thing], right: float) -> tuple[float, float, tuple[str, ...]]:
    """Where the name of the function stands (left bound, top) and its lines: as high as it can, clear of all else."""
    best: tuple[float, float, float, tuple[str, ...]] | None = None
    for top in (VALVE_BOTTOM + 0.4, *(thing.bottom + 0.4 for thing in things if thing.bottom > VALVE_BOTTOM)):
        for count in range(1, 7):
            bottom = top + (count - 1) * NAME_PITCH + _NAME_LINE
            left = max((t.right for t in things if t.top < bottom and t.bottom > top), default=0.0) + 0.6
            lines = broken(words, TAG_MM, min(_NAME_MM, right - left), bold=True)
            if right - left < _NAME_LINE or len(lines) > count:
                continue
            if best is None or bottom < best[0]:
                best = (bottom, left, top, lines)
            break
    return best[1:] if best is not None else (0.0, max(thing.bottom for thing in things), (words,))
