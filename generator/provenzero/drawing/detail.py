"""A small picture of one device in one position, for the step that puts it there: which way it then passes."""

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.fourway import PORT_LEFT, PORT_RIGHT, SIDE, four_way
from provenzero.drawing.metric import width_mm
from provenzero.drawing.model import Anchor, Drawing, Fill, Kind, Pen, Polyline, Rect, Text
from provenzero.drawing.symbols import Symbol, arrow, isolator, regulator, shut_off, stroke
from provenzero.drawing.wording import ENGLISH, Wording
from provenzero.network.model import FULL_OPEN, Device, DeviceKind, DeviceTag, Network
from provenzero.unit.model import Centre, RegulatorControl, Unit

_SIZE = 2.6
_WIDTH = 46.0
_POSITION_HEIGHT = 3.6
_GAP = 1.0
_REACH = 7.0
_PASSES = frozenset({"open", "on", "set", "full_open", "venting", "sending"})


def detail(unit: Unit, network: Network, device_tag: str, position: str, wording: Wording = ENGLISH) -> Drawing:
    """Picture a device in a position. ValueError if it has no such position."""
    device = network.devices[DeviceTag(device_tag)]
    if position not in device.positions:
        raise ValueError(f"{device_tag} has no position {position}")
    canvas = Canvas({})
    if device.kind is DeviceKind.FOUR_WAY_VALVE:
        foot = _handle(canvas, unit, device_tag, position, wording)
    else:
        foot = _through(canvas, unit, device, position)
    _positions(canvas, device, position, foot)
    return Drawing(
        width_mm=_WIDTH,
        height_mm=foot + _POSITION_HEIGHT + 0.4,
        scale=1.0,
        title=f"{device_tag} {_words(position)}",
        alt=_alternative(network, device, position, wording),
        groups=canvas.groups(),
    )


def _words(position: str) -> str:
    return position.replace("_", " ").upper()


def _handle(canvas: Canvas, unit: Unit, tag: str, position: str, wording: Wording) -> float:
    """The valve with its lines on the square in force: what gets pressure thick, what is let out dashed."""
    centre = next(f.valve.centre for f in unit.functions if f.valve.tag == tag)
    order = ("open", "centre", "close")
    left = _WIDTH / 2 - SIDE / 2 - order.index(position) * SIDE
    top = 8.4
    middle = _WIDTH / 2 - SIDE / 2
    canvas.symbol(four_way(centre, position), (left, top), tag)
    port, other = middle + PORT_LEFT, middle + PORT_RIGHT
    vents = centre is Centre.VENTS
    pens = {
        "open": (Pen.LIVE, Pen.DEAD),
        "close": (Pen.DEAD, Pen.LIVE),
        "centre": (Pen.DEAD, Pen.DEAD) if vents else (Pen.NEUTRAL, Pen.NEUTRAL),
    }[position]
    shapes = [
        Polyline(points=((port, top), (port, 3.4), (port - 4.0, 3.4)), pen=pens[0]),
        Polyline(points=((other, top), (other, 3.4), (other + 4.0, 3.4)), pen=pens[1]),
        Polyline(points=((port, top + SIDE), (port, top + SIDE + 2.4), (port - 4.0, top + SIDE + 2.4)), pen=Pen.LIVE),
        Polyline(
            points=((other, top + SIDE), (other, top + SIDE + 2.4), (other + 4.0, top + SIDE + 2.4)), pen=Pen.DEAD
        ),
    ]
    canvas.add(Kind.MARK, shapes, tag)
    low, high = top + SIDE + 3.3, 4.3
    for words, at, anchor in (
        (wording.opening_line, (port - 4.6, high), Anchor.END),
        (wording.closing_line, (other + 4.6, high), Anchor.START),
        (wording.supply, (port - 4.6, low), Anchor.END),
        (wording.tank, (other + 4.6, low), Anchor.START),
    ):
        canvas.add(Kind.TAG, (Text(at=at, words=words, size_mm=_SIZE, anchor=anchor),), tag)
    return low + 1.4


def _through(canvas: Canvas, unit: Unit, device: Device, position: str) -> float:
    """Any other device in its line: an arrow where it passes, a bar where it does not."""
    middle, height = _WIDTH / 2, 6.4
    symbol = _symbol(unit, device, position)
    canvas.symbol(symbol, (middle, height), device.tag)
    left, right = middle + symbol.body.left, middle + symbol.body.right
    stop = right + _REACH
    if position in _PASSES:
        after = arrow((right, height), (stop, height), head=2.0)
    else:
        after = (
            stroke((right, height), (stop, height)),
            stroke((stop, height - 1.6), (stop, height + 1.6), pen=Pen.HEAVY),
        )
    canvas.add(Kind.MARK, (stroke((left - _REACH, height), (left, height)), *after), device.tag)
    return height + symbol.body.bottom + 1.4


def _symbol(unit: Unit, device: Device, position: str) -> Symbol:
    match device.kind:
        case DeviceKind.ISOLATOR:
            return isolator(position == "on")
        case DeviceKind.REGULATOR:
            item = next(r for r in unit.regulators if r.tag == device.tag)
            return regulator(position, item.relieving, item.control is RegulatorControl.AIR)
        case _:
            exhausts = bool(device.positions.get("closed"))
            return shut_off(position in _PASSES, exhausts)


def _positions(canvas: Canvas, device: Device, position: str, top: float) -> None:
    """All positions of the device side by side, the one meant in white on black."""
    names = [name for name in device.positions if name != FULL_OPEN]
    widths = [width_mm(_words(name), _SIZE, bold=True) + 1.6 for name in names]
    x = (_WIDTH - sum(widths) - _GAP * (len(names) - 1)) / 2
    for name, width in zip(names, widths, strict=True):
        meant = name == position
        frame = Rect(
            at=(x, top), width=width, height=_POSITION_HEIGHT, pen=Pen.SYMBOL, fill=Fill.INK if meant else Fill.PAPER
        )
        ink = Fill.PAPER if meant else Fill.INK
        text = Text(at=(x + width / 2, top + 2.75), words=_words(name), size_mm=_SIZE, bold=meant, ink=ink)
        canvas.add(Kind.LABEL, (frame, text), device.tag)
        x += width + _GAP


def _alternative(network: Network, device: Device, position: str, wording: Wording) -> str:
    ways = [
        wording.alt_joins.format(one=network.lines[item.source].name, other=network.lines[item.target].name)
        for item in device.positions[position]
    ]
    return wording.alt_detail.format(
        device=device.name, position=_words(position), ways=", ".join(ways) or wording.alt_stops
    )
