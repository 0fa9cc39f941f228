"""The symbols of ISO 1219-1, one function each, about their own origin, flow from left to right [mm].

The module of the standard is drawn at 1.4 mm. A symbol ends at the edge of its body: there the lines meet it.
"""

from dataclasses import dataclass
from functools import cache

from provenzero.drawing.model import (
    Anchor,
    Arc,
    Box,
    Circle,
    Fill,
    Pen,
    Point,
    Polygon,
    Polyline,
    Rect,
    Shape,
    Text,
)
from provenzero.unit.model import Drive, InstrumentKind, Separator

LETTER_MM = 2.6
VALVE_HALF = 2.8
PUMP_RADIUS = 4.2
DRIVE_RADIUS = 2.9
DIAL_RADIUS = 2.8
REGULATOR_HALF = 2.9
TANK_TOP = 1.4
BOTTLE_HALF = 2.25
BOTTLE_HEIGHT = 9.0
CYLINDER_LONG = 10.4
RING_RADIUS = 1.9


@dataclass(frozen=True, slots=True, kw_only=True)
class Symbol:
    """Shapes and the rectangle that they fill."""

    shapes: tuple[Shape, ...]
    body: Box


def stroke(*points: Point, pen: Pen = Pen.SYMBOL) -> Polyline:
    """A line of a symbol."""
    return Polyline(points=points, pen=pen)


def area(*points: Point, fill: Fill = Fill.PAPER, pen: Pen = Pen.SYMBOL) -> Polygon:
    """A filled outline of a symbol."""
    return Polygon(points=points, pen=pen, fill=fill)


def words(at: Point, text: str, *, size_mm: float = LETTER_MM, anchor: Anchor = Anchor.MIDDLE) -> Text:
    """Bold letters inside a symbol."""
    return Text(at=at, words=text, size_mm=size_mm, anchor=anchor, bold=True)


def box(  # noqa: PLR0913 - a rectangle and its strokes
    left: float, top: float, right: float, bottom: float, *, fill: Fill = Fill.PAPER, pen: Pen = Pen.SYMBOL
) -> Rect:
    """A rectangle of a symbol by its sides."""
    return Rect(at=(left, top), width=right - left, height=bottom - top, pen=pen, fill=fill)


@cache
def shut_off(opened: bool, exhausts: bool) -> Symbol:
    """A shut-off valve: two triangles tip to tip, filled and barred when closed; an outlet below where it exhausts."""
    fill = Fill.PAPER if opened else Fill.INK
    w, h = VALVE_HALF, 1.75
    shapes: list[Shape] = [area((-w, -h), (0, 0), (-w, h), fill=fill), area((w, -h), (0, 0), (w, h), fill=fill)]
    if not opened:
        shapes.append(stroke((0, -2.0), (0, 2.0), pen=Pen.HEAVY))
    bottom = 2.0
    if exhausts:
        bottom = 3.6
        shapes += [stroke((0, 0), (0, 2.3)), area((-0.8, 2.3), (0.8, 2.3), (0, 3.5))]
    return Symbol(shapes=tuple(shapes), body=Box(-w, -2.0, w, bottom))


@cache
def check_valve() -> Symbol:
    """A check valve: a ball in a seat that opens toward the outlet."""
    shapes = (
        stroke((-2.2, 0), (-1.8, 0)),
        stroke((0.3, -2.1), (-1.8, 0), (0.3, 2.1)),
        Circle(centre=(-0.1, 0), radius=1.2, pen=Pen.SYMBOL, fill=Fill.PAPER),
        stroke((1.1, 0), (2.2, 0)),
    )
    return Symbol(shapes=shapes, body=Box(-2.2, -2.2, 2.2, 2.2))


@cache
def strainer() -> Symbol:
    """A strainer: a square on its tip, with the mesh dashed across the flow."""
    w = VALVE_HALF
    shapes = (area((-w, 0), (0, -w), (w, 0), (0, w)), stroke((0, -w), (0, w), pen=Pen.PILOT))
    return Symbol(shapes=shapes, body=Box(-w, -w, w, w))


@cache
def pump() -> Symbol:
    """A pump: a circle with a filled triangle that points out."""
    r = PUMP_RADIUS
    shapes = (
        Circle(centre=(0, 0), radius=r, pen=Pen.SYMBOL, fill=Fill.PAPER),
        area((r, 0), (r - 2.4, -1.5), (r - 2.4, 1.5), fill=Fill.INK),
    )
    return Symbol(shapes=shapes, body=Box(-r, -r, r, r))


@cache
def drive(kind: Drive) -> Symbol:
    """What turns a pump, fed from the left: electric motor, air motor, engine, or a lever for the hand."""
    r = DRIVE_RADIUS
    body = Box(-r, -r, r, r)
    ring = Circle(centre=(0, 0), radius=r, pen=Pen.SYMBOL, fill=Fill.PAPER)
    match kind:
        case Drive.ELECTRIC:
            return Symbol(shapes=(ring, words((0, 1.0), "M")), body=body)
        case Drive.AIR:
            return Symbol(shapes=(ring, area((-2.6, -1.3), (-0.4, 0), (-2.6, 1.3))), body=body)
        case Drive.DIESEL:
            return Symbol(shapes=(box(-r, -r, r, r), words((0, 1.0), "E")), body=body)
        case Drive.HAND:
            knob = Circle(centre=(2.2, 1.6), radius=0.5, pen=Pen.SYMBOL, fill=Fill.INK)
            return Symbol(shapes=(stroke((0, -r), (0, 0), (2.0, 1.4)), knob), body=body)


@cache
def regulator(position: str, relieving: bool, by_air: bool) -> Symbol:
    """A reducing regulator: the arrow in line while it is set, aside when backed off, to the tank port if it relieves."""
    w = REGULATOR_HALF
    shapes: list[Shape] = [box(-w, -w, w, w), stroke((w, 0), (4.4, 0))]
    if position == "backed_off":
        shapes += arrow((-w, -1.5), (w, -1.5))
        if relieving:
            shapes += [stroke((w, 0), (-1.4, 0)), *arrow((-1.4, 0), (-1.4, w))]
    else:
        shapes += arrow((-w, 0), (w, 0))
    shapes += [stroke((3.7, 0), (3.7, 4.1), (0.9, 4.1), (0.9, w), pen=Pen.PILOT)]
    if by_air:
        shapes += [box(-1.6, -w - 2.4, 1.6, -w), area((-0.9, -w - 2.1), (0.9, -w - 2.1), (0, -w - 0.4))]
    else:
        shapes += _spring((0, -w), -2.4)
        shapes += arrow((-1.9, -w - 0.4), (1.9, -w - 2.2), head=0.8)
    if relieving:
        shapes += [stroke((-1.4, w), (-1.4, 4.3))]
    return Symbol(shapes=tuple(shapes), body=Box(-w, -w - 2.4, 4.4, 4.3))


@cache
def reducer() -> Symbol:
    """A fixed reducing valve: a small regulator without adjustment."""
    w = 2.2
    shapes = (
        box(-w, -w, w, w),
        *arrow((-w, 0), (w, 0)),
        stroke((w, 0), (3.4, 0)),
        *_spring((0, -w), -1.8),
        stroke((2.9, 0), (2.9, 3.2), (0.6, 3.2), (0.6, w), pen=Pen.PILOT),
    )
    return Symbol(shapes=shapes, body=Box(-w, -w - 1.8, 3.4, 3.4))


@cache
def relief() -> Symbol:
    """A relief valve: the arrow aside of the ports, opened by the dashed pilot from its inlet against the spring."""
    w = 2.3
    shapes = (
        stroke((-3.4, 0), (-w, 0)),
        box(-w, -w, w, w),
        *arrow((-w, -0.9), (w, -0.9), head=0.9),
        stroke((-2.9, 0), (-2.9, -3.0), (0, -3.0), (0, -w), pen=Pen.PILOT),
        *_spring((0, w), 1.8),
    )
    return Symbol(shapes=shapes, body=Box(-3.4, -3.2, w, w + 1.8))


@cache
def instrument(kind: InstrumentKind) -> Symbol:
    """A gauge with its needle, a pressure switch with its contact, or a transmitter."""
    r = DIAL_RADIUS
    body = Box(-r, -r, r, r)
    ring = Circle(centre=(0, 0), radius=r, pen=Pen.SYMBOL, fill=Fill.PAPER)
    match kind:
        case InstrumentKind.GAUGE:
            return Symbol(shapes=(ring, *arrow((-1.4, 1.4), (1.5, -1.5), head=1.0)), body=body)
        case InstrumentKind.SWITCH:
            w = 2.6
            contact = (stroke((-w, 0.6), (-1.2, 0.6), (1.1, -1.4)), stroke((1.2, 0.6), (w, 0.6)))
            return Symbol(shapes=(box(-w, -w, w, r), *contact), body=body)
        case InstrumentKind.TRANSMITTER:
            return Symbol(shapes=(ring, words((0, 1.0), "P")), body=body)


@cache
def bottle(separator: Separator) -> Symbol:
    """A gas-loaded accumulator standing on its port: capsule, separator, open gas triangle."""
    w, h = BOTTLE_HALF, BOTTLE_HEIGHT
    split: tuple[Shape, ...]
    match separator:
        case Separator.PISTON:
            split = (stroke((-w, -4.0), (w, -4.0)), stroke((-w, -4.9), (w, -4.9)))
        case Separator.UNKNOWN:
            split = (stroke((-w, -4.5), (w, -4.5)),)
        case _:
            split = (Arc(start=(-w, -4.9), end=(w, -4.9), radius=3.0, pen=Pen.SYMBOL),)
    shapes = (*_capsule(w, h), *split, area((-0.9, -8.0), (0.9, -8.0), (0, -6.5)))
    return Symbol(shapes=shapes, body=Box(-w, -h, w, 0))


@cache
def gas_bottle() -> Symbol:
    """A bottle of nitrogen standing on its port."""
    shapes = (*_capsule(1.8, 7.5), area((-0.9, -5.0), (0.9, -5.0), (0, -3.5)))
    return Symbol(shapes=shapes, body=Box(-1.8, -7.5, 1.8, 0))


@cache
def gas_valve(venting: bool) -> Symbol:
    """The charging valve on top of a bottle, upright; open while the nitrogen is let out."""
    fill = Fill.PAPER if venting else Fill.INK
    shapes = (area((-0.9, 1.1), (0, 0), (0.9, 1.1), fill=fill), area((-0.9, -1.1), (0, 0), (0.9, -1.1), fill=fill))
    return Symbol(shapes=shapes, body=Box(-0.9, -1.1, 0.9, 1.1))


@cache
def tank() -> Symbol:
    """The reservoir, open at the top, entered from above."""
    shapes = (stroke((-1.4, -0.7), (-1.4, 1.0), (1.4, 1.0), (1.4, -0.7)), stroke((0, -TANK_TOP), (0, 0.4)))
    return Symbol(shapes=shapes, body=Box(-1.4, -TANK_TOP, 1.4, 1.1))


@cache
def outlet_to_air() -> Symbol:
    """An outlet to the atmosphere, entered from above."""
    shapes = (stroke((0, -TANK_TOP), (0, -0.6)), area((-1.3, -0.6), (1.3, -0.6), (0, 1.1)))
    return Symbol(shapes=shapes, body=Box(-1.4, -TANK_TOP, 1.4, 1.1))


@cache
def breather() -> Symbol:
    """The breather of the reservoir, joined from below."""
    shapes = (stroke((0, 1.4), (0, 0.6)), area((-1.3, 0.6), (1.3, 0.6), (0, -1.1)))
    return Symbol(shapes=shapes, body=Box(-1.4, -1.2, 1.4, 1.4))


@cache
def ring(letter: str) -> Symbol:
    """A letter in a ring: the line goes on where the same letter stands."""
    shapes = (
        Circle(centre=(0, 0), radius=RING_RADIUS, pen=Pen.SYMBOL, fill=Fill.PAPER),
        words((0, 0.88), letter, size_mm=2.4),
    )
    return Symbol(shapes=shapes, body=Box(-RING_RADIUS, -RING_RADIUS, RING_RADIUS, RING_RADIUS))


@cache
def union() -> Symbol:
    """A joint of plain pipe."""
    shapes = (stroke((-0.4, -1.1), (-0.4, 1.1)), stroke((0.4, -1.1), (0.4, 1.1)))
    return Symbol(shapes=shapes, body=Box(-0.4, -1.1, 0.4, 1.1))


@cache
def isolator(on: bool) -> Symbol:
    """An electric isolator: the blade closed or lifted, with the bar of a switch that isolates."""
    blade = stroke((-1.5, 0), (1.5, 0), pen=Pen.HEAVY) if on else stroke((-1.5, 0), (1.2, -1.7), pen=Pen.HEAVY)
    shapes = (
        stroke((-VALVE_HALF, 0), (-1.5, 0)),
        blade,
        stroke((1.5, 0), (VALVE_HALF, 0)),
        stroke((1.5, -1.0), (1.5, 1.0)),
        Circle(centre=(-1.5, 0), radius=0.4, pen=Pen.SYMBOL, fill=Fill.INK),
    )
    return Symbol(shapes=shapes, body=Box(-VALVE_HALF, -2.0, VALVE_HALF, 2.0))


@cache
def cylinder(piston: str) -> Symbol:
    """A double-acting cylinder from the corner of its closing end; ports on top; the rod comes out to close."""
    at = {"open": 2.2, "close": 6.2}.get(piston, 4.2)
    shapes = (
        box(0, 0, CYLINDER_LONG, 5.6),
        box(at, 0, at + 1.4, 5.6, fill=Fill.TINT),
        box(at + 1.4, 2.3, at + 6.2, 3.3),
    )
    return Symbol(shapes=shapes, body=Box(0, 0, CYLINDER_LONG + 2.6, 5.6))


def arrow(start: Point, end: Point, head: float = 1.2) -> tuple[Shape, ...]:
    """A line with a filled head at its end."""
    (x1, y1), (x2, y2) = start, end
    length: float = ((x2 - x1) ** 2 + (y2 - y1) ** 2) ** 0.5
    ux, uy = (x2 - x1) / length, (y2 - y1) / length
    bx, by = x2 - ux * head, y2 - uy * head
    half = head * 0.4
    return stroke(start, (bx, by)), area(
        end, (bx - uy * half, by + ux * half), (bx + uy * half, by - ux * half), fill=Fill.INK
    )


def _spring(foot: Point, height: float) -> tuple[Shape, ...]:
    x, y = foot
    steps = 4
    zigzag = [(x + (1.1 if i % 2 else -1.1), y + height * (i + 0.5) / steps) for i in range(steps)]
    return (stroke((x, y), *zigzag, (x, y + height)),)


def _capsule(w: float, h: float) -> tuple[Shape, ...]:
    return (
        stroke((-w, -w), (-w, w - h)),
        stroke((w, -w), (w, w - h)),
        Arc(start=(-w, w - h), end=(w, w - h), radius=w, pen=Pen.SYMBOL),
        Arc(start=(w, -w), end=(-w, -w), radius=w, pen=Pen.SYMBOL),
    )


@cache
def shaft(length: float) -> Symbol:
    """The shaft between a pump and what turns it, upward from its lower end."""
    shapes = (stroke((-0.4, 0), (-0.4, -length)), stroke((0.4, 0), (0.4, -length)))
    return Symbol(shapes=shapes, body=Box(-0.4, -length, 0.4, 0))


@cache
def upright_shut_off(opened: bool) -> Symbol:
    """A shut-off valve in a line that goes up."""
    fill = Fill.PAPER if opened else Fill.INK
    w, h = 1.75, VALVE_HALF
    shapes: list[Shape] = [area((-w, -h), (0, 0), (w, -h), fill=fill), area((-w, h), (0, 0), (w, h), fill=fill)]
    if not opened:
        shapes.append(stroke((-2.0, 0), (2.0, 0), pen=Pen.HEAVY))
    return Symbol(shapes=tuple(shapes), body=Box(-2.0, -h, 2.0, h))


@cache
def entry() -> Symbol:
    """Where the return header runs into the reservoir."""
    shapes = (stroke((-1.1, -0.4), (1.1, -0.4)), stroke((-1.1, 0.4), (1.1, 0.4)))
    return Symbol(shapes=shapes, body=Box(-1.1, -0.4, 1.1, 0.4))
