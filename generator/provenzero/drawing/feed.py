"""Where the energy of a pump or a panel comes from: a flag with the supply, then the device that cuts it."""

from collections.abc import Callable
from dataclasses import dataclass

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.cells import LEAD, ROOM, part_of
from provenzero.drawing.plates import from_flag
from provenzero.drawing.scene import AIR, Scene
from provenzero.drawing.symbols import isolator, shut_off
from provenzero.drawing.tags import GAP, LABEL_HEIGHT, VENT_HEIGHT, label, label_width, vent_mark, vent_width
from provenzero.network.model import LineId
from provenzero.unit.model import Isolator, Valve


@dataclass(frozen=True, slots=True, kw_only=True)
class Feed:
    """A chain that ends where the energy is used. `draw` takes the right end and the height of the chain.

    `near`: how high it stands close to its right end [mm].
    """

    width: float
    up: float
    down: float
    near: float
    draw: Callable[[Canvas, float, float], None]


def feed(scene: Scene, words: str, load: LineId, device: Valve | Isolator | None) -> Feed:
    """The chain from a supply to a load, through the device that cuts it if there is one."""
    if device is None:
        return _bare(scene, words, load)
    supply = scene.ends(device.tag)[0]
    flag = from_flag(words)
    wide, tall = -flag.body.left, flag.body.bottom
    if isinstance(device, Valve):
        symbol = shut_off(scene.position(device.tag) == "open", device.exhausts)
    else:
        symbol = isolator(scene.position(device.tag) == "on")
    part = part_of(scene, device.tag, symbol)
    where = scene.vent(device.tag)
    before, after = _word_room(scene, supply), _word_room(scene, load)
    right = max(part.body.right + LEAD + after, part.right + ROOM)
    beside = part.words.lock is not None or tall > part.body.bottom or before > 0.0
    left = max(LEAD - part.body.left, part.left + ROOM if beside else 0.0) + before
    mark = 0.0 if where is None else vent_width(scene, where) + GAP

    def draw(canvas: Canvas, end: float, y: float) -> None:
        x = end - right
        part.paint(canvas, (x, y), below=False)
        canvas.symbol(flag, (x - left, y))
        canvas.wire(supply, (x - left, y), (x + symbol.body.left, y))
        canvas.wire(load, (x + symbol.body.right, y), (end, y))
        if before:
            label(canvas, scene, supply, (x - left + before / 2, y))
        label(canvas, scene, load, (end - (after + LEAD) / 2, y))
        if where is not None:
            vent_mark(canvas, scene, where, (x - part.left - mark, y - tall - VENT_HEIGHT - GAP), device.tag)

    return Feed(
        width=max(wide + left, part.left + mark) + right,
        up=max(part.words.reach - part.body.top, tall + (VENT_HEIGHT + GAP if mark else 0.0)),
        down=max(part.body.bottom, LABEL_HEIGHT / 2, tall),
        near=part.words.reach - part.body.top,
        draw=draw,
    )


def _bare(scene: Scene, words: str, load: LineId) -> Feed:
    """The chain where nothing cuts the supply."""
    flag = from_flag(words)
    reach, tall = LEAD + _word_room(scene, load), max(flag.body.bottom, LABEL_HEIGHT / 2)

    def draw(canvas: Canvas, end: float, y: float) -> None:
        canvas.symbol(flag, (end - reach, y))
        canvas.wire(load, (end - reach, y), (end, y))
        if reach > LEAD:
            label(canvas, scene, load, (end - reach / 2, y))

    return Feed(width=reach - flag.body.left, up=tall, down=tall, near=tall, draw=draw)


def _word_room(scene: Scene, line: LineId) -> float:
    """Room for the word that must stand on a line [mm]; air is told where it comes in."""
    told = "" if line == AIR else scene.told(line)
    return label_width(told) + 1.0 if told else 0.0
