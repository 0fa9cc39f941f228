"""Air, panels and nitrogen backups: what comes from outside the fluid circuit."""

from provenzero.drawing.block import Block, Tap
from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import LEAD, ROOM, Cell
from provenzero.drawing.feed import Feed, feed
from provenzero.drawing.plates import from_flag, plate, to_flag
from provenzero.drawing.pumps import elements, fittings
from provenzero.drawing.row import Row
from provenzero.drawing.scene import AIR, Scene
from provenzero.drawing.symbols import gas_bottle, union
from provenzero.drawing.tags import Tag, label, label_width
from provenzero.network.model import DeviceTag, LineId
from provenzero.unit.model import AirSupply, NitrogenBackup, Panel, PanelKind

_PANEL_MM = 24.0
_STEM = 1.7
_CHAIN_GAP = 1.2


def air_block(scene: Scene, item: AirSupply, limit_mm: float, silent: frozenset[LineId]) -> Block:
    """Rig air from its flag to the flag that stands wherever air is used."""
    source = from_flag(scene.wording.rig_air)
    goes = to_flag(scene.wording.air)
    start = LineId("air.supply")
    cells = elements(scene, item.run, start)
    if DeviceTag("air-piping") in scene.devices:
        cells.append(_joint("air-piping", start, AIR))
    cells += fittings(scene, item.fittings, AIR)
    told = scene.told(AIR)
    after = LEAD + (label_width(told) + 1.0 if told else 0.0)
    row = Row(scene, start, cells, limit_mm=limit_mm - 24.0, silent=silent | {AIR})
    lead = -source.body.left

    def draw(canvas: Canvas, x: float, y: float, _: float) -> None:
        canvas.symbol(source, (x + lead, y))
        end = x + lead + LEAD + row.width + after
        canvas.wire(start, (x + lead, y), (x + lead + LEAD, y))
        row.draw(canvas, x + lead + LEAD, y, end)
        label(canvas, scene, AIR, (end - after / 2, y + row.out))
        canvas.symbol(goes, (end, y + row.out))

    width = lead + LEAD + row.width + after + goes.body.right
    return Block(
        names=("air",),
        width=width,
        up=max(row.up, 2.0),
        down=max(row.down, row.out + 2.0),
        roomy=row.out == 0.0,
        draw=draw,
    )


def panel_block(scene: Scene, item: Panel) -> Block:
    """One remote panel with what feeds it."""
    chains = _feeds(scene, item)
    heights = [chain.up + chain.down for chain in chains]
    total = sum(heights) + _CHAIN_GAP * (len(chains) - 1)
    face = plate(item.tag, _PANEL_MM, bold=True, half_mm=total / 2)
    half = face.body.bottom
    reach = max((chain.width for chain in chains), default=0.0)

    def draw(canvas: Canvas, x: float, y: float, _: float) -> None:
        canvas.symbol(face, (x + reach, y), item.tag)
        top = y - total / 2
        for chain, height in zip(chains, heights, strict=True):
            chain.draw(canvas, x + reach, top + chain.up)
            top += height + _CHAIN_GAP

    return Block(names=(item.tag,), width=reach + face.body.right, up=half, down=half, draw=draw)


def _feeds(scene: Scene, item: Panel) -> list[Feed]:
    words = scene.wording.air
    if item.kind is PanelKind.PNEUMATIC:
        return [feed(scene, words, scene.port(item.tag, "air") or AIR, item.energy)]
    supply = LineId(f"supply.{item.supply}")
    chains = [feed(scene, item.supply, scene.port(item.tag, "power") or supply, item.energy)]
    if item.through_pilot_air:
        chains.append(feed(scene, words, scene.port(item.tag, "air") or AIR, item.pilot_air))
    return chains


def backup_block(scene: Scene, item: NitrogenBackup, limit_mm: float, silent: frozenset[LineId]) -> Block:
    """One set of backup bottles and its way to the line it can drive."""
    gas, target = LineId(f"{item.tag}.gas"), LineId(item.delivers_to)
    cells = [_gas_cell(scene, item, gas), *elements(scene, item.run, gas)]
    piping = f"{item.tag}-piping"
    if DeviceTag(piping) in scene.devices:
        cells.append(_joint(piping, gas, target))
    row = Row(scene, gas, cells, limit_mm=limit_mm, silent=silent, from_first=True)
    return Block(
        names=(item.tag,),
        width=row.width,
        up=row.up,
        down=row.down,
        right=(Tap(target, row.out),),
        roomy=row.out == 0.0,
        draw=row.draw,
    )


def _gas_cell(scene: Scene, item: NitrogenBackup, gas: LineId) -> Cell:
    words = Tag((item.tag, f"{item.bottles} \u00d7"), bold=True)
    symbol = gas_bottle()

    def paint(canvas: Canvas, x: float, y: float) -> None:
        canvas.wire(gas, (x, y), (x, y - _STEM))
        canvas.symbol(symbol, (x, y - _STEM), item.tag)
        words.words(canvas, x + symbol.body.left - ROOM - words.width, y - _STEM - 6.0, item.tag)

    return Cell(
        left=words.width - symbol.body.left + 2 * ROOM,
        right=symbol.body.right + ROOM,
        up=_STEM - symbol.body.top,
        down=1.0,
        line_in=gas,
        line_out=gas,
        body=None,
        clear=0.0,
        paint=paint,
    )


def _joint(name: str, start: LineId, end: LineId) -> Cell:
    symbol = union()

    def paint(canvas: Canvas, x: float, y: float) -> None:
        canvas.symbol(symbol, (x, y), name)

    return Cell(
        left=2.0,
        right=2.0,
        up=1.2,
        down=1.2,
        line_in=start,
        line_out=end,
        body=(symbol.body.left, symbol.body.right),
        clear=symbol.body.left,
        paint=paint,
    )
