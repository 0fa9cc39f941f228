"""A drawing as shapes in millimetres: lines, symbols and words, each with a role and never with a colour.

The origin is the top left corner, x runs right and y runs down. Shapes are drawn in the order in which they stand.
"""

from dataclasses import dataclass, replace
from enum import StrEnum
from typing import NamedTuple, TypeAlias

Point: TypeAlias = tuple[float, float]


class Role(StrEnum):
    """What a line means on the drawing, or what a symbol stands for in the isolation."""

    NEUTRAL = "neutral"
    LIVE = "live"
    ZONE = "zone"
    DEAD = "dead"
    TRAPPED = "trapped"
    UNKNOWN = "unknown"
    ISOLATION = "isolation"
    VENTED = "vented"


class Pen(StrEnum):
    """How a shape's outline is drawn; the first seven draw lines of the circuit."""

    NEUTRAL = "neutral"
    LIVE = "live"
    DEAD = "dead"
    VENTED = "vented"
    TRAPPED = "trapped"
    UNKNOWN = "unknown"
    ZONE_EDGE = "zone_edge"
    ZONE_CORE = "zone_core"
    HATCH = "hatch"
    SYMBOL = "symbol"
    FINE = "fine"
    PILOT = "pilot"
    HEAVY = "heavy"
    NONE = "none"


class Fill(StrEnum):
    """What a closed shape is filled with."""

    NONE = "none"
    PAPER = "paper"
    INK = "ink"
    TINT = "tint"


class Anchor(StrEnum):
    """Which end of the words lies at the point."""

    START = "start"
    MIDDLE = "middle"
    END = "end"


class Kind(StrEnum):
    """What a group of shapes is."""

    LINE = "line"
    SYMBOL = "symbol"
    TAG = "tag"
    LABEL = "label"
    MARK = "mark"
    LEGEND = "legend"


class Box(NamedTuple):
    """A rectangle with upright sides [mm]."""

    left: float
    top: float
    right: float
    bottom: float

    def moved(self, dx: float, dy: float) -> "Box":
        """The box, shifted [mm]."""
        return Box(self.left + dx, self.top + dy, self.right + dx, self.bottom + dy)

    def grown(self, by: float) -> "Box":
        """The box with a margin on each side [mm]; a negative one shrinks it."""
        return Box(self.left - by, self.top - by, self.right + by, self.bottom + by)


@dataclass(frozen=True, slots=True, kw_only=True)
class Polyline:
    """Straight pieces from point to point."""

    points: tuple[Point, ...]
    pen: Pen


@dataclass(frozen=True, slots=True, kw_only=True)
class Polygon:
    """A closed outline."""

    points: tuple[Point, ...]
    pen: Pen
    fill: Fill = Fill.NONE


@dataclass(frozen=True, slots=True, kw_only=True)
class Circle:
    """A circle."""

    centre: Point
    radius: float
    pen: Pen
    fill: Fill = Fill.NONE


@dataclass(frozen=True, slots=True, kw_only=True)
class Rect:
    """A rectangle from its top left corner; `round_mm` is the radius of its corners."""

    at: Point
    width: float
    height: float
    pen: Pen
    fill: Fill = Fill.NONE
    round_mm: float = 0.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Arc:
    """A circular arc, clockwise on paper from start to end."""

    start: Point
    end: Point
    radius: float
    pen: Pen


@dataclass(frozen=True, slots=True, kw_only=True)
class Text:
    """Words on one line. `at` is on the base line; `size_mm` is the font size; `ink` the colour of the letters."""

    at: Point
    words: str
    size_mm: float
    anchor: Anchor = Anchor.MIDDLE
    bold: bool = False
    ink: Fill = Fill.INK


Shape: TypeAlias = Polyline | Polygon | Circle | Rect | Arc | Text


@dataclass(frozen=True, slots=True, kw_only=True)
class Group:
    """Shapes that belong together. `names`: line ids or tags; `body`: what no other line may run through."""

    kind: Kind
    role: Role
    names: tuple[str, ...]
    shapes: tuple[Shape, ...]
    body: Box | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Drawing:
    """One sheet, with a title and the words for somebody who cannot see it.

    Width and height are those on paper [mm]; a millimetre of the shapes is `scale` millimetres on paper.
    """

    width_mm: float
    height_mm: float
    scale: float
    title: str
    alt: str
    groups: tuple[Group, ...]


def moved(shape: Shape, dx: float, dy: float) -> Shape:
    """A shape, shifted [mm]."""
    match shape:
        case Polyline() | Polygon():
            return replace(shape, points=tuple((x + dx, y + dy) for x, y in shape.points))
        case Circle():
            return replace(shape, centre=(shape.centre[0] + dx, shape.centre[1] + dy))
        case Arc():
            (x1, y1), (x2, y2) = shape.start, shape.end
            return replace(shape, start=(x1 + dx, y1 + dy), end=(x2 + dx, y2 + dy))
        case Rect() | Text():
            return replace(shape, at=(shape.at[0] + dx, shape.at[1] + dy))
