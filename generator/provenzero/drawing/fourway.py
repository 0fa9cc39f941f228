"""The symbol of a three-position four-way valve: one square a position, the one in force set off."""

from functools import cache

from provenzero.drawing.model import Box, Circle, Fill, Pen, Shape, moved
from provenzero.drawing.symbols import Symbol, area, arrow, box, stroke, words
from provenzero.unit.model import Centre

SIDE = 5.6
PORT_LEFT = 1.4
PORT_RIGHT = 4.2
LEVER = 4.6
_SQUARES = ("open", "centre", "close")


@cache
def four_way(centre: Centre, position: str) -> Symbol:
    """Three squares (open, centre, close) from the top left corner of the first, with the lever at their left."""
    shapes: list[Shape] = []
    for place, name in enumerate(_SQUARES):
        shapes += [moved(s, place * SIDE, 0) for s in square(centre, name, name == position)]
    at = _SQUARES.index(position) if position in _SQUARES else 1
    shapes += [moved(box(0, 0, SIDE, SIDE, fill=Fill.NONE, pen=Pen.HEAVY), at * SIDE, 0), *_lever()]
    return Symbol(shapes=tuple(shapes), body=Box(-LEVER, 0, 3 * SIDE, SIDE))


@cache
def square(centre: Centre, name: str, in_force: bool) -> tuple[Shape, ...]:
    """One square: supply and return below, opening and closing line above."""
    frame = box(0, 0, SIDE, SIDE, fill=Fill.TINT if in_force else Fill.PAPER)
    left, right, top, bottom = PORT_LEFT, PORT_RIGHT, 0.0, SIDE
    if name == "open":
        return frame, *arrow((left, bottom), (left, top)), *arrow((right, top), (right, bottom))
    if name == "close":
        return frame, *arrow((left, bottom), (right, top)), *arrow((left, top), (right, bottom))
    stop = _stop(left, bottom, -1)
    if centre is Centre.BLOCKS:
        return frame, *stop, *_stop(right, bottom, -1), *_stop(left, top, 1), *_stop(right, top, 1)
    if centre is Centre.UNKNOWN:
        return frame, *stop, words((SIDE / 2, 3.4), "?", size_mm=3.2)
    join = (
        stroke((left, top), (left, 2.4), (right, 2.4)),
        stroke((right, top), (right, bottom)),
        Circle(centre=(right, 2.4), radius=0.4, pen=Pen.SYMBOL, fill=Fill.INK),
    )
    return frame, *stop, *join


@cache
def pilot_cell(height: float) -> Symbol:
    """The end of a valve that pilot air moves, from its top left corner."""
    middle = height / 2
    shapes = (box(0, 0, 2.8, height), area((2.5, middle - 1.0), (2.5, middle + 1.0), (0.8, middle)))
    return Symbol(shapes=shapes, body=Box(0, 0, 2.8, height))


@cache
def solenoid_cell(height: float) -> Symbol:
    """The end of a valve that electric power moves, from its top left corner."""
    shapes = (box(0, 0, 2.8, height), stroke((0.5, height - 0.6), (2.3, 0.6)))
    return Symbol(shapes=shapes, body=Box(0, 0, 2.8, height))


def _stop(x: float, y: float, into: int) -> tuple[Shape, ...]:
    foot = y + into * 1.3
    return stroke((x, y), (x, foot)), stroke((x - 0.8, foot), (x + 0.8, foot))


def _lever() -> tuple[Shape, ...]:
    middle = SIDE / 2
    return (
        stroke((0, middle), (-1.6, middle)),
        stroke((-1.6, middle + 1.0), (-3.6, middle - 1.6)),
        Circle(centre=(-3.8, middle - 1.9), radius=0.6, pen=Pen.SYMBOL, fill=Fill.INK),
    )
