"""Tags, lock numbers, the words on lines and the marks of open vents: measured first, then put on the canvas."""

from dataclasses import dataclass

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.marks import Vent
from provenzero.drawing.metric import ASCENT, DESCENT, broken, width_mm
from provenzero.drawing.model import Anchor, Box, Fill, Kind, Pen, Point, Polygon, Polyline, Rect, Role, Shape, Text
from provenzero.drawing.scene import Scene
from provenzero.network.model import LineId

TAG_MM = 2.6
PITCH = 2.9
TAG_LIMIT = 13.0
LABEL_MM = 2.4
LABEL_HEIGHT = 3.3
LOCK_HALF = 2.7
VENT_HEIGHT = 5.6
_VENT_ARROW = 3.0
GAP = 0.5
CORNER = 0.6


@dataclass(frozen=True, slots=True)
class Tag:
    """The tag of one or more devices, on one or more lines, with a lock number before it if it has one."""

    lines: tuple[str, ...]
    lock: int | None = None
    bold: bool = False

    @property
    def width(self) -> float:
        """Width of the letters [mm]."""
        return max((width_mm(line, TAG_MM, bold=self.bold) for line in self.lines), default=0.0)

    @property
    def height(self) -> float:
        """Height of the letters [mm]."""
        return (len(self.lines) - 1) * PITCH + (ASCENT + DESCENT) * TAG_MM if self.lines else 0.0

    @property
    def reach(self) -> float:
        """How far it stands out from the edge of its symbol [mm]."""
        return self.height + GAP if self.lock is None else max(self.height + GAP, LOCK_HALF + CORNER)

    def left(self, body: Box) -> float:
        """How far it stands out to the left of the origin of a symbol with this body [mm]."""
        return self.width / 2 if self.lock is None else CORNER + lock_half(self.lock) - body.left

    def right(self, body: Box) -> float:
        """How far it stands out to the right of the origin of a symbol with this body [mm]."""
        return self.width / 2 if self.lock is None else body.left - CORNER + lock_half(self.lock) + 0.4 + self.width

    def words(self, canvas: Canvas, left: float, top: float, *names: str) -> None:
        """Put the letters alone with their top left corner at a point."""
        for place, line in enumerate(self.lines):
            at = (left + self.width / 2, top + ASCENT * TAG_MM + place * PITCH)
            canvas.add(Kind.TAG, (Text(at=at, words=line, size_mm=TAG_MM, bold=self.bold),), *names)

    def below(self, canvas: Canvas, x: float, body: Box, *names: str) -> None:
        """Put it under a symbol, centred on x; a lock at the lower left corner of the body."""
        left = x - self.width / 2
        if self.lock is not None:
            left = self._lock(canvas, (body.left - CORNER, body.bottom + CORNER), *names)
        self.words(canvas, left, body.bottom + GAP, *names)

    def above(self, canvas: Canvas, x: float, body: Box, *names: str) -> None:
        """Put it over a symbol, centred on x; a lock at the upper left corner of the body."""
        left = x - self.width / 2
        if self.lock is not None:
            left = self._lock(canvas, (body.left - CORNER, body.top - CORNER), *names)
        self.words(canvas, left, body.top - GAP - self.height, *names)

    def _lock(self, canvas: Canvas, at: Point, *names: str) -> float:
        number = self.lock or 0
        lozenge(canvas, at, number, *names)
        return at[0] + lock_half(number) + 0.4


def tag(words: str, limit_mm: float = TAG_LIMIT) -> Tag:
    """The tag of a device, broken where it is longer than the limit."""
    return Tag(broken(words, TAG_MM, limit_mm))


def locked_tag(scene: Scene, words: str, limit_mm: float = TAG_LIMIT) -> Tag:
    """The tag of a device with the number of its lock."""
    return Tag(broken(words, TAG_MM, limit_mm), scene.lock(words))


def lock_half(number: int) -> float:
    """Half the width of the lozenge that takes a number [mm]."""
    return LOCK_HALF if number < 10 else LOCK_HALF + 0.7  # noqa: PLR2004 - a second digit


def lozenge(canvas: Canvas, at: Point, number: int, *names: str) -> None:
    """Put a lock number in a filled lozenge."""
    canvas.add(Kind.MARK, lozenge_shapes(at, str(number), lock_half(number)), *names, role=Role.ISOLATION)


def lozenge_shapes(at: Point, words: str, half: float = LOCK_HALF, tall: float = LOCK_HALF) -> tuple[Shape, ...]:
    """A filled lozenge with white letters."""
    x, y = at
    points = ((x - half, y), (x, y - tall), (x + half, y), (x, y + tall))
    text = Text(at=(x, y + 0.95), words=words, size_mm=2.6, bold=True, ink=Fill.PAPER)
    return Polygon(points=points, pen=Pen.NONE, fill=Fill.INK), text


def label_width(words: str) -> float:
    """Width of the word that stands on a line, with its frame [mm]."""
    return width_mm(words, LABEL_MM, bold=True) + 1.2


def label(canvas: Canvas, scene: Scene, line: LineId, centre: Point) -> None:
    """Put the word that must stand on a line, in its frame; nothing if there is none."""
    shapes = label_shapes(scene, line, centre)
    if shapes:
        canvas.add(Kind.LABEL, shapes, line, role=scene.marks.role(line))


def label_shapes(scene: Scene, line: LineId, centre: Point) -> tuple[Shape, ...]:
    """The word that must stand on a line, in its frame: white on black where the line is opened."""
    return word_shapes(scene.told(line), scene.marks.role(line), centre)


def word_shapes(words: str, role: Role, centre: Point) -> tuple[Shape, ...]:
    """A word in the frame of its role; nothing if there is no word."""
    if not words:
        return ()
    width = label_width(words)
    x, y = centre
    opened = role is Role.ZONE
    frame = Rect(
        at=(x - width / 2, y - LABEL_HEIGHT / 2),
        width=width,
        height=LABEL_HEIGHT,
        pen=Pen.PILOT if role is Role.UNKNOWN else Pen.SYMBOL,
        fill=Fill.INK if opened else Fill.PAPER,
    )
    ink = Fill.PAPER if opened else Fill.INK
    return frame, Text(at=(x, y + 0.87), words=words, size_mm=LABEL_MM, bold=True, ink=ink)


def leader(canvas: Canvas, line: LineId, start: Point, end: Point) -> None:
    """A thin line from a line of the circuit to its word."""
    canvas.add(Kind.MARK, (Polyline(points=(start, end), pen=Pen.FINE),), line)


def vent_width(scene: Scene, where: Vent) -> float:
    """Width of the mark of an open vent [mm]."""
    lines = (scene.wording.open_to, _where(scene, where))
    return _VENT_ARROW + GAP + max(width_mm(line, LABEL_MM, bold=True) for line in lines)


def vent_mark(canvas: Canvas, scene: Scene, where: Vent, corner: Point, *names: str) -> None:
    """Put the mark of an open vent, a thick arrow down and its words, by its top left corner."""
    x, y = corner
    shapes: list[Shape] = [down_arrow((x + _VENT_ARROW / 2, y), VENT_HEIGHT)]
    for place, words in enumerate((scene.wording.open_to, _where(scene, where))):
        at = (x + _VENT_ARROW + GAP, y + 2.1 + place * 2.8)
        shapes.append(Text(at=at, words=words, size_mm=LABEL_MM, anchor=Anchor.START, bold=True))
    canvas.add(Kind.MARK, shapes, *names, role=Role.VENTED)


def down_arrow(top: Point, height: float) -> Polygon:
    """A thick filled arrow that points down."""
    x, y = top
    half, neck = _VENT_ARROW / 2, y + height - 2.4
    points = (
        (x - 0.65, y),
        (x + 0.65, y),
        (x + 0.65, neck),
        (x + half, neck),
        (x, y + height),
        (x - half, neck),
        (x - 0.65, neck),
    )
    return Polygon(points=points, pen=Pen.NONE, fill=Fill.INK)


def _where(scene: Scene, where: Vent) -> str:
    return scene.wording.to_tank if where is Vent.TANK else scene.wording.to_air
