"""What can be wrong with a sheet, found from its shapes alone: each check returns the faults it sees, in words."""

from collections.abc import Iterator
from itertools import combinations, pairwise

from provenzero.drawing.arrange import HEIGHT_MM, WIDTH_MM
from provenzero.drawing.metric import box_of
from provenzero.drawing.model import (
    Arc,
    Box,
    Circle,
    Drawing,
    Group,
    Kind,
    Point,
    Polygon,
    Polyline,
    Rect,
    Role,
    Shape,
    Text,
)

TOUCH = 0.02
BOX_MARGIN = 0.9
BAND_HALF = 0.95


def faults(drawing: Drawing) -> list[str]:
    """Everything that is wrong with one sheet."""
    found: list[str] = []
    for check in (too_big, outside, symbols_overlap, lines_through_symbols, texts_overlap, lines_on_lines, small_text):
        found += check(drawing)
    return found


def too_big(drawing: Drawing) -> Iterator[str]:
    if drawing.width_mm > WIDTH_MM + 0.01 or drawing.height_mm > HEIGHT_MM + 0.01:
        yield f"the sheet is {drawing.width_mm} by {drawing.height_mm} mm"


def small_text(drawing: Drawing) -> Iterator[str]:
    for group in drawing.groups:
        for text in texts(group):
            if text.size_mm * drawing.scale < 2.2:
                yield f"{text.words} is {text.size_mm * drawing.scale:.2f} mm"


def outside(drawing: Drawing) -> Iterator[str]:
    wide, tall = drawing.width_mm / drawing.scale, drawing.height_mm / drawing.scale
    for group in drawing.groups:
        for shape in group.shapes:
            box = extent(shape)
            if box.left < -0.1 or box.top < -0.1 or box.right > wide + 0.1 or box.bottom > tall + 0.1:
                yield f"{group.kind} {group.names} stands outside the sheet"
                break


def symbols_overlap(drawing: Drawing) -> Iterator[str]:
    bodies = [(group, group.body) for group in drawing.groups if group.body is not None]
    for (one, a), (other, b) in combinations(bodies, 2):
        if overlap(a, b):
            yield f"{one.names} and {other.names} overlap"


def lines_through_symbols(drawing: Drawing) -> Iterator[str]:
    """A line may end at a symbol, or within the margin of its box; no line may cross its body."""
    bodies = [
        (g, g.body.grown(-BOX_MARGIN - TOUCH) if g.role is Role.ISOLATION else g.body.grown(-TOUCH))
        for g in drawing.groups
        if g.body is not None
    ]
    for line in drawing.groups:
        if line.kind is not Kind.LINE:
            continue
        for start, end in segments(line):
            box = Box(min(start[0], end[0]), min(start[1], end[1]), max(start[0], end[0]), max(start[1], end[1]))
            for symbol, body in bodies:
                if overlap(box.grown(0.001), body):
                    yield f"line {line.names} runs through {symbol.names}"


def lines_on_lines(drawing: Drawing) -> Iterator[str]:
    """Two lines may cross at a right angle; they may not run along each other."""
    pieces = [(g.names[0], s, e) for g in drawing.groups if g.kind is Kind.LINE for s, e in segments(g)]
    for (one, (x1, y1), (x2, y2)), (other, (u1, v1), (u2, v2)) in combinations(pieces, 2):
        if one == other:
            continue
        flat, level = abs(y1 - y2) < TOUCH, abs(v1 - v2) < TOUCH
        if flat and level and abs(y1 - v1) < 0.9 and shared(x1, x2, u1, u2) > 0.3:
            yield f"lines {one} and {other} run on each other"
        if not flat and not level and abs(x1 - u1) < 0.9 and shared(y1, y2, v1, v2) > 0.3:
            yield f"lines {one} and {other} run on each other"


def texts_overlap(drawing: Drawing) -> Iterator[str]:
    """Words, marks and labels stand clear of each other, of symbols that are not their own and of lines."""
    yield from _words_on_words(drawing)
    outlines = [(g, g.body) for g in drawing.groups if g.body is not None]
    outlines += [(g, around(g)) for g in drawing.groups if g.kind in (Kind.MARK, Kind.LABEL) and g.shapes]
    pieces = [(g, band(s, e, g)) for g in drawing.groups if g.kind is Kind.LINE for s, e in segments(g)]
    yield from _words_on_others(drawing, outlines, pieces)
    yield from _marks_on_marks(outlines)
    yield from _labels_on_others(outlines, pieces)


def _words_on_words(drawing: Drawing) -> Iterator[str]:
    words = [(g, t, box_of(t)) for g in drawing.groups for t in texts(g)]
    for (one, a, first), (other, b, second) in combinations(words, 2):
        if overlap(first, second):
            yield f"words {a.words} of {one.names} lie on words {b.words} of {other.names}"


Outlines = list[tuple[Group, Box]]


def _words_on_others(drawing: Drawing, outlines: Outlines, pieces: Outlines) -> Iterator[str]:
    words = [(g, t, box_of(t)) for g in drawing.groups for t in texts(g)]
    for group, text, box in words:
        for symbol, body in outlines:
            own = symbol is group or (group.kind is Kind.MARK and symbol.names == group.names)
            if not own and overlap(box, body) and not lozenge_corner(symbol, box) and not within(box, body):
                yield f"words {text.words} of {group.names} lie on {symbol.kind} {symbol.names}"
        for line, piece in pieces:
            if group.kind not in (Kind.LABEL, Kind.SYMBOL) and overlap(box, piece):
                yield f"words {text.words} of {group.names} lie on line {line.names}"


def _marks_on_marks(outlines: Outlines) -> Iterator[str]:
    for (one, a), (other, b) in combinations([o for o in outlines if o[0].kind is not Kind.SYMBOL], 2):
        if overlap(a, b) and not (lozenge_corner(one, b) or lozenge_corner(other, a)):
            yield f"{one.kind} {one.names} lies on {other.kind} {other.names}"


def _labels_on_others(outlines: Outlines, pieces: Outlines) -> Iterator[str]:
    for label, box in outlines:
        if label.kind is Kind.LABEL:
            for symbol, body in outlines:
                if symbol.kind is Kind.SYMBOL and overlap(box, body) and not within(box, body):
                    yield f"label of {label.names} lies on {symbol.names}"
            for line, piece in pieces:
                if line.names != label.names and overlap(box, piece):
                    yield f"label of {label.names} lies on line {line.names}"


def lozenge_corner(group: Group, box: Box) -> bool:
    """A lozenge is as empty as its corners: a box that stays outside the rhombus does not lie on it."""
    rhombus = next((s for s in group.shapes if isinstance(s, Polygon) and len(s.points) == 4), None)
    if group.kind is not Kind.MARK or rhombus is None:
        return False
    (left, y), (x, top), (right, _), (_, bottom) = rhombus.points
    near_x, near_y = min(max(x, box.left), box.right), min(max(y, box.top), box.bottom)
    return abs(near_x - x) / ((right - left) / 2) + abs(near_y - y) / ((bottom - top) / 2) >= 1.0 - TOUCH


def texts(group: Group) -> list[Text]:
    return [shape for shape in group.shapes if isinstance(shape, Text)]


def segments(group: Group) -> Iterator[tuple[Point, Point]]:
    """The straight pieces of a line, its hatching left out."""
    for shape in group.shapes:
        if isinstance(shape, Polyline) and shape.pen not in ("hatch", "zone_core"):
            yield from pairwise(shape.points)


def band(start: Point, end: Point, line: Group) -> Box:
    half = BAND_HALF if line.role is Role.ZONE else 0.2
    return Box(
        min(start[0], end[0]) - half,
        min(start[1], end[1]) - half,
        max(start[0], end[0]) + half,
        max(start[1], end[1]) + half,
    )


def around(group: Group) -> Box:
    boxes = [extent(shape) for shape in group.shapes]
    return Box(
        min(b.left for b in boxes), min(b.top for b in boxes), max(b.right for b in boxes), max(b.bottom for b in boxes)
    )


def extent(shape: Shape) -> Box:
    match shape:
        case Polyline() | Polygon():
            xs, ys = [x for x, _ in shape.points], [y for _, y in shape.points]
            return Box(min(xs), min(ys), max(xs), max(ys))
        case Circle():
            x, y = shape.centre
            return Box(x - shape.radius, y - shape.radius, x + shape.radius, y + shape.radius)
        case Rect():
            return Box(shape.at[0], shape.at[1], shape.at[0] + shape.width, shape.at[1] + shape.height)
        case Arc():
            (x1, y1), (x2, y2) = shape.start, shape.end
            return Box(min(x1, x2), min(y1, y2), max(x1, x2), max(y1, y2))
        case Text():
            return box_of(shape)


def overlap(a: Box, b: Box) -> bool:
    return (
        a.left < b.right - TOUCH and b.left < a.right - TOUCH and a.top < b.bottom - TOUCH and b.top < a.bottom - TOUCH
    )


def within(a: Box, b: Box) -> bool:
    """Words may stand inside a tank that has room for them."""
    return a.left > b.left and a.right < b.right and a.top > b.top and a.bottom < b.bottom


def shared(a1: float, a2: float, b1: float, b2: float) -> float:
    return min(max(a1, a2), max(b1, b2)) - max(min(a1, a2), min(b1, b2))
