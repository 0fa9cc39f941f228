"""Tags, lock numbers, the words on lines and the marks of open vents: measured first, then put on the canvas."""

from dataclasses import dataclass

from provenzero.drawing.canvas import Canvas
from provenzero.drawing.marks import Vent
from provenzero.drawing.metric import ASCENT, DESCENT, broken, width_mm
from provenzero.drawing.model import Anchor, Fill, Kind, Pen, Point, Polygon, Polyline, Rect, Role, Shape, Text
from provenzero.drawing.scene import Scene
from provenzero.network.model import LineId

TAG_MM = 2.6
PITCH = 2.9
TAG_LIMIT = 13.0
LABEL_MM = 2.4
LABEL_HEIGHT = 3.3
LOCK_HALF = 2.7
VENT_HEIGHT = 5.6
_VENT_ARROW = 3.2
_GAP = 0.6


@dataclass(frozen=True, slots=True)
class Tag:
    """The tag of one or more devices, on one or more lines, with a lock number before it if it has one."""

    lines: tuple[str, ...]
    lock: int | None = None
    bold: bool = False

    @property
    def words_width(self) -> float:
        """Width of the letters [mm]."""
        return max((width_mm(line, TAG_MM, bold=self.bold) for line in self.lines), default=0.0)

    @property
    def width(self) -> float:
        """Width with the lock [mm]."""
        return self.words_width + (0.0 if self.lock is None else 2 * lock_half(self.lock) + _GAP)

    @property
    def height(self) -> float:
        """Height [mm]."""
        rows = (len(self.lines) - 1) * PITCH + (ASCENT + DESCENT) * TAG_MM if self.lines else 0.0
        return rows if self.lock is None else max(rows, 2 * LOCK_HALF)

    def draw(self, canvas: Canvas, left: float, top: float, *names: str) -> None:
        """Put it with its top left corner at a point."""
        if self.lock is not None:
            half = lock_half(self.lock)
            lozenge(canvas, (left + half, top + self.height / 2), self.lock, *names)
            left += 2 * half + _GAP
        rows = (len(self.lines) - 1) * PITCH + (ASCENT + DESCENT) * TAG_MM
        base = top + (self.height - rows) / 2 + ASCENT * TAG_MM
        centre = left + self.words_width / 2
        for place, line in enumerate(self.lines):
            text = Text(at=(centre, base + place * PITCH), words=line, size_mm=TAG_MM, bold=self.bold)
            canvas.add(Kind.TAG, (text,), *names)

    def below(self, canvas: Canvas, x: float, y: float, *names: str) -> None:
        """Put it centred under a point."""
        self.draw(canvas, x - self.width / 2, y + 0.5, *names)

    def above(self, canvas: Canvas, x: float, y: float, *names: str) -> None:
        """Put it centred over a point."""
        self.draw(canvas, x - self.width / 2, y - 0.5 - self.height, *names)


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
    x, y = at
    half = lock_half(number)
    shape = Polygon(
        points=((x - half, y), (x, y - LOCK_HALF), (x + half, y), (x, y + LOCK_HALF)), pen=Pen.NONE, fill=Fill.INK
    )
    text = Text(at=(x, y + 0.95), words=str(number), size_mm=2.6, bold=True, ink=Fill.PAPER)
    canvas.add(Kind.MARK, (shape, text), *names, role=Role.ISOLATION)


def label_width(words: str) -> float:
    """Width of the word that stands on a line, with its frame [mm]."""
    return width_mm(words, LABEL_MM, bold=True) + 1.2


def label(canvas: Canvas, scene: Scene, line: LineId, centre: Point) -> None:
    """Put the word that must stand on a line, in its frame."""
    words = scene.told(line)
    if not words:
        return
    role = scene.marks.role(line)
    width = label_width(words)
    x, y = centre
    opened = role is Role.ZONE
    frame = Rect(
        at=(x - width / 2, y - LABEL_HEIGHT / 2), width=width, height=LABEL_HEIGHT,
        pen=Pen.FINE if role is Role.UNKNOWN else Pen.SYMBOL, fill=Fill.INK if opened else Fill.PAPER,
    )
    text = Text(
        at=(x, y + 0.87), words=words, size_mm=LABEL_MM, bold=True, ink=Fill.PAPER if opened else Fill.INK
    )
    canvas.add(Kind.LABEL, (frame, text), line, role=role)


def leader(canvas: Canvas, line: LineId, start: Point, end: Point) -> None:
    """A thin line from a line of the circuit to its word."""
    canvas.add(Kind.MARK, (Polyline(points=(start, end), pen=Pen.FINE),), line)


def vent_width(scene: Scene, where: Vent) -> float:
    """Width of the mark of an open vent [mm]."""
    lines = (scene.wording.open_to, _where(scene, where))
    return _VENT_ARROW + _GAP + max(width_mm(line, LABEL_MM, bold=True) for line in lines)


def vent_mark(canvas: Canvas, scene: Scene, where: Vent, corner: Point, *names: str) -> None:
    """Put the mark of an open vent, a thick arrow down and its words, by its top left corner."""
    x, y = corner
    middle, half, bottom = x + _VENT_ARROW / 2, _VENT_ARROW / 2, y + VENT_HEIGHT
    arrow = Polygon(
        points=(
            (middle - 0.65, y), (middle + 0.65, y), (middle + 0.65, bottom - 2.4), (middle + half, bottom - 2.4),
            (middle, bottom), (middle - half, bottom - 2.4), (middle - 0.65, bottom - 2.4),
        ),
        pen=Pen.NONE, fill=Fill.INK,
    )
    shapes: list[Shape] = [arrow]
    for place, words in enumerate((scene.wording.open_to, _where(scene, where))):
        at = (x + _VENT_ARROW + _GAP, y + 2.1 + place * 2.8)
        shapes.append(Text(at=at, words=words, size_mm=LABEL_MM, anchor=Anchor.START, bold=True))
    canvas.add(Kind.MARK, shapes, *names, role=Role.VENTED)


def _where(scene: Scene, where: Vent) -> str:
    return scene.wording.to_tank if where is Vent.TANK else scene.wording.to_air
