"""The whole circuit on as few sheets as it needs.

The rules, in this order. What makes or stores pressure stands left of a corridor, from the foot up: reservoir, pumps,
header, banks, nitrogen, air, panels. What spends it stands right, from the top down: regulators with their bypasses, then
the functions in the order of the description. Each piece is a row that reads from left to right; the lines that rows share
run up and down in the corridor. What does not fit goes on to the next sheet, where the shared lines stand again under
the same letters; sheets with functions alone carry two corridors.
"""

from collections.abc import Iterator, Sequence
from dataclasses import dataclass

from provenzero.drawing.alternative import alternative, title
from provenzero.drawing.banks import bank_block, header_block
from provenzero.drawing.block import Block, in_nooks, in_pairs, shelves
from provenzero.drawing.canvas import Canvas
from provenzero.drawing.function_plan import Limits
from provenzero.drawing.functions import function_block
from provenzero.drawing.legend import legend_block
from provenzero.drawing.marks import Marks
from provenzero.drawing.model import Drawing
from provenzero.drawing.pumps import pump_block
from provenzero.drawing.regulators import bypass_block, regulator_block
from provenzero.drawing.remote import air_block, backup_block, panel_block
from provenzero.drawing.reservoir import reservoir_block
from provenzero.drawing.route import Corridor, Placed, corridor, draw_corridor, raised, stacked, vertical, width_of
from provenzero.drawing.scene import AIR, Scene, letters_of
from provenzero.drawing.wording import ENGLISH, Wording
from provenzero.network.devices.pumps import LIQUID
from provenzero.network.model import LineId, Network
from provenzero.unit.model import ATMOSPHERE, HEADER, RESERVOIR, RETURNS, Unit

WIDTH_MM = 181.0
HEIGHT_MM = 240.0
SMALLEST = 0.92
_SUCTION_AT = 2.2
_LEFT_AT = 4.6
_GAP = 0.8
_TOP = 1.0
_LEAST_TAP = 5.0
_SHELF_GAP = 5.0
_PAIR_GAP = 2.0
_BAND = 1.6
_NARROW = 76.0


@dataclass(frozen=True, slots=True)
class _Paper:
    """What a sheet may measure, in millimetres of the shapes; on paper that is `scale` times as much."""

    scale: float

    @property
    def width(self) -> float:
        return WIDTH_MM / self.scale

    @property
    def height(self) -> float:
        return HEIGHT_MM / self.scale


@dataclass(frozen=True, slots=True)
class _Sheet:
    """The blocks of a sheet: the left column, then the columns with corridors of their own."""

    left: tuple[Block, ...]
    panes: tuple[tuple[Block, ...], ...]


def overview(unit: Unit, network: Network, marks: Marks, wording: Wording = ENGLISH) -> tuple[Drawing, ...]:
    """Draw a unit with its marks, each device once, on sheets of at most 181 by 240 mm, which A4 and Letter both have room for.

    The letters are 2.4 mm high or more; where that saves a sheet all is drawn a little smaller, with letters of 2.2 mm.
    """
    scene = Scene(
        unit=unit,
        marks=marks,
        wording=wording,
        letters=letters_of(unit),
        devices=network.devices,
        lines=network.lines,
        ports={(p.equipment, p.name): p.line for p in reversed(network.ports)},
    )
    sheets, paper = _sheets(scene)
    return tuple(_draw(scene, sheet, paper, number, len(sheets)) for number, sheet in enumerate(sheets, start=1))


def _sheets(scene: Scene) -> tuple[list[_Sheet], _Paper]:
    """The fewest sheets, and of as many those with the larger letters and the wider functions."""
    tried = []
    for paper in (_Paper(1.0), _Paper(SMALLEST)):
        for left, right in _blocks(scene, paper):
            whole = _Sheet(left, (right,) if right else ())
            if _fits(scene, paper, whole, ""):
                return [whole], paper
            tried.append((paper, left, right))
    found = [(_divide(scene, paper, left, right), paper) for paper, left, right in tried]
    return min(found, key=lambda item: len(item[0]))


def _blocks(scene: Scene, paper: _Paper) -> Iterator[tuple[tuple[Block, ...], tuple[Block, ...]]]:
    """The blocks of both columns: functions as wide as there is room, then functions as narrow as they can be."""
    silent = frozenset({*scene.letters, AIR, LineId(RESERVOIR), LineId(ATMOSPHERE)})
    room = paper.width - _LEFT_AT - width_of(_shared(scene.unit))
    narrow = _right(scene, _NARROW, silent)
    left = tuple(_left(scene, max(room - _column(narrow), room / 2), silent))
    if room - _column(left) > _NARROW:
        yield left, tuple(_right(scene, room - _column(left), silent))
    yield left, tuple(narrow)


def _shared(unit: Unit) -> list[LineId]:
    """The lines of the corridor: header, pressure lines by the number of functions they feed, return header."""
    fed = [item.fed_from for item in unit.functions]
    serves = list(dict.fromkeys(item.serves for item in unit.regulators))
    serves.sort(key=fed.count)
    names = [HEADER, *serves, *((RETURNS,) if unit.common_returns else ())]
    return [LineId(name) for name in names]


def _right(scene: Scene, limit: float, silent: frozenset[LineId]) -> list[Block]:
    blocks = []
    left = list(scene.unit.bypasses)
    for item in scene.unit.regulators:
        around = [link for link in left if link.around == item.tag and link.to_line == item.serves]
        left = [link for link in left if link not in around]
        blocks.append(regulator_block(scene, item, around, limit, silent))
    blocks += [bypass_block(scene, link, limit, silent) for link in left]
    first = [function_block(scene, f, Limits(width=limit, column=0.0, silent=silent)) for f in scene.unit.functions]
    limits = Limits(width=limit, column=_column([*blocks, *first]), silent=silent)
    return blocks + [function_block(scene, item, limits) for item in scene.unit.functions]


def _left(scene: Scene, limit: float, silent: frozenset[LineId]) -> list[Block]:
    unit = scene.unit
    chambers = {f"{item.name}.{side}" for item in unit.functions for side in ("open", "close")}
    pumps = [pump_block(scene, item, limit, silent) for item in unit.pumps]
    banks = [bank_block(scene, item, limit, silent) for item in unit.banks if item.attached_to not in chambers]
    backups = [backup_block(scene, item, limit, silent) for item in unit.nitrogen_backups]
    air = [] if unit.air is None else [air_block(scene, unit.air, limit, silent)]
    stores = in_pairs([*banks, *backups], limit, _BAND, _PAIR_GAP)
    rows = [*pumps, header_block(scene, limit, silent), *stores, *air]
    wide = max(block.width for block in rows)
    rows, panels = in_nooks(rows, [panel_block(scene, item) for item in unit.panels], wide, _GAP)
    return [reservoir_block(scene, unit.reservoir, wide, silent), *rows, *shelves(panels, wide, _SHELF_GAP)]


def _divide(scene: Scene, paper: _Paper, left: Sequence[Block], right: Sequence[Block]) -> list[_Sheet]:
    sheets = []
    makers, spenders = list(left), list(right)
    while makers or spenders:
        sheet = _taken(scene, paper, makers, _Sheet((), ()), into_left=True)
        del makers[: len(sheet.left)]
        for _ in range(2):
            more = _taken(scene, paper, spenders, sheet, into_left=False)
            if more == sheet:
                break
            del spenders[: len(more.panes[-1])]
            sheet = more
        sheets.append(sheet)
    return sheets


def _taken(scene: Scene, paper: _Paper, blocks: Sequence[Block], sheet: _Sheet, *, into_left: bool) -> _Sheet:
    """The sheet with as many more blocks as fit, in a new column; at least one on an empty sheet."""
    best = sheet
    for count in range(1, len(blocks) + 1):
        some = tuple(blocks[:count])
        tried = _Sheet(some, ()) if into_left else _Sheet(sheet.left, (*sheet.panes, some))
        if not _fits(scene, paper, tried, "-") and (count > 1 or sheet != _Sheet((), ())):
            break
        best = tried
    return best


def _fits(scene: Scene, paper: _Paper, sheet: _Sheet, number: str) -> bool:
    width = _width(scene, sheet)
    if width > paper.width or max(_stack(sheet.left), *(_stack(pane) for pane in sheet.panes), 0.0) > paper.height:
        return False
    foot = max(column.foot for column in _laid(scene, sheet))
    return foot + legend_block(scene, width, number, _ringed(scene, bool(number))).height <= paper.height


def _ringed(scene: Scene, several: bool) -> list[LineId]:
    """The lines that end in a ring with a letter: all shared ones on several sheets, else the one that others name."""
    if several:
        return [*_shared(scene.unit), LIQUID]
    return [LineId(RETURNS)] if scene.unit.common_returns else []


def _column(blocks: Sequence[Block]) -> float:
    return max((block.width for block in blocks), default=0.0)


def _stack(blocks: Sequence[Block]) -> float:
    return sum(block.height + _GAP for block in blocks)


def _lines_of(scene: Scene, left: Sequence[Block], right: Sequence[Block]) -> list[LineId]:
    used = {tap.line for block in left for tap in block.right} | {tap.line for block in right for tap in block.left}
    shared = _shared(scene.unit)
    return [line for line in shared if line in used]


def _width(scene: Scene, sheet: _Sheet) -> float:
    left = _LEFT_AT + _column(sheet.left) if sheet.left else 0.0
    panes = sheet.panes or ((),)
    return left + sum(
        width_of(_lines_of(scene, sheet.left if number == 0 else (), pane)) + _column(pane) + (_GAP if number else 0.0)
        for number, pane in enumerate(panes)
    )


def _top(pane: Sequence[Block]) -> float:
    """Where a column begins, so that no line of it meets the rings at the head of the corridor."""
    if not pane:
        return _TOP
    first = pane[0]
    return max(_TOP, _LEAST_TAP - first.up - min((tap.offset for tap in first.left), default=0.0))


@dataclass(frozen=True, slots=True)
class _Column:
    """A corridor with what stands left and right of it, all in place."""

    way: Corridor
    made: tuple[Placed, ...]
    spent: tuple[Placed, ...]

    @property
    def foot(self) -> float:
        return max((item.y + item.block.down + _GAP for item in (*self.made, *self.spent)), default=0.0)


def _laid(scene: Scene, sheet: _Sheet) -> list[_Column]:
    columns = []
    x = _LEFT_AT + _column(sheet.left) if sheet.left else 0.0
    for place, pane in enumerate(sheet.panes or ((),)):
        makers = sheet.left if place == 0 else ()
        way = corridor(_lines_of(scene, makers, pane), x)
        spent = stacked(pane, way.right, _top(pane), _GAP)
        made = _settled(makers, spent, way, max(_stack(makers) + _TOP, _stack(pane) + _top(pane)))
        columns.append(_Column(way, tuple(made), tuple(spent)))
        x = way.right + _column(pane) + _GAP
    return columns


def _draw(scene: Scene, sheet: _Sheet, paper: _Paper, number: int, count: int) -> Drawing:
    canvas = Canvas(scene.marks.lines)
    width = _width(scene, sheet)
    words = scene.wording.sheet.format(number=number, count=count) if count > 1 else ""
    columns = _laid(scene, sheet)
    ringed = _ringed(scene, count > 1)
    for column in columns:
        for item in column.made:
            item.block.draw(canvas, item.x, item.y, column.way.left)
        for item in column.spent:
            item.block.draw(canvas, item.x, item.y, item.x)
        draw_corridor(canvas, scene, column.way, column.made, column.spent, frozenset(ringed))
        _suction(canvas, scene, column.made, ringed=LIQUID in ringed)
    foot = max(column.foot for column in columns)
    legend = legend_block(scene, width, words, ringed)
    legend.draw(canvas, 0.0, foot, 0.0)
    shown = [name for column in columns for item in (*column.made, *column.spent) for name in item.block.names]
    return Drawing(
        width_mm=round(width * paper.scale, 2),
        height_mm=round((foot + legend.height) * paper.scale, 2),
        scale=paper.scale,
        title=title(scene, number, count),
        alt=alternative(scene, number, count, shown),
        groups=canvas.groups(),
    )


def _settled(makers: Sequence[Block], spent: Sequence[Placed], way: Corridor, bottom: float) -> list[Placed]:
    """The left column on its foot; the foot goes down as far as the lines of the right column push the blocks up."""
    while True:
        placed = raised(makers, _LEFT_AT, bottom, _GAP, spent, way)
        short = _TOP - min((item.y - item.block.up for item in placed), default=_TOP)
        if short <= 0.0:
            return placed
        bottom += short


def _suction(canvas: Canvas, scene: Scene, made: Sequence[Placed], *, ringed: bool) -> None:
    heights = []
    for item in made:
        for tap in item.block.left:
            heights.append(item.y + tap.offset)
            canvas.wire(tap.line, (_SUCTION_AT, heights[-1]), (_LEFT_AT, heights[-1]))
    ring_at = max(_SUCTION_AT, min(heights) - 5.0) if ringed and heights else None
    vertical(canvas, scene, LIQUID, _SUCTION_AT, heights, ring_at=ring_at)
