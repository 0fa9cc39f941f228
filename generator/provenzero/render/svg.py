"""A drawing to an inline SVG: one class a role, line styles on every shape so that paper and screen show the same."""

from collections.abc import Iterator
from html import escape

from provenzero.drawing.model import (
    Anchor,
    Arc,
    Circle,
    Drawing,
    Fill,
    Group,
    Pen,
    Point,
    Polygon,
    Polyline,
    Rect,
    Shape,
    Text,
)

FAMILY = "'Permit Sans', 'DejaVu Sans', Arial, sans-serif"
_INK = "#000"
_FILLS = {Fill.NONE: "none", Fill.PAPER: "#fff", Fill.INK: _INK, Fill.TINT: "#ddd"}
_WIDTHS = {
    Pen.NEUTRAL: 0.4,
    Pen.LIVE: 0.75,
    Pen.DEAD: 0.3,
    Pen.VENTED: 0.3,
    Pen.TRAPPED: 0.55,
    Pen.UNKNOWN: 0.45,
    Pen.ZONE_EDGE: 1.9,
    Pen.ZONE_CORE: 1.2,
    Pen.HATCH: 0.22,
    Pen.SYMBOL: 0.28,
    Pen.FINE: 0.18,
    Pen.PILOT: 0.22,
    Pen.HEAVY: 0.6,
}
_DASHES = {
    Pen.DEAD: "1.3 0.9",
    Pen.TRAPPED: "3 0.8 0.5 0.8",
    Pen.UNKNOWN: "2.2 0.7 0.4 0.6 0.4 0.7",
    Pen.PILOT: "0.7 0.5",
}
_ANCHORS = {Anchor.START: "start", Anchor.MIDDLE: "middle", Anchor.END: "end"}


def svg(drawing: Drawing) -> str:
    """The drawing as one SVG element with its title and its words for those who cannot see it."""
    width, height = _number(drawing.width_mm), _number(drawing.height_mm)
    wide, tall = _number(drawing.width_mm / drawing.scale), _number(drawing.height_mm / drawing.scale)
    parts = [
        f'<svg xmlns="http://www.w3.org/2000/svg" class="circuit" role="img" aria-label="{escape(drawing.alt)}" '
        f'width="{width}mm" height="{height}mm" viewBox="0 0 {wide} {tall}" font-family="{FAMILY}" '
        f'stroke-linejoin="miter">',
        f"<title>{escape(drawing.title)}</title>",
        f"<desc>{escape(drawing.alt)}</desc>",
    ]
    for group in drawing.groups:
        parts.extend(_group(group))
    parts.append("</svg>")
    return "\n".join(parts)


def _group(group: Group) -> Iterator[str]:
    names = f' data-names="{escape(" ".join(group.names))}"' if group.names else ""
    yield f'<g class="{group.kind.value} {group.role.value}"{names}>'
    for shape in group.shapes:
        yield _shape(shape)
    yield "</g>"


def _shape(shape: Shape) -> str:
    match shape:
        case Polyline():
            return f'<polyline points="{_points(shape.points)}" fill="none"{_pen(shape.pen)}/>'
        case Polygon():
            return f'<polygon points="{_points(shape.points)}"{_fill(shape.fill)}{_pen(shape.pen)}/>'
        case Circle():
            x, y = shape.centre
            return f'<circle cx="{_number(x)}" cy="{_number(y)}" r="{_number(shape.radius)}"{_fill(shape.fill)}{_pen(shape.pen)}/>'
        case Rect():
            x, y = shape.at
            corner = f' rx="{_number(shape.round_mm)}"' if shape.round_mm else ""
            return (
                f'<rect x="{_number(x)}" y="{_number(y)}" width="{_number(shape.width)}" height="{_number(shape.height)}"'
                f"{corner}{_fill(shape.fill)}{_pen(shape.pen)}/>"
            )
        case Arc():
            (x1, y1), (x2, y2) = shape.start, shape.end
            radius = _number(shape.radius)
            path = f"M{_number(x1)} {_number(y1)} A{radius} {radius} 0 0 1 {_number(x2)} {_number(y2)}"
            return f'<path d="{path}" fill="none"{_pen(shape.pen)}/>'
        case Text():
            x, y = shape.at
            weight = ' font-weight="700"' if shape.bold else ""
            return (
                f'<text x="{_number(x)}" y="{_number(y)}" font-size="{_number(shape.size_mm)}"{weight} '
                f'text-anchor="{_ANCHORS[shape.anchor]}"{_fill(shape.ink)}>{escape(shape.words)}</text>'
            )


def _pen(pen: Pen) -> str:
    if pen is Pen.NONE:
        return ""
    colour = _FILLS[Fill.PAPER] if pen is Pen.ZONE_CORE else _INK
    dash = f' stroke-dasharray="{_DASHES[pen]}"' if pen in _DASHES else ""
    return f' stroke="{colour}" stroke-width="{_WIDTHS[pen]}"{dash}'


def _fill(fill: Fill) -> str:
    return f' fill="{_FILLS[fill]}"'


def _points(points: tuple[Point, ...]) -> str:
    return " ".join(f"{_number(x)},{_number(y)}" for x, y in points)


def _number(value: float) -> str:
    """A length with two decimals at most."""
    return f"{round(value, 2) + 0.0:.2f}".rstrip("0").rstrip(".")
