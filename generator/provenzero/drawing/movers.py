"""What moves a four-way valve beside the hand: pilot air or power from each panel, and the shut-off of the pilot lines."""

from collections.abc import Callable
from dataclasses import dataclass

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import LEAD, ROOM, part_of
from provenzero.drawing.fourway import SIDE, pilot_cell, solenoid_cell
from provenzero.drawing.metric import width_mm
from provenzero.drawing.model import Box, Fill, Pen, Rect, Text
from provenzero.drawing.scene import Scene
from provenzero.drawing.symbols import Symbol, shut_off, stroke
from provenzero.drawing.tags import TAG_MM, label, label_width
from provenzero.network.model import DeviceTag, LineId
from provenzero.unit.model import Function, Panel, PanelKind

PITCH = 3.9
_CELL = 2.8
_STUB = 1.8
_PLATE_HALF = 1.7


@dataclass(frozen=True, slots=True, kw_only=True)
class Movers:
    """The movers at the right end of a valve. `profile`: (how far right, how far under the top of the valve) of its parts."""

    profile: tuple[tuple[float, float], ...]
    draw: Callable[[Canvas, float, float], None]

    @property
    def width(self) -> float:
        """How far they reach to the right [mm]."""
        return max((right for right, _ in self.profile), default=0.0)

    @property
    def down(self) -> float:
        """How far they reach under the top of the valve [mm]."""
        return max((down for _, down in self.profile), default=0.0)

    def clear(self, depth: float) -> float:
        """From where, to the right, nothing of them reaches under a depth [mm]."""
        return max((right for right, down in self.profile if down > depth), default=0.0)


def movers(scene: Scene, item: Function) -> Movers:
    """The movers of one function's valve, drawn from the top right corner of its squares."""
    panels = [panel for panel in scene.unit.panels if panel.tag in item.valve.panels]
    direct = [p for p in panels if p.kind is PanelKind.ELECTRIC and not p.through_pilot_air]
    piloted = [p for p in panels if p not in direct]
    isolated = item.valve.pilot_isolation is not None and bool(piloted)
    pilots = _isolated(scene, item, piloted) if isolated else _stack(scene, item, piloted)
    power = _powered(scene, direct)

    def draw(canvas: Canvas, x: float, y: float) -> None:
        pilots.draw(canvas, x, y)
        power.draw(canvas, x, y + pilots.down)

    under = tuple((right, pilots.down + down) for right, down in power.profile)
    return Movers(profile=pilots.profile + under, draw=draw)


def _face(panel: Panel) -> Symbol:
    width = width_mm(panel.tag, TAG_MM) + 1.2
    shapes = (
        Rect(at=(0.0, -_PLATE_HALF), width=width, height=2 * _PLATE_HALF, pen=Pen.SYMBOL, fill=Fill.PAPER),
        Text(at=(width / 2, 0.95), words=panel.tag, size_mm=TAG_MM),
    )
    return Symbol(shapes=shapes, body=Box(0.0, -_PLATE_HALF, width, _PLATE_HALF))


def _pilot(item: Function, panel: Panel) -> LineId:
    return LineId(f"{item.name}.pilot.{panel.tag}")


def _stack(scene: Scene, item: Function, panels: list[Panel]) -> Movers:
    """A pilot end for each panel, one under the other."""
    width = max((_wide(scene, panel, _pilot(item, panel)) for panel in panels), default=0.0)

    def draw(canvas: Canvas, x: float, y: float) -> None:
        for place, panel in enumerate(panels):
            top = y + place * PITCH
            canvas.symbol(pilot_cell(PITCH), (x, top))
            _commanded(canvas, scene, item, panel, (x + _CELL, x + _CELL + _STUB, top + PITCH / 2))

    return Movers(profile=((_CELL + _STUB + width, len(panels) * PITCH),) if panels else (), draw=draw)


def _wide(scene: Scene, panel: Panel, line: LineId) -> float:
    told = scene.told(line)
    return _face(panel).body.right + (label_width(told) + ROOM if told else 0.0)


def _commanded(canvas: Canvas, scene: Scene, item: Function, panel: Panel, at: tuple[float, float, float]) -> None:
    """The control of a panel at the end of its pilot line."""
    start, end, y = at
    line, face = _pilot(item, panel), _face(panel)
    canvas.wire(line, (start, y), (end, y))
    canvas.symbol(face, (end, y), f"{panel.tag}:{item.name}")
    told = scene.told(line)
    if told:
        label(canvas, scene, line, (end + face.body.right + ROOM + label_width(told) / 2, y))


def _isolated(scene: Scene, item: Function, panels: list[Panel]) -> Movers:
    """One pilot end, the shut-off of the pilot lines, then the controls of all panels."""
    valve = item.valve.pilot_isolation
    if valve is None:
        raise ValueError(f"{item.valve.tag} has no pilot shut-off")
    own = LineId(f"{item.name}.pilot")
    half = max(len(panels) * PITCH / 2, 2.0)
    part = part_of(scene, valve.tag, _gathered(scene, valve.tag, half, exhausts=valve.exhausts))
    told = scene.told(own)
    middle = max(SIDE / 2, half)
    near = part.left if part.words.lock is not None else -part.body.left
    word = label_width(told) if told else 0.0
    reach = _CELL + max(LEAD + word + near, part.left + ROOM - _CELL)
    faces = reach + max(part.symbol.body.right + _STUB, part.right + ROOM)
    wide = max(_wide(scene, panel, _pilot(item, panel)) for panel in panels)

    def draw(canvas: Canvas, x: float, y: float) -> None:
        canvas.symbol(pilot_cell(SIDE), (x, y))
        level = y + middle
        canvas.wire(own, (x + _CELL, level), (x + reach + part.symbol.body.left, level))
        label(canvas, scene, own, (x + _CELL + LEAD / 2 + word / 2, level))
        part.paint(canvas, (x + reach, level), below=True)
        for place, panel in enumerate(panels):
            height = level + (place - (len(panels) - 1) / 2) * PITCH
            _commanded(canvas, scene, item, panel, (x + reach + part.symbol.body.right, x + faces, height))

    tagged = (reach + part.right, middle + part.body.bottom + part.words.reach)
    return Movers(profile=((faces + wide, middle + len(panels) * PITCH / 2), tagged), draw=draw)


def _gathered(scene: Scene, name: str, half: float, *, exhausts: bool) -> Symbol:
    """A shut-off valve into which several pilot lines run."""
    plain = shut_off(scene.position(DeviceTag(name)) == "open", exhausts)
    edge = plain.body.right + 1.0
    bar = (stroke((plain.body.right, 0), (edge, 0)), stroke((edge, -half), (edge, half)))
    return Symbol(shapes=(*plain.shapes, *bar), body=Box(plain.body.left, -half, edge, max(half, plain.body.bottom)))


def _powered(scene: Scene, panels: list[Panel]) -> Movers:
    """A solenoid end for each panel whose power moves the valve directly."""
    width = max((_face(panel).body.right for panel in panels), default=0.0)

    def draw(canvas: Canvas, x: float, y: float) -> None:
        for place, panel in enumerate(panels):
            top = y + place * PITCH
            middle = top + PITCH / 2
            canvas.symbol(solenoid_cell(PITCH), (x, top))
            canvas.wire(scene.port(panel.tag, "power") or LineId(""), (x + _CELL, middle), (x + _CELL + _STUB, middle))
            canvas.symbol(_face(panel), (x + _CELL + _STUB, middle))

    return Movers(profile=((_CELL + _STUB + width, len(panels) * PITCH),) if panels else (), draw=draw)
