"""Regulators and bypasses as rows from the line that feeds them, and back under the row to the line they serve."""

from provenzero.drawing.block import Block, Tap
from provenzero.drawing.canvas import BOX_MARGIN, Canvas
from provenzero.drawing.cells import ROOM, Cell, outlet, through
from provenzero.drawing.plates import name_on, name_width, plate
from provenzero.drawing.pumps import elements, fittings
from provenzero.drawing.row import Row
from provenzero.drawing.scene import AIR, Scene
from provenzero.drawing.symbols import Symbol, regulator
from provenzero.drawing.tags import CORNER, LABEL_HEIGHT, LOCK_HALF, label, lock_half, lozenge, tag
from provenzero.network.model import LineId
from provenzero.unit.model import Bypass, Regulator, RegulatorControl

_LIMB = 2.2
_RETURN_DOWN = 8.2


def regulator_block(scene: Scene, item: Regulator, limit_mm: float, silent: frozenset[LineId]) -> Block:
    """One regulator, its name on the limb that goes back to the line it serves."""
    feed, serves = LineId(item.fed_from), LineId(item.serves)
    cells = [*elements(scene, item.upstream, feed), _regulator_cell(scene, item), *fittings(scene, item.fittings, serves)]
    row = Row(scene, feed, cells, limit_mm=limit_mm, silent=silent)
    width = max(row.width, name_width(scene, serves) + 2.0) + 1.0
    return _back(scene, row, (item.tag,), feed, serves, width, told=True)


def bypass_block(scene: Scene, item: Bypass, limit_mm: float, silent: frozenset[LineId]) -> Block:
    """One bypass valve between two lines."""
    start, end = LineId(item.from_line), LineId(item.to_line)
    row = Row(scene, start, [through(scene, item.valve)], limit_mm=limit_mm, silent=silent)
    return _back(scene, row, (item.valve.tag,), start, end, row.width + 1.0, told=False)


def _back(  # noqa: PLR0913 - a row and the two lines it stands between
    scene: Scene, row: Row, names: tuple[str, ...], start: LineId, end: LineId, width: float, *, told: bool
) -> Block:
    limb = row.down + (_LIMB if told else 1.0)

    def draw(canvas: Canvas, x: float, y: float, _: float) -> None:
        right = x + width
        row.draw(canvas, x, y, right)
        canvas.wire(end, (right, y + row.out), (right, y + limb), (x, y + limb))
        if told:
            name_on(canvas, scene, end, x + (width - name_width(scene, end)) / 2, y + limb)

    return Block(
        names=names, width=width, up=row.up, down=limb + (1.8 if told else 0.6), left=(Tap(start), Tap(end, limb)), draw=draw
    )


def _regulator_cell(scene: Scene, item: Regulator) -> Cell:
    by_air = item.control is RegulatorControl.AIR
    symbol = regulator(scene.position(item.tag), item.relieving, by_air)
    words, lock = tag(item.tag, 15.0), scene.lock(item.tag)
    body = symbol.body if lock is None else symbol.body.grown(BOX_MARGIN)
    tank = scene.port(item.tag, "return")
    air = _air_plate(scene)
    inlet = scene.port(item.tag, "inlet") or LineId(item.fed_from)
    words_left = 1.2 if item.relieving else 0.8 - words.width / 2
    told = bool(tank is not None and scene.told(tank) and tank not in scene.letters)
    up = -body.top + (1.4 + air.body.bottom - air.body.top if by_air else 0.0)
    down = body.bottom + (_RETURN_DOWN - 4.3 if item.relieving else words.reach) + (LABEL_HEIGHT + 0.5 if told else 0.0)
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
            own = (f"{item.tag}-return",) if tank not in scene.letters else ()
            canvas.wire(tank, (x - 1.4, y + 4.3), (x - 1.4, placed.bottom + 0.9))
            outlet(canvas, scene, _returns_to(tank, own), (x - 1.4, placed.bottom + 0.9), *own)
            if told:
                label(canvas, scene, tank, (x + 1.0, placed.bottom + 4.4 + LABEL_HEIGHT / 2))

    return Cell(
        left=max(4.6, words.width / 2, corner - body.left), right=max(6.2, words_left + words.width + ROOM, air.body.right / 2),
        up=max(up, 0.0 if lock is None else LOCK_HALF - body.top), down=max(down, body.bottom + words.reach),
        line_in=inlet, line_out=LineId(item.serves), body=(symbol.body.left, symbol.body.right),
        clear=body.left - corner, paint=paint,
    )


def _returns_to(tank: LineId, own: tuple[str, ...]) -> LineId:
    return LineId("reservoir") if own else tank


def _air_plate(scene: Scene) -> Symbol:
    return plate(scene.wording.air, 12.0)
